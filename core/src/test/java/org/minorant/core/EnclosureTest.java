package org.minorant.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.util.Random;
import net.jqwik.api.Arbitraries;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.Combinators;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import org.junit.jupiter.api.Test;

class EnclosureTest {

    private static final double INF = Double.POSITIVE_INFINITY;

    /** An enclosure together with a number in it. */
    record Held(Enclosure enclosure, BigDecimal number) {}

    @Provide
    Arbitrary<Held> held() {
        Arbitrary<Double> end = Arbitraries.oneOf(
                Arbitraries.doubles().between(-3, 3), Arbitraries.of(0.0, 1.0, -1.0, Math.nextUp(1.0), 0x1p-30));
        Arbitrary<Integer> exponent = Arbitraries.of(0, 0, 0, 1, -40, 900, -1500);
        Arbitrary<Integer> part = Arbitraries.integers().between(0, 8);
        return Combinators.combine(end, end, exponent, part).as((a, b, e, k) -> {
            WideDouble l = WideDouble.of(Math.min(a, b), e);
            WideDouble u = WideDouble.of(Math.max(a, b), e);
            BigDecimal x = l.toBigDecimal();
            BigDecimal step = u.toBigDecimal().subtract(x).multiply(new BigDecimal(0.125));
            return new Held(Enclosure.of(l, u), x.add(step.multiply(BigDecimal.valueOf(k))));
        });
    }

    @Property(tries = 1500)
    void operationsHoldTheExactResult(@ForAll("held") Held a, @ForAll("held") Held b) {
        BigDecimal x = a.number();
        BigDecimal y = b.number();
        Enclosure p = a.enclosure();
        Enclosure q = b.enclosure();
        assertTrue(p.contains(x) && q.contains(y));
        assertTrue(p.plus(q).contains(x.add(y)), () -> p + " + " + q);
        assertTrue(p.minus(q).contains(x.subtract(y)), () -> p + " - " + q);
        assertTrue(p.times(q).contains(x.multiply(y)), () -> p + " * " + q);
        assertTrue(p.square().contains(x.multiply(x)), () -> p + " squared");
        assertTrue(p.times(-1.25).contains(x.multiply(new BigDecimal(-1.25))));
        assertTrue(p.negate().contains(x.negate()));
        assertTrue(p.complement().contains(BigDecimal.ONE.subtract(x)));
        assertTrue(p.min(q).contains(x.min(y)) && p.max(q).contains(x.max(y)));
        assertTrue(p.hull(q).contains(x) && p.hull(q).contains(y));
        assertTrue(p.widen(0.25).contains(x.add(new BigDecimal(0.25))));
        assertTrue(p.widen(0.25).contains(x.subtract(new BigDecimal(0.25))));
        quotient(p.dividedBy(q), x, y, q);
        // certain implies what it says
        assertTrue(!p.isCertainlyBelow(q) || x.compareTo(y) <= 0);
        assertTrue(p.isPossiblyBelow(q) || x.compareTo(y) > 0);
        assertTrue(p.width() >= 0 && p.intersect(p).equals(p) && p.hull(q).contains(q));
        root(p, x);
    }

    private static void quotient(Enclosure z, BigDecimal x, BigDecimal y, Enclosure divisor) {
        if (divisor.contains(0.0)) {
            assertEquals(Enclosure.unknown(), z);
            return;
        }
        BigDecimal size = y.abs();
        BigDecimal signed = y.signum() > 0 ? x : x.negate();
        assertTrue(z.lowerWide().toBigDecimal().multiply(size).compareTo(signed) <= 0, () -> "quotient " + z);
        assertTrue(z.upperWide().toBigDecimal().multiply(size).compareTo(signed) >= 0, () -> "quotient " + z);
    }

