package org.minorant.core;

/** Upper ends of norms of lists of non-negative numbers, safe where squares over- or underflow. */
final class FrobeniusBound {

    private FrobeniusBound() {}

    /** An error times a bound that may have overflowed: no error stays none. */
    static double times(double error, double bound) {
        return error == 0 || bound == 0 ? 0 : error * bound;
    }

    /** At least √Σv², for non-negative numbers; NaN or infinite if one of them is. */
    static double of(double[] values) {
        double most = 0;
        for (double v : values) {
            most = Math.max(most, v);
            if (Double.isNaN(v)) {
                return Double.NaN;
            }
        }
        if (!(most > 0) || most == Double.POSITIVE_INFINITY) {
            return most;
        }
        // dividing by a power of two is exact but for what lies 1e-300 below the largest
        int e = Math.getExponent(most);
        double s = 0;
        for (double v : values) {
            double r = Math.scalb(v, -e);
            s += r * r;
        }
        double root = Math.sqrt(s) * (1 + (values.length + 8.0) * 0x1p-52);
        return Math.scalb(root, e) + Double.MIN_VALUE;
    }

    /** At least the Frobenius norm of an operator. */
    static double of(Operator a) {
        double[] m = new double[a.rows() * a.columns()];
        for (int i = 0; i < a.rows(); i++) {
            for (int j = 0; j < a.columns(); j++) {
                // a hypotenuse is at most the larger times √2 and is within one unit in the last place
                m[i * a.columns() + j] = a.isReal() ? Math.abs(a.re(i, j)) : Math.hypot(a.re(i, j), a.im(i, j));
            }
        }
        return of(m) * (1 + 0x1p-51);
    }
}
