package org.minorant.core.pair;

import org.minorant.core.EnclosedMatrix;
import org.minorant.core.Enclosure;

/**
 * The inverse of a matrix S near P^(−*)P⁻¹: S⁻¹ = P(1 + E)⁻¹P* with E = P*SP − 1 small.
 *
 * @param root P, exact
 * @param defect E
 * @param size a bound on the Frobenius norm of E
 */
record Inverse(EnclosedMatrix root, EnclosedMatrix defect, double size) {

    /** E this small needs no further step of refinement. */
    private static final double FINE = 1e-9;

    private static final int REFINEMENTS = 8;

    /** Newton–Schulz steps of third order from a start, towards P*SP = 1. */
    static Inverse refine(EnclosedMatrix start, EnclosedMatrix s) {
        Inverse p = of(start, s);
        for (int i = 0; i < REFINEMENTS && p.size >= FINE && p.size < 0.9; i++) {
            p = p.refined(s);
        }
        return p;
    }

    private static Inverse of(EnclosedMatrix root, EnclosedMatrix s) {
        EnclosedMatrix e = root.adjoint().times(s.times(root)).minus(EnclosedMatrix.identity(root.columns()));
        return new Inverse(root, e, e.frobeniusUpper());
    }

    /** One more step. */
    Inverse refined(EnclosedMatrix s) {
        EnclosedMatrix e = defect.midpoint();
        EnclosedMatrix step = EnclosedMatrix.identity(e.columns())
                .minus(e.times(0.5))
                .plus(e.times(e).times(0.375));
        return of(root.times(step).midpoint(), s);
    }

    /**
     * Tr S⁻¹Φ = Tr (1 + E)⁻¹F for F = P*ΦP given, by the first two terms of the series; the others add up to at most ‖E‖_F² ‖F‖_F/(1 − ‖E‖_F). F has entries far larger than its trace where weights are
     * steeply graded; E must be as much smaller.
     */
    Enclosure traceOfInverse(EnclosedMatrix f) {
        double rest = size * size * f.frobeniusUpper() / (1 - size) * (1 + 0x1p-40);
        return f.traceRe().minus(defect.times(f).traceRe()).widen(rest);
    }
}
