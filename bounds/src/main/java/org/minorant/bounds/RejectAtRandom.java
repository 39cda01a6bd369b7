package org.minorant.bounds;

import java.util.List;
import java.util.Optional;
import org.minorant.core.Enclosure;

/** The test T = 1 − x with x = min(1, ε/Tr ρ) has type-I error at most ε and type-II error (1 − x) Tr σ. */
final class RejectAtRandom implements TypeTwoBound {

    private static final Theorem THEOREM = new Theorem("reject at random", "the tests T = 1 - x");

    @Override
    public Optional<Bound> on(TypeTwoProblem problem) {
        Enclosure kept = problem.normalisedLevel().complement().max(Enclosure.ZERO);
        return Optional.of(
                Bound.of(Side.UPPER, kept.times(problem.pair().curve().secondTrace()), THEOREM, List.of()));
    }
}
