package org.minorant.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.math.MathContext;
import java.math.RoundingMode;
import java.util.Random;
import net.jqwik.api.Arbitraries;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.Combinators;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import org.junit.jupiter.api.Test;

/** Directed operations against exact decimal arithmetic, over exponents far beyond double. */
class WideDoubleTest {

    private static final MathContext WIDE = new MathContext(60, RoundingMode.HALF_EVEN);

    @Provide
    Arbitrary<WideDouble> wide() {
        Arbitrary<Double> significand = Arbitraries.oneOf(
                Arbitraries.doubles().between(-2, 2),
                Arbitraries.of(1.0, -1.0, 0.0, 1.5, Math.nextDown(2.0), Math.nextUp(1.0), -Math.nextDown(2.0)));
        Arbitrary<Long> exponent = Arbitraries.oneOf(
                Arbitraries.longs().between(-60, 60),
                Arbitraries.longs().between(-1100, -1000),
                Arbitraries.longs().between(-2000, 2000));
        return Combinators.combine(significand, exponent).as(WideDouble::of);
    }

    private static void between(WideDouble down, WideDouble up, BigDecimal exact) {
        assertTrue(down.toBigDecimal().compareTo(exact) <= 0, () -> down + " exceeds " + exact.round(WIDE));
        assertTrue(up.toBigDecimal().compareTo(exact) >= 0, () -> up + " is below " + exact.round(WIDE));
        // at most one unit away on each side
        BigDecimal width = up.toBigDecimal().subtract(down.toBigDecimal());
        assertTrue(width.compareTo(exact.abs().multiply(new BigDecimal(0x1p-51))) <= 0, () -> down + " to " + up);
    }

    @Property(tries = 1500)
    void sumsDifferencesProducts(@ForAll("wide") WideDouble a, @ForAll("wide") WideDouble b) {
        BigDecimal x = a.toBigDecimal();
        BigDecimal y = b.toBigDecimal();
        BigDecimal sum = x.add(y);
        assertTrue(a.plusDown(b).toBigDecimal().compareTo(sum) <= 0);
        assertTrue(a.plusUp(b).toBigDecimal().compareTo(sum) >= 0);
        BigDecimal width = a.plusUp(b).toBigDecimal().subtract(a.plusDown(b).toBigDecimal());
        assertTrue(width.compareTo(x.abs().max(y.abs()).multiply(new BigDecimal(0x1p-51))) <= 0);
        between(a.timesDown(b), a.timesUp(b), x.multiply(y));
        assertEquals(Integer.signum(x.compareTo(y)), Integer.signum(a.compareTo(b)));
        assertEquals(0, a.min(b).toBigDecimal().compareTo(x.min(y)));
        assertEquals(0, a.max(b).toBigDecimal().compareTo(x.max(y)));
    }

    @Property(tries = 1000)
    void quotientsAndRoots(@ForAll("wide") WideDouble a, @ForAll("wide") WideDouble b) {
        if (b.signum() != 0) {
            BigDecimal size = b.toBigDecimal().abs();
            BigDecimal signed =
                    b.signum() > 0 ? a.toBigDecimal() : a.toBigDecimal().negate();
            assertTrue(a.dividedByDown(b).toBigDecimal().multiply(size).compareTo(signed) <= 0);
            assertTrue(a.dividedByUp(b).toBigDecimal().multiply(size).compareTo(signed) >= 0);
        }
        WideDouble p = a.signum() < 0 ? a.negate() : a;
        assertTrue(p.sqrtDown().toBigDecimal().pow(2).compareTo(p.toBigDecimal()) <= 0);
        assertTrue(p.sqrtUp().toBigDecimal().pow(2).compareTo(p.toBigDecimal()) >= 0);
        WideDouble ratio = p.signum() == 0 ? WideDouble.ONE : p.sqrtUp().dividedByUp(p.sqrtDown());
        assertTrue(ratio.toDoubleUp() <= 1 + 0x1p-50);
    }

    @Property(tries = 2000)
    void conversionsRoundOutward(@ForAll("wide") WideDouble a) {
        BigDecimal x = a.toBigDecimal();
        double down = a.toDoubleDown();
        double up = a.toDoubleUp();
        if (down != Double.NEGATIVE_INFINITY) {
            assertTrue(new BigDecimal(down).compareTo(x) <= 0);
            double next = Math.nextUp(down);
            assertTrue(next == Double.POSITIVE_INFINITY || new BigDecimal(next).compareTo(x) > 0, "not the largest");
        }
        if (up != Double.POSITIVE_INFINITY) {
            assertTrue(new BigDecimal(up).compareTo(x) >= 0);
            double next = Math.nextDown(up);
            assertTrue(next == Double.NEGATIVE_INFINITY || new BigDecimal(next).compareTo(x) < 0, "not the smallest");
        }
        assertTrue(down != Double.POSITIVE_INFINITY && up != Double.NEGATIVE_INFINITY);
    }

