package org.minorant.core;

import java.math.BigDecimal;
import java.math.MathContext;
import java.math.RoundingMode;
import org.minorant.core.internal.number.Directed;

/**
 * A double with a wide exponent: significand · 2^exponent with 1 ≤ |significand| &lt; 2, or zero, or an infinity.
 *
 * <p><b>Why.</b> Error probabilities of many copies lie far below the smallest double (1e-430 is ordinary); differences of
 * their logarithms would cost digits that the significand keeps.
 *
 * <p><b>Accuracy.</b> Arithmetic comes in pairs, {@code …Down} and {@code …Up}, that return a value not above and not below
 * the exact result, at most one unit in the last place away from it. Logarithms and exponentials are within a few units
 * (they rest on {@link Math#log} and {@link Math#exp}, which are within one by specification) and are widened outward.
 *
 * <p>Immutable and thread-safe.
 */
public final class WideDouble implements Comparable<WideDouble> {

    /** Zero. */
    public static final WideDouble ZERO = new WideDouble(0.0, 0L);

    /** One. */
    public static final WideDouble ONE = new WideDouble(1.0, 0L);

    /** Positive infinity. */
    public static final WideDouble POSITIVE_INFINITY = new WideDouble(Double.POSITIVE_INFINITY, 0L);

    /** Negative infinity. */
    public static final WideDouble NEGATIVE_INFINITY = new WideDouble(Double.NEGATIVE_INFINITY, 0L);

    /** ln 2 in three pieces, the first two short enough that a product with an exponent below 2^30 is exact. */
    private static final double LN2_HEAD = 0x1.62e42p-1;

    private static final double LN2_MID = 0x1.fdf47p-22;
    private static final double LN2_TAIL = 0x1.ef35793c76730p-45;
    private static final long MAX_EXPONENT = 1L << 30;

    private final double significand;
    private final long exponent;

    private WideDouble(double significand, long exponent) {
        this.significand = significand;
        this.exponent = exponent;
    }

    /**
     * Returns the value of a double, exactly.
     *
     * @param value any double but NaN
     * @return the same value
     * @throws InvalidInputException if the value is NaN
     */
    public static WideDouble of(double value) {
        return of(value, 0L);
    }

    /**
     * Returns value · 2^exponent, exactly.
     *
     * @param value any double but NaN; it need not be normalised
     * @param exponent the power of two, at most 2^30 in magnitude
     * @return value · 2^exponent
     * @throws InvalidInputException if the value is NaN or the exponent is out of range
     */
    public static WideDouble of(double value, long exponent) {
        if (Double.isNaN(value)) {
            throw new InvalidInputException(
                    "WideDouble.of", "the value is NaN", "a number", "check the computation before it");
        }
        if (value == 0) {
            return ZERO;
        }
        if (Double.isInfinite(value)) {
            return value > 0 ? POSITIVE_INFINITY : NEGATIVE_INFINITY;
        }
        double v = value;
        long e = exponent;
        if (Math.abs(v) < Double.MIN_NORMAL) {
            v *= 0x1p60;
            e -= 60;
        }
        int k = Math.getExponent(v);
        e += k;
        if (Math.abs(e) > MAX_EXPONENT) {
            throw new InvalidInputException(
                    "WideDouble.of", "the exponent is " + e, "at most 2^30 in magnitude", "work with logarithms there");
        }
        return new WideDouble(Math.scalb(v, -k), e);
    }

    /**
     * Returns a value not above e^x.
     *
     * @param x the natural logarithm; may be infinite
     * @return a lower end of e^x
     */
    public static WideDouble expDown(double x) {
        return exp(x, -1);
    }

    /**
     * Returns a value not below e^x.
     *
     * @param x the natural logarithm; may be infinite
     * @return an upper end of e^x
     */
    public static WideDouble expUp(double x) {
        return exp(x, 1);
    }

    private static WideDouble exp(double x, int side) {
        if (x == Double.NEGATIVE_INFINITY || x == 0) {
            return x == 0 ? ONE : ZERO;
        }
        if (x == Double.POSITIVE_INFINITY) {
            return POSITIVE_INFINITY;
        }
        if (Double.isNaN(x) || Math.abs(x) > 7e8) {
            throw new InvalidInputException(
                    "WideDouble.exp", "the exponent is " + x, "at most 7e8 in magnitude", "rescale");
        }
        double k = Math.rint(x / (LN2_HEAD + LN2_MID));
        // x − k·LN2_HEAD and the next difference are exact or lose at most one unit of a number below one
        double r = ((x - k * LN2_HEAD) - k * LN2_MID) - k * LN2_TAIL;
        double m = Math.exp(r);
        double slack = 8 * Math.ulp(m);
        return of(side < 0 ? m - slack : m + slack, (long) k);
    }

