package org.minorant.study;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** Every kind of bad input ends with status 2, nothing on standard output, and one line that says where and what to do. */
class BadInputTest {

    @TempDir
    Path directory;

    private SmallStudy small;

    @BeforeEach
    void states() throws IOException {
        small = new SmallStudy(directory);
    }

    /** The one line of standard error, with the directory left out. */
    private String refusal(String... lines) throws IOException {
        return line(small.run(lines));
    }

    private String line(SmallStudy.Outcome o) {
        assertEquals(Exit.BAD_INPUT, o.exit(), o.err());
        assertEquals(2, o.exit().status());
        assertEquals("", o.out());
        assertEquals(1, o.err().lines().count(), o.err());
        return o.err().strip().replace(directory + "/", "");
    }

    @Test
    void argumentsThatAreNotOnePath() {
        String usage = "give the path of one study file, for example -Dstudy=tests/studies/demo.study";
        assertEquals(usage, line(SmallStudy.run(() -> 0, List.of())));
        assertEquals(usage, line(SmallStudy.run(() -> 0, List.of(" "))));
        assertEquals(usage, line(SmallStudy.run(() -> 0, List.of("one", "two"))));
        assertEquals(usage, line(SmallStudy.run(() -> 0, List.of("\0"))));
        assertEquals(
                "none.study: no such file; give the path of a study file",
                line(SmallStudy.run(
                        () -> 0, List.of(directory.resolve("none.study").toString()))));
    }

    @Test
    void aBadStudyLine() throws IOException {
        assertEquals(
                "s.study:2: unknown word 'sate'; a line begins with one of title, state, nearest, pair, copies, ensemble, channel, uses, errors,"
                        + " messages, output",
                refusal("state a a.mtx", "sate b b.npy"));
    }

    @Test
    void aStateFileThatIsNotThere() throws IOException {
        assertEquals(
                "s.study:2: state b: there is no file none.npy; paths are relative to the study file's directory",
                refusal("state a a.mtx", "state b none.npy", "channel c a b"));
    }

    @Test
    void aStateFileOfAnotherKind() throws IOException {
        Files.writeString(small.file("a.txt"), "1 2 3");
        assertEquals(
                "s.study:1: state a: a.txt ends in neither .mtx (Matrix Market) nor .npy (NumPy), the formats that are read",
                refusal("state a a.txt", "state b b.npy", "channel c a b"));
        Files.createDirectory(small.file("folder.mtx"));
        String message = refusal("state a folder.mtx", "state b b.npy", "channel c a b");
        assertTrue(message.startsWith("s.study:1: state a: folder.mtx"), message);
    }

    @Test
    void aMatrixMarketFileWithAFaultInALine() throws IOException {
        Files.writeString(small.file("bad.mtx"), "%%MatrixMarket matrix array real general\n2 2\n0.5\n0\nzero\n0.5\n");
        String message = refusal("state a bad.mtx", "state b b.npy", "channel c a b");
        assertTrue(message.startsWith("s.study:1: state a: bad.mtx, line 5: "), message);
        assertTrue(message.contains("zero"), message);
    }

    @Test
    void anEmptyMatrixMarketFile() throws IOException {
        Files.writeString(small.file("bad.mtx"), "");
        String message = refusal("state a bad.mtx", "state b b.npy", "channel c a b");
        assertTrue(message.startsWith("s.study:1: state a: bad.mtx"), message);
    }

    @Test
    void aNumpyFileCutShort() throws IOException {
        byte[] whole = Files.readAllBytes(small.file("b.npy"));
        Files.write(small.file("bad.npy"), java.util.Arrays.copyOf(whole, whole.length - 3));
        String message = refusal("state a a.mtx", "state b bad.npy", "channel c a b");
        assertTrue(message.matches("s\\.study:2: state b: bad\\.npy, byte [0-9]+: .*"), message);
    }

    @Test
    void aFileThatDeclaresMoreThanItHolds() throws IOException {
        Files.writeString(small.file("bad.mtx"), "%%MatrixMarket matrix array real general\n100000000 100000000\n1\n");
        String message = refusal("state a bad.mtx", "state b b.npy", "channel c a b");
        assertTrue(message.startsWith("s.study:1: state a: bad.mtx, line 2: "), message);
    }

    @Test
    void aMatrixThatIsNoState() throws IOException {
        Files.writeString(small.file("bad.mtx"), "%%MatrixMarket matrix array real general\n2 2\n0.5\n0\n0\n0.6\n");
        String message = refusal("state a bad.mtx", "state b b.npy", "channel c a b");
        assertTrue(message.startsWith("s.study:1: state a: bad.mtx: "), message);
        assertTrue(message.contains("trace"), message);
        assertTrue(message.endsWith("; or begin the line with 'nearest' to take the nearest state"), message);
    }

    @Test
    void aMatrixThatCannotBeMadeAState() throws IOException {
        Files.writeString(small.file("bad.mtx"), "%%MatrixMarket matrix array real general\n2 1\n0.5\n0.5\n");
        String message = refusal("nearest a bad.mtx", "state b b.npy", "channel c a b");
        assertTrue(message.startsWith("s.study:1: state a: "), message);
        assertTrue(message.contains("square"), message);
        assertFalse(message.contains("nearest' to take"), message);
    }

    @Test
    void statesOfDifferentDimension() throws IOException {
        String message = "state a has dimension 2 and state w has dimension 3; they must be equal";
        String[] head = {"state a a.mtx", "state b b.npy", "state w wide.npy"};
        assertEquals("s.study:4: " + message, refusal(head[0], head[1], head[2], "pair p a w prior 0.5"));
        assertEquals("s.study:4: " + message, refusal(head[0], head[1], head[2], "ensemble e a b w"));
        assertEquals("s.study:4: " + message, refusal(head[0], head[1], head[2], "channel c a b w"));
    }

    @Test
    void anOutputPlaceThatCannotBe() throws IOException {
        Files.writeString(small.file("taken"), "a file");
        String message = refusal("state a a.mtx", "state b b.npy", "pair p a b prior 0.5", "output taken");
        assertTrue(message.startsWith("s.study: the output directory taken cannot be made: "), message);
        assertEquals("a file", Files.readString(small.file("taken")));
    }

    @Test
    void aResultThatWouldReplaceTheStudy() throws IOException {
        String text = "state a a.mtx\nstate b b.npy\nensemble e a b\noutput .";
        Path study = Files.writeString(small.file("report.txt"), text);
        SmallStudy.Outcome o = SmallStudy.run(() -> 0, List.of(study.toString()));
        assertEquals(Exit.BAD_INPUT, o.exit());
        assertEquals(1, o.err().lines().count(), o.err());
        assertTrue(o.err().contains("would replace the study file; rename one"), o.err());
        assertEquals(text, Files.readString(study));
    }

    @Test
    void whatTheLibraryRefusesIsReportedWithItsLine() throws IOException {
        // 10^18 messages are beyond what one use of anything is asked for, but must not be a stack trace
        SmallStudy.Outcome o = small.run(
                "state a a.mtx", "state b b.npy", "channel c a b", "messages 2 1000000000000000000", "errors 1e-300");
        assertTrue(o.exit() == Exit.DONE || o.err().lines().count() == 1, o.err());
    }
}
