package org.minorant.bounds;

import java.util.List;
import java.util.Optional;
import org.minorant.core.Enclosure;

/** ln β_ε ≥ −n D − 4√2 ln η √(n ln(1/(1−ε))) − ln(1/(1−ε)), see {@link Stein}. */
final class SteinFromBelow implements TypeTwoBound {

    private static final Theorem THEOREM = new Theorem("finite-sample Stein bound, from below", Stein.SOURCE);

    @Override
    public Optional<Bound> on(TypeTwoProblem problem) {
        if (!problem.hasTwoStates()) {
            return Optional.empty();
        }
        int n = problem.copies();
        Enclosure l =
                problem.normalisedLevel().complement().max(Enclosure.ZERO).ln().negate();
        return Stein.of(problem.spectra())
                .flatMap(s -> s.second(n, l)
                        .map(x -> problem.lnSecondTrace()
                                .minus(s.first(n))
                                .minus(x)
                                .minus(l)))
                .map(ln -> Bound.of(
                        Side.LOWER,
                        ln.exp(),
                        THEOREM,
                        List.of(TypeTwoProblem.LEVEL_INSIDE, "n large enough: n = " + n)));
    }
}
