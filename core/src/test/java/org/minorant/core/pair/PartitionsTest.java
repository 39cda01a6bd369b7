package org.minorant.core.pair;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.math.BigInteger;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/** Counting: blocks times multiplicities fill the space of n copies, and patterns fill their block. */
class PartitionsTest {

    @ParameterizedTest
    @CsvSource({"1, 3", "5, 3", "24, 3", "10, 4", "7, 2", "6, 6", "3, 5"})
    void blocksFillTheSpace(int n, int d) {
        BigInteger sum = BigInteger.ZERO;
        for (int[] shape : Partitions.of(n, d)) {
            sum = sum.add(Partitions.multiplicity(shape).multiply(Partitions.dimension(shape)));
        }
        assertEquals(BigInteger.valueOf(d).pow(n), sum);
    }

    @Test
    void numbersOfPartitions() {
        // counted by hand: partitions of 6 into at most 3 parts, round((n + 3)²/12) in general
        assertEquals(7, Partitions.of(6, 3).size());
        assertEquals(61, Partitions.of(24, 3).size());
        assertEquals(1, Partitions.of(5, 1).size());
    }

    @Test
    void dimensionsAndMultiplicitiesOfSmallShapes() {
        // the adjoint representation of SU(3), the vector of SO(6) in SU(4); tableaux of (2, 1) and (3, 2) by hand
        assertEquals(BigInteger.valueOf(8), Partitions.dimension(new int[] {2, 1, 0}));
        assertEquals(BigInteger.valueOf(6), Partitions.dimension(new int[] {1, 1, 0, 0}));
        assertEquals(BigInteger.TWO, Partitions.multiplicity(new int[] {2, 1, 0}));
        assertEquals(BigInteger.valueOf(5), Partitions.multiplicity(new int[] {3, 2, 0}));
    }

    @ParameterizedTest
    @CsvSource({"9, 3", "6, 4", "4, 5"})
    void patternsFillTheirBlock(int n, int d) {
        double[] logs = new double[d];
        for (int[] shape : Partitions.of(n, d)) {
            PatternWindow w = new PatternWindow(shape, logs, Double.NEGATIVE_INFINITY, 100_000);
            assertEquals(Partitions.dimension(shape).intValue(), w.size());
        }
    }

    @Test
    void windowsHoldWhatIsLargeEnough() {
        int[] shape = {5, 3, 1};
        double[] logs = {0, -1.5, -2.25};
        PatternWindow all = new PatternWindow(shape, logs, Double.NEGATIVE_INFINITY, 1000);
        PatternWindow some = new PatternWindow(shape, logs, -9, 1000);
        int expected = 0;
        for (int i = 0; i < all.size(); i++) {
            int[] w = PatternWindow.weight(shape, all.pattern(i));
            assertEquals(9, w[0] + w[1] + w[2]);
            boolean large = -1.5 * w[1] - 2.25 * w[2] >= -9;
            assertEquals(large, some.find(all.pattern(i)) >= 0);
            expected += large ? 1 : 0;
        }
        assertEquals(expected, some.size());
        assertEquals(List.of(-1), List.of(some.find(new int[] {9, 9, 9})));
    }
}
