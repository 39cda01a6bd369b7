package org.minorant.study;

import java.math.BigDecimal;
import java.math.RoundingMode;
import java.util.List;
import org.minorant.core.WideDouble;

/**
 * The report's numbers as CSV (RFC 4180: commas, CRLF, quotes where needed), one row a number behind one header row.
 *
 * <p>{@code lower} and {@code upper} are the ends of the enclosure with 17 significant digits, rounded outward, so that the decimals
 * as written still enclose; {@code inf} and {@code -inf} are said. Ends below 1e-308 are written with their exponent, such as {@code 1.5e-412},
 * which a reader that knows doubles only takes for 0.
 */
final class CsvText {

    static final String HEADER = "kind,name,quantity,argument,side,lower,upper,unit,method,source,checked";

    private static final int DIGITS = 17;

    private CsvText() {}

    static String of(List<Section> sections) {
        StringBuilder text = new StringBuilder(HEADER).append("\r\n");
        for (Section s : sections) {
            for (Row r : s.rows()) {
                text.append(String.join(
                                ",",
                                field(s.kind()),
                                field(s.name()),
                                field(r.quantity()),
                                field(r.argument()),
                                field(r.side().toString()),
                                end(r.value().lowerWide(), RoundingMode.FLOOR),
                                end(r.value().upperWide(), RoundingMode.CEILING),
                                field(r.unit().toString()),
                                field(r.by().method()),
                                field(r.by().source()),
                                field(String.join("; ", r.by().checked()))))
                        .append("\r\n");
            }
        }
        return text.toString();
    }

    private static String field(String text) {
        return text.matches("(?s).*[\",\r\n].*") ? '"' + text.replace("\"", "\"\"") + '"' : text;
    }

    private static String end(WideDouble value, RoundingMode mode) {
        if (value.isInfinite()) {
            return value.signum() > 0 ? "inf" : "-inf";
        }
        if (value.signum() == 0) {
            return "0";
        }
        BigDecimal rounded = value.toBigDecimal(DIGITS, mode).stripTrailingZeros();
        int exponent = rounded.precision() - rounded.scale() - 1;
        return exponent >= -4 && exponent < DIGITS
                ? rounded.toPlainString()
                : rounded.scaleByPowerOfTen(-exponent).toPlainString() + "e" + exponent;
    }
}
