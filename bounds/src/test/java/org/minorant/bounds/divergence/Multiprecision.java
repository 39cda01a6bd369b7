package org.minorant.bounds.divergence;

import java.math.BigDecimal;
import java.math.MathContext;
import org.hipparchus.dfp.Dfp;
import org.hipparchus.dfp.DfpField;

/**
 * Hermitian matrices in arithmetic of 60 digits (Hipparchus' decimal numbers), diagonalised by cyclic Jacobi rotations: the independent reference of these
 * tests. It shares
 * no code and no method with the library, and decides no rank.
 */
final class Multiprecision {

    private static final DfpField FIELD = new DfpField(64);

    static final Dfp ZERO = FIELD.getZero();

    static final Dfp ONE = FIELD.getOne();

    private static final int MOST_SWEEPS = 15;

    /** Off-diagonal entries are left at 1e-58 of the norm. */
    private static final Dfp SMALL = FIELD.newDfp("1e-116");

    private Multiprecision() {}

    static Dfp number(double x) {
        return number(new BigDecimal(x));
    }

    /** The parser takes at most as many digits as the field has. */
    static Dfp number(BigDecimal x) {
        BigDecimal rounded = x.round(new MathContext(60));
        return FIELD.newDfp(rounded.unscaledValue() + "e" + -rounded.scale());
    }

    static BigDecimal decimal(Dfp x) {
        return new BigDecimal(x.toString());
    }

    /** x^p for x ≥ 0, with 0^p = 0. */
    static Dfp power(Dfp x, Dfp p) {
        return isPositive(x) ? p.multiply(x.log()).exp() : ZERO;
    }

    static boolean isPositive(Dfp x) {
        return x.greaterThan(ZERO);
    }

    /** A complex matrix, re[i][j] + i im[i][j]. */
    record Matrix(Dfp[][] re, Dfp[][] im) {

        int rows() {
            return re.length;
        }

        int columns() {
            return re[0].length;
        }

        static Matrix zero(int rows, int columns) {
            Dfp[][] r = new Dfp[rows][columns];
            Dfp[][] m = new Dfp[rows][columns];
            for (int i = 0; i < rows; i++) {
                java.util.Arrays.fill(r[i], ZERO);
                java.util.Arrays.fill(m[i], ZERO);
            }
            return new Matrix(r, m);
        }

        Matrix adjoint() {
            Matrix t = zero(columns(), rows());
            for (int i = 0; i < rows(); i++) {
                for (int j = 0; j < columns(); j++) {
                    t.re[j][i] = re[i][j];
                    t.im[j][i] = im[i][j].negate();
                }
            }
            return t;
        }

        Matrix times(Matrix o) {
            Matrix c = zero(rows(), o.columns());
            for (int i = 0; i < rows(); i++) {
                for (int j = 0; j < o.columns(); j++) {
                    Dfp x = ZERO;
                    Dfp y = ZERO;
                    for (int k = 0; k < columns(); k++) {
                        x = x.add(re[i][k].multiply(o.re[k][j])).subtract(im[i][k].multiply(o.im[k][j]));
                        y = y.add(re[i][k].multiply(o.im[k][j])).add(im[i][k].multiply(o.re[k][j]));
                    }
                    c.re[i][j] = x;
                    c.im[i][j] = y;
                }
            }
            return c;
        }

        /** This times the diagonal matrix of some numbers. */
        Matrix scaled(Dfp[] d) {
            Matrix c = zero(rows(), columns());
            for (int i = 0; i < rows(); i++) {
                for (int j = 0; j < columns(); j++) {
                    c.re[i][j] = re[i][j].multiply(d[j]);
                    c.im[i][j] = im[i][j].multiply(d[j]);
                }
            }
            return c;
        }

        Dfp squaredModulus(int i, int j) {
            return re[i][j].multiply(re[i][j]).add(im[i][j].multiply(im[i][j]));
        }
    }

