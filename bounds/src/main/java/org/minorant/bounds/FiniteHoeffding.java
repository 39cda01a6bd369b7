package org.minorant.bounds;

import java.util.List;
import java.util.Optional;
import org.minorant.bounds.divergence.PetzCurve;
import org.minorant.core.Enclosure;

/**
 * β_ε ≤ (1−s) s^(s/(1−s)) Q_s^(n/(1−s)) ε^(−s/(1−s)) with Q_s = Tr ρ^s σ^(1−s), for every 0 &lt; s &lt; 1; in other words −ln β_ε ≥ n D_s(ρ‖σ) − (s ln(1/ε) − h(s))/(1−s) with h the binary entropy and D_s
 * of Petz.
 *
 * <p><b>Argument.</b> β_ε = sup over t of Tr[tρ^⊗n ∧ σ^⊗n] − tε (duality), and Tr[tρ^⊗n ∧ σ^⊗n] ≤ t^s Q_s^n (Audenaert et al. 2007). The largest value of t^s Q − tε is at t = (sQ/ε)^(1/(1−s)), where it is
 * tε(1−s)/s. For levels e^(−nr) and the best s this has the Hoeffding exponent.
 *
 * <p>Every s gives a bound. The logarithm is convex in 1/(1−s) (perspectives of the convex functions ln Q_s and −h), so that a search finds a good s.
 */
final class FiniteHoeffding implements TypeTwoBound {

    private static final Theorem THEOREM = new Theorem(
            "finite-sample Hoeffding bound",
            "K. M. R. Audenaert, M. Mosonyi, F. Verstraete, J. Math. Phys. 53, 122205 (2012), section III (from memory; derived again)");

    /** 1/(1−s) up to here: beyond, the bound falls below any that a level in double precision needs. */
    private static final double MOST = 1e6;

    @Override
    public Optional<Bound> on(TypeTwoProblem problem) {
        if (!problem.hasTwoStates()) {
            return Optional.empty();
        }
        PetzCurve curve = problem.curve();
        // x = ln v with s = 1 − 1/v
        double x = Unimodal.minimiser(y -> value(curve, problem, order(y)).upper(), 0, Math.log(MOST));
        double s = order(x);
        return Optional.of(Bound.of(
                Side.UPPER,
                value(curve, problem, s).exp(),
                THEOREM,
                List.of(TypeTwoProblem.LEVEL_INSIDE, "0 < s < 1: s = " + Math.round(s * 1e6) / 1e6)));
    }

    private static double order(double x) {
        return Math.max(1e-9, -Math.expm1(-x));
    }

    /** ln of the bound at s: (n ψ(s) − s ln ε − h(s))/(1 − s). */
    static Enclosure value(PetzCurve curve, TypeTwoProblem problem, double s) {
        Enclosure e = Enclosure.exact(s);
        Enclosure rest = e.complement();
        Enclosure entropy = e.times(e.ln()).plus(rest.times(rest.ln()));
        return curve.value(s)
                .times(problem.copies())
                .minus(e.times(Enclosure.exact(problem.level()).ln()))
                .plus(entropy)
                .dividedBy(rest);
    }
}
