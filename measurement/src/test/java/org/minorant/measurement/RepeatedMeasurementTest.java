package org.minorant.measurement;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.InvalidInputException;
import org.minorant.core.pair.PositivePair;

/** Measuring copies one by one: against sums over all outcomes, and against what all measurements together reach. */
class RepeatedMeasurementTest {

    private static final HypothesisPair X =
            HypothesisPair.of(DensityOperator.ofBloch(0, 0, 0.9), DensityOperator.ofBloch(0.6, 0, 0.5));

    private static final Povm UP_DOWN = Povm.of(List.of(DensityOperator.ofKet(1, 0), DensityOperator.ofKet(0, 1)));

    private static final Povm TRINE = Povm.of(List.of(element(0), element(2 * Math.PI / 3), element(4 * Math.PI / 3)));

    private static DensityOperator state(double length, double angle) {
        return DensityOperator.ofBloch(length * Math.sin(angle), 0, length * Math.cos(angle));
    }

    private static org.minorant.core.HermitianOperator element(double angle) {
        return org.minorant.core.HermitianOperator.of(state(1 - 1e-15, angle).times(2.0 / 3));
    }

    /** Σ over all strings of outcomes, one by one. */
    private static double strings(double[] p, double[] q, int n, double a, double b) {
        if (n == 0) {
            return Math.min(a, b);
        }
        double sum = 0;
        for (int k = 0; k < p.length; k++) {
            sum += strings(p, q, n - 1, a * p[k], b * q[k]);
        }
        return sum;
    }

    @ParameterizedTest
    @CsvSource({"1, 0.5", "2, 0.3", "11, 0.5"})
    void twoOutcomes(int n, double prior) {
        RepeatedMeasurement m = RepeatedMeasurement.of(UP_DOWN, X.copies(5));
        Enclosure e = m.minimumError(n, prior);
        double expected = strings(new double[] {0.95, 0.05}, new double[] {0.75, 0.25}, n, prior, 1 - prior);
        // 2^n terms, each with n roundings of 2^-53
        assertEquals(expected, e.midpoint(), 1e-14);
        assertTrue(e.relativeWidth() < n * 4e-15, e::toString);
    }

    /** Probabilities (1 + r·m_k)/3 for the three directions m_k of a trine. */
    @Test
    void threeOutcomes() {
        double[] p = {(1 + 0.9) / 3, (1 - 0.45) / 3, (1 - 0.45) / 3};
        double h = 0.6 * Math.sqrt(0.75);
        double[] q = {1.5 / 3, (1 - 0.25 + h) / 3, (1 - 0.25 - h) / 3};
        RepeatedMeasurement m = RepeatedMeasurement.of(TRINE, X);
        assertEquals(3, m.firstOutcomes().size());
        // the elements are shorter than projectors by 1e-15
        assertEquals(strings(p, q, 7, 0.4, 0.6), m.minimumError(7, 0.4).midpoint(), 1e-13);
    }

    @Test
    void typeTwoErrorIsThatOfTheOutcomes() {
        RepeatedMeasurement m = RepeatedMeasurement.of(UP_DOWN, X);
        HypothesisPair classical = HypothesisPair.ofCurve(
                        PositivePair.ofSpectra(new double[] {0.95, 0.05}, new double[] {0.75, 0.25}))
                .copies(40);
        Enclosure e = m.typeTwoError(40, 0.01);
        // 0.95 and its like as doubles, times n, and a tolerance of 1e-12 of the supremum
        assertEquals(1, e.midpoint() / classical.typeTwoError(0.01).midpoint(), 1e-11);
        assertTrue(e.lower() <= e.upper() && e.relativeWidth() < 1e-10, e::toString);
    }

    /** On one copy some projective measurement is as good as any; value computed with 100 digits by an independent program. */
    @Test
    void onOneCopyNothingIsLost() {
        RepeatedMeasurement m = RepeatedMeasurement.bestFound(X, 1, 0.5);
        assertEquals(0.3197224362268005353440389, m.minimumError(1, 0.5).midpoint(), 2e-15);
        assertEquals(1, m.ratio(1, 0.5).upper(), 2e-14);
        assertTrue(m.ratio(1, 0.5).lower() == 1);
    }

