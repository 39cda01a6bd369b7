package org.minorant.bounds.codes;

import java.util.Optional;
import org.minorant.bounds.ClassicalQuantumChannel;
import org.minorant.core.Enclosure;
import org.minorant.core.InvalidInputException;
import org.minorant.core.pair.WorkListener;

/**
 * The true average error of codebooks over a classical-quantum channel, where equally likely messages are decoded with the pretty-good measurement: with S = (1/M) Σ_m ρ_m, ρ_m the state of word m,
 *
 * <pre>error = 1 − (1/M²) Σ_m Tr[ρ_m S^(-½) ρ_m S^(-½)].</pre>
 *
 * <p><b>How.</b> The first of these that fits:
 *
 * <table>
 * <caption>Ways, reach and accuracy</caption>
 * <tr><th>way</th><th>reach</th><th>accuracy</th></tr>
 * <tr><td>classical channels: sum over outputs</td><td>M |Y|^n up to 2^34</td><td>relative, about (n|Y| + M) 1e-15</td></tr>
 * <tr><td>Gram matrix of all columns of different words, to 30 digits</td><td>256 columns (a word has as many as the product of its letters' ranks, one for kets), any n up to 1000 for so many</td><td>that of a norm to about 1e-27: an error of 1e-30
 * has some ten digits; about 1e-14 where words are linearly dependent</td></tr>
 * <tr><td>linear codes of kets that are alike: a codebook of a {@link CodebookFamily} with one field, M a power of its prime, and inner products of letters that depend on the difference of their symbols only (two kets with
 * equal counts, kets at equal angles of prime number): sums over characters</td><td>2^22 messages, any n</td><td>relative, about 1e-14 and n 1e-15; some 1e-8 absolutely where words are linearly dependent</td></tr>
 * <tr><td>the Gram matrix in double</td><td>4096 columns, not more than dimensions, any n</td><td>an error ε within 2√ε 1e-11 or better; some 1e-8 where words are linearly dependent</td></tr>
 * <tr><td>the space of outputs, in double</td><td>d^n up to 4096, 2^41 multiplications</td><td>absolute, about 1e-15/√λ with λ the least eigenvalue of the sum of the words' states; some 1e-7 where that is singular or nearly so</td></tr>
 * </table>
 *
 * <p>Letters are divided by their traces, so that the channel keeps traces; what is computed holds for that channel. Time for 4096 kets: a minute or two on one core.
 *
 * <p>Immutable and thread-safe; one decoder serves many codebooks.
 */
public final class PrettyGoodDecoder {

    private final ClassicalQuantumChannel channel;
    private final boolean classical;
    private final double[][] rows;
    private final Letters letters;
    private final WorkListener listener;

    private PrettyGoodDecoder(
            ClassicalQuantumChannel channel,
            boolean classical,
            double[][] rows,
            Letters letters,
            WorkListener listener) {
        this.channel = channel;
        this.classical = classical;
        this.rows = rows;
        this.letters = letters;
        this.listener = listener;
    }

    /** Columns of letters, made when first needed. */
    private static final class Letters {

        private final ClassicalQuantumChannel channel;
        private LetterColumns columns;

        Letters(ClassicalQuantumChannel channel) {
            this.channel = channel;
        }

        synchronized LetterColumns get() {
            if (columns == null) {
                columns = LetterColumns.of(channel);
            }
            return columns;
        }
    }

    /**
     * Returns the decoder of a channel.
     *
     * @param channel the channel
     * @return the decoder
     */
    public static PrettyGoodDecoder of(ClassicalQuantumChannel channel) {
        boolean classical = ClassicalSums.isClassical(channel.outputs());
        double[][] rows = classical ? ClassicalSums.rows(channel.outputs()) : new double[0][];
        return new PrettyGoodDecoder(channel, classical, rows, new Letters(channel), WorkListener.NONE);
    }

    /**
     * Returns the same decoder with a listener, which is told how far each evaluation is and can cancel it. Within an eigendecomposition nobody is asked, for a minute in 4096 dimensions.
     *
     * @param follower told about progress
     * @return the decoder
     */
    public PrettyGoodDecoder withProgress(WorkListener follower) {
        return new PrettyGoodDecoder(channel, classical, rows, letters, follower);
    }

    /**
     * Returns the channel.
     *
     * @return the channel
     */
    public ClassicalQuantumChannel channel() {
        return channel;
    }

    /**
     * Returns the average error of a codebook under the pretty-good measurement.
     *
     * @param code the codebook
     * @return an enclosure of the error probability
     * @throws InvalidInputException if a letter is not the channel's, or no way fits
     * @throws java.util.concurrent.CancellationException if the listener asks for it, or the thread is interrupted
     */
    public Enclosure errorProbability(Codebook code) {
        String asked = "PrettyGoodDecoder.errorProbability";
        code.requireAlphabet(asked, channel.letters());
        Watch watch = new Watch(listener);
        watch.checkpoint();
        if (classical && ClassicalSums.terms(code, channel.dimension()) <= ClassicalSums.TERMS) {
            return ClassicalSums.error(code, rows, watch);
        }
        Optional<CharacterSums> sums =
                code.messages() > WordGram.PRECISE ? CharacterSums.of(code, letters.get(), watch) : Optional.empty();
        WordColumns words = WordColumns.of(code, letters.get());
        double columns = words.count();
        // where different symbols stand for equal letters, sums over characters have eigenvalues 0, which cost digits
        if (sums.isPresent()
                && columns > WordGram.PRECISE
                && (sums.get().size() == words.size() || columns > WordGram.LARGEST)) {
            return sums.get().error();
        }
        double dimension = Math.pow(channel.dimension(), code.length());
        boolean space = dimension <= OutputSpace.LARGEST
                && OutputSpace.multiplications(words, dimension) <= OutputSpace.MULTIPLICATIONS;
        if (columns <= WordGram.PRECISE || columns <= WordGram.LARGEST && (columns <= dimension || !space)) {
            return new WordGram(words, watch).error();
        }
        if (space) {
            return new OutputSpace(words, watch).error();
        }
        throw new InvalidInputException(
                asked,
                words.size() + " different words with " + (long) Math.min(columns, 1e18) + " columns in "
                        + channel.dimension() + "^" + code.length() + " dimensions",
                "at most " + WordGram.LARGEST + " columns or " + OutputSpace.LARGEST
                        + " dimensions (classical channels: M times outputs up to " + (long) ClassicalSums.TERMS + ")",
                "ask for fewer messages or shorter words");
    }

    /** The channel. */
    @Override
    public String toString() {
        return "pretty-good decoder of a " + channel;
    }
}
