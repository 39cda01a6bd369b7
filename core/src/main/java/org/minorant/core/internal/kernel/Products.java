package org.minorant.core.internal.kernel;

/**
 * Complex matrix products on split, row-major arrays.
 *
 * <p>Rows are copied into arrays of their own and every inner loop runs over bare indices with at most four fused updates,
 * which is what the compiler turns into vector code; results do not depend on threads.
 */
public final class Products {

    private Products() {}

    /**
     * c = a · b for a rows × inner, b inner × columns. An empty imaginary array means real; cim must be empty only if both
     * are real.
     */
    public static void multiply(
            int rows,
            int inner,
            int columns,
            double[] are,
            double[] aim,
            double[] bre,
            double[] bim,
            double[] cre,
            double[] cim) {
        double[][] br = rows(bre, inner, columns);
        double[][] bi = bim.length == 0 ? new double[0][] : rows(bim, inner, columns);
        double[] sr = new double[columns];
        double[] si = new double[columns];
        for (int i = 0; i < rows; i++) {
            java.util.Arrays.fill(sr, 0);
            java.util.Arrays.fill(si, 0);
            for (int k = 0; k < inner; k++) {
                double x = are[i * inner + k];
                double y = aim.length == 0 ? 0.0 : aim[i * inner + k];
                if (bi.length == 0) {
                    addScaled(sr, x, br[k]);
                    if (y != 0) {
                        addScaled(si, y, br[k]);
                    }
                } else if (y == 0) {
                    addScaled(sr, x, br[k]);
                    addScaled(si, x, bi[k]);
                } else {
                    addComplex(sr, si, x, y, br[k], bi[k]);
                }
            }
            System.arraycopy(sr, 0, cre, i * columns, columns);
            if (cim.length != 0) {
                System.arraycopy(si, 0, cim, i * columns, columns);
            }
        }
    }

    private static double[][] rows(double[] a, int m, int n) {
        double[][] r = new double[m][];
        for (int i = 0; i < m; i++) {
            r[i] = java.util.Arrays.copyOfRange(a, i * n, (i + 1) * n);
        }
        return r;
    }

    /** c += x·b. */
    static void addScaled(double[] c, double x, double[] b) {
        for (int j = 0; j < c.length; j++) {
            c[j] += x * b[j];
        }
    }

    /** c += (x + iy)·b. */
    static void addComplex(double[] cr, double[] ci, double x, double y, double[] br, double[] bi) {
        for (int j = 0; j < cr.length; j++) {
            cr[j] += x * br[j] - y * bi[j];
            ci[j] += x * bi[j] + y * br[j];
        }
    }
}
