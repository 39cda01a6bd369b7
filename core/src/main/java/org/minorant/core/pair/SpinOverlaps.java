package org.minorant.core.pair;

import java.util.ArrayList;
import java.util.List;
import org.minorant.core.internal.number.DoubleDouble;
import org.minorant.core.internal.number.ProductError;

/**
 * The overlaps C_ab between the eigenbases of two qubit states in the symmetric power of order k, for the leading indices of both: a Wigner matrix of spin k/2. For one
 * qubit C = [[c, s], [s, −c]], c and s cosine and sine of half the angle between the Bloch vectors.
 *
 * <p><b>Recursion.</b> Sym^k ⊂ Sym^(k−1) ⊗ C²: |a⟩_k = α_a |a⟩|0⟩ + β_a |a−1⟩|1⟩ with α_a² = 1 − a/k, β_a² = a/k. So C^(k) = V*(C^(k−1) ⊗ C)V for an isometry V:
 *
 * <pre>C_ab ← α_a (cα_b C_ab + sβ_b C_a,b−1) + β_a (sα_b C_a−1,b − cβ_b C_a−1,b−1).</pre>
 *
 * The leading window is closed under it, so only as many indices are carried as are kept.
 *
 * <p>From k to 2k the same goes with Sym^2k ⊂ Sym^k ⊗ Sym^k ({@link SpinDoubling}), so that high orders are near.
 *
 * <p><b>Error.</b> The step does not increase operator norms. Errors therefore only add up: the error of the window has operator norm at most {@link #normError}, the sum of the
 * Frobenius norms of the rounding errors of all steps. Beside it every entry carries its own radius, propagated with absolute values; that grows where terms cancel, but keeps the
 * relative accuracy of entries deep in the corner, where none do. The smaller one holds.
 *
 * <p><b>Rounding of a step.</b> c, s carry relative errors below 2^-103, α, β (a root, the quotient of a root, a product) below 2^-100; with the products and sums of the step, each at
 * most 2^-102 of the terms, an entry errs by at most 2^-97 of the sum of its four terms' moduli. Below 2^-1000 gradual underflow adds at most 2^-1060.
 */
final class SpinOverlaps {

    private static final double STEP = 0x1p-97;

    /** Doublings begin at an order of so many binary digits. */
    private static final int FIRST = 3;

    /** A doubling costs about rows · columns/30 steps. */
    private static final double LESS = 30;

    private static final double UNDERFLOW = 0x1p-1060;
    private static final double UP = 1 + 0x1p-45;

    private final int rows;
    private final int columns;
    private final DoubleDouble cos;
    private final DoubleDouble sin;
    /** √0, √1, √2, … as far as the order has come. */
    private final List<DoubleDouble> roots = new ArrayList<>();

    /** 1/√k. */
    private DoubleDouble inverse = DoubleDouble.ONE;

    private int order;
    private double normError;
    private double[][] hi;
    private double[][] lo;
    private double[][] radius;
    private double[][] nextHi;
    private double[][] nextLo;
    private double[][] nextRadius;
    /** Column coefficients cα_b, sβ_b, sα_b, −cβ_b of the step in hand. */
    private final double[][] coefficients;
    /** The two halves of a row: t and u of this row, u of the row before, in high and low words; sums of moduli and radii. */
    private final double[][] half;
    /** Radii of a row, moved by one column; the first stays zero. */
    private final double[] shifted;

    SpinOverlaps(DoubleDouble cos, DoubleDouble sin, int rows, int columns) {
        this.cos = cos;
        this.sin = sin;
        this.rows = rows;
        this.columns = columns;
        hi = new double[rows][columns];
        lo = new double[rows][columns];
        radius = new double[rows][columns];
        nextHi = new double[rows][columns];
        nextLo = new double[rows][columns];
        nextRadius = new double[rows][columns];
        coefficients = new double[8][columns];
        half = new double[14][columns];
        shifted = new double[columns];
        hi[0][0] = 1;
    }

    /** k. */
    int order() {
        return order;
    }

    /** A bound on the operator norm of the error of the window. */
    double normError() {
        return normError;
    }

    /**
     * Leading rows and columns of C^(k), copied.
     *
     * @param high high words, a row for each a
     * @param low low words
     * @param radius radii of the entries
     */
    record Window(double[][] high, double[][] low, double[][] radius) {

