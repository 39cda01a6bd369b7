package org.minorant.bounds;

/**
 * A number of which nothing is promised: the first terms of an expansion whose rest is not known. Neither a bound nor an enclosure, and a type of its own so that it is not taken for one.
 *
 * @param nats the approximation in nats
 * @param source the expansion it comes from, for people to read
 */
public record Approximation(double nats, String source) {

    /**
     * Checks the source.
     *
     * @param nats the approximation in nats
     * @param source the expansion it comes from
     * @throws org.minorant.core.InvalidInputException if the source is blank
     */
    public Approximation {
        Checks.text("Approximation", "the source", source);
    }

    /**
     * Returns the approximation in bits.
     *
     * @return {@link #nats()} / ln 2
     */
    public double bits() {
        return nats / Math.log(2);
    }

    /** The approximation in bits, to six digits. */
    @Override
    public String toString() {
        return String.format(java.util.Locale.ROOT, "about %.6g bit", bits());
    }
}
