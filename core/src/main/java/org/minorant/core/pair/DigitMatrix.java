package org.minorant.core.pair;

import java.math.BigDecimal;
import java.math.MathContext;
import java.util.Arrays;

/**
 * A small complex matrix of decimal numbers. Products and differences are exact.
 *
 * @param re real parts
 * @param im imaginary parts
 */
record DigitMatrix(BigDecimal[][] re, BigDecimal[][] im) {

    static DigitMatrix zero(int rows, int columns) {
        return new DigitMatrix(zeros(rows, columns), zeros(rows, columns));
    }

    static DigitMatrix identity(int n) {
        DigitMatrix m = zero(n, n);
        for (int i = 0; i < n; i++) {
            m.re[i][i] = BigDecimal.ONE;
        }
        return m;
    }

    private static BigDecimal[][] zeros(int rows, int columns) {
        BigDecimal[][] z = new BigDecimal[rows][columns];
        for (BigDecimal[] row : z) {
            Arrays.fill(row, BigDecimal.ZERO);
        }
        return z;
    }

    int rows() {
        return re.length;
    }

    int columns() {
        return re[0].length;
    }

    DigitMatrix adjoint() {
        DigitMatrix t = zero(columns(), rows());
        for (int i = 0; i < rows(); i++) {
            for (int j = 0; j < columns(); j++) {
                t.re[j][i] = re[i][j];
                t.im[j][i] = im[i][j].negate();
            }
        }
        return t;
    }

    DigitMatrix times(DigitMatrix o) {
        DigitMatrix p = zero(rows(), o.columns());
        for (int i = 0; i < rows(); i++) {
            for (int j = 0; j < o.columns(); j++) {
                for (int k = 0; k < columns(); k++) {
                    p.re[i][j] = p.re[i][j].add(re[i][k].multiply(o.re[k][j])).subtract(im[i][k].multiply(o.im[k][j]));
                    p.im[i][j] = p.im[i][j].add(re[i][k].multiply(o.im[k][j])).add(im[i][k].multiply(o.re[k][j]));
                }
            }
        }
        return p;
    }

    DigitMatrix minus(DigitMatrix o) {
        DigitMatrix d = zero(rows(), columns());
        for (int i = 0; i < rows(); i++) {
            for (int j = 0; j < columns(); j++) {
                d.re[i][j] = re[i][j].subtract(o.re[i][j]);
                d.im[i][j] = im[i][j].subtract(o.im[i][j]);
            }
        }
        return d;
    }

    /** The matrix with every column multiplied by a real number. */
    DigitMatrix scaleColumns(BigDecimal[] by) {
        DigitMatrix s = zero(rows(), columns());
        for (int i = 0; i < rows(); i++) {
            for (int j = 0; j < columns(); j++) {
                s.re[i][j] = re[i][j].multiply(by[j]);
                s.im[i][j] = im[i][j].multiply(by[j]);
            }
        }
        return s;
    }

    DigitMatrix rounded(MathContext digits) {
        DigitMatrix r = zero(rows(), columns());
        for (int i = 0; i < rows(); i++) {
            for (int j = 0; j < columns(); j++) {
                r.re[i][j] = re[i][j].round(digits);
                r.im[i][j] = im[i][j].round(digits);
            }
        }
        return r;
    }

    /** |entry|², exactly. */
    BigDecimal square(int i, int j) {
        return re[i][j].multiply(re[i][j]).add(im[i][j].multiply(im[i][j]));
    }

    /** The squared Frobenius norm, exactly. */
    BigDecimal squaredNorm() {
        BigDecimal s = BigDecimal.ZERO;
        for (int i = 0; i < rows(); i++) {
            for (int j = 0; j < columns(); j++) {
                s = s.add(square(i, j));
            }
        }
        return s;
    }
}
