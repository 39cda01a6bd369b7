package org.minorant.core;

import java.math.BigDecimal;
import java.math.RoundingMode;

/**
 * A real number known to lie between two certified ends: lower ≤ x ≤ upper.
 *
 * <p><b>Promise.</b> Whoever returns an enclosure guarantees that the true value of the stated quantity, for the stated
 * (double) inputs, lies in [lower, upper]: truncation, stopping and rounding are inside. Arithmetic on enclosures rounds
 * outward and keeps the promise.
 *
 * <p><b>Range.</b> The ends are {@link WideDouble}s, so 1e-430 is as good as 1. An infinite end says that nothing is known
 * on that side, or that the quantity is infinite (both ends infinite).
 *
 * <p>Questions come in two forms: <em>certain</em> ({@link #isCertainlyBelow}) and <em>possible</em> ({@link
 * #isPossiblyBelow}). Immutable and thread-safe.
 */
public final class Enclosure {

    /** The number 0, exactly. */
    public static final Enclosure ZERO = new Enclosure(WideDouble.ZERO, WideDouble.ZERO);

    /** The number 1, exactly. */
    public static final Enclosure ONE = new Enclosure(WideDouble.ONE, WideDouble.ONE);

    private final WideDouble lower;
    private final WideDouble upper;

    private Enclosure(WideDouble lower, WideDouble upper) {
        this.lower = lower;
        this.upper = upper;
    }

    /**
     * Returns the enclosure with these ends.
     *
     * @param lower the lower end; may be −∞
     * @param upper the upper end, at least the lower; may be +∞
     * @return [lower, upper]
     * @throws InvalidInputException if an end is NaN or lower exceeds upper
     */
    public static Enclosure of(double lower, double upper) {
        return of(WideDouble.of(lower), WideDouble.of(upper));
    }

    /**
     * Returns the enclosure with these ends.
     *
     * @param lower the lower end; may be −∞
     * @param upper the upper end, at least the lower; may be +∞
     * @return [lower, upper]
     * @throws InvalidInputException if lower exceeds upper
     */
    public static Enclosure of(WideDouble lower, WideDouble upper) {
        if (lower.compareTo(upper) > 0) {
            throw new InvalidInputException(
                    "Enclosure.of",
                    "lower " + lower + " exceeds upper " + upper,
                    "lower at most upper",
                    "swap the ends");
        }
        return new Enclosure(lower, upper);
    }

    /**
     * Returns the enclosure of a number known exactly.
     *
     * @param value the number, not NaN
     * @return [value, value]
     * @throws InvalidInputException if the value is NaN
     */
    public static Enclosure exact(double value) {
        return of(value, value);
    }

    /**
     * Returns the enclosure of a positive number of which the natural logarithm is enclosed.
     *
     * @param lnLower the logarithm's lower end; −∞ for zero
     * @param lnUpper the logarithm's upper end
     * @return [e^lnLower, e^lnUpper], rounded outward
     * @throws InvalidInputException if an end is NaN, beyond 7e8 in magnitude, or the ends are out of order
     */
    public static Enclosure ofLogarithms(double lnLower, double lnUpper) {
        return of(WideDouble.expDown(lnLower), WideDouble.expUp(lnUpper));
    }

    /**
     * Returns the whole line, for a quantity of which nothing is known.
     *
     * @return [−∞, +∞]
     */
    public static Enclosure unknown() {
        return of(Double.NEGATIVE_INFINITY, Double.POSITIVE_INFINITY);
    }

    /**
     * Returns the enclosure of +∞, for a quantity that is infinite with certainty.
     *
     * @return [+∞, +∞]
     */
    public static Enclosure infinite() {
        return exact(Double.POSITIVE_INFINITY);
    }

    /**
     * Returns the lower end as a double, rounded down: 0 for a positive end below the smallest double.
     *
     * @return the lower end
     */
    public double lower() {
        return lower.toDoubleDown();
    }

    /**
     * Returns the upper end as a double, rounded up: {@link Double#MIN_VALUE} for a positive end below that.
     *
     * @return the upper end
     */
    public double upper() {
        return upper.toDoubleUp();
    }

