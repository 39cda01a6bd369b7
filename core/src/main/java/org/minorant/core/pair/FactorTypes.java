package org.minorant.core.pair;

import java.util.Arrays;

/**
 * The types of n copies of one commuting pair within windows, by rising ln(Π a_i^k_i / Π b_i^k_i): for each Π a_i^k_i/k_i! and Π b_i^k_i/k_i!, significands in [1, 2) and exponents of two; and, if asked for, the sums of the
 * first over all types up to one, and of the second over all types from one on.
 */
final class FactorTypes {

    private static final int PLACES = 24;
    private static final int ROOM = 300;

    private final CommutingPowers.Factor factor;
    private final double[] slopes;
    private final int[] from;
    private final int[] to;

    int size;
    double[] ratio = new double[16];
    double[] a = new double[16];
    long[] ea = new long[16];
    double[] b = new double[16];
    long[] eb = new long[16];

    private FactorTypes(CommutingPowers.Factor factor, int[] from, int[] to) {
        this.factor = factor;
        this.from = from;
        this.to = to;
        this.slopes = new double[factor.letters()];
        Arrays.setAll(slopes, i -> factor.lnFirst()[i] - factor.lnSecond()[i]);
    }

    /** The types of n copies with counts in the windows. */
    static FactorTypes of(CommutingPowers.Factor factor, int n, int[] from, int[] to) {
        FactorTypes t = new FactorTypes(factor, from, to);
        t.descend(0, n, 0, 1, 0, 1, 0);
        t.sort();
        return t;
    }

    private void descend(int i, int left, double r, double x, long ex, double y, long ey) {
        boolean last = i == slopes.length - 1;
        int lo = last ? left : from[i];
        int hi = Math.min(left, to[i]);
        for (int k = lo; k <= hi; k++) {
            double u = x * factor.first()[i].significand[k];
            double v = y * factor.second()[i].significand[k];
            int su = Math.getExponent(u);
            int sv = Math.getExponent(v);
            u *= power(-su);
            v *= power(-sv);
            long eu = ex + factor.first()[i].exponent[k] + su;
            long ev = ey + factor.second()[i].exponent[k] + sv;
            if (!last) {
                descend(i + 1, left - k, r + k * slopes[i], u, eu, v, ev);
            } else if (k >= from[i]) {
                add(r + k * slopes[i], u, eu, v, ev);
            }
        }
    }

    private void add(double r, double x, long ex, double y, long ey) {
        if (size == ratio.length) {
            int capacity = 2 * size;
            ratio = Arrays.copyOf(ratio, capacity);
            a = Arrays.copyOf(a, capacity);
            ea = Arrays.copyOf(ea, capacity);
            b = Arrays.copyOf(b, capacity);
            eb = Arrays.copyOf(eb, capacity);
        }
        ratio[size] = r;
        a[size] = x;
        ea[size] = ex;
        b[size] = y;
        eb[size] = ey;
        size++;
    }

    /** 2^e for |e| &lt; 1022. */
    private static double power(int e) {
        return Double.longBitsToDouble((long) (e + 1023) << 52);
    }

    private void sort() {
        boolean rising = true;
        boolean falling = true;
        double least = Double.POSITIVE_INFINITY;
        double most = Double.NEGATIVE_INFINITY;
        for (int i = 0; i < size; i++) {
            least = Math.min(least, ratio[i]);
            most = Math.max(most, ratio[i]);
            rising &= i == 0 || ratio[i] >= ratio[i - 1];
            falling &= i == 0 || ratio[i] <= ratio[i - 1];
        }
        if (rising) {
            return;
        }
        int[] order = new int[size];
        if (falling) {
            Arrays.setAll(order, i -> size - 1 - i);
        } else {
            order = order(least, most);
        }
        ratio = taken(ratio, order);
        a = taken(a, order);
        b = taken(b, order);
        ea = taken(ea, order);
        eb = taken(eb, order);
    }

    /** By a coarse sort of whole numbers, put right by insertion. */
    private int[] order(double least, double most) {
        double steps = ((1L << 38) - 1) / (most - least);
        long[] keys = new long[size];
        Arrays.setAll(keys, i -> (long) ((ratio[i] - least) * steps) << PLACES | i);
        Arrays.sort(keys);
        int[] order = new int[size];
        for (int i = 0; i < size; i++) {
            int place = (int) (keys[i] & (1L << PLACES) - 1);
            int j = i;
            while (j > 0 && ratio[order[j - 1]] > ratio[place]) {
                order[j] = order[j - 1];
                j--;
            }
            order[j] = place;
        }
        return order;
    }

    private static double[] taken(double[] x, int[] order) {
        double[] y = new double[order.length];
        Arrays.setAll(y, i -> x[order[i]]);
        return y;
    }

    private static long[] taken(long[] x, int[] order) {
        long[] y = new long[order.length];
        Arrays.setAll(y, i -> x[order[i]]);
        return y;
    }

    /** How many types have a ratio of at most this, found by halving. */
    int upTo(double r) {
        int lo = 0;
        int hi = size;
        while (lo < hi) {
            int mid = (lo + hi) >>> 1;
            if (ratio[mid] <= r) {
                lo = mid + 1;
            } else {
                hi = mid;
            }
        }
        return lo;
    }

    /** Sums of a over the first types: entry c is that of the first c + 1. */
    void accumulate() {
        double v = 0;
        long e = 0;
        for (int i = 0; i < size; i++) {
            if (v == 0 || ea[i] - e > ROOM || v > 0x1p300) {
                int own = v == 0 ? 0 : Math.getExponent(v);
                long moved = v == 0 ? ea[i] : Math.max(ea[i], e + own);
                v = TypeBox.scaled(v, e - moved);
                e = moved;
            }
            v += TypeBox.scaled(a[i], ea[i] - e);
            a[i] = v;
            ea[i] = e;
        }
        v = 0;
        for (int i = size - 1; i >= 0; i--) {
            if (v == 0 || eb[i] - e > ROOM || v > 0x1p300) {
                int own = v == 0 ? 0 : Math.getExponent(v);
                long moved = v == 0 ? eb[i] : Math.max(eb[i], e + own);
                v = TypeBox.scaled(v, e - moved);
                e = moved;
            }
            v += TypeBox.scaled(b[i], eb[i] - e);
            b[i] = v;
            eb[i] = e;
        }
    }
}
