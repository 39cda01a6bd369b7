package org.minorant.bounds;

/**
 * x^k/k! or k! for k = 0, 1, …, each as a significand in [1, 2) and an exponent of two, so that nothing under- or overflows.
 *
 * <p><b>Error.</b> Every entry comes from the one before with two roundings at most: 2k · 2^-53, relatively.
 */
final class TypeTable {

    private final double[] significand;
    private final int[] exponent;

    private TypeTable(int most) {
        significand = new double[most + 1];
        exponent = new int[most + 1];
    }

    /**
     * Tabulates x^k/k!.
     *
     * @param x a positive number
     * @param most the largest k
     */
    static TypeTable powers(double x, int most) {
        return of(most, x, true);
    }

    /**
     * Tabulates k!.
     *
     * @param most the largest k
     */
    static TypeTable factorials(int most) {
        return of(most, 1, false);
    }

    private static TypeTable of(int most, double x, boolean over) {
        TypeTable t = new TypeTable(most);
        // quotients of very small numbers would lose digits
        int shift = x < 0x1p-900 ? -1000 : 0;
        double scaled = Math.scalb(x, -shift);
        double v = 1;
        int e = 0;
        t.significand[0] = v;
        for (int k = 1; k <= most; k++) {
            v *= over ? scaled / k : k;
            int s = Math.getExponent(v);
            v = Math.scalb(v, -s);
            e += s + (over ? shift : 0);
            t.significand[k] = v;
            t.exponent[k] = e;
        }
        return t;
    }

    double significand(int k) {
        return significand[k];
    }

    int exponent(int k) {
        return exponent[k];
    }
}
