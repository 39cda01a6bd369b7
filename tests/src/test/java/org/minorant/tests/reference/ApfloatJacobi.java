package org.minorant.tests.reference;

import java.math.BigDecimal;
import java.math.BigInteger;
import org.apfloat.Apfloat;
import org.apfloat.ApfloatMath;

/**
 * Eigenvalues of a complex Hermitian matrix by cyclic Jacobi rotations on a general-purpose arbitrary-precision library: slower than {@link
 * FixedSpectrum} by far, and in nothing like it, which is what it is for.
 */
final class ApfloatJacobi {

    private final int digits;
    private final int n;
    private final Apfloat[][] re;
    private final Apfloat[][] im;

    private ApfloatJacobi(FixedMatrix m, int digits) {
        this.digits = digits;
        n = m.n;
        re = new Apfloat[n][n];
        im = new Apfloat[n][n];
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                re[i][j] = convert(m, m.re[i][j]);
                im[i][j] = convert(m, m.im[i][j]);
            }
        }
    }

    private Apfloat convert(FixedMatrix m, BigInteger x) {
        return new Apfloat(m.numbers.toDecimal(x, 0), digits);
    }

    /** The sum of the magnitudes of the eigenvalues. */
    static BigDecimal traceNorm(FixedMatrix m, int digits) {
        ApfloatJacobi j = new ApfloatJacobi(m, digits);
        j.sweep();
        Apfloat s = Apfloat.ZERO;
        for (int i = 0; i < j.n; i++) {
            s = s.add(ApfloatMath.abs(j.re[i][i]));
        }
        return new BigDecimal(s.toString(true));
    }

    private void sweep() {
        Apfloat small = ApfloatMath.pow(new Apfloat(10, digits), -(digits - 5L));
        for (int sweeps = 0; sweeps < 40; sweeps++) {
            boolean rotated = false;
            for (int p = 0; p < n; p++) {
                for (int q = p + 1; q < n; q++) {
                    Apfloat size = modulus(re[p][q], im[p][q]);
                    if (size.compareTo(small) > 0) {
                        rotate(p, q, size);
                        rotated = true;
                    }
                }
            }
            if (!rotated) {
                return;
            }
        }
        throw new IllegalStateException("no convergence");
    }

    private static Apfloat modulus(Apfloat x, Apfloat y) {
        return ApfloatMath.sqrt(x.multiply(x).add(y.multiply(y)));
    }

    private void rotate(int p, int q, Apfloat size) {
        Apfloat ur = re[p][q].divide(size);
        Apfloat ui = im[p][q].divide(size);
        Apfloat two = new Apfloat(2, digits);
        Apfloat one = new Apfloat(1, digits);
        Apfloat theta = re[q][q].subtract(re[p][p]).divide(two.multiply(size));
        Apfloat root = ApfloatMath.sqrt(theta.multiply(theta).add(one));
        Apfloat t = one.divide(ApfloatMath.abs(theta).add(root));
        t = theta.signum() < 0 ? t.negate() : t;
        Apfloat c = one.divide(ApfloatMath.sqrt(t.multiply(t).add(one)));
        Apfloat s = t.multiply(c);
        Apfloat sr = s.multiply(ur);
        Apfloat si = s.multiply(ui);
        for (int k = 0; k < n; k++) {
            // columns: x_p' = c x_p − s ū x_q,  x_q' = s u x_p + c x_q
            combine(k, p, k, q, c, sr, si);
        }
        for (int k = 0; k < n; k++) {
            combine(p, k, q, k, c, sr, si.negate());
        }
    }

    private void combine(int pi, int pj, int qi, int qj, Apfloat c, Apfloat sr, Apfloat si) {
        Apfloat xr = re[pi][pj];
        Apfloat xi = im[pi][pj];
        Apfloat yr = re[qi][qj];
        Apfloat yi = im[qi][qj];
        re[pi][pj] = c.multiply(xr).subtract(sr.multiply(yr)).subtract(si.multiply(yi));
        im[pi][pj] = c.multiply(xi).subtract(sr.multiply(yi)).add(si.multiply(yr));
        re[qi][qj] = sr.multiply(xr).subtract(si.multiply(xi)).add(c.multiply(yr));
        im[qi][qj] = sr.multiply(xi).add(si.multiply(xr)).add(c.multiply(yi));
    }
}
