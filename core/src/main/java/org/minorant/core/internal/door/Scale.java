package org.minorant.core.internal.door;

/**
 * The power of two that brings the largest entry of a matrix to order one. Entries more than 2^1000 below the largest may lose digits; what
 * they lose is below 2^-1070 of it.
 *
 * @param n the dimension
 * @param shift scaled = entry · 2^shift
 */
record Scale(int n, int shift) {

    /** Checks shapes and finiteness, and finds the scale. */
    static Scale of(int n, double[] are, double[] aim) {
        if (n < 1 || are.length != n * n || (aim.length != 0 && aim.length != n * n)) {
            throw new IllegalArgumentException("a matrix of dimension " + n + " has " + n + " x " + n
                    + " entries; given were " + are.length + " real and " + aim.length + " imaginary parts");
        }
        double largest = Math.max(largest(are), largest(aim));
        if (largest == 0) {
            return new Scale(n, 0);
        }
        // subnormal numbers all have the same stored exponent
        return new Scale(
                n, largest < Double.MIN_NORMAL ? 60 - Math.getExponent(largest * 0x1p60) : -Math.getExponent(largest));
    }

    private static double largest(double[] a) {
        double m = 0;
        // zero times a number that is not finite is NaN, which sticks
        double check = 0;
        for (double v : a) {
            m = Math.max(m, Math.abs(v));
            check += 0 * v;
        }
        if (!(check == 0)) {
            throw new IllegalArgumentException("entries must be finite and are not");
        }
        return m;
    }

    /** The scaled matrix by rows. */
    double[][] rows(double[] a) {
        double[][] r = new double[n][];
        for (int i = 0; i < n; i++) {
            r[i] = new double[n];
            copyRow(a, i, r[i]);
        }
        return r;
    }

    /** Copies row i, scaled. */
    void copyRow(double[] a, int i, double[] row) {
        System.arraycopy(a, i * n, row, 0, n);
        // two factors, as 2^shift itself may be out of range
        double f = Math.scalb(1.0, shift / 2);
        double g = Math.scalb(1.0, shift - shift / 2);
        for (int j = 0; j < n; j++) {
            row[j] = row[j] * f * g;
        }
    }

    /** values · 2^-shift, in place. */
    double[] unscale(double[] values) {
        for (int i = 0; i < values.length; i++) {
            values[i] = Math.scalb(values[i], -shift);
            if (Double.isInfinite(values[i])) {
                throw new ArithmeticException(
                        "an eigenvalue exceeds the largest double; divide the matrix by its dimension first");
            }
        }
        return values;
    }

    /** values · 2^shift. */
    double[] scaled(double[] values) {
        double[] s = values.clone();
        for (int i = 0; i < s.length; i++) {
            s[i] = Math.scalb(s[i], shift);
        }
        return s;
    }

    /** An upper end of bound · 2^-shift. */
    double unscaleUp(double bound) {
        return Math.scalb(bound * (1 + 0x1p-50), -shift) + 0x1p-1070;
    }
}
