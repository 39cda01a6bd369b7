package org.minorant.core.pair;

import org.minorant.core.EnclosedMatrix;
import org.minorant.core.internal.kernel.Rotations;

/**
 * Finds, in double, the transformation that turns columns X of A and Y of B into orthogonal columns without changing A − B: ordinary
 * rotations within each operator, hyperbolic ones across. What it finds is not trusted; {@link RotationCertificate} verifies it.
 *
 * <p>For x from A and y from B, a = ‖x‖², b = ‖y‖², h = x*y, the step x' = cx + sy, y' = s̄x + cy with
 *
 * <pre>s = −2c h̄/S,  S = a + b + r,  r² = (a−b)² + 4(ab − |h|²),  c² = S/2r</pre>
 *
 * makes x'*y' = 0 and lowers both traces by 2|h|²/S. Columns are held explicitly and their inner products are carried along: the columns
 * alone have a floor near 1e-32 of the traces, the inner products alone lose near-dependent columns.
 *
 * <p>Inner products across are held in units of 2^e, so that an answer of 1e-300 of the traces takes part with all its digits; their squares
 * meet same-type ones through the factor q = 2^2e, which may underflow to zero without harm.
 */
final class HyperbolicSweeps {

    private static final int MOST_SWEEPS = 40;
    /** A rotation that adds less than this part of the sum cannot be seen in the answer; r² of them cannot either. */
    private static final double NEGLIGIBLE = 1e-25;

    private static final double ORTHOGONAL = 1e-16;
    private static final double SHORT_OF_EQUAL = 1e-7;
    /** A root beyond this, in units of the sum of the norms, is of no danger. */
    private static final double WIDE_ANGLE = 0.1;

    /** Searches of ordinary pairs end within as many sweeps, and their sum is good to a few 1e-15; where more were needed it was off by up to 4e-12. */
    private static final int SETTLED = 9;

    /** Overlaps met below this are squared by the rotations of the sweep that met them. */
    private static final double NEARLY_ORTHOGONAL = 1e-4;

    private final int k;
    private final int r;
    private final double unit;
    private final double q;
    /** Columns x_1..x_k, y_1..y_l, one array each. */
    private final double[][] re;

    private final double[][] im;
    /** Row j holds the coefficients of column j in the original columns; those across types in units of 2^e. */
    private final double[][] vr;

    private final double[][] vi;
    /** g[i][j] = (column i)*(column j), across types in units of 2^e. */
    private final double[][] gr;

    private final double[][] gi;
    private final double[] norm;
    /** Roots of the norms: products of these do not underflow where products of the norms would. */
    private final double[] length;

    private double total;
    /** What pairs of columns that were retired may still share, in units of 2^2e. */
    private double left;

    private int sweeps;

    /** The largest normalised inner product met within one operator during the sweep. */
    private double overlap;

    private HyperbolicSweeps(EnclosedMatrix x, EnclosedMatrix y, int exponent) {
        k = x.columns();
        r = k + y.columns();
        unit = Math.scalb(1.0, Math.max(exponent, -1060));
        q = exponent < -530 ? 0 : unit * unit;
        int m = x.rows();
        boolean real = x.isReal() && y.isReal();
        re = new double[r][m];
        im = new double[r][real ? 0 : m];
        vr = new double[r][r];
        vi = new double[r][real ? 0 : r];
        gr = new double[r][r];
        gi = new double[r][real ? 0 : r];
        norm = new double[r];
        length = new double[r];
        for (int j = 0; j < r; j++) {
            EnclosedMatrix from = j < k ? x : y;
            int c = j < k ? j : j - k;
            for (int i = 0; i < m; i++) {
                re[j][i] = from.re(i, c);
                if (!real) {
                    im[j][i] = from.im(i, c);
                }
            }
            vr[j][j] = 1;
        }
    }

