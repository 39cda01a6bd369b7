package org.minorant.bounds.divergence;

import java.util.List;
import org.minorant.core.Enclosure;

/**
 * The relative entropy D(ρ‖σ) = Tr ρ(ln ρ − ln σ) and its variance V(ρ‖σ) = Tr ρ(ln ρ − ln σ)² − D², of the normalised operators ρ = A/Tr A
 * and
 * σ = B/Tr B, in nats.
 *
 * <p><b>Argument</b> (notation of {@link SpectralState}). Tr A ln A needs eigenvalues only, which lie in the balls D ± κ. ln is operator
 * monotone,
 * so ln B lies between the logarithms at the ends of B's balls, in B's known eigenbasis; replacing A by UDU* changes Tr A ln B by at most
 * ‖K‖₁‖ln B‖. R adds at most restRank times the largest |x ln x|, x(ln x)², x‖ln B‖ on [0, rest]. For the variance, A ln A moves by at most
 * ‖K‖_F sup|ln x + 1| in Frobenius norm (Bhatia, Matrix Analysis, X.3), and ln B by the spread of its ends in operator norm.
 *
 * <p>Where the supports are undecided, B is replaced by B + τ(1 − P), P the projector on its known support and τ ≥ ‖R_B‖, which lowers D
 * because ln is
 * operator monotone; the upper end is +∞.
 */
public final class RelativeEntropy {

    /** τ where R_B = 0: small enough not to matter, large enough to have a logarithm. */
    private static final double TAU = 0x1p-300;

    private RelativeEntropy() {}

    /**
     * Encloses D(ρ‖σ).
     *
     * @param pair A and B
     * @return the relative entropy in nats
     */
    public static Enclosure value(StatePair pair) {
        if (pair.isSame()) {
            return Enclosure.ZERO;
        }
        return switch (pair.containment()) {
            case REFUTED -> Enclosure.infinite();
            case CERTAIN -> finite(pair).toEnclosure().clip(0, Double.POSITIVE_INFINITY);
            case UNDECIDED -> Enclosure.of(Math.max(0, atLeast(pair)), Double.POSITIVE_INFINITY);
        };
    }

    private static Ball finite(StatePair pair) {
        Ball cross = pair.sum(pair.first().values(), pair.second().logarithms()).widen(crossError(pair));
        return entropyTerm(pair.first())
                .minus(cross)
                .dividedBy(pair.first().trace())
                .minus(traces(pair));
    }

    /** ln Tr A − ln Tr B, which normalisation takes off. */
    private static Ball traces(StatePair pair) {
        return pair.first().trace().ln().minus(pair.second().trace().ln());
    }

    private static double atLeast(StatePair pair) {
        SpectralState a = pair.first();
        SpectralState b = pair.second();
        Ball tau = Ball.of(Math.max(TAU, b.rest())).ln();
        List<Ball> ln = b.logarithms();
        Ball cross = Ball.ZERO;
        for (int i = 0; i < a.rank(); i++) {
            Ball row = Ball.ZERO;
            for (int j = 0; j < b.rank(); j++) {
                row = row.plus(pair.square(i, j).times(ln.get(j)));
            }
            cross = cross.plus(a.values().get(i).times(row.plus(pair.outside(i).times(tau))));
        }
        double most = Math.max(tau.magnitude(), largest(ln));
        Ball d = entropyTerm(a)
                .minus(cross.widen(mass(a) * most))
                .dividedBy(a.trace())
                .minus(traces(pair));
        return d.lower();
    }

    /** Tr A ln A. */
    private static Ball entropyTerm(SpectralState a) {
        Ball s = Ball.ZERO;
        for (Ball d : a.values()) {
            s = s.plus(d.times(d.ln()));
        }
        return s.widen(a.restRank() * peak(a.rest(), 1));
    }

    private static double crossError(StatePair pair) {
        return mass(pair.first()) * largest(pair.second().logarithms());
    }

