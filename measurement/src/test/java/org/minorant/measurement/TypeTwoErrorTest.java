package org.minorant.measurement;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.minorant.measurement.HypothesisPairTest.assertNear;

import java.math.BigDecimal;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.HermitianOperator;
import org.minorant.core.pair.PositivePair;

/** β_ε against closed forms, exact arithmetic and explicit tests. */
class TypeTwoErrorTest {

    private static final double[] LEVELS = {1e-12, 1e-6, 0.001, 0.01, 0.1, 0.25, 0.3, 0.5, 0.9, 0.999};

    /** Commuting states: the lemma of Neyman and Pearson in exact arithmetic. */
    @Test
    void commutingStatesAreExact() {
        Random random = new Random(5);
        for (int k = 0; k < 60; k++) {
            int n = 1 + random.nextInt(12);
            double[] a = distribution(n, random);
            double[] b = distribution(n, random);
            HypothesisPair pair = HypothesisPair.ofCurve(PositivePair.ofSpectra(a, b));
            for (double level : LEVELS) {
                BigDecimal exact = Samples.neymanPearson(a, b, level);
                Enclosure beta = pair.typeTwoError(level);
                assertTrue(
                        beta.contains(exact),
                        () -> "level " + level + ": " + exact + " in " + beta.toIntervalString(17));
                // a few units in the last place of the terms F(t) and tε that are subtracted
                double scale = exact.doubleValue() + a.length * level;
                assertTrue(beta.width() <= 1e-14 * scale + 1e-300, () -> "level " + level + " width " + beta.width());
            }
        }
    }

    /** Multiples of 2^-20 that sum to one exactly, some of them zero. */
    private static double[] distribution(int n, Random random) {
        int[] cuts = random.ints(n - 1, 0, 1 << 20).sorted().toArray();
        double[] p = new double[n];
        for (int i = 0; i < n; i++) {
            int from = i == 0 ? 0 : cuts[i - 1];
            int to = i == n - 1 ? 1 << 20 : cuts[i];
            p[i] = (to - from) * 0x1p-20;
        }
        if (n > 2) {
            p[0] += p[1];
            p[1] = 0;
        }
        return p;
    }

    /** Errors near 1e-60 and far below 1e-308 keep their digits: relative width near 1e-10, exact value inside. */
    @Test
    void deepErrorsKeepRelativeAccuracy() {
        for (double ratio : new double[] {0.5, 0.01, 1e-5}) {
            int n = ratio < 0.01 ? 60 : 120;
            double[] a = new double[n];
            double[] b = new double[n];
            for (int i = 0; i < n; i++) {
                a[i] = (1 - 0.5) * Math.pow(0.5, i);
                b[i] = (1 - ratio) * Math.pow(ratio, n - 1 - i);
            }
            a[n - 1] *= 2;
            HypothesisPair pair = HypothesisPair.ofCurve(PositivePair.ofSpectra(a, b));
            for (double level : LEVELS) {
                BigDecimal exact = Samples.neymanPearson(a, b, level);
                Enclosure beta = pair.typeTwoError(level);
                assertTrue(beta.contains(exact), () -> ratio + ", level " + level + ": " + beta.toIntervalString(17));
                // at levels on a corner of a steep curve tε exceeds β by 1 / ratio, and takes as many digits with it
                double width = 1e-10 + 1e-13 / ratio;
                assertTrue(
                        beta.relativeWidth() < width, () -> ratio + ", level " + level + ": " + beta.relativeWidth());
            }
        }
    }

    /** Two pure states with squared overlap c: β = (√((1−ε)c) − √(ε(1−c)))² for ε ≤ c, else 0 (closed form, two-dimensional geometry). */
    @Test
    void pureStates() {
        for (double angle : new double[] {0.1, 0.7, 1.2, 1.5}) {
            DensityOperator psi = DensityOperator.ofKet(1, 0);
            DensityOperator phi = DensityOperator.ofKet(Math.cos(angle), Math.sin(angle));
            double c = Math.cos(angle) * Math.cos(angle);
            double s = Math.sin(angle) * Math.sin(angle);
            HypothesisPair pair = HypothesisPair.of(psi, phi);
            for (double level : LEVELS) {
                double expected = level >= c ? 0 : Math.pow(Math.sqrt((1 - level) * c) - Math.sqrt(level * s), 2);
                Enclosure beta = pair.typeTwoError(level);
                assertNear(expected, beta, 1e-12 + 1e-9 * level);
            }
            // level zero accepts exactly the support of the first state
            assertNear(c, pair.typeTwoError(0), 1e-15);
        }
    }

