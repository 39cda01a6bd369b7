package org.minorant.core.pair;

import org.minorant.core.InvalidInputException;

/** Sizes that grow with the number of copies. */
final class CopyCount {

    private CopyCount() {}

    /** Copies of copies. */
    static int times(int n, int k) {
        long product = (long) n * k;
        if (product > Integer.MAX_VALUE) {
            throw new InvalidInputException(
                    "PositivePair.copies", k + " copies of " + n + " copies", "fewer than 2^31 in all", "take fewer");
        }
        return (int) product;
    }

    /** Copies beside others. */
    static int plus(int n, int k) {
        long sum = (long) n + k;
        if (sum > Integer.MAX_VALUE) {
            throw new InvalidInputException(
                    "PositivePair.copies", k + " copies beside " + n, "fewer than 2^31 in all", "take fewer");
        }
        return (int) sum;
    }

    /** d^n, or the largest int if that is smaller. */
    static int dimension(int d, int n) {
        long p = 1;
        for (int i = 0; i < n && p < Integer.MAX_VALUE && d > 1; i++) {
            p *= d;
        }
        return (int) Math.min(p, Integer.MAX_VALUE);
    }
}
