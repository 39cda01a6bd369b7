package org.minorant.study;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.math.BigDecimal;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.minorant.bounds.ClassicalQuantumChannel;
import org.minorant.bounds.CodingBounds;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.MatrixMarket;
import org.minorant.core.NumpyFile;
import org.minorant.measurement.Ensemble;
import org.minorant.measurement.HypothesisPair;
import org.minorant.measurement.PrettyGoodMeasurement;

/** The shipped demo from its files to its results, once. */
class DemoTest {

    private static SmallStudy.Outcome outcome;

    private static List<List<String>> rows;

    @BeforeAll
    static void run() throws IOException {
        outcome = DemoRun.get().outcome();
        rows = DemoRun.get().rows();
    }

    private static DensityOperator state(String file) throws IOException {
        return state(DemoRun.SHIPPED.resolve(file));
    }

    private static DensityOperator state(Path path) throws IOException {
        return path.toString().endsWith(".npy")
                ? NumpyFile.readDensityOperator(path)
                : MatrixMarket.readDensityOperator(path);
    }

    /** The one row of these fields holds exactly this enclosure, written outward to 17 digits. */
    private static void assertHolds(Enclosure expected, String name, String quantity, String argument, String method) {
        List<List<String>> found = rows.stream()
                .filter(r -> r.get(1).equals(name)
                        && r.get(2).equals(quantity)
                        && r.get(3).equals(argument)
                        && r.get(8).startsWith(method))
                .toList();
        assertEquals(1, found.size(), () -> name + ", " + quantity + ", " + argument + ", " + method);
        BigDecimal lower = new BigDecimal(found.get(0).get(5));
        BigDecimal upper = new BigDecimal(found.get(0).get(6));
        BigDecimal slack = new BigDecimal("1e-16");
        assertTrue(lower.compareTo(expected.lowerWide().toBigDecimal()) <= 0, () -> found + " for " + expected);
        assertTrue(upper.compareTo(expected.upperWide().toBigDecimal()) >= 0, () -> found + " for " + expected);
        assertTrue(expected.lowerWide()
                        .toBigDecimal()
                        .subtract(lower)
                        .abs()
                        .compareTo(lower.abs().multiply(slack))
                <= 0);
        assertTrue(upper.subtract(expected.upperWide().toBigDecimal())
                        .abs()
                        .compareTo(upper.abs().multiply(slack))
                <= 0);
    }

    @Test
    void theShippedFilesAreWhatTheGeneratorMakes(@TempDir Path made) throws IOException {
        DemoStates.write(made);
        List<Path> shipped = DemoRun.shipped().stream()
                .filter(f -> !f.toString().endsWith(".study"))
                .toList();
        assertEquals(9, shipped.size());
        for (Path file : shipped) {
            String name = String.valueOf(file.getFileName());
            assertEquals(comments(made.resolve(name)), comments(file), name);
            DensityOperator expected = state(made.resolve(name));
            DensityOperator found = state(file);
            assertEquals(expected.dimension(), found.dimension(), name);
            // a library that sums in another order may round an entry, which is at most 1, the other way
            double[] moved = expected.minus(found).realParts();
            double[] turned = expected.minus(found).isReal()
                    ? new double[0]
                    : expected.minus(found).imaginaryParts();
            assertArrayEquals(new double[moved.length], moved, Math.ulp(1.0), name);
            assertArrayEquals(new double[turned.length], turned, Math.ulp(1.0), name);
        }
    }

    /** Where a Matrix Market file says it comes from. */
    private static List<String> comments(Path file) throws IOException {
        return file.toString().endsWith(".mtx")
                ? Files.readAllLines(file).stream()
                        .filter(l -> l.startsWith("%"))
                        .toList()
                : List.of();
    }

    @Test
    void theRunSucceedsQuietly() {
        assertEquals(Exit.DONE, outcome.exit());
        assertEquals("", outcome.err());
        assertTrue(outcome.out().startsWith("Lamp signals across Ouster Sound (invented)\n"), outcome.out());
    }

    @Test
    void everyRowIsAnEnclosureWithItsUnitMethodAndSource() {
        assertEquals(List.of(CsvText.HEADER.split(",")), rows.get(0));
        assertTrue(rows.size() > 70, () -> String.valueOf(rows.size()));
        for (List<String> r : rows.subList(1, rows.size())) {
            assertEquals(11, r.size(), r::toString);
            assertTrue(new BigDecimal(r.get(5)).compareTo(new BigDecimal(r.get(6))) <= 0, r::toString);
            assertTrue(List.of("lower", "exact", "upper").contains(r.get(4)), r::toString);
            List.of(0, 1, 2, 7, 8, 9).forEach(i -> assertTrue(!r.get(i).isBlank(), r::toString));
        }
    }

