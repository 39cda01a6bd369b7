package org.minorant.core.pair;

import java.util.Arrays;
import org.minorant.core.internal.number.DoubleDouble;
import org.minorant.core.internal.number.ProductError;

/**
 * The matrix π_λ(U) between two windows of Gelfand–Tsetlin patterns: overlaps of the eigenbases of two operators in an irreducible block of their copies.
 *
 * <p><b>Recursion.</b> π_λ(U) = W*(π_μ(U) ⊗ U)W with the isometries of {@link BoxAddition}; windows are closed under it.
 *
 * <p><b>Error.</b> As in {@link SpinOverlaps}: a step does not increase operator norms, so the error of the window has operator norm at most {@link #normError}, the sum of the Frobenius norms of the rounding errors
 * of all steps (a part of a matrix has no larger norm than the whole); beside it every entry carries its own radius, propagated with absolute values. The smaller one holds.
 *
 * <p><b>Rounding of a step</b>, in units of 2^-102 of the sum of the moduli of an entry's terms: twice d(d − 1) + 2 for the coefficients in W, 1 for U, one each for the products and sums, c of them over the parts of a
 * row, 2d over letters and c over the parts of a column, 12 for the products themselves; √2 in going from real and imaginary parts to the modulus. What U errs absolutely, and what underflows, is below
 * c² 2^-400.
 */
final class IrrepOverlaps {

    private static final double UNIT = 0x1p-102;
    private static final double UP = 1 + 0x1p-45;

    private final PatternWindow rows;
    private final PatternWindow columns;
    private final boolean real;
    private final double[][] rh;
    private final double[][] rl;
    private final double[][] ih;
    private final double[][] il;
    private final double[][] radius;
    private double normError;

    private IrrepOverlaps(PatternWindow rows, PatternWindow columns, boolean real) {
        this.rows = rows;
        this.columns = columns;
        this.real = real;
        int r = rows.size();
        int c = columns.size();
        rh = new double[r][c];
        rl = new double[r][c];
        ih = real ? new double[0][] : new double[r][c];
        il = real ? new double[0][] : new double[r][c];
        radius = new double[r][c];
    }

    /** The trivial representation, for windows of the shape zero. */
    static IrrepOverlaps trivial(PatternWindow rows, PatternWindow columns, boolean real) {
        IrrepOverlaps o = new IrrepOverlaps(rows, columns, real);
        o.rh[0][0] = 1;
        return o;
    }

    PatternWindow rows() {
        return rows;
    }

    PatternWindow columns() {
        return columns;
    }

    boolean isReal() {
        return real;
    }

    /** A bound on the operator norm of the error. */
    double normError() {
        return normError;
    }

    DoubleDouble re(int i, int j) {
        return new DoubleDouble(rh[i][j], rl[i][j]);
    }

    DoubleDouble im(int i, int j) {
        return real ? DoubleDouble.ZERO : new DoubleDouble(ih[i][j], il[i][j]);
    }

    double radius(int i, int j) {
        return radius[i][j];
    }

    /** The overlaps after a box is added to the given row of the shape. */
    IrrepOverlaps plusBox(QuditOverlaps u, PatternWindow nextRows, PatternWindow nextColumns, int row, Runnable stop) {
        IrrepOverlaps next = new IrrepOverlaps(nextRows, nextColumns, real);
        BoxAddition left = BoxAddition.of(nextRows, rows, row);
        BoxAddition right = BoxAddition.of(nextColumns, columns, row);
        next.fill(this, u, left, right, stop);
        return next;
    }

    private void fill(IrrepOverlaps old, QuditOverlaps u, BoxAddition left, BoxAddition right, Runnable stop) {
        int d = u.dimension();
        int parts = Math.max(left.mostParts(), right.mostParts());
        double step = 1.5 * (2.0 * d * (d - 1) + 2.0 * parts + 2.0 * d + 20) * UNIT;
        double absolute = parts * parts * 0x1p-398;
        LetterRows before = new LetterRows(d, old.columns.size(), real);
        LetterRows after = new LetterRows(d, old.columns.size(), real);
        double square = 0;
        for (int i = 0; i < rows.size(); i++) {
            stop.run();
            before.clear();
            for (int s = 0; s < left.parent()[i].length; s++) {
                int k = left.letter()[i][s];
                int p = left.parent()[i][s];
                before.add(k, left.high()[i][s], left.low()[i][s], old, p);
            }
            after.clear();
            after.mix(before, u);
            square += gather(i, after, right, step, absolute);
        }
        double cells = (double) rows.size() * columns.size();
        // ‖U computed − U‖ ≤ 2^-102 √d is in the relative errors of the step; its norm is 1 up to that
        normError = (old.normError * (1 + d * UNIT) + step * Math.sqrt(square) + cells * absolute) * UP;
        for (double[] r : radius) {
            for (int j = 0; j < r.length; j++) {
                r[j] = Math.min(r[j], normError);
            }
        }
    }

