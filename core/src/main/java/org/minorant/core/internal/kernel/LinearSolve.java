package org.minorant.core.internal.kernel;

/** Gaussian elimination with partial pivoting on split complex rows. The result is not certified. */
public final class LinearSolve {

    private LinearSolve() {}

    /** Solves A X = B in place: B becomes X, A is destroyed. A singular A leaves non-finite numbers in X. */
    public static void solve(double[][] ar, double[][] ai, double[][] br, double[][] bi) {
        int n = ar.length;
        for (int p = 0; p < n; p++) {
            int best = p;
            for (int i = p + 1; i < n; i++) {
                if (Math.hypot(ar[i][p], ai[i][p]) > Math.hypot(ar[best][p], ai[best][p])) {
                    best = i;
                }
            }
            swap(ar, p, best);
            swap(ai, p, best);
            swap(br, p, best);
            swap(bi, p, best);
            for (int i = p + 1; i < n; i++) {
                double[] f = quotient(ar[i][p], ai[i][p], ar[p][p], ai[p][p]);
                if (f[0] != 0 || f[1] != 0) {
                    subtract(ar[i], ai[i], f[0], f[1], ar[p], ai[p]);
                    subtract(br[i], bi[i], f[0], f[1], br[p], bi[p]);
                }
            }
        }
        for (int p = n - 1; p >= 0; p--) {
            for (int j = 0; j < br[p].length; j++) {
                double[] v = quotient(br[p][j], bi[p][j], ar[p][p], ai[p][p]);
                br[p][j] = v[0];
                bi[p][j] = v[1];
            }
            for (int i = 0; i < p; i++) {
                subtract(br[i], bi[i], ar[i][p], ai[i][p], br[p], bi[p]);
            }
        }
    }

    private static void swap(double[][] a, int i, int j) {
        double[] t = a[i];
        a[i] = a[j];
        a[j] = t;
    }

    private static double[] quotient(double x, double y, double u, double v) {
        if (v == 0) {
            return new double[] {x / u, y / u};
        }
        double m = Math.hypot(u, v);
        double c = u / m;
        double s = v / m;
        return new double[] {(x * c + y * s) / m, (y * c - x * s) / m};
    }

    /** y −= (fr + i fi) x. */
    private static void subtract(double[] yr, double[] yi, double fr, double fi, double[] xr, double[] xi) {
        for (int j = 0; j < yr.length; j++) {
            yr[j] -= fr * xr[j] - fi * xi[j];
            yi[j] -= fr * xi[j] + fi * xr[j];
        }
    }
}
