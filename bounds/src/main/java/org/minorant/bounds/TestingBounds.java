package org.minorant.bounds;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.minorant.core.InvalidInputException;
import org.minorant.measurement.HypothesisPair;

/**
 * Bounds on the minimum error Tr[pρ ∧ (1−p)σ] of telling two states apart, with their sources.
 *
 * <p>The error of the best classical test between the two Nussbaum–Szkoła distributions is a lower bound only after it is halved, and is no
 * upper bound at all;
 * no bound here rests on it in any other way.
 */
public final class TestingBounds {

    private static final List<TestingBound> KNOWN = List.of(
            new HolevoHelstrom(),
            new GuessWithoutMeasuring(),
            new ChernoffBound(),
            new ChernoffAtHalf(),
            new PrettyGoodError(),
            new HalfPrettyGoodError(),
            new HalfNussbaumSzkola(),
            new FidelityFromAbove(),
            new FidelityFromBelow());

    private TestingBounds() {}

    /**
     * Returns the theorems that {@link #of(HypothesisPair, double)} applies.
     *
     * @return an unmodifiable list
     */
    public static List<TestingBound> known() {
        return KNOWN;
    }

    /**
     * Returns every known bound on the minimum error of a pair.
     *
     * @param pair ρ and σ; if it is known by its curve only, the bounds that need the states are left out
     * @param prior the prior p of ρ, between 0 and 1; where it is 0 or 1 only the exact value, 0, and that of guessing are given
     * @return the ledger
     * @throws InvalidInputException if the prior is not between 0 and 1
     * @throws InconsistentBoundsException if a lower bound exceeds an upper bound, which shows an error in this library
     */
    public static Ledger of(HypothesisPair pair, double prior) {
        return of(pair, prior, List.of());
    }

    /**
     * Returns every known bound and some more on the minimum error of a pair.
     *
     * @param pair ρ and σ
     * @param prior the prior p of ρ, between 0 and 1
     * @param more theorems to apply besides the known ones
     * @return the ledger
     * @throws InvalidInputException if the prior is not between 0 and 1
     * @throws InconsistentBoundsException if a lower bound exceeds an upper bound
     */
    public static Ledger of(HypothesisPair pair, double prior, List<? extends TestingBound> more) {
        Checks.inRange("TestingBounds.of", "the prior", prior, 0, 1);
        TestingProblem problem = TestingProblem.of(pair, prior);
        List<TestingBound> theorems = new ArrayList<>(KNOWN);
        theorems.addAll(more);
        return Ledger.of(
                "minimum error",
                theorems.stream()
                        .map(t -> t.on(problem))
                        .flatMap(Optional::stream)
                        .toList());
    }
}
