package org.minorant.core.pair;

import org.minorant.core.EnclosedMatrix;
import org.minorant.core.internal.dd.DdProducts;
import org.minorant.core.internal.number.DoubleDouble;

/**
 * One spin block of many copies of two qubits: A = diag(x_a) in its eigenbasis, B = diag(y_b) in its own, overlaps C between the two; leading indices only.
 *
 * <p>The inner products are what defines the pair: X*X = diag(x_a), Y*Y = diag(y_b), X*Y = √x_a C_ab √y_b. The columns only guide the rotations: x_a lies along the a-th axis, and
 * y_b has C_ab there and, beyond, column b of an R with R*R = 1 − C*C.
 */
final class SpinBlock {

    /** Directions in which y_b has less than this left are rounding. */
    private static final double NOTHING = 1e-27;

    private SpinBlock() {}

    /**
     * The pair of a block.
     *
     * @param x the weights of A
     * @param y the weights of B
     * @param window overlaps: a row for each column of A, a column for each of B, or more
     */
    static ColumnPair columns(ColumnWeights x, ColumnWeights y, SpinOverlaps.Window window) {
        int k = x.held();
        int l = y.held();
        SpinOverlaps.Window c = window.leading(k, l);
        double[][] ch = c.high();
        double[][] cl = c.low();
        double[][] radius = c.radius();
        EnclosedMatrix.Builder cross = EnclosedMatrix.builder(k, l);
        for (int a = 0; a < k; a++) {
            for (int b = 0; b < l; b++) {
                DoubleDouble scale = x.root(a).times(y.root(b));
                DoubleDouble m = new DoubleDouble(ch[a][b], cl[a][b]).times(scale);
                // the roots err by (steps + 4)·2^-102 each beside their weights, the two products by 2^-102 each
                double r = scale.hi() * radius[a][b] * (1 + 0x1p-50)
                        + Math.abs(m.hi()) * (x.steps(a) + y.steps(b) + 16) * 0x1p-101
                        + 0x1p-1060;
                cross.set(a, b, m.hi(), m.lo(), 0, 0, r);
            }
        }
        return new ColumnPair(axes(x, k, l), guides(y, ch, cl, k, l), x.gram(k), y.gram(l), cross.build());
    }

    private static EnclosedMatrix axes(ColumnWeights x, int k, int l) {
        EnclosedMatrix.Builder m = EnclosedMatrix.builder(k + l, k);
        for (int a = 0; a < k; a++) {
            m.set(a, a, x.root(a).hi(), x.root(a).lo(), 0, 0, 0);
        }
        return m.build();
    }

    private static EnclosedMatrix guides(ColumnWeights y, double[][] ch, double[][] cl, int k, int l) {
        DoubleDouble[][] r = root(ch, cl, l);
        EnclosedMatrix.Builder m = EnclosedMatrix.builder(k + l, l);
        for (int b = 0; b < l; b++) {
            DoubleDouble scale = y.root(b);
            for (int a = 0; a < k; a++) {
                set(m, a, b, new DoubleDouble(ch[a][b], cl[a][b]).times(scale));
            }
            for (int i = 0; i < l; i++) {
                set(m, k + i, b, r[i][b].times(scale));
            }
        }
        return m.build();
    }

    private static void set(EnclosedMatrix.Builder m, int i, int j, DoubleDouble v) {
        m.set(i, j, v.hi(), v.lo(), 0, 0, 0);
    }

    /**
     * R with R*R = 1 − C*C, nearly: Cholesky's method with the largest pivot next, in double-double. Columns that nearly depend on each other leave pivots far below 1e-16, and without the order those that are
     * rounding would be divided by.
     */
    private static DoubleDouble[][] root(double[][] ch, double[][] cl, int l) {
        double[][] sh = new double[l][l];
        double[][] sl = new double[l][l];
        for (int b = 0; b < l; b++) {
            sh[b][b] = 1;
        }
        DdProducts.addProduct(transposed(ch, l), transposed(cl, l), ch, cl, -1, sh, sl);
        DoubleDouble[][] r = new DoubleDouble[l][l];
        for (DoubleDouble[] row : r) {
            java.util.Arrays.fill(row, DoubleDouble.ZERO);
        }
        boolean[] used = new boolean[l];
        for (int step = 0; step < l; step++) {
            int next = largest(sh, used);
            if (!(sh[next][next] > NOTHING)) {
                break;
            }
            used[next] = true;
            DoubleDouble pivot = new DoubleDouble(sh[next][next], sl[next][next]).sqrt();
            double[][] rowHigh = new double[1][l];
            double[][] rowLow = new double[1][l];
            for (int j = 0; j < l; j++) {
                if (j == next || !used[j]) {
                    DoubleDouble v = new DoubleDouble(sh[next][j], sl[next][j]).dividedBy(pivot);
                    rowHigh[0][j] = v.hi();
                    rowLow[0][j] = v.lo();
                    r[step][j] = v;
                }
            }
            // the Schur complement; rows that are done stay as they are, their columns hold zeros
            double[][] columnHigh = transposed(rowHigh, l);
            double[][] columnLow = transposed(rowLow, l);
            DdProducts.addProduct(columnHigh, columnLow, rowHigh, rowLow, -1, sh, sl);
        }
        return r;
    }

    private static int largest(double[][] s, boolean[] used) {
        int best = 0;
        double most = Double.NEGATIVE_INFINITY;
        for (int j = 0; j < s.length; j++) {
            if (!used[j] && s[j][j] > most) {
                most = s[j][j];
                best = j;
            }
        }
        return best;
    }

    private static double[][] transposed(double[][] m, int columns) {
        double[][] t = new double[columns][m.length];
        for (int i = 0; i < m.length; i++) {
            for (int j = 0; j < columns; j++) {
                t[j][i] = m[i][j];
            }
        }
        return t;
    }
}
