package org.minorant.measurement;

import org.minorant.core.InvalidInputException;

/**
 * The SplitMix64 generator: a counter that steps by the golden ratio, mixed by two multiplications (G. L. Steele, D. Lea, C. H. Flood, OOPSLA 2014;
 * the mixing constants are D. Stafford's variant 13; both from memory). Written out so that a seed gives the same numbers on every platform and version.
 *
 * <p>Not thread-safe, and not for secrets: whoever knows a few numbers knows the rest.
 */
public final class SplitMix {

    private static final long GOLDEN = 0x9E3779B97F4A7C15L;

    private long counter;

    /**
     * Starts the sequence.
     *
     * @param seed any number; the same seed gives the same sequence
     */
    public SplitMix(long seed) {
        counter = seed;
    }

    /**
     * Returns the next 64 bits.
     *
     * @return a number, all equally likely
     */
    public long nextLong() {
        counter += GOLDEN;
        long z = counter;
        z = (z ^ (z >>> 30)) * 0xBF58476D1CE4E5B9L;
        z = (z ^ (z >>> 27)) * 0x94D049BB133111EBL;
        return z ^ (z >>> 31);
    }

    /**
     * Returns a number between 0 and 1.
     *
     * @return a multiple of 2^-53 in [0, 1), all equally likely
     */
    public double nextDouble() {
        return (nextLong() >>> 11) * 0x1p-53;
    }

    /**
     * Returns a whole number below a bound.
     *
     * @param bound at least 1
     * @return a number from 0 to bound − 1, all equally likely: what would favour the small ones is thrown away
     * @throws InvalidInputException if the bound is below 1
     */
    public int below(int bound) {
        if (bound < 1) {
            throw new InvalidInputException(
                    "SplitMix.below", "the bound is " + bound, "at least 1", "give a larger one");
        }
        int most = Integer.MAX_VALUE - (int) ((1L << 31) % bound);
        int r;
        do {
            r = (int) (nextLong() >>> 33);
        } while (r > most);
        return r % bound;
    }
}
