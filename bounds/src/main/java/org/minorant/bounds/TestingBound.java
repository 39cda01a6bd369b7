package org.minorant.bounds;

import java.util.Optional;

/**
 * A theorem that bounds the minimum error of telling two states apart. A new theorem is one small class that implements this; {@link
 * TestingBounds#of(org.minorant.measurement.HypothesisPair, double, java.util.List)} takes it beside the known ones and checks it against
 * them.
 */
@FunctionalInterface
public interface TestingBound {

    /**
     * Returns the bound that the theorem gives for a problem.
     *
     * @param problem the states and the prior
     * @return the bound with its side, source and the hypotheses that were checked; empty if a hypothesis of the theorem does not hold
     */
    Optional<Bound> on(TestingProblem problem);
}
