package org.minorant.core.internal.number;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.math.MathContext;
import java.math.RoundingMode;
import java.util.Random;
import org.junit.jupiter.api.Test;

/** Double-double arithmetic against decimal arithmetic of eighty digits. */
class DoubleDoubleTest {

    private static final MathContext WIDE = new MathContext(80, RoundingMode.HALF_EVEN);

    /** u², the unit of the bounds of Joldes, Muller and Popescu (2017). */
    private static final BigDecimal U2 = new BigDecimal(0x1p-106);

    private static DoubleDouble random(Random r) {
        double hi = Math.scalb(r.nextGaussian(), r.nextInt(200) - 100);
        double lo = Math.ulp(hi) * (r.nextDouble() - 0.5);
        return switch (r.nextInt(6)) {
            case 0 -> new DoubleDouble(hi, 0);
            case 1 -> new DoubleDouble(hi, Math.ulp(hi) / 2);
            case 2 -> new DoubleDouble(hi, -Math.ulp(hi) / 4);
            case 3 -> DoubleDouble.sum(hi, lo * 1e-12);
            default -> DoubleDouble.sum(hi, lo);
        };
    }

    private static void within(DoubleDouble computed, BigDecimal exact, double units, String what) {
        BigDecimal error = computed.toBigDecimal().subtract(exact).abs();
        BigDecimal bound = exact.abs().multiply(U2).multiply(new BigDecimal(units));
        assertTrue(
                error.compareTo(bound) <= 0,
                () -> what + ": error of " + error.divide(exact.abs().multiply(U2), MathContext.DECIMAL32)
                        + " u², allowed " + units);
        assertTrue(Math.abs(computed.lo()) <= 0.5 * Math.ulp(computed.hi()), what + " is not normalised");
    }

    @Test
    void everyOperationKeepsItsBound() {
        Random r = new Random(7);
        for (int i = 0; i < 8_000; i++) {
            DoubleDouble a = random(r);
            DoubleDouble b =
                    i % 4 == 0 ? DoubleDouble.sum(-a.hi(), -a.lo() * (1 + r.nextGaussian() * 1e-8)) : random(r);
            BigDecimal x = a.toBigDecimal();
            BigDecimal y = b.toBigDecimal();
            if (x.signum() == 0 || y.signum() == 0) {
                continue;
            }
            if (x.add(y).signum() != 0) {
                within(a.plus(b), x.add(y), 3, "sum");
            }
            if (x.subtract(y).signum() != 0) {
                within(a.minus(b), x.subtract(y), 3, "difference");
            }
            within(a.times(b), x.multiply(y), 5, "product");
            within(a.times(b.hi()), x.multiply(new BigDecimal(b.hi())), 5, "product with a double");
            within(a.dividedBy(b), x.divide(y, WIDE), 10, "quotient");
            DoubleDouble p = a.hi() < 0 ? a.negate() : a;
            within(p.sqrt(), p.toBigDecimal().sqrt(WIDE), 16, "root");
        }
        // the bound that the rest of the library uses
        assertEquals(16, DoubleDouble.EPS / 0x1p-106);
    }

    @Test
    void exactBuildingBlocks() {
        Random r = new Random(8);
        for (int i = 0; i < 3_000; i++) {
            double a = Math.scalb(r.nextGaussian(), r.nextInt(100) - 50);
            double b = Math.scalb(r.nextGaussian(), r.nextInt(100) - 50);
            BigDecimal sum = new BigDecimal(a).add(new BigDecimal(b));
            BigDecimal product = new BigDecimal(a).multiply(new BigDecimal(b));
            assertEquals(0, DoubleDouble.sum(a, b).toBigDecimal().compareTo(sum));
            assertEquals(0, DoubleDouble.product(a, b).toBigDecimal().compareTo(product));
        }
    }

    @Test
    void fromDecimalIsNearest() {
        BigDecimal third = BigDecimal.ONE.divide(new BigDecimal(3), WIDE);
        within(DoubleDouble.of(third), third, 2, "one third");
        within(DoubleDouble.of(third.negate()), third.negate(), 2, "minus one third");
        assertEquals(DoubleDouble.ZERO, DoubleDouble.of(BigDecimal.ZERO));
        assertEquals(0.5, DoubleDouble.of(new BigDecimal("0.5")).value());
    }

    @Test
    void rootsOfWhatHasNone() {
        assertEquals(DoubleDouble.ZERO, DoubleDouble.ZERO.sqrt());
        assertEquals(DoubleDouble.ZERO, DoubleDouble.of(-1e-40).sqrt());
        assertTrue(Double.isNaN(DoubleDouble.of(Double.NaN).sqrt().hi()));
    }
}
