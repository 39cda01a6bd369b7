package org.minorant.core.internal.kernel;

/**
 * Eigenvalues and vectors of a real symmetric tridiagonal matrix by the implicit QL iteration (Wilkinson's shift).
 *
 * <p>The rotations of one sweep act on neighbouring columns of the vectors; these are held as rows, so that each rotation is a
 * vectorised loop. An off-diagonal entry is dropped once it is below a unit in the last place of its neighbours, or 2^-70 of a matrix of
 * order one. Strongly graded matrices can turn noise far below 2^-53 about without end: where a value has not converged after 120 sweeps, entries below 2^-53 are dropped, which is the error of the iteration anyway.
 *
 * <p>Source: Bowdler, Martin, Reinsch and Wilkinson, Numer. Math. 11, 293 (1968), from memory.
 */
final class TridiagonalQl {

    private static final double EPS = 0x1p-53;
    private static final double NOTHING = 0x1p-70;
    private static final int PATIENT_SWEEPS = 60;
    private static final int MOST_SWEEPS = 2 * PATIENT_SWEEPS;

    private final double[] d;
    private final double[] e;
    private final double[][] z;
    private final double[] cosines;
    private final double[] sines;

    private TridiagonalQl(double[] d, double[] e, double[][] z) {
        this.d = d;
        this.e = e;
        this.z = z;
        cosines = new double[d.length];
        sines = new double[d.length];
    }

    /**
     * Diagonalises a matrix of order one.
     *
     * @param d the diagonal; becomes the eigenvalues, in no order
     * @param e the subdiagonal, as long as d, its last entry unused; destroyed
     * @param z the transposed vectors so far, one row each (the identity for vectors of the matrix itself); becomes those of the
     *     eigenvalues; no rows if only values are wanted
     * @throws ArithmeticException if an eigenvalue has not converged after 120 sweeps
     */
    static void diagonalise(double[] d, double[] e, double[][] z) {
        TridiagonalQl q = new TridiagonalQl(d, e, z);
        for (int l = 0; l < d.length; l++) {
            int sweeps = 0;
            for (int m = q.end(l, NOTHING); m != l; m = q.end(l, sweeps < PATIENT_SWEEPS ? NOTHING : EPS)) {
                if (++sweeps > MOST_SWEEPS) {
                    throw new ArithmeticException("the eigenvalue iteration did not converge at dimension " + d.length
                            + ": value " + l + " after " + MOST_SWEEPS + " sweeps");
                }
                q.sweep(l, m);
            }
        }
    }

    /** The end of the unreduced block that starts at l. */
    private int end(int l, double nothing) {
        int m = l;
        while (m < d.length - 1) {
            double small = Math.max(EPS * (Math.abs(d[m]) + Math.abs(d[m + 1])), nothing);
            // a NaN must not end the search as if it were small
            if (Math.abs(e[m]) <= small) {
                break;
            }
            m++;
        }
        return m;
    }

    private void sweep(int l, int m) {
        double g = (d[l + 1] - d[l]) / (2 * e[l]);
        double r = Math.sqrt(g * g + 1);
        g = d[m] - d[l] + e[l] / (g + (g >= 0 ? r : -r));
        double s = 1;
        double c = 1;
        double p = 0;
        int i = m - 1;
        for (; i >= l; i--) {
            double f = s * e[i];
            double b = c * e[i];
            r = length(f, g);
            e[i + 1] = r;
            if (r == 0) {
                d[i + 1] -= p;
                e[m] = 0;
                break;
            }
            s = f / r;
            c = g / r;
            g = d[i + 1] - p;
            r = (d[i] - g) * s + 2 * c * b;
            p = s * r;
            d[i + 1] = g + p;
            g = c * r - b;
            cosines[i] = c;
            sines[i] = s;
        }
        if (i < l) {
            d[l] -= p;
            e[l] = g;
            e[m] = 0;
        }
        if (z.length != 0) {
            for (int k = m - 1; k > i; k--) {
                Rows.rotate(z[k], z[k + 1], cosines[k], sines[k]);
            }
        }
    }

    private static double length(double x, double y) {
        double r = Math.sqrt(x * x + y * y);
        return r > 1e-140 && r < 1e140 ? r : Math.hypot(x, y);
    }
}
