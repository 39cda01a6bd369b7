package org.minorant.bounds;

/**
 * Thrown when a lower bound exceeds an upper bound on the same number with certainty. No input can cause this if every bound is right: it
 * shows an error in this library, or in a bound that the caller supplied, and no number of that ledger may be relied on.
 */
public final class InconsistentBoundsException extends IllegalStateException {

    private static final long serialVersionUID = 1L;

    private final transient Bound lower;
    private final transient Bound upper;

    InconsistentBoundsException(String quantity, Bound lower, Bound upper) {
        super("Ledger of the " + quantity + " is inconsistent: " + describe(lower) + " exceeds " + describe(upper)
                + "; one of the two bounds is wrong, please report both operators");
        this.lower = lower;
        this.upper = upper;
    }

    private static String describe(Bound b) {
        return b.side() + " bound " + b.value().toIntervalString(17) + " by " + b.theorem();
    }

    /**
     * Returns the bound that holds from below.
     *
     * @return the lower (or exact) bound that exceeds {@link #upper()}
     */
    public Bound lower() {
        return lower;
    }

    /**
     * Returns the bound that holds from above.
     *
     * @return the upper (or exact) bound that {@link #lower()} exceeds
     */
    public Bound upper() {
        return upper;
    }
}
