package org.minorant.measurement;

import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;

/** Encloses x ln(x/q) for probabilities that may be zero. */
final class LogarithmicTerm {

    private LogarithmicTerm() {}

    /**
     * x ln(x/q) for q = rc/τ, a product of the sums r ≥ x of a row and c ≥ x of a column divided by the total.
     *
     * <p>Where x is surely positive the factors are multiplied. Where x may be zero, x ↦ x ln(x/q) falls from 0 to −q/e at x = q/e and rises from
     * there: over [0, u] its minimum is −q/e unless u is surely below q/e. From c ≥ x follows x/q ≤ τ/r, so that the maximum is at most u ln(τ/r),
     * also where q may be zero.
     */
    static Enclosure of(Enclosure x, Enclosure row, Enclosure column, Enclosure total) {
        Enclosure q = row.times(column).dividedBy(total);
        if (x.lowerWide().signum() > 0) {
            return x.times(x.ln().minus(q.ln()));
        }
        Enclosure u = Enclosure.of(x.upperWide(), x.upperWide());
        if (u.equals(Enclosure.ZERO)) {
            return u;
        }
        Enclosure bottom = q.times(Enclosure.ONE.negate().exp()).negate();
        WideDouble least = bottom.lowerWide();
        if (u.isCertainlyBelow(bottom.negate())) {
            least = u.times(u.ln().minus(q.ln())).lowerWide();
        }
        Enclosure most = u.times(total.ln().minus(row.ln()));
        return Enclosure.of(least, most.upperWide().max(WideDouble.ZERO));
    }
}
