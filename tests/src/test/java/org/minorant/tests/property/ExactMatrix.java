package org.minorant.tests.property;

import java.math.BigDecimal;
import java.util.Arrays;
import org.minorant.core.DensityOperator;
import org.minorant.core.Operator;
import org.minorant.core.PositiveOperator;

/**
 * A complex matrix of doubles whose arithmetic is exact or refuses: the entries are short binary fractions.
 *
 * @param re real parts
 * @param im imaginary parts
 */
record ExactMatrix(double[][] re, double[][] im) {

    ExactMatrix(int rows, int columns) {
        this(new double[rows][columns], new double[rows][columns]);
    }

    static ExactMatrix identity(int n) {
        ExactMatrix m = new ExactMatrix(n, n);
        for (int i = 0; i < n; i++) {
            m.re[i][i] = 1;
        }
        return m;
    }

    int rows() {
        return re.length;
    }

    int columns() {
        return re[0].length;
    }

    ExactMatrix times(ExactMatrix other) {
        ExactMatrix c = new ExactMatrix(rows(), other.columns());
        for (int i = 0; i < rows(); i++) {
            for (int j = 0; j < other.columns(); j++) {
                BigDecimal r = BigDecimal.ZERO;
                BigDecimal s = BigDecimal.ZERO;
                for (int k = 0; k < columns(); k++) {
                    r = r.add(product(re[i][k], other.re[k][j])).subtract(product(im[i][k], other.im[k][j]));
                    s = s.add(product(re[i][k], other.im[k][j])).add(product(im[i][k], other.re[k][j]));
                }
                c.re[i][j] = exact(r);
                c.im[i][j] = exact(s);
            }
        }
        return c;
    }

    private static BigDecimal product(double a, double b) {
        return a == 0 || b == 0 ? BigDecimal.ZERO : new BigDecimal(a).multiply(new BigDecimal(b));
    }

    /** The double with this value; a test whose numbers grew too long must say so instead of rounding. */
    static double exact(BigDecimal value) {
        double d = value.doubleValue();
        if (new BigDecimal(d).compareTo(value) != 0) {
            throw new IllegalStateException(value + " is no double: the test's numbers are too long");
        }
        return d;
    }

    ExactMatrix plus(ExactMatrix other) {
        return combine(other, 1);
    }

    ExactMatrix minus(ExactMatrix other) {
        return combine(other, -1);
    }

    private ExactMatrix combine(ExactMatrix other, int sign) {
        ExactMatrix c = new ExactMatrix(rows(), columns());
        for (int i = 0; i < rows(); i++) {
            for (int j = 0; j < columns(); j++) {
                c.re[i][j] = exact(new BigDecimal(re[i][j]).add(new BigDecimal(sign * other.re[i][j])));
                c.im[i][j] = exact(new BigDecimal(im[i][j]).add(new BigDecimal(sign * other.im[i][j])));
            }
        }
        return c;
    }

    ExactMatrix scaleColumns(double... factors) {
        ExactMatrix d = new ExactMatrix(factors.length, factors.length);
        for (int i = 0; i < factors.length; i++) {
            d.re[i][i] = factors[i];
        }
        return times(d);
    }

    ExactMatrix scaleColumnsBy(Spectrum spectrum, java.util.Random random) {
        return scaleColumns(spectrum.roots(random, columns()));
    }

    ExactMatrix times(double factor) {
        double[] f = new double[columns()];
        Arrays.fill(f, factor);
        return scaleColumns(f);
    }

    ExactMatrix adjoint() {
        return transpose().conjugate();
    }

    ExactMatrix transpose() {
        ExactMatrix c = new ExactMatrix(columns(), rows());
        for (int i = 0; i < rows(); i++) {
            for (int j = 0; j < columns(); j++) {
                c.re[j][i] = re[i][j];
                c.im[j][i] = im[i][j];
            }
        }
        return c;
    }

    ExactMatrix conjugate() {
        ExactMatrix c = new ExactMatrix(rows(), columns());
        for (int i = 0; i < rows(); i++) {
            for (int j = 0; j < columns(); j++) {
                c.re[i][j] = re[i][j];
                c.im[i][j] = im[i][j] == 0 ? 0 : -im[i][j];
            }
        }
        return c;
    }

    /** The columns of both, side by side: the factor of a sum. */
    ExactMatrix beside(ExactMatrix other) {
        ExactMatrix c = new ExactMatrix(rows(), columns() + other.columns());
        for (int i = 0; i < rows(); i++) {
            System.arraycopy(re[i], 0, c.re[i], 0, columns());
            System.arraycopy(im[i], 0, c.im[i], 0, columns());
            System.arraycopy(other.re[i], 0, c.re[i], columns(), other.columns());
            System.arraycopy(other.im[i], 0, c.im[i], columns(), other.columns());
        }
        return c;
    }

    /** The block-diagonal matrix of both. */
    ExactMatrix directSum(ExactMatrix other) {
        ExactMatrix above = new ExactMatrix(rows() + other.rows(), columns());
        ExactMatrix below = new ExactMatrix(rows() + other.rows(), other.columns());
        for (int i = 0; i < rows(); i++) {
            above.re[i] = re[i].clone();
            above.im[i] = im[i].clone();
        }
        for (int i = 0; i < other.rows(); i++) {
            below.re[rows() + i] = other.re[i].clone();
            below.im[rows() + i] = other.im[i].clone();
        }
        return above.beside(below);
    }

    /** Rows first..first+count−1. */
    ExactMatrix rowBlock(int first, int count) {
        return new ExactMatrix(
                Arrays.copyOfRange(re, first, first + count), Arrays.copyOfRange(im, first, first + count));
    }

    ExactMatrix firstColumns(int count) {
        return transpose().rowBlock(0, count).transpose();
    }

    BigDecimal trace() {
        BigDecimal s = BigDecimal.ZERO;
        for (int i = 0; i < rows(); i++) {
            s = s.add(new BigDecimal(re[i][i]));
        }
        return s;
    }

    /** ‖this‖²_F. */
    BigDecimal squares() {
        BigDecimal s = BigDecimal.ZERO;
        for (int i = 0; i < rows(); i++) {
            for (int j = 0; j < columns(); j++) {
                s = s.add(product(re[i][j], re[i][j])).add(product(im[i][j], im[i][j]));
            }
        }
        return s;
    }

    /** XX* of this X. */
    PositiveOperator asFactor() {
        return PositiveOperator.ofFactor(Operator.of(re, im));
    }

    PositiveOperator asEntries() {
        return PositiveOperator.of(re, im);
    }

    DensityOperator asState() {
        return DensityOperator.of(re, im);
    }
}
