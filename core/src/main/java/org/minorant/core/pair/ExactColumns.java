package org.minorant.core.pair;

import java.math.BigDecimal;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.internal.number.DoubleDouble;

/** Complex columns in exact decimal arithmetic, for the inner products that 32 digits lose to cancellation. */
final class ExactColumns {

    /** Index: row, column. */
    private final BigDecimal[][] re;

    private final BigDecimal[][] im;

    private ExactColumns(BigDecimal[][] re, BigDecimal[][] im) {
        this.re = re;
        this.im = im;
    }

    /** The midpoints of a matrix. */
    static ExactColumns of(EnclosedMatrix m) {
        BigDecimal[][] re = new BigDecimal[m.rows()][m.columns()];
        BigDecimal[][] im = new BigDecimal[m.rows()][m.columns()];
        for (int i = 0; i < m.rows(); i++) {
            for (int j = 0; j < m.columns(); j++) {
                re[i][j] = new DoubleDouble(m.re(i, j), m.reTail(i, j)).toBigDecimal();
                im[i][j] = new DoubleDouble(m.im(i, j), m.imTail(i, j)).toBigDecimal();
            }
        }
        return new ExactColumns(re, im);
    }

    /** These columns combined by the midpoints of a matrix. */
    ExactColumns times(EnclosedMatrix v) {
        ExactColumns w = of(v);
        BigDecimal[][] a = new BigDecimal[re.length][v.columns()];
        BigDecimal[][] b = new BigDecimal[re.length][v.columns()];
        for (int i = 0; i < re.length; i++) {
            for (int j = 0; j < v.columns(); j++) {
                BigDecimal x = BigDecimal.ZERO;
                BigDecimal y = BigDecimal.ZERO;
                for (int k = 0; k < re[i].length; k++) {
                    x = x.add(re[i][k].multiply(w.re[k][j])).subtract(im[i][k].multiply(w.im[k][j]));
                    y = y.add(re[i][k].multiply(w.im[k][j])).add(im[i][k].multiply(w.re[k][j]));
                }
                a[i][j] = x;
                b[i][j] = y;
            }
        }
        return new ExactColumns(a, b);
    }

    /** All inner products with other columns, rounded once. */
    EnclosedMatrix products(ExactColumns other) {
        EnclosedMatrix.Builder b = EnclosedMatrix.builder(re[0].length, other.re[0].length);
        for (int i = 0; i < re[0].length; i++) {
            for (int j = 0; j < other.re[0].length; j++) {
                product(i, other, j, b);
            }
        }
        return b.build();
    }

    /** Sets entry (i, j) to the inner product of column i with column j of others, rounded once. */
    void product(int i, ExactColumns other, int j, EnclosedMatrix.Builder b) {
        BigDecimal x = BigDecimal.ZERO;
        BigDecimal y = BigDecimal.ZERO;
        for (int m = 0; m < re.length; m++) {
            x = x.add(re[m][i].multiply(other.re[m][j])).add(im[m][i].multiply(other.im[m][j]));
            y = y.add(re[m][i].multiply(other.im[m][j])).subtract(im[m][i].multiply(other.re[m][j]));
        }
        DoubleDouble r = DoubleDouble.of(x);
        DoubleDouble s = DoubleDouble.of(y);
        boolean zero = x.signum() == 0 && y.signum() == 0;
        double radius = zero ? 0 : (Math.abs(r.hi()) + Math.abs(s.hi())) * 0x1p-103 + 0x1p-1070;
        b.set(i, j, r.hi(), r.lo(), s.hi(), s.lo(), radius);
    }

    /** The columns rounded to 32 digits. */
    EnclosedMatrix rounded() {
        EnclosedMatrix.Builder b = EnclosedMatrix.builder(re.length, re[0].length);
        for (int i = 0; i < re.length; i++) {
            for (int j = 0; j < re[0].length; j++) {
                DoubleDouble r = DoubleDouble.of(re[i][j]);
                DoubleDouble s = DoubleDouble.of(im[i][j]);
                b.set(i, j, r.hi(), r.lo(), s.hi(), s.lo(), 0);
            }
        }
        return b.build();
    }
}