    private static void root(Enclosure p, BigDecimal x) {
        if (p.upperWide().signum() < 0) {
            assertThrows(InvalidInputException.class, p::sqrt);
        } else if (x.signum() >= 0) {
            Enclosure s = p.sqrt();
            assertTrue(s.lowerWide().toBigDecimal().pow(2).compareTo(x) <= 0);
            assertTrue(s.upperWide().toBigDecimal().pow(2).compareTo(x) >= 0);
        }
    }

    @Property(tries = 1000)
    void printsCertainDigitsOnly(@ForAll("held") Held a) {
        String text = a.enclosure().toString();
        if (text.startsWith("[")) {
            String[] ends = text.substring(1, text.length() - 1).split(", ");
            assertTrue(
                    new BigDecimal(ends[0]).compareTo(a.enclosure().lowerWide().toBigDecimal()) <= 0, text);
            assertTrue(
                    new BigDecimal(ends[1]).compareTo(a.enclosure().upperWide().toBigDecimal()) >= 0, text);
        } else {
            // every number enclosed lies within half a unit of the last digit printed
            BigDecimal printed = new BigDecimal(text);
            BigDecimal half = printed.ulp().divide(BigDecimal.valueOf(2));
            assertTrue(a.number().subtract(printed).abs().compareTo(half) <= 0, text + " for " + a.number());
        }
    }

    @Test
    void printing() {
        assertEquals("1.000", Enclosure.of(0.99996, 1.0004).toString());
        assertEquals("[0.94, 1.06]", Enclosure.of(0.9401, 1.0599).toString().replace("0.940", "0.94"));
        assertEquals("1.2e3", Enclosure.of(1190, 1210).toString());
        assertEquals("-0.3333", Enclosure.of(-0.33333, -0.33331).toString());
        assertEquals("[0, 1.01e-20]", Enclosure.of(0, 1.001e-20).toString());
        assertEquals("[-inf, 2.50]", Enclosure.of(-INF, 2.5).toString().replace("2.5]", "2.50]"));
        assertEquals("[0.12, 0.13]", Enclosure.of(0.1201, 0.1299).toIntervalString(2));
        assertEquals("[-0.13, -0.12]", Enclosure.of(-0.1299, -0.1201).toIntervalString(2));
        assertEquals("Infinity", Enclosure.infinite().toString());
        // far below the smallest double
        Enclosure deep = Enclosure.ofLogarithms(-990.0, -990.0);
        assertEquals(-990, deep.lnLower(), 1e-12);
        // e^-990 = 1.13e-430, as 990/ln 10 = 429.951...
        assertTrue(deep.toString().matches("1\\.1[0-9]{9,}e-430"), deep.toString());
        assertEquals(0.0, deep.lower());
        assertEquals(Double.MIN_VALUE, deep.upper());
        assertTrue(deep.relativeWidth() < 1e-14);
    }

    @Test
    void logarithmsAndExponentialsAreInverse() {
        Random r = new Random(3);
        for (int i = 0; i < 2000; i++) {
            double x = Math.exp(20 * r.nextGaussian());
            Enclosure e = Enclosure.exact(x);
            assertTrue(e.ln().exp().contains(x), "" + x);
            double y = 300 * r.nextGaussian();
            assertTrue(Enclosure.exact(y).exp().ln().contains(y), "" + y);
        }
        assertEquals(Enclosure.of(-INF, 0), Enclosure.of(0, 1).ln());
        assertEquals(Enclosure.of(0, INF), Enclosure.of(1, INF).ln());
        assertTrue(Enclosure.infinite().ln().isInfinite());
        assertEquals(Enclosure.of(0, INF), Enclosure.unknown().exp());
    }

