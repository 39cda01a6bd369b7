package org.minorant.core.pair;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.util.List;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.PositiveOperator;
import org.minorant.core.WideDouble;

/** Copies of a vector against any operator: brute force over every type, products of matrices, closed forms, coding bounds. */
class RankOneCopiesTest {

    /** Rounding of a few letters; the tests' measures have at most four, and f(1 − g') doubles it at most. */
    private static final double NARROW = 5e-14;

    @Test
    void enclosesBruteForceOverRandomMeasures() {
        Random random = new Random(77);
        int[] copies = {0, 0, 60, 12, 7};
        for (int letters = 2; letters <= 4; letters++) {
            for (int trial = 0; trial < 4; trial++) {
                double[] w = random.doubles(letters).toArray();
                double[] b = random.doubles(letters).toArray();
                contains(w, b, 2 + random.nextInt(copies[letters]));
            }
        }
        contains(new double[] {0.89, 0.11}, new double[] {0.75, 0.25}, 300);
    }

    @Test
    void enclosesBruteForceOverNastyMeasures() {
        double[][][] measures = {
            {{1, 0}, {0.5, 0.5}},
            {{0.5, 0.5}, {0.5, 0.5}},
            {{0.5, 0.5}, {1, 0}},
            {{0.95, 0.05}, {1, 0}},
            {{0.9, 0.04, 0.06}, {1, 0, 0.25}},
            {{1 - 1e-12, 1e-12}, {1, 0}},
            {{1e-12, 1 - 1e-12}, {1, 0}},
            {{0, 1}, {1, 0}},
            {{0.5, 0.5}, {0.5 * (1 - 1e-12), 0.5 * (1 + 1e-12)}},
            {{1e-300, 1}, {1, 1e-300}},
            {{1, 1e-300}, {1, 1e-300}},
            {{1e-100, 1, 1e-20}, {1, 1e-150, 0}},
            {{3e5, 2e7}, {1e9, 1e-3}},
            {{1}, {0.25}},
            {{0.25, 0.25, 0.5}, {0.125, 0.125, 0.75}},
        };
        for (double[][] m : measures) {
            for (int n : new int[] {1, 2, 3, 12}) {
                contains(m[0], m[1], n);
            }
        }
    }

    /** About t where f stops growing, where it is a tenth of that, and far on either side. */
    private static void contains(double[] w, double[] b, int n) {
        PositivePair pair = PositivePair.ofSpectralMeasure(w, b).copies(n);
        List<ExactTypes.Point> points = ExactTypes.points(w, b, n);
        BigDecimal kink = BigDecimal.ZERO;
        for (ExactTypes.Point p : points) {
            if (p.second().signum() > 0) {
                kink = kink.add(p.multiplicity().multiply(p.first()).divide(p.second(), ExactTypes.MC));
            }
        }
        if (kink.signum() == 0) {
            assertEquals(Enclosure.ZERO, pair.traceMinimum(1));
            return;
        }
        for (double factor : new double[] {1e-30, 1e-3, 0.1, 0.5, 1 - 1e-9, 1 + 1e-9, 2, 1e20}) {
            WideDouble t = CommutingCopiesTest.wide(kink.multiply(new BigDecimal(factor)));
            Enclosure f = pair.traceMinimum(WideDouble.ONE, t);
            BigDecimal exact = ExactTypes.rankOne(points, t.toBigDecimal());
            String what = "n = " + n + ", w_0 = " + w[0] + ", b_0 = " + b[0] + ", factor " + factor + ": "
                    + f.toIntervalString(20) + " against " + exact.doubleValue();
            // Newton's method ends within 1e-20 of a double root
            BigDecimal slack = exact.movePointLeft(19);
            assertTrue(
                    f.lowerWide().toBigDecimal().compareTo(exact.add(slack)) <= 0
                            && f.upperWide().toBigDecimal().compareTo(exact.subtract(slack)) >= 0,
                    what);
            assertTrue(f.relativeWidth() < NARROW, what);
        }
    }

