package org.minorant.study;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.math.BigDecimal;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.concurrent.TimeUnit;
import java.util.concurrent.atomic.AtomicLong;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.minorant.core.DensityOperator;
import org.minorant.core.NumpyFile;
import org.minorant.core.Operator;

class StudyTest {

    private static final String[] ALL = {
        "title A small study",
        "state a a.mtx",
        "state b b.npy",
        "state c c.mtx",
        "pair p a b prior 0.3",
        "ensemble three a:0.5 b:0.25 c:0.25",
        "ensemble two a b",
        "channel k a b c",
        "errors 0.1 0.5",
        "messages 2",
        "output out"
    };

    @TempDir
    Path directory;

    private SmallStudy small;

    @BeforeEach
    void states() throws IOException {
        small = new SmallStudy(directory);
    }

    private String result(String name) throws IOException {
        return Files.readString(small.file("out").resolve(name));
    }

    @Test
    void everyResultIsWrittenAndNamed() throws IOException {
        SmallStudy.Outcome o = small.run(ALL);
        assertEquals(Exit.DONE, o.exit(), o.err());
        assertEquals("", o.err());
        try (var files = Files.list(small.file("out"))) {
            assertEquals(
                    List.of("bounds-k.svg", "bounds-p.svg", "numbers.csv", "report.txt", "tradeoff-p.svg"),
                    files.map(f -> f.getFileName().toString()).sorted().toList());
        }
        assertTrue(o.out().startsWith(result("report.txt")), o.out());
        for (String name : List.of("report.txt", "numbers.csv", "tradeoff-p.svg", "bounds-p.svg", "bounds-k.svg")) {
            assertTrue(o.out().contains("wrote " + small.file("out").resolve(name)), name);
        }
    }

    @Test
    void theSameStudyGivesTheSameBytesAndOtherFilesStay() throws IOException {
        Files.createDirectory(small.file("out"));
        Files.writeString(small.file("out").resolve("mine.txt"), "mine");
        Files.writeString(small.file("out").resolve("numbers.csv"), "an old result");
        small.run(ALL);
        List<String> names = List.of("report.txt", "numbers.csv", "tradeoff-p.svg", "bounds-p.svg", "bounds-k.svg");
        List<String> first = names.stream().map(this::read).toList();
        small.run(ALL);
        assertEquals(first, names.stream().map(this::read).toList());
        assertEquals("mine", result("mine.txt"));
        assertFalse(first.get(1).contains("old"));
    }

    private String read(String name) {
        try {
            return result(name);
        } catch (IOException e) {
            throw new java.io.UncheckedIOException(e);
        }
    }

    @Test
    void whereTheStudyLiesDoesNotShowInTheReport() throws IOException {
        small.run(ALL);
        assertFalse(result("report.txt").contains(directory.toString()));
        assertFalse(result("numbers.csv").contains(directory.toString()));
    }

    @Test
    void twoStatesOfAnEnsembleHaveAKnownErrorAndThreeHaveLimits() throws IOException {
        small.run(ALL);
        List<List<String>> rows = Csv.parse(result("numbers.csv"));
        assertEquals(List.of("exact"), sides(rows, "two"));
        assertEquals(List.of("lower", "upper"), sides(rows, "three"));
        BigDecimal low = end(rows, "three", 0, 5);
        BigDecimal high = end(rows, "three", 1, 6);
        // Barnum and Knill: e/2 <= least error <= e
        assertTrue(low.multiply(new BigDecimal(2)).compareTo(high) >= 0 && low.compareTo(high) < 0, low + " " + high);
    }

    private static List<List<String>> minimumErrors(List<List<String>> rows, String name) {
        return rows.stream()
                .filter(r -> r.get(1).equals(name) && r.get(2).equals("minimum error"))
                .toList();
    }

    private static List<String> sides(List<List<String>> rows, String name) {
        return minimumErrors(rows, name).stream().map(r -> r.get(4)).toList();
    }

    private static BigDecimal end(List<List<String>> rows, String name, int row, int column) {
        return new BigDecimal(minimumErrors(rows, name).get(row).get(column));
    }

