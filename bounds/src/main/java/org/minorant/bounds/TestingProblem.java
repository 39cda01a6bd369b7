package org.minorant.bounds;

import org.minorant.core.Enclosure;
import org.minorant.core.InvalidInputException;
import org.minorant.measurement.HypothesisPair;

/**
 * What a bound on the minimum error is about: P_e = Tr[pρ ∧ (1−p)σ] for a pair of hypotheses and the prior p of the first.
 *
 * <p>States are used as given, as {@link HypothesisPair#minimumError} does. For a pair of n copies the bounds are computed from the states of
 * one copy, so that they can be had at any n. What several bounds need (spectra and their overlaps) is computed when the first of them asks.
 * Immutable and thread-safe.
 */
public final class TestingProblem extends CopiesProblem {

    /** The hypothesis that {@link #hasTwoStates} checks, as it is printed. */
    static final String BOTH_POSSIBLE = "0 < p < 1";

    private TestingProblem(HypothesisPair pair, double prior) {
        super(pair, prior);
    }

    /**
     * Returns the problem of telling two hypotheses apart.
     *
     * @param pair the hypotheses
     * @param prior the prior p of the first, between 0 and 1
     * @return the problem
     * @throws InvalidInputException if the prior is not between 0 and 1
     */
    public static TestingProblem of(HypothesisPair pair, double prior) {
        return new TestingProblem(pair, Checks.inRange("TestingProblem.of", "the prior", prior, 0, 1));
    }

    /**
     * Returns the prior of the first hypothesis.
     *
     * @return p
     */
    public double prior() {
        return number();
    }

    /**
     * Returns the prior of the second hypothesis.
     *
     * @return an enclosure of 1 − p, which is meant exactly
     */
    public Enclosure otherPrior() {
        return Enclosure.exact(number()).complement();
    }
}