    /**
     * Returns the significand, of magnitude in [1, 2), or zero or an infinity.
     *
     * @return the significand
     */
    public double significand() {
        return significand;
    }

    /**
     * Returns the exponent of two that goes with {@link #significand()}.
     *
     * @return the exponent
     */
    public long exponent() {
        return exponent;
    }

    /**
     * Returns the sign.
     *
     * @return −1, 0 or 1
     */
    public int signum() {
        return (int) Math.signum(significand);
    }

    /**
     * Tells whether the value is an infinity.
     *
     * @return whether it is infinite
     */
    public boolean isInfinite() {
        return Double.isInfinite(significand);
    }

    /**
     * Returns the largest double not above this value.
     *
     * @return the value rounded down
     */
    public double toDoubleDown() {
        if (significand == 0 || isInfinite()) {
            return significand;
        }
        if (exponent > Double.MAX_EXPONENT) {
            return significand > 0 ? Double.MAX_VALUE : Double.NEGATIVE_INFINITY;
        }
        if (exponent >= Double.MIN_EXPONENT) {
            return Math.scalb(significand, (int) exponent);
        }
        if (exponent < Double.MIN_EXPONENT - 60) {
            return significand > 0 ? 0.0 : -Double.MIN_VALUE;
        }
        double scaled = Math.scalb(significand, (int) exponent);
        return Math.scalb(scaled, (int) -exponent) > significand ? Math.nextDown(scaled) : scaled;
    }

    /**
     * Returns the smallest double not below this value.
     *
     * @return the value rounded up
     */
    public double toDoubleUp() {
        return -negate().toDoubleDown();
    }

    /**
     * Returns the negative of this value, exactly.
     *
     * @return −this
     */
    public WideDouble negate() {
        return significand == 0 ? this : new WideDouble(-significand, exponent);
    }

    /**
     * Returns this value times a power of two, exactly.
     *
     * @param power the power of two
     * @return this · 2^power
     */
    public WideDouble timesPowerOfTwo(long power) {
        return of(significand, exponent + power);
    }

    /**
     * Returns a value not above ln(this); −∞ for zero, NaN for a negative value.
     *
     * @return a lower end of the natural logarithm
     */
    public double lnDown() {
        double x = ln();
        return Double.isInfinite(x) || exactlyOne() ? x : x - lnSlack(x);
    }

    /**
     * Returns a value not below ln(this); −∞ for zero, NaN for a negative value.
     *
     * @return an upper end of the natural logarithm
     */
    public double lnUp() {
        double x = ln();
        return Double.isInfinite(x) || exactlyOne() ? x : x + lnSlack(x);
    }

    private boolean exactlyOne() {
        return significand == 1.0 && exponent == 0;
    }

    private static double lnSlack(double x) {
        return 4 * Math.ulp(x);
    }

    private double ln() {
        if (significand == 0 || isInfinite() || significand < 0) {
            return Math.log(significand);
        }
        double m = significand;
        long e = exponent;
        if (m > 1.4142135623730951) {
            m *= 0.5;
            e += 1;
        }
        return e * LN2_HEAD + (e * LN2_MID + (e * LN2_TAIL + Math.log(m)));
    }

    /**
     * Returns a value not above the sum; −∞ for the sum of opposite infinities, of which nothing is known.
     *
     * @param other the other term
     * @return a lower end of this + other
     */
    public WideDouble plusDown(WideDouble other) {
        if (isInfinite() && other.isInfinite() && signum() != other.signum()) {
            return NEGATIVE_INFINITY;
        }
        if (isInfinite() || other.significand == 0) {
            return this;
        }
        if (other.isInfinite() || significand == 0) {
            return other;
        }
        WideDouble big = exponent >= other.exponent ? this : other;
        WideDouble small = big == this ? other : this;
        long gap = big.exponent - small.exponent;
        if (gap > 900) {
            return small.significand > 0 ? big : of(Math.nextDown(big.significand), big.exponent);
        }
        return of(Directed.addDown(big.significand, Math.scalb(small.significand, (int) -gap)), big.exponent);
    }

    /**
     * Returns a value not below the sum; +∞ for the sum of opposite infinities.
     *
     * @param other the other term
     * @return an upper end of this + other
     */
    public WideDouble plusUp(WideDouble other) {
        return negate().plusDown(other.negate()).negate();
    }

    /**
     * Returns a value not above the product; zero times anything is zero.
     *
     * @param other the other factor
     * @return a lower end of this · other
     */
    public WideDouble timesDown(WideDouble other) {
        if (significand == 0 || other.significand == 0) {
            return ZERO;
        }
        return of(Directed.mulDown(significand, other.significand), exponent + other.exponent);
    }

    /**
     * Returns a value not below the product; zero times anything is zero.
     *
     * @param other the other factor
     * @return an upper end of this · other
     */
    public WideDouble timesUp(WideDouble other) {
        return negate().timesDown(other).negate();
    }

