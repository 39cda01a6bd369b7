package org.minorant.study;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.minorant.bounds.Side;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;

class CsvTextTest {

    private static List<String> fields(Enclosure value, String method) {
        Row row = new Row(
                "q", "a, b", Side.LOWER, value, Unit.BITS, new Citation(method, "A. \"B\" C", List.of("h 1", "h 2")));
        String text = CsvText.of(List.of(new Section("pair", "n", "s", List.of(row), List.of())));
        assertTrue(text.startsWith(CsvText.HEADER + "\r\n") && text.endsWith("\r\n"), text);
        List<List<String>> rows = Csv.parse(text);
        assertEquals(2, rows.size());
        assertEquals(List.of(CsvText.HEADER.split(",")), rows.get(0));
        return rows.get(1);
    }

    @Test
    void fieldsAreQuotedWhereTheyMustBe() {
        assertEquals(
                List.of(
                        "pair",
                        "n",
                        "q",
                        "a, b",
                        "lower",
                        "0",
                        "0.5",
                        "bit",
                        "line\r\nbreak",
                        "A. \"B\" C",
                        "h 1; h 2"),
                fields(Enclosure.of(0, 0.5), "line\r\nbreak"));
    }

    @Test
    void endsAreRoundedOutwardAsDecimals() {
        // 0.1 as a double is a little more than a tenth, 0.7 a little less than seven tenths
        List<String> f = fields(Enclosure.of(0.1, 0.7), "m");
        assertTrue(new BigDecimal(f.get(5)).compareTo(new BigDecimal(0.1)) <= 0, f.get(5));
        assertTrue(new BigDecimal(f.get(6)).compareTo(new BigDecimal(0.7)) >= 0, f.get(6));
        assertEquals(0.1, Double.parseDouble(f.get(5)), Math.ulp(0.1));
        assertEquals(0.7, Double.parseDouble(f.get(6)), Math.ulp(0.7));
    }

    @Test
    void endsBelowTheRangeOfDoublesAndInfiniteOnesAreSaid() {
        List<String> f = fields(Enclosure.of(WideDouble.of(1, -2000), WideDouble.POSITIVE_INFINITY), "m");
        assertEquals("8.7098098162172166e-603", f.get(5));
        assertEquals("inf", f.get(6));
        assertEquals("-inf", fields(Enclosure.unknown(), "m").get(5));
    }

    @Test
    void largeAndNegativeEndsKeepTheirSize() {
        List<String> f = fields(Enclosure.of(-1.5e300, 2e20), "m");
        assertEquals(0, new BigDecimal(f.get(5)).compareTo(new BigDecimal("-1.5000000000000000e300")) <= 0 ? 0 : 1);
        assertEquals("2e20", f.get(6));
    }
}
