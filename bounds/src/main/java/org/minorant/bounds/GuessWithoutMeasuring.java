package org.minorant.bounds;

import java.util.List;
import java.util.Optional;
import org.minorant.core.Enclosure;

/** Naming the likelier state whatever is seen errs with probability min(Tr pρ, Tr (1−p)σ). */
final class GuessWithoutMeasuring implements TestingBound {

    private static final Theorem THEOREM = new Theorem("guess without measuring", "the tests T = 0 and T = 1");

    @Override
    public Optional<Bound> on(TestingProblem problem) {
        Enclosure first = problem.pair().curve().firstTrace().times(problem.prior());
        Enclosure second = problem.pair().curve().secondTrace().times(problem.otherPrior());
        return Optional.of(Bound.of(Side.UPPER, first.min(second), THEOREM, List.of()));
    }
}