    /**
     * Binary pure-state channel of overlap c, equiprobable: every word's signal against the average output has the measure with weights and values (1 ± c)/2. Computed values of f(M − 1) = 1e-3, and of f at one or
     * few uses (closed form, six to eight decimals).
     */
    @Test
    void reproducesPureStateChannels() {
        double[][] rows = {
            {0.78, 100, 23.094144}, {0.78, 500, 187.711840}, {0.78, 1000, 410.781774}, {0.78, 2000, 872.577952},
            {0.5, 100, 59.379470}, {0.5, 1000, 744.878792}, {0.5, 1e4, 7901.682763}, {0.5, 1e6, 809158.384384}
        };
        for (double[] row : rows) {
            double[] m = {(1 + row[0]) / 2, (1 - row[0]) / 2};
            PositivePair pair = PositivePair.ofSpectralMeasure(m, m).copies((int) row[1]);
            WideDouble below = CommutingCopiesTest.messagesLessOne(row[2] - 6e-7);
            WideDouble above = CommutingCopiesTest.messagesLessOne(row[2] + 6e-7);
            assertTrue(pair.traceMinimum(WideDouble.ONE, below).upper() < 1e-3, () -> row[0] + ", n = " + row[1]);
            assertTrue(pair.traceMinimum(WideDouble.ONE, above).lower() > 1e-3, () -> row[0] + ", n = " + row[1]);
        }
        double[][] few = {
            {1, 2, .687110243057}, {2, 2, .532170663716}, {2, 4, .938539061641}, {3, 4, .791432948783},
            {5, 2, .273656233970}, {5, 4, .555807147113}, {5, 8, .789360642729}, {10, 4, .224535331522}
        };
        double[] m = {0.89, 0.11};
        for (double[] row : few) {
            Enclosure f =
                    PositivePair.ofSpectralMeasure(m, m).copies((int) row[0]).traceMinimum(row[1] - 1);
            assertEquals(row[2], f.midpoint(), 6e-13);
        }
    }

    /** n copies of two kets of overlap c: ½(1 + t − √((1 + t)² − 4t(1 − c^2n))), exactly; here in the form that keeps digits. */
    @Test
    void twoKetsFollowTheClosedForm() {
        DensityOperator psi = DensityOperator.ofKet(0.6, 0.8);
        DensityOperator phi = DensityOperator.ofKet(0.8, 0.6);
        for (int n : new int[] {2, 5, 40}) {
            PositivePair pair = RankOneCopies.of(psi, phi, false, n).orElseThrow();
            double overlap = Math.pow(0.96, 2 * n);
            for (double t : new double[] {1e-9, 0.3, 1, 4, 1e9}) {
                double s = 1 + t;
                double expected = 2 * t * overlap / (s + Math.sqrt(s * s - 4 * t * overlap));
                Enclosure f = pair.traceMinimum(t);
                // the doubles of 0.6 and 0.8 are off by 1e-16, four of them to the power n
                assertEquals(expected, f.midpoint(), expected * n * 2e-15);
                assertTrue(f.relativeWidth() < NARROW, f::toString);
            }
        }
    }

    @Test
    void orthogonalAndEqualKets() {
        DensityOperator psi = DensityOperator.ofKet(0.6, 0.8);
        PositivePair apart = RankOneCopies.of(psi, DensityOperator.ofKet(0.8, -0.6), false, 7)
                .orElseThrow();
        assertEquals(0, apart.traceMinimum(1).upper(), 1e-28);
        DensityOperator turned = DensityOperator.ofKet(new double[] {0, 0}, new double[] {0.6, 0.8});
        PositivePair same = RankOneCopies.of(psi, turned, false, 1000).orElseThrow();
        for (double t : new double[] {0.25, 1, 3}) {
            Enclosure f = same.traceMinimum(t);
            // the kets' square is 1 within 2^-53 or so
            assertEquals(Math.min(1, t), f.midpoint(), 1e-12);
            assertTrue(f.relativeWidth() < 1e-12, f::toString);
        }
        assertEquals(Enclosure.ZERO, same.traceMinimum(0));
    }

