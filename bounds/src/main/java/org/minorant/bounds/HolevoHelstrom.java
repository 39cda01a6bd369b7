package org.minorant.bounds;

import java.util.List;
import java.util.Optional;

/** The minimum error itself, Tr[pρ ∧ (1−p)σ] = ½(Tr(A + B) − ‖A − B‖₁) with A = pρ, B = (1−p)σ. */
final class HolevoHelstrom implements TestingBound {

    private static final Theorem THEOREM = new Theorem(
            "Holevo-Helstrom",
            "A. S. Holevo, J. Multivariate Anal. 3, 337 (1973); C. W. Helstrom, Quantum Detection and Estimation Theory (1976), ch. IV (from memory)");

    @Override
    public Optional<Bound> on(TestingProblem problem) {
        return Optional.of(Bound.of(Side.EXACT, problem.pair().minimumError(problem.prior()), THEOREM, List.of()));
    }
}
