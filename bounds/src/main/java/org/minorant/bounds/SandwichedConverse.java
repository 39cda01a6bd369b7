package org.minorant.bounds;

import java.util.List;
import java.util.Optional;
import org.minorant.bounds.divergence.Sandwiched;
import org.minorant.core.Enclosure;

/**
 * β_ε ≥ (1−ε)^(α/(α−1)) e^(−n D̃_α(ρ‖σ)) for every α &gt; 1, with the sandwiched divergence.
 *
 * <p><b>Argument.</b> For a test T of type-I error at most ε let p = Tr ρ^⊗n T ≥ 1 − ε and q = Tr σ^⊗n T. D̃_α does not increase under the measurement {T, 1 − T} and is additive, so that (α−1) n D̃_α ≥ ln(p^α q^(1−α) + …) ≥
 * α ln(1−ε) − (α−1) ln q.
 *
 * <p>Every α gives a bound. The logarithm is a perspective of (α−1)D̃_α, which is convex, in α/(α−1); so a search finds a good α.
 */
final class SandwichedConverse implements TypeTwoBound {

    private static final Theorem THEOREM = new Theorem(
            "sandwiched strong converse",
            "M. Mosonyi, T. Ogawa, Commun. Math. Phys. 334, 1617 (2015), lemma 4.7; M. M. Wilde, A. Winter, D. Yang, ibid. 331, 593 (2014) (from memory)");

    private static final double LEAST = Math.log(1e-6);

    private static final double MOST = Math.log(1e3);

    @Override
    public Optional<Bound> on(TypeTwoProblem problem) {
        if (!problem.hasTwoStates()) {
            return Optional.empty();
        }
        double x = Unimodal.minimiser(y -> -value(problem, 1 + Math.exp(y)).lower(), LEAST, MOST);
        double alpha = 1 + Math.exp(x);
        Enclosure ln = value(problem, alpha);
        // an infinite divergence bounds nothing from below
        return ln.upperWide().isInfinite() && ln.upperWide().signum() < 0
                ? Optional.empty()
                : Optional.of(Bound.of(
                        Side.LOWER,
                        ln.exp(),
                        THEOREM,
                        List.of(TypeTwoProblem.LEVEL_INSIDE, "alpha > 1: alpha = " + Math.round(alpha * 1e6) / 1e6)));
    }

    /** ln b + α/(α−1) ln(1 − ε/a) − n D̃_α. */
    static Enclosure value(TypeTwoProblem problem, double alpha) {
        Enclosure order = Enclosure.exact(alpha);
        Enclosure kept = problem.normalisedLevel().complement().max(Enclosure.ZERO);
        return kept.ln()
                .times(order.dividedBy(order.minus(Enclosure.ONE)))
                .minus(Sandwiched.value(problem.spectra(), alpha).times(problem.copies()))
                .plus(problem.lnSecondTrace());
    }
}
