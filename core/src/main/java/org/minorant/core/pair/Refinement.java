package org.minorant.core.pair;

import java.util.Optional;
import org.minorant.core.Enclosure;
import org.minorant.core.PositiveOperator;
import org.minorant.core.WideDouble;

/** Narrows an absolute enclosure by the certificate of relative accuracy where it is too wide, and where that costs seconds at most. */
final class Refinement {

    /** For pairs whose enclosure is relative already. */
    static final Refinement NONE = new Refinement(null, null);

    /** Enclosures at most this wide are not refined. */
    static final double NARROW = 1e-12;

    /** Beyond this dimension refining would take minutes. */
    private static final int LARGEST = 128;

    private final PositiveOperator a;
    private final PositiveOperator b;
    /** Made when first needed; the same value whoever makes it. */
    private volatile FactorPair factored;

    Refinement(PositiveOperator a, PositiveOperator b) {
        this.a = a;
        this.b = b;
    }

    Enclosure narrow(Enclosure f, WideDouble wa, WideDouble wb) {
        boolean narrow = f.lowerWide().signum() > 0 && f.relativeWidth() <= NARROW;
        if (narrow || a == null || a.dimension() > LARGEST) {
            return f;
        }
        FactorPair p = factored;
        if (p == null) {
            p = FactorPair.fromOperators(a, b, QuarterTurns.find(a, b), Optional.empty());
            factored = p;
        }
        return f.intersect(p.value(wa, wb));
    }
}
