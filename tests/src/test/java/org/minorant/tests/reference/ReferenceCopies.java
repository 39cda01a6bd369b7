package org.minorant.tests.reference;

import java.math.BigDecimal;
import java.math.BigInteger;

/**
 * Tr[aA^⊗n ∧ bB^⊗n] of two qubit operators, block by block, from their entries alone:
 *
 * <pre>A^⊗n = ⊕_q (det A)^q Sym^k(A) ⊗ 1_m,   k = n − 2q,   m = C(n,q)(k+1)/(n−q+1),   f = Σ_q ½ m (Tr A_q + Tr B_q − ‖A_q − B_q‖₁).</pre>
 *
 * In the normalised monomials √C(k,j) x^(k−j) y^j the entry (i, j) of Sym^k(A) is √(C(k,j)/C(k,i)) times the coefficient of x^(k−i) y^i in
 * (a₀₀x + a₁₀y)^(k−j) (a₀₁x + a₁₁y)^j. No eigenvector, angle or recursion over k is used.
 *
 * <p><b>Error.</b> Entries of A are at most one. Truncations of the polynomials grow at most like (√2)^n in each factor, by √C(k,j) ≤ 2^(n/2) and by m ≤ 2^n, in all by
 * 2^(5n/2) and a power of n; what makes A a positive part errs by 2^{@link FixedSpectrum#GUARD}, which m alone multiplies. So 4n + 128 more bits than a block needs give its
 * entries to 2^-bits. Blocks with their multiplicities have traces of at most one, and FixedSpectrum's bound holds for each.
 */
public final class ReferenceCopies {

    /** Tried in turn until twenty digits of the answer are certain. */
    private static final int[] LADDER = {192, 384, 768, 1536};

    private final int n;
    private final FixedPoint fine;
    private final FixedPoint coarse;

    private ReferenceCopies(int n, int bits) {
        this.n = n;
        this.fine = new FixedPoint(bits + 4 * n + 128);
        this.coarse = new FixedPoint(bits);
    }

    /**
     * Computes Tr[aA^⊗n ∧ bB^⊗n].
     *
     * @param a weight on A, between 0 and 1
     * @param first A, on a qubit, of trace one or nearly
     * @param b weight on B, between 0 and 1
     * @param second B, on a qubit, of trace one or nearly
     * @param n the number of copies, at most 100
     * @return the value; its error is at most 1e-20 of it, or about 2^-1480
     */
    public static Reference of(BigDecimal a, ReferenceOperator first, BigDecimal b, ReferenceOperator second, int n) {
        Reference found = at(LADDER[0], a, first, b, second, n);
        for (int i = 1; i < LADDER.length && !found.isSharp(); i++) {
            found = at(LADDER[i], a, first, b, second, n);
        }
        return found;
    }

    /** The same at a chosen number of bits. */
    static Reference at(
            int bits, BigDecimal a, ReferenceOperator first, BigDecimal b, ReferenceOperator second, int n) {
        ReferenceCopies c = new ReferenceCopies(n, bits);
        return c.sum(c.new Powers(first, a), c.new Powers(second, b));
    }

    private Reference sum(Powers a, Powers b) {
        BigInteger twice = BigInteger.ZERO;
        BigInteger error = BigInteger.ZERO;
        BigInteger least = BigInteger.ONE.shiftLeft(FixedSpectrum.GUARD);
        BigInteger binomial = BigInteger.ONE;
        for (int q = 0; 2 * q <= n; q++) {
            int k = n - 2 * q;
            BigInteger copies = binomial.multiply(BigInteger.valueOf(k + 1L)).divide(BigInteger.valueOf(n - q + 1L));
            FixedMatrix x = a.block(k, q, copies);
            FixedMatrix y = b.block(k, q, copies);
            BigInteger smaller = x.trace().min(y.trace());
            if (smaller.compareTo(least) > 0) {
                twice = twice.add(x.trace()).add(y.trace());
                for (BigInteger value : FixedSpectrum.values(x.minus(y))) {
                    twice = twice.subtract(value.abs());
                }
            }
            // each eigenvalue, and each of the two operators in norm; or the block that is left out, by its smaller
            // trace
            error = error.add(BigInteger.valueOf(3L * (k + 1)).shiftLeft(FixedSpectrum.GUARD));
            binomial = binomial.multiply(BigInteger.valueOf(n - q)).divide(BigInteger.valueOf(q + 1L));
        }
        return new Reference(coarse.toDecimal(twice, -1), coarse.toDecimal(error, -1));
    }

    /** One operator: its weight, its determinant and the powers of both linear forms. */
    private final class Powers {

        private final BigInteger weight;
        private final BigInteger[] determinant;
        /** Coefficients of (a₀₀x + a₁₀y)^j, real and imaginary parts. */
        private final BigInteger[][] leftRe;

