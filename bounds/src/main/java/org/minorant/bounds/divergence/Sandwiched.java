package org.minorant.bounds.divergence;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.EnclosedSpectrum;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;

/**
 * The sandwiched Rényi divergence of the normalised operators, in nats,
 *
 * <pre>D̃_α(ρ‖σ) = (α − 1)^(−1) ln Tr (σ^((1−α)/2α) ρ σ^((1−α)/2α))^α = N(u)/u,   N(u) = ln ‖ρ^½ σ^(−u) ρ^½‖_α,   u = (α − 1)/α,</pre>
 *
 * its limit α → ∞ (the max-divergence) and its value at α = ½ (minus twice the logarithm of the fidelity).
 *
 * <p><b>Argument</b> (notation of {@link SpectralState}). For −1 ≤ u ≤ 1 the power B^(−u) is operator monotone or antimonotone and the norm increases with A and with
 * B^(−u), so that balls of eigenvalues cover all operators between the ends; with Z = b^(−u/2) O* a^(½), O the overlaps, N(u) = 2 ln ‖Z‖_2α. R: for α &lt; 1,
 * Tr(X + Y)^α ≤ Tr X^α + Tr Y^α (McCarthy 1967) and Tr(B^c A B^c)^α ≤ (Tr A)^α (Tr B)^(1−α); for α ≥ 1 the triangle inequality, ‖B^(−u/2) R B^(−u/2)‖_α ≤ restRank ·
 * rest · ‖B^(−u)‖.
 *
 * <p>Source: M. Müller-Lennert, F. Dupuis, O. Szehr, S. Fehr, M. Tomamichel, J. Math. Phys. 54, 122203 (2013); M. M. Wilde, A. Winter, D.
 * Yang, Commun.
 * Math. Phys. 331, 593 (2014) (from memory).
 */
public final class Sandwiched {

    private final StatePair pair;
    private final List<Ball> lnA;
    private final List<Ball> lnB;

    private Sandwiched(StatePair pair) {
        this.pair = pair;
        this.lnA = pair.first().logarithms();
        this.lnB = pair.second().logarithms();
    }

    /**
     * Returns the function N of a pair.
     *
     * @param pair A and B
     * @return N
     */
    public static Sandwiched of(StatePair pair) {
        return new Sandwiched(pair);
    }

    /**
     * Encloses D̃_α(ρ‖σ).
     *
     * @param pair A and B
     * @param alpha the order, at least ½, finite and not 1
     * @return the divergence in nats
     */
    public static Enclosure value(StatePair pair, double alpha) {
        if (pair.isSame()) {
            return Enclosure.ZERO;
        }
        Ball u = Ball.difference(alpha, 1).dividedBy(Ball.of(alpha));
        if (alpha < 1) {
            Sandwiched s = of(pair);
            Optional<Ball> n = s.norm(u);
            Enclosure d = n.isPresent()
                    ? n.get().dividedBy(u).toEnclosure()
                    : s.vanishingNorm(u).dividedBy(u.toEnclosure());
            return d.clip(0, Double.POSITIVE_INFINITY);
        }
        return above(pair, u);
    }

    /**
     * Encloses the max-divergence ln min{x : ρ ≤ xσ}.
     *
     * @param pair A and B
     * @return the max-divergence in nats
     */
    public static Enclosure maximal(StatePair pair) {
        return pair.isSame() ? Enclosure.ZERO : above(pair, Ball.ONE);
    }

    private static Enclosure above(StatePair pair, Ball u) {
        return switch (pair.containment()) {
            case REFUTED -> Enclosure.infinite();
            case CERTAIN ->
                of(pair).norm(u)
                        .map(n -> n.dividedBy(u).toEnclosure())
                        .orElse(Enclosure.unknown())
                        .clip(0, Double.POSITIVE_INFINITY);
            case UNDECIDED -> Enclosure.of(RelativeEntropy.value(pair).lower(), Double.POSITIVE_INFINITY);
        };
    }

