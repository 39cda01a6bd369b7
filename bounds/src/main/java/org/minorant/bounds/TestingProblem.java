package org.minorant.bounds;

import java.util.Optional;
import org.minorant.bounds.divergence.StatePair;
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
public final class TestingProblem {

    /** The hypothesis that {@link #hasTwoStates} checks, as it is printed. */
    static final String BOTH_POSSIBLE = "0 < p < 1";

    private final HypothesisPair pair;
    private final double prior;
    /** Computed when first asked for; the same value whoever computes it. */
    private volatile Optional<StatePair> spectra = Optional.empty();

    private TestingProblem(HypothesisPair pair, double prior) {
        this.pair = pair;
        this.prior = prior;
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
     * Returns the hypotheses.
     *
     * @return ρ and σ
     */
    public HypothesisPair pair() {
        return pair;
    }

    /**
     * Returns the prior of the first hypothesis.
     *
     * @return p
     */
    public double prior() {
        return prior;
    }

    /**
     * Returns the prior of the second hypothesis.
     *
     * @return an enclosure of 1 − p, which is meant exactly
     */
    public Enclosure otherPrior() {
        return Enclosure.exact(prior).complement();
    }

    /**
     * Returns the number of copies n: the hypotheses are ρ^⊗n and σ^⊗n.
     *
     * @return n, 1 unless the pair was made by {@link HypothesisPair#copies}
     */
    public int copies() {
        return pair.copyCount();
    }

    /**
     * Returns the hypotheses about one copy.
     *
     * @return ρ and σ themselves
     */
    public HypothesisPair single() {
        return pair.single();
    }

    /**
     * Tells whether both hypotheses are possible and the two states of one copy at hand, which most bounds ask for.
     *
     * @return whether 0 &lt; p &lt; 1 and {@link #single()} has states
     */
    public boolean hasTwoStates() {
        return prior > 0 && prior < 1 && single().hasStates();
    }

    /** The spectra of both states of one copy and their overlaps. */
    StatePair spectra() {
        Optional<StatePair> s = spectra;
        if (s.isEmpty()) {
            s = Optional.of(StatePair.of(single().first(), single().second()));
            spectra = s;
        }
        return s.get();
    }
}
