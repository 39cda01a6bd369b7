package org.minorant.core.pair;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.SplittableRandom;
import org.junit.jupiter.api.Test;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.InvalidInputException;
import org.minorant.core.PositiveOperator;
import org.minorant.core.WideDouble;

class SpinProductsPairTest {

    private static DensityOperator state(SplittableRandom random) {
        double length = 0.2 + 0.79 * random.nextDouble();
        double z = 2 * random.nextDouble() - 1;
        double angle = 2 * Math.PI * random.nextDouble();
        double r = length * Math.sqrt(1 - z * z);
        return DensityOperator.ofBloch(r * Math.cos(angle), r * Math.sin(angle), length * z);
    }

    private static PositiveOperator power(PositiveOperator a, int n) {
        PositiveOperator p = a;
        for (int i = 1; i < n; i++) {
            p = p.tensor(a);
        }
        return p;
    }

    /** Two powers of the same pair are one power, found through blocks that are quite different. */
    @Test
    void powersOfOnePairMultiply() {
        SplittableRandom random = new SplittableRandom(41);
        int[][] counts = {{1, 1}, {2, 3}, {6, 5}, {12, 8}};
        for (int[] c : counts) {
            DensityOperator a = state(random);
            DensityOperator b = state(random);
            Enclosure product =
                    PositivePair.ofPowers(List.of(a, a), List.of(b, b), c).traceMinimum(0.3, 0.7);
            Enclosure single = PositivePair.of(a, b).copies(c[0] + c[1]).traceMinimum(0.3, 0.7);
            // disjoint enclosures would throw
            product.intersect(single);
            assertTrue(product.relativeWidth() < 1e-11, () -> c[0] + ", " + c[1] + ": " + product.relativeWidth());
        }
    }

    @Test
    void productsAgreeWithDenseOnes() {
        SplittableRandom random = new SplittableRandom(42);
        int[][] counts = {{1, 1, 1}, {2, 1, 2}, {3, 2, 1}};
        for (int[] c : counts) {
            List<DensityOperator> a = List.of(state(random), state(random), state(random));
            List<DensityOperator> b = List.of(state(random), state(random), state(random));
            PositiveOperator first =
                    power(a.get(0), c[0]).tensor(power(a.get(1), c[1])).tensor(power(a.get(2), c[2]));
            PositiveOperator second =
                    power(b.get(0), c[0]).tensor(power(b.get(1), c[1])).tensor(power(b.get(2), c[2]));
            Enclosure product = PositivePair.ofPowers(a, b, c).traceMinimum(0.9);
            Enclosure dense = PositivePair.of(first, second).traceMinimum(0.9);
            product.intersect(dense);
            assertTrue(product.relativeWidth() < 1e-11, () -> "" + product.relativeWidth());
        }
    }

    /** Blocks with many columns that nearly depend on each other: the order of pivots decides. */
    @Test
    void largeProductsAreSharp() {
        DensityOperator a = DensityOperator.ofBloch(0, 0, 0.9);
        DensityOperator b = DensityOperator.ofBloch(0.6, 0, 0.5);
        DensityOperator mixture = DensityOperator.mixture(List.of(a, b), new double[] {0.5, 0.5});
        PositivePair pair = PositivePair.ofPowers(List.of(a, b), List.of(mixture, mixture), 12, 12)
                .withEffort(Effort.DEFAULT.withTolerance(1e-8));
        Enclosure f = pair.traceMinimum(2);
        assertTrue(f.relativeWidth() < 1e-8, () -> "" + f.relativeWidth());
    }

    @Test
    void copiesOfCopiesMultiply() {
        SplittableRandom random = new SplittableRandom(44);
        DensityOperator a = state(random);
        DensityOperator b = state(random);
        PositivePair one = PositivePair.of(a, b);
        assertEquals(one.copies(12).traceMinimum(0.6), one.copies(4).copies(3).traceMinimum(0.6));
        PositivePair product = PositivePair.ofPowers(List.of(a, b), List.of(b, a), 2, 1);
        PositivePair twice = PositivePair.ofPowers(List.of(a, b), List.of(b, a), 4, 2);
        assertEquals(twice.traceMinimum(0.6), product.copies(2).traceMinimum(0.6));
    }

    /** A product with more dimensions than an int can count is planned all the same, or refused for its columns. */
    @Test
    void manyFactors() {
        DensityOperator a = DensityOperator.ofBloch(0, 0, 0.999);
        DensityOperator b = DensityOperator.ofBloch(0.999, 0, 0);
        List<DensityOperator> first = java.util.Collections.nCopies(40, a);
        List<DensityOperator> second = java.util.Collections.nCopies(40, b);
        int[] ones = new int[40];
        java.util.Arrays.fill(ones, 1);
        PositivePair many = PositivePair.ofPowers(first, second, ones).withEffort(Effort.DEFAULT.withTolerance(0.5));
        InvalidInputException e = assertThrows(InvalidInputException.class, () -> many.traceMinimum(1));
        assertTrue(
                e.getMessage().contains("columns that matter") && e.getMessage().contains("fewer copies"),
                e.getMessage());
    }

    @Test
    void theWorkIsSaidBefore() {
        SplittableRandom random = new SplittableRandom(45);
        PositivePair p = PositivePair.ofPowers(
                List.of(state(random), state(random)), List.of(state(random), state(random)), 9, 7);
        Work w = p.work(WideDouble.ONE, WideDouble.ONE);
        assertTrue(w.parts() > 1 && w.parts() <= 20 && w.largestRank() > 10 && w.bytes() > 0, () -> "" + w);
    }

    @Test
    void theEstimateAgrees() {
        SplittableRandom random = new SplittableRandom(43);
        PositivePair p = PositivePair.ofPowers(
                List.of(state(random), state(random)), List.of(state(random), state(random)), 9, 7);
        Enclosure f = p.traceMinimum(1.0);
        assertEquals(
                f.midpoint(),
                p.traceMinimumEstimate(WideDouble.ONE, WideDouble.ONE).value(),
                1e-11 * f.upper());
        assertEquals(1 << 16, p.dimension());
        assertTrue(p.firstTrace().contains(1.0));
    }

    @Test
    void refusesWhatItCannotTake() {
        DensityOperator q = DensityOperator.ofBloch(0, 0, 0.5);
        DensityOperator three = DensityOperator.maximallyMixed(3);
        assertThrows(InvalidInputException.class, () -> PositivePair.ofPowers(List.of(), List.of()));
        assertThrows(InvalidInputException.class, () -> PositivePair.ofPowers(List.of(q), List.of(q), 0));
        assertThrows(InvalidInputException.class, () -> PositivePair.ofPowers(List.of(q), List.of(q, q), 1));
        assertThrows(InvalidInputException.class, () -> PositivePair.ofPowers(List.of(three), List.of(three), 6));
        assertThrows(
                InvalidInputException.class, () -> PositivePair.ofPowers(List.of(q, q), List.of(q, q), 10_000, 10_000));
    }
}
