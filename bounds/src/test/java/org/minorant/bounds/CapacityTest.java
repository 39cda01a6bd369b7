package org.minorant.bounds;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.function.DoubleFunction;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.minorant.core.DensityOperator;
import org.minorant.core.Operator;
import org.minorant.core.PositiveOperator;

/** Capacities with known values. The gap asked for, 1e-12 nats, is what the certificates reach here with room to spare. */
final class CapacityTest {

    private static final double GAP = 1e-12;

    private static double bits(Capacity c) {
        assertTrue(c.gap() < GAP, c.toString());
        return c.value().bits().midpoint();
    }

    /** Two opposite phases of mean photon number N have overlap e^(−2N); values computed by an independent program, 10 digits. */
    @ParameterizedTest
    @CsvSource({".01, .0801338764", ".1, .4385845677", ".2, .6457635983", ".5, .9000455915", "1, .9867474300"})
    void twoOppositePhases(double photons, double expected) {
        double c = Math.exp(-2 * photons);
        ClassicalQuantumChannel channel =
                ClassicalQuantumChannel.ofGram(new double[][] {{1, c}, {c, 1}}, new double[2][2]);
        assertEquals(expected, bits(channel.capacity()), 5.1e-11);
        assertArrayEquals(new double[] {0.5, 0.5}, channel.capacity().input());
        // the closed form h((1 + c)/2), in double
        double p = (1 + c) / 2;
        assertEquals(-(p * log2(p) + (1 - p) * log2(1 - p)), bits(channel.capacity()), 1e-14);
    }

    private static double log2(double x) {
        return Math.log(x) / Math.log(2);
    }

    /** Closed form log2(5/4), published in every textbook; the best input is (3/5, 2/5). */
    @Test
    void zChannel() {
        Capacity c = ClassicalQuantumChannel.ofStochasticMatrix(new double[][] {{1, 0}, {.5, .5}})
                .capacity();
        assertTrue(c.value().bits().contains(0.32192809488736235), c.toString());
        assertEquals(0.32192809488736235, bits(c), 1e-14);
        assertArrayEquals(new double[] {.6, .4}, c.input(), 1e-7);
        // the same as qubit states
        Capacity q = ClassicalQuantumChannel.of(DensityOperator.ofBloch(0, 0, 1), DensityOperator.ofBloch(0, 0, 0))
                .capacity();
        assertEquals(0.32192809488736235, bits(q), 1e-14);
    }

    /** Closed form of the binary erasure channel: 1 − e; erasure probability exact in double. */
    @Test
    void erasureChannel() {
        Capacity c = ClassicalQuantumChannel.ofStochasticMatrix(new double[][] {{.75, .25, 0}, {0, .25, .75}})
                .capacity();
        assertEquals(0.75, bits(c), 1e-14);
        assertTrue(c.value().bits().contains(0.75), c.toString());
        assertEquals(0, c.iterations());
    }

    /** C. King, M. Nathanson, M. B. Ruskai, Phys. Rev. Lett. 88, 057901 (2002): 0.3249901 bit with three inputs; two inputs computed. */
    @Test
    void threeInputsBeatTwo() {
        DoubleFunction<Capacity> three =
                angle -> ClassicalQuantumChannel.of(DensityOperator.ofBloch(0, 0, 1), image(angle), image(-angle))
                        .capacity();
        double best = highest(a -> three.apply(a).value().bits().midpoint(), 1.3, 2.2);
        Capacity c = three.apply(best);
        // the published digits are the leading ones of 0.32499019
        assertEquals(0.3249901, bits(c), 1e-7);
        for (double p : c.input()) {
            assertTrue(p > 0.2, c.toString());
        }
        // the pair of the axis and its opposite, and the best symmetric pair
        assertEquals(
                .321928094887,
                bits(ClassicalQuantumChannel.of(DensityOperator.ofBloch(0, 0, 1), image(Math.PI))
                        .capacity()),
                5.1e-13);
        DoubleFunction<Capacity> two =
                angle -> ClassicalQuantumChannel.of(image(angle), image(-angle)).capacity();
        double pair = highest(a -> two.apply(a).value().bits().midpoint(), 1.2, 2.2);
        assertEquals(.320157257504, bits(two.apply(pair)), 5.1e-13);
    }

