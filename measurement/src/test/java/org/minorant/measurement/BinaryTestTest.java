package org.minorant.measurement;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.minorant.measurement.HypothesisPairTest.assertNear;
import static org.minorant.measurement.HypothesisPairTest.assertRefusal;

import java.math.BigDecimal;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.HermitianOperator;
import org.minorant.core.Operator;
import org.minorant.core.PositiveOperator;

/** Explicit tests: their errors, the Helstrom test, the Neyman–Pearson test. */
class BinaryTestTest {

    private static final DensityOperator UP = DensityOperator.ofKet(1, 0);
    private static final DensityOperator MIXED = DensityOperator.ofEigenvalues(0.25, 0.75);

    @Test
    void errorsOfARandomisedTestAreExact() {
        BinaryTest test = BinaryTest.of(HermitianOperator.diagonal(0.75, 0.5), UP, MIXED);
        assertNear(0.25, test.typeOneError(), 1e-16);
        assertNear(0.25 * 0.75 + 0.75 * 0.5, test.typeTwoError(), 2e-16);
        assertNear(0.5 * 0.25 + 0.5 * 0.5625, test.meanError(0.5), 2e-16);
        assertTrue(test.defect() <= 1e-15);
        assertEquals("BinaryTest, type I 0.250000000000000, type II 0.562500000000000", test.toString());
    }

    /** Against sums of exact products of the stored entries. */
    @Test
    void errorsHoldForTheEntriesStored() {
        Random random = new Random(31);
        for (int k = 0; k < 40; k++) {
            int n = 1 + random.nextInt(5);
            HermitianOperator t = Samples.effect(n, random);
            double[] p = new double[n];
            java.util.Arrays.setAll(p, i -> (i + 1.0) / (n * (n + 1.0) / 2));
            DensityOperator rho = DensityOperator.of(Samples.rotated(p, Samples.unitary(n, random)));
            BinaryTest test = BinaryTest.of(t, rho, rho);
            BigDecimal accepted = BigDecimal.ZERO;
            BigDecimal trace = BigDecimal.ZERO;
            for (int i = 0; i < n; i++) {
                trace = trace.add(Samples.exact(rho.re(i, i)));
                for (int j = 0; j < n; j++) {
                    accepted = accepted.add(Samples.exact(rho.re(i, j)).multiply(Samples.exact(t.re(i, j))))
                            .add(Samples.exact(rho.im(i, j)).multiply(Samples.exact(t.im(i, j))));
                }
            }
            assertTrue(test.typeTwoError().contains(accepted));
            assertTrue(test.typeOneError().contains(trace.subtract(accepted)));
            assertTrue(test.typeTwoError().relativeWidth() < 1e-14 || accepted.doubleValue() < 1e-14);
        }
    }

    @Test
    void projectorGivenByItsFactorKeepsRelativeAccuracy() {
        DensityOperator far = DensityOperator.ofKet(0x1p-70, 1);
        BinaryTest test = BinaryTest.of(UP, UP, far);
        assertTrue(test.typeTwoError().contains(0x1p-140) && test.typeTwoError().relativeWidth() < 1e-9);
        assertEquals(
                Enclosure.ZERO,
                BinaryTest.of(UP, UP, DensityOperator.ofKet(0, 1)).typeTwoError());
        assertEquals(0, test.typeOneError().upper(), 1e-30);
    }

    @Test
    void acceptingAlwaysAndNever() {
        BinaryTest always = BinaryTest.of(HermitianOperator.identity(2), UP, MIXED);
        assertEquals(Enclosure.ZERO, always.typeOneError());
        assertNear(1, always.typeTwoError(), 3e-16);
        BinaryTest never = BinaryTest.of(HermitianOperator.diagonal(0, 0), UP, MIXED);
        assertNear(1, never.typeOneError(), 3e-16);
        assertEquals(Enclosure.ZERO, never.typeTwoError());
    }

    @Test
    void refusals() {
        assertRefusal(
                "BinaryTest.of: of the test operator the smallest diagonal entry is -0.5, expected at least"
                        + " -1.0658141036401503E-14 (rounding); check it, or use Povm.nearest, which projects and says by how much",
                () -> BinaryTest.of(HermitianOperator.diagonal(-0.5, 1), UP, MIXED));
        assertRefusal(
                "BinaryTest.of: of one minus the test operator the smallest diagonal entry is -0.25, expected at least"
                        + " -1.0658141036401503E-14 (rounding); check it, or use Povm.nearest, which projects and says by how much",
                () -> BinaryTest.of(HermitianOperator.diagonal(1.25, 1), UP, MIXED));
        assertRefusal(
                "BinaryTest.of: the test operator has dimension 3, expected 2, as the others; all must act on the same space",
                () -> BinaryTest.of(HermitianOperator.identity(3), UP, MIXED));
        assertRefusal(
                "BinaryTest.of: the second state has dimension 1, expected 2, as the others; all must act on the same space",
                () -> BinaryTest.of(HermitianOperator.identity(2), UP, DensityOperator.maximallyMixed(1)));
        assertRefusal(
                "BinaryTest.meanError: the prior is NaN, expected between 0.0 and 1.0; give a number in that range",
                () -> BinaryTest.of(HermitianOperator.identity(2), UP, MIXED).meanError(Double.NaN));
    }