    /** Eigenvalues and, as columns, eigenvectors. */
    record Spectrum(Dfp[] values, Matrix vectors) {}

    static Spectrum diagonalise(Matrix hermitian) {
        int n = hermitian.rows();
        Matrix a = Matrix.zero(n, n);
        for (int i = 0; i < n; i++) {
            a.re[i] = hermitian.re[i].clone();
            a.im[i] = hermitian.im[i].clone();
        }
        // by column, so that a rotation works on two rows
        Matrix v = identity(n);
        Dfp least = SMALL.multiply(norm2(a));
        boolean rotated = true;
        for (int sweep = 0; sweep < MOST_SWEEPS && rotated; sweep++) {
            rotated = false;
            for (int p = 0; p < n; p++) {
                for (int q = p + 1; q < n; q++) {
                    if (a.squaredModulus(p, q).greaterThan(least)) {
                        rotate(a, v, p, q);
                        rotated = true;
                    }
                }
            }
        }
        Dfp[] values = new Dfp[n];
        for (int i = 0; i < n; i++) {
            values[i] = a.re[i][i];
        }
        return new Spectrum(values, v.adjoint());
    }

    private static Dfp norm2(Matrix a) {
        Dfp s = ZERO;
        for (int i = 0; i < a.rows(); i++) {
            for (int j = 0; j < a.columns(); j++) {
                s = s.add(a.squaredModulus(i, j));
            }
        }
        return s;
    }

    private static Matrix identity(int n) {
        Matrix e = Matrix.zero(n, n);
        for (int i = 0; i < n; i++) {
            e.re[i][i] = ONE;
        }
        return e;
    }

    /**
     * Annihilates entry (p, q) by the unitary with columns (c, −w̄) and (w, c), where |w| = s, tan 2θ = 2|a_pq| / (a_qq − a_pp); v holds
     * the conjugate transposes of
     * the eigenvectors in its rows.
     */
    private static void rotate(Matrix a, Matrix v, int p, int q) {
        Dfp modulus = a.squaredModulus(p, q).sqrt();
        Dfp tau = a.re[q][q].subtract(a.re[p][p]).divide(modulus.multiply(number(2)));
        Dfp root = ONE.add(tau.multiply(tau)).sqrt();
        Dfp t = !tau.lessThan(ZERO) ? ONE.divide(tau.add(root)) : ONE.negate().divide(root.subtract(tau));
        Dfp c = ONE.divide(ONE.add(t.multiply(t)).sqrt());
        Dfp scale = t.multiply(c).divide(modulus);
        Dfp x = a.re[p][q].multiply(scale);
        Dfp y = a.im[p][q].multiply(scale);
        mix(a, p, q, c, x, y);
        mix(v, p, q, c, x, y);
        Matrix b = a.adjoint();
        mix(b, p, q, c, x, y);
        for (int i = 0; i < a.rows(); i++) {
            a.re[i] = b.re[i];
            a.im[i] = b.im[i];
        }
    }

    /** Rows p and q of R* m: c m_p − w m_q and w̄ m_p + c m_q with w = x + iy. */
    private static void mix(Matrix m, int p, int q, Dfp c, Dfp x, Dfp y) {
        for (int k = 0; k < m.columns(); k++) {
            Dfp a = m.re[p][k];
            Dfp b = m.im[p][k];
            Dfp d = m.re[q][k];
            Dfp e = m.im[q][k];
            m.re[p][k] = c.multiply(a).subtract(x.multiply(d)).add(y.multiply(e));
            m.im[p][k] = c.multiply(b).subtract(x.multiply(e)).subtract(y.multiply(d));
            m.re[q][k] = c.multiply(d).add(x.multiply(a)).add(y.multiply(b));
            m.im[q][k] = c.multiply(e).add(x.multiply(b)).subtract(y.multiply(a));
        }
    }
}
