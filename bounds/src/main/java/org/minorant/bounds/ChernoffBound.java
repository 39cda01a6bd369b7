package org.minorant.bounds;

import java.util.List;
import java.util.Optional;
import org.minorant.bounds.divergence.Ball;
import org.minorant.bounds.divergence.Chernoff;
import org.minorant.bounds.divergence.PetzCurve;

/** P_e ≤ p^s (1−p)^(1−s) (Tr ρ^s σ^(1−s))^n for every 0 ≤ s ≤ 1, at the best s; the trace of powers multiplies over copies. */
final class ChernoffBound implements TestingBound {

    private static final Theorem THEOREM = new Theorem(
            "quantum Chernoff bound, best s",
            "K. M. R. Audenaert et al., Phys. Rev. Lett. 98, 160501 (2007), theorem 1 (from memory)");

    @Override
    public Optional<Bound> on(TestingProblem problem) {
        if (!problem.hasTwoStates()) {
            return Optional.empty();
        }
        Chernoff c = Chernoff.of(curve(problem));
        return Optional.of(Bound.of(
                Side.UPPER,
                c.minimum().times(problem.copies()).exp(),
                THEOREM,
                List.of(TestingProblem.BOTH_POSSIBLE, "0 <= s <= 1: s = " + Math.round(c.s() * 1e6) / 1e6)));
    }

    /** ψ(s) = ln Tr (p^(1/n) ρ)^s ((1−p)^(1/n) σ)^(1−s), a share of 1/n of the logarithm for n copies. */
    static PetzCurve curve(TestingProblem problem) {
        return PetzCurve.of(
                problem.spectra(),
                share(Ball.of(problem.prior()), problem),
                share(Ball.difference(1, problem.prior()), problem));
    }

    private static Ball share(Ball weight, TestingProblem problem) {
        Ball ln = weight.ln();
        return problem.copies() == 1 ? ln : ln.dividedBy(Ball.of(problem.copies()));
    }
}
