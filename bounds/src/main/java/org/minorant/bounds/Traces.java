package org.minorant.bounds;

import java.util.List;
import org.minorant.core.DensityOperator;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.Enclosure;
import org.minorant.core.PositiveFactor;
import org.minorant.core.PositiveOperator;

/**
 * Sums that should be one and are so only up to rounding. Bounds are certified for the states and distributions divided by these sums, and for
 * those given, both.
 */
final class Traces {

    private Traces() {}

    /** The trace of the operator meant; from its factor where that defines it, so that the rounding of entries does not enter. */
    static Enclosure of(PositiveOperator a) {
        return a.isDefinedByFactor() ? of(a.factor()) : a.traceEnclosure();
    }

    private static Enclosure of(PositiveFactor f) {
        EnclosedMatrix x = f.columns();
        Enclosure s = Enclosure.ZERO;
        for (int i = 0; i < x.rows(); i++) {
            for (int j = 0; j < x.columns(); j++) {
                s = s.plus(square(x.re(i, j), x.reTail(i, j))).plus(square(x.im(i, j), x.imTail(i, j)));
            }
        }
        Enclosure relative = Enclosure.of(1 - f.relativeError(), 1 + f.relativeError());
        return s.times(relative.widen(0x1p-53)).widen(f.traceError());
    }

    private static Enclosure square(double hi, double lo) {
        if (hi == 0) {
            return Enclosure.ZERO;
        }
        Enclosure v = lo == 0 ? Enclosure.exact(hi) : Enclosure.exact(hi).plus(Enclosure.exact(lo));
        return v.times(v);
    }

    /** The smallest enclosure that holds the traces of all these states. */
    static Enclosure hull(List<DensityOperator> states) {
        Enclosure s = of(states.get(0));
        for (DensityOperator w : states.subList(1, states.size())) {
            s = s.hull(of(w));
        }
        return s;
    }

    /** The sum of some doubles. */
    static Enclosure sum(double[] p) {
        Enclosure s = Enclosure.ZERO;
        for (double v : p) {
            s = v == 0 ? s : s.plus(Enclosure.exact(v));
        }
        return s;
    }
}
