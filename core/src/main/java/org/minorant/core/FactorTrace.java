package org.minorant.core;

import org.minorant.core.internal.number.DoubleDouble;

/**
 * Tr XX* = Σ|x|² in double-double, scaled to order one.
 *
 * <p><b>Error.</b> All terms are positive. A square has relative error 2^-102, as has each partial sum, so that N entries cost at most (4N + 8) · 2^-102 relatively;
 * what underflows is below N · 2^-1000 of a sum that is at least one.
 */
final class FactorTrace {

    private FactorTrace() {}

    static Enclosure of(PositiveFactor f) {
        EnclosedMatrix x = f.columns();
        double most = 0;
        for (int i = 0; i < x.rows(); i++) {
            for (int j = 0; j < x.columns(); j++) {
                most = Math.max(most, Math.max(Math.abs(x.re(i, j)), Math.abs(x.im(i, j))));
            }
        }
        if (most == 0) {
            return Enclosure.of(0, f.traceError());
        }
        int e = Math.getExponent(most);
        DoubleDouble sum = DoubleDouble.ZERO;
        for (int i = 0; i < x.rows(); i++) {
            for (int j = 0; j < x.columns(); j++) {
                sum = sum.plus(square(x.re(i, j), x.reTail(i, j), e)).plus(square(x.im(i, j), x.imTail(i, j), e));
            }
        }
        double slack = (4.0 * x.rows() * x.columns() + 8) * 0x1p-101;
        Enclosure s = Enclosure.exact(sum.hi()).plus(Enclosure.exact(sum.lo()).widen(slack * sum.hi()));
        Enclosure trace = Enclosure.of(
                s.lowerWide().timesPowerOfTwo(2L * e), s.upperWide().timesPowerOfTwo(2L * e));
        double eta = f.relativeError();
        return trace.times(Enclosure.ONE.plus(Enclosure.of(-eta, eta)))
                .widen(f.traceError())
                .max(Enclosure.ZERO);
    }

    private static DoubleDouble square(double hi, double lo, int e) {
        DoubleDouble v = new DoubleDouble(Math.scalb(hi, -e), Math.scalb(lo, -e));
        return v.times(v);
    }
}
