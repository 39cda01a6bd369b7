package org.minorant.core.pair;

import org.minorant.core.EnclosedMatrix;
import org.minorant.core.PositiveFactor;

/**
 * A factor on the scale of one: the operator is 2^power times what columns and errors describe, and the largest entry of the columns is near one. On any other
 * scale the weights, the inner products and the squares of these would leave the range of doubles at different times.
 *
 * @param columns X · 2^(−power/2)
 * @param relativeError η of the factor
 * @param traceError ν of the factor in units of 2^power
 * @param power an even number
 */
record UnitFactor(EnclosedMatrix columns, double relativeError, double traceError, int power) {

    static UnitFactor of(PositiveFactor f) {
        EnclosedMatrix x = f.columns();
        int e = exponent(x);
        EnclosedMatrix unit = scale(x, -e);
        double lost = 0;
        for (int i = 0; i < x.rows(); i++) {
            for (int j = 0; j < x.columns(); j++) {
                lost += unit.radius(i, j);
            }
        }
        // ‖(X+E)(X+E)* − XX*‖₁ ≤ 2‖X‖_F‖E‖_F + ‖E‖_F², and ‖E‖_F is 0 or far below one
        double trace = Math.scalb(f.traceError(), -2 * e);
        double error = (trace + 3 * lost * unit.frobeniusUpper()) * (1 + 0x1p-50);
        boolean exact = lost == 0 && Math.scalb(trace, 2 * e) == f.traceError();
        return new UnitFactor(unit.midpoint(), f.relativeError(), exact ? trace : error + Double.MIN_VALUE, 2 * e);
    }

    /** The exponent of the largest entry, 0 if all are zero. */
    static int exponent(EnclosedMatrix m) {
        double largest = 0;
        for (int i = 0; i < m.rows(); i++) {
            for (int j = 0; j < m.columns(); j++) {
                largest = Math.max(largest, Math.max(Math.abs(m.re(i, j)), Math.abs(m.im(i, j))));
            }
        }
        return largest == 0 ? 0 : Math.getExponent(largest);
    }

    /** m · 2^e; a radius appears only where gradual underflow loses something. */
    static EnclosedMatrix scale(EnclosedMatrix m, int e) {
        if (e == 0) {
            return m;
        }
        EnclosedMatrix.Builder b = EnclosedMatrix.builder(m.rows(), m.columns());
        for (int i = 0; i < m.rows(); i++) {
            for (int j = 0; j < m.columns(); j++) {
                boolean exact = survives(m.re(i, j), e)
                        && survives(m.reTail(i, j), e)
                        && survives(m.im(i, j), e)
                        && survives(m.imTail(i, j), e)
                        && survives(m.radius(i, j), e);
                b.set(
                        i,
                        j,
                        Math.scalb(m.re(i, j), e),
                        Math.scalb(m.reTail(i, j), e),
                        Math.scalb(m.im(i, j), e),
                        Math.scalb(m.imTail(i, j), e),
                        Math.scalb(m.radius(i, j), e) + (exact ? 0 : 0x1p-1070));
            }
        }
        return b.build();
    }

    private static boolean survives(double v, int e) {
        return Math.scalb(Math.scalb(v, e), -e) == v;
    }
}
