package org.minorant.bounds;

import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;

/**
 * The entanglement-assisted classical capacity of a channel N, certified from both sides, with the input that nearly attains it.
 *
 * <pre>C = max over ρ of I(R:B) of N(θ_ρ) = max over ρ of S(ρ) + S(N(ρ)) − S(N^c(ρ)),   θ_ρ a purification of ρ, N^c the complementary channel.</pre>
 *
 * <p><b>Accuracy.</b> The lower end of {@link #value()} is at most I of the input found, the upper end at least the largest eigenvalue of the derivative of I there, which no input exceeds, as I is concave. Both
 * hold whether or not the search converged, and {@link #gap()} says how well it did: usually below 1e-12 nats for a few dimensions. If the Kraus operators K miss ΣK*K = 1 by rounding, this is the capacity of
 * the channel with K(ΣK*K)^(−½).
 *
 * <p>Immutable and thread-safe.
 *
 * <p>Sources: C. Adami, N. J. Cerf, Phys. Rev. A 56, 3470 (1997); C. H. Bennett, P. W. Shor, J. A. Smolin, A. V. Thapliyal, IEEE Trans. Inf. Theory 48, 2637 (2002) (both from memory).
 */
public final class AssistedCapacity {

    private final Information value;
    private final DensityOperator input;
    private final int iterations;

    AssistedCapacity(Information value, DensityOperator input, int iterations) {
        this.value = value;
        this.input = input;
        this.iterations = iterations;
    }

    /**
     * Returns the capacity.
     *
     * @return an enclosure of C
     */
    public Information value() {
        return value;
    }

    /**
     * Returns the input found: half of the entangled state that is sent. Its mutual information is at least the lower end of {@link #value()}.
     *
     * @return a state of the input system
     */
    public DensityOperator input() {
        return input;
    }

    /**
     * Returns the certified gap: how far the input found can be from the best one, in nats, plus rounding.
     *
     * @return upper end minus lower end of the capacity in nats
     */
    public double gap() {
        return value.nats().width();
    }

    /**
     * Returns the number of steps that the search took.
     *
     * @return the steps; 0 if the maximally mixed input was found to be the best
     */
    public int iterations() {
        return iterations;
    }

    /** The capacity in bits, with certain digits only, or its two ends. */
    @Override
    public String toString() {
        Enclosure bits = value.bits();
        return "assisted capacity " + bits + " bit, gap " + gap() + " nat, " + iterations + " steps";
    }
}