        /** The first k rows and l columns. */
        Window leading(int k, int l) {
            return k == high.length && l == high[0].length
                    ? this
                    : new Window(copy(high, k, l), copy(low, k, l), copy(radius, k, l));
        }
    }

    /** The first k rows and l columns as they are now. */
    Window window(int k, int l) {
        return new Window(copy(hi, k, l), copy(lo, k, l), copy(radius, k, l));
    }

    private static double[][] copy(double[][] m, int k, int l) {
        double[][] c = new double[k][];
        for (int a = 0; a < k; a++) {
            c[a] = java.util.Arrays.copyOf(m[a], l);
        }
        return c;
    }

    /** Goes to a higher order, by doublings if that is less work than so many steps. */
    void advanceTo(int k, Runnable checkpoint) {
        int doublings = Math.max(0, 31 - Integer.numberOfLeadingZeros(k) - FIRST);
        if (order == 0 && (double) rows * columns * doublings < LESS * k) {
            int start = k >> doublings;
            while (order < start) {
                step();
            }
            for (int bit = doublings - 1; bit >= 0; bit--) {
                checkpoint.run();
                twice();
                if ((k >> bit & 1) == 1) {
                    step();
                }
            }
        }
        while (order < k) {
            step();
            checkpoint.run();
        }
    }

    /** Goes from k to 2k. */
    private void twice() {
        SpinDoubling d = new SpinDoubling(order, rows, columns);
        double square = d.of(hi, lo, radius, nextHi, nextLo, nextRadius);
        // ‖C ⊗ C − C' ⊗ C'‖ ≤ (‖C‖ + ‖C'‖)‖C − C'‖, and windows of unitaries have norm 1 at most
        normError = ((2 + normError) * normError
                        + d.rounding() * Math.sqrt(square)
                        + (double) rows * columns * rows * columns * UNDERFLOW)
                * UP;
        order *= 2;
        cap(Math.min(order, rows - 1));
        exchange();
    }

    /** Goes from k to k + 1. */
    void step() {
        int k = ++order;
        prepare(k);
        int last = Math.min(k, rows - 1);
        double square = 0;
        java.util.Arrays.fill(half[6], 0);
        java.util.Arrays.fill(half[7], 0);
        java.util.Arrays.fill(half[12], 0);
        java.util.Arrays.fill(half[13], 0);
        for (int a = 0; a <= last; a++) {
            DoubleDouble alpha = root(k - a);
            DoubleDouble beta = root(a);
            split(a);
            combine(a, alpha, beta);
            square += finish(a, alpha.hi(), beta.hi());
            // this row's u is the next row's "row before"
            swap(4, 6);
            swap(5, 7);
            swap(10, 12);
            swap(11, 13);
        }
        normError = (normError + STEP * Math.sqrt(square) + (double) rows * columns * UNDERFLOW) * UP;
        cap(last);
        exchange();
    }

    /** What was made next becomes what is. */
    private void exchange() {
        double[][] h = hi;
        double[][] l = lo;
        double[][] r = radius;
        hi = nextHi;
        lo = nextLo;
        radius = nextRadius;
        nextHi = h;
        nextLo = l;
        nextRadius = r;
    }

    private void swap(int i, int j) {
        double[] x = half[i];
        half[i] = half[j];
        half[j] = x;
    }

    /** √(i/k): the table's root times 1/√k. */
    private DoubleDouble root(int i) {
        return i <= 0 ? DoubleDouble.ZERO : roots.get(i).times(inverse);
    }

    private void prepare(int k) {
        while (roots.size() <= k) {
            roots.add(DoubleDouble.of(roots.size()).sqrt());
        }
        inverse = roots.get(k).dividedBy(DoubleDouble.of(k));
        for (int b = 0; b < columns; b++) {
            DoubleDouble alpha = root(k - b);
            DoubleDouble beta = root(Math.min(b, k));
            put(0, b, cos.times(alpha));
            put(2, b, sin.times(beta));
            put(4, b, sin.times(alpha));
            put(6, b, cos.times(beta).negate());
        }
    }

    private void put(int i, int b, DoubleDouble v) {
        coefficients[i][b] = v.hi();
        coefficients[i + 1][b] = v.lo();
    }