    /**
     * Returns the lower end in full.
     *
     * @return the lower end
     */
    public WideDouble lowerWide() {
        return lower;
    }

    /**
     * Returns the upper end in full.
     *
     * @return the upper end
     */
    public WideDouble upperWide() {
        return upper;
    }

    /**
     * Returns a number not above the natural logarithm of the quantity.
     *
     * @return the logarithm of the lower end, rounded down; −∞ where that end is not positive
     */
    public double lnLower() {
        return lower.signum() <= 0 ? Double.NEGATIVE_INFINITY : lower.lnDown();
    }

    /**
     * Returns a number not below the natural logarithm of the quantity.
     *
     * @return the logarithm of the upper end, rounded up; −∞ where that end is not positive
     */
    public double lnUpper() {
        return upper.signum() <= 0 ? Double.NEGATIVE_INFINITY : upper.lnUp();
    }

    /**
     * Tells whether a number lies between the ends, both included.
     *
     * @param value the number; NaN is in no enclosure
     * @return whether lower ≤ value ≤ upper
     */
    public boolean contains(double value) {
        return !Double.isNaN(value) && contains(WideDouble.of(value));
    }

    /**
     * Tells whether a number lies between the ends, both included.
     *
     * @param value the number
     * @return whether lower ≤ value ≤ upper
     */
    public boolean contains(WideDouble value) {
        return lower.compareTo(value) <= 0 && value.compareTo(upper) <= 0;
    }

    /**
     * Tells whether a decimal number lies between the ends, decided exactly.
     *
     * @param value the number
     * @return whether lower ≤ value ≤ upper
     */
    public boolean contains(BigDecimal value) {
        boolean above =
                lower.isInfinite() ? lower.signum() < 0 : lower.toBigDecimal().compareTo(value) <= 0;
        boolean below = upper.isInfinite() ? upper.signum() > 0 : value.compareTo(upper.toBigDecimal()) <= 0;
        return above && below;
    }

    /**
     * Tells whether another enclosure lies within this one.
     *
     * @param other the other enclosure
     * @return whether both its ends lie between these
     */
    public boolean contains(Enclosure other) {
        return contains(other.lower) && contains(other.upper);
    }

    /**
     * Returns upper − lower, rounded up.
     *
     * @return the width; +∞ if an end is infinite
     */
    public double width() {
        return isFinite() ? upper.plusUp(lower.negate()).toDoubleUp() : Double.POSITIVE_INFINITY;
    }

    /**
     * Returns the width divided by the smallest magnitude the quantity can have, rounded up: the certified bound on the
     * relative error of any number in the enclosure. It is 0 for a number known exactly, and +∞ if the quantity may be 0
     * without being known exactly or an end is infinite.
     *
     * @return (upper − lower) / min(|lower|, |upper|)
     */
    public double relativeWidth() {
        if (!isFinite()) {
            return Double.POSITIVE_INFINITY;
        }
        WideDouble w = upper.plusUp(lower.negate());
        if (w.signum() == 0) {
            return 0.0;
        }
        if (lower.signum() * upper.signum() <= 0) {
            return Double.POSITIVE_INFINITY;
        }
        WideDouble least = lower.signum() > 0 ? lower : upper.negate();
        return w.dividedByUp(least).toDoubleUp();
    }

    /**
     * Returns a double near the middle: the nearest representation of the number to pass on where one number is wanted. It
     * lies within {@link #width()} of the true value.
     *
     * @return ½(lower + upper), rounded; an infinite end if one is infinite
     */
    public double midpoint() {
        double l = lower.toDoubleDown();
        double u = upper.toDoubleUp();
        // halves first: the difference of the ends may overflow
        double m = Double.isInfinite(l) ? (l == -u ? 0 : l) : Double.isInfinite(u) ? u : 0.5 * l + 0.5 * u;
        // halves of subnormal ends are rounded
        return Math.min(Math.max(m, l), u);
    }

