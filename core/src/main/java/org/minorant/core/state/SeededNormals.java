package org.minorant.core.state;

/**
 * Independent standard normal numbers from a seed: the generator SplitMix64 and the method of Box and Muller with {@link StrictMath}, both
 * written out or exactly specified, so that the bits are the same on every platform and version (those of {@link
 * java.util.random.RandomGenerator#nextGaussian()} are not promised).
 *
 * <p>Not for cryptography: 64 bits of state, and an output tells the state.
 *
 * <p>Sources: G. L. Steele, D. Lea, C. H. Flood, Fast splittable pseudorandom number generators, OOPSLA 2014; G. E. P. Box, M. E. Muller,
 * Ann. Math. Statist. 29, 610 (1958) (both from memory).
 */
final class SeededNormals {

    private static final long GOLDEN = 0x9e3779b97f4a7c15L;

    private long state;
    private double spare;
    private boolean hasSpare;

    SeededNormals(long seed) {
        this.state = seed;
    }

    long nextLong() {
        state += GOLDEN;
        long z = state;
        z = (z ^ z >>> 30) * 0xbf58476d1ce4e5b9L;
        z = (z ^ z >>> 27) * 0x94d049bb133111ebL;
        return z ^ z >>> 31;
    }

    /** Uniform on the multiples of 2^-53 in (0, 1]. */
    private double uniform() {
        return ((nextLong() >>> 11) + 1) * 0x1p-53;
    }

    double next() {
        if (hasSpare) {
            hasSpare = false;
            return spare;
        }
        double radius = Math.sqrt(-2 * StrictMath.log(uniform()));
        double angle = 2 * Math.PI * uniform();
        spare = radius * StrictMath.sin(angle);
        hasSpare = true;
        return radius * StrictMath.cos(angle);
    }
}