    /**
     * Encloses N(u).
     *
     * @param u between −1 and 1; above 0 only if the support of A lies in that of B with certainty
     * @return N(u) for the normalised operators; empty if the norm may vanish
     */
    public Optional<Ball> norm(Ball u) {
        Scaled z = root(u);
        Ball norm = schatten(z.matrix, u);
        if (!norm.isPositive()) {
            return Optional.empty();
        }
        Ball n = norm.ln().times(2);
        double rest = restBelow(u, n, z.scale);
        if (rest > 0) {
            n = n.plus(between(Ball.ONE, rest).ln().times(Ball.ONE.minus(u)));
        }
        n = n.plus(z.scale)
                .minus(pair.first().trace().ln())
                .plus(u.times(pair.second().trace().ln()));
        return Optional.of(u.hi() > 0 ? raised(n, restAbove(u)) : n);
    }

    /** N(u) for u < 0 where only an upper end is known. */
    private Enclosure vanishingNorm(Ball u) {
        if (pair.isOrthogonal()) {
            return Enclosure.exact(Double.NEGATIVE_INFINITY);
        }
        Scaled z = root(u);
        Enclosure inverse = Ball.ONE.minus(u).toEnclosure();
        Enclosure norm = Enclosure.exact(Math.max(0, schatten(z.matrix, u).upper()));
        Enclosure power = norm.ln().times(2).dividedBy(inverse).exp();
        Enclosure sum = power.plus(Enclosure.exact(restBelow(u, Ball.ZERO, z.scale)));
        Ball traces = z.scale
                .minus(pair.first().trace().ln())
                .plus(u.times(pair.second().trace().ln()));
        Enclosure most = sum.ln().times(inverse).plus(traces.toEnclosure());
        return Enclosure.of(WideDouble.NEGATIVE_INFINITY, most.upperWide());
    }

    private record Scaled(EnclosedMatrix matrix, Ball scale) {}

    /** Z · e^(−scale/2) with Z*Z = A^½ B^(−u) A^½. */
    private Scaled root(Ball u) {
        List<Ball> powers = new ArrayList<>();
        double most = Double.NEGATIVE_INFINITY;
        for (Ball b : lnB) {
            Ball x = b.times(u).times(-0.5);
            powers.add(x);
            most = Math.max(most, x.hi());
        }
        Ball shift = Ball.of(most);
        EnclosedMatrix left =
                diagonal(powers.stream().map(x -> x.minus(shift).exp()).toList());
        EnclosedMatrix right =
                diagonal(lnA.stream().map(x -> x.times(0.5).exp()).toList());
        return new Scaled(left.times(pair.overlaps().adjoint()).times(right), shift.times(2));
    }

    /**
     * The Schatten norm ‖Z‖_2α, α = 1/(1 − u): that of the midpoint, from the eigenvalues of its square, and the radii Δ at most ‖Δ‖_2α ≤ √n ‖Δ‖_F (without √n for α ≥ 1),
     * so that they enter as they are and not by their root.
     */
    private static Ball schatten(EnclosedMatrix z, Ball u) {
        if (u.hi() == -1 && u.lo() == 0 && u.radius() == 0) {
            NuclearNorm n = NuclearNorm.of(z);
            return n.value().times(Math.scalb(1.0, n.exponent()));
        }
        EnclosedMatrix mid = z.midpoint();
        EnclosedMatrix square = z.columns() <= z.rows() ? mid.adjoint().times(mid) : mid.times(mid.adjoint());
        EnclosedSpectrum s = EnclosedSpectrum.of(square);
        List<Ball> values = new ArrayList<>();
        for (int i = 0; i < s.dimension(); i++) {
            values.add(new Ball(s.value(i), s.valueTail(i), s.eigenvalueRadius()));
        }
        double radii = u.hi() > 0 ? z.minus(mid).frobeniusUpper() : NuclearNorm.radiusNorm(z);
        Ball top = values.get(values.size() - 1);
        if (!top.isPositive()) {
            double most = Math.sqrt(values.size()) * mid.frobeniusUpper() + radii;
            return between(Ball.ZERO, most * (1 + 1e-9));
        }
        Ball shift = top.ln();
        Ball ln = shift;
        Ball inverse = Ball.ONE.minus(u);
        if (inverse.isPositive()) {
            Ball alpha = Ball.ONE.dividedBy(inverse);
            // the largest eigenvalue is e^shift by definition, and no other exceeds it
            Ball sum = Ball.ONE;
            for (Ball m : values.subList(0, values.size() - 1)) {
                sum = sum.plus(power(m, shift, alpha).min(Ball.ONE));
            }
            ln = shift.plus(sum.ln().times(inverse));
        } else {
            // α beyond all digits: the sum is between 1 and the number of its terms
            ln = between(shift, Math.log(values.size()) * Math.max(0, inverse.upper()) * (1 + 1e-9));
        }
        return ln.times(0.5).exp().widen(radii);
    }