    /** Rounding of the entries of T costs d · 1e-16 at most; nothing is below the minimum error but for the defect. */
    @Test
    void helstromTestAttainsTheMinimumError() {
        Random random = new Random(37);
        for (int k = 0; k < 40; k++) {
            int n = 1 + random.nextInt(6);
            HypothesisPair pair = HypothesisPair.of(Samples.state(n, random), Samples.state(n, random));
            double prior = random.nextDouble();
            Enclosure least = pair.minimumError(prior);
            BinaryTest test = pair.helstromTest(prior);
            Enclosure mean = test.meanError(prior);
            assertTrue(least.lower() <= mean.upper() + test.defect(), () -> mean + " below " + least);
            assertTrue(
                    mean.upper() <= least.upper() + n * 4e-16,
                    () -> mean.toIntervalString(17) + " above " + least.toIntervalString(17));
        }
    }

    @Test
    void helstromTestAtCertainPriors() {
        HypothesisPair pair = HypothesisPair.of(UP, MIXED);
        assertEquals(HermitianOperator.identity(2), pair.helstromTest(1).operator());
        assertEquals(Enclosure.ZERO, pair.helstromTest(0).typeTwoError());
    }

    @Test
    void neymanPearsonTestAttainsTheLevel() {
        Random random = new Random(41);
        for (int k = 0; k < 30; k++) {
            int n = 1 + random.nextInt(4);
            HypothesisPair pair = HypothesisPair.of(Samples.state(n, random), Samples.state(n, random));
            double level = k % 3 == 0 ? Math.pow(10, -6 * random.nextDouble()) : random.nextDouble();
            Enclosure beta = pair.typeTwoError(level);
            BinaryTest test = pair.neymanPearsonTest(level);
            String what = "n " + n + ", level " + level + ": " + test + ", least " + beta;
            assertTrue(test.typeOneError().upper() <= level, what);
            // (T + δ)/(1 + 2δ) is a test; δ more type-I error lowers the convex β by δ/ε at most
            double defect = test.defect() * (1 + 2 / level);
            assertTrue(test.typeTwoError().lower() + defect >= beta.lower(), what);
            // what rounding of the entries costs in type-I error comes back times the slope of the trade-off, at most
            // (1-β)/ε
            assertTrue(test.typeTwoError().upper() <= beta.upper() + 1e-14 + n * 2e-15 / level, what);
        }
    }

    @Test
    void neymanPearsonTestOfCommutingStatesIsRandomised() {
        DensityOperator rho = DensityOperator.ofEigenvalues(0.5, 0.25, 0.25);
        DensityOperator sigma = DensityOperator.ofEigenvalues(0.125, 0.125, 0.75);
        BinaryTest test = HypothesisPair.of(rho, sigma).neymanPearsonTest(0.125);
        assertTrue(test.typeOneError().upper() <= 0.125);
        assertNear(0.125, test.typeOneError(), 1e-15);
        assertNear(0.625, test.typeTwoError(), 1e-15);
        assertEquals(0.5, test.operator().re(2, 2), 1e-15);
        assertEquals(1, test.operator().re(0, 0), 1e-15);
    }

    @Test
    void neymanPearsonTestAtTheEnds() {
        HypothesisPair face =
                HypothesisPair.of(DensityOperator.ofEigenvalues(0.5, 0.5, 0), DensityOperator.ofKet(0.6, 0, 0.8));
        BinaryTest zero = face.neymanPearsonTest(0);
        assertEquals(Enclosure.ZERO, zero.typeOneError());
        assertNear(0.36, zero.typeTwoError(), 1e-15);
        assertEquals(Enclosure.ZERO, face.neymanPearsonTest(1).typeTwoError());
        // no stored projector certifies a type-I error of exactly zero here
        BinaryTest tilted =
                HypothesisPair.of(DensityOperator.ofKet(0.6, 0.8), MIXED).neymanPearsonTest(0);
        assertEquals(Enclosure.ZERO, tilted.typeOneError());
        BinaryTest tiny =
                HypothesisPair.of(DensityOperator.ofKet(0.6, 0.8), MIXED).neymanPearsonTest(1e-19);
        assertTrue(tiny.typeOneError().upper() <= 1e-19);
    }

    @Test
    void outcomeOperatorGivenByAFactorWithErrors() {
        PositiveOperator half = PositiveOperator.ofFactor(Operator.ofReal(new double[][] {{0.5}, {0.5}}));
        BinaryTest test = BinaryTest.of(half, MIXED, UP);
        assertNear(0.75, test.typeOneError(), 1e-16);
        assertNear(0.25, test.typeTwoError(), 1e-16);
    }
}
