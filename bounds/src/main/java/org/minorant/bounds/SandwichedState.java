package org.minorant.bounds;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.minorant.core.Operator;
import org.minorant.core.SpectralDecomposition;

/**
 * The output state that is the best for an input at a sandwiched order above one, in double, not certified: a solution of
 *
 * <pre>σ^(1+u) ∝ K(σ) = Σ_x P(x) W_x^½ (W_x^½ σ^(−u) W_x^½)^(α−1) W_x^½.</pre>
 *
 * <p>Iterated as σ ← (σ^(v/2) K σ^(v/2))^(1/(1+u+v)) with v = u(α−1). To first order K answers a change of ln σ by −v times it where all commute, so that one step is enough there, and by less elsewhere, so that an error
 * shrinks at least by v/(1+u+v) in every step and does not change its sign.
 *
 * @param sigma σ
 * @param traces Q_x = Tr (W_x^½ σ^(−u) W_x^½)^α over a factor that keeps them in range
 * @param lnScale the logarithm of that factor
 * @param norm (1/α) ln Σ P(x) Q_x
 * @param certificates R_x with R_x R_x* ∝ P(x)^u (X_x* σ^(−u) X_x)^(α−1) for the columns X_x of the letters
 */
record SandwichedState(Operator sigma, double[] traces, double lnScale, double norm, List<Operator> certificates) {

    private static final int MOST_STEPS = 100;

    /** Changes of a state below this are rounding. */
    private static final double STILL = 1e-12;

    /**
     * Iterates.
     *
     * @param roots columns of the letters
     * @param u (α − 1)/α
     * @param p a distribution
     * @param near a state to start from; the mixture if there is none
     */
    static SandwichedState of(List<Operator> roots, double u, double[] p, Optional<Operator> near) {
        double v = u * u / (1 - u);
        Operator sigma = near.orElseGet(() -> mixture(roots, p));
        for (int step = 0; step < MOST_STEPS; step++) {
            Operator half = HermitianPowers.power(sigma, v / 2);
            Operator k = sum(roots, u, p, sigma);
            Operator next = HermitianPowers.power(half.times(k).times(half), 1 / (1 + u + v));
            next = next.times(1 / HermitianPowers.trace(next));
            double change = largest(next.minus(sigma));
            sigma = next;
            if (!(change > STILL)) {
                break;
            }
        }
        return at(roots, u, p, sigma);
    }

    private static SandwichedState at(List<Operator> roots, double u, double[] p, Operator sigma) {
        double alpha = 1 / (1 - u);
        List<SpectralDecomposition> z = compressed(roots, u, sigma);
        double top = largest(z);
        double[] q = new double[roots.size()];
        double mean = 0;
        List<Operator> certificates = new ArrayList<>();
        for (int x = 0; x < q.length; x++) {
            for (double e : z.get(x).eigenvalues()) {
                q[x] += e > 0 ? Math.pow(e / top, alpha) : 0;
            }
            mean += p[x] * q[x];
            certificates.add(columns(z.get(x), top, 0.5 * (alpha - 1)).times(p[x] == 0 ? 0 : Math.pow(p[x], 0.5 * u)));
        }
        return new SandwichedState(
                sigma, q, alpha * Math.log(top), (1 - u) * Math.log(mean) + Math.log(top), certificates);
    }

    /** X_x* σ^(−u) X_x of all letters. */
    private static List<SpectralDecomposition> compressed(List<Operator> roots, double u, Operator sigma) {
        Operator inverse =
                HermitianPowers.columns(HermitianPowers.spectrum(sigma), -u / 2).adjoint();
        return roots.stream()
                .map(inverse::times)
                .map(y -> HermitianPowers.spectrum(y.adjoint().times(y)))
                .toList();
    }

    private static double largest(List<SpectralDecomposition> z) {
        return z.stream().mapToDouble(SpectralDecomposition::norm).max().orElse(1);
    }

    /** V (Λ/top)^exponent: large orders would overflow without the scale. */
    private static Operator columns(SpectralDecomposition z, double top, double exponent) {
        double[] e = z.eigenvalues();
        for (int i = 0; i < e.length; i++) {
            e[i] = e[i] > 0 ? Math.pow(e[i] / top, exponent) : 0;
        }
        return HermitianPowers.scaled(z.vectors(), e);
    }

    /** K(σ) up to a factor. */
    private static Operator sum(List<Operator> roots, double u, double[] p, Operator sigma) {
        List<SpectralDecomposition> z = compressed(roots, u, sigma);
        double top = largest(z);
        Operator k = null;
        for (int x = 0; x < p.length; x++) {
            if (p[x] > 0) {
                Operator c = roots.get(x).times(columns(z.get(x), top, 0.5 * (1 / (1 - u) - 1)));
                Operator term = c.times(c.adjoint()).times(p[x]);
                k = k == null ? term : k.plus(term);
            }
        }
        return k;
    }

    private static Operator mixture(List<Operator> roots, double[] p) {
        Operator sum = null;
        for (int x = 0; x < p.length; x++) {
            if (p[x] > 0) {
                Operator w = roots.get(x).times(roots.get(x).adjoint()).times(p[x]);
                sum = sum == null ? w : sum.plus(w);
            }
        }
        return sum;
    }

    private static double largest(Operator a) {
        double m = 0;
        for (double e : a.realParts()) {
            m = Math.max(m, Math.abs(e));
        }
        for (double e : a.imaginaryParts()) {
            m = Math.max(m, Math.abs(e));
        }
        return m;
    }
}
