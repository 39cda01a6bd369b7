package org.minorant.bounds;

import java.util.List;
import java.util.Optional;
import org.minorant.core.Enclosure;
import org.minorant.measurement.Ensemble;
import org.minorant.measurement.PrettyGoodMeasurement;

/**
 * P_e is at most the error 2 Tr[A (A+B)^(−½) B (A+B)^(−½)] of the pretty-good measurement, A = pρ, B = (1−p)σ, as it is at most that of
 * any. For one copy only: the square root of p ρ^⊗n + (1−p) σ^⊗n does not factor.
 */
final class PrettyGoodError implements TestingBound {

    private static final Theorem THEOREM = new Theorem(
            "pretty-good measurement", "P. Hausladen, W. K. Wootters, J. Mod. Opt. 41, 2385 (1994) (from memory)");

    @Override
    public Optional<Bound> on(TestingProblem problem) {
        return problem.hasTwoStates() && problem.pair().hasStates()
                ? Optional.of(Bound.of(Side.UPPER, error(problem), THEOREM, List.of(TestingProblem.BOTH_POSSIBLE)))
                : Optional.empty();
    }

    /**
     * The error of the pretty-good measurement. It is computed for the rounded prior q̂ = (1−p)(1+x); half of it lies below and all of it
     * above P_e(q̂), which lies between
     * 1 ∓ |x| times P_e, so that the widened value serves both bounds.
     */
    static Enclosure error(TestingProblem problem) {
        double p = problem.prior();
        double rest = 1 - p;
        // exact: the error of a rounded difference is a double
        double lost = (1 - rest) - p;
        Ensemble ensemble =
                Ensemble.of(List.of(problem.pair().first(), problem.pair().second()), new double[] {p, rest});
        Enclosure e = PrettyGoodMeasurement.of(ensemble).errorProbability();
        return lost == 0 ? e : e.times(Enclosure.ONE.widen(2 * Math.abs(lost) / rest));
    }
}
