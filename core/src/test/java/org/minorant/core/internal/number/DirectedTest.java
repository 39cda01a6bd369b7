package org.minorant.core.internal.number;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.math.MathContext;
import java.util.Random;
import java.util.function.DoubleBinaryOperator;
import org.junit.jupiter.api.Test;

/** Directed rounding against exact decimal arithmetic. */
class DirectedTest {

    /** Any finite double: every exponent is as likely as any other. */
    static double any(Random r) {
        double d = Double.longBitsToDouble(r.nextLong());
        return Double.isFinite(d) ? d : r.nextGaussian();
    }

    /** A double of few bits and a moderate exponent, so that exact results and near ties come up. */
    static double simple(Random r) {
        return Math.scalb((double) (r.nextInt(17) - 8), r.nextInt(120) - 60);
    }

    private static BigDecimal big(double x) {
        return new BigDecimal(x);
    }

    /** down ≤ exact ≤ up, and no double lies strictly between either and the exact value, unless near underflow. */
    private static void check(double down, double up, BigDecimal exact, boolean tight, String what) {
        if (!Double.isInfinite(down)) {
            assertTrue(big(down).compareTo(exact) <= 0, what + ": " + down + " exceeds it");
            if (tight) {
                double next = Math.nextUp(down);
                assertTrue(Double.isInfinite(next) || big(next).compareTo(exact) > 0, what + ": " + down + " is low");
            }
        }
        if (!Double.isInfinite(up)) {
            assertTrue(big(up).compareTo(exact) >= 0, what + ": " + up + " falls short");
            if (tight) {
                double next = Math.nextDown(up);
                assertTrue(Double.isInfinite(next) || big(next).compareTo(exact) < 0, what + ": " + up + " is high");
            }
        }
        assertTrue(down != Double.POSITIVE_INFINITY && up != Double.NEGATIVE_INFINITY, what);
    }

    @Test
    void sumsAndProducts() {
        Random r = new Random(1);
        for (int i = 0; i < 12_000; i++) {
            double a = i % 3 == 0 ? simple(r) : any(r);
            double b =
                    i % 3 == 0 ? simple(r) : i % 3 == 1 ? any(r) : Math.scalb(a, r.nextInt(110) - 55) * -r.nextDouble();
            if (!Double.isFinite(b)) {
                continue;
            }
            check(Directed.addDown(a, b), Directed.addUp(a, b), big(a).add(big(b)), true, a + " + " + b);
            BigDecimal p = big(a).multiply(big(b));
            boolean tight = p.abs().compareTo(big(0x1p-950)) > 0;
            check(Directed.mulDown(a, b), Directed.mulUp(a, b), p, tight, a + " * " + b);
        }
    }

    @Test
    void quotients() {
        Random r = new Random(2);
        for (int i = 0; i < 12_000; i++) {
            double a = i % 2 == 0 ? simple(r) : any(r);
            double b = i % 2 == 0 ? simple(r) : any(r);
            if (b == 0) {
                continue;
            }
            double down = Directed.divDown(a, b);
            double up = Directed.divUp(a, b);
            // down ≤ a/b ≤ up, multiplied by |b|
            BigDecimal signed = b > 0 ? big(a) : big(a).negate();
            BigDecimal size = big(b).abs();
            String what = a + " / " + b;
            assertTrue(Double.isInfinite(down) || big(down).multiply(size).compareTo(signed) <= 0, what);
            assertTrue(Double.isInfinite(up) || big(up).multiply(size).compareTo(signed) >= 0, what);
            assertTrue(up - down <= 2 * Math.ulp(down) || Double.isInfinite(up) || Double.isInfinite(down), what);
            if (i % 2 == 0 && down != up) {
                assertTrue(big(down).multiply(size).compareTo(signed) != 0, what + " is exact");
            }
        }
    }

    @Test
    void roots() {
        Random r = new Random(3);
        for (int i = 0; i < 6_000; i++) {
            double a = Math.abs(i % 2 == 0 ? simple(r) : any(r));
            double down = Directed.sqrtDown(a);
            double up = Directed.sqrtUp(a);
            assertTrue(big(down).pow(2).compareTo(big(a)) <= 0, "root of " + a);
            assertTrue(big(up).pow(2).compareTo(big(a)) >= 0, "root of " + a);
            assertTrue(up <= Math.nextUp(Math.nextUp(down)), "root of " + a);
            double square = a * a;
            if (square > 1e-280 && square < 1e300 && big(square).compareTo(big(a).pow(2)) == 0) {
                assertEquals(a, Directed.sqrtDown(square));
                assertEquals(a, Directed.sqrtUp(square));
            }
        }
    }

    @Test
    void overflowStaysOnItsSide() {
        double max = Double.MAX_VALUE;
        double inf = Double.POSITIVE_INFINITY;
        DoubleBinaryOperator[] down = {Directed::addDown, Directed::mulDown};
        DoubleBinaryOperator[] up = {Directed::addUp, Directed::mulUp};
        for (int i = 0; i < 2; i++) {
            assertEquals(max, down[i].applyAsDouble(max, max));
            assertEquals(inf, up[i].applyAsDouble(max, max));
            assertEquals(inf, down[i].applyAsDouble(inf, max));
        }
        assertEquals(-inf, Directed.addDown(-max, -max));
        assertEquals(-max, Directed.addUp(-max, -max));
        assertEquals(max, Directed.divDown(max, 0.5));
        assertEquals(inf, Directed.divUp(max, 0.5));
        // 1/3 lies between neighbours
        assertEquals(Math.nextUp(Directed.divDown(1, 3)), Directed.divUp(1, 3));
        assertTrue(big(Directed.divDown(1, 3)).compareTo(BigDecimal.ONE.divide(big(3), MathContext.DECIMAL128)) < 0);
    }
}
