package org.minorant.bounds.codes;

import java.math.BigInteger;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import org.minorant.bounds.ClassicalQuantumChannel;
import org.minorant.core.Enclosure;
import org.minorant.core.Estimate;
import org.minorant.core.InvalidInputException;
import org.minorant.core.WideDouble;
import org.minorant.measurement.SplitMix;

/**
 * The codebooks that affine maps over finite fields make: any two of their words are independent, with letters drawn from a rational input distribution P.
 *
 * <p><b>Construction.</b> Let N, the denominator of P, be q_1 q_2 … with powers q of different primes. For each, message m is written in base q, which makes a vector m in F_q^k, k the
 * least with q^k ≥ M; its word over F_q is Am + b, with n × k coefficients A and n coefficients b. The elements at a position, one for each field, are one of N symbols, and the symbol
 * stands for a letter ({@link RationalInput}). The family has one codebook for each choice of all coefficients, all equally likely.
 *
 * <p><b>Marginals.</b> b is uniform on F_q^n, whatever A and m; so is Am + b. Hence symbols are uniform, independent over fields and positions, and every word has the distribution P^n, exactly.
 *
 * <p><b>Pairwise independence.</b> Let m ≠ m'. As q^k ≥ M, their vectors over F_q differ, say by v with v_i ≠ 0. Row j of A gives A_j·v, which is uniform for any values of
 * the other coefficients, as A_ji ↦ A_ji v_i is one-to-one; rows are independent, so Av is uniform on F_q^n. Given A, Am' + b is uniform. So (Av, Am' + b) is uniform on F_q^n × F_q^n, and so is
 * (Am + b, Am' + b). Fields are independent of each other. Hence two words are independent, each with distribution P^n. (Three need not be: this is what makes the family small.)
 *
 * <p><b>What it is good for.</b> One-shot random coding needs no more: the mean over the family of the average error under the pretty-good measurement is at most f(M − 1), as
 * {@link org.minorant.bounds.CodingBounds#achievableError(long)} returns it for n uses and this input. With A = ρ_m and B the sum of the other words' states, the error of message m is Tr[A (A+B)^(-½) B (A+B)^(-½)] ≤ Tr[A ∧ B]; the
 * right side is concave in B, and given word m the mean of B is (M − 1) ρ_B^⊗n, by pairwise independence (H.-C. Cheng, PRX Quantum 4, 040330, 2023, from memory).
 *
 * <p>Immutable and thread-safe.
 */
public final class CodebookFamily {

    /** Families of more codebooks are not gone through. */
    private static final int ENUMERATED = 1 << 16;

    private final RationalInput input;
    private final int length;
    private final int messages;
    private final List<AffineMaps> maps;

    private CodebookFamily(RationalInput input, int length, int messages, List<AffineMaps> maps) {
        this.input = input;
        this.length = length;
        this.messages = messages;
        this.maps = maps;
    }

    /**
     * Returns the family.
     *
     * @param input the distribution of letters
     * @param length n, the length of words, at least 1
     * @param messages M, at least 2
     * @return the family
     * @throws InvalidInputException if n or M is out of range, or there are more than 2^27 letters in all words together
     */
    public static CodebookFamily of(RationalInput input, int length, int messages) {
        Codebook.requireMessages("CodebookFamily.of", messages);
        Codebook.requireLetters("CodebookFamily.of", messages, length);
        List<AffineMaps> maps = new ArrayList<>();
        for (int q : input.primePowers()) {
            maps.add(new AffineMaps(FiniteField.of(q), length, messages));
        }
        return new CodebookFamily(input, length, messages, List.copyOf(maps));
    }

    /**
     * Returns the distribution of letters.
     *
     * @return P
     */
    public RationalInput input() {
        return input;
    }

    /**
     * Returns the length of words.
     *
     * @return n
     */
    public int length() {
        return length;
    }

    /**
     * Returns the number of messages.
     *
     * @return M
     */
    public int messages() {
        return messages;
    }

    /**
     * Returns the number of choices of coefficients.
     *
     * @return the product of q^(n(k+1)) over the fields
     */
    public BigInteger size() {
        BigInteger s = BigInteger.ONE;
        for (AffineMaps m : maps) {
            s = s.multiply(m.size());
        }
        return s;
    }

    /**
     * Draws a codebook, all choices of coefficients equally likely as far as the generator goes (SplitMix64).
     *
     * @param seed the same seed gives the same codebook
     * @return a codebook of the family
     */
    public Codebook draw(long seed) {
        SplitMix draws = new SplitMix(seed);
        return make(maps.stream().map(m -> m.draw(draws)).toList());
    }

