package org.minorant.measurement;

import java.math.BigDecimal;
import java.math.MathContext;
import org.minorant.core.HermitianOperator;

/** Real square matrices in decimal arithmetic of a hundred digits: what the tests compare with. */
final class ExactMatrices {

    static final MathContext DIGITS = new MathContext(100);

    private static final BigDecimal HALF = new BigDecimal("0.5");

    private ExactMatrices() {}

    static BigDecimal[][] of(HermitianOperator a, double weight) {
        int n = a.dimension();
        BigDecimal[][] m = new BigDecimal[n][n];
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                m[i][j] = new BigDecimal(a.re(i, j)).multiply(new BigDecimal(weight));
            }
        }
        return m;
    }

    static BigDecimal[][] zero(int n) {
        BigDecimal[][] m = new BigDecimal[n][n];
        for (BigDecimal[] row : m) {
            java.util.Arrays.fill(row, BigDecimal.ZERO);
        }
        return m;
    }

    /** a + weight · b. */
    static BigDecimal[][] plus(BigDecimal[][] a, BigDecimal[][] b, BigDecimal weight) {
        BigDecimal[][] c = zero(a.length);
        for (int i = 0; i < c.length; i++) {
            for (int j = 0; j < c.length; j++) {
                c[i][j] = a[i][j].add(b[i][j].multiply(weight), DIGITS);
            }
        }
        return c;
    }

    static BigDecimal[][] times(BigDecimal[][] a, BigDecimal[][] b) {
        BigDecimal[][] c = zero(a.length);
        for (int i = 0; i < c.length; i++) {
            for (int j = 0; j < c.length; j++) {
                for (int k = 0; k < c.length; k++) {
                    c[i][j] = c[i][j].add(a[i][k].multiply(b[k][j]), DIGITS);
                }
            }
        }
        return c;
    }

    static BigDecimal trace(BigDecimal[][] a) {
        BigDecimal s = BigDecimal.ZERO;
        for (int i = 0; i < a.length; i++) {
            s = s.add(a[i][i]);
        }
        return s;
    }

    /** Gauss and Jordan, with the largest pivot of each column. */
    static BigDecimal[][] inverse(BigDecimal[][] a) {
        int n = a.length;
        BigDecimal[][] m = new BigDecimal[n][];
        BigDecimal[][] v = zero(n);
        for (int i = 0; i < n; i++) {
            m[i] = a[i].clone();
            v[i][i] = BigDecimal.ONE;
        }
        for (int c = 0; c < n; c++) {
            int p = c;
            for (int r = c + 1; r < n; r++) {
                p = m[r][c].abs().compareTo(m[p][c].abs()) > 0 ? r : p;
            }
            BigDecimal[] swap = m[p];
            m[p] = m[c];
            m[c] = swap;
            swap = v[p];
            v[p] = v[c];
            v[c] = swap;
            BigDecimal pivot = BigDecimal.ONE.divide(m[c][c], DIGITS);
            for (int j = 0; j < n; j++) {
                m[c][j] = m[c][j].multiply(pivot, DIGITS);
                v[c][j] = v[c][j].multiply(pivot, DIGITS);
            }
            for (int r = 0; r < n; r++) {
                if (r != c) {
                    BigDecimal f = m[r][c];
                    for (int j = 0; j < n; j++) {
                        m[r][j] = m[r][j].subtract(f.multiply(m[c][j]), DIGITS);
                        v[r][j] = v[r][j].subtract(f.multiply(v[c][j]), DIGITS);
                    }
                }
            }
        }
        return v;
    }

    /** A^(-½) of a positive definite matrix, by the coupled Newton iteration of E. D. Denman and A. N. Beavers (1976). */
    static BigDecimal[][] inverseRoot(BigDecimal[][] a) {
        BigDecimal[][] y = a;
        BigDecimal[][] z = zero(a.length);
        for (int i = 0; i < a.length; i++) {
            z[i][i] = BigDecimal.ONE;
        }
        for (int step = 0; step < 60; step++) {
            BigDecimal[][] next = half(y, inverse(z));
            z = half(z, inverse(y));
            y = next;
        }
        return z;
    }

    private static BigDecimal[][] half(BigDecimal[][] a, BigDecimal[][] b) {
        BigDecimal[][] s = plus(a, b, BigDecimal.ONE);
        return plus(zero(a.length), s, HALF);
    }
}
