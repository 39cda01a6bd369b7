package org.minorant.tests.reference;

import java.math.BigDecimal;
import java.math.BigInteger;
import java.math.MathContext;
import java.util.Arrays;
import org.apfloat.Apfloat;
import org.apfloat.ApfloatMath;
import org.minorant.tests.reference.FixedSpectrum.Decomposition;

/**
 * Divergences of two operators of full rank, divided by their traces, to about fifty digits: eigenvalues λ_i, μ_j and overlaps |⟨u_i,v_j⟩|² in fixed point, logarithms and exponentials
 * by Apfloat. Eigenvalues should be above 1e-20; nothing is certified, but digits are to spare.
 */
public final class ReferenceDivergences {

    private static final int BITS = 384;
    private static final int DIGITS = 60;
    private static final MathContext FIFTY = new MathContext(50);

    private final FixedPoint numbers = new FixedPoint(BITS);
    private final FixedMatrix rho;
    private final Decomposition first;
    private final Decomposition second;
    private final Apfloat[] lambda;
    private final Apfloat[] mu;
    private final Apfloat[] lnLambda;
    private final Apfloat[] lnMu;
    private final Apfloat[][] overlap;

    private ReferenceDivergences(ReferenceOperator a, ReferenceOperator b) {
        rho = scaled(a);
        first = FixedSpectrum.decomposition(rho);
        second = FixedSpectrum.decomposition(scaled(b));
        lambda = numbersOf(first.values());
        mu = numbersOf(second.values());
        lnLambda = logarithms(lambda);
        lnMu = logarithms(mu);
        FixedMatrix product = first.vectors().adjoint().times(second.vectors());
        overlap = new Apfloat[rho.n][rho.n];
        for (int i = 0; i < rho.n; i++) {
            for (int j = 0; j < rho.n; j++) {
                Apfloat x = number(product.re[i][j]);
                Apfloat y = number(product.im[i][j]);
                overlap[i][j] = x.multiply(x).add(y.multiply(y));
            }
        }
    }

    /**
     * The divergences of two operators.
     *
     * @param a ρ
     * @param b σ
     * @return what to ask
     */
    public static ReferenceDivergences of(ReferenceOperator a, ReferenceOperator b) {
        return new ReferenceDivergences(a, b);
    }

    /** A/Tr A: traces are one up to rounding only, and divergences are those of the normalised operators. */
    private FixedMatrix scaled(ReferenceOperator a) {
        FixedMatrix m = a.at(numbers);
        return m.times(numbers.dividedBy(numbers.one(), m.trace()), 0);
    }

    private Apfloat number(BigInteger x) {
        return new Apfloat(numbers.toDecimal(x, 0), DIGITS);
    }

    private Apfloat[] numbersOf(BigInteger[] values) {
        Apfloat[] a = new Apfloat[values.length];
        for (int i = 0; i < a.length; i++) {
            a[i] = number(values[i]);
            if (a[i].signum() <= 0) {
                throw new IllegalArgumentException("an eigenvalue is " + a[i] + "; full rank is asked for");
            }
        }
        return a;
    }

    private static Apfloat[] logarithms(Apfloat[] x) {
        return Arrays.stream(x).map(ApfloatMath::log).toArray(Apfloat[]::new);
    }

    /** x^p for each x, from its logarithm. */
    private static Apfloat[] powers(Apfloat[] ln, Apfloat p) {
        return Arrays.stream(ln).map(l -> ApfloatMath.exp(l.multiply(p))).toArray(Apfloat[]::new);
    }

    private static Apfloat number(double x) {
        return new Apfloat(new BigDecimal(x), DIGITS);
    }

    private static BigDecimal decimal(Apfloat x) {
        return new BigDecimal(x.toString(true)).round(FIFTY);
    }

    /**
     * Tr ρ(ln ρ − ln σ).
     *
     * @return D(ρ‖σ), nats
     */
    public BigDecimal relativeEntropy() {
        return decimal(moment(1));
    }

    /**
     * Tr ρ(ln ρ − ln σ)² − D².
     *
     * @return the variance, nats²
     */
    public BigDecimal variance() {
        Apfloat d = moment(1);
        return decimal(moment(2).subtract(d.multiply(d)));
    }

