package org.minorant.core.pair;

import org.minorant.core.Enclosure;
import org.minorant.core.InvalidInputException;
import org.minorant.core.WideDouble;
import org.minorant.core.internal.number.Directed;

/**
 * Two operators diagonal in one basis: f(t) = Σ min(a_i, t b_i), every product and sum rounded outward, so that the relative width is at
 * most n · 2^-52 whatever the depth.
 */
final class CommutingPair extends PositivePair {

    /** Below this a sum may have lost digits to gradual underflow, and is redone with wide exponents. */
    private static final double SHALLOW = 0x1p-900;

    private final double[] a;
    private final double[] b;
    private final Enclosure traceA;
    private final Enclosure traceB;

    private CommutingPair(double[] a, double[] b) {
        this.a = a;
        this.b = b;
        this.traceA = sum(a);
        this.traceB = sum(b);
    }

    static CommutingPair of(double[] a, double[] b) {
        String asked = "PositivePair.ofSpectra";
        if (a.length == 0 || a.length != b.length) {
            throw new InvalidInputException(
                    asked,
                    "the lengths are " + a.length + " and " + b.length,
                    "equal and at least 1",
                    "give one eigenvalue of each operator per vector");
        }
        for (int i = 0; i < a.length; i++) {
            if (!(a[i] >= 0 && b[i] >= 0 && a[i] < Double.POSITIVE_INFINITY && b[i] < Double.POSITIVE_INFINITY)) {
                throw new InvalidInputException(
                        asked,
                        "eigenvalues " + i + " are " + a[i] + " and " + b[i],
                        "at least 0 and finite",
                        "check the spectra");
            }
        }
        return new CommutingPair(a.clone(), b.clone());
    }

    private static Enclosure sum(double[] x) {
        double lo = 0;
        double hi = 0;
        for (double v : x) {
            lo = Directed.addDown(lo, v);
            hi = Directed.addUp(hi, v);
        }
        return Enclosure.of(lo, hi);
    }

    @Override
    Enclosure value(WideDouble wa, WideDouble wb) {
        long shift = Math.max(wa.exponent(), wb.exponent());
        double x = wa.timesPowerOfTwo(-shift).toDoubleDown();
        double y = wb.timesPowerOfTwo(-shift).toDoubleDown();
        double lo = 0;
        double hi = 0;
        for (int i = 0; i < a.length; i++) {
            lo = Directed.addDown(lo, Math.min(Directed.mulDown(x, a[i]), Directed.mulDown(y, b[i])));
            hi = Directed.addUp(hi, Math.min(Directed.mulUp(x, a[i]), Directed.mulUp(y, b[i])));
        }
        if (lo > SHALLOW && Math.min(x, y) > 0x1p-1000) {
            return Enclosure.of(WideDouble.of(lo, shift), WideDouble.of(hi, shift));
        }
        return wideValue(wa, wb);
    }

    private Enclosure wideValue(WideDouble wa, WideDouble wb) {
        Enclosure s = Enclosure.ZERO;
        Enclosure x = Enclosure.of(wa, wa);
        Enclosure y = Enclosure.of(wb, wb);
        for (int i = 0; i < a.length; i++) {
            s = s.plus(x.times(a[i]).min(y.times(b[i])));
        }
        return s;
    }

    @Override
    PositivePair power(int n) {
        return CommutingCopies.of(a, b, n);
    }

    @Override
    public Enclosure firstTrace() {
        return traceA;
    }

    @Override
    public Enclosure secondTrace() {
        return traceB;
    }

    @Override
    public int dimension() {
        return a.length;
    }

    @Override
    public PairKind kind() {
        return PairKind.COMMUTING;
    }
}