    /** t_b = cα_b C_ab + sβ_b C_a,b−1 and u_b = sα_b C_ab − cβ_b C_a,b−1 for row a, with the sums of moduli and the radii. */
    private void split(int a) {
        double[] h = hi[a];
        double[] l = lo[a];
        double[] r = radius[a];
        double[] ph = half[0];
        double[] pl = half[1];
        double[] pr = shifted;
        System.arraycopy(h, 0, ph, 1, columns - 1);
        System.arraycopy(l, 0, pl, 1, columns - 1);
        System.arraycopy(r, 0, pr, 1, columns - 1);
        ph[0] = 0;
        pl[0] = 0;
        mix(h, l, coefficients[0], coefficients[1], ph, pl, coefficients[2], coefficients[3], half[2], half[3]);
        mix(h, l, coefficients[4], coefficients[5], ph, pl, coefficients[6], coefficients[7], half[4], half[5]);
        moduli(h, ph, coefficients, half[8], half[10]);
        moduli(r, pr, coefficients, half[9], half[11]);
    }

    /** |x|cα + |y|sβ and |x|sα + |y|cβ. */
    private static void moduli(double[] x, double[] y, double[][] c, double[] t, double[] u) {
        double[] ca = c[0];
        double[] sb = c[2];
        double[] sa = c[4];
        double[] cb = c[6];
        for (int b = 0; b < t.length; b++) {
            double p = Math.abs(x[b]);
            double q = Math.abs(y[b]);
            t[b] = p * ca[b] + q * sb[b];
            // cβ is held with a minus sign
            u[b] = p * sa[b] - q * cb[b];
        }
    }

    /** out = x·p + y·q in double-double. */
    private static void mix(
            double[] xh,
            double[] xl,
            double[] ph,
            double[] pl,
            double[] yh,
            double[] yl,
            double[] qh,
            double[] ql,
            double[] outH,
            double[] outL) {
        for (int b = 0; b < outH.length; b++) {
            double m = xh[b] * ph[b];
            double me = ProductError.of(xh[b], ph[b], m) + (xh[b] * pl[b] + xl[b] * ph[b]);
            double n = yh[b] * qh[b];
            double ne = ProductError.of(yh[b], qh[b], n) + (yh[b] * ql[b] + yl[b] * qh[b]);
            double s = m + n;
            double t = s - m;
            double e = ((m - (s - t)) + (n - t)) + (me + ne);
            double v = s + e;
            outH[b] = v;
            outL[b] = e - (v - s);
        }
    }

    /** C_ab = α t_b + β u'_b with u' of the row before. */
    private void combine(int a, DoubleDouble alpha, DoubleDouble beta) {
        combine(half[2], half[3], alpha.hi(), alpha.lo(), half[6], half[7], beta.hi(), beta.lo(), nextHi[a], nextLo[a]);
    }

    private static void combine(
            double[] xh,
            double[] xl,
            double ph,
            double pl,
            double[] yh,
            double[] yl,
            double qh,
            double ql,
            double[] outH,
            double[] outL) {
        for (int b = 0; b < outH.length; b++) {
            double m = xh[b] * ph;
            double me = ProductError.of(xh[b], ph, m) + (xh[b] * pl + xl[b] * ph);
            double n = yh[b] * qh;
            double ne = ProductError.of(yh[b], qh, n) + (yh[b] * ql + yl[b] * qh);
            double s = m + n;
            double t = s - m;
            double e = ((m - (s - t)) + (n - t)) + (me + ne);
            double v = s + e;
            outH[b] = v;
            outL[b] = e - (v - s);
        }
    }

    /** Radii of row a; returns the sum of the squared sums of moduli. */
    private double finish(int a, double alpha, double beta) {
        double[] out = nextRadius[a];
        double square = 0;
        for (int b = 0; b < columns; b++) {
            double size = alpha * half[8][b] + beta * half[12][b];
            out[b] = ((alpha * half[9][b] + beta * half[13][b]) + STEP * size) * UP + UNDERFLOW;
            square += size * size;
        }
        return square;
    }

    private void cap(int last) {
        for (int a = 0; a <= last; a++) {
            double[] r = nextRadius[a];
            for (int b = 0; b < columns; b++) {
                r[b] = Math.min(r[b], normError);
            }
        }
    }
}
