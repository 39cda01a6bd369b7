package org.minorant.measurement;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.util.List;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;
import org.minorant.core.pair.PositivePair;

/** The two polygons around the error trade-off curve. */
class TradeOffCurveTest {

    @Test
    void commutingStatesLieBetweenThePolygons() {
        double[] a = {0.5, 0.25, 0.125, 0.125};
        double[] b = {0.0625, 0.1875, 0.25, 0.5};
        HypothesisPair pair = HypothesisPair.ofCurve(PositivePair.ofSpectra(a, b));
        TradeOffCurve curve = pair.tradeOffCurve(1e-9);
        assertTrue(curve.gap() <= 1e-9, curve::toString);
        for (int k = 0; k <= 1000; k++) {
            double alpha = k * 0x1p-10;
            BigDecimal exact = Samples.neymanPearson(a, b, alpha);
            assertTrue(curve.typeTwoError(alpha).contains(exact), () -> alpha + ": " + exact);
        }
        assertAround(curve);
    }

    /** A piecewise linear curve has a handful of corners; both polygons find all of them. */
    @Test
    void cornersOfACommutingPair() {
        double[] a = {0.5, 0.25, 0.25};
        double[] b = {0.125, 0.125, 0.75};
        TradeOffCurve curve =
                HypothesisPair.ofCurve(PositivePair.ofSpectra(a, b)).tradeOffCurveAt(0.1, 0.25, 0.4, 0.5, 0.8);
        for (double[] corner : new double[][] {{0.25, 0.25}, {0.5, 0.125}, {1, 0}}) {
            assertTrue(
                    curve.lowerPolygon().stream()
                            .anyMatch(p -> Math.abs(p.typeOneError() - corner[0]) < 1e-13
                                    && Math.abs(p.typeTwoError().toDoubleUp() - corner[1]) < 1e-13),
                    () -> "no corner near " + corner[0] + " in " + curve.lowerPolygon());
            assertEquals(corner[1], curve.typeTwoError(corner[0]).upper(), 1e-14);
        }
    }

    @Test
    void qubitPairToATolerance() {
        HypothesisPair pair =
                HypothesisPair.of(DensityOperator.ofBloch(0, 0, 0.9), DensityOperator.ofBloch(0.6, 0, 0.5));
        for (double tolerance : new double[] {0.1, 1e-3}) {
            TradeOffCurve curve = pair.tradeOffCurve(tolerance);
            assertTrue(curve.gap() <= tolerance && curve.gap() > 0, curve::toString);
            assertAround(curve);
            for (double level : new double[] {0, 0.01, 0.2, 0.5, 0.95, 1}) {
                Enclosure beta = pair.typeTwoError(level);
                Enclosure between = curve.typeTwoError(level);
                assertTrue(
                        between.isPossiblyBelow(beta) && beta.isPossiblyBelow(between), () -> level + ": " + between);
            }
            BinaryTest test = pair.helstromTest(0.4);
            Enclosure least = curve.typeTwoError(test.typeOneError().upper());
            assertTrue(least.lower() <= test.typeTwoError().upper());
        }
    }

    @Test
    void randomPairs() {
        Random random = new Random(23);
        for (int k = 0; k < 4; k++) {
            int n = 2 + random.nextInt(3);
            TradeOffCurve curve = HypothesisPair.of(Samples.state(n, random), Samples.state(n, random))
                    .tradeOffCurve(0.01);
            // where the support of a state given by entries is not certified, the gap closes everywhere but at level 0
            for (double level : new double[] {1e-10, 1e-6, 0.01, 0.3, 0.77, 1}) {
                assertTrue(curve.typeTwoError(level).width() <= 0.01, () -> level + ": " + curve);
            }
            assertAround(curve);
        }
    }