    /** Row i from the row with letters; returns the sum of the squared sums of moduli. */
    private double gather(int i, LetterRows x, BoxAddition right, double step, double absolute) {
        double square = 0;
        for (int j = 0; j < columns.size(); j++) {
            int[] parent = right.parent()[j];
            int[] letter = right.letter()[j];
            double sh = 0;
            double sl = 0;
            double th = 0;
            double tl = 0;
            double size = 0;
            double error = 0;
            for (int t = 0; t < parent.length; t++) {
                int k = letter[t];
                int q = parent[t];
                double wh = right.high()[j][t];
                double wl = right.low()[j][t];
                double m = x.rh[k][q] * wh;
                double e = ProductError.of(x.rh[k][q], wh, m) + (x.rh[k][q] * wl + x.rl[k][q] * wh);
                double s = sh + m;
                double z = s - sh;
                double v = ((sh - (s - z)) + (m - z)) + (sl + e);
                sh = s + v;
                sl = v - (sh - s);
                if (!real) {
                    m = x.ih[k][q] * wh;
                    e = ProductError.of(x.ih[k][q], wh, m) + (x.ih[k][q] * wl + x.il[k][q] * wh);
                    s = th + m;
                    z = s - th;
                    v = ((th - (s - z)) + (m - z)) + (tl + e);
                    th = s + v;
                    tl = v - (th - s);
                }
                size += Math.abs(wh) * x.size[k][q];
                error += Math.abs(wh) * x.error[k][q];
            }
            rh[i][j] = sh;
            rl[i][j] = sl;
            if (!real) {
                ih[i][j] = th;
                il[i][j] = tl;
            }
            radius[i][j] = (error + step * size) * UP + absolute;
            square += size * size;
        }
        return square;
    }

    /** A row of the parent for each letter, with sums of moduli and errors. */
    private static final class LetterRows {
        private final boolean real;
        private final double[][] rh;
        private final double[][] rl;
        private final double[][] ih;
        private final double[][] il;
        private final double[][] size;
        private final double[][] error;
        private final boolean[] used;

        LetterRows(int d, int columns, boolean real) {
            this.real = real;
            rh = new double[d][columns];
            rl = new double[d][columns];
            ih = new double[d][real ? 0 : columns];
            il = new double[d][real ? 0 : columns];
            size = new double[d][columns];
            error = new double[d][columns];
            used = new boolean[d];
        }

        void clear() {
            for (double[][] m : new double[][][] {rh, rl, ih, il, size, error}) {
                for (double[] row : m) {
                    Arrays.fill(row, 0);
                }
            }
            Arrays.fill(used, false);
        }

        /** Adds w times row p of the parent to the letter k. */
        void add(int k, double wh, double wl, IrrepOverlaps old, int p) {
            used[k] = true;
            axpy(wh, wl, old.rh[p], old.rl[p], rh[k], rl[k]);
            double w = Math.abs(wh);
            double[] s = size[k];
            double[] a = old.rh[p];
            if (real) {
                for (int t = 0; t < s.length; t++) {
                    s[t] += w * Math.abs(a[t]);
                }
            } else {
                axpy(wh, wl, old.ih[p], old.il[p], ih[k], il[k]);
                double[] b = old.ih[p];
                for (int t = 0; t < s.length; t++) {
                    s[t] += w * Math.sqrt(a[t] * a[t] + b[t] * b[t] + 0x1p-1000);
                }
            }
            double[] e = error[k];
            double[] r = old.radius[p];
            for (int t = 0; t < e.length; t++) {
                e[t] += w * r[t];
            }
        }

        /** This row for letter l is Σ_k U_kl times that of k. */
        void mix(LetterRows before, QuditOverlaps u) {
            int d = used.length;
            for (int l = 0; l < d; l++) {
                for (int k = 0; k < d; k++) {
                    double m = u.modulus(k, l);
                    if (!before.used[k] || m == 0) {
                        continue;
                    }
                    DoubleDouble x = u.re()[k][l];
                    DoubleDouble y = u.im()[k][l];
                    axpy(x.hi(), x.lo(), before.rh[k], before.rl[k], rh[l], rl[l]);
                    if (!real) {
                        axpy(-y.hi(), -y.lo(), before.ih[k], before.il[k], rh[l], rl[l]);
                        axpy(x.hi(), x.lo(), before.ih[k], before.il[k], ih[l], il[l]);
                        axpy(y.hi(), y.lo(), before.rh[k], before.rl[k], ih[l], il[l]);
                    }
                    for (int t = 0; t < size[l].length; t++) {
                        size[l][t] += m * before.size[k][t];
                        error[l][t] += m * before.error[k][t];
                    }
                }
            }
        }

        /** y += w x in double-double. */
        private static void axpy(double wh, double wl, double[] xh, double[] xl, double[] yh, double[] yl) {
            if (wh == 0) {
                return;
            }
            for (int t = 0; t < yh.length; t++) {
                double m = xh[t] * wh;
                double e = ProductError.of(xh[t], wh, m) + (xh[t] * wl + xl[t] * wh);
                double s = yh[t] + m;
                double z = s - yh[t];
                double v = ((yh[t] - (s - z)) + (m - z)) + (yl[t] + e);
                double o = s + v;
                yh[t] = o;
                yl[t] = v - (o - s);
            }
        }
    }
}
