package org.minorant.core.internal.number;

import java.math.BigDecimal;

/**
 * An unevaluated sum hi + lo of two doubles, |lo| ≤ ½ ulp(hi): about 106 bits.
 *
 * <p>Relative error of each operation at most 2^-102 (Joldes, Muller, Popescu, "Tight and rigorous error bounds for basic
 * building blocks of double-word arithmetic", ACM TOMS 44, 15res, 2017: at most 3u² for the sum, 5u² for the product, 10u²
 * for the quotient, u = 2^-53), as long as nothing over- or underflows.
 *
 * @param hi the leading part
 * @param lo the trailing part
 */
public record DoubleDouble(double hi, double lo) {

    /** Zero. */
    public static final DoubleDouble ZERO = new DoubleDouble(0, 0);

    /** One. */
    public static final DoubleDouble ONE = new DoubleDouble(1, 0);

    /** Bound on the relative error of one operation. */
    public static final double EPS = 0x1p-102;

    /** The exact value of a double. */
    public static DoubleDouble of(double a) {
        return new DoubleDouble(a, 0);
    }

    /** The exact sum of two doubles. */
    public static DoubleDouble sum(double a, double b) {
        double s = a + b;
        double bb = s - a;
        return new DoubleDouble(s, (a - (s - bb)) + (b - bb));
    }

    /** The exact product of two doubles. */
    public static DoubleDouble product(double a, double b) {
        double p = a * b;
        return new DoubleDouble(p, ProductError.of(a, b, p));
    }

    /** Nearest double-double to a decimal number (relative error at most 2^-105). */
    public static DoubleDouble of(BigDecimal a) {
        double h = a.doubleValue();
        if (h == 0 || Double.isInfinite(h)) {
            return of(h);
        }
        return quick(h, a.subtract(new BigDecimal(h)).doubleValue());
    }

    private static DoubleDouble quick(double a, double b) {
        double s = a + b;
        return new DoubleDouble(s, b - (s - a));
    }

    public DoubleDouble plus(DoubleDouble o) {
        DoubleDouble s = sum(hi, o.hi);
        DoubleDouble t = sum(lo, o.lo);
        DoubleDouble v = quick(s.hi, s.lo + t.hi);
        return quick(v.hi, t.lo + v.lo);
    }

    public DoubleDouble negate() {
        return new DoubleDouble(-hi, -lo);
    }

    public DoubleDouble minus(DoubleDouble o) {
        return plus(o.negate());
    }

    public DoubleDouble times(DoubleDouble o) {
        double p = hi * o.hi;
        double e = ProductError.of(hi, o.hi, p);
        return quick(p, e + (hi * o.lo + lo * o.hi));
    }

    public DoubleDouble times(double o) {
        double p = hi * o;
        return quick(p, ProductError.of(hi, o, p) + lo * o);
    }

    public DoubleDouble dividedBy(DoubleDouble o) {
        double q = hi / o.hi;
        DoubleDouble r = minus(o.times(q));
        double q2 = r.hi / o.hi;
        DoubleDouble r2 = r.minus(o.times(q2));
        DoubleDouble s = quick(q, q2);
        return s.plus(of(r2.hi / o.hi));
    }

    /** Square root of a non-negative number, by two corrections of the double root; negative numbers count as zero, NaN stays NaN. */
    public DoubleDouble sqrt() {
        if (hi <= 0) {
            return ZERO;
        }
        double r = Math.sqrt(hi);
        double d = minus(product(r, r)).hi / (2 * r);
        DoubleDouble s = quick(r, d);
        // a second correction brings the error from 2^-104 or so safely below 2^-102
        double d2 = minus(s.times(s)).hi / (2 * r);
        return s.plus(of(d2));
    }

    /** hi + lo rounded to double. */
    public double value() {
        return hi + lo;
    }

    /** The exact value in decimal. */
    public BigDecimal toBigDecimal() {
        return new BigDecimal(hi).add(new BigDecimal(lo));
    }
}
