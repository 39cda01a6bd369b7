package org.minorant.core;

/**
 * The size below which an eigenvalue counts as zero:
 *
 * <pre>threshold = max(absolute, relative · n · ‖A‖),</pre>
 *
 * with n the dimension and ‖A‖ the largest modulus of an eigenvalue.
 *
 * <p>A numerical rank decided with it is a decision, never a certainty: what is only just below the threshold may be an eigenvalue that matters.
 *
 * @param relative the part that scales with the operator, at least 0 and below 1
 * @param absolute the part that does not, at least 0 and finite
 */
public record Tolerance(double relative, double absolute) {

    /** 2^-48 · n · ‖A‖: what rounding of entries and of a double eigendecomposition can amount to. */
    public static final Tolerance ROUNDING = new Tolerance(0x1p-48, 0);

    /** Only what is zero exactly counts as zero. */
    public static final Tolerance NONE = new Tolerance(0, 0);

    /**
     * Validates the parts.
     *
     * @param relative the part that scales with the operator, at least 0 and below 1
     * @param absolute the part that does not, at least 0 and finite
     * @throws InvalidInputException if a part is out of its range
     */
    public Tolerance {
        if (!(relative >= 0 && relative < 1 && absolute >= 0 && absolute < Double.POSITIVE_INFINITY)) {
            throw new InvalidInputException(
                    "Tolerance",
                    "the parts are " + relative + " and " + absolute,
                    "0 <= relative < 1 and 0 <= absolute < infinity",
                    "use Tolerance.ROUNDING unless there is a reason");
        }
    }

    /**
     * Returns a tolerance relative to n · ‖A‖.
     *
     * @param relative at least 0 and below 1
     * @return the tolerance without an absolute part
     * @throws InvalidInputException if the number is out of its range
     */
    public static Tolerance ofRelative(double relative) {
        return new Tolerance(relative, 0);
    }

    /**
     * Returns an absolute tolerance.
     *
     * @param absolute at least 0 and finite
     * @return the tolerance without a relative part
     * @throws InvalidInputException if the number is out of its range
     */
    public static Tolerance ofAbsolute(double absolute) {
        return new Tolerance(0, absolute);
    }

    /**
     * Returns the threshold for an operator.
     *
     * @param dimension the dimension n
     * @param norm the largest modulus of an eigenvalue, ‖A‖
     * @return max(absolute, relative · n · ‖A‖); a modulus at most this counts as zero
     */
    public double threshold(int dimension, double norm) {
        return Math.max(absolute, relative * dimension * norm);
    }
}