    /**
     * Runs the sweeps.
     *
     * @param x columns of A
     * @param y columns of B
     * @param gx X*X
     * @param gy Y*Y
     * @param cross X*Y / 2^exponent
     * @param exponent the unit of the inner products across
     * @param checkpoint passed many times a second, may throw
     * @return the finished state
     */
    static HyperbolicSweeps run(
            EnclosedMatrix x,
            EnclosedMatrix y,
            EnclosedMatrix gx,
            EnclosedMatrix gy,
            EnclosedMatrix cross,
            int exponent,
            Runnable checkpoint) {
        HyperbolicSweeps s = new HyperbolicSweeps(x, y, exponent);
        s.fill(gx, 0, 0);
        s.fill(gy, s.k, s.k);
        s.fill(cross, 0, s.k);
        s.fill(cross.adjoint(), s.k, 0);
        s.measure();
        s.orthogonalise(0, s.k);
        s.orthogonalise(s.k, s.r);
        for (int sweep = 0; sweep < MOST_SWEEPS; sweep++) {
            s.measure();
            double before = s.total;
            s.overlap = 0;
            boolean turned = s.sweep(checkpoint);
            double added = s.total - before;
            s.sweeps++;
            if (!turned || sweep > 0 && added <= 1e-17 * s.total && s.overlap < NEARLY_ORTHOGONAL) {
                break;
            }
        }
        return s;
    }

    private void measure() {
        for (int j = 0; j < r; j++) {
            measure(j);
        }
    }

    /** Makes the columns of one operator orthogonal first: equal or nearly equal operators then meet column by column. */
    private void orthogonalise(int from, int to) {
        boolean turned = true;
        for (int sweep = 0; turned && sweep < MOST_SWEEPS; sweep++) {
            turned = false;
            for (int p = from; p < to - 1; p++) {
                for (int c = p + 1; c < to; c++) {
                    turned |= norm[p] > 0 && norm[c] > 0 && unitary(p, c);
                }
            }
        }
    }

    private void fill(EnclosedMatrix g, int row, int column) {
        for (int i = 0; i < g.rows(); i++) {
            for (int j = 0; j < g.columns(); j++) {
                gr[row + i][column + j] = g.re(i, j);
                if (gi[0].length != 0) {
                    gi[row + i][column + j] = g.im(i, j);
                }
            }
        }
    }

    private void measure(int j) {
        norm[j] = Rotations.dotRe(re[j], im[j], re[j], im[j]);
        length[j] = Math.sqrt(norm[j]);
    }

    private double imag(int i, int j) {
        return gi[i].length == 0 ? 0 : gi[i][j];
    }

    private boolean sweep(Runnable checkpoint) {
        boolean turned = false;
        for (int p = 0; p < r - 1; p++) {
            checkpoint.run();
            for (int c = p + 1; c < r; c++) {
                if (norm[p] > 0 && norm[c] > 0 && (gr[p][c] != 0 || imag(p, c) != 0)) {
                    turned |= p < k && c >= k ? hyperbolic(p, c) : unitary(p, c);
                }
            }
        }
        return turned;
    }

    private boolean hyperbolic(int p, int c) {
        double a = norm[p];
        double b = norm[c];
        double hr = gr[p][c];
        double hi = imag(p, c);
        double sum = a + b;
        double h = Math.hypot(hr, hi);
        if (2 * h * (h / sum) <= NEGLIGIBLE * total) {
            return false;
        }
        // everything relative to a + b: products of light columns' norms would underflow
        double x = a / sum;
        double y = b / sum;
        double g = unit * h / sum;
        double d = x * y - g * g;
        if (g * g > 0.25 * x * y) {
            hr = Rotations.dotRe(re[p], im[p], re[c], im[c]) / unit;
            hi = Rotations.dotIm(re[p], im[p], re[c], im[c]) / unit;
            h = Math.hypot(hr, hi);
            d = x * (Rotations.distance(re[c], im[c], re[p], im[p], unit * hr / a, unit * hi / a) / sum);
        }
        double exactRoot = Math.sqrt((x - y) * (x - y) + 4 * d);
        double root = Math.max(exactRoot, shortest(p, c, exactRoot));
        double s = sum * (1 + root);
        total += 2 * h * (h / s);
        // t in units of 2^e; 1 − |t|² written without cancellation
        double tr = -2 * hr / s;
        double ti = 2 * hi / s;
        double cosh = (1 + root) / Math.sqrt(root * root + 2 * root + exactRoot * exactRoot);
        turn(p, c, cosh, cosh * tr, cosh * ti, true);
        if (root > exactRoot) {
            // what is left of equal columns is rounding noise; turning it further would only blow up the coefficients
            left += q > 0 ? Math.min(norm[p], norm[c]) / q : 0;
            retire(p);
            retire(c);
        }
        return true;
    }

