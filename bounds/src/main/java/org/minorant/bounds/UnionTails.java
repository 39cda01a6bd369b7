package org.minorant.bounds;

import java.util.Arrays;

/**
 * The joint types of a codeword with outputs of one type: their probabilities, and the probabilities T, from below and from above, that another codeword is at least as likely.
 *
 * @param probability of the types
 * @param low T from below, in [1, 2)
 * @param high T from above
 * @param exponent of two, for both
 */
record UnionTails(double[] probability, double[] low, double[] high, long[] exponent) {

    private static final int PLACES = 24;
    private static final double STEPS = 0x1p38;

    /** Uncertain neighbours among which ties are looked for one by one. */
    private static final int FEW = 256;

    /** Sums are moved to another exponent when they leave 2^±this. */
    private static final int ROOM = 300;

    private static final double TINY = 0x1p-900;

    /**
     * Adds up the types by falling metric.
     *
     * @param t the types
     * @param hasKeys whether keys say which metrics are equal
     * @param unsure a bound on the error of a metric
     * @param factors of the probabilities, of T, and e^(−D) of what T lacks, over the ratio of input to joint probability
     * @param exponents of two of these
     */
    static UnionTails of(TypeList t, boolean hasKeys, double unsure, double[] factors, long[] exponents) {
        int size = t.size;
        double most = Double.NEGATIVE_INFINITY;
        double least = Double.POSITIVE_INFINITY;
        for (int i = 0; i < size; i++) {
            most = Math.max(most, t.metric[i]);
            least = Math.min(least, t.metric[i]);
        }
        double steps = most > least ? (STEPS - 1) / (most - least) : 0;
        long[] order = new long[size];
        for (int i = 0; i < size; i++) {
            order[i] = (long) ((most - t.metric[i]) * steps) << PLACES | i;
        }
        Arrays.sort(order);
        // metrics further apart than this are surely in the right order
        long near = (long) Math.ceil(2 * unsure * steps) + 2;
        UnionTails tails = new UnionTails(new double[size], new double[size], new double[size], new long[size]);
        Sum sum = new Sum();
        for (int from = 0; from < size; ) {
            int to = from + 1;
            while (to < size && (order[to] >> PLACES) - (order[to - 1] >> PLACES) <= near) {
                to++;
            }
            tails.group(t, order, from, to, hasKeys, sum);
            from = to;
        }
        tails.scale(t, order, factors, exponents);
        return tails;
    }

    /** A sum of numbers of any size. */
    private static final class Sum {
        private double value;
        private long exponent;

        void room(long e) {
            if (value == 0) {
                exponent = e;
            } else if (e - exponent > ROOM || Math.getExponent(value) > ROOM) {
                long moved = Math.max(e, exponent + Math.getExponent(value));
                value = TypeList.scaled(value, exponent - moved);
                exponent = moved;
            }
        }

        double scaled(double v, long e) {
            return TypeList.scaled(v, e - exponent);
        }
    }

    /** Types of which the order is not sure, or which are equal. */
    private void group(TypeList t, long[] order, int from, int to, boolean hasKeys, Sum sum) {
        long largest = Long.MIN_VALUE;
        boolean equal = hasKeys;
        int first = place(order[from]);
        for (int i = from; i < to; i++) {
            int k = place(order[i]);
            largest = Math.max(largest, t.inputExponent[k]);
            equal &= t.key[k] == t.key[first];
        }
        sum.room(largest);
        double all = sum.value;
        for (int i = from; i < to; i++) {
            int k = place(order[i]);
            all += sum.scaled(t.input[k], t.inputExponent[k]);
        }
        for (int i = from; i < to; i++) {
            low[i] = equal || to - from == 1 ? all : sum.value + own(t, order, from, to, i, hasKeys, sum);
            high[i] = all;
            exponent[i] = sum.exponent;
        }
        sum.value = all;
    }

    /** The types of the group that are surely equal to one of them. */
    private static double own(TypeList t, long[] order, int from, int to, int i, boolean hasKeys, Sum sum) {
        int k = place(order[i]);
        double own = 0;
        boolean all = hasKeys && to - from <= FEW;
        for (int j = all ? from : i; j < (all ? to : i + 1); j++) {
            int l = place(order[j]);
            own += l == k || t.key[l] == t.key[k] ? sum.scaled(t.input[l], t.inputExponent[l]) : 0;
        }
        return own;
    }

    private void scale(TypeList t, long[] order, double[] factors, long[] exponents) {
        for (int i = 0; i < low.length; i++) {
            int k = place(order[i]);
            probability[i] = TypeList.scaled(factors[0] * t.joint[k], exponents[0] + t.jointExponent[k]);
            double missed = factors[2] * t.input[k] / t.joint[k];
            long shift = exponents[2] + t.inputExponent[k] - t.jointExponent[k] - exponent[i];
            double more = missed == 0
                    ? 0
                    : shift > 3 * ROOM ? Double.POSITIVE_INFINITY : Math.max(TINY, TypeList.scaled(missed, shift));
            int s = Math.getExponent(low[i]);
            double power = TypeList.powerOfTwo(-s);
            low[i] *= power * factors[1];
            high[i] = (high[i] + more) * power * factors[1];
            int over = Math.getExponent(low[i]);
            low[i] *= TypeList.powerOfTwo(-over);
            high[i] *= TypeList.powerOfTwo(-over);
            exponent[i] += exponents[1] + s + over;
        }
    }

    private static int place(long sorted) {
        return (int) (sorted & (1L << PLACES) - 1);
    }
}
