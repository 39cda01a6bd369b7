package org.minorant.bounds.divergence;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertSame;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.math.MathContext;
import java.util.Random;
import org.junit.jupiter.api.Test;

/** Balls against exact decimals and, for the two functions, 64-digit arithmetic. */
class BallTest {

    private static final MathContext EXACT = new MathContext(120);

    private static BigDecimal middle(Ball b) {
        return new BigDecimal(b.hi()).add(new BigDecimal(b.lo()));
    }

    private static void assertHolds(Ball b, BigDecimal truth) {
        BigDecimal off = truth.subtract(middle(b)).abs();
        assertTrue(off.compareTo(new BigDecimal(b.radius())) <= 0, () -> b + " misses " + truth.toEngineeringString());
    }

    /** Two numbers of thirty digits, of any size and sign. */
    private static Ball random(Random r, int decades) {
        double hi = r.nextGaussian() * Math.pow(10, decades * (2 * r.nextDouble() - 1));
        return Ball.of(hi).plus(Ball.of(hi * 0x1p-54 * (r.nextDouble() - 0.5)));
    }

    @Test
    void sumsProductsAndQuotientsHoldTheExactResult() {
        Random r = new Random(11);
        for (int i = 0; i < 1000; i++) {
            Ball x = random(r, i % 2 == 0 ? 1 : 100);
            Ball y = i % 5 == 0 ? x.negate().plus(random(r, 0).times(0x1p-90)) : random(r, i % 2 == 0 ? 1 : 100);
            Ball a = new Ball(x.hi(), x.lo(), 0);
            Ball b = new Ball(y.hi(), y.lo(), 0);
            BigDecimal p = middle(a);
            BigDecimal q = middle(b);
            assertHolds(a.plus(b), p.add(q));
            assertHolds(a.minus(b), p.subtract(q));
            assertHolds(a.times(b), p.multiply(q));
            assertHolds(a.times(y.hi()), p.multiply(new BigDecimal(y.hi())));
            assertHolds(a.dividedBy(b), p.divide(q, EXACT));
            assertTrue(
                    a.dividedBy(b).radius() <= 0x1p-98 * Math.abs(a.dividedBy(b).hi()) + 0x1p-999);
        }
    }

    @Test
    void radiiCarryWhatTheArgumentsMayBe() {
        Random r = new Random(12);
        for (int i = 0; i < 200; i++) {
            Ball x = random(r, 1).widen(0.1 * r.nextDouble());
            Ball y = Ball.of(1 + r.nextDouble()).widen(0.1 * r.nextDouble());
            BigDecimal p = middle(x).add(new BigDecimal(x.radius() * (2 * r.nextDouble() - 1)));
            BigDecimal q = middle(y).add(new BigDecimal(y.radius() * (2 * r.nextInt(2) - 1)));
            assertHolds(x.plus(y), p.add(q));
            assertHolds(x.times(y), p.multiply(q));
            assertHolds(x.dividedBy(y), p.divide(q, EXACT));
            assertHolds(x.min(y), p.min(q));
            BigDecimal e = Multiprecision.decimal(Multiprecision.number(q).exp());
            assertHolds(y.exp(), e);
            BigDecimal l = Multiprecision.decimal(Multiprecision.number(q).log());
            assertHolds(y.ln(), l);
        }
    }

    @Test
    void exponentialsHaveThirtyDigits() {
        Random r = new Random(13);
        for (int i = 0; i < 100; i++) {
            Ball x = i < 4
                    ? Ball.of(new double[] {1e-300, -1e-20, 699.9, -689.9}[i])
                    : random(r, 0).times(i % 3 == 0 ? 100 : 1);
            Ball a = new Ball(x.hi(), x.lo(), 0);
            Ball e = a.exp();
            assertHolds(
                    e, Multiprecision.decimal(Multiprecision.number(middle(a)).exp()));
            assertTrue(e.radius() <= (1e-28 + 4e-30 * Math.abs(a.hi())) * e.hi() + 1e-320, () -> a + " gave " + e);
        }
        assertHolds(Ball.of(-1000).exp(), BigDecimal.ZERO);
        assertSame(Ball.ONE, Ball.ZERO.exp());
    }

    @Test
    void logarithmsHaveThirtyDigits() {
        Random r = new Random(14);
        for (int i = 0; i < 100; i++) {
            double hi = i < 6
                    ? new double[] {Double.MIN_VALUE, 1e-310, Double.MAX_VALUE, 1 + 0x1p-52, 1 - 0x1p-53, 1.4142135}[i]
                    : Math.pow(10, (i % 3 == 0 ? 300 : 2) * (2 * r.nextDouble() - 1));
            Ball a = new Ball(hi, i < 6 ? 0 : hi * 0x1p-55, 0);
            Ball l = a.ln();
            assertHolds(
                    l, Multiprecision.decimal(Multiprecision.number(middle(a)).log()));
            assertTrue(l.radius() <= 1e-28 * Math.max(1, Math.abs(l.hi())), () -> a + " gave " + l);
        }
        assertEquals(Ball.ZERO, Ball.ONE.ln());
    }

    @Test
    void onlyClearlyPositiveNumbersCount() {
        assertTrue(Ball.of(1e-300).isPositive());
        assertTrue(new Ball(1, 0, 0.9).isPositive());
        assertFalse(new Ball(1, 0, 1).isPositive());
        assertFalse(Ball.ZERO.isPositive());
        assertFalse(Ball.of(-1).isPositive());
    }

    @Test
    void endsRoundOutward() {
        Ball third = Ball.ONE.dividedBy(Ball.of(3));
        assertTrue(third.toEnclosure().contains(BigDecimal.ONE.divide(BigDecimal.valueOf(3), EXACT)));
        assertTrue(third.toEnclosure().width() <= Math.ulp(1.0 / 3));
        assertEquals(1.0 / 3, third.lower());
        assertEquals(Math.nextUp(1.0 / 3), third.upper());
        assertEquals(0.75, Ball.difference(1, 0.25).lower());
        assertTrue(new Ball(-2, 0, 1).magnitude() >= 3);
    }

    @Test
    void whatCannotBeBoundedIsRefused() {
        assertThrows(ArithmeticException.class, () -> Ball.ONE.dividedBy(new Ball(0, 0, 1)));
        assertThrows(ArithmeticException.class, () -> Ball.ZERO.ln());
        assertThrows(ArithmeticException.class, () -> Ball.of(701).exp());
        assertThrows(ArithmeticException.class, () -> new Ball(0, 0, 2).exp());
    }
}
