package org.minorant.core.pair;

import java.math.BigDecimal;
import java.math.MathContext;
import java.math.RoundingMode;
import java.util.Comparator;
import java.util.stream.IntStream;

/**
 * The spectral decomposition of a small Hermitian matrix of exact decimal numbers, to about 150 digits of its norm.
 *
 * <p><b>Argument.</b> Jacobi's method in 160 digits finds V and Λ. Afterwards A − VΛV* and V*V − 1 are computed exactly; with their Frobenius norms r and δ, and V = QH, Q unitary, H = (V*V)^½,
 * ‖H − 1‖ ≤ δ, we have ‖A − QΛQ*‖_F ≤ r + ‖HΛH − Λ‖_F ≤ r + 2.1 δ‖Λ‖_F. That is {@link #error}; how V and Λ were found does not matter.
 *
 * @param values Λ, descending
 * @param vectors V, one column each
 * @param error a bound on ‖A − QΛQ*‖_F for the unitary Q nearest to V
 * @param defect a bound on ‖V − Q‖_F
 */
record DigitSpectrum(BigDecimal[] values, DigitMatrix vectors, BigDecimal error, BigDecimal defect) {

    static final MathContext DIGITS = new MathContext(160);
    private static final MathContext UP = new MathContext(10, RoundingMode.UP);
    private static final BigDecimal NEGLIGIBLE = new BigDecimal("1e-304");
    private static final BigDecimal TWO = BigDecimal.valueOf(2);
    private static final int MOST_SWEEPS = 40;

    static DigitSpectrum of(DigitMatrix a) {
        int d = a.rows();
        DigitMatrix m = a.rounded(DIGITS);
        DigitMatrix v = DigitMatrix.identity(d);
        BigDecimal least = a.squaredNorm().multiply(NEGLIGIBLE);
        boolean rotated = true;
        for (int sweep = 0; sweep < MOST_SWEEPS && rotated; sweep++) {
            rotated = false;
            for (int p = 0; p < d; p++) {
                for (int q = p + 1; q < d; q++) {
                    if (m.square(p, q).compareTo(least) > 0) {
                        rotate(m, v, p, q);
                        rotated = true;
                    }
                }
            }
        }
        return certified(a, m, v);
    }

    /** One rotation: v_q is turned by the phase that makes the entry (p, q) real, then both so that it vanishes. */
    private static void rotate(DigitMatrix m, DigitMatrix v, int p, int q) {
        BigDecimal size = root(m.square(p, q));
        BigDecimal er = m.re()[p][q].divide(size, DIGITS);
        BigDecimal ei = m.im()[p][q].divide(size, DIGITS).negate();
        BigDecimal tau = m.re()[q][q].subtract(m.re()[p][p]).divide(size.multiply(TWO), DIGITS);
        BigDecimal root = root(tau.multiply(tau).add(BigDecimal.ONE));
        BigDecimal t = BigDecimal.ONE.divide(tau.abs().add(root), DIGITS);
        t = tau.signum() < 0 ? t.negate() : t;
        BigDecimal c = BigDecimal.ONE.divide(root(t.multiply(t).add(BigDecimal.ONE)), DIGITS);
        BigDecimal s = t.multiply(c, DIGITS);
        columns(m, p, q, c, s, er, ei);
        columns(v, p, q, c, s, er, ei);
        rows(m, p, q, c, s, er, ei);
    }

    /** Rounded first: the time for a root grows with the digits it is given. */
    private static BigDecimal root(BigDecimal x) {
        return x.round(DIGITS).sqrt(DIGITS);
    }

    private static void columns(DigitMatrix m, int p, int q, BigDecimal c, BigDecimal s, BigDecimal er, BigDecimal ei) {
        for (int i = 0; i < m.rows(); i++) {
            BigDecimal xr = m.re()[i][p];
            BigDecimal xi = m.im()[i][p];
            BigDecimal yr = m.re()[i][q].multiply(er).subtract(m.im()[i][q].multiply(ei));
            BigDecimal yi = m.re()[i][q].multiply(ei).add(m.im()[i][q].multiply(er));
            m.re()[i][p] = c.multiply(xr).subtract(s.multiply(yr)).round(DIGITS);
            m.im()[i][p] = c.multiply(xi).subtract(s.multiply(yi)).round(DIGITS);
            m.re()[i][q] = s.multiply(xr).add(c.multiply(yr)).round(DIGITS);
            m.im()[i][q] = s.multiply(xi).add(c.multiply(yi)).round(DIGITS);
        }
    }

    private static void rows(DigitMatrix m, int p, int q, BigDecimal c, BigDecimal s, BigDecimal er, BigDecimal ei) {
        for (int i = 0; i < m.columns(); i++) {
            BigDecimal xr = m.re()[p][i];
            BigDecimal xi = m.im()[p][i];
            BigDecimal yr = m.re()[q][i].multiply(er).add(m.im()[q][i].multiply(ei));
            BigDecimal yi = m.im()[q][i].multiply(er).subtract(m.re()[q][i].multiply(ei));
            m.re()[p][i] = c.multiply(xr).subtract(s.multiply(yr)).round(DIGITS);
            m.im()[p][i] = c.multiply(xi).subtract(s.multiply(yi)).round(DIGITS);
            m.re()[q][i] = s.multiply(xr).add(c.multiply(yr)).round(DIGITS);
            m.im()[q][i] = s.multiply(xi).add(c.multiply(yi)).round(DIGITS);
        }
    }

    private static DigitSpectrum certified(DigitMatrix a, DigitMatrix m, DigitMatrix v) {
        int d = a.rows();
        int[] order = IntStream.range(0, d)
                .boxed()
                .sorted(Comparator.comparing((Integer i) -> m.re()[i][i]).reversed())
                .mapToInt(Integer::intValue)
                .toArray();
        BigDecimal[] values = new BigDecimal[d];
        DigitMatrix vectors = DigitMatrix.zero(d, d);
        BigDecimal size = BigDecimal.ZERO;
        for (int j = 0; j < d; j++) {
            values[j] = m.re()[order[j]][order[j]];
            size = size.add(values[j].abs());
            for (int i = 0; i < d; i++) {
                vectors.re()[i][j] = v.re()[i][order[j]];
                vectors.im()[i][j] = v.im()[i][order[j]];
            }
        }
        DigitMatrix back = vectors.scaleColumns(values).times(vectors.adjoint());
        BigDecimal residual = norm(a.minus(back));
        BigDecimal defect = norm(vectors.adjoint().times(vectors).minus(DigitMatrix.identity(d)));
        BigDecimal error = residual.add(new BigDecimal("2.1").multiply(defect).multiply(size));
        return new DigitSpectrum(values, vectors, error.round(UP), defect);
    }

    private static BigDecimal norm(DigitMatrix m) {
        return m.squaredNorm().round(UP).sqrt(new MathContext(12)).round(UP);
    }
}