    /** Kets (1, 0) and (x, 1), x = 2^-100, level x²/4: β = (x − x/2)² up to a relative x, 1.6e-61, with relative accuracy. */
    @Test
    void pureStatesFarDown() {
        DensityOperator psi = DensityOperator.ofKet(1, 0);
        DensityOperator phi = DensityOperator.ofKet(0x1p-100, 1);
        Enclosure beta = HypothesisPair.of(psi, phi).typeTwoError(0x1p-202);
        assertEquals(1, beta.midpoint() * 0x1p202, 1e-12);
        assertTrue(beta.relativeWidth() < 1e-12, () -> beta.toIntervalString(17));
    }

    @Test
    void smallOverlapAtLevelZeroKeepsItsDigits() {
        DensityOperator psi = DensityOperator.ofKet(1, 0, 0);
        DensityOperator phi = DensityOperator.ofKet(0x1p-60, 1, 0);
        Enclosure beta = HypothesisPair.of(psi, phi).typeTwoError(0);
        assertTrue(beta.contains(0x1p-120) && beta.relativeWidth() < 1e-9, beta::toString);
    }

    @Test
    void supportOfTheFirstStateDecidesAtLevelZero() {
        DensityOperator full = DensityOperator.ofBloch(0.3, 0.2, 0.1);
        DensityOperator other = DensityOperator.ofBloch(0, 0, -0.5);
        assertNear(1, HypothesisPair.of(full, other).typeTwoError(0), 1e-15);
        DensityOperator face = DensityOperator.ofEigenvalues(0.5, 0.5, 0);
        DensityOperator ket = DensityOperator.ofKet(0.6, 0, 0.8);
        assertNear(0.36, HypothesisPair.of(face, ket).typeTwoError(0), 1e-15);
        assertNear(1, HypothesisPair.of(ket, face).typeTwoError(0.64).plus(Enclosure.ONE), 0.2);
        // a pure state given by its entries: its support cannot be certified, and the upper end says so
        DensityOperator entries = DensityOperator.ofReal(new double[][] {{0.5, 0.5}, {0.5, 0.5}});
        Enclosure beta = HypothesisPair.of(entries, DensityOperator.ofKet(1, 0)).typeTwoError(0);
        assertTrue(beta.contains(0.5) && beta.upper() >= 1 - 1e-15, beta::toString);
    }

    /** ρ mixes two kets that are not orthogonal; Tr σΠ = v*G⁻¹v with G their Gram matrix and v their overlaps with the ket of σ, exactly. */
    @Test
    void levelZeroOfAMixtureOfKets() {
        double[] a = {0.6, 0.8, 0, 0};
        double[] b = {0.6, 0, 0.8, 0};
        for (double tilt : new double[] {1, 0x1p-10, 0x1p-40}) {
            double[] s = {0.5 * tilt, -0.25 * tilt, 0.125 * tilt, 1};
            double norm = Math.sqrt(1 + tilt * tilt * (0.25 + 0.0625 + 0.015625));
            java.util.Arrays.setAll(s, i -> s[i] / norm);
            Enclosure beta = HypothesisPair.of(
                            DensityOperator.mixture(
                                    java.util.List.of(DensityOperator.ofKet(a), DensityOperator.ofKet(b)), 0.5, 0.5),
                            DensityOperator.ofKet(s))
                    .typeTwoError(0);
            BigDecimal aa = dot(a, a);
            BigDecimal ab = dot(a, b);
            BigDecimal bb = dot(b, b);
            BigDecimal as = dot(a, s);
            BigDecimal bs = dot(b, s);
            BigDecimal exact = bb.multiply(as)
                    .multiply(as)
                    .subtract(ab.multiply(as).multiply(bs).multiply(BigDecimal.valueOf(2)))
                    .add(aa.multiply(bs).multiply(bs))
                    .divide(aa.multiply(bb).subtract(ab.multiply(ab)), Samples.DIGITS);
            assertTrue(beta.contains(exact), () -> exact.doubleValue() + " in " + beta.toIntervalString(17));
            assertTrue(beta.relativeWidth() < 1e-13, () -> beta.toIntervalString(17));
        }
    }