    /**
     * Returns a value not above the quotient. A finite number over an infinity is zero; of a quotient of infinities only the sign is known.
     *
     * @param other the divisor, not zero
     * @return a lower end of this / other
     * @throws InvalidInputException if the divisor is zero
     */
    public WideDouble dividedByDown(WideDouble other) {
        if (other.significand == 0) {
            throw new InvalidInputException(
                    "WideDouble.dividedBy", "the divisor is 0", "a number other than 0", "treat that case apart");
        }
        if (significand == 0) {
            return ZERO;
        }
        if (other.isInfinite()) {
            return isInfinite() && signum() != other.signum() ? NEGATIVE_INFINITY : ZERO;
        }
        return of(Directed.divDown(significand, other.significand), exponent - other.exponent);
    }

    /**
     * Returns a value not below the quotient.
     *
     * @param other the divisor, not zero
     * @return an upper end of this / other
     * @throws InvalidInputException if the divisor is zero
     */
    public WideDouble dividedByUp(WideDouble other) {
        return negate().dividedByDown(other).negate();
    }

    /**
     * Returns a value not above the square root.
     *
     * @return a lower end of the square root
     * @throws InvalidInputException if this value is negative
     */
    public WideDouble sqrtDown() {
        long e = evenExponent();
        return of(Directed.sqrtDown(significand * (1 << (exponent - e))), e / 2);
    }

    /**
     * Returns a value not below the square root.
     *
     * @return an upper end of the square root
     * @throws InvalidInputException if this value is negative
     */
    public WideDouble sqrtUp() {
        long e = evenExponent();
        return of(Directed.sqrtUp(significand * (1 << (exponent - e))), e / 2);
    }

    private long evenExponent() {
        if (significand < 0) {
            throw new InvalidInputException(
                    "WideDouble.sqrt", "the value is negative: " + this, "at least 0", "clip it first");
        }
        return Math.floorDiv(exponent, 2L) * 2;
    }

    /**
     * Returns the exact value in decimal. Exponents beyond a million are refused, as the digits would not fit.
     *
     * @return the exact value
     * @throws InvalidInputException if the value is infinite or the exponent exceeds a million
     */
    public BigDecimal toBigDecimal() {
        if (isInfinite() || Math.abs(exponent) > 1_000_000) {
            throw new InvalidInputException(
                    "WideDouble.toBigDecimal",
                    "the value is " + this,
                    "finite, exponent at most a million",
                    "use the logarithm");
        }
        BigDecimal m = new BigDecimal(significand);
        BigDecimal two = BigDecimal.valueOf(2);
        int e = (int) exponent;
        return e >= 0
                ? m.multiply(two.pow(e))
                : m.multiply(BigDecimal.valueOf(5).pow(-e)).scaleByPowerOfTen(e);
    }

    /**
     * Returns the value in decimal, rounded to a number of digits.
     *
     * @param digits the digits to keep, at least 1
     * @param mode the direction of rounding
     * @return the rounded value
     * @throws InvalidInputException if the value is infinite or the exponent exceeds a million
     */
    public BigDecimal toBigDecimal(int digits, RoundingMode mode) {
        return toBigDecimal().round(new MathContext(digits, mode));
    }

    @Override
    public int compareTo(WideDouble other) {
        int s = Integer.compare(signum(), other.signum());
        if (s != 0 || signum() == 0) {
            return s;
        }
        if (isInfinite() || other.isInfinite() || exponent == other.exponent) {
            return Double.compare(significand, other.significand);
        }
        return signum() * Long.compare(exponent, other.exponent);
    }

    /**
     * Returns the smaller of two values.
     *
     * @param other the other value
     * @return the smaller
     */
    public WideDouble min(WideDouble other) {
        return compareTo(other) <= 0 ? this : other;
    }

    /**
     * Returns the larger of two values.
     *
     * @param other the other value
     * @return the larger
     */
    public WideDouble max(WideDouble other) {
        return compareTo(other) >= 0 ? this : other;
    }

    @Override
    public boolean equals(Object o) {
        return o instanceof WideDouble w && compareTo(w) == 0;
    }

    @Override
    public int hashCode() {
        return Double.hashCode(significand + 0.0) * 31 + Long.hashCode(exponent);
    }

    /** Seventeen significant digits in scientific notation. */
    @Override
    public String toString() {
        if (significand == 0 || isInfinite() || Math.abs(exponent) <= 1000) {
            return Double.toString(Math.scalb(significand, (int) exponent));
        }
        if (Math.abs(exponent) > 1_000_000) {
            return significand + "*2^" + exponent;
        }
        return toBigDecimal(17, RoundingMode.HALF_EVEN).toString();
    }
}
