package org.minorant.core.state;

import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;

/**
 * A state of light on the photon numbers 0, …, d−1, and what was cut off.
 *
 * <p><b>Which state.</b> With ρ the ideal state and Π the projector onto the first d photon numbers, the state is ΠρΠ / Tr[ρΠ], normalised,
 * up to rounding of its numbers. It is used as those numbers say; how far it is from ρ, rounding included, is bounded here. By that bound
 * no measurement tells the two apart by more, in any probability.
 *
 * @param state the truncated and normalised state
 * @param discardedWeight an enclosure of 1 − Tr[ρΠ], the probability in ρ of d photons or more
 * @param traceDistanceBound a certified upper end of ½‖ρ − state‖₁
 */
public record TruncatedState(DensityOperator state, Enclosure discardedWeight, double traceDistanceBound) {

    /**
     * Returns the dimension, which is the number of photon numbers kept.
     *
     * @return d
     */
    public int dimension() {
        return state.dimension();
    }
}
