package org.minorant.bounds;

import java.util.Collections;
import java.util.List;
import org.minorant.core.DensityOperator;
import org.minorant.core.Information;
import org.minorant.core.InvalidInputException;
import org.minorant.core.PositiveOperator;

/**
 * A classical-quantum channel: to each letter x of a finite alphabet an output state W_x of one quantum system.
 *
 * <p>A classical channel is one whose outputs are diagonal in one basis: {@link #ofStochasticMatrix}, or any list of diagonal states, which is
 * recognised. Pure-state channels are lists of kets, or {@link #ofGram}.
 *
 * <p><b>Normalisation.</b> Traces that are one up to rounding are accepted as in {@link DensityOperator}. What is computed from a channel holds for the
 * outputs given and for the outputs divided by their traces, both.
 *
 * <p>Immutable and thread-safe. The capacity is worked out when first asked for.
 */
public final class ClassicalQuantumChannel {

    private final List<DensityOperator> outputs;
    private final int dimension;
    private final Lazy<ChannelOutputs> structure;
    private final Lazy<Capacity> capacity;
    private final Lazy<RenyiOutputs> renyi;
    private final Lazy<ChannelDispersion> dispersion;

    private ClassicalQuantumChannel(List<DensityOperator> outputs, int dimension, Lazy<ChannelOutputs> structure) {
        this.outputs = outputs;
        this.dimension = dimension;
        this.structure = structure;
        this.capacity = new Lazy<>(() -> CapacitySearch.of(outputs.size(), structure.get()));
        this.renyi = new Lazy<>(() -> structure.get().renyi());
        this.dispersion = new Lazy<>(() -> ChannelDispersion.of(this));
    }

    private static ClassicalQuantumChannel ofChecked(List<DensityOperator> outputs) {
        return new ClassicalQuantumChannel(
                outputs, outputs.get(0).dimension(), new Lazy<>(() -> ChannelOutputs.of(outputs)));
    }

    /**
     * Returns the channel with these outputs.
     *
     * @param outputs one state for each letter, at least one, all of the same dimension
     * @return the channel
     * @throws InvalidInputException if there is none or the dimensions differ
     */
    public static ClassicalQuantumChannel of(DensityOperator... outputs) {
        return of(List.of(outputs));
    }

    /**
     * Returns the channel with these outputs.
     *
     * @param outputs one state for each letter, at least one, all of the same dimension
     * @return the channel
     * @throws InvalidInputException if there is none or the dimensions differ
     */
    public static ClassicalQuantumChannel of(List<DensityOperator> outputs) {
        List<DensityOperator> copy = List.copyOf(outputs);
        ChannelChecks.outputs("ClassicalQuantumChannel.of", copy);
        return ofChecked(copy);
    }

    /**
     * Returns a classical channel. Its output states are made when asked for, so that large alphabets cost no more than the matrix.
     *
     * @param rows row x holds the probabilities of the outcomes, given letter x; each row at least 0, summing to one within its length times 2^-50
     * @return the channel with W_x = diag(row x)
     * @throws InvalidInputException if there is no row, the lengths differ, an entry is negative or not finite, or a row does not sum to one
     */
    public static ClassicalQuantumChannel ofStochasticMatrix(double[][] rows) {
        double[][] copy = ChannelChecks.rows("ClassicalQuantumChannel.ofStochasticMatrix", rows);
        DiagonalOutputs structure = new DiagonalOutputs(copy);
        return new ClassicalQuantumChannel(structure.states(), copy[0].length, new Lazy<>(() -> structure));
    }

    /**
     * Returns the pure-state channel whose kets have these inner products, G_xy = ⟨ψ_x|ψ_y⟩; on this much every bound depends.
     *
     * <p><b>Accuracy.</b> The kets are found from a factor of G, exact to about 30 digits; that error is carried in the states.
     *
     * @param re real parts of G, symmetric, with unit diagonal
     * @param im imaginary parts of G, antisymmetric
     * @return the channel, on a space of as many dimensions as letters or fewer
     * @throws InvalidInputException if the shape is wrong, an entry is not finite, G is not Hermitian or not positive, or a diagonal entry is not 1
     */
    public static ClassicalQuantumChannel ofGram(double[][] re, double[][] im) {
        PositiveOperator gram = PositiveOperator.of(re, im);
        for (int x = 0; x < gram.dimension(); x++) {
            if (gram.re(x, x) != 1) {
                throw new InvalidInputException(
                        "ClassicalQuantumChannel.ofGram",
                        "diagonal entry " + x + " is " + gram.re(x, x),
                        "1, as kets are normalised",
                        "divide row and column by its root");
            }
        }
        return ofChecked(GramKets.of(gram));
    }

    /**
     * Returns the number of letters.
     *
     * @return the size of the input alphabet
     */
    public int letters() {
        return outputs.size();
    }

    /**
     * Returns the dimension of the output system.
     *
     * @return the dimension
     */
    public int dimension() {
        return dimension;
    }

    /**
     * Returns all outputs.
     *
     * @return an unmodifiable list, one state for each letter
     */
    public List<DensityOperator> outputs() {
        return Collections.unmodifiableList(outputs);
    }

    /**
     * Returns the output state Σ P(x) W_x.
     *
     * @param input a distribution over the letters, summing to one within letters · 2^-50
     * @return the mixture; for a classical channel its probabilities are rounded to double, otherwise it keeps the factors of the outputs
     * @throws InvalidInputException if the input is not a distribution over the letters
     */
    public DensityOperator outputState(double... input) {
        return structure().mixtureState(ChannelChecks.input("ClassicalQuantumChannel.outputState", input, letters()));
    }

    /**
     * Returns the mutual information I(P) = S(Σ P(x) W_x) − Σ P(x) S(W_x), the Holevo quantity of the ensemble.
     *
     * <p><b>Accuracy.</b> A few 1e-15 nats; a few 1e-14 where the output has eigenvalues below 1e-12, up to about a hundred dimensions.
     *
     * @param input a distribution over the letters, summing to one within letters · 2^-50
     * @return an enclosure of I(P)
     * @throws InvalidInputException if the input is not a distribution over the letters
     */
    public Information mutualInformation(double... input) {
        double[] p = ChannelChecks.input("ClassicalQuantumChannel.mutualInformation", input, letters());
        return Information.ofNats(structure().certify(p).mutualInformation()).withSource("Holevo quantity of an input");
    }

    /**
     * Returns the capacity with the input that attains it, both certified.
     *
     * @return the capacity, worked out at the first call
     */
    public Capacity capacity() {
        return capacity.get();
    }

    ChannelOutputs structure() {
        return structure.get();
    }

    /**
     * Returns the dispersion: how much the information of one use spreads at the capacity.
     *
     * @return its least and largest value over the inputs that attain the capacity, worked out at the first call
     */
    public ChannelDispersion dispersion() {
        return dispersion.get();
    }

    RenyiOutputs renyi() {
        return renyi.get();
    }

    /** Letters and dimension. */
    @Override
    public String toString() {
        return "channel of " + letters() + " letters into dimension " + dimension;
    }
}
