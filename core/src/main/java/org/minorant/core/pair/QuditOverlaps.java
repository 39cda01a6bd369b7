package org.minorant.core.pair;

import java.math.BigDecimal;
import org.minorant.core.internal.number.DoubleDouble;

/**
 * The overlaps U of two orthonormal bases in double-double, made real by phases of the basis vectors where that is possible. Real and imaginary parts err by at most 2^-104 of themselves and by {@value #ABSOLUTE}.
 *
 * @param re real parts
 * @param im imaginary parts
 */
record QuditOverlaps(DoubleDouble[][] re, DoubleDouble[][] im) {

    /** Below this a part counts as zero. */
    static final double ABSOLUTE = 0x1p-400;

    private static final BigDecimal TINY = new BigDecimal("1e-125");

    /** From overlaps to about 150 digits, whose bases are orthonormal up to the defect. */
    static QuditOverlaps of(DigitMatrix u, BigDecimal defect) {
        if (defect.compareTo(new BigDecimal("1e-130")) > 0) {
            throw new IllegalStateException("eigenvectors with the defect " + defect);
        }
        DigitMatrix v = turned(u);
        int d = v.rows();
        DoubleDouble[][] re = new DoubleDouble[d][d];
        DoubleDouble[][] im = new DoubleDouble[d][d];
        for (int i = 0; i < d; i++) {
            for (int j = 0; j < d; j++) {
                re[i][j] = rounded(v.re()[i][j]);
                im[i][j] = rounded(v.im()[i][j]);
            }
        }
        return new QuditOverlaps(re, im);
    }

    private static DoubleDouble rounded(BigDecimal x) {
        return x.abs().compareTo(TINY) <= 0 ? DoubleDouble.ZERO : DoubleDouble.of(x);
    }

    int dimension() {
        return re.length;
    }

    boolean isReal() {
        for (DoubleDouble[] row : im) {
            for (DoubleDouble x : row) {
                if (x.hi() != 0) {
                    return false;
                }
            }
        }
        return true;
    }

    double modulus(int i, int j) {
        return Math.hypot(re[i][j].hi(), im[i][j].hi());
    }

    /** |U_ij|, to a relative error of 2^-100. */
    DoubleDouble absolute(int i, int j) {
        DoubleDouble x = re[i][j];
        DoubleDouble y = im[i][j];
        return x.times(x).plus(y.times(y)).sqrt();
    }

    /** |U_ij|². */
    double[][] squares() {
        double[][] s = new double[re.length][re.length];
        for (int i = 0; i < s.length; i++) {
            for (int j = 0; j < s.length; j++) {
                s[i][j] = modulus(i, j) * modulus(i, j);
            }
        }
        return s;
    }

    /** Phases of rows and columns that make the entries along a spanning tree of large entries positive: all of them real, if any phases can. */
    private static DigitMatrix turned(DigitMatrix u) {
        int d = u.rows();
        DigitMatrix m = u.rounded(DigitSpectrum.DIGITS);
        boolean[] row = new boolean[d];
        boolean[] column = new boolean[d];
        row[0] = true;
        for (int step = 1; step < 2 * d; step++) {
            int p = -1;
            int q = -1;
            BigDecimal most = BigDecimal.ZERO;
            for (int i = 0; i < d; i++) {
                for (int j = 0; j < d; j++) {
                    if (row[i] != column[j] && m.square(i, j).compareTo(most) > 0) {
                        most = m.square(i, j);
                        p = i;
                        q = j;
                    }
                }
            }
            if (p < 0 || most.compareTo(TINY.multiply(TINY)) <= 0) {
                // another connected component, or nothing
                int free = 0;
                while (free < d && row[free]) {
                    free++;
                }
                if (free < d) {
                    row[free] = true;
                }
                continue;
            }
            BigDecimal size = most.sqrt(DigitSpectrum.DIGITS);
            BigDecimal er = m.re()[p][q].divide(size, DigitSpectrum.DIGITS);
            BigDecimal ei = m.im()[p][q].divide(size, DigitSpectrum.DIGITS).negate();
            for (int k = 0; k < d; k++) {
                turn(m, row[p] ? k : p, row[p] ? q : k, er, ei);
            }
            row[p] = true;
            column[q] = true;
        }
        return m;
    }

    private static void turn(DigitMatrix m, int i, int j, BigDecimal er, BigDecimal ei) {
        BigDecimal x = m.re()[i][j];
        BigDecimal y = m.im()[i][j];
        m.re()[i][j] = x.multiply(er).subtract(y.multiply(ei)).round(DigitSpectrum.DIGITS);
        m.im()[i][j] = x.multiply(ei).add(y.multiply(er)).round(DigitSpectrum.DIGITS);
    }
}
