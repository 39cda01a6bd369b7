package org.minorant.core.internal.kernel;

/**
 * Upper ends of ‖AV − VΛ‖_F and ‖V*V − 1‖_F, rounding of their own computation included, without storing either matrix: result rows are
 * computed a few at a time and only their squares are kept.
 *
 * <p><b>Rounding.</b> A computed entry of a product is off by γ·Σ|a||b| (see {@link Products}), which in Frobenius norm is at most
 * γ‖A‖_F‖V‖_F, and γ‖V‖_F² for the Hermitian V*V, of which one triangle is computed. The product with Λ and the difference round once each:
 * 2u‖V‖_F max|Λ| and a relative 2u. A sum of 2n² squares is off by a relative 2n²u at most. Squares that underflow are covered by n·2^-500;
 * the matrices are of order one.
 */
public final class Defects {

    private static final double U = 0x1p-53;

    private Defects() {}

    /** Provides rows of a matrix, so that it need not be held by rows as a whole. */
    @FunctionalInterface
    public interface RowSource {

        /**
         * Copies a row.
         *
         * @param i index from 0
         * @param row where its entries go
         */
        void copy(int i, double[] row);
    }

    /**
     * Bounds ‖AV − VΛ‖_F.
     *
     * @param are rows of the real part of A, of order one
     * @param aim rows of its imaginary part; not asked for if V is real
     * @param vr real parts of V by rows
     * @param vi imaginary parts of V by rows; none if A and V are real
     * @param lambda the diagonal of Λ
     * @return an upper end
     */
    public static double residual(RowSource are, RowSource aim, double[][] vr, double[][] vi, double[] lambda) {
        int n = lambda.length;
        Products p = new Products(vr, vi, n);
        int tile = Products.tileRows();
        double[][] xr = new double[tile][n];
        double[][] xi = new double[tile][vi.length == 0 ? 0 : n];
        double sum = 0;
        double normA = 0;
        double most = 0;
        for (double l : lambda) {
            most = Math.max(most, Math.abs(l));
        }
        for (int i = 0; i < n; i += tile) {
            int count = Math.min(tile, n - i);
            for (int t = 0; t < count; t++) {
                are.copy(i + t, xr[t]);
                if (vi.length != 0) {
                    aim.copy(i + t, xi[t]);
                }
                normA += squares(xr[t]) + squares(xi[t]);
            }
            p.tile(xr, xi, count, n);
            for (int t = 0; t < count; t++) {
                sum += distance(p.re(t), vr[i + t], lambda);
                sum += vi.length == 0 ? 0 : distance(p.im(t), vi[i + t], lambda);
            }
        }
        double normV = norm(vr, vi);
        double rounding =
                (Products.gamma(n) * Math.sqrt(normA) + 2 * U * most) * normV + n * (Products.underflow(n) + 0x1p-500);
        return (Math.sqrt(sum) + rounding) * (1 + (4.0 * n * n + 16) * U);
    }

    /**
     * Bounds ‖V*V − 1‖_F.
     *
     * @param vr real parts of V by rows
     * @param vi imaginary parts of V by rows; none if real
     * @return an upper end
     */
    public static double orthonormality(double[][] vr, double[][] vi) {
        int n = vr.length;
        Products p = new Products(vr, vi, n);
        int tile = Products.tileRows();
        double[][] xr = new double[tile][n];
        double[][] xi = new double[tile][vi.length == 0 ? 0 : n];
        double sum = 0;
        for (int i = 0; i < n; i += tile) {
            int count = Math.min(tile, n - i);
            for (int k = 0; k < n; k++) {
                for (int t = 0; t < count; t++) {
                    xr[t][k] = vr[k][i + t];
                    if (vi.length != 0) {
                        xi[t][k] = -vi[k][i + t];
                    }
                }
            }
            p.tile(xr, xi, count, i + count);
            for (int t = 0; t < count; t++) {
                int r = i + t;
                double d = p.re(t)[r] - 1;
                sum += d * d + (vi.length == 0 ? 0 : p.im(t)[r] * p.im(t)[r]);
                sum += 2 * Rows.dot(p.re(t), p.re(t), r);
                sum += vi.length == 0 ? 0 : 2 * Rows.dot(p.im(t), p.im(t), r);
            }
        }
        double normV = norm(vr, vi);
        double rounding = Products.gamma(n) * normV * normV + n * (Products.underflow(n) + 0x1p-500);
        return (Math.sqrt(sum) + rounding) * (1 + (4.0 * n * n + 16) * U);
    }

    /** Σ (p_j − v_j λ_j)². */
    private static double distance(double[] p, double[] v, double[] lambda) {
        // in place: the row is not needed any more, and the loop is one the compiler vectorises
        for (int j = 0; j < p.length; j++) {
            p[j] -= v[j] * lambda[j];
        }
        return squares(p);
    }

    private static double squares(double[] a) {
        return Rows.dot(a, a, a.length);
    }

    private static double norm(double[][] re, double[][] im) {
        double s = 0;
        for (double[] row : re) {
            s += squares(row);
        }
        for (double[] row : im) {
            s += squares(row);
        }
        return Math.sqrt(s);
    }
}
