package org.minorant.core;

/**
 * Thrown when an argument or a file cannot be accepted. The message always says what was asked, what was found and
 * where, the limit that was broken, and the cure:
 *
 * <pre>DensityOperator.of: the trace is 1.02, expected 1 within 4.4e-16; use DensityOperator.nearest to normalise</pre>
 */
public final class InvalidInputException extends IllegalArgumentException {

    private static final long serialVersionUID = 1L;

    /** What the caller asked for. */
    private final String asked;

    /** What was found, and where. */
    private final String found;

    /** What would have been accepted. */
    private final String limit;

    /** What the caller can do. */
    private final String cure;

    /**
     * Creates the exception.
     *
     * @param asked what the caller asked for, usually the class and method
     * @param found what was found, and where (index, line, byte)
     * @param limit what would have been accepted
     * @param cure what the caller can do about it
     */
    public InvalidInputException(String asked, String found, String limit, String cure) {
        super(asked + ": " + found + ", expected " + limit + "; " + cure);
        this.asked = asked;
        this.found = found;
        this.limit = limit;
        this.cure = cure;
    }

    /**
     * Returns what was asked for.
     *
     * @return what the caller asked for
     */
    public String asked() {
        return asked;
    }

    /**
     * Returns what was found, and where.
     *
     * @return what was found, and where
     */
    public String found() {
        return found;
    }

    /**
     * Returns the limit that was broken.
     *
     * @return what would have been accepted
     */
    public String limit() {
        return limit;
    }

    /**
     * Returns the cure.
     *
     * @return what the caller can do about it
     */
    public String cure() {
        return cure;
    }
}