    /** States that commute need no joint measurement, at any number of copies. */
    @ParameterizedTest
    @ValueSource(ints = {1, 10, 1000})
    void commutingStatesLoseNothing(int n) {
        HypothesisPair pair =
                HypothesisPair.of(DensityOperator.ofEigenvalues(0.8, 0.2), DensityOperator.ofEigenvalues(0.4, 0.6));
        RepeatedMeasurement m = RepeatedMeasurement.bestFound(pair, n, 0.3);
        assertEquals(1, m.ratio(n, 0.3).midpoint(), n * 4e-15 + 1e-14);
    }

    /** Kets of overlap c: asking whether it is the first one errs with c^(2n)/2, twice the least error for large n. */
    @ParameterizedTest
    @ValueSource(ints = {20, 200, 2000})
    void ketsAtLargeN(int n) {
        HypothesisPair pair = HypothesisPair.of(DensityOperator.ofKet(1, 0), DensityOperator.ofKet(0.8, 0.6));
        RepeatedMeasurement m = RepeatedMeasurement.bestFound(pair, n, 0.5);
        double bound = Math.log(0.5) + 2 * n * Math.log(0.8);
        assertTrue(m.minimumError(n, 0.5).lnLower() <= bound + n * 1e-9, m.minimumError(n, 0.5)::toString);
        assertTrue(m.ratio(n, 0.5).lower() >= 1);
    }

    /** No direction of a thousand on the whole sphere, not the plane only, errs less than the one that is found. */
    @Test
    void noOtherDirectionIsBetter() {
        int n = 7;
        double prior = 0.4;
        Enclosure found = RepeatedMeasurement.bestFound(X, n, prior).minimumError(n, prior);
        Random random = new Random(7);
        for (int k = 0; k < 1000; k++) {
            double z = 2 * random.nextDouble() - 1;
            double x = Math.sqrt(1 - z * z) * Math.cos(2 * Math.PI * random.nextDouble());
            double p = 0.5 + 0.45 * z;
            double q = 0.5 + 0.3 * x + 0.25 * z;
            double other = PositivePair.ofSpectra(new double[] {p, 1 - p}, new double[] {q, 1 - q})
                    .copies(n)
                    .traceMinimum(prior, 1 - prior)
                    .upper();
            assertTrue(found.lower() <= other * (1 + 1e-12), () -> found + " against " + other);
        }
    }

    /** Never better than the best joint measurement, and for generic states worse from two copies on. */
    @Test
    void jointMeasurementsAreBetter() {
        Random random = new Random(11);
        for (int k = 0; k < 6; k++) {
            HypothesisPair pair = HypothesisPair.of(
                    state(0.3 + 0.6 * random.nextDouble(), 0),
                    state(0.3 + 0.6 * random.nextDouble(), 0.4 + 2 * random.nextDouble()));
            int n = 2 + random.nextInt(25);
            RepeatedMeasurement m = RepeatedMeasurement.bestFound(pair, n, 0.5);
            Enclosure least = pair.copies(n).withTolerance(1e-6).minimumError(0.5);
            assertTrue(least.isPossiblyBelow(m.minimumError(n, 0.5)), () -> "n = " + n);
            assertTrue(m.ratio(n, 0.5, least).lower() > 1, () -> "n = " + n);
        }
    }

    @Test
    void refusals() {
        DensityOperator wide = DensityOperator.maximallyMixed(3);
        HypothesisPair qutrits = HypothesisPair.of(wide, wide);
        assertThrows(InvalidInputException.class, () -> RepeatedMeasurement.bestFound(qutrits, 2, 0.5));
        assertThrows(InvalidInputException.class, () -> RepeatedMeasurement.of(UP_DOWN, qutrits));
        assertThrows(InvalidInputException.class, () -> RepeatedMeasurement.bestFound(X, 0, 0.5));
        assertThrows(InvalidInputException.class, () -> RepeatedMeasurement.bestFound(X, 2, Double.NaN));
        RepeatedMeasurement m = RepeatedMeasurement.of(UP_DOWN, X);
        assertThrows(InvalidInputException.class, () -> m.minimumError(0, 0.5));
        assertThrows(InvalidInputException.class, () -> m.minimumError(3, 1.5));
        assertThrows(InvalidInputException.class, () -> m.typeTwoError(3, -1));
        assertEquals(2, m.measurement().size());
        HypothesisPair orthogonal = HypothesisPair.of(DensityOperator.ofKet(1, 0), DensityOperator.ofKet(0, 1));
        assertEquals(
                Double.POSITIVE_INFINITY,
                RepeatedMeasurement.of(UP_DOWN, orthogonal)
                        .ratio(2, 0.5, Enclosure.ZERO)
                        .upper());
    }
}
