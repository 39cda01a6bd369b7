package org.minorant.bounds;

import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;

/** A concave function of t ≥ 0 that vanishes at 0, known by enclosures of its values. */
@FunctionalInterface
interface Curve {

    /**
     * Encloses the value at one point.
     *
     * @param t the point, at least 0 and finite
     * @return the value there
     */
    Enclosure at(WideDouble t);

    /**
     * Encloses the value at a point of which an enclosure is known, for a nondecreasing curve.
     *
     * @param t the point, at least 0 and finite
     * @return the value there
     */
    default Enclosure over(Enclosure t) {
        Enclosure low = at(t.lowerWide());
        return t.lowerWide().equals(t.upperWide()) ? low : low.hull(at(t.upperWide()));
    }
}
