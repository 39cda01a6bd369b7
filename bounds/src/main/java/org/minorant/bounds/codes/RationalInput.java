package org.minorant.bounds.codes;

import java.util.Arrays;
import org.minorant.core.InvalidInputException;

/**
 * A distribution of letters with rational probabilities, given by counts: P(x) = c_x/N, N = Σ c_x, exactly.
 *
 * <p>N symbols stand for the letters, c_x of them for letter x in order. N is a product of powers of different primes, so a symbol is one element of a finite field for each of them:
 * uniform independent field elements make uniform symbols, and these make letters with distribution P.
 *
 * <p>Immutable and thread-safe.
 */
public final class RationalInput {

    /** The largest N. */
    public static final int LARGEST = FiniteField.LARGEST;

    private final int[] counts;
    private final int[] table;

    private RationalInput(int[] counts, int[] table) {
        this.counts = counts;
        this.table = table;
    }

    /**
     * Returns the distribution with these counts.
     *
     * @param counts one for each letter, at least 0, with a sum of 2 to 65536; letters with count 0 are never sent
     * @return the distribution c_x/Σc
     * @throws InvalidInputException if a count is negative or the sum is out of range
     */
    public static RationalInput of(int... counts) {
        long sum = 0;
        for (int x = 0; x < counts.length; x++) {
            if (counts[x] < 0) {
                throw new InvalidInputException(
                        "RationalInput.of",
                        "the count of letter " + x + " is " + counts[x],
                        "at least 0",
                        "give how many of the symbols stand for each letter");
            }
            sum += counts[x];
        }
        if (sum < 2 || sum > LARGEST) {
            throw new InvalidInputException(
                    "RationalInput.of",
                    "the counts sum to " + sum,
                    "2 to " + LARGEST,
                    "give P(x) as c_x/N with a common N in that range");
        }
        int[] table = new int[(int) sum];
        int at = 0;
        for (int x = 0; x < counts.length; x++) {
            Arrays.fill(table, at, at + counts[x], x);
            at += counts[x];
        }
        return new RationalInput(counts.clone(), table);
    }

    /**
     * Returns the uniform distribution.
     *
     * @param letters the number of letters, 2 to 65536
     * @return 1/letters each
     * @throws InvalidInputException if the number is out of range
     */
    public static RationalInput uniform(int letters) {
        int[] counts = new int[Math.max(0, letters)];
        Arrays.fill(counts, 1);
        return of(counts);
    }

    /**
     * Returns the number of letters.
     *
     * @return letters, those never sent included
     */
    public int letters() {
        return counts.length;
    }

    /**
     * Returns N.
     *
     * @return the common denominator, the sum of the counts
     */
    public int denominator() {
        return table.length;
    }

    /**
     * Returns the counts.
     *
     * @return c_x, a copy
     */
    public int[] counts() {
        return counts.clone();
    }

    /**
     * Returns the probabilities, rounded to double.
     *
     * @return c_x/N for each letter, each within 2^-53 of its own size
     */
    public double[] probabilities() {
        return Arrays.stream(counts).mapToDouble(c -> c / (double) table.length).toArray();
    }

    /** The letter that a symbol stands for. */
    int letter(int symbol) {
        return table[symbol];
    }

    /** The powers of different primes of which N is the product, ascending by prime. */
    int[] primePowers() {
        int[] out = new int[16];
        int count = 0;
        for (int rest = table.length; rest > 1; ) {
            int p = FiniteField.leastFactor(rest);
            int power = 1;
            while (rest % p == 0) {
                rest /= p;
                power *= p;
            }
            out[count++] = power;
        }
        return Arrays.copyOf(out, count);
    }

    /** Equal counts. */
    @Override
    public boolean equals(Object o) {
        return o instanceof RationalInput other && Arrays.equals(counts, other.counts);
    }

    @Override
    public int hashCode() {
        return Arrays.hashCode(counts);
    }

    /** The counts and their sum. */
    @Override
    public String toString() {
        return "input " + Arrays.toString(counts) + "/" + table.length;
    }
}
