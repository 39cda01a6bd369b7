package org.minorant.core;

import org.minorant.core.internal.message.Checks;

/**
 * Enclosed norms of operators.
 *
 * <p>Singular values of a matrix A that is not Hermitian by type are the positive eigenvalues of the Hermitian matrix ((0, A), (A*, 0)), whose spectrum is ±σ and
 * zeros: its trace norm is twice that of A and its operator norm is that of A (Jordan and Wielandt; Horn and Johnson, Matrix Analysis, 2nd ed., 7.3.3).
 */
final class Norms {

    private Norms() {}

    static Enclosure trace(Operator a) {
        if (a instanceof HermitianOperator) {
            return sum(a);
        }
        return sum(dilation("Operator.traceNorm", a)).times(0.5);
    }

    private static Enclosure sum(Operator h) {
        if (Positivity.isDiagonal(h)) {
            Enclosure s = Enclosure.ZERO;
            for (int i = 0; i < h.rows(); i++) {
                s = s.plus(Enclosure.exact(Math.abs(h.re(i, i))));
            }
            return s;
        }
        CertifiedEigen e = CertifiedEigen.of(h);
        Enclosure s = Enclosure.ZERO;
        for (double v : e.values()) {
            s = s.plus(Enclosure.exact(Math.abs(v)));
        }
        return s.widen(e.traceError()).max(Enclosure.ZERO);
    }

    static Enclosure operator(Operator a) {
        Operator h = a instanceof HermitianOperator ? a : dilation("Operator.operatorNorm", a);
        if (Positivity.isDiagonal(h)) {
            double most = 0;
            for (int i = 0; i < h.rows(); i++) {
                most = Math.max(most, Math.abs(h.re(i, i)));
            }
            return Enclosure.exact(most);
        }
        CertifiedEigen e = CertifiedEigen.of(h);
        return Enclosure.exact(e.norm()).widen(e.traceError()).max(Enclosure.ZERO);
    }

    private static Operator dilation(String asked, Operator a) {
        long n = (long) a.rows() + a.columns();
        Checks.dimensions(asked, n, n);
        int d = (int) n;
        double[] re = new double[d * d];
        double[] im = new double[a.isReal() ? 0 : d * d];
        for (int i = 0; i < a.rows(); i++) {
            for (int j = 0; j < a.columns(); j++) {
                int above = i * d + a.rows() + j;
                int below = (a.rows() + j) * d + i;
                re[above] = a.re(i, j);
                re[below] = a.re(i, j);
                if (im.length != 0) {
                    im[above] = a.im(i, j);
                    im[below] = -a.im(i, j);
                }
            }
        }
        return new Operator(d, d, re, im);
    }

    /**
     * √Σ(re² + im²) of N parts, scaled to order one: positive terms, so the sum is within (N + 2) · 2^-53 of the exact one relatively, plus what underflowed, at
     * most N · 2^-1074 against a sum of at least one.
     */
    static Enclosure hilbertSchmidt(Operator a) {
        double[] re = a.realParts();
        double[] im = a.imaginaryParts();
        double most = 0;
        for (double v : re) {
            most = Math.max(most, Math.abs(v));
        }
        for (double v : im) {
            most = Math.max(most, Math.abs(v));
        }
        if (most == 0) {
            return Enclosure.ZERO;
        }
        int e = Math.getExponent(most);
        double s = squares(re, -e) + squares(im, -e);
        double slack = (re.length + im.length + 8.0) * 0x1p-52;
        Enclosure root = Enclosure.of(s * (1 - slack), s * (1 + slack)).sqrt();
        return Enclosure.of(
                root.lowerWide().timesPowerOfTwo(e), root.upperWide().timesPowerOfTwo(e));
    }

    private static double squares(double[] a, int e) {
        double s = 0;
        for (double v : a) {
            double x = Math.scalb(v, e);
            s += x * x;
        }
        return s;
    }
}
