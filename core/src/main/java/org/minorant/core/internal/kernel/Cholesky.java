package org.minorant.core.internal.kernel;

/** Tries a Cholesky factorisation A = U*U in double, one row of U at a time. */
public final class Cholesky {

    private static final double[] NONE = new double[0];

    private Cholesky() {}

    /**
     * Tells whether the factorisation of A − shift·1 runs to completion with positive pivots.
     *
     * @param re real parts by rows, of which the upper triangle is read; overwritten
     * @param im imaginary parts by rows; overwritten; no rows for a real matrix
     * @param shift what is subtracted from each pivot
     * @return whether every pivot was positive
     */
    public static boolean completes(double[][] re, double[][] im, double shift) {
        int n = re.length;
        boolean complex = im.length != 0;
        double[] xr = new double[n];
        double[] xi = complex ? new double[n] : NONE;
        for (int i = 0; i < n; i++) {
            // the column of U above the diagonal, conjugated and negated
            for (int k = 0; k < i; k++) {
                xr[k] = -re[k][i];
                if (complex) {
                    xi[k] = im[k][i];
                }
            }
            Rows.addProduct(re[i], complex ? im[i] : NONE, xr, xi, re, im, 0, i, i, n);
            double pivot = re[i][i] - shift;
            // written so that NaN fails
            if (!(pivot > 0)) {
                return false;
            }
            double root = Math.sqrt(pivot);
            for (int j = i + 1; j < n; j++) {
                re[i][j] /= root;
            }
            for (int j = i + 1; complex && j < n; j++) {
                im[i][j] /= root;
            }
        }
        return true;
    }
}
