package org.minorant.bounds;

/**
 * One Newton step of the interior-point method: with K minus the Hessian of the mutual information and g its divergences,
 *
 * <pre>(K + Z/P) Δp = g + μ/p − c 1,   1ᵀΔp = 0,   Δz = μ/p − z − (z/p) Δp,</pre>
 *
 * after the multiplier c of the sum is eliminated.
 *
 * @param dp Δp
 * @param dz Δz
 */
record InteriorStep(double[] dp, double[] dz) {

    /** Part of the way to the boundary that a step may go. */
    private static final double STAY_INSIDE = 0.995;

    static InteriorStep of(Slope s, double[] p, double[] z, double mu) {
        int k = p.length;
        // scaled by √p on both sides, so that its diagonal is of the order of z + p K
        double[][] a = new double[k][k];
        double[] root = new double[k];
        for (int x = 0; x < k; x++) {
            root[x] = Math.sqrt(p[x]);
        }
        double[] right = new double[k];
        double[] ones = new double[k];
        for (int x = 0; x < k; x++) {
            for (int y = 0; y < k; y++) {
                a[x][y] = root[x] * s.curvature()[x][y] * root[y] + (x == y ? z[x] : 0);
            }
            right[x] = root[x] * (s.divergences()[x] + mu / p[x]);
            ones[x] = root[x];
        }
        factor(a);
        double[] u = solved(a, right);
        double[] v = solved(a, ones);
        double su = 0;
        double sv = 0;
        for (int x = 0; x < k; x++) {
            su += root[x] * u[x];
            sv += root[x] * v[x];
        }
        double c = su / sv;
        double[] dp = new double[k];
        double[] dz = new double[k];
        for (int x = 0; x < k; x++) {
            dp[x] = root[x] * (u[x] - c * v[x]);
            dz[x] = (mu - z[x] * dp[x]) / p[x] - z[x];
        }
        return new InteriorStep(dp, dz);
    }

    /** The longest step, at most 1, that keeps a positive vector positive. */
    double longest(double[] at, double[] along) {
        double t = 1;
        for (int x = 0; x < at.length; x++) {
            if (along[x] < 0) {
                t = Math.min(t, -STAY_INSIDE * at[x] / along[x]);
            }
        }
        return t;
    }

    /** Cholesky in place, lower triangle; a pivot lost to rounding is replaced by a small one. */
    private static void factor(double[][] a) {
        for (int i = 0; i < a.length; i++) {
            double size = a[i][i];
            for (int j = 0; j <= i; j++) {
                double v = a[i][j];
                for (int m = 0; m < j; m++) {
                    v -= a[i][m] * a[j][m];
                }
                a[i][j] = j < i ? v / a[j][j] : Math.sqrt(Math.max(v, size * 1e-16 + Double.MIN_NORMAL));
            }
        }
    }

    private static double[] solved(double[][] l, double[] b) {
        int k = b.length;
        double[] x = b.clone();
        for (int i = 0; i < k; i++) {
            for (int j = 0; j < i; j++) {
                x[i] -= l[i][j] * x[j];
            }
            x[i] /= l[i][i];
        }
        for (int i = k - 1; i >= 0; i--) {
            for (int j = i + 1; j < k; j++) {
                x[i] -= l[j][i] * x[j];
            }
            x[i] /= l[i][i];
        }
        return x;
    }
}
