package org.minorant.core.internal.file;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.SplittableRandom;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class DecimalTest {

    @ParameterizedTest
    @CsvSource({
        "0.0,0.0",
        "-0.0,-0.0",
        "1,1.0",
        "-0.5,-0.5",
        "0.3333333333333333,0.3333333333333333",
        "0.1,0.1",
        "100,100.0",
        "1e16,10000000000000000.0",
        "1e17,1E+17",
        "1e-5,0.00001",
        "1e-6,0.000001",
        "2e-6,0.000002",
        "2e23,2E+23",
        "4.9e-324,4.94065645841247E-324",
        "1.7976931348623157e308,1.7976931348623157E+308"
    })
    void textIsTheShortestOf15To17Digits(double x, String text) {
        assertEquals(text, Decimal.format(x));
        assertEquals(x, Double.parseDouble(text));
    }

    @Test
    void textReadsBackToTheSameBits() {
        SplittableRandom random = new SplittableRandom(3);
        for (int i = 0; i < 100_000; i++) {
            double x = Double.longBitsToDouble(random.nextLong());
            if (Double.isFinite(x)) {
                String text = Decimal.format(x);
                assertTrue(Decimal.isNumber(text), text);
                assertEquals(Double.doubleToRawLongBits(x), Double.doubleToRawLongBits(Double.parseDouble(text)));
            }
        }
    }
}