    @Test
    void everyDoubleIsHeldExactly() {
        Random r = new Random(4);
        for (int i = 0; i < 20_000; i++) {
            double d = Double.longBitsToDouble(r.nextLong());
            if (Double.isNaN(d)) {
                continue;
            }
            assertEquals(d, WideDouble.of(d).toDoubleDown());
            assertEquals(d, WideDouble.of(d).toDoubleUp());
        }
        for (double d : new double[] {
            Double.MIN_VALUE, Double.MIN_NORMAL, Math.nextDown(Double.MIN_NORMAL), -3 * Double.MIN_VALUE
        }) {
            assertEquals(d, WideDouble.of(d).toDoubleDown());
            assertEquals(0, WideDouble.of(d).toBigDecimal().compareTo(new BigDecimal(d)));
        }
    }

    @Test
    void subnormalConversionsTakeTheRightSide() {
        WideDouble half = WideDouble.of(1, -1075);
        assertEquals(0.0, half.toDoubleDown());
        assertEquals(Double.MIN_VALUE, half.toDoubleUp());
        assertEquals(-Double.MIN_VALUE, half.negate().toDoubleDown());
        assertEquals(-0.0, half.negate().toDoubleUp());
        WideDouble x = WideDouble.of(1.75, -1074);
        assertEquals(Double.MIN_VALUE, x.toDoubleDown());
        assertEquals(2 * Double.MIN_VALUE, x.toDoubleUp());
        assertEquals(0.0, WideDouble.of(1, -100_000).toDoubleDown());
        assertEquals(Double.MIN_VALUE, WideDouble.of(1, -100_000).toDoubleUp());
        assertEquals(Double.MAX_VALUE, WideDouble.of(1, 1024).toDoubleDown());
        assertEquals(Double.POSITIVE_INFINITY, WideDouble.of(1, 1024).toDoubleUp());
    }

    /** ln 2 to 100 digits (published: any table of constants). */
    private static final BigDecimal LN2 =
            new BigDecimal("0.6931471805599453094172321214581765680755001343602552541206800094933936219"
                    + "696947156058633269964186875");

    /** e^y for |y| ≤ 1 to fifty digits. */
    private static BigDecimal exp(BigDecimal y) {
        BigDecimal term = BigDecimal.ONE;
        BigDecimal sum = BigDecimal.ONE;
        for (int k = 1; k < 45; k++) {
            term = term.multiply(y, WIDE).divide(BigDecimal.valueOf(k), WIDE);
            sum = sum.add(term, WIDE);
        }
        return sum;
    }

    /** Compares w > 0 with e^x by w's significand and e^(x − exponent · ln 2): big exponents would make big numbers. */
    private static int compare(WideDouble w, double x) {
        BigDecimal rest = new BigDecimal(x).subtract(LN2.multiply(BigDecimal.valueOf(w.exponent())));
        return new BigDecimal(w.significand()).compareTo(exp(rest));
    }

    @Test
    void exponentialsEnclose() {
        Random r = new Random(6);
        for (int i = 0; i < 1500; i++) {
            double x =
                    i % 2 == 0 ? r.nextGaussian() * Math.pow(10, r.nextInt(12) - 5) : (r.nextDouble() - 0.5) * 1.39e9;
            WideDouble down = WideDouble.expDown(x);
            WideDouble up = WideDouble.expUp(x);
            assertTrue(compare(down, x) < 0 && compare(up, x) > 0, "e^" + x);
            assertTrue(up.dividedByUp(down).toDoubleUp() < 1 + 0x1p-47, "e^" + x);
        }
    }

    @Test
    void logarithmsEnclose() {
        Random r = new Random(16);
        int[] range = {1, 3, 2000, 2_000_000, 2_000_000_000};
        for (int i = 0; i < 2000; i++) {
            int top = range[i % range.length];
            long e = r.nextInt(top) - top / 2;
            double m = i % 7 == 0 ? 1 + Math.scalb(r.nextDouble(), -r.nextInt(52)) : 1 + r.nextDouble();
            WideDouble w = WideDouble.of(m, i % 7 == 1 ? e - 1 : e);
            double down = w.lnDown();
            double up = w.lnUp();
            assertTrue(compare(w, down) >= 0, () -> w + ": lower logarithm " + down);
            assertTrue(compare(w, up) <= 0, () -> w + ": upper logarithm " + up);
            assertTrue(up - down <= 10 * Math.ulp(up), () -> w + ": " + down + " to " + up);
        }
    }

