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
    /** Beyond this the remainder of the series needs its second term. */
    private static final double SECOND = 1e-13;

    private static final int REFINEMENTS = 8;

    /** Newton–Schulz steps of third order from a start, towards P*SP = 1. */
    static Inverse refine(EnclosedMatrix start, EnclosedMatrix s) {
        Inverse p = of(start, s);
        for (int i = 0; i < REFINEMENTS && p.size >= FINE && p.size < 0.9; i++) {
            EnclosedMatrix e = p.defect.midpoint();
            EnclosedMatrix step = EnclosedMatrix.identity(e.columns())
                    .minus(e.times(0.5))
                    .plus(e.times(e).times(0.375));
            p = of(p.root.times(step).midpoint(), s);
        }
        return p;
    }

    private static Inverse of(EnclosedMatrix root, EnclosedMatrix s) {
        EnclosedMatrix e = root.adjoint().times(s.times(root)).minus(EnclosedMatrix.identity(root.columns()));
        return new Inverse(root, e, e.frobeniusUpper());
    }

    /** Tr S⁻¹Φ = Tr (1 + E)⁻¹F for F = P*ΦP given; |Tr E^k F| ≤ ‖E‖_F^k ‖F‖_F bounds what is left of the series. */
    Enclosure traceOfInverse(EnclosedMatrix f) {
        double norm = f.frobeniusUpper() * (1 + 0x1p-40);
        EnclosedMatrix ef = defect.times(f);
        Enclosure first = f.traceRe().minus(ef.traceRe());
        if (size < SECOND) {
            return first.widen(size * size * norm / (1 - size) * (1 + 0x1p-40));
        }
        return first.plus(defect.times(ef).traceRe()).widen(Math.pow(size, 3) * norm / (1 - size) * (1 + 0x1p-40));
    }
}
