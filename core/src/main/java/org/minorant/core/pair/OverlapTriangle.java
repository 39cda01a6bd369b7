package org.minorant.core.pair;

import java.util.Arrays;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.internal.dd.DdProducts;
import org.minorant.core.internal.number.DoubleDouble;

/**
 * An upper triangle R with R*R = 1 − C*C, nearly, for a window C of overlaps: what the columns of B have outside of those of A. In double-double, as columns that nearly depend on each other leave pivots far below
 * 1e-16. It guides rotations only.
 *
 * @param re real parts
 * @param im imaginary parts
 */
record OverlapTriangle(double[][] re, double[][] im) {

    /** Directions with less than this left are rounding. */
    private static final double NOTHING = 1e-24;

    static OverlapTriangle of(IrrepOverlaps overlaps, int[] rows, int[] columns) {
        int l = columns.length;
        EnclosedMatrix.Builder b = EnclosedMatrix.builder(rows.length, l);
        for (int i = 0; i < rows.length; i++) {
            for (int j = 0; j < l; j++) {
                DoubleDouble x = overlaps.re(rows[i], columns[j]);
                DoubleDouble y = overlaps.im(rows[i], columns[j]);
                b.set(i, j, x.hi(), x.lo(), y.hi(), y.lo(), 0);
            }
        }
        EnclosedMatrix c = b.build();
        EnclosedMatrix s = EnclosedMatrix.identity(l).minus(c.adjoint().times(c));
        boolean real = s.isReal();
        double[][] rh = new double[l][l];
        double[][] rl = new double[l][l];
        double[][] ih = new double[l][l];
        double[][] il = new double[l][l];
        for (int i = 0; i < l; i++) {
            for (int j = 0; j < l; j++) {
                rh[i][j] = s.re(i, j);
                rl[i][j] = s.reTail(i, j);
                ih[i][j] = s.im(i, j);
                il[i][j] = s.imTail(i, j);
            }
        }
        OverlapTriangle r = new OverlapTriangle(new double[l][l], new double[l][l]);
        for (int i = 0; i < l; i++) {
            DoubleDouble pivot = new DoubleDouble(rh[i][i], rl[i][i]);
            if (!(pivot.hi() > NOTHING)) {
                continue;
            }
            DoubleDouble root = pivot.sqrt();
            double[][] xh = new double[1][l];
            double[][] xl = new double[1][l];
            double[][] yh = new double[1][l];
            double[][] yl = new double[1][l];
            for (int j = i; j < l; j++) {
                put(new DoubleDouble(rh[i][j], rl[i][j]).dividedBy(root), xh, xl, j);
                put(new DoubleDouble(ih[i][j], il[i][j]).dividedBy(root), yh, yl, j);
            }
            r.re[i] = xh[0];
            r.im[i] = yh[0];
            // the Schur complement: conj(x_p + i y_p)(x_q + i y_q)
            subtract(xh, xl, xh, xl, -1, rh, rl, i);
            if (!real) {
                subtract(yh, yl, yh, yl, -1, rh, rl, i);
                subtract(xh, xl, yh, yl, -1, ih, il, i);
                subtract(yh, yl, xh, xl, 1, ih, il, i);
            }
        }
        return r;
    }

    private static void put(DoubleDouble v, double[][] high, double[][] low, int j) {
        high[0][j] = v.hi();
        low[0][j] = v.lo();
    }

    /** Rows beyond i of (sh, sl) += sign pᵀq. */
    private static void subtract(
            double[][] ph,
            double[][] pl,
            double[][] qh,
            double[][] ql,
            double sign,
            double[][] sh,
            double[][] sl,
            int i) {
        int l = sh.length;
        DdProducts.addProduct(
                column(ph[0], i + 1),
                column(pl[0], i + 1),
                qh,
                ql,
                sign,
                Arrays.copyOfRange(sh, i + 1, l),
                Arrays.copyOfRange(sl, i + 1, l));
    }

    private static double[][] column(double[] p, int from) {
        double[][] c = new double[p.length - from][1];
        for (int j = from; j < p.length; j++) {
            c[j - from][0] = p[j];
        }
        return c;
    }
}
