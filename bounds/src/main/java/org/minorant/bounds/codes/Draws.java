package org.minorant.bounds.codes;

/**
 * The SplitMix64 generator (G. L. Steele, D. Lea, C. H. Flood, OOPSLA 2014, with D. Stafford's mixing constants, from memory), written out so that a seed gives the same codebooks on every
 * platform and version.
 */
final class Draws {

    private static final long GOLDEN = 0x9E3779B97F4A7C15L;

    private long counter;

    Draws(long seed) {
        counter = seed;
    }

    long nextLong() {
        counter += GOLDEN;
        long z = counter;
        z = (z ^ (z >>> 30)) * 0xBF58476D1CE4E5B9L;
        z = (z ^ (z >>> 27)) * 0x94D049BB133111EBL;
        return z ^ (z >>> 31);
    }

    /** A number from 0 to bound − 1, all equally likely: what would favour the small ones is thrown away. */
    int below(int bound) {
        int most = Integer.MAX_VALUE - (int) ((1L << 31) % bound);
        int r;
        do {
            r = (int) (nextLong() >>> 33);
        } while (r > most);
        return r % bound;
    }
}