    /**
     * The least root that may be used, in units of the sum of the norms. Equal columns would need an infinite angle. Stopping short leaves 1e-7 of what they share to the next level of the certificate; coefficients that have already been stretched
     * count. The inner products there have lost 14 digits of 32 by then: less would leave more, and more would lose more.
     */
    private double shortest(int p, int c, double exactRoot) {
        if (exactRoot > WIDE_ANGLE) {
            return 0;
        }
        double stretch = Math.max(stretch(p, 0, k), stretch(c, k, r));
        return Math.min(1, SHORT_OF_EQUAL * Math.max(1, stretch));
    }

    /** The squared coefficients of column j in the columns of its own operator. */
    private double stretch(int j, int from, int to) {
        double s = 0;
        for (int i = from; i < to; i++) {
            s += vr[j][i] * vr[j][i] + (vi[j].length == 0 ? 0 : vi[j][i] * vi[j][i]);
        }
        return s;
    }

    private void retire(int j) {
        norm[j] = 0;
        length[j] = 0;
        java.util.Arrays.fill(re[j], 0);
        java.util.Arrays.fill(im[j], 0);
    }

    private boolean unitary(int p, int c) {
        double a = norm[p];
        double b = norm[c];
        double hr = gr[p][c];
        double hi = imag(p, c);
        double h = Math.sqrt(hr * hr + hi * hi);
        if (!(h > ORTHOGONAL * Math.sqrt(a) * Math.sqrt(b)) || !(h > Double.MIN_NORMAL)) {
            return false;
        }
        // columns too light for the answer are rounding noise and never settle
        if (Math.min(a, b) > 1e-18 * q * total) {
            overlap = Math.max(overlap, h / Math.sqrt(a) / Math.sqrt(b));
        }
        // x' = cx − s e^{-iφ} y, y' = s e^{iφ} x + cy, with h = |h| e^{iφ}
        double zeta = (b - a) / (2 * h);
        double t = (zeta >= 0 ? 1 : -1) / (Math.abs(zeta) + Math.hypot(1, zeta));
        double cos = 1 / Math.sqrt(1 + t * t);
        double sin = cos * t;
        turn(p, c, cos, -sin * hr / h, sin * hi / h, false);
        return true;
    }

    /**
     * Columns: p' = c p + s c', c'' = ±s̄ p + c c' (plus for hyperbolic). Inner products of every other column z follow, with the factor 2^2e where
     * a product of two cross quantities meets a same-type one.
     */
    private void turn(int p, int m, double c, double sr, double si, boolean hyperbolic) {
        double tr = hyperbolic ? sr : -sr;
        double ti = hyperbolic ? -si : si;
        double u = hyperbolic ? unit : 1;
        Rotations.mix(re[p], im[p], re[m], im[m], c, u * sr, u * si, u * tr, u * ti);
        measure(p);
        measure(m);
        mixCoefficients(p, m, c, sr, si, tr, ti, hyperbolic);
        if (gi[0].length == 0) {
            mixRealProducts(p, m, c, sr, tr, hyperbolic ? q : 1, 1, 0, k);
            mixRealProducts(p, m, c, sr, tr, 1, hyperbolic ? q : 1, k, r);
        } else {
            for (int z = 0; z < r; z++) {
                if (z != p && z != m && norm[z] > 0) {
                    mixProducts(z, p, m, c, sr, si, tr, ti, hyperbolic);
                }
            }
        }
        setProduct(p, m, 0, 0);
    }

    private void mixCoefficients(
            int p, int m, double c, double sr, double si, double tr, double ti, boolean hyperbolic) {
        if (!hyperbolic) {
            Rotations.mix(vr[p], vi[p], vr[m], vi[m], c, sr, si, tr, ti);
            return;
        }
        // in the x rows (0..k) column p is plain and column m in units of 2^e; in the y rows it is the other way round
        Rotations.mixRange(vr[p], vi[p], vr[m], vi[m], 0, k, c, q * sr, q * si, tr, ti);
        Rotations.mixRange(vr[p], vi[p], vr[m], vi[m], k, r, c, sr, si, q * tr, q * ti);
    }

