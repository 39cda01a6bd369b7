package org.minorant.bounds.divergence;

import java.math.BigDecimal;
import java.math.BigInteger;
import java.util.OptionalInt;
import org.minorant.core.EnclosedMatrix;

/**
 * The rank of a matrix of exact numbers, by fraction-free elimination on Gaussian integers (E. H. Bareiss, Math. Comp. 22, 565, 1968; from memory): what no rounding can decide where it
 * is singular.
 */
final class ExactRank {

    /** Limb products worth spending: about a second. */
    private static final double MOST_WORK = 3e8;

    private final BigInteger[][] re;
    private final BigInteger[][] im;

    private ExactRank(BigInteger[][] re, BigInteger[][] im) {
        this.re = re;
        this.im = im;
    }

    /** The rank of the midpoints; empty if finding it would take long. */
    static OptionalInt of(EnclosedMatrix m) {
        int digits = 0;
        for (int i = 0; i < m.rows(); i++) {
            for (int j = 0; j < m.columns(); j++) {
                digits = Math.max(
                        digits,
                        Math.max(
                                number(m, i, j, true).scale(),
                                number(m, i, j, false).scale()));
            }
        }
        // a double with s decimal places is a multiple of 2^-s
        BigDecimal unit = new BigDecimal(BigInteger.TWO.pow(digits));
        BigInteger[][] re = new BigInteger[m.rows()][m.columns()];
        BigInteger[][] im = new BigInteger[m.rows()][m.columns()];
        int bits = 1;
        for (int i = 0; i < m.rows(); i++) {
            for (int j = 0; j < m.columns(); j++) {
                re[i][j] = number(m, i, j, true).multiply(unit).toBigIntegerExact();
                im[i][j] = number(m, i, j, false).multiply(unit).toBigIntegerExact();
                bits = Math.max(bits, Math.max(re[i][j].bitLength(), im[i][j].bitLength()));
            }
        }
        int least = Math.min(m.rows(), m.columns());
        double limbs = 1 + least * (double) bits / 64;
        double work = (double) least * m.rows() * m.columns() * limbs * limbs;
        return work > MOST_WORK ? OptionalInt.empty() : OptionalInt.of(new ExactRank(re, im).rank());
    }

    private static BigDecimal number(EnclosedMatrix m, int i, int j, boolean real) {
        return real
                ? new BigDecimal(m.re(i, j)).add(new BigDecimal(m.reTail(i, j)))
                : new BigDecimal(m.im(i, j)).add(new BigDecimal(m.imTail(i, j)));
    }

    /** Every entry of a step is a minor of the matrix, so that the division by the pivot before leaves no remainder. */
    private int rank() {
        BigInteger pr = BigInteger.ONE;
        BigInteger pi = BigInteger.ZERO;
        int most = Math.min(re.length, re[0].length);
        for (int k = 0; k < most; k++) {
            if (!pivot(k)) {
                return k;
            }
            BigInteger norm = pr.multiply(pr).add(pi.multiply(pi));
            BigInteger qr = re[k][k];
            BigInteger qi = im[k][k];
            for (int i = k + 1; i < re.length; i++) {
                BigInteger fr = re[i][k];
                BigInteger fi = im[i][k];
                for (int j = k + 1; j < re[0].length; j++) {
                    BigInteger x = product(re[i][j], im[i][j], qr, qi).subtract(product(fr, fi, re[k][j], im[k][j]));
                    BigInteger y = cross(re[i][j], im[i][j], qr, qi).subtract(cross(fr, fi, re[k][j], im[k][j]));
                    // times the conjugate of the pivot before, over its squared modulus
                    re[i][j] = product(x, y, pr, pi.negate()).divide(norm);
                    im[i][j] = cross(x, y, pr, pi.negate()).divide(norm);
                }
            }
            pr = qr;
            pi = qi;
        }
        return most;
    }

    /** Brings a nonzero entry to the place (k, k); tells whether there is one. */
    private boolean pivot(int k) {
        for (int i = k; i < re.length; i++) {
            for (int j = k; j < re[0].length; j++) {
                if (re[i][j].signum() != 0 || im[i][j].signum() != 0) {
                    swap(re, k, i, j);
                    swap(im, k, i, j);
                    return true;
                }
            }
        }
        return false;
    }

    /** Exchanges row k with row i and column k with column j. */
    private static void swap(BigInteger[][] a, int k, int i, int j) {
        BigInteger[] row = a[i];
        a[i] = a[k];
        a[k] = row;
        for (BigInteger[] r : a) {
            BigInteger v = r[j];
            r[j] = r[k];
            r[k] = v;
        }
    }

    private static BigInteger product(BigInteger a, BigInteger b, BigInteger c, BigInteger d) {
        return b.signum() == 0 || d.signum() == 0
                ? a.multiply(c)
                : a.multiply(c).subtract(b.multiply(d));
    }

    private static BigInteger cross(BigInteger a, BigInteger b, BigInteger c, BigInteger d) {
        return b.signum() == 0 && d.signum() == 0
                ? BigInteger.ZERO
                : a.multiply(d).add(b.multiply(c));
    }
}
