package org.minorant.bounds;

import java.util.Optional;

/**
 * A theorem that bounds the least type-II error at a type-I level. A new theorem is one small class that implements this; {@link
 * TestingBounds#typeTwo(org.minorant.measurement.HypothesisPair, double, java.util.List)} takes it beside the known ones and checks it against
 * them.
 */
@FunctionalInterface
public interface TypeTwoBound {

    /**
     * Returns the bound that the theorem gives for a problem.
     *
     * @param problem the states and the level
     * @return the bound with its side, source and the hypotheses that were checked; empty if a hypothesis of the theorem does not hold
     */
    Optional<Bound> on(TypeTwoProblem problem);
}
