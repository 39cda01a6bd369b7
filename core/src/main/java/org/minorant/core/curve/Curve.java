package org.minorant.core.curve;

import java.util.Optional;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;

/** A concave, nondecreasing function F of t ≥ 0 that vanishes at 0, known by enclosures of its values. */
@FunctionalInterface
public interface Curve {

    /**
     * Encloses the value at one point.
     *
     * @param t the point, at least 0 and finite
     * @return F(t)
     */
    Enclosure at(WideDouble t);

    /**
     * Returns what the curve is thought to be, if that is cheaper to ask than {@link #at}.
     *
     * @return the guess; none by default, and searches then go by the middles of the enclosures
     */
    default Optional<Guess> guess() {
        return Optional.empty();
    }

    /**
     * Returns the same curve with a guess that searches may ask.
     *
     * @param guess what the curve is thought to be
     * @return the curve with the guess
     */
    default Curve withGuess(Guess guess) {
        Curve values = this;
        return new Curve() {
            @Override
            public Enclosure at(WideDouble t) {
                return values.at(t);
            }

            @Override
            public Optional<Guess> guess() {
                return Optional.of(guess);
            }
        };
    }

    /**
     * Encloses the value at a point of which an enclosure is known.
     *
     * @param t the point, at least 0 and finite
     * @return F(t)
     */
    default Enclosure over(Enclosure t) {
        Enclosure low = at(t.lowerWide());
        return t.lowerWide().equals(t.upperWide()) ? low : low.hull(at(t.upperWide()));
    }
}
