package org.minorant.bounds;

import java.util.Locale;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;

/**
 * An exponent of the error, or of the success, of codes at one rate: per use of the channel, for many uses.
 *
 * @param value an enclosure of the formula's value; infinite where it is so with certainty
 * @param parameter where the lower end of the value is reached: s, or (α−1)/α of the strong converse exponent; infinite with the value, 0 where the value is 0
 * @param standing whether the formula is proved to be, or to bound, the exponent
 * @param theorem the formula and its source
 */
public record Exponent(Information value, double parameter, Standing standing, Theorem theorem) {

    /**
     * Returns the exponent in nats.
     *
     * @return the value
     */
    public Enclosure nats() {
        return value.nats();
    }

    /**
     * Returns the exponent in bits.
     *
     * @return the value
     */
    public Enclosure bits() {
        return value.bits();
    }

    /** Value, standing and theorem in one line. */
    @Override
    public String toString() {
        return value + ", " + standing.toString().toLowerCase(Locale.ROOT) + ": " + theorem;
    }
}
