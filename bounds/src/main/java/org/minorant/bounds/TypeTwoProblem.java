package org.minorant.bounds;

import org.minorant.bounds.divergence.Ball;
import org.minorant.bounds.divergence.PetzCurve;
import org.minorant.core.Enclosure;
import org.minorant.core.InvalidInputException;
import org.minorant.measurement.HypothesisPair;

/**
 * What a bound on the type-II error is about: β_ε = min { Tr σ^⊗n T : 0 ≤ T ≤ 1, Tr ρ^⊗n (1−T) ≤ ε }.
 *
 * <p><b>Traces.</b> States are used as given, as {@link HypothesisPair#typeTwoError} does. With a = Tr ρ^⊗n and b = Tr σ^⊗n it is b times the error of the normalised
 * states at the level ε/a; divergences of normalised states serve so. Immutable and thread-safe.
 */
public final class TypeTwoProblem extends CopiesProblem {

    /** The hypothesis that {@link #hasTwoStates} checks, as it is printed. */
    static final String LEVEL_INSIDE = "0 < epsilon < 1";

    private TypeTwoProblem(HypothesisPair pair, double level) {
        super(pair, level);
    }

    /**
     * Returns the problem of rejecting the second hypothesis.
     *
     * @param pair the hypotheses, of one copy or of many
     * @param level the type-I level ε, between 0 and 1
     * @return the problem
     * @throws InvalidInputException if the level is not between 0 and 1
     */
    public static TypeTwoProblem of(HypothesisPair pair, double level) {
        return new TypeTwoProblem(pair, Checks.inRange("TypeTwoProblem.of", "the type-I level", level, 0, 1));
    }

    /**
     * Returns the type-I level.
     *
     * @return ε
     */
    public double level() {
        return number();
    }

    /** ψ(s) = ln Tr ρ^s σ^(1−s) of one copy, as given. */
    PetzCurve curve() {
        Ball zero = Ball.ZERO;
        return PetzCurve.of(spectra(), zero, zero);
    }

    /** ε/a, the level for normalised states. */
    Enclosure normalisedLevel() {
        return Enclosure.exact(number()).dividedBy(pair().curve().firstTrace());
    }

    /** ln b. */
    Enclosure lnSecondTrace() {
        return pair().curve().secondTrace().ln();
    }
}
