package org.minorant.core.pair;

import org.minorant.core.internal.dd.DdProducts;
import org.minorant.core.internal.number.DoubleDouble;
import org.minorant.core.internal.number.WideDoubleDouble;

/**
 * The overlaps of order 2k from those of order k: |a⟩_2k = Σ_{i+j=a} √(C(k,i)C(k,j)/C(2k,a)) |i⟩|j⟩, so that in E_ab = C_ab √(C(k,a)C(k,b)) the window of order 2k is the two-dimensional convolution of that of order k with
 * itself. Leading windows are closed under it. Rows and columns are scaled by powers of two to the a-th, which convolution keeps, so that E stays in range.
 *
 * <p><b>Rounding.</b> Roots of binomials err by (a + 2) · 2^-101 at most, relatively; sums by {@link DdProducts#gamma} of the moduli.
 */
final class SpinDoubling {

    private static final double UP = 1 + 0x1p-40;

    /** What a sum of products below the range of doubles may lose. */
    private static final double UNDERFLOW = 0x1p-1050;

    private final int rows;
    private final int columns;
    private final DoubleDouble[] rowBefore;
    private final DoubleDouble[] rowAfter;
    private final DoubleDouble[] columnBefore;
    private final DoubleDouble[] columnAfter;

    SpinDoubling(int k, int rows, int columns) {
        this.rows = rows;
        this.columns = columns;
        int rowScale = scale(k, rows);
        int columnScale = scale(k, columns);
        rowBefore = roots(k, rows, rowScale);
        rowAfter = roots(2 * k, rows, rowScale);
        columnBefore = roots(k, columns, columnScale);
        columnAfter = roots(2 * k, columns, columnScale);
    }

    /** An exponent e for which √C(k,a) 2^(−ea) stays in range. */
    private static int scale(int k, int count) {
        int last = Math.min(count - 1, k);
        double ln = 0;
        for (int a = 1; a <= last; a++) {
            ln += Math.log((k - a + 1.0) / a);
        }
        return last == 0 ? 0 : (int) Math.max(0, Math.round(ln / (2 * Math.log(2) * last)));
    }

    /** √C(k,a) 2^(−ea), zero beyond a = k. */
    private static DoubleDouble[] roots(int k, int count, int e) {
        DoubleDouble[] r = new DoubleDouble[count];
        WideDoubleDouble c = WideDoubleDouble.ONE;
        for (int a = 0; a < count; a++) {
            r[a] = c.significand().hi() == 0
                    ? DoubleDouble.ZERO
                    : WideDoubleDouble.of(c.sqrt().significand(), c.sqrt().exponent() - (long) e * a)
                            .toDoubleDouble(0);
            c = a < k ? c.times((double) k - a).dividedBy(a + 1.0) : WideDoubleDouble.ZERO;
        }
        return r;
    }

    /** The relative error of an entry, beside the sum of the moduli of its terms. */
    double rounding() {
        return (DdProducts.gamma(rows * columns) + 4 * (rows + columns + 16) * 0x1p-101) * UP;
    }

    /**
     * Makes the window of order 2k.
     *
     * @param hi the window of order k, high words
     * @param lo low words
     * @param radius its radii
     * @param outHi that of order 2k
     * @param outLo low words
     * @param outRadius radii
     * @return the sum of the squares of the sums of moduli behind each entry
     */
    double of(
            double[][] hi, double[][] lo, double[][] radius, double[][] outHi, double[][] outLo, double[][] outRadius) {
        double[][] eh = new double[rows][columns];
        double[][] el = new double[rows][columns];
        double[][] er = new double[rows][columns];
        for (int a = 0; a < rows; a++) {
            for (int b = 0; b < columns; b++) {
                DoubleDouble f = rowBefore[a].times(columnBefore[b]);
                DoubleDouble e = new DoubleDouble(hi[a][b], lo[a][b]).times(f);
                eh[a][b] = e.hi();
                el[a][b] = e.lo();
                er[a][b] = radius[a][b] * f.hi();
            }
        }
        double[][][] shiftedHigh = shifted(eh);
        double[][][] shiftedLow = shifted(el);
        double square = 0;
        for (int a = 0; a < rows; a++) {
            double[][] left = {joined(eh, a)};
            double[][] leftLow = {joined(el, a)};
            double[][] high = new double[1][columns];
            double[][] low = new double[1][columns];
            DdProducts.addProduct(left, leftLow, stacked(shiftedHigh, a), stacked(shiftedLow, a), 1, high, low);
            double[] moduli = new double[columns];
            double[] radii = new double[columns];
            convolve(eh, er, a, moduli, radii);
            for (int b = 0; b < columns; b++) {
                DoubleDouble f = rowAfter[a].times(columnAfter[b]);
                if (f.hi() == 0) {
                    outHi[a][b] = 0;
                    outLo[a][b] = 0;
                    outRadius[a][b] = 0;
                    continue;
                }
                DoubleDouble c = new DoubleDouble(high[0][b], low[0][b]).dividedBy(f);
                double size = moduli[b] / f.hi();
                outHi[a][b] = c.hi();
                outLo[a][b] = c.lo();
                outRadius[a][b] = (radii[b] / f.hi() + rounding() * size) * UP + UNDERFLOW;
                square += size * size;
            }
        }
        return square * UP;
    }

    /** Rows 0 to a, one after the other. */
    private double[] joined(double[][] e, int a) {
        double[] all = new double[(a + 1) * columns];
        for (int i = 0; i <= a; i++) {
            System.arraycopy(e[i], 0, all, i * columns, columns);
        }
        return all;
    }

    /** Every row moved to the right by every number of columns. */
    private double[][][] shifted(double[][] e) {
        double[][][] s = new double[rows][columns][columns];
        for (int a = 0; a < rows; a++) {
            for (int b = 0; b < columns; b++) {
                System.arraycopy(e[a], 0, s[a][b], b, columns - b);
            }
        }
        return s;
    }

    /** The rows that those of {@link #joined} are multiplied with. */
    private double[][] stacked(double[][][] shifted, int a) {
        double[][] all = new double[(a + 1) * columns][];
        for (int i = 0; i <= a; i++) {
            System.arraycopy(shifted[a - i], 0, all, i * columns, columns);
        }
        return all;
    }

    /** Σ |E||E| and Σ (|E| r + r |E| + r r) for row a. */
    private void convolve(double[][] e, double[][] r, int a, double[] moduli, double[] radii) {
        for (int i = 0; i <= a; i++) {
            double[] x = e[i];
            double[] y = e[a - i];
            double[] rx = r[i];
            double[] ry = r[a - i];
            for (int p = 0; p < columns; p++) {
                double m = Math.abs(x[p]);
                double s = rx[p];
                for (int q = 0; q < columns - p; q++) {
                    double n = Math.abs(y[q]);
                    moduli[p + q] += m * n;
                    radii[p + q] += m * ry[q] + s * (n + ry[q]);
                }
            }
        }
    }
}
