package org.minorant.study;

import java.io.ByteArrayOutputStream;
import java.io.IOException;
import java.io.PrintStream;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.function.LongSupplier;
import org.minorant.core.DensityOperator;
import org.minorant.core.MatrixMarket;
import org.minorant.core.NumpyFile;

/** A directory with a few small state files and a study that a test writes, and what came of running it. */
final class SmallStudy {

    /** What a run said and how it ended. */
    record Outcome(Exit exit, String out, String err) {}

    private final Path directory;

    /** Writes the states a.mtx, b.npy, c.mtx (qubits) and wide.npy (dimension 3). */
    SmallStudy(Path directory) throws IOException {
        this.directory = directory;
        MatrixMarket.write(file("a.mtx"), DensityOperator.ofBloch(0, 0, 0.9));
        NumpyFile.write(file("b.npy"), DensityOperator.ofBloch(0.6, 0, 0.5));
        MatrixMarket.write(file("c.mtx"), DensityOperator.ofBloch(-0.5, 0.5, 0));
        NumpyFile.write(file("wide.npy"), DensityOperator.maximallyMixed(3));
    }

    Path file(String name) {
        return directory.resolve(name);
    }

    /** Runs the study with a clock that stands still, so that no progress is said. */
    Outcome run(String... lines) throws IOException {
        return run(() -> 0L, lines);
    }

    Outcome run(LongSupplier clock, String... lines) throws IOException {
        Files.writeString(file("s.study"), String.join("\n", lines));
        return run(clock, List.of(file("s.study").toString()));
    }

    static Outcome run(LongSupplier clock, List<String> arguments) {
        ByteArrayOutputStream out = new ByteArrayOutputStream();
        ByteArrayOutputStream err = new ByteArrayOutputStream();
        Exit exit = Study.run(
                arguments,
                new PrintStream(out, true, StandardCharsets.UTF_8),
                new PrintStream(err, true, StandardCharsets.UTF_8),
                clock);
        return new Outcome(exit, out.toString(StandardCharsets.UTF_8), err.toString(StandardCharsets.UTF_8));
    }
}
