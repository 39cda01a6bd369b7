package org.minorant.bounds;

import java.util.Optional;
import org.minorant.bounds.divergence.Ball;
import org.minorant.bounds.divergence.PetzCurve;
import org.minorant.bounds.divergence.StatePair;
import org.minorant.core.Enclosure;
import org.minorant.core.InvalidInputException;
import org.minorant.measurement.HypothesisPair;

/**
 * What a bound on the type-II error is about: β_ε = min { Tr σ^⊗n T : 0 ≤ T ≤ 1, Tr ρ^⊗n (1−T) ≤ ε }.
 *
 * <p><b>Traces.</b> States are used as given, as {@link HypothesisPair#typeTwoError} does. With a = Tr ρ^⊗n and b = Tr σ^⊗n it is b times the error of the normalised
 * states at the level ε/a; divergences of normalised states serve so. Immutable and thread-safe.
 */
public final class TypeTwoProblem {

    /** The hypothesis that {@link #hasTwoStates} checks, as it is printed. */
    static final String LEVEL_INSIDE = "0 < epsilon < 1";

    private final HypothesisPair pair;
    private final double level;
    /** Computed when first asked for; the same value whoever computes it. */
    private volatile Optional<StatePair> spectra = Optional.empty();

    private TypeTwoProblem(HypothesisPair pair, double level) {
        this.pair = pair;
        this.level = level;
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
     * Returns the hypotheses.
     *
     * @return ρ^⊗n and σ^⊗n
     */
    public HypothesisPair pair() {
        return pair;
    }

    /**
     * Returns the type-I level.
     *
     * @return ε
     */
    public double level() {
        return level;
    }

    /**
     * Returns the number of copies.
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
     * Tells whether the level is neither 0 nor 1 and the two states of one copy at hand, which most bounds ask for.
     *
     * @return whether 0 &lt; ε &lt; 1 and {@link #single()} has states
     */
    public boolean hasTwoStates() {
        return level > 0 && level < 1 && single().hasStates();
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

    /** ψ(s) = ln Tr ρ^s σ^(1−s) of one copy, as given. */
    PetzCurve curve() {
        Ball zero = Ball.ZERO;
        return PetzCurve.of(spectra(), zero, zero);
    }

    /** ε/a, the level for normalised states. */
    Enclosure normalisedLevel() {
        return Enclosure.exact(level).dividedBy(pair.curve().firstTrace());
    }

    /** ln b. */
    Enclosure lnSecondTrace() {
        return pair.curve().secondTrace().ln();
    }
}
