package org.minorant.bounds;

import java.util.List;
import java.util.Optional;

/** P_e ≥ Tr[A (A+B)^(−½) B (A+B)^(−½)], A = pρ, B = (1−p)σ: half the error of the pretty-good measurement; for one copy only. */
final class HalfPrettyGoodError implements TestingBound {

    private static final Theorem THEOREM = new Theorem(
            "half the pretty-good error",
            "H. Barnum, E. Knill, J. Math. Phys. 43, 2097 (2002), theorem 1; H.-C. Cheng, PRX Quantum 4, 040330 (2023) (from memory)");

    @Override
    public Optional<Bound> on(TestingProblem problem) {
        return problem.hasTwoStates() && problem.pair().hasStates()
                ? Optional.of(Bound.of(
                        Side.LOWER,
                        PrettyGoodError.error(problem).times(0.5),
                        THEOREM,
                        List.of(TestingProblem.BOTH_POSSIBLE)))
                : Optional.empty();
    }
}
