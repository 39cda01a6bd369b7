package org.minorant.core;

import org.minorant.core.internal.number.DoubleDouble;

/** Tells where a product of numbers of about 32 digits loses nothing: columns that keep their direction keep relative accuracy. */
final class ExactProduct {

    /** Products of doubles above this are exact sums of two doubles. */
    private static final double SAFE = 0x1p-900;

    private ExactProduct() {}

    /** Whether a · b is exact in double-double: one of them vanishes or is a power of two, or both are plain doubles. */
    static boolean isExact(DoubleDouble a, DoubleDouble b) {
        if (a.hi() == 0 || b.hi() == 0) {
            return true;
        }
        if (isPowerOfTwo(a)) {
            return survives(b, Math.getExponent(a.hi()));
        }
        if (isPowerOfTwo(b)) {
            return survives(a, Math.getExponent(b.hi()));
        }
        return a.lo() == 0 && b.lo() == 0 && Math.abs(a.hi() * b.hi()) >= SAFE;
    }

    private static boolean isPowerOfTwo(DoubleDouble a) {
        double m = Math.abs(a.hi());
        return a.lo() == 0 && m >= Double.MIN_NORMAL && Math.scalb(1.0, Math.getExponent(m)) == m;
    }

    /** Whether scaling by 2^k loses nothing. */
    static boolean survives(DoubleDouble x, int k) {
        return survives(x.hi(), k) && survives(x.lo(), k);
    }

    private static boolean survives(double v, int k) {
        return Math.scalb(Math.scalb(v, k), -k) == v;
    }
}
