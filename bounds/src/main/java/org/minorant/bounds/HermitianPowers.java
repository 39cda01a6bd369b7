package org.minorant.bounds;

import org.minorant.core.HermitianOperator;
import org.minorant.core.Operator;
import org.minorant.core.SpectralDecomposition;

/** Powers of positive matrices in double, for searches: nothing here is certified. Eigenvalues that are not positive count as zero and stay so. */
final class HermitianPowers {

    private HermitianPowers() {}

    static SpectralDecomposition spectrum(Operator a) {
        return SpectralDecomposition.of(HermitianOperator.nearest(a).operator());
    }

    static Operator power(Operator a, double exponent) {
        Operator x = columns(spectrum(a), exponent / 2);
        return x.times(x.adjoint());
    }

    /** V Λ^exponent. */
    static Operator columns(SpectralDecomposition s, double exponent) {
        return scaled(s.vectors(), powers(s, exponent));
    }

    static double[] powers(SpectralDecomposition s, double exponent) {
        double[] e = s.eigenvalues();
        for (int i = 0; i < e.length; i++) {
            e[i] = e[i] > 0 ? Math.pow(e[i], exponent) : 0;
        }
        return e;
    }

    /** The columns of v, each times its factor. */
    static Operator scaled(Operator v, double[] factors) {
        int n = v.rows();
        int k = v.columns();
        double[] re = new double[n * k];
        double[] im = new double[v.isReal() ? 0 : n * k];
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < k; j++) {
                re[i * k + j] = v.re(i, j) * factors[j];
                if (im.length > 0) {
                    im[i * k + j] = v.im(i, j) * factors[j];
                }
            }
        }
        return Operator.ofRowMajor(n, k, re, im);
    }

    /** The trace of the product of two Hermitian matrices. */
    static double traceOfProduct(Operator a, Operator b) {
        double t = 0;
        for (int i = 0; i < a.rows(); i++) {
            for (int j = 0; j < a.rows(); j++) {
                t += a.re(i, j) * b.re(i, j) + a.im(i, j) * b.im(i, j);
            }
        }
        return t;
    }

    static double trace(Operator a) {
        double t = 0;
        for (int i = 0; i < a.rows(); i++) {
            t += a.re(i, i);
        }
        return t;
    }
}
