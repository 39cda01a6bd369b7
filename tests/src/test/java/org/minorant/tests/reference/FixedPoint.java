package org.minorant.tests.reference;

import java.math.BigDecimal;
import java.math.BigInteger;

/**
 * Real numbers as integers times 2^-bits. Every operation is exact but for one truncation, at most 2^-bits; additions are exact and are
 * those of {@link BigInteger}.
 *
 * @param bits binary digits after the point
 */
record FixedPoint(int bits) {

    BigInteger one() {
        return BigInteger.ONE.shiftLeft(bits);
    }

    /** value · 2^-exponent, truncated. */
    BigInteger of(double value, int exponent) {
        if (value == 0) {
            return BigInteger.ZERO;
        }
        int e = Math.max(Math.getExponent(value), Double.MIN_EXPONENT) - 52;
        BigInteger m = BigInteger.valueOf((long) Math.scalb(value, -e));
        int shift = e - exponent + bits;
        return shift >= 0 ? m.shiftLeft(shift) : m.shiftRight(-shift);
    }

    /** value · 2^-exponent, truncated. */
    BigInteger of(BigDecimal value, int exponent) {
        int shift = bits - exponent;
        BigDecimal power = new BigDecimal(BigInteger.ONE.shiftLeft(Math.abs(shift)));
        return shift >= 0
                ? value.multiply(power).toBigInteger()
                : value.toBigInteger().shiftRight(-shift);
    }

    BigInteger times(BigInteger a, BigInteger b) {
        return a.multiply(b).shiftRight(bits);
    }

    BigInteger dividedBy(BigInteger a, BigInteger b) {
        return a.shiftLeft(bits).divide(b);
    }

    /** x · 2^exponent as a decimal, exactly. */
    BigDecimal toDecimal(BigInteger x, int exponent) {
        int e = exponent - bits;
        return e >= 0
                ? new BigDecimal(x.shiftLeft(e))
                : new BigDecimal(x.multiply(BigInteger.valueOf(5).pow(-e))).scaleByPowerOfTen(e);
    }
}