    private static EnclosedMatrix diagonal(List<Ball> d) {
        EnclosedMatrix.Builder b = EnclosedMatrix.builder(d.size(), d.size());
        for (int i = 0; i < d.size(); i++) {
            b.set(i, i, d.get(i).hi(), d.get(i).lo(), 0, 0, d.get(i).radius());
        }
        return b.build();
    }

    /** (m e^(−shift))^α for an eigenvalue that is at least 0 and at most e^shift, up to its radius: from 0 on where that is as large as itself. */
    private static Ball power(Ball m, Ball shift, Ball alpha) {
        if (m.hi() > 4 * m.radius() && m.isPositive()) {
            Ball x = m.ln().minus(shift).times(alpha);
            if (x.radius() <= 0.5) {
                return x.exp();
            }
        }
        Ball most = Ball.of(Math.max(m.magnitude(), Double.MIN_NORMAL))
                .ln()
                .minus(shift)
                .times(alpha);
        return between(Ball.ZERO, Math.exp(Math.min(0, most.upper())) * (1 + 1e-9));
    }

    /** [x, x + extra] as a ball. */
    private static Ball between(Ball x, double extra) {
        return extra == 0 ? x : x.plus(new Ball(0.5 * extra, 0, 0.5 * extra));
    }

    /** ln(e^n + x) is between n and n + x e^(−n). */
    private static Ball raised(Ball n, double x) {
        return x == 0 ? n : between(n, x * Math.exp(-n.lower()) * (1 + 1e-9));
    }

    /** What R_A and R_B may add to Tr(…)^α for α < 1, in units of e^(α(shift + scale)). */
    private double restBelow(Ball u, Ball shift, Ball scale) {
        SpectralState a = pair.first();
        SpectralState b = pair.second();
        if (u.hi() > 0 || (a.rest() == 0 && b.rest() == 0)) {
            return 0;
        }
        double alpha = 1 / (1 - u.hi());
        double inA =
                Math.pow(a.restRank() * a.rest(), alpha) * Math.pow(b.trace().magnitude(), 1 - alpha);
        double inB = Math.pow(a.trace().magnitude(), alpha) * Math.pow(b.restRank() * b.rest(), 1 - alpha);
        return (inA + inB) * Math.exp(-alpha * (shift.hi() + scale.hi())) * (1 + 1e-9);
    }

    /** ‖B^(−u/2) R_A B^(−u/2)‖_α at most, for the normalised operators, α > 1. */
    private double restAbove(Ball u) {
        SpectralState a = pair.first();
        if (a.rest() == 0) {
            return 0;
        }
        double least = lnB.stream().mapToDouble(Ball::lower).min().orElse(0);
        double traces =
                Math.pow(pair.second().trace().magnitude(), u.hi()) / a.trace().lower();
        return a.restRank() * a.rest() * Math.exp(-u.hi() * least) * traces * (1 + 1e-9);
    }
}
