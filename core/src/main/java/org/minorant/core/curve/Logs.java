package org.minorant.core.curve;

import org.minorant.core.WideDouble;

/** Logarithmic steps between numbers of any size, roughly: for deciding where to look, not for ends. */
final class Logs {

    private Logs() {}

    /** ln(a/b) for positive numbers, with small relative error also where they nearly agree. */
    static double ratio(WideDouble a, WideDouble b) {
        double x = a.plusDown(b.negate()).dividedByDown(b).toDoubleDown();
        return Math.abs(x) < 0.5 ? Math.log1p(x) : a.dividedByDown(b).lnDown();
    }

    /** t·e^x. */
    static WideDouble moved(WideDouble t, double x) {
        return t.timesDown(Math.abs(x) < 0.5 ? WideDouble.of(1 + Math.expm1(x)) : WideDouble.expDown(x));
    }

    /** ln t for a positive number. */
    static double of(WideDouble t) {
        return t.lnDown();
    }
}