    /** Levels and errors over hundreds of decades: relative accuracy at each level asked for. */
    @Test
    void deepLevels() {
        int n = 100;
        double[] a = new double[n];
        double[] b = new double[n];
        for (int i = 0; i < n; i++) {
            a[i] = 0.75 * Math.pow(0.25, i);
            b[i] = 0.75 * Math.pow(0.25, n - 1 - i);
        }
        double[] levels = {1e-40, 1e-20, 1e-10, 1e-3, 0.5};
        TradeOffCurve curve =
                HypothesisPair.ofCurve(PositivePair.ofSpectra(a, b)).tradeOffCurveAt(levels);
        for (double level : levels) {
            Enclosure beta = curve.typeTwoError(level);
            assertTrue(beta.contains(Samples.neymanPearson(a, b, level)), () -> level + ": " + beta);
            assertTrue(beta.relativeWidth() < 1e-9, () -> level + ": " + beta.toIntervalString(17));
        }
        assertAround(curve);
    }

    @Test
    void identicalStatesGiveTheDiagonal() {
        DensityOperator rho = DensityOperator.ofEigenvalues(0.5, 0.5);
        TradeOffCurve curve = HypothesisPair.of(rho, rho).tradeOffCurve(1e-6);
        for (double level : new double[] {0, 0.125, 0.5, 1}) {
            assertEquals(1 - level, curve.typeTwoError(level).midpoint(), 1e-6);
        }
        assertEquals(2, curve.upperPolygon().size());
        assertAround(curve);
    }

    @Test
    void refusesLevelsOutsideTheRange() {
        TradeOffCurve curve = HypothesisPair.ofCurve(PositivePair.ofSpectra(new double[] {1}, new double[] {1}))
                .tradeOffCurve(0.5);
        HypothesisPairTest.assertRefusal(
                "TradeOffCurve.typeTwoError: the type-I error is NaN, expected between 0.0 and 1.0; give a number in that range",
                () -> curve.typeTwoError(Double.NaN));
    }

    /** Both polygons run from 0 to 1, fall and are convex, and the upper is nowhere below the lower. */
    private static void assertAround(TradeOffCurve curve) {
        assertConvex(curve.lowerPolygon());
        assertConvex(curve.upperPolygon());
        for (int k = 0; k <= 512; k++) {
            double alpha = k / 512.0;
            double below = value(curve.lowerPolygon(), alpha);
            double above = value(curve.upperPolygon(), alpha);
            assertTrue(below <= above + 1e-15, () -> "at " + alpha);
            Enclosure e = curve.typeTwoError(alpha);
            assertTrue(e.lower() >= below - 1e-15 && e.upper() <= above + 1e-15, () -> "at " + alpha + ": " + e);
            assertTrue(e.upper() - e.lower() <= curve.gap() + 1e-15);
        }
    }

    private static void assertConvex(List<TradeOffPoint> polygon) {
        assertEquals(0, polygon.get(0).typeOneError());
        assertEquals(1, polygon.get(polygon.size() - 1).typeOneError());
        double slope = Double.NEGATIVE_INFINITY;
        for (int i = 1; i < polygon.size(); i++) {
            double run = polygon.get(i).typeOneError() - polygon.get(i - 1).typeOneError();
            WideDouble left = polygon.get(i - 1).typeTwoError();
            WideDouble right = polygon.get(i).typeTwoError();
            assertTrue(run > 0, "corners ascend");
            assertTrue(right.compareTo(left) <= 0, "errors fall");
            double s = right.plusUp(left.negate()).toDoubleUp() / run;
            // a corner rounded by 1e-16 turns a short edge by 1e-16 over its length
            assertTrue(s >= slope - 4e-16 / run - 1e-9 * Math.abs(s), "slopes rise");
            slope = s;
        }
    }

    private static double value(List<TradeOffPoint> polygon, double alpha) {
        int r = 0;
        while (polygon.get(r).typeOneError() < alpha) {
            r++;
        }
        TradeOffPoint right = polygon.get(r);
        if (r == 0) {
            return right.typeTwoError().toDoubleDown();
        }
        TradeOffPoint left = polygon.get(r - 1);
        double share = (alpha - left.typeOneError()) / (right.typeOneError() - left.typeOneError());
        return (1 - share) * left.typeTwoError().toDoubleDown()
                + share * right.typeTwoError().toDoubleDown();
    }
}
