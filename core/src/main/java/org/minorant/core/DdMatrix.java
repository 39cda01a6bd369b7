package org.minorant.core;

import org.minorant.core.internal.dd.DdProducts;
import org.minorant.core.internal.number.DoubleDouble;

/**
 * A complex matrix of double-doubles without radii, for iterations whose outcome is verified afterwards.
 *
 * @param rh leading real parts, by rows
 * @param rl trailing real parts
 * @param ih leading imaginary parts; no rows if the matrix is real
 * @param il trailing imaginary parts
 */
record DdMatrix(double[][] rh, double[][] rl, double[][] ih, double[][] il) {

    private static DdMatrix zero(int rows, int columns, boolean real) {
        return new DdMatrix(
                new double[rows][columns],
                new double[rows][columns],
                new double[real ? 0 : rows][columns],
                new double[real ? 0 : rows][columns]);
    }

    /** The midpoints of an enclosed matrix. */
    static DdMatrix of(EnclosedMatrix a) {
        DdMatrix m = zero(a.rows(), a.columns(), a.isReal());
        for (int i = 0; i < a.rows(); i++) {
            for (int j = 0; j < a.columns(); j++) {
                m.rh[i][j] = a.re(i, j);
                m.rl[i][j] = a.reTail(i, j);
                if (!a.isReal()) {
                    m.ih[i][j] = a.im(i, j);
                    m.il[i][j] = a.imTail(i, j);
                }
            }
        }
        return m;
    }

    /** An operator, exactly. */
    static DdMatrix of(Operator a) {
        DdMatrix m = zero(a.rows(), a.columns(), a.isReal());
        for (int i = 0; i < a.rows(); i++) {
            for (int j = 0; j < a.columns(); j++) {
                m.rh[i][j] = a.re(i, j);
                if (!a.isReal()) {
                    m.ih[i][j] = a.im(i, j);
                }
            }
        }
        return m;
    }

    private int rows() {
        return rh.length;
    }

    private int columns() {
        return rh[0].length;
    }

    boolean isReal() {
        return ih.length == 0;
    }

    /** The conjugate transpose. */
    DdMatrix adjoint() {
        return new DdMatrix(transposed(rh, 1), transposed(rl, 1), transposed(ih, -1), transposed(il, -1));
    }

    private static double[][] transposed(double[][] a, double sign) {
        double[][] t = new double[a.length == 0 ? 0 : a[0].length][a.length];
        for (int i = 0; i < a.length; i++) {
            for (int j = 0; j < t.length; j++) {
                t[j][i] = sign * a[i][j];
            }
        }
        return t;
    }

    /** The product; zeros of this matrix save time. */
    DdMatrix times(DdMatrix b) {
        DdMatrix c = zero(rows(), b.columns(), isReal() && b.isReal());
        for (int i = 0; i < rows(); i++) {
            addRow(i, b, c, b.columns());
        }
        return c;
    }

    /** The product where it is Hermitian: half of it is computed. */
    DdMatrix timesToHermitian(DdMatrix b) {
        DdMatrix c = zero(rows(), b.columns(), isReal() && b.isReal());
        for (int i = 0; i < rows(); i++) {
            addRow(i, b, c, i + 1);
            for (int j = 0; j < i; j++) {
                c.rh[j][i] = c.rh[i][j];
                c.rl[j][i] = c.rl[i][j];
                if (!c.isReal()) {
                    c.ih[j][i] = -c.ih[i][j];
                    c.il[j][i] = -c.il[i][j];
                }
            }
            if (!c.isReal()) {
                c.ih[i][i] = 0;
                c.il[i][i] = 0;
            }
        }
        return c;
    }

    private void addRow(int i, DdMatrix b, DdMatrix c, int length) {
        DdProducts.addRow(rh[i], rl[i], b.rh, b.rl, 1, c.rh[i], c.rl[i], length);
        if (!isReal()) {
            DdProducts.addRow(ih[i], il[i], b.rh, b.rl, 1, c.ih[i], c.il[i], length);
        }
        if (!b.isReal()) {
            DdProducts.addRow(rh[i], rl[i], b.ih, b.il, 1, c.ih[i], c.il[i], length);
        }
        if (!isReal() && !b.isReal()) {
            DdProducts.addRow(ih[i], il[i], b.ih, b.il, -1, c.rh[i], c.rl[i], length);
        }
    }

    /** This plus a small operator, given in double. */
    DdMatrix plus(Operator small) {
        DdMatrix c = zero(rows(), columns(), isReal() && small.isReal());
        for (int i = 0; i < rows(); i++) {
            for (int j = 0; j < columns(); j++) {
                DoubleDouble x = new DoubleDouble(rh[i][j], rl[i][j]).plus(DoubleDouble.of(small.re(i, j)));
                c.rh[i][j] = x.hi();
                c.rl[i][j] = x.lo();
                if (!c.isReal()) {
                    DoubleDouble y = isReal() ? DoubleDouble.ZERO : new DoubleDouble(ih[i][j], il[i][j]);
                    y = y.plus(DoubleDouble.of(small.im(i, j)));
                    c.ih[i][j] = y.hi();
                    c.il[i][j] = y.lo();
                }
            }
        }
        return c;
    }

    /** 1 − this, rounded to double after the subtraction. */
    Operator fromIdentity() {
        int n = rows();
        double[] re = new double[n * n];
        double[] im = new double[isReal() ? 0 : n * n];
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                re[i * n + j] = ((i == j ? 1 : 0) - rh[i][j]) - rl[i][j];
                if (im.length != 0) {
                    im[i * n + j] = -ih[i][j];
                }
            }
        }
        return new Operator(n, n, re, im);
    }

    /** The leading parts. */
    Operator leading() {
        double[] re = new double[rows() * columns()];
        double[] im = new double[isReal() ? 0 : re.length];
        for (int i = 0; i < rows(); i++) {
            System.arraycopy(rh[i], 0, re, i * columns(), columns());
            if (im.length != 0) {
                System.arraycopy(ih[i], 0, im, i * columns(), columns());
            }
        }
        return new Operator(rows(), columns(), re, im);
    }

    /** The same, taken as exact, with its columns in the given order. */
    EnclosedMatrix exact(int[] order) {
        EnclosedMatrix.Builder w = EnclosedMatrix.builder(rows(), columns());
        for (int j = 0; j < order.length; j++) {
            int k = order[j];
            for (int i = 0; i < rows(); i++) {
                w.set(i, j, rh[i][k], rl[i][k], isReal() ? 0 : ih[i][k], isReal() ? 0 : il[i][k], 0);
            }
        }
        return w.build();
    }
}