    @Test
    void extremes() {
        WideDouble inf = WideDouble.POSITIVE_INFINITY;
        WideDouble neg = WideDouble.NEGATIVE_INFINITY;
        WideDouble one = WideDouble.ONE;
        assertEquals(one, WideDouble.expDown(0));
        assertEquals(WideDouble.ZERO, WideDouble.expUp(Double.NEGATIVE_INFINITY));
        assertEquals(inf, WideDouble.expDown(Double.POSITIVE_INFINITY));
        assertEquals(7e8, WideDouble.expDown(7e8).lnUp(), 1e-6);
        assertEquals(-7e8, WideDouble.expUp(-7e8).lnDown(), 1e-6);
        assertEquals(0, one.lnDown());
        assertEquals(0, one.lnUp());
        assertEquals(Double.NEGATIVE_INFINITY, WideDouble.ZERO.lnUp());
        assertEquals(Double.POSITIVE_INFINITY, inf.lnDown());
        assertTrue(Double.isNaN(one.negate().lnUp()));
        // infinities: what is unknown lies on the safe side
        assertEquals(neg, inf.plusDown(neg));
        assertEquals(inf, inf.plusUp(neg));
        assertEquals(neg, neg.plusDown(inf));
        assertEquals(inf, neg.plusUp(inf));
        assertEquals(inf, inf.plusDown(one));
        assertEquals(WideDouble.ZERO, inf.timesDown(WideDouble.ZERO));
        assertEquals(neg, inf.timesUp(one.negate()));
        assertEquals(WideDouble.ZERO, one.dividedByUp(inf));
        assertEquals(WideDouble.ZERO, one.negate().dividedByDown(inf));
        assertEquals(WideDouble.ZERO, inf.dividedByDown(inf));
        assertEquals(inf, inf.dividedByUp(inf));
        assertEquals(neg, inf.dividedByDown(neg));
        assertEquals(WideDouble.ZERO, inf.dividedByUp(neg));
        assertEquals(inf, inf.sqrtDown());
        assertTrue(neg.compareTo(WideDouble.of(-1, 1_000_000)) < 0 && inf.compareTo(WideDouble.of(1, 1_000_000)) > 0);
        // a summand far below still moves the result by one unit on its own side
        WideDouble tiny = WideDouble.of(1, -500_000);
        assertEquals(one, one.plusDown(tiny));
        assertTrue(one.plusUp(tiny).compareTo(one) > 0);
        assertTrue(one.plusDown(tiny.negate()).compareTo(one) < 0);
        assertEquals(one, one.plusUp(tiny.negate()));
    }

    @Test
    void refusals() {
        assertThrows(InvalidInputException.class, () -> WideDouble.of(Double.NaN));
        assertThrows(InvalidInputException.class, () -> WideDouble.of(1, (1L << 30) + 1));
        assertThrows(InvalidInputException.class, () -> WideDouble.expUp(7.1e8));
        assertThrows(InvalidInputException.class, () -> WideDouble.expDown(Double.NaN));
        assertThrows(InvalidInputException.class, () -> WideDouble.ONE.dividedByUp(WideDouble.ZERO));
        assertThrows(InvalidInputException.class, () -> WideDouble.of(-1).sqrtDown());
        assertThrows(InvalidInputException.class, WideDouble.POSITIVE_INFINITY::toBigDecimal);
        assertThrows(
                InvalidInputException.class, () -> WideDouble.of(1, 2_000_000).toBigDecimal());
    }

    @Test
    void valueSemantics() {
        assertEquals(WideDouble.of(6), WideDouble.of(1.5, 2));
        assertEquals(WideDouble.of(6).hashCode(), WideDouble.of(1.5, 2).hashCode());
        assertEquals(WideDouble.ZERO, WideDouble.of(-0.0));
        assertNotEquals(WideDouble.of(6), WideDouble.of(-6));
        assertEquals(1.5, WideDouble.of(6).significand());
        assertEquals(2, WideDouble.of(6).exponent());
        assertEquals("0.1", WideDouble.of(0.1).toString());
        assertEquals("-Infinity", WideDouble.NEGATIVE_INFINITY.toString());
        // 2^-1000, by any calculator of enough digits: 9.33263618503218878990e-302
        assertEquals(
                "9.3326361850321888E-302",
                WideDouble.of(1, -1000).toBigDecimal(17, RoundingMode.HALF_EVEN).toString());
        assertEquals(
                "9.3E-302",
                WideDouble.of(1, -1000).toBigDecimal(2, RoundingMode.FLOOR).toString());
        assertEquals(
                "9.4E-302",
                WideDouble.of(1, -1000).toBigDecimal(2, RoundingMode.CEILING).toString());
        assertTrue(
                WideDouble.of(1, -1430).toString().endsWith("E-431"),
                WideDouble.of(1, -1430).toString());
        assertEquals("1.0*2^2000000", WideDouble.of(1, 2_000_000).toString());
    }
}
