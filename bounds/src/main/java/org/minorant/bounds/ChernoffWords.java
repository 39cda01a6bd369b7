package org.minorant.bounds;

import org.minorant.core.Enclosure;

/**
 * Achievability in n uses of any channel by the Chernoff-type bound on f: for 0 &lt; s ≤ 1
 *
 * <pre>f(t) = Tr[A ∧ tB] ≤ t^s Tr A^(1−s) B^s,   A = ρ_XB^⊗n,  B = (ρ_X ⊗ ρ_B)^⊗n,</pre>
 *
 * so that some code of M messages has an average error of at most (M−1)^s Q_s^n, with Q_s = Σ P(x) Tr W_x^(1−s) ρ_B^s of one use: powers and traces of products are products.
 *
 * <p>Every s gives a bound; a search finds a good one, and the value at it is enclosed. ln of the error is convex in s, and ln(M−1) unimodal.
 */
final class ChernoffWords {

    static final Theorem THEOREM = new Theorem(
            "Chernoff-type bound on f(M-1), best s",
            "H.-C. Cheng, PRX Quantum 4, 040330 (2023), with K. M. R. Audenaert et al., Phys. Rev. Lett. 98, 160501 (2007) (from memory)");

    private static final double LEAST = Math.log(1e-8);

    private final LettersAgainst mixture;
    private final double[] p;
    private final int n;

    ChernoffWords(RenyiOutputs outputs, double[] p, int n) {
        this.mixture = outputs.againstMixture(p);
        this.p = p;
        this.n = n;
    }

    /** n ln Q_s. */
    private Enclosure lnPower(double s) {
        Enclosure sum = Enclosure.ZERO;
        for (int x = 0; x < p.length; x++) {
            if (p[x] > 0) {
                sum = sum.plus(mixture.psi(x, s).exp().times(p[x]));
            }
        }
        return sum.dividedBy(Traces.sum(p)).min(Enclosure.ONE).ln().times(n);
    }

    /** (ln ε − n ln Q_s)/s. */
    private Enclosure lnOthers(double epsilon, double s) {
        return Enclosure.exact(epsilon).ln().minus(lnPower(s)).dividedBy(Enclosure.exact(s));
    }

    /**
     * Finds M − 1 at which the bound is ε.
     *
     * @param epsilon the error allowed
     * @return M − 1, real
     */
    Enclosure others(double epsilon) {
        double s =
                Math.exp(Unimodal.minimiser(y -> -lnOthers(epsilon, Math.exp(y)).midpoint(), LEAST, 0));
        Enclosure inside = lnOthers(epsilon, s);
        Enclosure end = lnOthers(epsilon, 1);
        return (end.lower() > inside.lower() ? end : inside).exp();
    }

    /**
     * Bounds the average error.
     *
     * @param others M − 1
     * @return the bound; at most 1
     */
    Enclosure error(Enclosure others) {
        if (others.upperWide().signum() == 0) {
            return Enclosure.ZERO;
        }
        Enclosure ln = others.ln();
        double middle = ln.upper();
        double s = Unimodal.minimiser(t -> lnError(Enclosure.exact(middle), t).midpoint(), 0, 1);
        Enclosure inside = lnError(ln, s);
        Enclosure end = lnError(ln, 1);
        return (end.upper() < inside.upper() ? end : inside).exp().clip(0, 1);
    }

    private Enclosure lnError(Enclosure ln, double s) {
        return ln.times(s).plus(lnPower(s));
    }
}
