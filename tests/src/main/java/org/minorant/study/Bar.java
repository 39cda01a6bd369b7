package org.minorant.study;

import org.minorant.bounds.Side;

/**
 * One bound as it is drawn.
 *
 * @param label what stands beside it
 * @param side the side on which it stands
 * @param lower the lower end of its enclosure
 * @param upper the upper end
 */
record Bar(String label, Side side, double lower, double upper) {

    /** Whether it has a place on a logarithmic axis. */
    boolean isDrawable() {
        return upper > 0 && upper < Double.POSITIVE_INFINITY;
    }
}