    @Test
    void infiniteEnds() {
        Enclosure all = Enclosure.unknown();
        Enclosure infinite = Enclosure.infinite();
        assertEquals(all, infinite.minus(infinite));
        assertEquals(Enclosure.of(0, INF), infinite.dividedBy(infinite));
        assertEquals(Enclosure.ZERO, Enclosure.ONE.dividedBy(infinite));
        assertEquals(Enclosure.of(0, 1), Enclosure.ONE.dividedBy(Enclosure.of(1, INF)));
        assertEquals(Enclosure.of(-1, 0), Enclosure.of(-1, -1).dividedBy(Enclosure.of(1, INF)));
        assertEquals(Enclosure.of(0, INF), Enclosure.of(0, 1).times(Enclosure.of(1, INF)));
        assertEquals(Enclosure.of(-INF, INF), Enclosure.of(-1, 1).times(Enclosure.of(1, INF)));
        assertEquals(Enclosure.ZERO, Enclosure.ZERO.times(all));
        assertTrue(infinite.isInfinite() && !infinite.isFinite() && !all.isInfinite());
        assertEquals(INF, all.width());
        assertEquals(INF, Enclosure.of(1, INF).relativeWidth());
        assertEquals(all, Enclosure.ONE.widen(INF));
        assertTrue(all.contains(new BigDecimal("-1e5000")) && !infinite.contains(BigDecimal.TEN));
        assertFalse(all.contains(Double.NaN));
    }

    @Test
    void summaries() {
        Enclosure e = Enclosure.of(2, 3);
        assertEquals(1, e.width());
        assertEquals(0.5, e.relativeWidth());
        assertEquals(0.5, e.negate().relativeWidth());
        assertEquals(INF, Enclosure.of(-1, 1).relativeWidth());
        assertEquals(0, Enclosure.exact(7).relativeWidth());
        assertEquals(2.5, e.midpoint());
        assertEquals(0, Enclosure.of(-Double.MAX_VALUE, Double.MAX_VALUE).midpoint());
        assertEquals(0, Enclosure.unknown().midpoint());
        assertEquals(INF, Enclosure.of(1, INF).midpoint());
        assertEquals(Double.MIN_VALUE, Enclosure.exact(Double.MIN_VALUE).midpoint());
        assertEquals(Enclosure.of(0, 1), Enclosure.of(-3, 5).clip(0, 1));
        assertEquals(Enclosure.exact(1), Enclosure.of(3, 5).clip(0, 1));
        assertEquals(e.hashCode(), Enclosure.of(2, 3).hashCode());
        assertNotEquals(e, Enclosure.of(2, 4));
        assertTrue(e.contains(Enclosure.exact(2.5)) && !e.contains(Enclosure.of(2.5, 3.5)));
    }

    @Test
    void refusals() {
        assertThrows(InvalidInputException.class, () -> Enclosure.of(2, 1));
        assertThrows(InvalidInputException.class, () -> Enclosure.of(Double.NaN, 1));
        assertThrows(InvalidInputException.class, () -> Enclosure.exact(Double.NaN));
        assertThrows(InvalidInputException.class, () -> Enclosure.ONE.widen(-1));
        assertThrows(InvalidInputException.class, () -> Enclosure.ONE.widen(Double.NaN));
        assertThrows(InvalidInputException.class, () -> Enclosure.ONE.intersect(Enclosure.ZERO));
        assertThrows(InvalidInputException.class, () -> Enclosure.ofLogarithms(1, 0));
        assertThrows(InvalidInputException.class, () -> Enclosure.of(-2, -1).sqrt());
    }

    @Test
    void powersEncloseExactOnes() {
        Enclosure tenth = Enclosure.exact(0.1);
        java.math.BigDecimal exact = new java.math.BigDecimal(0.1).pow(700);
        assertTrue(tenth.power(700).contains(exact));
        assertTrue(tenth.power(700).relativeWidth() < 700 * 0x1p-50);
        assertEquals(Enclosure.ONE, tenth.power(0));
        assertEquals(tenth, tenth.power(1));
        assertEquals(Enclosure.of(0, 4), Enclosure.of(-2, 1).power(2));
        assertThrows(InvalidInputException.class, () -> tenth.power(-1));
    }
}