    /** ‖K‖₁ + Tr R at most. */
    private static double mass(SpectralState a) {
        return (a.rank() * a.spread() + a.restRank() * a.rest()) * (1 + 0x1p-40);
    }

    private static double largest(List<Ball> ln) {
        return ln.stream().mapToDouble(Ball::magnitude).max().orElse(0);
    }

    /** An upper end of x|ln x|^power on [0, rest], where it increases as long as rest < e^-2. */
    private static double peak(double rest, int power) {
        if (rest == 0) {
            return 0;
        }
        double x = Math.min(rest, 0.13);
        double ln = -Math.log(x) * (1 + 0x1p-50);
        return rest < 0.13 ? x * Math.pow(ln, power) * (1 + 0x1p-40) : Math.max(1, rest * Math.pow(1 + rest, power));
    }

    /**
     * Encloses V(ρ‖σ).
     *
     * @param pair A and B
     * @return the variance in nats²; infinite where D is
     */
    public static Enclosure variance(StatePair pair) {
        if (pair.isSame()) {
            return Enclosure.ZERO;
        }
        return switch (pair.containment()) {
            case REFUTED -> Enclosure.infinite();
            case CERTAIN -> finiteVariance(pair).toEnclosure().clip(0, Double.POSITIVE_INFINITY);
            case UNDECIDED -> Enclosure.of(0, Double.POSITIVE_INFINITY);
        };
    }

    /** Σ P_ij (z_ij − c)² with P_ij = a_i p_ij / Tr A, z_ij = ln a_i − ln b_j and c near the mean, less (mean − c)². */
    private static Ball finiteVariance(StatePair pair) {
        SpectralState a = pair.first();
        SpectralState b = pair.second();
        List<Ball> lnA = a.logarithms();
        List<Ball> lnB = b.logarithms();
        Ball mean = finite(pair).plus(traces(pair));
        Ball c = Ball.of(mean.hi());
        Ball s = Ball.ZERO;
        for (int i = 0; i < a.rank(); i++) {
            Ball row = Ball.ZERO;
            for (int j = 0; j < b.rank(); j++) {
                Ball z = lnA.get(i).minus(lnB.get(j)).minus(c);
                row = row.plus(pair.square(i, j).times(z).times(z));
            }
            s = s.plus(a.values().get(i).times(row));
        }
        Ball off = mean.minus(c);
        return s.widen(varianceError(pair, lnA, lnB, Math.abs(c.hi())))
                .dividedBy(a.trace())
                .minus(off.times(off));
    }

    /**
     * The second moment about c is Tr A(ln A − c)² − 2 Tr A(ln A − c) ln B + Tr A (ln B)². With U*AU replaced by the diagonal matrix of its
     * eigenvalues, which is within 2κ of it, the first term is unchanged and all are covered by the balls. That replacement moves the
     * second by
     * 2 · 2κ√r (sup|ln x − c| + 1) · √r‖ln B‖ and the third by 2κr‖ln B‖²; the spread λ of ln B moves them by 2 Tr|A(ln A − c)| λ + Tr A
     * (2‖ln B‖ + λ) λ; R
     * adds restRank times the peaks on [0, rest].
     */
    private static double varianceError(StatePair pair, List<Ball> lnA, List<Ball> lnB, double c) {
        SpectralState a = pair.first();
        double mostA = largest(lnA) + c;
        double mostB = largest(lnB);
        double lambda = lnB.stream().mapToDouble(Ball::radius).max().orElse(0);
        double trace = a.trace().magnitude();
        double moved = 2 * a.rank() * a.spread() * mostB * (2 * (mostA + 1) + mostB);
        double spread = trace * lambda * (2 * mostA + 2 * mostB + lambda);
        double rest = a.restRank()
                * (2 * peak(a.rest(), 2)
                        + 2 * c * c * a.rest()
                        + 2 * (peak(a.rest(), 1) + c * a.rest()) * mostB
                        + a.rest() * mostB * mostB);
        return (moved + spread + rest) * (1 + 0x1p-40);
    }
}
