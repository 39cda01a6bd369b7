package org.minorant.tests.published;

import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import org.minorant.core.Enclosure;

/**
 * A number as it was printed, right within one unit of its last digit.
 *
 * @param value the printed number
 * @param unit one unit of its last digit
 */
record Printed(BigDecimal value, BigDecimal unit) {

    static Printed of(String digits) {
        BigDecimal v = new BigDecimal(digits);
        return new Printed(v, v.ulp());
    }

    /**
     * Asserts that an enclosure meets the printed number, and that it is narrow enough for that to mean something: narrower than the printed unit, or than
     * 1e-10 of the value where more digits are printed.
     *
     * @param enclosure what the library says
     * @param inputError how much the quantity may differ because the inputs were rounded to double
     */
    void isIn(Enclosure enclosure, double inputError) {
        BigDecimal slack = unit.add(new BigDecimal(inputError));
        BigDecimal low = enclosure.lowerWide().toBigDecimal();
        BigDecimal high = enclosure.upperWide().toBigDecimal();
        assertTrue(
                low.compareTo(value.add(slack)) <= 0 && high.compareTo(value.subtract(slack)) >= 0,
                () -> value + " is not in " + enclosure);
        BigDecimal wide = unit.max(value.abs().scaleByPowerOfTen(-10));
        assertTrue(high.subtract(low).compareTo(wide) <= 0, () -> enclosure + " is too wide for " + value);
    }
}
