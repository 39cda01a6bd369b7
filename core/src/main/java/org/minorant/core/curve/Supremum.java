package org.minorant.core.curve;

import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;

/**
 * What is known of sup over t ≥ 0 of F(t) − ta.
 *
 * @param value an enclosure of the supremum
 * @param best the sample with the highest support line
 * @param from no maximiser lies before this t
 * @param to nor beyond this t; +∞ if there may be one anywhere
 */
public record Supremum(Enclosure value, CurveSample best, WideDouble from, WideDouble to) {

    /**
     * Returns the same with another enclosure of the value.
     *
     * @param better another enclosure of the same supremum
     * @return this with what both enclosures share
     */
    public Supremum intersect(Enclosure better) {
        return new Supremum(value.intersect(better), best, from, to);
    }

    /** The width of the value. */
    WideDouble gap() {
        return value.upperWide().plusUp(value.lowerWide().negate());
    }
}
