package org.minorant.bounds;

import java.util.List;
import java.util.Optional;

/** The least type-II error itself, sup over t ≥ 0 of Tr[tρ ∧ σ] − tε. */
final class NeymanPearson implements TypeTwoBound {

    private static final Theorem THEOREM = new Theorem(
            "quantum Neyman-Pearson duality",
            "K. M. R. Audenaert, M. Mosonyi, F. Verstraete, J. Math. Phys. 53, 122205 (2012) (from memory)");

    @Override
    public Optional<Bound> on(TypeTwoProblem problem) {
        return Optional.of(Bound.of(Side.EXACT, problem.pair().typeTwoError(problem.level()), THEOREM, List.of()));
    }
}
