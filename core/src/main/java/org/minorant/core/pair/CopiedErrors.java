package org.minorant.core.pair;

import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;
import org.minorant.core.internal.number.WideDoubleDouble;

/**
 * What the errors of one operator's data do to f at n copies.
 *
 * @param relative the relative error of A^⊗n in the Loewner order, which f inherits
 * @param absolute its error in trace norm, as a part of its trace
 */
record CopiedErrors(double relative, double absolute) {

    private static final double ROUNDING = 0x1p-51;

    static CopiedErrors of(QubitSpectra.Spectrum s, int n) {
        // eigenvalues to 2^-103, their powers to n·2^-101; (1+x)^n − 1 ≤ 1.1 n x for n x ≤ 0.1
        double each = s.relativeError() + 0x1p-99;
        double relative = n * each <= 0.1 ? 1.1 * n * each : 1;
        double total = s.large().hi() + s.small().hi();
        double share = total == 0 ? 0 : s.traceError() / total;
        double absolute = n * share <= 0.1 ? 1.2 * n * share : Double.POSITIVE_INFINITY;
        return new CopiedErrors(relative, absolute);
    }

    /** The trace of n copies. */
    static Enclosure trace(QubitSpectra.Spectrum s, int n) {
        WideDoubleDouble t = WideDoubleDouble.of(s.large().plus(s.small())).power(n);
        WideDouble w = WideDouble.of(t.significand().hi(), t.exponent());
        Enclosure power = Enclosure.of(w, w).times(Enclosure.of(1 - ROUNDING, 1 + ROUNDING));
        return of(s, n).apply(power, power).max(Enclosure.ZERO);
    }

    /** f with these errors, where the operator's trace, weighted as in f, is given. */
    Enclosure apply(Enclosure f, Enclosure weightedTrace) {
        Enclosure x = relative == 0 ? f : f.times(Enclosure.of(1 - relative, 1 + relative));
        if (absolute == 0) {
            return x;
        }
        Enclosure e = weightedTrace.times(absolute);
        return Enclosure.of(
                x.lowerWide().plusDown(e.upperWide().negate()), x.upperWide().plusUp(e.upperWide()));
    }
}