    /**
     * Tells whether both ends are finite.
     *
     * @return whether the quantity is known to be finite
     */
    public boolean isFinite() {
        return !lower.isInfinite() && !upper.isInfinite();
    }

    /**
     * Tells whether the quantity is known to be +∞.
     *
     * @return whether both ends are +∞
     */
    public boolean isInfinite() {
        return lower.isInfinite() && lower.signum() > 0;
    }

    /**
     * Tells whether this quantity is at most the other with certainty.
     *
     * @param other the other quantity
     * @return whether this upper end is at most the other's lower end
     */
    public boolean isCertainlyBelow(Enclosure other) {
        return upper.compareTo(other.lower) <= 0;
    }

    /**
     * Tells whether this quantity may be at most the other.
     *
     * @param other the other quantity
     * @return whether this lower end is at most the other's upper end
     */
    public boolean isPossiblyBelow(Enclosure other) {
        return lower.compareTo(other.upper) <= 0;
    }

    /**
     * Returns an enclosure of the sum.
     *
     * @param other the other term
     * @return this + other
     */
    public Enclosure plus(Enclosure other) {
        return new Enclosure(lower.plusDown(other.lower), upper.plusUp(other.upper));
    }

    /**
     * Returns an enclosure of the difference.
     *
     * @param other the term to subtract
     * @return this − other
     */
    public Enclosure minus(Enclosure other) {
        return plus(other.negate());
    }

    /**
     * Returns the enclosure of the negative, exactly.
     *
     * @return −this
     */
    public Enclosure negate() {
        return new Enclosure(upper.negate(), lower.negate());
    }

    /**
     * Returns an enclosure of 1 − this: the complementary probability.
     *
     * @return 1 − this
     */
    public Enclosure complement() {
        return ONE.minus(this);
    }

    /**
     * Returns an enclosure of the product; zero times infinity counts as zero.
     *
     * @param other the other factor
     * @return this · other
     */
    public Enclosure times(Enclosure other) {
        WideDouble[] a = {lower, lower, upper, upper};
        WideDouble[] b = {other.lower, other.upper, other.lower, other.upper};
        WideDouble least = a[0].timesDown(b[0]);
        WideDouble most = a[0].timesUp(b[0]);
        for (int i = 1; i < 4; i++) {
            least = least.min(a[i].timesDown(b[i]));
            most = most.max(a[i].timesUp(b[i]));
        }
        return new Enclosure(least, most);
    }

    /**
     * Returns an enclosure of the product with an exact number.
     *
     * @param factor the factor
     * @return this · factor
     */
    public Enclosure times(double factor) {
        return times(exact(factor));
    }

    /**
     * Returns an enclosure of the quotient; the whole line if the divisor may be zero.
     *
     * @param other the divisor
     * @return this / other
     */
    public Enclosure dividedBy(Enclosure other) {
        if (other.lower.signum() <= 0 && other.upper.signum() >= 0) {
            return unknown();
        }
        WideDouble[] a = {lower, lower, upper, upper};
        WideDouble[] b = {other.lower, other.upper, other.lower, other.upper};
        WideDouble least = a[0].dividedByDown(b[0]);
        WideDouble most = a[0].dividedByUp(b[0]);
        for (int i = 1; i < 4; i++) {
            least = least.min(a[i].dividedByDown(b[i]));
            most = most.max(a[i].dividedByUp(b[i]));
        }
        return new Enclosure(least, most);
    }

    /**
     * Returns an enclosure of the square, never negative.
     *
     * @return this²
     */
    public Enclosure square() {
        Enclosure s = times(this);
        return lower.signum() * upper.signum() < 0 ? new Enclosure(WideDouble.ZERO, s.upper) : s;
    }

    /**
     * Returns an enclosure of a power, by repeated squaring; a relative width w becomes about nw.
     *
     * @param n the exponent, at least 0
     * @return this^n, 1 for n = 0
     * @throws InvalidInputException if n is negative
     */
    public Enclosure power(int n) {
        if (n < 0) {
            throw new InvalidInputException(
                    "Enclosure.power", "the exponent is " + n, "at least 0", "divide one by the positive power");
        }
        Enclosure result = ONE;
        Enclosure square = this;
        for (int k = n; k > 0; k >>= 1) {
            result = (k & 1) == 1 ? result.times(square) : result;
            square = k > 1 ? square.square() : square;
        }
        return result;
    }