    private static BigDecimal dot(double[] x, double[] y) {
        BigDecimal s = BigDecimal.ZERO;
        for (int i = 0; i < x.length; i++) {
            s = s.add(Samples.exact(x[i]).multiply(Samples.exact(y[i])));
        }
        return s;
    }

    @Test
    void largeLevelsLeaveNothing() {
        DensityOperator rho = DensityOperator.ofEigenvalues(0.5, 0.25, 0.25);
        HypothesisPair pair = HypothesisPair.of(rho, DensityOperator.ofKet(0.6, 0.8, 0));
        assertEquals(Enclosure.ZERO, pair.typeTwoError(1));
        assertEquals(Enclosure.ZERO, pair.typeTwoError(7));
        // a trace of one within rounding: what is missing or in excess enters
        Enclosure bloch = HypothesisPair.of(DensityOperator.ofBloch(0.1, 0.2, 0.3), DensityOperator.ofBloch(0, 0, 0.7))
                .typeTwoError(1);
        assertTrue(bloch.lower() == 0 && bloch.upper() < 1e-14, bloch::toString);
    }

    /** Where the exact value is zero there is no relative accuracy to be had: the upper end falls far below the smallest double. */
    @Test
    void errorsThatVanish() {
        HypothesisPair pair = HypothesisPair.ofCurve(
                PositivePair.ofSpectra(new double[] {0.5, 0.25, 0.25}, new double[] {0, 0.5, 0.5}));
        // here F(t) = tε on an interval, up to the rounding of F
        Enclosure beta = pair.typeTwoError(0.5);
        assertTrue(beta.lower() == 0 && beta.upper() < 1e-15, beta::toString);
        assertTrue(pair.typeTwoError(0.75).lnUpper() < -700);
        assertNear(0.5, pair.typeTwoError(0.25), 1e-15);
    }

    @Test
    void identicalAndOrthogonalStates() {
        DensityOperator rho = DensityOperator.ofBloch(0.3, -0.2, 0.4);
        DensityOperator up = DensityOperator.ofKet(1, 0);
        DensityOperator down = DensityOperator.ofKet(0, 1);
        for (double level : LEVELS) {
            assertNear(1 - level, HypothesisPair.of(rho, rho).typeTwoError(level), 1e-13);
            assertNear(0, HypothesisPair.of(up, down).typeTwoError(level), 1e-12);
        }
    }

    /** Duality, both ways: no support line lies above β, and no test below it. */
    @Test
    void dualityOnRandomPairs() {
        Random random = new Random(17);
        for (int k = 0; k < 8; k++) {
            int n = 2 + random.nextInt(3);
            DensityOperator rho = Samples.state(n, random);
            DensityOperator sigma = Samples.state(n, random);
            HypothesisPair pair = HypothesisPair.of(rho, sigma);
            double level = Math.pow(10, -3 * random.nextDouble());
            Enclosure beta = pair.typeTwoError(level);
            for (int j = 0; j < 12; j++) {
                double t = Math.pow(10, 6 * random.nextDouble() - 3);
                Enclosure line =
                        pair.curve().traceMinimum(t, 1).minus(Enclosure.exact(t).times(level));
                assertTrue(
                        line.isPossiblyBelow(beta),
                        () -> "t " + t + ": " + line + " above " + beta.toIntervalString(17));
            }
            for (int j = 0; j < 12; j++) {
                HermitianOperator effect = Samples.effect(n, random);
                BinaryTest test = BinaryTest.of(effect, rho, sigma);
                double alpha = test.typeOneError().upper();
                if (alpha > 0 && alpha <= 1) {
                    Enclosure least = pair.typeTwoError(alpha);
                    assertTrue(
                            least.lower() <= test.typeTwoError().upper() + test.defect(),
                            () -> test + " beats " + least);
                }
            }
            assertTrue(beta.width() < 1e-12, () -> "level " + level + ": " + beta.toIntervalString(17));
        }
    }

    @Test
    void dimensionOne() {
        DensityOperator one = DensityOperator.maximallyMixed(1);
        assertNear(0.75, HypothesisPair.of(one, one).typeTwoError(0.25), 1e-15);
        assertNear(1, HypothesisPair.of(one, one).typeTwoError(0), 0);
    }
}
