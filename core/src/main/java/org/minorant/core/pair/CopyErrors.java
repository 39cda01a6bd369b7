package org.minorant.core.pair;

import java.util.List;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;
import org.minorant.core.internal.number.DoubleDouble;
import org.minorant.core.internal.number.WideDoubleDouble;

/** What n copies make of the errors and the small parts of one. */
final class CopyErrors {

    private CopyErrors() {}

    /** An enclosure of (1 ± η)^n: 1 − nη ≤ (1 − η)^n and (1 + η)^n ≤ 1/(1 − nη). */
    static Enclosure relative(double eta, int n) {
        double e = n * eta * (1 + 0x1p-50);
        if (e == 0) {
            return Enclosure.ONE;
        }
        if (e < 0.5) {
            return Enclosure.of(Math.nextDown(1 - e), Math.nextUp(1 / (1 - e)));
        }
        return Enclosure.of(0, Double.POSITIVE_INFINITY);
    }

    /**
     * How much the traces that the factor's errors leave open can change f at n copies: n ν ((1 + η)a + 2ν)^(n−1), rounded up.
     *
     * <p>With X = XX* of trace a and (1 − η)X − N₁ ≤ A ≤ (1 + η)X + N₂: A^⊗n ≤ ((1 + η)X + N₂)^⊗n, and ((1 − η)X)^⊗n ≤ (A + N₁)^⊗n with Tr A ≤ (1 + η)a + ν; exchanging one factor after the other bounds
     * what N₁ and N₂ add to the traces.
     */
    static WideDouble trace(int n, Enclosure a, double nu, double eta) {
        if (nu == 0) {
            return WideDouble.ZERO;
        }
        return most(a, nu, eta)
                .power(n - 1)
                .upperWide()
                .timesUp(WideDouble.of(nu))
                .timesUp(WideDouble.of(n));
    }

    private static Enclosure most(Enclosure a, double nu, double eta) {
        return a.times(Math.nextUp(1 + eta)).plus(Enclosure.exact(2 * nu));
    }

    /**
     * One operator in a product of powers.
     *
     * @param trace the trace a of XX*
     * @param eta η
     * @param nu ν
     * @param n how many copies
     */
    record Factor(Enclosure trace, double eta, double nu, int n) {}

    /** f, known for the operators XX* of all factors, for those that they stand for; the weight is that on their product. */
    static Enclosure apply(Enclosure f, List<Factor> factors, WideDouble weight) {
        Enclosure x = f;
        WideDouble off = WideDouble.ZERO;
        for (int i = 0; i < factors.size(); i++) {
            Factor p = factors.get(i);
            x = x.times(relative(p.eta, p.n));
            WideDouble e = trace(p.n, p.trace, p.nu, p.eta);
            for (int j = 0; j < factors.size() && e.signum() > 0; j++) {
                Factor q = factors.get(j);
                e = j == i ? e : e.timesUp(most(q.trace, q.nu, q.eta).power(q.n).upperWide());
            }
            off = off.plusUp(e);
        }
        WideDouble e = off.timesUp(weight);
        return e.signum() == 0
                ? x
                : Enclosure.of(x.lowerWide().plusDown(e.negate()), x.upperWide().plusUp(e));
    }

    /** The trace of the product. */
    static Enclosure trace(List<Factor> factors) {
        Enclosure t = Enclosure.ONE;
        for (Factor p : factors) {
            t = t.times(p.trace.power(p.n));
        }
        return apply(t, factors, WideDouble.ONE).max(Enclosure.ZERO);
    }

    /**
     * The weight of ψ^⊗n in the kernel of B^⊗n: with r the kernel's share of the rest W, (W + rW)^n − W^n. For small nr by the binomial series up to the third term, the rest of which is below the next,
     * nr (nr)³/24, times e^(nr); otherwise as a difference in double-double.
     */
    static Enclosure kernel(SpectralMeasure m, int n) {
        Enclosure k = m.kernelEnclosure();
        if (k.upperWide().signum() == 0) {
            return Enclosure.ZERO;
        }
        WideDoubleDouble rest = WideDoubleDouble.ZERO;
        for (WideDoubleDouble w : m.weights()) {
            rest = Letters.sum(rest, w);
        }
        double error = n * (m.weightError() + m.totalError() + (m.weights().size() + 4) * DoubleDouble.EPS);
        Enclosure r = k.dividedBy(Letters.enclosure(rest, error / n));
        Enclosure nr = r.times(n);
        Enclosure w = Letters.enclosure(rest.power(n), error);
        if (nr.upperWide().compareTo(WideDouble.of(1e-4)) < 0) {
            Enclosure second = r.times((n - 1) / 2.0);
            Enclosure third = r.times(Math.max(0, n - 2)).dividedBy(Enclosure.exact(3));
            Enclosure series = Enclosure.ONE.plus(second.times(Enclosure.ONE.plus(third)));
            Enclosure tail = Enclosure.of(
                    WideDouble.ZERO,
                    nr.square().times(nr).dividedBy(Enclosure.exact(23)).upperWide());
            return w.times(nr).times(series.plus(tail));
        }
        WideDoubleDouble whole = m.total().power(n);
        long e = whole.exponent();
        DoubleDouble difference = whole.toDoubleDouble(e).minus(rest.power(n).toDoubleDouble(e));
        // the kernel's own error is one of the whole, of the rest or of what is unresolved
        double share =
                m.unresolved().dividedByUp(m.totalEnclosure().lowerWide()).toDoubleUp();
        double off = 4 * (error + n * share) + 0x1p-52 * difference.hi();
        return Enclosure.of(
                WideDouble.of(Math.max(0, difference.hi() - off), e),
                WideDouble.of(Math.max(0, difference.hi()) + off, e));
    }
}
