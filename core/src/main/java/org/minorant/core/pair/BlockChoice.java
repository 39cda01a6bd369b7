package org.minorant.core.pair;

import java.util.Comparator;
import java.util.List;
import java.util.stream.IntStream;
import org.minorant.core.WideDouble;

/**
 * Which blocks of a sum are evaluated: those that together cannot add more than a budget are left out, the lightest first.
 *
 * <p>Planned with base-two logarithms in double. Their errors are below 1e-7 for up to 10^6 copies; what is left out is taken up by more than that.
 *
 * @param kept the numbers of the blocks to evaluate, rising
 * @param dropped an upper end of what the others add
 * @param share the base-two logarithm of a part of the budget for each block kept, twice: for what is cut of either operator
 */
record BlockChoice(List<Integer> kept, WideDouble dropped, double share) {

    private static final double LN2 = Math.log(2);

    /**
     * Chooses.
     *
     * @param log2Most log2 of the most that each block can add
     * @param log2Guess log2 of the size of the sum, as guessed
     * @param tolerance the relative width that truncation may cost; a quarter of it is spent
     */
    static BlockChoice of(double[] log2Most, double log2Guess, double tolerance) {
        double budget = log2Guess + Math.log(tolerance) / LN2 - 3;
        List<Integer> order = IntStream.range(0, log2Most.length)
                .boxed()
                .sorted(Comparator.comparingDouble(i -> log2Most[i]))
                .toList();
        WideDouble dropped = WideDouble.ZERO;
        WideDouble limit = upper(budget);
        int skipped = 0;
        while (skipped < log2Most.length) {
            WideDouble next = dropped.plusUp(upper(log2Most[order.get(skipped)]));
            if (next.compareTo(limit) > 0) {
                break;
            }
            dropped = next;
            skipped++;
        }
        double share = budget - 1 - Math.log(Math.max(1, log2Most.length - skipped)) / LN2;
        return new BlockChoice(
                order.subList(skipped, log2Most.length).stream().sorted().toList(), dropped, share);
    }

    /** An upper end of 2^x for a planned logarithm x. */
    static WideDouble upper(double x) {
        if (x == Double.NEGATIVE_INFINITY) {
            return WideDouble.ZERO;
        }
        double up = x + 1e-7 + Math.abs(x) * 1e-12;
        double whole = Math.floor(up);
        return WideDouble.of(Math.exp((up - whole) * LN2) * (1 + 1e-12), (long) whole);
    }
}
