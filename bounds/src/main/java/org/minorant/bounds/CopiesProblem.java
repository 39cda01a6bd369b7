package org.minorant.bounds;

import java.util.Optional;
import org.minorant.bounds.divergence.StatePair;
import org.minorant.measurement.HypothesisPair;

/**
 * What the bounds on the two kinds of error share: the hypotheses, one copy of them, and a number between 0 and 1 that is the prior or the level. What several bounds need of the states (spectra and their overlaps)
 * is computed when the first of them asks.
 */
abstract sealed class CopiesProblem permits TestingProblem, TypeTwoProblem {

    private final HypothesisPair pair;
    private final double number;
    /** Computed when first asked for; the same value whoever computes it. */
    private volatile Optional<StatePair> spectra = Optional.empty();

    CopiesProblem(HypothesisPair pair, double number) {
        this.pair = pair;
        this.number = number;
    }

    /**
     * Returns the hypotheses.
     *
     * @return ρ^⊗n and σ^⊗n
     */
    public HypothesisPair pair() {
        return pair;
    }

    /**
     * Returns the number of copies n.
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
     * Tells whether the prior, or the level, is neither 0 nor 1 and the two states of one copy are at hand, which most bounds ask for.
     *
     * @return whether both are so
     */
    public boolean hasTwoStates() {
        return number > 0 && number < 1 && single().hasStates();
    }

    /** The prior or the level. */
    double number() {
        return number;
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
