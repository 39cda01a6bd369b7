package org.minorant.measurement;

/**
 * The SplitMix64 generator: a counter that steps by the golden ratio, mixed by two multiplications (G. L. Steele, D. Lea, C. H. Flood, OOPSLA 2014;
 * the mixing constants are D. Stafford's variant 13; both from memory). Written out so that a seed gives the same numbers on every platform and version.
 */
final class SplitMix {

    private static final long GOLDEN = 0x9E3779B97F4A7C15L;

    private long counter;

    SplitMix(long seed) {
        counter = seed;
    }

    long nextLong() {
        counter += GOLDEN;
        long z = counter;
        z = (z ^ (z >>> 30)) * 0xBF58476D1CE4E5B9L;
        z = (z ^ (z >>> 27)) * 0x94D049BB133111EBL;
        return z ^ (z >>> 31);
    }

    /** A multiple of 2^-53 in [0, 1). */
    double nextDouble() {
        return (nextLong() >>> 11) * 0x1p-53;
    }
}
