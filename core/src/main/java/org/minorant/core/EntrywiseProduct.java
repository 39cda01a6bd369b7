package org.minorant.core;

import org.minorant.core.internal.number.DoubleDouble;

/** Products entry by entry of two enclosed matrices. */
final class EntrywiseProduct {

    /** Covers the relative rounding of a radius computed with a few operations. */
    private static final double UP = 1 + 0x1p-48;

    /** Two products and a sum for each part of an entry: 2 · 2^-102 of the moduli's product each, and √2 times that for both. */
    private static final double LOSS = 4 * DoubleDouble.EPS;

    private EntrywiseProduct() {}

    /** Radii: |ab − a'b'| ≤ |a|r_b + r_a(|b| + r_b), and the rounding. */
    static EnclosedMatrix of(EnclosedMatrix a, EnclosedMatrix b) {
        EnclosedMatrix.Builder c = EnclosedMatrix.builder(a.rows(), a.columns());
        boolean real = a.isReal() && b.isReal();
        for (int i = 0; i < a.rows(); i++) {
            for (int j = 0; j < a.columns(); j++) {
                double p = RadiusOfProduct.modulus(a.re(i, j), a.im(i, j));
                double q = RadiusOfProduct.modulus(b.re(i, j), b.im(i, j));
                boolean zero = p + a.radius(i, j) == 0 || q + b.radius(i, j) == 0;
                double r = LOSS * (p * q) + p * b.radius(i, j) + a.radius(i, j) * (q + b.radius(i, j));
                DoubleDouble ar = new DoubleDouble(a.re(i, j), a.reTail(i, j));
                DoubleDouble br = new DoubleDouble(b.re(i, j), b.reTail(i, j));
                DoubleDouble re = ar.times(br);
                DoubleDouble im = DoubleDouble.ZERO;
                if (!real) {
                    DoubleDouble ai = new DoubleDouble(a.im(i, j), a.imTail(i, j));
                    DoubleDouble bi = new DoubleDouble(b.im(i, j), b.imTail(i, j));
                    re = re.minus(ai.times(bi));
                    im = ar.times(bi).plus(ai.times(br));
                }
                // an exact zero stays one; anything else may lose what it had to gradual underflow
                c.set(i, j, re.hi(), re.lo(), im.hi(), im.lo(), zero ? 0 : r * UP + 0x1p-1060);
            }
        }
        return c.build();
    }
}