    @Test
    void thePolarisedPairHasItsKnownError() {
        // computed with 100 digits by an independent program; Bloch vectors (0, 0, 0.9) and (0.6, 0, 0.5), equal priors
        BigDecimal known = new BigDecimal("0.3197224362268005336");
        List<String> r = rows.stream()
                .filter(x -> x.get(1).equals("polarised")
                        && x.get(2).equals("minimum error")
                        && x.get(4).equals("exact"))
                .findFirst()
                .orElseThrow();
        // the shipped entries are doubles: 0.95 and 0.05 and their like carry errors of a few 1e-17
        double below = known.subtract(new BigDecimal(r.get(5))).doubleValue();
        double above = new BigDecimal(r.get(6)).subtract(known).doubleValue();
        assertTrue(below >= -1e-15 && above >= -1e-15, r::toString);
        assertTrue(below + above < 1e-13, r::toString);
    }

    @Test
    void aThousandCopiesOfThePolarisedPairHaveTheirKnownError() {
        // computed with 100 digits by an independent program; entries of the files are rounded to 1e-16, times a
        // thousand copies
        double known = 5.773837507929116670888e-43;
        List<String> r = rows.stream()
                .filter(x -> x.get(2).equals(CopiesSection.minimumError(1000))
                        && x.get(4).equals("exact"))
                .findFirst()
                .orElseThrow();
        assertEquals(1, Double.parseDouble(r.get(5)) / known, 1e-11);
        assertEquals(1, Double.parseDouble(r.get(6)) / known, 1e-11);
    }

    @Test
    void theNumbersOfAPairAreThoseOfTheLibrary() throws IOException {
        HypothesisPair pair = HypothesisPair.of(state("clear.mtx"), state("hazy.npy"));
        assertHolds(pair.minimumError(0.5), "polarised", "minimum error", "", "Holevo-Helstrom");
        assertHolds(
                pair.typeTwoError(0.05),
                "polarised",
                "least type-II error",
                "type-I error at most 0.05",
                "quantum Neyman");
        PrettyGoodMeasurement good = PrettyGoodMeasurement.of(
                Ensemble.of(List.of(state("clear.mtx"), state("hazy.npy")), new double[] {0.5, 0.5}));
        assertHolds(good.errorProbability(), "polarised", "pretty-good measurement", "its error", "pretty-good");
        assertTrue(outcome.out().contains(pair.minimumError(0.5).toString()), outcome.out());
    }

    @Test
    void theNumbersOfAnEnsembleAreThoseOfTheLibrary() throws IOException {
        PrettyGoodMeasurement good = PrettyGoodMeasurement.of(Ensemble.of(
                List.of(state("ahead.mtx"), state("port.npy"), state("starboard.mtx")),
                new double[] {0.5, 0.25, 0.25}));
        assertHolds(good.errorProbability(), "turn", "pretty-good measurement", "its error", "pretty-good");
        assertHolds(good.errorProbability(), "turn", "minimum error", "", "pretty-good");
    }

    @Test
    void theNumbersOfAChannelAreThoseOfTheLibrary() throws IOException {
        ClassicalQuantumChannel channel =
                ClassicalQuantumChannel.of(state("ahead.mtx"), state("port.npy"), state("starboard.mtx"));
        assertHolds(channel.capacity().value().bits(), "helm", "capacity", "", "capacity");
        CodingBounds once = CodingBounds.of(channel);
        assertHolds(
                once.achievableError(2),
                "helm",
                "least average error of a code",
                "2 messages",
                "one-shot random coding");
        assertHolds(
                once.converse(0.25).bits(),
                "helm",
                ChannelSection.MESSAGES,
                "average error at most 0.25",
                "one-shot converse");
    }

    @Test
    void theChartsAreWellFormedAndHaveTheirCurves() throws Exception {
        for (String pair : List.of("watch", "polarised")) {
            Svg curve = Svg.parse(DemoRun.get().result("tradeoff-" + pair + ".svg"));
            assertTrue(
                    curve.title().startsWith("Lamp signals across Ouster Sound (invented): errors of"), curve.title());
            assertTrue(curve.shapes("230,159,0") >= 2 && curve.shapes("0,114,178") >= 2);
            Svg bounds = Svg.parse(DemoRun.get().result("bounds-" + pair + ".svg"));
            assertTrue(bounds.shapes("0,114,178") >= 3 && bounds.shapes("213,94,0") >= 5);
        }
        for (String name : List.of("copies", "exponents")) {
            Svg many = Svg.parse(DemoRun.get().result(name + "-polarised.svg"));
            // two lower bounds, the value, two upper bounds and the measurement found, each a line with its markers
            assertTrue(
                    many.title()
                            .endsWith(
                                    name.equals("copies")
                                            ? "errors against copies of polarised"
                                            : "exponents against copies of polarised"),
                    many.title());
            assertTrue(many.shapes("0,114,178") > 5 && many.shapes("213,94,0") > 5 && many.shapes("230,159,0") > 5);
        }
        Svg messages = Svg.parse(DemoRun.get().result("bounds-helm.svg"));
        assertTrue(messages.title().endsWith("messages that one use of helm carries"), messages.title());
    }
}
