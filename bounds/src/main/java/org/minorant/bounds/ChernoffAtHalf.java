package org.minorant.bounds;

import java.util.List;
import java.util.Optional;

/** P_e ≤ √(p(1−p)) (Tr √ρ√σ)^n: the quantum Chernoff bound at s = ½, the counterpart of Bhattacharyya's. */
final class ChernoffAtHalf implements TestingBound {

    private static final Theorem THEOREM = new Theorem(
            "quantum Chernoff bound, s = 1/2",
            "K. M. R. Audenaert et al., Phys. Rev. Lett. 98, 160501 (2007), theorem 1 (from memory)");

    @Override
    public Optional<Bound> on(TestingProblem problem) {
        return problem.hasTwoStates()
                ? Optional.of(Bound.of(
                        Side.UPPER,
                        ChernoffBound.curve(problem)
                                .value(0.5)
                                .times(problem.copies())
                                .exp(),
                        THEOREM,
                        List.of(TestingProblem.BOTH_POSSIBLE)))
                : Optional.empty();
    }
}
