package org.minorant.bounds.codes;

import org.minorant.bounds.ClassicalQuantumChannel;
import org.minorant.bounds.CodingBounds;
import org.minorant.core.Enclosure;
import org.minorant.core.InvalidInputException;
import org.minorant.core.pair.WorkListener;
import org.minorant.measurement.SplitMix;

/**
 * Looks for a codebook that keeps what the random-coding bound promises: its certified error under the pretty-good measurement is at most f(M − 1).
 *
 * <p>The mean over a {@link CodebookFamily} is at most f(M − 1), so that such a codebook exists. Codebooks are drawn one after the other from a seed until one surely is: the upper end of its error does
 * not exceed the lower end of the bound. As a rule about half of them are. The same seed finds the same codebook.
 *
 * <p><b>The bound</b> is that of {@link CodingBounds#achievableError(long)} for n uses and the probabilities rounded to double; it is widened by 3n · 2^-53 of itself, by which the value
 * at c_x/N may differ: A ↦ Tr[A ∧ B] is monotone and homogeneous, and each of the words' probabilities and of the n factors of the mean output moves by at most 2^-53 of itself.
 *
 * <p>Immutable and thread-safe.
 */
public final class CodebookSearch {

    /** How many codebooks are drawn unless chosen otherwise. */
    public static final int DRAWS = 1000;

    private final ClassicalQuantumChannel channel;
    private final CodebookFamily family;
    private final long seed;
    private final int draws;
    private final WorkListener listener;

    private CodebookSearch(
            ClassicalQuantumChannel channel, CodebookFamily family, long seed, int draws, WorkListener listener) {
        this.channel = channel;
        this.family = family;
        this.seed = seed;
        this.draws = draws;
        this.listener = listener;
    }

    /**
     * Returns a search with seed 0 and {@value #DRAWS} draws.
     *
     * @param channel the channel
     * @param family the codebooks to draw from
     * @return the search
     * @throws InvalidInputException if the input has not as many letters as the channel
     */
    public static CodebookSearch of(ClassicalQuantumChannel channel, CodebookFamily family) {
        if (family.input().letters() != channel.letters()) {
            throw new InvalidInputException(
                    "CodebookSearch.of",
                    "the input has " + family.input().letters() + " letters",
                    channel.letters() + ", as the channel",
                    "give a count for each letter, 0 for those not to be sent");
        }
        return new CodebookSearch(channel, family, 0, DRAWS, WorkListener.NONE);
    }

    /**
     * Returns the same search from another seed.
     *
     * @param s the seed
     * @return the search
     */
    public CodebookSearch withSeed(long s) {
        return new CodebookSearch(channel, family, s, draws, listener);
    }

    /**
     * Returns the same search with another limit on the number of draws.
     *
     * @param most at least 1
     * @return the search
     * @throws InvalidInputException if the number is below 1
     */
    public CodebookSearch withDraws(int most) {
        if (most < 1) {
            throw new InvalidInputException(
                    "CodebookSearch.withDraws", most + " draws", "at least 1", "allow a codebook to be drawn");
        }
        return new CodebookSearch(channel, family, seed, most, listener);
    }

    /**
     * Returns the same search with a listener, which is told how many of the codebooks have been drawn, and can cancel it.
     *
     * @param follower told about progress
     * @return the search
     */
    public CodebookSearch withProgress(WorkListener follower) {
        return new CodebookSearch(channel, family, seed, draws, follower);
    }

    /**
     * Returns f(M − 1) for the family: its mean error is at most this.
     *
     * @return the bound for n uses, M messages and the family's input
     * @throws InvalidInputException if {@link CodingBounds} does not cover n uses of the channel
     */
    public Enclosure bound() {
        Enclosure f = CodingBounds.of(channel)
                .withInput(family.input().probabilities())
                .uses(family.length())
                .achievableError(family.messages());
        double rounding = 3.0 * family.length() * 0x1p-53 * (1 + 0x1p-20);
        return f.times(Enclosure.of(1 - rounding, 1 + rounding)).min(Enclosure.ONE);
    }

    /**
     * Draws codebooks until one is surely at or below the bound.
     *
     * @return the codebook with its error
     * @throws InvalidInputException if none of the draws is, or the channel is not covered by {@link CodingBounds} or {@link PrettyGoodDecoder}
     * @throws java.util.concurrent.CancellationException if the listener asks for it, or the thread is interrupted
     */
    public FoundCodebook find() {
        return find(bound());
    }

    /**
     * Draws codebooks until one is surely at or below a number given.
     *
     * @param bound what the error shall not exceed: f(M − 1) worked out in another way, or anything else
     * @return the codebook with its error
     * @throws InvalidInputException if none of the draws is, or the channel is not covered by {@link PrettyGoodDecoder}
     * @throws java.util.concurrent.CancellationException if the listener asks for it, or the thread is interrupted
     */
    public FoundCodebook find(Enclosure bound) {
        int drawn = 0;
        WorkListener quiet = new WorkListener() {
            @Override
            public void onProgress(long done, long total) {
                // codebooks are counted here, not the parts of one
            }

            @Override
            public boolean isCancelled() {
                return listener.isCancelled();
            }
        };
        PrettyGoodDecoder decoder = PrettyGoodDecoder.of(channel).withProgress(quiet);
        SplitMix seeds = new SplitMix(seed);
        double least = Double.POSITIVE_INFINITY;
        while (drawn < draws) {
            Codebook code = family.draw(seeds.nextLong());
            Enclosure error = decoder.errorProbability(code);
            new Watch(listener).done(++drawn, draws);
            if (error.upperWide().compareTo(bound.lowerWide()) <= 0) {
                return new FoundCodebook(code, error, bound, drawn);
            }
            least = Math.min(least, error.upper());
        }
        throw new InvalidInputException(
                "CodebookSearch.find",
                "the least error of " + draws + " codebooks is " + least,
                "at most " + bound.lower(),
                "allow more draws, or take another seed");
    }

    /** What is searched. */
    @Override
    public String toString() {
        return "search of a " + family + ", seed " + seed;
    }
}
