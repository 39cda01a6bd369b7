package org.minorant.bounds;

import org.minorant.core.Enclosure;

/** The terms x ln x that entropies are made of, x at most 1 up to rounding: falling up to 1/e, rising from there. */
final class EntropyTerm {

    /** −1/e, the least value, taken at 1/e. */
    private static final Enclosure LEAST = Enclosure.of(-0.36787944117144239, -0.36787944117144227);

    private static final double BEFORE_TURN = 0.36787944117144228;
    private static final double AFTER_TURN = 0.36787944117144239;

    private EntropyTerm() {}

    /** x ln x for an x that is known not to be negative; 0 at 0. */
    static Enclosure of(Enclosure x) {
        Enclosure ends =
                at(Enclosure.of(x.upperWide(), x.upperWide())).hull(at(Enclosure.of(x.lowerWide(), x.lowerWide())));
        return x.lower() < AFTER_TURN && x.upper() > BEFORE_TURN ? ends.hull(LEAST) : ends;
    }

    private static Enclosure at(Enclosure x) {
        return x.upperWide().signum() <= 0 ? Enclosure.ZERO : x.times(x.ln());
    }
}
