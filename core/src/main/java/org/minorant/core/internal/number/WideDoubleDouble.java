package org.minorant.core.internal.number;

/**
 * A positive number m · 2^e with a double-double significand, 1 ≤ m &lt; 2, or zero: for powers and multiplicities that leave the range of double.
 *
 * <p>A product has relative error at most 2^-102 (see {@link DoubleDouble}), a power of n at most n · 2^-101: each squaring doubles the error and adds its own.
 *
 * @param significand m, zero for zero
 * @param exponent e
 */
public record WideDoubleDouble(DoubleDouble significand, long exponent) {

    /** Zero. */
    public static final WideDoubleDouble ZERO = new WideDoubleDouble(DoubleDouble.ZERO, 0);

    /** One. */
    public static final WideDoubleDouble ONE = new WideDoubleDouble(DoubleDouble.ONE, 0);

    /** A double-double in its normal range, as it is. */
    public static WideDoubleDouble of(DoubleDouble a) {
        return of(a, 0);
    }

    /** a · 2^e. */
    public static WideDoubleDouble of(DoubleDouble a, long e) {
        if (a.hi() == 0) {
            return ZERO;
        }
        int shift = Math.getExponent(a.hi());
        return new WideDoubleDouble(
                new DoubleDouble(Math.scalb(a.hi(), -shift), Math.scalb(a.lo(), -shift)), e + shift);
    }

    /** The product. */
    public WideDoubleDouble times(WideDoubleDouble o) {
        return of(significand.times(o.significand), exponent + o.exponent);
    }

    /** The product with a double in its normal range. */
    public WideDoubleDouble times(double o) {
        return of(significand.times(o), exponent);
    }

    /** The quotient by a double in its normal range. */
    public WideDoubleDouble dividedBy(double o) {
        return of(significand.dividedBy(DoubleDouble.of(o)), exponent);
    }

    /** The square root, with half the relative error and 2^-102 more. */
    public WideDoubleDouble sqrt() {
        long half = Math.floorDiv(exponent, 2L);
        return of(significand.times(exponent - 2 * half == 1 ? 2 : 1).sqrt(), half);
    }

    /** The n-th power, n ≥ 0. */
    public WideDoubleDouble power(int n) {
        WideDoubleDouble result = ONE;
        WideDoubleDouble square = this;
        for (int k = n; k > 0; k >>= 1) {
            if ((k & 1) == 1) {
                result = result.times(square);
            }
            square = square.times(square);
        }
        return result;
    }

    /** The number as a double-double times 2^-shift; what falls below the range becomes zero. */
    public DoubleDouble toDoubleDouble(long shift) {
        long e = exponent - shift;
        if (significand.hi() == 0 || e < -1000) {
            return DoubleDouble.ZERO;
        }
        int s = (int) Math.min(e, 1100);
        return new DoubleDouble(Math.scalb(significand.hi(), s), Math.scalb(significand.lo(), s));
    }

    /** Base-two logarithm, to about 1e-15 absolutely; −∞ for zero. */
    public double log2() {
        return exponent + Math.log(significand.hi()) / Math.log(2);
    }
}
