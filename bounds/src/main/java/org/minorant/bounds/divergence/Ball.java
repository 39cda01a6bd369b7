package org.minorant.bounds.divergence;

import org.minorant.core.Enclosure;

/**
 * A real number known to about thirty digits: |true − (hi + lo)| ≤ radius.
 *
 * <p>The midpoint is an unevaluated sum of two doubles; every operation adds its own rounding (at most 2^-102 of the result for sums,
 * products and quotients: Joldes, Muller, Popescu, ACM TOMS 44, 15res, 2017) and what gradual underflow may lose to the radius, which is
 * computed in double and rounded up. The point of the many digits is that divergences are differences and logarithms of numbers near one:
 * with thirty digits inside, the sixteen that are returned survive also for states that nearly agree.
 *
 * @param hi the leading part of the midpoint
 * @param lo the trailing part, at most half a unit in the last place of the leading one
 * @param radius the radius, at least 0
 */
public record Ball(double hi, double lo, double radius) {

    /** Zero. */
    public static final Ball ZERO = new Ball(0, 0, 0);

    /** One. */
    public static final Ball ONE = new Ball(1, 0, 0);

    /** ln 2; the two doubles miss 5.8e-34. */
    private static final Ball LN2 = new Ball(0x1.62e42fefa39efp-1, 0x1.abc9e3b39803fp-56, 0x1p-110);

    /** Covers the rounding of a radius computed with a few operations. */
    private static final double UP = 1 + 0x1p-48;

    private static final double EPS = 0x1p-102;

    /** Products below this may lose digits to gradual underflow, at most {@link #LOST}. */
    private static final double SAFE = 0x1p-900;

    private static final double LOST = 0x1p-1000;

    /** Taylor terms of e^y for |y| ≤ 0.022; the remainder is below 2^-125. */
    private static final int TERMS = 16;

    private static final int HALVINGS = 4;

    private static final Ball[] INVERSE = inverses();

    private static Ball[] inverses() {
        Ball[] b = new Ball[TERMS + 1];
        for (int k = 1; k <= TERMS; k++) {
            b[k] = ONE.dividedBy(of(k));
        }
        return b;
    }

    /**
     * Returns a number known exactly.
     *
     * @param value the number, finite
     * @return the ball of radius zero
     */
    public static Ball of(double value) {
        return new Ball(value, 0, 0);
    }

    /**
     * Returns the difference of two doubles, which two doubles hold exactly.
     *
     * @param a the first number
     * @param b the number to subtract
     * @return a − b, with radius 0
     */
    public static Ball difference(double a, double b) {
        double s = a - b;
        double t = s - a;
        return new Ball(s, (a - (s - t)) + (-b - t), 0);
    }

    /**
     * Returns this ball with a larger radius.
     *
     * @param error what to add to the radius, at least 0
     * @return the wider ball
     */
    public Ball widen(double error) {
        return new Ball(hi, lo, (radius + error) * UP);
    }

    /**
     * Returns the sum.
     *
     * @param o the other term
     * @return this + o
     */
    public Ball plus(Ball o) {
        double s = hi + o.hi;
        double b = s - hi;
        double e = (hi - (s - b)) + (o.hi - b);
        double t = lo + o.lo;
        double c = t - lo;
        double f = (lo - (t - c)) + (o.lo - c);
        double x = s + (e + t);
        double y = (e + t) - (x - s);
        double z = x + (y + f);
        return new Ball(z, (y + f) - (z - x), (radius + o.radius + EPS * Math.abs(z)) * UP);
    }

    /**
     * Returns the negative, exactly.
     *
     * @return −this
     */
    public Ball negate() {
        return new Ball(-hi, -lo, radius);
    }

    /**
     * Returns the difference.
     *
     * @param o the term to subtract
     * @return this − o
     */
    public Ball minus(Ball o) {
        return plus(o.negate());
    }

    /**
     * Returns the product.
     *
     * @param o the other factor
     * @return this · o
     */
    public Ball times(Ball o) {
        if ((hi == 0 && radius == 0) || (o.hi == 0 && o.radius == 0)) {
            return ZERO;
        }
        double p = hi * o.hi;
        double e = Math.fma(hi, o.hi, -p) + (hi * o.lo + lo * o.hi);
        double s = p + e;
        double r = Math.abs(hi) * o.radius + Math.abs(o.hi) * radius + radius * o.radius + EPS * Math.abs(p);
        return new Ball(s, e - (s - p), r * UP + (Math.abs(p) < SAFE ? LOST : 0));
    }

    /**
     * Returns the product with an exact number.
     *
     * @param factor the factor, finite
     * @return this · factor
     */
    public Ball times(double factor) {
        return times(of(factor));
    }