    @Test
    void certainPriorsAreAnsweredToo() throws IOException {
        for (String prior : List.of("0", "1")) {
            SmallStudy.Outcome o =
                    small.run("state a a.mtx", "state b b.npy", "pair p a b prior " + prior, "output out");
            assertEquals(Exit.DONE, o.exit(), o.err());
            Csv.parse(result("numbers.csv")).stream()
                    .filter(r -> r.get(2).equals("minimum error") && r.get(4).equals("exact"))
                    .forEach(r -> assertEquals(List.of("0", "0"), r.subList(5, 7)));
        }
    }

    /** Three copies of the two states of the check values: .3197... for one copy, .2574... for two, of 100 digits by an independent program. */
    @Test
    void copiesHaveTheirTableTheirChartsAndTheirFit() throws IOException {
        SmallStudy.Outcome o =
                small.run("state a a.mtx", "state b b.npy", "pair p a b prior 0.5", "copies p 1 2 10", "output out");
        assertEquals(Exit.DONE, o.exit(), o.err());
        List<List<String>> rows = Csv.parse(result("numbers.csv")).stream()
                .filter(r -> r.get(0).equals("copies"))
                .toList();
        double[] known = {0.3197224362268005353, 0.2574710914690333083, 0.07994611919654871755};
        List<List<String>> exact = rows.stream()
                .filter(r -> r.get(2).startsWith("minimum error") && r.get(4).equals("exact"))
                .toList();
        List<List<String>> alone =
                rows.stream().filter(r -> r.get(3).endsWith("its error")).toList();
        List<List<String>> ratios = rows.stream()
                .filter(r -> r.get(3).endsWith("over minimum error"))
                .toList();
        for (int i = 0; i < 3; i++) {
            // entries of the files are rounded to 1e-16, times ten copies
            assertEquals(known[i], Double.parseDouble(exact.get(i).get(5)), 1e-13);
            assertEquals(
                    Double.parseDouble(ratios.get(i).get(6)),
                    Double.parseDouble(alone.get(i).get(6)) / known[i],
                    1e-10);
        }
        assertTrue(Double.parseDouble(ratios.get(2).get(5)) > 1.2, ratios::toString);
        assertEquals("minimum error, 1 copy", exact.get(0).get(2));
        assertTrue(o.out().contains("Estimated from the last 3: -log2 error = n C + 0."), o.out());
        for (String name : List.of("copies-p.svg", "exponents-p.svg")) {
            assertTrue(result(name).contains("copies of p</title>"), name);
        }
    }

    /** Two kets of overlap 0.78 in 100 and 500 uses: computed in closed form by an independent program. */
    @Test
    void usesHaveTheirTableAndTheirChart() throws IOException {
        String head = "%%MatrixMarket matrix array real general\n2 1\n";
        Files.writeString(small.file("u.mtx"), head + "1\n0\n");
        Files.writeString(small.file("v.mtx"), head + "0.78\n" + Math.sqrt(1 - 0.78 * 0.78) + "\n");
        SmallStudy.Outcome o = small.run(
                "state u u.mtx", "state v v.mtx", "channel c u v", "uses c error 0.001 100 500", "output out");
        assertEquals(Exit.DONE, o.exit(), o.err());
        List<List<String>> rows = Csv.parse(result("numbers.csv")).stream()
                .filter(r -> r.get(0).equals("uses") && r.get(2).equals("bits for each use"))
                .toList();
        double[] known = {23.094144, 34.574485, 187.711840, 200.881080};
        for (int i = 0; i < 4; i++) {
            int n = i < 2 ? 100 : 500;
            assertEquals(i % 2 == 0 ? "lower" : "upper", rows.get(i).get(4));
            // printed to six decimals; whole messages cost up to 2^-23 of them
            assertEquals(known[i], n * Double.parseDouble(rows.get(i).get(6)), 1e-6);
        }
        assertTrue(o.out().contains("Normal approximation, 500 uses: 18"), o.out());
        assertTrue(result("uses-c.svg").contains("what uses of c carry</title>"));
    }

    @Test
    void copiesWithoutErrorOrWithoutInformationAreAnsweredToo() throws IOException {
        for (String pair : List.of("pair p a b prior 1", "pair p a a prior 0.5")) {
            SmallStudy.Outcome o = small.run("state a a.mtx", "state b b.npy", pair, "copies p 1 4", "output out");
            assertEquals(Exit.DONE, o.exit(), o.err());
        }
    }