    /**
     * Returns a codebook by its number.
     *
     * @param index 0 to size − 1; its digits are the coefficients
     * @return that codebook
     * @throws InvalidInputException if the index is out of range
     */
    public Codebook get(BigInteger index) {
        if (index.signum() < 0 || index.compareTo(size()) >= 0) {
            throw new InvalidInputException(
                    "CodebookFamily.get",
                    "the index is " + index,
                    "0 to " + size().subtract(BigInteger.ONE),
                    "count the codebooks from 0");
        }
        List<int[]> coefficients = new ArrayList<>();
        BigInteger rest = index;
        for (AffineMaps m : maps) {
            BigInteger[] split = rest.divideAndRemainder(m.size());
            coefficients.add(m.get(split[1]));
            rest = split[0];
        }
        return make(coefficients);
    }

    /**
     * Returns the codebook with these coefficients.
     *
     * @param coefficients for each field, ascending by prime, the numbers b_0, A_00, …, A_0(k−1), b_1, A_10, …, each from 0 to q − 1
     * @return the codebook
     * @throws InvalidInputException if the numbers of fields or coefficients are not those of the family, or one is out of range
     */
    public Codebook ofCoefficients(List<int[]> coefficients) {
        if (coefficients.size() != maps.size()) {
            throw new InvalidInputException(
                    "CodebookFamily.ofCoefficients",
                    "coefficients for " + coefficients.size() + " fields",
                    maps.size() + " fields",
                    "give what Codebook.coefficients returned for a codebook of this family");
        }
        List<int[]> copies = new ArrayList<>();
        for (int f = 0; f < maps.size(); f++) {
            copies.add(maps.get(f).check(coefficients.get(f)));
        }
        return make(copies);
    }

    List<AffineMaps> maps() {
        return maps;
    }

    private Codebook make(List<int[]> coefficients) {
        int[][] words = new int[messages][length];
        int place = 1;
        for (int f = 0; f < maps.size(); f++) {
            maps.get(f).addWords(coefficients.get(f), place, words);
            place *= maps.get(f).fieldSize();
        }
        for (int[] w : words) {
            Arrays.setAll(w, j -> input.letter(w[j]));
        }
        return Codebook.ofMaps(words, coefficients, this);
    }

    /**
     * Returns the mean over the whole family of the average error under the pretty-good measurement: at most f(M − 1).
     *
     * @param channel the channel
     * @return an enclosure of the mean
     * @throws InvalidInputException if the family has more than 65536 codebooks, or a codebook is refused by {@link PrettyGoodDecoder}
     */
    public Enclosure averageError(ClassicalQuantumChannel channel) {
        if (size().compareTo(BigInteger.valueOf(ENUMERATED)) > 0) {
            throw new InvalidInputException(
                    "CodebookFamily.averageError",
                    "a family of about 2^" + (size().bitLength() - 1) + " codebooks",
                    "at most " + ENUMERATED,
                    "use averageErrorEstimate, which draws some");
        }
        int count = size().intValueExact();
        PrettyGoodDecoder decoder = PrettyGoodDecoder.of(channel);
        Enclosure sum = Enclosure.ZERO;
        for (int i = 0; i < count; i++) {
            sum = sum.plus(decoder.errorProbability(get(BigInteger.valueOf(i))));
        }
        return sum.dividedBy(Enclosure.exact(count));
    }

    /**
     * Estimates the mean over the family from codebooks drawn at random; the error given is one standard deviation of the mean, relative to it.
     *
     * @param channel the channel
     * @param draws how many codebooks to draw, at least 2
     * @param seed the same seed draws the same codebooks
     * @return the estimate
     * @throws InvalidInputException if there are fewer than two draws, or a codebook is refused by {@link PrettyGoodDecoder}
     */
    public Estimate averageErrorEstimate(ClassicalQuantumChannel channel, int draws, long seed) {
        if (draws < 2) {
            throw new InvalidInputException(
                    "CodebookFamily.averageErrorEstimate",
                    draws + " draws",
                    "at least 2",
                    "a spread needs two codebooks");
        }
        PrettyGoodDecoder decoder = PrettyGoodDecoder.of(channel);
        SplitMix seeds = new SplitMix(seed);
        double[] errors = new double[draws];
        Arrays.setAll(
                errors, i -> decoder.errorProbability(draw(seeds.nextLong())).midpoint());
        double mean = Arrays.stream(errors).sum() / draws;
        double spread = Arrays.stream(errors).map(e -> (e - mean) * (e - mean)).sum() / (draws - 1);
        return new Estimate(WideDouble.of(mean), mean > 0 ? Math.sqrt(spread / draws) / mean : 0);
    }

    /** Input, length and number of messages. */
    @Override
    public String toString() {
        return "family of affine codebooks, " + messages + " words of " + length + " letters, " + input;
    }
}
