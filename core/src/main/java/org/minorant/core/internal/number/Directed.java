package org.minorant.core.internal.number;

/**
 * Directed rounding for double: each operation returns the largest double not above (down), or the smallest not below
 * (up), the exact result, or one further out where exactness cannot be decided cheaply (near underflow).
 *
 * <p>The error of a rounded sum is computed exactly (Knuth's two-sum) and that of a product, quotient or root by {@link
 * ProductError}, so exact results stay exact.
 */
public final class Directed {

    /** Products below this may have an inexact fused error term; they are always widened. */
    private static final double SAFE = 0x1p-960;

    private Directed() {}

    /** Lower end of a + b. */
    public static double addDown(double a, double b) {
        double s = a + b;
        if (Double.isInfinite(s)) {
            return s > 0 && !Double.isInfinite(a) && !Double.isInfinite(b) ? Double.MAX_VALUE : s;
        }
        return sumError(a, b, s) < 0 ? Math.nextDown(s) : s;
    }

    /** Upper end of a + b. */
    public static double addUp(double a, double b) {
        return -addDown(-a, -b);
    }

    /** Lower end of a · b. */
    public static double mulDown(double a, double b) {
        if (a == 0 || b == 0) {
            return 0.0;
        }
        double p = a * b;
        if (Double.isInfinite(p)) {
            return p > 0 && !Double.isInfinite(a) && !Double.isInfinite(b) ? Double.MAX_VALUE : p;
        }
        if (Math.abs(p) < SAFE) {
            return Math.nextDown(p);
        }
        return ProductError.of(a, b, p) < 0 ? Math.nextDown(p) : p;
    }

    /** Upper end of a · b. */
    public static double mulUp(double a, double b) {
        return -mulDown(-a, b);
    }

    /** Lower end of a / b, b not zero. */
    public static double divDown(double a, double b) {
        if (a == 0) {
            return 0.0;
        }
        double q = a / b;
        if (Double.isInfinite(q)) {
            return q > 0 && !Double.isInfinite(a) && b != 0 ? Double.MAX_VALUE : q;
        }
        if (Double.isInfinite(b)) {
            return Math.nextDown(q);
        }
        if (Math.abs(q) < SAFE || Math.abs(a) < SAFE) {
            return Math.nextDown(q);
        }
        double r = ProductError.remainder(a, q, b);
        return (b > 0 ? r : -r) < 0 ? Math.nextDown(q) : q;
    }

    /** Upper end of a / b, b not zero. */
    public static double divUp(double a, double b) {
        return -divDown(-a, b);
    }

    /** Lower end of the square root. */
    public static double sqrtDown(double a) {
        double r = Math.sqrt(a);
        if (r == 0 || Double.isInfinite(r)) {
            return r;
        }
        if (a < SAFE) {
            return Math.nextDown(r);
        }
        return ProductError.remainder(a, r, r) < 0 ? Math.nextDown(r) : r;
    }

    /** Upper end of the square root. */
    public static double sqrtUp(double a) {
        double r = Math.sqrt(a);
        if (r == 0 || Double.isInfinite(r)) {
            return r;
        }
        if (a < SAFE) {
            return Math.nextUp(r);
        }
        return ProductError.remainder(a, r, r) > 0 ? Math.nextUp(r) : r;
    }

    private static double sumError(double a, double b, double s) {
        double bb = s - a;
        return (a - (s - bb)) + (b - bb);
    }
}