    /** The image of the pure state at this angle from the axis under (x, y, z) → (.6x, .6y, .5z + .5). */
    private static DensityOperator image(double angle) {
        return DensityOperator.ofBloch(0.6 * Math.sin(angle), 0, 0.5 * Math.cos(angle) + 0.5);
    }

    /** At a smaller angle the third letter is not worth using: it is found to be unused, exactly. */
    @Test
    void unusedLetter() {
        Capacity c = ClassicalQuantumChannel.of(DensityOperator.ofBloch(0, 0, 1), image(1.0), image(-1.0))
                .capacity();
        assertTrue(c.gap() < GAP, c.toString());
        assertEquals(0, c.input()[0]);
        assertEquals(0.5, c.input()[1], 1e-9);
        Capacity pair = ClassicalQuantumChannel.of(image(1.0), image(-1.0)).capacity();
        assertTrue(Math.abs(bits(c) - bits(pair)) < 1e-13);
        // a letter that is used only a little
        Capacity little = ClassicalQuantumChannel.of(DensityOperator.ofBloch(0, 0, 1), image(1.375), image(-1.375))
                .capacity();
        assertTrue(little.gap() < GAP, little.toString());
        assertTrue(little.input()[0] > 0 && little.input()[0] < 0.05, little.toString() + little.input()[0]);
    }

    /**
     * Amplitude damping with γ = ½: (x, y, z) → (√½ x, √½ y, ½z + ½). Best two inputs 0.4717293906 bit: C. A. Fuchs, Phys. Rev. Lett. 79, 1162
     * (1997), 0.4717 from memory, more digits computed by an independent program.
     */
    @Test
    void amplitudeDamping() {
        DoubleFunction<DensityOperator> out =
                angle -> DensityOperator.ofBloch(Math.sqrt(0.5) * Math.sin(angle), 0, 0.5 * Math.cos(angle) + 0.5);
        DoubleFunction<Capacity> pair = angle ->
                ClassicalQuantumChannel.of(out.apply(angle), out.apply(-angle)).capacity();
        double best = highest(a -> pair.apply(a).value().bits().midpoint(), 1, 2.5);
        assertEquals(.4717293906, bits(pair.apply(best)), 5.1e-11);
        // no other pair among those tried does better: the two angles vary apart
        for (double a = -0.3; a < 0.35; a += 0.1) {
            Capacity other = ClassicalQuantumChannel.of(out.apply(best + a), out.apply(-best + 2 * a))
                    .capacity();
            assertTrue(bits(other) <= bits(pair.apply(best)) + 1e-12);
        }
    }

    /** Golden section for the highest point of a unimodal function; flat to second order, so 1e-8 in the argument is enough. */
    private static double highest(DoubleFunction<Double> f, double from, double to) {
        double r = (Math.sqrt(5) - 1) / 2;
        double a = from;
        double b = to;
        while (b - a > 1e-7) {
            double x = b - r * (b - a);
            double y = a + r * (b - a);
            if (f.apply(x) < f.apply(y)) {
                a = x;
            } else {
                b = y;
            }
        }
        return (a + b) / 2;
    }

    /** Eight phases, N = 1: the best input is uniform by symmetry, so the capacity is the entropy of the Gram matrix over 8. */
    @Test
    void eightPhases() {
        int m = 8;
        double[][] re = new double[m][m];
        double[][] im = new double[m][m];
        for (int i = 0; i < m; i++) {
            for (int j = 0; j < i; j++) {
                double phase = 2 * Math.PI * (j - i) / m;
                double modulus = Math.exp(Math.cos(phase) - 1);
                re[i][j] = re[j][i] = modulus * Math.cos(Math.sin(phase));
                im[i][j] = modulus * Math.sin(Math.sin(phase));
                im[j][i] = -im[i][j];
            }
            re[i][i] = 1;
        }
        Capacity c = ClassicalQuantumChannel.ofGram(re, im).capacity();
        // a circulant matrix: its eigenvalues are the discrete Fourier transform of its first row
        double entropy = 0;
        for (int k = 0; k < m; k++) {
            double lambda = 0;
            for (int j = 0; j < m; j++) {
                double phase = 2 * Math.PI * j * k / m;
                lambda += re[0][j] * Math.cos(phase) + im[0][j] * Math.sin(phase);
            }
            entropy -= lambda / m * log2(lambda / m);
        }
        assertEquals(entropy, bits(c), 1e-13);
        assertEquals(0, c.iterations());
        assertArrayEquals(Channels.uniform(m), c.input());
    }

