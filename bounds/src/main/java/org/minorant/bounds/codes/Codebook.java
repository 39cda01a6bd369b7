package org.minorant.bounds.codes;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import org.minorant.bounds.ClassicalQuantumChannel;
import org.minorant.core.DensityOperator;
import org.minorant.core.InvalidInputException;
import org.minorant.measurement.Ensemble;

/**
 * A codebook: for each of M messages a word of n letters. Letters are numbers from 0, as the channel counts them. Words may be equal.
 *
 * <p>A codebook of a {@link CodebookFamily} keeps the coefficients of its affine maps, from which {@link CodebookFamily#ofCoefficients} makes it again. Immutable and thread-safe.
 */
public final class Codebook {

    /** Letters in all words together. */
    static final long LARGEST = 1L << 27;

    private final int[][] words;
    private final List<int[]> coefficients;
    private final Optional<CodebookFamily> family;

    private Codebook(int[][] words, List<int[]> coefficients, Optional<CodebookFamily> family) {
        this.words = words;
        this.coefficients = coefficients;
        this.family = family;
    }

    /** Takes over words that are right, the coefficients that made them and the family they belong to. */
    static Codebook ofMaps(int[][] words, List<int[]> coefficients, CodebookFamily family) {
        return new Codebook(words, coefficients, Optional.of(family));
    }

    /** The family that the coefficients belong to. */
    Optional<CodebookFamily> family() {
        return family;
    }

    /**
     * Returns the codebook with these words.
     *
     * @param words one for each message, at least two, of one length that is at least 1; letters from 0
     * @return the codebook
     * @throws InvalidInputException if there are fewer than two words, their lengths differ or are 0, or a letter is negative
     */
    public static Codebook of(int[]... words) {
        requireMessages("Codebook.of", words.length);
        int n = words[0].length;
        requireLetters("Codebook.of", words.length, n);
        int[][] copy = new int[words.length][];
        for (int m = 0; m < words.length; m++) {
            if (words[m].length != n) {
                throw new InvalidInputException(
                        "Codebook.of",
                        "word " + m + " has " + words[m].length + " letters",
                        n + ", as word 0",
                        "give words of one length");
            }
            copy[m] = words[m].clone();
            for (int j = 0; j < n; j++) {
                if (copy[m][j] < 0) {
                    throw new InvalidInputException(
                            "Codebook.of",
                            "letter " + j + " of word " + m + " is " + copy[m][j],
                            "at least 0",
                            "count letters from 0, as the channel does");
                }
            }
        }
        return new Codebook(copy, List.of(), Optional.empty());
    }

    static void requireMessages(String asked, int messages) {
        if (messages < 2) {
            throw new InvalidInputException(
                    asked, "the number of messages is " + messages, "at least 2", "one message needs no code");
        }
    }

    static void requireLetters(String asked, int messages, int n) {
        if (n < 1 || (long) messages * n > LARGEST) {
            throw new InvalidInputException(
                    asked,
                    messages + " words of " + n + " letters",
                    "words of at least 1 letter, and " + LARGEST + " letters in all",
                    "ask for shorter words or fewer messages");
        }
    }

    /**
     * Returns the length of words.
     *
     * @return n
     */
    public int length() {
        return words[0].length;
    }

    /**
     * Returns the number of messages.
     *
     * @return M
     */
    public int messages() {
        return words.length;
    }

    /**
     * Returns a letter.
     *
     * @param message from 0
     * @param position from 0
     * @return the letter sent at this position for this message
     * @throws InvalidInputException if an index is out of range
     */
    public int letter(int message, int position) {
        requireIndex("the message", message, words.length);
        requireIndex("the position", position, length());
        return words[message][position];
    }

    /**
     * Returns a word.
     *
     * @param message from 0
     * @return its letters, a copy
     * @throws InvalidInputException if the message is out of range
     */
    public int[] word(int message) {
        requireIndex("the message", message, words.length);
        return words[message].clone();
    }

    private static void requireIndex(String what, int i, int size) {
        if (i < 0 || i >= size) {
            throw new InvalidInputException(
                    "Codebook", what + " is " + i, "0 to " + (size - 1), "count messages and positions from 0");
        }
    }

    /**
     * Returns the coefficients of the affine maps that made the words.
     *
     * @return for each field the numbers b_0, A_00, …, A_0(k−1), b_1, A_10, …, copies; nothing for a codebook given by its words
     */
    public List<int[]> coefficients() {
        return coefficients.stream().map(int[]::clone).toList();
    }

    /**
     * Returns the words' states over a channel, each with prior 1/M: what a receiver has to tell apart. Words are tensor products, formed in full.
     *
     * @param channel a channel with all the letters
     * @return the ensemble, of dimension d^n
     * @throws InvalidInputException if a letter is not the channel's, or d^n exceeds 4096
     */
    public Ensemble ensemble(ClassicalQuantumChannel channel) {
        String asked = "Codebook.ensemble";
        requireAlphabet(asked, channel.letters());
        double dimension = Math.pow(channel.dimension(), length());
        if (!(dimension <= OutputSpace.LARGEST)) {
            throw new InvalidInputException(
                    asked,
                    "words have the dimension " + channel.dimension() + "^" + length(),
                    "at most " + OutputSpace.LARGEST,
                    "use PrettyGoodDecoder, which needs no matrices of words where a Gram matrix does");
        }
        List<DensityOperator> states = new ArrayList<>();
        for (int[] w : words) {
            DensityOperator s = channel.outputs().get(w[0]);
            for (int j = 1; j < w.length; j++) {
                s = s.tensor(channel.outputs().get(w[j]));
            }
            states.add(s);
        }
        return Ensemble.equiprobable(states);
    }

    /** Refuses letters that a channel does not have. */
    void requireAlphabet(String asked, int letters) {
        for (int m = 0; m < words.length; m++) {
            for (int j = 0; j < words[m].length; j++) {
                if (words[m][j] >= letters) {
                    throw new InvalidInputException(
                            asked,
                            "letter " + j + " of word " + m + " is " + words[m][j],
                            "0 to " + (letters - 1) + ", the letters of the channel",
                            "take a channel with more letters, or other words");
                }
            }
        }
    }

    /** The words themselves, which nobody changes. */
    int[][] words() {
        return words;
    }

    /** Equal words and coefficients. */
    @Override
    public boolean equals(Object o) {
        return o instanceof Codebook other
                && Arrays.deepEquals(words, other.words)
                && Arrays.deepEquals(coefficients.toArray(), other.coefficients.toArray());
    }

    @Override
    public int hashCode() {
        return 31 * Arrays.deepHashCode(words) + Arrays.deepHashCode(coefficients.toArray());
    }

    /** The number and the length of words. */
    @Override
    public String toString() {
        return "codebook of " + words.length + " words of " + length() + " letters";
    }
}
