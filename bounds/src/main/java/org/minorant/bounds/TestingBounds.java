package org.minorant.bounds;

import java.util.List;
import java.util.Optional;
import java.util.function.Function;
import java.util.stream.Stream;
import org.minorant.core.InvalidInputException;
import org.minorant.measurement.HypothesisPair;

/**
 * Bounds on the errors of telling two states apart, with their sources: on the minimum error Tr[pρ ∧ (1−p)σ], and on the least type-II error at a type-I level.
 *
 * <p><b>n copies.</b> A pair made by {@link HypothesisPair#copies} has the exact value of n copies beside bounds that are computed from the states of one copy, with wide exponents, so that they can be had
 * at any n. The pretty-good measurement is left out there, as its square root does not factor; the Nussbaum–Szkoła bounds are left out where more types matter than can be summed (qubits: from
 * about 2000 copies on).
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

    private static final List<TypeTwoBound> KNOWN_TYPE_TWO = List.of(
            new NeymanPearson(),
            new RejectAtRandom(),
            new FiniteHoeffding(),
            new SteinFromAbove(),
            new HalfNussbaumSzkolaTypeTwo(),
            new SandwichedConverse(),
            new SteinFromBelow());

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
        return ledger("minimum error", KNOWN, more, t -> t.on(problem));
    }

    /**
     * Returns the theorems that {@link #typeTwo(HypothesisPair, double)} applies.
     *
     * @return an unmodifiable list
     */
    public static List<TypeTwoBound> knownTypeTwo() {
        return KNOWN_TYPE_TWO;
    }

    /**
     * Returns every known bound on the least type-II error of a pair, of one copy or of many. How the error falls with n is told by {@link Divergences#hoeffding} and {@link
     * Divergences#strongConverse}, approximately by {@link SecondOrder}.
     *
     * @param pair ρ and σ; if it is known by its curve only, the bounds that need the states are left out
     * @param level the type-I level ε, between 0 and 1; where it is 0 or 1 only the exact value and that of rejecting at random are given
     * @return the ledger
     * @throws InvalidInputException if the level is not between 0 and 1
     * @throws InconsistentBoundsException if a lower bound exceeds an upper bound, which shows an error in this library
     */
    public static Ledger typeTwo(HypothesisPair pair, double level) {
        return typeTwo(pair, level, List.of());
    }

    /**
     * Returns every known bound and some more on the least type-II error of a pair.
     *
     * @param pair ρ and σ
     * @param level the type-I level ε, between 0 and 1
     * @param more theorems to apply besides the known ones
     * @return the ledger
     * @throws InvalidInputException if the level is not between 0 and 1
     * @throws InconsistentBoundsException if a lower bound exceeds an upper bound
     */
    public static Ledger typeTwo(HypothesisPair pair, double level, List<? extends TypeTwoBound> more) {
        Checks.inRange("TestingBounds.typeTwo", "the type-I level", level, 0, 1);
        TypeTwoProblem problem = TypeTwoProblem.of(pair, level);
        return ledger("least type-II error", KNOWN_TYPE_TWO, more, t -> t.on(problem));
    }

    private static <T> Ledger ledger(
            String quantity, List<? extends T> known, List<? extends T> more, Function<T, Optional<Bound>> apply) {
        Stream<T> theorems = Stream.concat(known.stream(), more.stream());
        return Ledger.of(quantity, theorems.map(apply).flatMap(Optional::stream).toList());
    }
}
