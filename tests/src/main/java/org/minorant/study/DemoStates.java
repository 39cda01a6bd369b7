package org.minorant.study;

import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import org.minorant.core.Complex;
import org.minorant.core.DensityOperator;
import org.minorant.core.MatrixMarket;
import org.minorant.core.NumpyFile;
import org.minorant.core.state.LightStates;
import org.minorant.core.state.TruncatedState;
import org.minorant.core.state.Truncation;

/**
 * Makes the state files of the shipped demo. Place, people and numbers are invented: a lamp on one shore of a sound is watched from the other through
 * stray light, and a second lamp sends polarised light through haze.
 *
 * <p>The same files come out wherever it runs, up to the rounding of their last digits where the library has changed. Run it with
 *
 * <pre>mvn -q -B -pl tests -am compile exec:java -Dexec.mainClass=org.minorant.study.DemoStates -Dstudy=DIRECTORY</pre>
 */
public final class DemoStates {

    /** Photon numbers 0 to 15 hold all but a few millionths of the brightest signal. */
    private static final Truncation PHOTONS = Truncation.ofDimension(16);

    /** Thermal photons of the stray light. */
    private static final double STRAY = 0.1;

    /** Amplitude of the steady lamp. */
    private static final double STEADY = 1.1;

    /** Amplitude of the helm signals, which differ in phase by a third of a turn. */
    private static final double HELM = 1.3;

    /** Cosine and sine of a third of a turn. */
    private static final double[] THIRD = {-0.5, 0.8660254037844386};

    /** Amplitudes of a photon whose polarisation leans a little; the sum of their squares is 1 but for the last digit of a double. */
    private static final double[] LEAN = {0.936, 0.352};

    private DemoStates() {}

    /**
     * Writes the files.
     *
     * @param arguments the directory to write to, alone
     * @throws IOException if a file cannot be written
     */
    public static void main(String[] arguments) throws IOException {
        if (arguments.length != 1) {
            System.err.println("give the directory to write to, for example -Dstudy=tests/studies");
            System.exit(Exit.BAD_INPUT.status());
        }
        write(Files.createDirectories(Path.of(arguments[0])));
    }

    /** Writes all files into an existing directory. */
    static void write(Path directory) throws IOException {
        light(directory.resolve("dark.mtx"), 0, 0);
        light(directory.resolve("lamp.npy"), STEADY, 0);
        light(directory.resolve("ahead.mtx"), HELM, 0);
        light(directory.resolve("port.npy"), HELM * THIRD[0], HELM * THIRD[1]);
        light(directory.resolve("starboard.mtx"), HELM * THIRD[0], -HELM * THIRD[1]);
        polarised(directory.resolve("clear.mtx"), 0, 0, 0.9);
        polarised(directory.resolve("hazy.npy"), 0.6, 0, 0.5);
        ket(directory.resolve("left.mtx"), LEAN[0], LEAN[1]);
        ket(directory.resolve("right.mtx"), LEAN[0], -LEAN[1]);
    }

    /** One photon, polarised perfectly: a column of two amplitudes. */
    private static void ket(Path file, double up, double across) throws IOException {
        List<String> lines = List.of(
                "%%MatrixMarket matrix array real general",
                "% Invented demo data, made by org.minorant.study.DemoStates",
                "% one photon, polarised perfectly: its two amplitudes",
                "2 1",
                Double.toString(up),
                Double.toString(across));
        Files.writeString(file, String.join("\n", lines) + "\n", StandardCharsets.US_ASCII);
    }

    /** Displaced thermal light of one mode. */
    private static void light(Path file, double re, double im) throws IOException {
        TruncatedState light = LightStates.displacedThermal(new Complex(re, im), STRAY, PHOTONS);
        write(
                file,
                light.state(),
                List.of(
                        String.format(
                                Locale.ROOT,
                                "light of one mode, amplitude %s + %si, %s thermal photons",
                                re,
                                im,
                                STRAY),
                        String.format(
                                Locale.ROOT,
                                "photon numbers 0 to %d, normalised; weight left out %.2e",
                                light.dimension() - 1,
                                light.discardedWeight().upper())));
    }

    /** Polarised light, one photon. */
    private static void polarised(Path file, double x, double y, double z) throws IOException {
        String what = String.format(Locale.ROOT, "one photon's polarisation, Bloch vector (%s, %s, %s)", x, y, z);
        write(file, DensityOperator.ofBloch(x, y, z), List.of(what));
    }

    /** Matrix Market files carry where they come from as comments; the other format has no room for any. */
    private static void write(Path file, DensityOperator state, List<String> about) throws IOException {
        if (String.valueOf(file.getFileName()).endsWith(".npy")) {
            NumpyFile.write(file, state);
            return;
        }
        MatrixMarket.write(file, state);
        List<String> lines = new ArrayList<>(Files.readAllLines(file, StandardCharsets.US_ASCII));
        List<String> comments = new ArrayList<>(List.of("% Invented demo data, made by org.minorant.study.DemoStates"));
        about.forEach(a -> comments.add("% " + a));
        lines.addAll(1, comments);
        Files.writeString(file, String.join("\n", lines) + "\n", StandardCharsets.US_ASCII);
    }
}
