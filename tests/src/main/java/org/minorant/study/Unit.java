package org.minorant.study;

/** The units that a report uses. */
enum Unit {
    /** A number between 0 and 1. */
    PROBABILITY("probability"),
    /** A difference of two probabilities. */
    PROBABILITY_DIFFERENCE("probability difference"),
    /** A quotient of two like numbers. */
    RATIO("ratio"),
    /** Information, logarithm to base 2. */
    BITS("bit"),
    /** Information for each copy. */
    BITS_PER_COPY("bit per copy"),
    /** Information for each use of a channel. */
    BITS_PER_USE("bit per use");

    private final String text;

    Unit(String text) {
        this.text = text;
    }

    @Override
    public String toString() {
        return text;
    }
}
