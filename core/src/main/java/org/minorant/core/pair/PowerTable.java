package org.minorant.core.pair;

import org.minorant.core.internal.number.WideDoubleDouble;

/**
 * x^k or x^k/k! for a range of k, each as a significand in [1, 2) and an exponent of two.
 *
 * <p><b>Error.</b> The first entry has at most 3k roundings of double-double behind it (power and factorial), every further one two more: below 5k · 2^-102. Rounding to double adds 2^-53.
 */
final class PowerTable {

    /** The table of a letter that does not occur. */
    static final PowerTable NOTHING = powers(WideDoubleDouble.ONE, 0, 0);

    /** The first k. */
    final int from;

    final double[] significand;
    final long[] exponent;

    private PowerTable(int from, int to) {
        this.from = from;
        this.significand = new double[to - from + 1];
        this.exponent = new long[to - from + 1];
    }

    /** x^k for from ≤ k ≤ to. */
    static PowerTable powers(WideDoubleDouble x, int from, int to) {
        PowerTable t = new PowerTable(from, to);
        WideDoubleDouble e = x.power(from);
        for (int k = from; k <= to; k++) {
            t.set(k, e);
            e = e.times(x);
        }
        return t;
    }

    /** x^k/k! for from ≤ k ≤ to. */
    static PowerTable scaledPowers(WideDoubleDouble x, int from, int to) {
        PowerTable t = new PowerTable(from, to);
        WideDoubleDouble p = x.power(from);
        WideDoubleDouble f = Factorials.of(from);
        WideDoubleDouble e =
                WideDoubleDouble.of(p.significand().dividedBy(f.significand()), p.exponent() - f.exponent());
        for (int k = from; k <= to; k++) {
            t.set(k, e);
            e = e.times(x).dividedBy(k + 1.0);
        }
        return t;
    }

    private void set(int k, WideDoubleDouble e) {
        significand[k - from] = e.significand().hi();
        exponent[k - from] = e.exponent();
    }
}
