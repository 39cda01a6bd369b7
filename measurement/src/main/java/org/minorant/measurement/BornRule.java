package org.minorant.measurement;

import org.minorant.core.EnclosedMatrix;
import org.minorant.core.Enclosure;
import org.minorant.core.PositiveFactor;
import org.minorant.core.PositiveOperator;

/**
 * Born's rule Tr AT for the operators meant, enclosed.
 *
 * <p><b>Argument.</b> A is given by its entries, up to a defect in trace norm that enters times ‖T‖, or by a factor with (1−η)XX* − N₁ ≤ A ≤ (1+η)XX* + N₂, Tr N ≤ ν. Let T be above −δ and
 * at most of norm 1 + δ, and v = Tr X*TX, τ = Tr XX*. Since T + δ ≥ 0, Tr A(T+δ) lies within η(v + δτ) + ν(1 + 2δ) of Tr XX*(T+δ), and Tr A
 * within ητ + ν of τ; together |Tr AT − v| ≤ η|v| + 2ηδτ + ν(1 + 3δ). Where T is defined by a factor YY*, v = ‖Y*X‖², δ = 0 and the errors
 * of that factor enter the same way, ν_T times Tr A. The v are computed with about 30 digits by {@link EnclosedMatrix}.
 */
final class BornRule {

    private static final double UP = 1 + 0x1p-48;

    /** Below this an enclosure of zero may come from the bound on underflow alone. */
    private static final double UNDERFLOW = 1e-290;

    /** Cutting off a negative part below this is not worth working out a factor for. */
    private static final double WORTH = 0x1p-54;

    private BornRule() {}

    static Enclosure probability(PositiveOperator a, Effect t) {
        double trace = a.traceEnclosure().upper();
        if (a.isDefinedByFactor()) {
            return byFactor(a, t, trace);
        }
        Enclosure p = byEntries(a, t, trace).widen(a.entryDefect() * (1 + t.negativity()) * UP);
        return a.entryDefect() > WORTH ? p.intersect(byFactor(a, t, trace)) : p;
    }

    private static Enclosure byFactor(PositiveOperator a, Effect t, double trace) {
        return t.factor().isPresent()
                ? bothFactors(a.factor(), t.factor().get(), trace)
                : stateFactor(a.factor(), t).widen(t.slack() * trace * UP);
    }

    /** Tr of the stored entries with T. */
    private static Enclosure byEntries(PositiveOperator a, Effect t, double trace) {
        EnclosedMatrix m = EnclosedMatrix.of(a);
        if (t.factor().isPresent()) {
            PositiveFactor y = t.factor().get();
            Enclosure v = conjugated(y.columns(), m);
            return v.widen(magnitude(v) * y.relativeError() * UP + y.traceError() * trace * UP);
        }
        Enclosure v = Inner.product(m, t.matrix()).enclosureRe(0, 0);
        return (isTiny(v) && isZero(m, t.matrix()) ? Enclosure.ZERO : v).widen(t.slack() * trace * UP);
    }

    private static Enclosure bothFactors(PositiveFactor x, PositiveFactor y, double trace) {
        EnclosedMatrix c = y.columns().adjoint().times(x.columns());
        Enclosure v = Inner.product(c, c).enclosureRe(0, 0).max(Enclosure.ZERO);
        if (isTiny(v) && overlapIsZero(x.columns(), y.columns())) {
            v = Enclosure.ZERO;
        }
        double relative = x.relativeError() + y.relativeError() + x.relativeError() * y.relativeError();
        // T ≤ 1 up to rounding, so that Tr N T ≤ (1 + 2^-10) Tr N
        double absolute = x.traceError() * (1 + 0x1p-10) + y.traceError() * trace * (1 + x.relativeError());
        return v.widen((v.upper() * relative + absolute) * UP).max(Enclosure.ZERO);
    }

    private static Enclosure stateFactor(PositiveFactor f, Effect t) {
        EnclosedMatrix x = f.columns();
        double eta = f.relativeError();
        double delta = t.negativity();
        Enclosure v = conjugated(x, t.matrix());
        if (f.traceError() == 0 && v.equals(Enclosure.ZERO)) {
            return v;
        }
        double size = Inner.product(x, x).enclosureRe(0, 0).upper();
        double error = eta * magnitude(v) + 2 * eta * delta * size + f.traceError() * (1 + 3 * delta);
        return v.widen(error * UP);
    }

    /** Tr Y*AY. */
    private static Enclosure conjugated(EnclosedMatrix y, EnclosedMatrix a) {
        Enclosure v = Inner.product(y, a.times(y)).enclosureRe(0, 0);
        return isTiny(v) && conjugationIsZero(y, a) ? Enclosure.ZERO : v;
    }

    private static double magnitude(Enclosure v) {
        return Math.max(Math.abs(v.lower()), Math.abs(v.upper()));
    }

    private static boolean isTiny(Enclosure v) {
        return magnitude(v) < UNDERFLOW;
    }

    /** Whether every product in Σ a_ij conj(b_ij) has a factor that is exactly zero. */
    private static boolean isZero(EnclosedMatrix a, EnclosedMatrix b) {
        for (int i = 0; i < a.rows(); i++) {
            for (int j = 0; j < a.columns(); j++) {
                if (isNonzero(a, i, j) && isNonzero(b, i, j)) {
                    return false;
                }
            }
        }
        return true;
    }

    /** Whether x and y share no row in which both have an entry. */
    private static boolean overlapIsZero(EnclosedMatrix x, EnclosedMatrix y) {
        for (int i = 0; i < x.rows(); i++) {
            if (rowIsNonzero(x, i) && rowIsNonzero(y, i)) {
                return false;
            }
        }
        return true;
    }

    /** Whether a vanishes exactly between all rows that x fills. */
    private static boolean conjugationIsZero(EnclosedMatrix x, EnclosedMatrix a) {
        for (int i = 0; i < a.rows(); i++) {
            for (int j = 0; j < a.columns(); j++) {
                if (isNonzero(a, i, j) && rowIsNonzero(x, i) && rowIsNonzero(x, j)) {
                    return false;
                }
            }
        }
        return true;
    }

    private static boolean rowIsNonzero(EnclosedMatrix x, int i) {
        for (int j = 0; j < x.columns(); j++) {
            if (isNonzero(x, i, j)) {
                return true;
            }
        }
        return false;
    }

    private static boolean isNonzero(EnclosedMatrix a, int i, int j) {
        return a.modulusUpper(i, j) > 0;
    }
}
