package org.minorant.core;

import org.minorant.core.internal.number.DoubleDouble;
import org.minorant.core.internal.number.ProductError;

/**
 * Right-looking Cholesky factorisation in double-double on split rows, low words left unnormalised inside the loops. Trusted by nobody: {@link ScaledCholesky}
 * verifies what comes out.
 */
final class DdCholesky {

    private final int n;
    private final boolean real;
    /** Row i holds the entries up to the diagonal; columns that are done hold the factor. */
    private final double[][] rh;

    private final double[][] rl;
    private final double[][] ih;
    private final double[][] il;

    DdCholesky(EnclosedMatrix h) {
        n = h.rows();
        real = h.isReal();
        rh = new double[n][];
        rl = new double[n][];
        ih = new double[n][];
        il = new double[n][];
        for (int i = 0; i < n; i++) {
            rh[i] = new double[i + 1];
            rl[i] = new double[i + 1];
            ih[i] = new double[real ? 0 : i + 1];
            il[i] = new double[real ? 0 : i + 1];
            for (int j = 0; j <= i; j++) {
                rh[i][j] = h.re(i, j);
                rl[i][j] = h.reTail(i, j);
                if (!real) {
                    ih[i][j] = h.im(i, j);
                    il[i][j] = h.imTail(i, j);
                }
            }
        }
    }

    /** Factorises in place; false if a pivot is not positive. */
    boolean run() {
        double[][] c = new double[4][n];
        for (int k = 0; k < n; k++) {
            DoubleDouble pivot = DoubleDouble.sum(rh[k][k], rl[k][k]);
            if (!(pivot.hi() > 0)) {
                return false;
            }
            DoubleDouble root = pivot.sqrt();
            rh[k][k] = root.hi();
            rl[k][k] = root.lo();
            if (!real) {
                ih[k][k] = 0;
                il[k][k] = 0;
            }
            column(k, root, c);
            for (int i = k + 1; i < n; i++) {
                // h_ij −= l_ik conj(l_jk) for k < j ≤ i
                subtract(c[0][i], c[1][i], c[0], c[1], rh[i], rl[i], k + 1);
                if (!real) {
                    subtract(c[2][i], c[3][i], c[2], c[3], rh[i], rl[i], k + 1);
                    subtract(c[2][i], c[3][i], c[0], c[1], ih[i], il[i], k + 1);
                    subtract(-c[0][i], -c[1][i], c[2], c[3], ih[i], il[i], k + 1);
                }
            }
        }
        return true;
    }

    /** Divides column k below the diagonal by the root of the pivot, and copies it to a row of its own. */
    private void column(int k, DoubleDouble root, double[][] c) {
        for (int i = k + 1; i < n; i++) {
            DoubleDouble x = DoubleDouble.sum(rh[i][k], rl[i][k]).dividedBy(root);
            rh[i][k] = c[0][i] = x.hi();
            rl[i][k] = c[1][i] = x.lo();
            if (!real) {
                DoubleDouble y = DoubleDouble.sum(ih[i][k], il[i][k]).dividedBy(root);
                ih[i][k] = c[2][i] = y.hi();
                il[i][k] = c[3][i] = y.lo();
            }
        }
    }

    private static void subtract(double xh, double xl, double[] bh, double[] bl, double[] sh, double[] sl, int from) {
        if (xh == 0) {
            return;
        }
        for (int j = from; j < sh.length; j++) {
            double p = -xh * bh[j];
            double e = ProductError.of(-xh, bh[j], p) - (xh * bl[j] + xl * bh[j]);
            double s = sh[j] + p;
            double t = s - sh[j];
            sl[j] += ((sh[j] - (s - t)) + (p - t)) + e;
            sh[j] = s;
        }
    }

    /** The factor, as exact numbers: row i, times 2^shift[i], becomes row order[i]. */
    EnclosedMatrix factor(int[] shift, int[] order) {
        EnclosedMatrix.Builder b = EnclosedMatrix.builder(n, n);
        for (int i = 0; i < n; i++) {
            for (int j = 0; j <= i; j++) {
                int e = shift[i];
                b.set(
                        order[i],
                        j,
                        Math.scalb(rh[i][j], e),
                        Math.scalb(rl[i][j], e),
                        real ? 0 : Math.scalb(ih[i][j], e),
                        real ? 0 : Math.scalb(il[i][j], e),
                        0);
            }
        }
        return b.build();
    }
}
