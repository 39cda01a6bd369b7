package org.minorant.tests.reference;

import java.math.BigDecimal;
import java.math.MathContext;
import org.minorant.core.Enclosure;

/**
 * A number to many digits.
 *
 * @param value the value found
 * @param error how far it may be from the true one, at most
 */
public record Reference(BigDecimal value, BigDecimal error) {

    /**
     * Tells whether an enclosure can hold the true value: false means that it certainly does not.
     *
     * @param enclosure the enclosure to judge
     * @return whether [value − error, value + error] meets it
     */
    public boolean isCompatibleWith(Enclosure enclosure) {
        BigDecimal low = value.subtract(error);
        BigDecimal high = value.add(error);
        boolean below = enclosure.lowerWide().isInfinite()
                ? enclosure.lowerWide().signum() < 0
                : enclosure.lowerWide().toBigDecimal().compareTo(high) <= 0;
        boolean above = enclosure.upperWide().isInfinite()
                ? enclosure.upperWide().signum() > 0
                : enclosure.upperWide().toBigDecimal().compareTo(low) >= 0;
        return below && above;
    }

    /**
     * Tells whether the value is known to at least twenty digits.
     *
     * @return whether error ≤ 1e-20 · value
     */
    public boolean isSharp() {
        return error.compareTo(value.abs().scaleByPowerOfTen(-20)) <= 0;
    }

    @Override
    public String toString() {
        return value.round(new MathContext(30)) + " +- " + error.round(new MathContext(2));
    }
}
