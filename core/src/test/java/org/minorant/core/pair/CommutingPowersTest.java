package org.minorant.core.pair;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.minorant.core.Enclosure;
import org.minorant.core.InvalidInputException;
import org.minorant.core.WideDouble;

/** Products of powers of commuting pairs against all their eigenvalues, and against copies of one pair. */
class CommutingPowersTest {

    /** What truncation is allowed to cost, and rounding of logarithms of letters down to 1e-12 in a few copies. */
    private static final double NARROW = 2e-12;

    private static double[] tensor(double[] x, double[] y) {
        double[] z = new double[x.length * y.length];
        for (int i = 0; i < z.length; i++) {
            z[i] = x[i / y.length] * y[i % y.length];
        }
        return z;
    }

    private static double[] powers(List<double[]> spectra, int[] copies) {
        double[] all = {1};
        for (int j = 0; j < copies.length; j++) {
            for (int k = 0; k < copies[j]; k++) {
                all = tensor(all, spectra.get(j));
            }
        }
        return all;
    }

    private static void assertMeet(Enclosure expected, Enclosure actual, double rounding) {
        Enclosure wide = expected.times(Enclosure.ONE.widen(rounding));
        assertTrue(
                wide.isPossiblyBelow(actual) && actual.isPossiblyBelow(wide),
                () -> expected.toIntervalString(17) + " " + actual.toIntervalString(17));
        assertTrue(
                actual.upperWide().signum() == 0 || actual.relativeWidth() < NARROW,
                () -> "width of " + actual.toIntervalString(17));
    }

    @Test
    void productsOfAllEigenvalues() {
        Random random = new Random(5);
        for (int trial = 0; trial < 60; trial++) {
            int factors = 1 + random.nextInt(3);
            List<double[]> a = new java.util.ArrayList<>();
            List<double[]> b = new java.util.ArrayList<>();
            int[] copies = new int[factors];
            for (int j = 0; j < factors; j++) {
                int letters = 1 + random.nextInt(3);
                a.add(spectrum(random, letters));
                b.add(spectrum(random, letters));
                copies[j] = random.nextInt(4);
            }
            copies[0]++;
            PositivePair product = CommutingPowers.of(a, b, 4).pair(copies);
            PositivePair all = PositivePair.ofSpectra(powers(a, copies), powers(b, copies));
            for (double w : new double[] {1e-6, 0.3, 1, 40}) {
                // each of ten products is rounded once
                assertMeet(all.traceMinimum(1, w), product.traceMinimum(1, w), 2e-15);
            }
            assertMeet(all.firstTrace(), product.firstTrace(), 2e-15);
            assertMeet(all.secondTrace(), product.secondTrace(), 2e-15);
        }
    }

    /** Some zeros, some tiny. */
    private static double[] spectrum(Random random, int letters) {
        double[] x = random.doubles(letters).toArray();
        int kind = random.nextInt(4);
        if (kind == 0 && letters > 1) {
            x[random.nextInt(letters)] = 0;
        } else if (kind == 1) {
            x[random.nextInt(letters)] *= 1e-12;
        }
        return x;
    }

    /** Two factors that are the same pair are copies of it, at any depth. */
    @Test
    void likeFactorsAreCopies() {
        double[] a = {0.89, 0.11};
        double[] b = {0.5, 0.5};
        CommutingPowers powers = CommutingPowers.of(List.of(a, a, b), List.of(b, b, b), 20_000);
        PositivePair copies = PositivePair.ofSpectra(a, b).copies(20_000);
        for (double ln : new double[] {-9000, -100, 6000, 7000, 12_000}) {
            WideDouble w = WideDouble.expDown(ln);
            Enclosure expected = copies.traceMinimum(WideDouble.ONE, w);
            Enclosure actual = powers.pair(13_000, 7000, 0).traceMinimum(WideDouble.ONE, w);
            // logarithms of 2e4 letters, to 16 units each
            Enclosure wide = actual.times(Enclosure.ONE.widen(1e-9));
            assertTrue(wide.contains(expected), () -> expected + " " + actual.toIntervalString(17));
            assertTrue(actual.relativeWidth() < 1e-9, () -> actual.toIntervalString(17));
            assertTrue(expected.isPossiblyBelow(actual) && actual.isPossiblyBelow(expected));
        }
    }

    /** Three eigenvalues each, many of the ratios equal. */
    @Test
    void sortsTypesOfThreeEigenvalues() {
        double[] a = {0.5, 0.25, 0.25};
        double[] b = {0.25, 0.5, 0.25};
        CommutingPowers powers = CommutingPowers.of(List.of(a, a), List.of(b, b), 60);
        PositivePair copies = PositivePair.ofSpectra(a, b).copies(60);
        for (double w : new double[] {1e-9, 0.3, 1, 64}) {
            assertMeet(copies.traceMinimum(1, w), powers.pair(25, 35).traceMinimum(1, w), 1e-13);
        }
    }

    @Test
    void orthogonalFactorsMeetNowhere() {
        CommutingPowers powers = CommutingPowers.of(
                List.of(new double[] {1, 0}, new double[] {0.5, 0.5}),
                List.of(new double[] {0, 1}, new double[] {0.25, 0.75}),
                9);
        assertEquals(Enclosure.ZERO, powers.pair(1, 8).traceMinimum(1, 1));
        assertTrue(powers.pair(0, 9).traceMinimum(1, 1).lower() > 0.1);
        assertEquals(PairKind.TYPES, powers.pair(0, 9).kind());
        assertEquals(512, powers.pair(0, 9).dimension());
        assertTrue(powers.terms(4, 5) < powers.terms(400, 500));
    }

    @Test
    void refusals() {
        List<double[]> one = List.of(new double[] {0.5, 0.5});
        assertThrows(InvalidInputException.class, () -> CommutingPowers.of(List.of(), List.of(), 3));
        assertThrows(InvalidInputException.class, () -> CommutingPowers.of(one, one, 0));
        assertThrows(InvalidInputException.class, () -> CommutingPowers.of(one, List.of(new double[] {1}), 2));
        CommutingPowers powers = CommutingPowers.of(one, one, 3);
        assertThrows(InvalidInputException.class, () -> powers.pair(4));
        assertThrows(InvalidInputException.class, () -> powers.pair(-1));
        assertThrows(InvalidInputException.class, () -> powers.pair(0));
        assertThrows(InvalidInputException.class, () -> powers.pair(1, 1));
    }
}