    /**
     * Returns an enclosure of the square root. A negative lower end counts as 0, for quantities known not to be negative.
     *
     * @return √this
     * @throws InvalidInputException if the upper end is negative
     */
    public Enclosure sqrt() {
        return new Enclosure(lower.max(WideDouble.ZERO).sqrtDown(), upper.sqrtUp());
    }

    /**
     * Returns an enclosure of the natural logarithm, −∞ where an end is not positive.
     *
     * @return ln(this)
     */
    public Enclosure ln() {
        return of(
                lower.signum() > 0 && lower.isInfinite() ? Double.POSITIVE_INFINITY : lnLower(),
                upper.isInfinite() ? Double.POSITIVE_INFINITY : lnUpper());
    }

    /**
     * Returns an enclosure of the exponential.
     *
     * @return e^this
     * @throws InvalidInputException if a finite end exceeds 7e8 in magnitude
     */
    public Enclosure exp() {
        return of(WideDouble.expDown(lower()), WideDouble.expUp(upper()));
    }

    /**
     * Returns an enclosure of the smaller of two quantities.
     *
     * @param other the other quantity
     * @return min(this, other)
     */
    public Enclosure min(Enclosure other) {
        return new Enclosure(lower.min(other.lower), upper.min(other.upper));
    }

    /**
     * Returns an enclosure of the larger of two quantities.
     *
     * @param other the other quantity
     * @return max(this, other)
     */
    public Enclosure max(Enclosure other) {
        return new Enclosure(lower.max(other.lower), upper.max(other.upper));
    }

    /**
     * Returns this enclosure cut to a range that the quantity is known to lie in.
     *
     * @param least the least value the quantity can have
     * @param most the largest value the quantity can have
     * @return the part of this enclosure in [least, most]
     */
    public Enclosure clip(double least, double most) {
        WideDouble l = WideDouble.of(least);
        WideDouble u = WideDouble.of(most);
        return new Enclosure(lower.max(l).min(u), upper.min(u).max(l));
    }

    /**
     * Returns the part that two enclosures of the same quantity share.
     *
     * @param other another enclosure of the same quantity
     * @return the intersection
     * @throws InvalidInputException if they are disjoint, which shows that one of them is wrong
     */
    public Enclosure intersect(Enclosure other) {
        return of(lower.max(other.lower), upper.min(other.upper));
    }

    /**
     * Returns the smallest enclosure that holds both.
     *
     * @param other the other enclosure
     * @return the convex hull
     */
    public Enclosure hull(Enclosure other) {
        return new Enclosure(lower.min(other.lower), upper.max(other.upper));
    }

    /**
     * Returns this enclosure widened on both sides by an absolute error.
     *
     * @param radius the error, at least 0
     * @return [lower − radius, upper + radius]
     * @throws InvalidInputException if the radius is negative or NaN
     */
    public Enclosure widen(double radius) {
        return plus(of(-radius, radius));
    }

    @Override
    public boolean equals(Object o) {
        return o instanceof Enclosure e && lower.equals(e.lower) && upper.equals(e.upper);
    }

    @Override
    public int hashCode() {
        return 31 * lower.hashCode() + upper.hashCode();
    }

    /**
     * Prints the certain digits only: the decimal digits that every number in the enclosure shares when rounded to them,
     * at most 17; where there is none, the two ends.
     */
    @Override
    public String toString() {
        return EnclosureText.certainDigits(lower, upper);
    }

    /**
     * Prints the two ends, rounded outward.
     *
     * @param digits significant digits, at least 1
     * @return the ends in brackets
     */
    public String toIntervalString(int digits) {
        return "[" + EnclosureText.end(lower, digits, RoundingMode.FLOOR) + ", "
                + EnclosureText.end(upper, digits, RoundingMode.CEILING) + "]";
    }
}
