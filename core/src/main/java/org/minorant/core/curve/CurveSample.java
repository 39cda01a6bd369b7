package org.minorant.core.curve;

import org.minorant.core.WideDouble;

/**
 * A certified value of a curve.
 *
 * @param t the point
 * @param lower F(t) is at least this
 * @param upper and at most this
 */
public record CurveSample(WideDouble t, WideDouble lower, WideDouble upper) {

    /** Every curve vanishes at 0. */
    public static final CurveSample ORIGIN = new CurveSample(WideDouble.ZERO, WideDouble.ZERO, WideDouble.ZERO);

    /**
     * Returns where the support line of this sample certainly is: by F(t) − ta ≤ sup.
     *
     * @param slope a
     * @return a lower end of F(t) − ta
     */
    public WideDouble supportDown(WideDouble slope) {
        return lower.plusDown(t.timesUp(slope).negate());
    }

    /**
     * Returns how well F(t) is known.
     *
     * @return upper − lower, rounded up
     */
    public WideDouble width() {
        return upper.plusUp(lower.negate());
    }

    /** The middle of the value. */
    WideDouble middle() {
        return lower.plusDown(upper).timesPowerOfTwo(-1);
    }
}