    /**
     * Returns the quotient.
     *
     * @param o the divisor, certainly not zero
     * @return this / o
     * @throws ArithmeticException if the divisor may be zero
     */
    public Ball dividedBy(Ball o) {
        double least = Math.abs(o.hi) - o.radius * UP;
        if (!(least > 0)) {
            throw new ArithmeticException("the divisor " + o + " may be zero");
        }
        double q = hi / o.hi;
        Ball divisor = new Ball(o.hi, o.lo, 0);
        Ball r = new Ball(hi, lo, 0).minus(divisor.times(q));
        double q2 = r.hi / o.hi;
        double s = q + q2;
        // what is left after the two quotient digits, bounded rather than divided out
        Ball rest = r.minus(divisor.times(q2));
        double missed = (Math.abs(rest.hi) + rest.radius) / (least * (1 - 0x1p-50));
        double inherited = (radius + (Math.abs(q) * UP + missed) * o.radius) / (least * (1 - 0x1p-50));
        return new Ball(s, q2 - (s - q), (missed + inherited) * UP + (Math.abs(q) < SAFE && hi != 0 ? LOST : 0));
    }

    /**
     * Returns the exponential.
     *
     * @return e^this, for a midpoint of at most 700; below −690 the ball [−2^-990, 2^-990] if the radius is below 1
     * @throws ArithmeticException if the midpoint exceeds 700 or the radius exceeds 1
     */
    public Ball exp() {
        if (!(hi <= 700 && radius <= 1)) {
            throw new ArithmeticException("the exponent " + this + " is too large");
        }
        if (hi == 0 && lo == 0 && radius == 0) {
            return ONE;
        }
        if (hi < -690) {
            return new Ball(0, 0, 0x1p-990);
        }
        double k = Math.rint(hi / LN2.hi);
        Ball y = new Ball(hi, lo, 0).minus(LN2.times(k)).times(Math.scalb(1.0, -HALVINGS));
        Ball s = ONE;
        for (int j = TERMS; j >= 1; j--) {
            s = ONE.plus(y.times(s).times(INVERSE[j]));
        }
        s = s.widen(0x1p-120);
        for (int j = 0; j < HALVINGS; j++) {
            s = s.times(s);
        }
        Ball e = s.scaled((int) k);
        return radius == 0 ? e : e.widen(e.magnitude() * Math.expm1(radius) * UP);
    }

    /** This times 2^k, for results in the normal range. */
    private Ball scaled(int k) {
        return new Ball(Math.scalb(hi, k), Math.scalb(lo, k), Math.scalb(radius, k) + Double.MIN_VALUE);
    }

    /**
     * Returns the natural logarithm.
     *
     * @return ln(this)
     * @throws ArithmeticException if this may be zero or negative
     */
    public Ball ln() {
        if (!isPositive()) {
            throw new ArithmeticException("the logarithm of " + this + " is not bounded");
        }
        if (hi == 1 && lo == 0 && radius == 0) {
            return ZERO;
        }
        int k = Math.getExponent(hi) + (Math.scalb(hi, -Math.getExponent(hi)) > 1.4 ? 1 : 0);
        double m = Math.scalb(Math.scalb(hi, -k / 2), -k + k / 2);
        double tail = Math.scalb(Math.scalb(lo, -k / 2), -k + k / 2);
        // ln x = y + ln(1 + t) with t = x e^(-y) − 1 tiny, so that two terms of the series are enough
        double y = Math.log(m);
        Ball t = new Ball(m, tail, 0).times(of(-y).exp()).minus(ONE);
        double size = Math.abs(t.hi) + t.radius;
        Ball ln = LN2.times(k).plus(of(y)).plus(t).minus(t.times(t).times(0.5)).widen(size * size * size + LOST);
        double relative = radius / (hi * (1 - 0x1p-50));
        // |ln(x + d) − ln x| ≤ r/(1 − r) for |d| ≤ r x
        return radius == 0 ? ln : ln.widen(relative / (1 - relative * UP) * UP);
    }

    /**
     * Tells whether the number is certainly positive, and by more than 2^-40 of the midpoint.
     *
     * @return whether the lower end clearly exceeds 0
     */
    public boolean isPositive() {
        return hi * (1 - 0x1p-40) > radius;
    }

    /**
     * Returns a double not below the number.
     *
     * @return an upper end
     */
    public double upper() {
        return toEnclosure().upper();
    }

    /**
     * Returns a double not above the number.
     *
     * @return a lower end
     */
    public double lower() {
        return toEnclosure().lower();
    }

    /**
     * Returns a double not below the magnitude of the number.
     *
     * @return an upper end of |this|
     */
    public double magnitude() {
        return (Math.abs(hi) + radius) * UP;
    }

    /**
     * Returns the smaller of two numbers.
     *
     * @param o the other number
     * @return min(this, o)
     */
    public Ball min(Ball o) {
        boolean first = hi < o.hi || (hi == o.hi && lo <= o.lo);
        // the minimum moves by no more than the larger of the two moves
        return new Ball(first ? hi : o.hi, first ? lo : o.lo, Math.max(radius, o.radius));
    }

    /**
     * Returns the ends of this ball, rounded outward to doubles.
     *
     * @return an enclosure of the number
     */
    public Enclosure toEnclosure() {
        Enclosure tail = radius == 0 ? Enclosure.exact(lo) : Enclosure.exact(lo).widen(radius);
        return Enclosure.exact(hi).plus(tail);
    }
}
