package org.minorant.core;

/** Makes matrices that are Hermitian up to rounding Hermitian exactly. */
final class HermitianPart {

    private HermitianPart() {}

    /** Keeps the lower triangle and copies its conjugates to the upper one; for results that are Hermitian up to their own rounding. */
    static HermitianOperator ofLowerTriangle(Operator a) {
        int n = a.rows();
        double[] re = a.realParts();
        double[] im = a.imaginaryParts();
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < i; j++) {
                re[j * n + i] = re[i * n + j];
                if (im.length != 0) {
                    im[j * n + i] = -im[i * n + j];
                }
            }
            if (im.length != 0) {
                im[i * n + i] = 0;
            }
        }
        return new HermitianOperator(n, re, im);
    }

    /** ½(A + A*), each entry rounded once; the nearest Hermitian matrix in every unitarily invariant norm (Fan and Hoffman 1955). */
    static HermitianOperator nearest(Operator a) {
        int n = a.rows();
        double[] re = new double[n * n];
        double[] im = new double[a.isReal() ? 0 : n * n];
        for (int i = 0; i < n; i++) {
            for (int j = 0; j <= i; j++) {
                // halved first: the sum cannot overflow
                double x = 0.5 * a.re(i, j) + 0.5 * a.re(j, i);
                re[i * n + j] = x;
                re[j * n + i] = x;
                if (im.length != 0) {
                    double y = 0.5 * a.im(i, j) - 0.5 * a.im(j, i);
                    im[i * n + j] = y;
                    im[j * n + i] = -y;
                }
            }
        }
        return new HermitianOperator(n, re, im);
    }
}
