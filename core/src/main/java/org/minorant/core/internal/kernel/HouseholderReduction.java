package org.minorant.core.internal.kernel;

/**
 * Reduces a Hermitian matrix to a real symmetric tridiagonal one: A = Q T Q*, Q = H_{n−1} ··· H_1 with H_m = 1 − τ_m v_m v_m*.
 *
 * <p>Reflector m annihilates row m to the left of its subdiagonal entry; τ is complex, chosen so that this entry becomes real, and no
 * phases are left over. The rank-two update of one step and the matrix–vector product of the next go through the matrix in one pass.
 * Full storage: both triangles are kept, so that all loops run along rows.
 *
 * <p>Sources: Golub and Van Loan, Matrix Computations, 4th ed., 8.3.1; the choice of τ is that of LAPACK working note 72 (both from
 * memory).
 */
final class HouseholderReduction {

    /** Rows below this, of a matrix of order one, count as zero: their squares are near underflow. */
    private static final double NOTHING = 1e-140;

    private final int n;
    /** The matrix, row by row; afterwards row m holds v_m in its columns below m. */
    private final double[][] re;

    private final double[][] im;

    private final double[] tauRe;
    private final double[] tauIm;
    private final double[] diagonal;
    private final double[] off;

    private HouseholderReduction(double[][] re, double[][] im) {
        this.n = re.length;
        this.re = re;
        this.im = im;
        tauRe = new double[n];
        tauIm = new double[n];
        diagonal = new double[n];
        off = new double[n];
    }

    /** Reduces a matrix of order one given by its rows, which are overwritten; no imaginary rows mean a real matrix. */
    static HouseholderReduction of(double[][] re, double[][] im) {
        HouseholderReduction h = new HouseholderReduction(re, im);
        h.reduce();
        return h;
    }

    /** The diagonal of T. */
    double[] diagonal() {
        return diagonal;
    }

    /** The subdiagonal of T: entry i couples i and i + 1; the last entry is zero. */
    double[] offDiagonal() {
        return off;
    }

    private void reduce() {
        boolean complex = im.length != 0;
        double[] wr = new double[n];
        double[] wi = new double[n];
        double[] vr = new double[n];
        double[] vi = new double[n];
        double[] yr = new double[n];
        double[] yi = new double[n];
        for (int m = n - 1; m >= 0; m--) {
            // vr and wr hold the last step's update; the row it still owes comes first, as it makes the next reflector
            updateRow(m, m + 1, vr, vi, wr, wi);
            diagonal[m] = re[m][m];
            if (m == 0) {
                break;
            }
            reflector(m);
            java.util.Arrays.fill(yr, 0);
            java.util.Arrays.fill(yi, 0);
            for (int i = 0; i < m; i += 2) {
                updateRow(i, m, vr, vi, wr, wi);
                if (i + 1 < m) {
                    updateRow(i + 1, m, vr, vi, wr, wi);
                    addTwoRows(m, i, yr, yi, complex);
                } else {
                    addOneRow(m, i, yr, yi, complex);
                }
            }
            System.arraycopy(re[m], 0, vr, 0, m);
            if (complex) {
                System.arraycopy(im[m], 0, vi, 0, m);
            }
            updateVector(m, yr, yi, vr, vi, wr, wi);
        }
    }

    /** Row i −= v_i w* + w_i v*, on the columns below to. */
    private void updateRow(int i, int to, double[] vr, double[] vi, double[] wr, double[] wi) {
        if (im.length == 0) {
            Rows.add2(re[i], -vr[i], -wr[i], wr, vr, 0, to);
        } else {
            Rows.add4(re[i], -vr[i], -vi[i], -wr[i], -wi[i], wr, wi, vr, vi, 0, to);
            Rows.add4(im[i], -vi[i], vr[i], -wi[i], wr[i], wr, wi, vr, vi, 0, to);
        }
    }

    /** y += v_i · conj(row i) + v_k · conj(row k), k = i + 1: columns of a Hermitian matrix are its conjugated rows. */
    private void addTwoRows(int m, int i, double[] yr, double[] yi, boolean complex) {
        double[] v = re[m];
        int k = i + 1;
        if (!complex) {
            Rows.add2(yr, v[i], v[k], re[i], re[k], 0, m);
            return;
        }
        double[] u = im[m];
        Rows.add4(yr, v[i], u[i], v[k], u[k], re[i], im[i], re[k], im[k], 0, m);
        Rows.add4(yi, u[i], -v[i], u[k], -v[k], re[i], im[i], re[k], im[k], 0, m);
    }

    private void addOneRow(int m, int i, double[] yr, double[] yi, boolean complex) {
        if (complex) {
            Rows.add2(yr, re[m][i], im[m][i], re[i], im[i], 0, m);
            Rows.add2(yi, im[m][i], -re[m][i], re[i], im[i], 0, m);
        } else {
            Rows.add2(yr, re[m][i], 0, re[i], re[i], 0, m);
        }
    }

    /** Turns row m into the reflector v (last entry one) that maps the conjugated row to a real multiple of the last unit vector. */
    private void reflector(int m) {
        double[] x = re[m];
        double[] y = im.length == 0 ? new double[0] : im[m];
        double alphaRe = x[m - 1];
        double alphaIm = y.length == 0 ? 0 : -y[m - 1];
        double rest = Rows.dot(x, x, m - 1) + (y.length == 0 ? 0 : Rows.dot(y, y, m - 1));
        double norm = Math.sqrt(rest + alphaRe * alphaRe + alphaIm * alphaIm);
        boolean nothing = norm < NOTHING;
        if (nothing || (rest == 0 && alphaIm == 0)) {
            off[m - 1] = nothing ? 0 : alphaRe;
            java.util.Arrays.fill(x, 0, m, 0);
            if (y.length != 0) {
                java.util.Arrays.fill(y, 0, m, 0);
            }
            return;
        }
        double beta = alphaRe >= 0 ? -norm : norm;
        tauRe[m] = (beta - alphaRe) / beta;
        tauIm[m] = -alphaIm / beta;
        double dr = alphaRe - beta;
        double d2 = dr * dr + alphaIm * alphaIm;
        double sr = dr / d2;
        double si = -alphaIm / d2;
        for (int j = 0; j < m - 1; j++) {
            double p = x[j];
            double q = y.length == 0 ? 0 : -y[j];
            x[j] = p * sr - q * si;
            if (y.length != 0) {
                y[j] = p * si + q * sr;
            }
        }
        x[m - 1] = 1;
        if (y.length != 0) {
            y[m - 1] = 0;
        }
        off[m - 1] = beta;
    }

    /** w = τy − ½|τ|²(v*y) v, for y = Av. */
    private void updateVector(int m, double[] yr, double[] yi, double[] vr, double[] vi, double[] wr, double[] wi) {
        double tr = tauRe[m];
        double ti = tauIm[m];
        // v*Av is real
        double inner = Rows.dot(vr, yr, m) + Rows.dot(vi, yi, m);
        double a = -0.5 * (tr * tr + ti * ti) * inner;
        for (int j = 0; j < m; j++) {
            wr[j] = (tr * yr[j] - ti * yi[j]) + a * vr[j];
            wi[j] = (tr * yi[j] + ti * yr[j]) + a * vi[j];
        }
    }

    /** The reflectors, to be applied to the vectors of T; this object must not be used afterwards. */
    Reflectors reflectors() {
        return new Reflectors(re, im, tauRe, tauIm);
    }
}
