package org.minorant.core.state;

import org.minorant.core.InvalidInputException;

/**
 * How many photon numbers a state of light is described with: as many as a tail weight asks for, or a given dimension.
 *
 * <p>Two states can be compared only if they have the same dimension: build the one with more photons by its tail, the other with the
 * dimension that came out. Immutable and thread-safe.
 */
public final class Truncation {

    /** Smaller tails are below what the construction certifies. */
    private static final double LEAST_TAIL = 1e-30;

    private final double tail;
    private final int dimension;

    private Truncation(double tail, int dimension) {
        this.tail = tail;
        this.dimension = dimension;
    }

    /**
     * Returns the truncation to the smallest dimension d for which the photon numbers d, d+1, … have at most this weight.
     *
     * @param weight the weight that may be cut off, from 1e-30 to 0.5
     * @return the truncation
     * @throws InvalidInputException if the weight is outside that range
     */
    public static Truncation ofTail(double weight) {
        if (!(weight >= LEAST_TAIL && weight <= 0.5)) {
            throw new InvalidInputException(
                    "Truncation.ofTail",
                    "the weight is " + weight,
                    "between " + LEAST_TAIL + " and 0.5",
                    "ask for a weight in that range");
        }
        return new Truncation(weight, 0);
    }

    /**
     * Returns the truncation to the photon numbers 0, …, d−1.
     *
     * @param dimension d, at least 1
     * @return the truncation
     * @throws InvalidInputException if the dimension is below 1
     */
    public static Truncation ofDimension(int dimension) {
        if (dimension < 1) {
            throw new InvalidInputException(
                    "Truncation.ofDimension",
                    "the dimension is " + dimension,
                    "at least 1",
                    "keep the vacuum at least");
        }
        return new Truncation(0, dimension);
    }

    /** Whether the dimension was given. */
    boolean isOfDimension() {
        return dimension > 0;
    }

    int dimension() {
        return dimension;
    }

    double tail() {
        return tail;
    }

    @Override
    public String toString() {
        return isOfDimension() ? "dimension " + dimension : "tail weight " + tail;
    }
}
