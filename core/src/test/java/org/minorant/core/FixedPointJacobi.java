package org.minorant.core;

import java.math.BigDecimal;
import java.math.BigInteger;

/** Jacobi's method for real symmetric matrices in fixed point: about 320 bits below the largest entry, far faster than decimals. */
final class FixedPointJacobi {

    private static final int BITS = 340;
    /** Off-diagonal entries below 2^(this − BITS) of the largest are left. */
    private static final int SMALL = 18;

    private static final BigInteger ONE = BigInteger.ONE.shiftLeft(BITS);

    private final int n;
    private final BigDecimal scale;
    private final BigInteger[][] m;
    private final BigInteger[][] v;

    FixedPointJacobi(ExactMatrix a) {
        n = a.rows;
        BigDecimal most = a.largest();
        scale = most.signum() == 0 ? BigDecimal.ONE : most;
        m = new BigInteger[n][n];
        v = new BigInteger[n][n];
        BigDecimal one = new BigDecimal(ONE);
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                m[i][j] = a.a[i][j].divide(scale, ExactMatrix.MC).multiply(one).toBigInteger();
                v[i][j] = i == j ? ONE : BigInteger.ZERO;
            }
        }
    }

    BigDecimal[] run(ExactMatrix vectors) {
        boolean rotated = true;
        for (int sweep = 0; sweep < 60 && rotated; sweep++) {
            rotated = false;
            for (int p = 0; p < n - 1; p++) {
                for (int q = p + 1; q < n; q++) {
                    if (m[p][q].bitLength() > SMALL) {
                        rotate(p, q);
                        rotated = true;
                    }
                }
            }
        }
        if (rotated) {
            throw new ArithmeticException("the oracle did not converge");
        }
        BigDecimal one = new BigDecimal(ONE);
        BigDecimal[] values = new BigDecimal[n];
        for (int i = 0; i < n; i++) {
            values[i] = new BigDecimal(m[i][i]).divide(one, ExactMatrix.MC).multiply(scale, ExactMatrix.MC);
            for (int j = 0; vectors != null && j < n; j++) {
                vectors.a[i][j] = new BigDecimal(v[i][j]).divide(one, ExactMatrix.MC);
            }
        }
        return values;
    }

    private void rotate(int p, int q) {
        BigInteger d = m[q][q].subtract(m[p][p]);
        BigInteger o = m[p][q].shiftLeft(1);
        // t = sign(d) |o| … / (|d| + √(d² + o²)), c = 1/√(1 + t²)
        BigInteger root = d.multiply(d).add(o.multiply(o)).sqrt();
        BigInteger t = o.shiftLeft(BITS).divide(d.abs().add(root));
        if (d.signum() < 0) {
            t = t.negate();
        }
        BigInteger norm = ONE.multiply(ONE).add(t.multiply(t)).sqrt();
        BigInteger c = ONE.shiftLeft(BITS).divide(norm);
        BigInteger s = t.multiply(c).shiftRight(BITS);
        for (int k = 0; k < n; k++) {
            mix(m, k, p, q, c, s);
            mix(v, k, p, q, c, s);
        }
        for (int k = 0; k < n; k++) {
            BigInteger x = m[p][k];
            BigInteger y = m[q][k];
            m[p][k] = c.multiply(x).subtract(s.multiply(y)).shiftRight(BITS);
            m[q][k] = s.multiply(x).add(c.multiply(y)).shiftRight(BITS);
        }
        m[p][q] = BigInteger.ZERO;
        m[q][p] = BigInteger.ZERO;
    }

    private static void mix(BigInteger[][] a, int k, int p, int q, BigInteger c, BigInteger s) {
        BigInteger x = a[k][p];
        BigInteger y = a[k][q];
        a[k][p] = c.multiply(x).subtract(s.multiply(y)).shiftRight(BITS);
        a[k][q] = s.multiply(x).add(c.multiply(y)).shiftRight(BITS);
    }
}