    /** Σ |⟨u_i,v_j⟩|² λ_i (ln λ_i − ln μ_j)^k. */
    private Apfloat moment(int k) {
        Apfloat s = Apfloat.ZERO;
        for (int i = 0; i < lambda.length; i++) {
            for (int j = 0; j < mu.length; j++) {
                Apfloat difference = lnLambda[i].subtract(lnMu[j]);
                s = s.add(overlap[i][j].multiply(lambda[i]).multiply(ApfloatMath.pow(difference, k)));
            }
        }
        return s;
    }

    /**
     * Tr ρ^s σ^(1−s).
     *
     * @param s any real number
     * @return the quasi-entropy
     */
    public BigDecimal overlap(double s) {
        return decimal(quasi(s));
    }

    private Apfloat quasi(double s) {
        Apfloat p = number(s);
        Apfloat[] x = powers(lnLambda, p);
        Apfloat[] y = powers(lnMu, new Apfloat(1, DIGITS).subtract(p));
        Apfloat sum = Apfloat.ZERO;
        for (int i = 0; i < lambda.length; i++) {
            for (int j = 0; j < mu.length; j++) {
                sum = sum.add(overlap[i][j].multiply(x[i]).multiply(y[j]));
            }
        }
        return sum;
    }

    /**
     * Σ min(p P_ij, (1 − p) Q_ij) of the two Nussbaum–Szkoła distributions P_ij = λ_i |⟨u_i,v_j⟩|², Q_ij = μ_j |⟨u_i,v_j⟩|².
     *
     * @param p the weight on the first
     * @return twice the lower bound on Tr[pρ ∧ (1 − p)σ]
     */
    public BigDecimal nussbaumSzkola(double p) {
        Apfloat a = number(p);
        Apfloat b = new Apfloat(1, DIGITS).subtract(a);
        Apfloat sum = Apfloat.ZERO;
        for (int i = 0; i < lambda.length; i++) {
            for (int j = 0; j < mu.length; j++) {
                Apfloat x = a.multiply(lambda[i]);
                Apfloat y = b.multiply(mu[j]);
                sum = sum.add(overlap[i][j].multiply(x.compareTo(y) < 0 ? x : y));
            }
        }
        return decimal(sum);
    }

    /**
     * ln Tr ρ^α σ^(1−α) / (α − 1).
     *
     * @param alpha the order, not one
     * @return Petz's divergence, nats
     */
    public BigDecimal petz(double alpha) {
        return decimal(ApfloatMath.log(quasi(alpha)).divide(number(alpha).subtract(new Apfloat(1, DIGITS))));
    }

    /**
     * ln Tr (σ^p ρ σ^p)^α / (α − 1), p = (1 − α)/2α.
     *
     * @param alpha the order, positive, not one
     * @return the sandwiched divergence, nats
     */
    public BigDecimal sandwiched(double alpha) {
        Apfloat a = number(alpha);
        Apfloat one = new Apfloat(1, DIGITS);
        Apfloat p = one.subtract(a).divide(a.multiply(number(2)));
        FixedMatrix power = new FixedMatrix(numbers, rho.n);
        Apfloat[] roots = powers(lnMu, p);
        for (int k = 0; k < rho.n; k++) {
            BigInteger w = numbers.of(new BigDecimal(roots[k].toString(true)), 0);
            for (int i = 0; i < rho.n; i++) {
                for (int j = 0; j <= i; j++) {
                    addProduct(power, second.vectors(), w, i, j, k);
                }
            }
        }
        FixedMatrix m = power.times(rho).times(power);
        for (int i = 0; i < rho.n; i++) {
            for (int j = 0; j <= i; j++) {
                m.setHermitian(i, j, m.re[i][j], m.im[i][j]);
            }
        }
        Apfloat s = Apfloat.ZERO;
        for (BigInteger value : FixedSpectrum.values(m)) {
            s = s.add(ApfloatMath.pow(number(value), a));
        }
        return decimal(ApfloatMath.log(s).divide(a.subtract(one)));
    }

    private void addProduct(FixedMatrix sum, FixedMatrix v, BigInteger w, int i, int j, int k) {
        BigInteger x = numbers.times(w, v.re[i][k]);
        BigInteger y = numbers.times(w, v.im[i][k]);
        BigInteger r = numbers.times(x, v.re[j][k]).add(numbers.times(y, v.im[j][k]));
        BigInteger s = numbers.times(y, v.re[j][k]).subtract(numbers.times(x, v.im[j][k]));
        sum.setHermitian(i, j, sum.re[i][j].add(r), sum.im[i][j].add(s));
    }
}
