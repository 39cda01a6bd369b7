package org.minorant.core;

import java.math.BigDecimal;
import java.math.MathContext;
import java.math.RoundingMode;

/** Prints enclosures with no digit that is not certain. */
final class EnclosureText {

    private static final int MOST_DIGITS = 17;

    private EnclosureText() {}

    /**
     * The longest decimal, of at most 17 digits, that both ends round to, and so every number between them: it lies within half a unit of its
     * last digit of each.
     */
    static String certainDigits(WideDouble lower, WideDouble upper) {
        if (lower.equals(upper)) {
            return lower.toString();
        }
        if (!printable(lower) || !printable(upper)) {
            return "[" + end(lower, 6, RoundingMode.FLOOR) + ", " + end(upper, 6, RoundingMode.CEILING) + "]";
        }
        BigDecimal l = lower.toBigDecimal();
        BigDecimal u = upper.toBigDecimal();
        for (int digits = MOST_DIGITS; digits >= 1; digits--) {
            BigDecimal a = l.round(new MathContext(digits, RoundingMode.HALF_EVEN));
            BigDecimal b = u.round(new MathContext(digits, RoundingMode.HALF_EVEN));
            if (a.signum() != 0 && a.compareTo(b) == 0) {
                return scientific(a);
            }
        }
        return "[" + end(lower, 3, RoundingMode.FLOOR) + ", " + end(upper, 3, RoundingMode.CEILING) + "]";
    }

    /** One end, rounded in a direction. */
    static String end(WideDouble value, int digits, RoundingMode mode) {
        if (value.isInfinite()) {
            return value.signum() > 0 ? "inf" : "-inf";
        }
        if (!printable(value)) {
            return value.toString();
        }
        return scientific(value.toBigDecimal(digits, mode));
    }

    private static boolean printable(WideDouble value) {
        return !value.isInfinite() && Math.abs(value.exponent()) <= 1_000_000;
    }

    private static String scientific(BigDecimal value) {
        if (value.signum() == 0) {
            return "0";
        }
        int exponent = value.precision() - value.scale() - 1;
        // 1.2e3, not 1200, if only two digits were kept: a zero printed is a digit claimed
        if (exponent >= -4 && exponent < 15 && value.scale() >= 0) {
            return value.toPlainString();
        }
        BigDecimal mantissa = value.scaleByPowerOfTen(-exponent);
        return mantissa.toPlainString() + "e" + exponent;
    }
}
