package org.minorant.bounds;

import java.util.List;
import java.util.Optional;
import org.minorant.core.Enclosure;

/** ln β_ε ≤ −n D + 4√2 ln η √(n ln(1/ε)), see {@link Stein}. Left out where it says less than 1. */
final class SteinFromAbove implements TypeTwoBound {

    private static final Theorem THEOREM = new Theorem("finite-sample Stein bound, from above", Stein.SOURCE);

    @Override
    public Optional<Bound> on(TypeTwoProblem problem) {
        return logarithm(problem)
                .filter(ln -> ln.upper() < 0)
                .map(ln -> Bound.of(
                        Side.UPPER,
                        ln.exp(),
                        THEOREM,
                        List.of(TypeTwoProblem.LEVEL_INSIDE, "n large enough: n = " + problem.copies())));
    }

    static Optional<Enclosure> logarithm(TypeTwoProblem problem) {
        if (!problem.hasTwoStates()) {
            return Optional.empty();
        }
        int n = problem.copies();
        Enclosure l = problem.normalisedLevel().ln().negate();
        return Stein.of(problem.spectra())
                .flatMap(s -> s.second(n, l)
                        .map(x -> problem.lnSecondTrace().minus(s.first(n)).plus(x)));
    }
}