        private final BigInteger[][] leftIm;
        /** Those of (a₀₁x + a₁₁y)^j. */
        private final BigInteger[][] rightRe;

        private final BigInteger[][] rightIm;

        Powers(ReferenceOperator operator, BigDecimal w) {
            FixedMatrix m = operator.at(fine);
            int e = operator.exponent();
            BigInteger up = scaled(m.re[0][0], e);
            BigInteger down = scaled(m.re[1][1], e);
            BigInteger re = scaled(m.re[1][0], e);
            BigInteger im = scaled(m.im[1][0], e);
            BigInteger square = re.multiply(re).add(im.multiply(im));
            // a negative determinant is the rounding of a positive part
            BigInteger det =
                    up.multiply(down).subtract(square).max(BigInteger.ZERO).shiftRight(fine.bits());
            weight = fine.of(w, 0);
            determinant = new BigInteger[n / 2 + 1];
            determinant[0] = fine.one();
            for (int q = 1; q < determinant.length; q++) {
                determinant[q] = fine.times(determinant[q - 1], det);
            }
            leftRe = new BigInteger[n + 1][];
            leftIm = new BigInteger[n + 1][];
            rightRe = new BigInteger[n + 1][];
            rightIm = new BigInteger[n + 1][];
            powers(leftRe, leftIm, up, BigInteger.ZERO, re, im);
            powers(rightRe, rightIm, re, im.negate(), down, BigInteger.ZERO);
        }

        private static BigInteger scaled(BigInteger x, int exponent) {
            return exponent >= 0 ? x.shiftLeft(exponent) : x.shiftRight(-exponent);
        }

        /** All powers of (u + iv)x + (s + it)y. */
        private void powers(
                BigInteger[][] pr, BigInteger[][] pi, BigInteger u, BigInteger v, BigInteger s, BigInteger t) {
            pr[0] = new BigInteger[] {fine.one()};
            pi[0] = new BigInteger[] {BigInteger.ZERO};
            for (int j = 1; j <= n; j++) {
                pr[j] = new BigInteger[j + 1];
                pi[j] = new BigInteger[j + 1];
                for (int i = 0; i <= j; i++) {
                    BigInteger r = BigInteger.ZERO;
                    BigInteger m = BigInteger.ZERO;
                    if (i < j) {
                        r = pr[j - 1][i].multiply(u).subtract(pi[j - 1][i].multiply(v));
                        m = pr[j - 1][i].multiply(v).add(pi[j - 1][i].multiply(u));
                    }
                    if (i > 0) {
                        r = r.add(pr[j - 1][i - 1].multiply(s)).subtract(pi[j - 1][i - 1].multiply(t));
                        m = m.add(pr[j - 1][i - 1].multiply(t)).add(pi[j - 1][i - 1].multiply(s));
                    }
                    pr[j][i] = r.shiftRight(fine.bits());
                    pi[j][i] = m.shiftRight(fine.bits());
                }
            }
        }

        /** w m (det A)^q Sym^k(A), in the coarse numbers. */
        FixedMatrix block(int k, int q, BigInteger copies) {
            BigInteger factor = fine.times(weight, determinant[q]).multiply(copies);
            BigInteger[] root = roots(k);
            FixedMatrix m = new FixedMatrix(coarse, k + 1);
            int drop = 2 * fine.bits() - coarse.bits();
            for (int j = 0; j <= k; j++) {
                BigInteger column = fine.times(factor, root[j]);
                for (int i = j; i <= k; i++) {
                    BigInteger r = BigInteger.ZERO;
                    BigInteger s = BigInteger.ZERO;
                    for (int h = Math.max(0, i - j); h <= Math.min(i, k - j); h++) {
                        BigInteger lr = leftRe[k - j][h];
                        BigInteger li = leftIm[k - j][h];
                        BigInteger rr = rightRe[j][i - h];
                        BigInteger ri = rightIm[j][i - h];
                        r = r.add(lr.multiply(rr)).subtract(li.multiply(ri));
                        s = s.add(lr.multiply(ri)).add(li.multiply(rr));
                    }
                    m.setHermitian(i, j, entry(r, column, root[i], drop), entry(s, column, root[i], drop));
                }
            }
            return m;
        }

        private BigInteger entry(BigInteger product, BigInteger column, BigInteger row, int drop) {
            BigInteger x = product.shiftRight(fine.bits()).multiply(column);
            return fine.dividedBy(x, row).shiftRight(drop);
        }
    }

    /** √C(k,j) for all j. */
    private BigInteger[] roots(int k) {
        BigInteger[] root = new BigInteger[k + 1];
        BigInteger binomial = BigInteger.ONE;
        for (int j = 0; j <= k; j++) {
            root[j] = binomial.shiftLeft(2 * fine.bits()).sqrt();
            binomial = binomial.multiply(BigInteger.valueOf(k - j)).divide(BigInteger.valueOf(j + 1L));
        }
        return root;
    }
}