    /** Against products of matrices: a ket with mixed qubits and qutrits, full rank or not, either order. */
    @Test
    void agreesWithProductsOfMatrices() {
        DensityOperator psi = DensityOperator.ofKet(0.6, 0.8);
        DensityOperator[] others = {
            DensityOperator.ofBloch(0.1, 0.2, 0.3),
            DensityOperator.ofReal(new double[][] {{0.7, 0.25}, {0.25, 0.3}}),
            DensityOperator.ofBloch(0.3, -0.1, 0.94)
        };
        for (DensityOperator b : others) {
            agrees(psi, b);
        }
        DensityOperator ket = DensityOperator.ofKet(0.6, 0.64, 0.48);
        PositiveOperator two = PositiveOperator.weightedSum(
                List.of(DensityOperator.ofKet(0.8, 0, 0.6), DensityOperator.ofKet(0, 1, 0)), 0.5, 0.5);
        agrees(ket, two);
        agrees(ket, DensityOperator.ofReal(new double[][] {{0.5, 0.125, 0}, {0.125, 0.25, 0.0625}, {0, 0.0625, 0.25}}));
    }

    private static void agrees(PositiveOperator psi, PositiveOperator b) {
        PositiveOperator psiN = psi.tensor(psi).tensor(psi);
        PositiveOperator bN = b.tensor(b).tensor(b);
        for (double t : new double[] {0.01, 1, 2.5, 1000}) {
            Enclosure f = RankOneCopies.of(psi, b, false, 3).orElseThrow().traceMinimum(t);
            Enclosure other = RankOneCopies.of(psi, b, true, 3).orElseThrow().traceMinimum(t, 1);
            Enclosure dense = PositivePair.of(psiN, bN).traceMinimum(t);
            // found from the operators as well
            assertEquals(f, PositivePair.of(psi, b).copies(3).traceMinimum(t));
            assertEquals(other, PositivePair.of(b, psi).copies(3).traceMinimum(t, 1));
            assertTrue(
                    f.isPossiblyBelow(dense) && dense.isPossiblyBelow(f),
                    () -> t + ": " + f.toIntervalString(18) + " and " + dense.toIntervalString(18));
            assertEquals(f.midpoint(), other.midpoint(), f.midpoint() * NARROW);
            assertTrue(f.relativeWidth() < NARROW, f::toString);
        }
    }

    /** A ket against a qubit next to purity, and against one with eigenvectors at right angles to it that its entries do not show. */
    @Test
    void resolvesNearlyPureAndHiddenOrthogonalQubits() {
        DensityOperator psi = DensityOperator.ofKet(0.6, 0.8);
        for (double length : new double[] {1 - 1e-3, 1 - 1e-9, 1 - 0x1p-50}) {
            DensityOperator b = DensityOperator.ofBloch(0, 0, length);
            double up = (1 + length) / 2;
            double down = (1 - length) / 2;
            PositivePair exact = PositivePair.ofSpectralMeasure(new double[] {0.36, 0.64}, new double[] {up, down});
            // the doubles of 0.6 and 0.8 square to 0.36 and 0.64 within 2^-52 each
            Enclosure f = RankOneCopies.of(psi, b, false, 1000)
                    .orElseThrow()
                    .traceMinimum(WideDouble.ONE, WideDouble.of(1, 900));
            double expected = exact.copies(1000)
                    .traceMinimum(WideDouble.ONE, WideDouble.of(1, 900))
                    .midpoint();
            assertEquals(expected, f.midpoint(), expected * 1e-12);
            assertTrue(f.relativeWidth() < NARROW, f::toString);
        }
        DensityOperator plus = DensityOperator.ofReal(new double[][] {{0.5, 0.25}, {0.25, 0.5}});
        Enclosure f = RankOneCopies.of(DensityOperator.ofBloch(1, 0, 0), plus, false, 400)
                .orElseThrow()
                .traceMinimum(1);
        double expected = Math.pow(0.75, 400);
        assertEquals(expected, f.midpoint(), expected * 1e-12);
        assertTrue(f.relativeWidth() < NARROW, f::toString);
    }

    /** A ket and a mixed qubit a million times, at any depth. */
    @Test
    void staysTightForAMillionCopies() {
        PositivePair pair = RankOneCopies.of(
                        DensityOperator.ofKet(0.6, 0.8), DensityOperator.ofBloch(0.1, 0.2, 0.3), false, 1_000_000)
                .orElseThrow();
        assertTrue(pair.traceMinimum(1).relativeWidth() < NARROW);
        assertTrue(pair.traceMinimum(WideDouble.ONE, WideDouble.of(1, 900_000)).relativeWidth() < NARROW);
    }
}
