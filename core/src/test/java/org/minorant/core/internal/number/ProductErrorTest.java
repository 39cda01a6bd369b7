package org.minorant.core.internal.number;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.util.Random;
import org.junit.jupiter.api.Test;

class ProductErrorTest {

    @Test
    void bothWaysGiveTheSameBits() {
        Random r = new Random(5);
        for (int i = 0; i < 50_000; i++) {
            // products and their errors stay normal numbers
            double a = Math.scalb(r.nextGaussian(), r.nextInt(900) - 450);
            double b = Math.scalb(r.nextGaussian(), r.nextInt(900) - 450);
            double p = a * b;
            assertEquals(Math.fma(a, b, -p), ProductError.bySplitting(a, b, p), a + " * " + b);
            assertEquals(Math.fma(a, b, -p), ProductError.of(a, b, p), a + " * " + b);
        }
        double big = 0x1.fffffffffffffp1000;
        double p = big * 0x1.3p-3;
        assertEquals(Math.fma(big, 0x1.3p-3, -p), ProductError.bySplitting(big, 0x1.3p-3, p));
    }

    @Test
    void remaindersHaveTheRightSign() {
        Random r = new Random(6);
        for (int i = 0; i < 20_000; i++) {
            double a = Math.scalb(1 + r.nextDouble(), r.nextInt(200) - 100);
            double b = Math.scalb(1 + r.nextDouble(), r.nextInt(200) - 100);
            double q = a / b;
            double p = q * b;
            double exact = Math.fma(-q, b, a);
            assertEquals(Math.signum(exact), Math.signum(ProductError.remainder(a, q, b)));
            assertEquals(Math.signum(exact), Math.signum((a - p) - ProductError.bySplitting(q, b, p)));
        }
    }
}
