package org.minorant.core.internal.file;

import java.math.BigDecimal;
import java.math.MathContext;
import java.math.RoundingMode;
import java.util.regex.Pattern;

/**
 * Doubles as decimal text, both ways.
 *
 * <p>Written with the fewest of 15, 16 or 17 significant digits that read back to the same bits; the text does not depend on the version of
 * the platform, as that of {@link Double#toString(double)} does. Read as {@link Double#parseDouble} does, rounded to nearest, but only what
 * a file may hold: no NaN, infinity, hexadecimal or type suffix.
 */
final class Decimal {

    /** An optional sign, digits with an optional point, an optional exponent. Possessive: linear time on any input. */
    private static final Pattern NUMBER =
            Pattern.compile("[+-]?+(?:[0-9]++(?:\\.[0-9]*+)?+|\\.[0-9]++)(?:[eE][+-]?+[0-9]++)?+");

    private static final Pattern WHOLE = Pattern.compile("[+-]?+[0-9]++");

    /** Exponents for which plain notation is the shorter one to read. */
    private static final int PLAIN_LEAST = -5;

    private static final int PLAIN_MOST = 16;

    private Decimal() {}

    static boolean isNumber(String text) {
        return NUMBER.matcher(text).matches();
    }

    static boolean isWhole(String text) {
        return WHOLE.matcher(text).matches();
    }

    /** The shortest of 15, 16 and 17 digits that reads back to the same double; keeps the sign of zero. */
    static String format(double x) {
        if (x == 0) {
            return 1 / x < 0 ? "-0.0" : "0.0";
        }
        BigDecimal exact = new BigDecimal(x);
        for (int digits = 15; digits < 17; digits++) {
            BigDecimal r = exact.round(new MathContext(digits, RoundingMode.HALF_EVEN));
            if (r.doubleValue() == x) {
                return text(r);
            }
        }
        return text(exact.round(new MathContext(17, RoundingMode.HALF_EVEN)));
    }

    private static String text(BigDecimal x) {
        BigDecimal s = x.stripTrailingZeros();
        int exponent = s.precision() - s.scale() - 1;
        if (exponent < PLAIN_LEAST || exponent > PLAIN_MOST) {
            return s.toString();
        }
        String plain = s.toPlainString();
        return plain.indexOf('.') < 0 ? plain + ".0" : plain;
    }
}