    /**
     * What {@link #mixProducts} does, for real columns z from (included) to (excluded), all of one type; this is where the time goes. up and um are the factors of a
     * second product across types. A sum that cancels is computed from the columns.
     */
    private void mixRealProducts(int p, int m, double c, double s, double t, double up, double um, int from, int to) {
        double[] gp = gr[p];
        double[] gm = gr[m];
        double us = up * s;
        double ut = um * t;
        double mostP = length[p] / ((p < k) != (from < k) ? unit : 1);
        double mostM = length[m] / ((m < k) != (from < k) ? unit : 1);
        for (int z = from; z < to; z++) {
            if (z == p || z == m || !(norm[z] > 0)) {
                continue;
            }
            double a = gp[z];
            double b = gm[z];
            double x = c * a;
            double y = us * b;
            double v = x + y;
            double size = Math.abs(x) + Math.abs(y);
            if (!(size <= mostP * length[z])) {
                v = product(z, p);
            }
            gp[z] = v;
            gr[z][p] = v;
            x = c * b;
            y = ut * a;
            v = x + y;
            size = Math.abs(x) + Math.abs(y);
            if (!(size <= mostM * length[z])) {
                v = product(z, m);
            }
            gm[z] = v;
            gr[z][m] = v;
        }
    }

    private double product(int z, int j) {
        return Rotations.dotRe(re[z], im[z], re[j], im[j]) / ((z < k) != (j < k) ? unit : 1);
    }

    private void mixProducts(
            int z, int p, int m, double c, double sr, double si, double tr, double ti, boolean hyperbolic) {
        double pr = gr[z][p];
        double pi = imag(z, p);
        double mr = gr[z][m];
        double mi = imag(z, m);
        boolean zx = z < k;
        // p is of type x in a hyperbolic turn, m of type y
        double up = hyperbolic && zx ? q : 1;
        double um = hyperbolic && !zx ? q : 1;
        setIfTrusted(z, p, c * pr, c * pi, up * (sr * mr - si * mi), up * (sr * mi + si * mr));
        setIfTrusted(z, m, c * mr, c * mi, um * (tr * pr - ti * pi), um * (tr * pi + ti * pr));
    }

    /** Stores the sum of two terms as (column z)*(column j), unless the sum cancels: then it is computed from the columns. */
    private void setIfTrusted(int z, int j, double xr, double xi, double yr, double yi) {
        double size = Math.sqrt(xr * xr + xi * xi) + Math.sqrt(yr * yr + yi * yi);
        boolean across = (z < k) != (j < k);
        if (size <= length[z] / (across ? unit : 1) * length[j]) {
            setProduct(z, j, xr + yr, xi + yi);
        } else {
            double u = across ? unit : 1;
            setProduct(
                    z,
                    j,
                    Rotations.dotRe(re[z], im[z], re[j], im[j]) / u,
                    Rotations.dotIm(re[z], im[z], re[j], im[j]) / u);
        }
    }

    private void setProduct(int i, int j, double x, double y) {
        gr[i][j] = x;
        gr[j][i] = x;
        if (gi[0].length != 0) {
            gi[i][j] = y;
            gi[j][i] = -y;
        }
    }

    /** The coefficient of original column i in final column j, across types in units of 2^e: real part. */
    double coefficientRe(int i, int j) {
        return vr[j][i];
    }

    /** The coefficient of original column i in final column j, across types in units of 2^e: imaginary part. */
    double coefficientIm(int i, int j) {
        return vi[j].length == 0 ? 0 : vi[j][i];
    }

    /** The sum of all decreases: f in units of 2^2e, to about double accuracy. */
    double total() {
        return total;
    }

    /** Whether {@link #total} may miss more than rounding: columns were retired with something left, or nearly dependent ones settled slowly. */
    boolean isDoubtful() {
        return sweeps > SETTLED || left > 1e-15 * total;
    }

    /** The number of columns of A. */
    int split() {
        return k;
    }

    /** The number of columns in all. */
    int columns() {
        return r;
    }
}
