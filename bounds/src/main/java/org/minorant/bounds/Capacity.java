package org.minorant.bounds;

import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;

/**
 * The capacity of a classical-quantum channel, certified from both sides, with the input that nearly attains it.
 *
 * <pre>C = max over P of I(P),   I(P) = S(Σ P(x) W_x) − Σ P(x) S(W_x) = min over σ of max over x of D(W_x‖σ)</pre>
 *
 * <p><b>Accuracy.</b> The lower end of {@link #value()} is at most I of the input found, the upper end at least max_x D(W_x‖σ) for a state σ near its
 * output: both hold whether or not the search converged, and {@link #gap()} says how well it did. For dimensions up to about a hundred the gap is
 * usually below 1e-12 nats.
 *
 * <p><b>Special cases.</b> Letters that the best input does not use have probability exactly 0. A channel whose outputs are all equal has capacity 0
 * and the uniform input.
 *
 * <p>Immutable and thread-safe.
 *
 * <p>Sources: A. S. Holevo, IEEE Trans. Inf. Theory 44, 269 (1998); B. Schumacher, M. D. Westmoreland, Phys. Rev. A 56, 131 (1997); for the minimax
 * form M. Ohya, D. Petz, N. Watanabe, Probab. Math. Stat. 17, 179 (1997) (all from memory).
 */
public final class Capacity {

    private final Information value;
    private final double[] input;
    private final DensityOperator outputState;
    private final int iterations;

    Capacity(Information value, double[] input, DensityOperator outputState, int iterations) {
        this.value = value;
        this.input = input.clone();
        this.outputState = outputState;
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
     * Returns the input distribution found. Its mutual information is at least the lower end of {@link #value()}.
     *
     * @return one probability for each letter, a copy; 0 for a letter that is not used
     */
    public double[] input() {
        return input.clone();
    }

    /**
     * Returns the output state Σ P(x) W_x of the input found.
     *
     * @return the mixture, keeping the factors of the letters
     */
    public DensityOperator outputState() {
        return outputState;
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
     * @return the steps; 0 if the uniform input was found to be the best
     */
    public int iterations() {
        return iterations;
    }

    /** The capacity in bits, with certain digits only, or its two ends. */
    @Override
    public String toString() {
        Enclosure bits = value.bits();
        return "capacity " + bits + " bit, gap " + gap() + " nat, " + iterations + " steps";
    }
}