    @Test
    void identicalOutputsHaveCapacityZero() {
        DensityOperator w = DensityOperator.ofBloch(.6, 0, .5);
        Capacity c = ClassicalQuantumChannel.of(w, w, w).capacity();
        assertEquals(0, c.value().nats().lower());
        assertTrue(c.value().nats().upper() < 1e-14, c.toString());
        assertArrayEquals(Channels.uniform(3), c.input());
        Capacity one = ClassicalQuantumChannel.of(w).capacity();
        assertTrue(one.value().nats().contains(0) && one.gap() < 1e-14, one.toString());
    }

    @Test
    void orthogonalOutputsHaveCapacityLogOfTheirNumber() {
        Capacity c = ClassicalQuantumChannel.of(
                        DensityOperator.ofKet(1, 0, 0, 0),
                        DensityOperator.ofKet(0, .6, .8, 0),
                        DensityOperator.ofKet(0, .8, -.6, 0))
                .capacity();
        assertTrue(Math.abs(bits(c) - log2(3)) < 1e-14, c.toString());
    }

    /** A support that the outputs do not fill, and one that a single letter brings in. */
    @Test
    void deficientOutputs() {
        Operator x = Operator.ofRowMajor(
                5, 2, new double[] {.6, 0, .8 * .6, 0, .8 * .8 * .6, 0, 0, .512, 0, 0}, new double[0]);
        double trace = 0;
        for (int i = 0; i < 5; i++) {
            trace += x.re(i, 0) * x.re(i, 0) + x.re(i, 1) * x.re(i, 1);
        }
        DensityOperator w = DensityOperator.of(PositiveOperator.ofFactor(x.times(1 / Math.sqrt(trace))));
        Capacity c = ClassicalQuantumChannel.of(
                        w, DensityOperator.ofKet(1, 0, 0, 0, 0), DensityOperator.ofKet(0, 0, 1, 0, 0))
                .capacity();
        assertTrue(c.gap() < GAP, c.toString());
    }

    /** Many letters, most of them useless: the certificate does not care how the input was found. */
    @Test
    void manyLetters() {
        java.util.Random random = new java.util.Random(5);
        List<DensityOperator> outputs = new java.util.ArrayList<>();
        for (int x = 0; x < 60; x++) {
            outputs.add(Channels.state(random, 2));
        }
        Capacity c = ClassicalQuantumChannel.of(outputs).capacity();
        assertTrue(c.gap() < GAP, c.toString());
        // of the letters some are pure, and only those are worth using; the others have probability 0, exactly
        for (int x = 0; x < outputs.size(); x++) {
            boolean pure = outputs.get(x).factor().rank() == 1;
            assertTrue(pure || c.input()[x] == 0, "letter " + x + " has " + c.input()[x]);
        }
        assertEquals(1, bits(c), 1e-14);
    }

    @Test
    void outputStateIsTheMixture() {
        Capacity c = ClassicalQuantumChannel.ofStochasticMatrix(new double[][] {{1, 0}, {.5, .5}})
                .capacity();
        assertEquals(0.8, c.outputState().re(0, 0), 1e-7);
        assertEquals(1, c.outputState().trace().re(), 1e-15);
    }

    @Test
    void printsCertainDigits() {
        Capacity c = ClassicalQuantumChannel.ofStochasticMatrix(new double[][] {{1, 0}, {0, 1}})
                .capacity();
        assertTrue(c.toString().startsWith("capacity 1.00000000000"), c.toString());
        assertTrue(c.toString().endsWith("nat, 0 steps"), c.toString());
    }
}
