package org.minorant.bounds;

import java.util.List;
import java.util.Optional;
import org.minorant.core.Enclosure;
import org.minorant.core.InvalidInputException;
import org.minorant.measurement.HypothesisPair;

/**
 * β_ε ≥ ½ β'_{2ε}, with β' the least type-II error of the classical test between the two Nussbaum–Szkoła distributions, exactly by types for n copies.
 *
 * <p><b>Argument.</b> β_ε = sup over t of Tr[tρ ∧ σ] − tε ≥ sup over t of ½ Σ min(tP, Q) − tε = ½ sup over t of Σ min(tP, Q) − 2tε. It holds for the lower ends of the letters, which are used, see {@link PairLetters}.
 */
final class HalfNussbaumSzkolaTypeTwo implements TypeTwoBound {

    private static final Theorem THEOREM = new Theorem(
            "half the Nussbaum-Szkola type-II error",
            "M. Nussbaum, A. Szkoła, Ann. Statist. 37, 1040 (2009), proposition 2; K. M. R. Audenaert et al., Commun. Math. Phys. 279, 251 (2008), proposition 4 (from memory)");

    @Override
    public Optional<Bound> on(TypeTwoProblem problem) {
        if (!problem.hasTwoStates() || problem.level() >= 0.5) {
            return Optional.empty();
        }
        try {
            Enclosure classical = HypothesisPair.ofCurve(
                            PairLetters.of(problem.spectra()).below(problem.copies()))
                    .typeTwoError(2 * problem.level());
            return Optional.of(Bound.of(
                    Side.LOWER, classical.times(0.5), THEOREM, List.of(TypeTwoProblem.LEVEL_INSIDE, "2 epsilon < 1")));
        } catch (InvalidInputException tooManyTypes) {
            return Optional.empty();
        }
    }
}
