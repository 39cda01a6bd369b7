package org.minorant.core.state;

import org.minorant.core.internal.number.DoubleDouble;

/**
 * A complex number of about 31 digits with a wide exponent: (re + i·im) · 2^exponent with the larger part in [1, 2), or zero. Amplitudes of
 * bright light leave the range of a double long before they stop to matter.
 *
 * <p><b>Error.</b> A product or a sum is within 2^-101 of |z||w|, or of |z| + |w|, in modulus: each part is two products and a sum of {@link
 * DoubleDouble} (at most 8 · 2^-106 each). A term 2^-500 below the other of a sum is left out, which is smaller still.
 */
record WideComplex(DoubleDouble re, DoubleDouble im, long exponent) {

    static final WideComplex ZERO = new WideComplex(DoubleDouble.ZERO, DoubleDouble.ZERO, 0);

    static final WideComplex ONE = new WideComplex(DoubleDouble.ONE, DoubleDouble.ZERO, 0);

    private static final int NEGLIGIBLE = 500;

    static WideComplex of(DoubleDouble re, DoubleDouble im) {
        return normalised(re, im, 0);
    }

    static WideComplex of(DoubleDouble re) {
        return of(re, DoubleDouble.ZERO);
    }

    private static WideComplex normalised(DoubleDouble re, DoubleDouble im, long exponent) {
        double size = Math.max(Math.abs(re.hi()), Math.abs(im.hi()));
        if (size == 0) {
            return ZERO;
        }
        int e = Math.getExponent(size);
        return new WideComplex(scaled(re, -e), scaled(im, -e), exponent + e);
    }

    private static DoubleDouble scaled(DoubleDouble x, int e) {
        return new DoubleDouble(Math.scalb(x.hi(), e), Math.scalb(x.lo(), e));
    }

    boolean isZero() {
        return re.hi() == 0 && im.hi() == 0;
    }

    WideComplex times(WideComplex o) {
        if (im.hi() == 0 && o.im.hi() == 0) {
            return normalised(re.times(o.re), DoubleDouble.ZERO, exponent + o.exponent);
        }
        return normalised(
                re.times(o.re).minus(im.times(o.im)), re.times(o.im).plus(im.times(o.re)), exponent + o.exponent);
    }

    WideComplex plus(WideComplex o) {
        if (isZero() || o.isZero()) {
            return isZero() ? o : this;
        }
        if (o.exponent > exponent) {
            return o.plus(this);
        }
        long down = o.exponent - exponent;
        if (down < -NEGLIGIBLE) {
            return this;
        }
        return normalised(re.plus(scaled(o.re, (int) down)), im.plus(scaled(o.im, (int) down)), exponent);
    }

    WideComplex negate() {
        return new WideComplex(re.negate(), im.negate(), exponent);
    }

    WideComplex conjugate() {
        return new WideComplex(re, im.negate(), exponent);
    }

    WideComplex dividedBy(double divisor) {
        DoubleDouble d = DoubleDouble.of(divisor);
        return normalised(re.dividedBy(d), im.dividedBy(d), exponent);
    }

    /** The square of the modulus without its power of two, which is 2^(2 · exponent): in [1, 8), to double accuracy. */
    double squaredMantissa() {
        return re.hi() * re.hi() + im.hi() * im.hi();
    }

    /** The real part times 2^shift; underflow goes to zero. */
    DoubleDouble re(long shift) {
        return scaled(re, clip(exponent + shift));
    }

    /** The imaginary part times 2^shift; underflow goes to zero. */
    DoubleDouble im(long shift) {
        return scaled(im, clip(exponent + shift));
    }

    private static int clip(long e) {
        return (int) Math.max(-5000, Math.min(5000, e));
    }
}
