package org.minorant.core;

/**
 * A number computed with care but without proof: what an {@link Enclosure} would hold if its error were certified.
 *
 * @param wide the number, of any size
 * @param relativeError the relative error to be expected; it has held in all tests, and nothing more is promised
 */
public record Estimate(WideDouble wide, double relativeError) {

    /**
     * Checks the estimated error.
     *
     * @param wide the number
     * @param relativeError the relative error to be expected
     * @throws InvalidInputException if the error is negative or NaN
     */
    public Estimate {
        if (!(relativeError >= 0)) {
            throw new InvalidInputException(
                    "Estimate", "the relative error is " + relativeError, "at least 0", "give an error, or infinity");
        }
    }

    /**
     * Returns the middle of an enclosure, with half its width as the error: here the error is certain.
     *
     * @param e an enclosure
     * @return the estimate
     */
    public static Estimate of(Enclosure e) {
        WideDouble middle = e.upperWide().isInfinite()
                ? e.lowerWide()
                : e.lowerWide().plusUp(e.upperWide()).timesPowerOfTwo(-1);
        return new Estimate(middle, e.relativeWidth());
    }

    /**
     * Returns the number as a double, 0 below the range of double.
     *
     * @return the number
     */
    public double value() {
        return wide.toDoubleDown();
    }

    /**
     * Returns the natural logarithm, which no size of the number prevents.
     *
     * @return ln of the number, −∞ for 0
     */
    public double ln() {
        return wide.signum() == 0
                ? Double.NEGATIVE_INFINITY
                : Enclosure.of(wide, wide).lnLower();
    }
}
