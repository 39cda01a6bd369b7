package org.minorant.bounds;

import java.util.Optional;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;
import org.minorant.core.curve.Curve;

/** Finds a weight at which a curve is surely not above an error, and not far below: the scale on which the searches for converses go. */
final class ErrorWeight {

    /** Weights 2^(2^j − 1) up to here bracket the one looked for. */
    private static final int MOST_LEAPS = 29;

    /** Brackets of this length in ln t are short. */
    private static final double SHORT = 2;

    /** Divisions by 4 of what a guess says, until the certified value is not above ε. */
    private static final int MOST_TRIES = 4;

    private ErrorWeight() {}

    /**
     * Looks for the weight, by the guess of the curve where it has one.
     *
     * @param f a curve
     * @param epsilon ε
     * @return s with f(s) ≤ ε for certain; none if f is nowhere above ε, or far above it at 1
     */
    static Optional<WideDouble> of(Curve f, double epsilon) {
        WideDouble level = WideDouble.of(epsilon);
        Curve cheap =
                f.guess().<Curve>map(g -> t -> guessed(g.lnValue(t.lnDown()))).orElse(f);
        WideDouble below = WideDouble.ONE;
        for (int j = 0; j <= MOST_LEAPS; j++) {
            WideDouble s = WideDouble.ONE.timesPowerOfTwo((1L << j) - 1);
            if (cheap.at(s).lowerWide().compareTo(level) > 0) {
                return certified(f, level, j == 0 ? s : halved(cheap, level, below, s)[0]);
            }
            below = s;
        }
        return Optional.empty();
    }

    /**
     * Halves a bracket in ln t until it is short. Curves of many uses are so flat beyond their knee that interpolation from there leads nowhere.
     *
     * @param f a curve
     * @param level a level
     * @param from a positive point where the curve is not known to be above the level
     * @param to a point where it is
     * @return a part of the bracket of which the same holds
     */
    static WideDouble[] halved(Curve f, WideDouble level, WideDouble from, WideDouble to) {
        WideDouble low = from;
        WideDouble high = to;
        while (high.lnUp() - low.lnDown() > SHORT) {
            WideDouble middle = WideDouble.expDown(0.5 * (low.lnDown() + high.lnUp()));
            if (f.at(middle).lowerWide().compareTo(level) > 0) {
                high = middle;
            } else {
                low = middle;
            }
        }
        return new WideDouble[] {low, high};
    }

    private static Enclosure guessed(double ln) {
        WideDouble v = Double.isNaN(ln) ? WideDouble.ZERO : WideDouble.expDown(ln);
        return Enclosure.of(v, v);
    }

    private static Optional<WideDouble> certified(Curve f, WideDouble level, WideDouble root) {
        WideDouble s = root;
        for (int i = 0; i < MOST_TRIES && s.signum() > 0; i++) {
            if (f.at(s).upperWide().compareTo(level) <= 0) {
                return Optional.of(s);
            }
            s = s.timesPowerOfTwo(-2);
        }
        return Optional.empty();
    }
}