    @Test
    void oneStateTwiceIsAnsweredToo() throws IOException {
        SmallStudy.Outcome o = small.run(
                "state a a.mtx",
                "state b a.mtx",
                "pair p a b prior 0.5",
                "ensemble e a b",
                "channel k a b",
                "output out");
        assertEquals(Exit.DONE, o.exit(), o.err());
        List<String> exact = minimumErrors(Csv.parse(result("numbers.csv")), "p").stream()
                .filter(r -> r.get(4).equals("exact"))
                .findFirst()
                .orElseThrow();
        assertTrue(Double.parseDouble(exact.get(5)) <= 0.5 && Double.parseDouble(exact.get(6)) >= 0.5, exact::toString);
        assertEquals(Double.parseDouble(exact.get(5)), Double.parseDouble(exact.get(6)), 1e-14);
    }

    @Test
    void aMatrixThatIsNotQuiteAStateIsRepairedOnRequestAndTheReportSaysByHowMuch() throws IOException {
        NumpyFile.write(small.file("rough.npy"), Operator.ofReal(new double[][] {{0.7, 0.1}, {0.1, 0.302}}));
        SmallStudy.Outcome o = small.run("nearest a rough.npy", "state b b.npy", "pair p a b prior 0.5", "output out");
        assertEquals(Exit.DONE, o.exit(), o.err());
        // 0.001 is taken off both diagonal entries, a distance of 0.001 sqrt 2
        assertTrue(o.out().contains("as the nearest state, 1.4e-03 away"), o.out());
        assertTrue(o.out().contains("b      2          b.npy      as it is"), o.out());
        DensityOperator used = DensityOperator.ofReal(new double[][] {{0.699, 0.1}, {0.1, 0.301}});
        double expected = org.minorant.measurement.HypothesisPair.of(
                        used, NumpyFile.readDensityOperator(small.file("b.npy")))
                .minimumError(0.5)
                .midpoint();
        assertEquals(
                expected,
                minimumErrors(Csv.parse(result("numbers.csv")), "p").stream()
                        .filter(r -> r.get(4).equals("exact"))
                        .mapToDouble(r -> Double.parseDouble(r.get(5)))
                        .sum(),
                1e-14);
    }

    @Test
    void progressGoesToStandardErrorOnceASecondHasPassed() throws IOException {
        AtomicLong now = new AtomicLong();
        SmallStudy.Outcome o = small.run(() -> now.getAndAdd(700_000_000L), ALL);
        assertEquals(Exit.DONE, o.exit());
        assertTrue(o.err().lines().count() > 2, o.err());
        assertTrue(o.err().lines().allMatch(l -> l.matches("\\[[0-9]+ s\\] step [0-9]+ of 8: .*")), o.err());
        assertFalse(o.out().contains("step"), o.out());
    }

    @Test
    void faultsOfThisProgramAreNotCalledBadInput() {
        SmallStudy.Outcome o = SmallStudy.run(
                () -> {
                    throw new IllegalStateException("broken clock");
                },
                List.of("x"));
        assertEquals(Exit.INTERNAL, o.exit());
        assertEquals(1, o.exit().status());
        assertTrue(o.err().startsWith("internal error, please report it"), o.err());
        assertTrue(o.err().contains("broken clock"), o.err());
    }

    /** As it is started by a user, in a process of its own. */
    @Test
    void theProcessEndsWithTheStatus() throws Exception {
        Files.writeString(
                small.file("good.study"), String.join("\n", "state a a.mtx", "state b b.npy", "ensemble e a b"));
        Files.writeString(small.file("bad.study"), "state a none.mtx\nstate b b.npy\nensemble e a b");
        assertEquals(0, status("good.study", small.file("good.err")));
        assertTrue(Files.exists(small.file("good-results").resolve("numbers.csv")));
        assertEquals(2, status("bad.study", small.file("bad.err")));
        assertEquals(1, Files.readAllLines(small.file("bad.err")).size());
    }

    private int status(String study, Path err) throws Exception {
        Process process = new ProcessBuilder(
                        Path.of(System.getProperty("java.home"), "bin", "java").toString(),
                        "-cp",
                        System.getProperty("java.class.path"),
                        Study.class.getName(),
                        small.file(study).toString())
                .redirectOutput(ProcessBuilder.Redirect.DISCARD)
                .redirectError(err.toFile())
                .start();
        // a guard against a process that never ends, no measurement
        assertTrue(process.waitFor(5, TimeUnit.MINUTES));
        return process.exitValue();
    }
}
