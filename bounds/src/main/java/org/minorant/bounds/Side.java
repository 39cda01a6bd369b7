package org.minorant.bounds;

/** The side on which a bound stands of the number it bounds. */
public enum Side {
    /** The bound is at most the number. */
    LOWER("lower"),
    /** The bound is the number itself. */
    EXACT("exact"),
    /** The bound is at least the number. */
    UPPER("upper");

    private final String text;

    Side(String text) {
        this.text = text;
    }

    /**
     * Tells whether a bound on this side is at most the number: lower bounds and the number itself.
     *
     * @return whether this is {@link #LOWER} or {@link #EXACT}
     */
    public boolean holdsFromBelow() {
        return this != UPPER;
    }

    /**
     * Tells whether a bound on this side is at least the number: upper bounds and the number itself.
     *
     * @return whether this is {@link #UPPER} or {@link #EXACT}
     */
    public boolean holdsFromAbove() {
        return this != LOWER;
    }

    @Override
    public String toString() {
        return text;
    }
}
