package org.minorant.core.internal.kernel;

/**
 * The product Q = H_{n−1} ··· H_1 of reflectors H_m = 1 − τ_m v_m v_m*, applied to a matrix in groups: a group is 1 − V T V* with a lower
 * triangular T, so that it costs two narrow matrix products (Schreiber and Van Loan, SIAM J. Sci. Stat. Comput. 10, 53, 1989, from memory).
 */
final class Reflectors {

    private static final int GROUP = 8;
    /** Columns worked on at a time: what a group needs of them fits the first-level cache. */
    private static final int BLOCK = 128;

    private static final double[] NONE = new double[0];

    private final double[][] re;
    private final double[][] im;
    private final double[] tauRe;
    private final double[] tauIm;
    private final boolean complex;
    private final int n;

    /** Row m of (re, im) holds v_m in its columns below m; no imaginary rows mean real reflectors. */
    Reflectors(double[][] re, double[][] im, double[] tauRe, double[] tauIm) {
        this.re = re;
        this.im = im;
        this.tauRe = tauRe;
        this.tauIm = tauIm;
        this.complex = im.length != 0;
        this.n = re.length;
    }

    /** (xr, xi) becomes Q (xr, xi), given by rows. */
    void applyTo(double[][] xr, double[][] xi) {
        double[][] sr = new double[GROUP][n];
        double[][] si = complex ? new double[GROUP][n] : new double[0][];
        double[][] pr = new double[GROUP][n];
        double[][] pi = complex ? new double[GROUP][n] : new double[0][];
        double[] coefficients = new double[n];
        double[] cr = new double[GROUP];
        double[] ci = complex ? new double[GROUP] : NONE;
        for (int first = 1; first < n; first += GROUP) {
            int count = Math.min(GROUP, n - first);
            int rows = first + count - 1;
            for (int a = 0; a < count; a++) {
                java.util.Arrays.fill(re[first + a], first + a, n, 0);
                java.util.Arrays.fill(pr[a], 0);
                if (complex) {
                    java.util.Arrays.fill(im[first + a], first + a, n, 0);
                    java.util.Arrays.fill(pi[a], 0);
                }
            }
            for (int from = 0; from < n; from += BLOCK) {
                int end = Math.min(n, from + BLOCK);
                project(first, count, rows, xr, xi, pr, pi, coefficients, from, end);
                triangle(first, count, pr, pi, sr, si, from, end);
                for (int i = 0; i < rows; i++) {
                    for (int a = 0; a < count; a++) {
                        cr[a] = -re[first + a][i];
                        if (complex) {
                            ci[a] = -im[first + a][i];
                        }
                    }
                    Rows.addProduct(xr[i], complex ? xi[i] : NONE, cr, ci, sr, si, 0, count, from, end);
                }
            }
        }
    }

    /** p = V* x. */
    private void project(
            int first,
            int count,
            int rows,
            double[][] xr,
            double[][] xi,
            double[][] pr,
            double[][] pi,
            double[] conjugate,
            int from,
            int end) {
        for (int i = 0; i < rows; i += 4) {
            int to = Math.min(rows, i + 4);
            for (int a = 0; a < count; a++) {
                if (complex) {
                    for (int k = i; k < to; k++) {
                        conjugate[k] = -im[first + a][k];
                    }
                }
                Rows.addProduct(
                        pr[a],
                        complex ? pi[a] : NONE,
                        re[first + a],
                        complex ? conjugate : NONE,
                        xr,
                        complex ? xi : new double[0][],
                        i,
                        to,
                        from,
                        end);
            }
        }
    }

    /** s = T p, row by row: s_a = τ_a (p_a − Σ_{b<a} (v_a* v_b) s_b). */
    private void triangle(
            int first, int count, double[][] pr, double[][] pi, double[][] sr, double[][] si, int from, int end) {
        double[] gr = new double[GROUP];
        double[] gi = complex ? new double[GROUP] : NONE;
        for (int a = 0; a < count; a++) {
            int m = first + a;
            for (int b = 0; b < a; b++) {
                int k = first + b;
                gr[b] = -(Rows.dot(re[m], re[k], k) + (complex ? Rows.dot(im[m], im[k], k) : 0));
                if (complex) {
                    gi[b] = -(Rows.dot(re[m], im[k], k) - Rows.dot(im[m], re[k], k));
                }
            }
            Rows.addProduct(pr[a], complex ? pi[a] : NONE, gr, gi, sr, si, 0, a, from, end);
            for (int j = from; j < end; j++) {
                sr[a][j] = tauRe[m] * pr[a][j];
            }
            if (complex) {
                for (int j = from; j < end; j++) {
                    sr[a][j] -= tauIm[m] * pi[a][j];
                    si[a][j] = tauRe[m] * pi[a][j] + tauIm[m] * pr[a][j];
                }
            }
        }
    }
}
