package org.minorant.bounds;

import java.util.Optional;
import org.minorant.bounds.divergence.Petz;
import org.minorant.bounds.divergence.RelativeEntropy;
import org.minorant.bounds.divergence.StatePair;
import org.minorant.core.Enclosure;

/**
 * How far Petz–Rényi divergences near order one are from the relative entropy, which turns bounds in terms of them into
 *
 * <pre>n D − 4√2 ln η √(n ln(1/ε)) ≤ −ln β_ε ≤ n D + 4√2 ln η √(n ln(1/(1−ε))) + ln(1/(1−ε)),   η = 1 + e^(D_{3/2}/2) + e^(−D_{1/2}/2).</pre>
 *
 * <p><b>Argument.</b> Let Z = ln(a_i/b_j) under P_ij = |⟨u_i|v_j⟩|² a_i, the first Nussbaum–Szkoła distribution, so that E Z = D, ln E e^(uZ) = u D_{1+u}.
 *
 * <ol>
 *   <li>e^(uz) = 1 + uz + r_u(z) with r_u ≥ 0 and r_u + r_{−u} = 2cosh(uz) − 2, so r_u(z) ≤ 2cosh(uz) − 2 and, as ln(1 + x) ≤ x, u D_{1+u} ≤ uD + E(2cosh(uZ) − 2), for u of either sign.
 *   <li>With y = 1 + e^(z/2) + e^(−z/2) we have e^(|z|/2) ≤ y, so 2cosh(uz) − 2 ≤ g(y), g(y) = y^τ + y^(−τ) − 2, τ = 2|u|. Here y ≥ 3, and g is concave there for τ ≤ ½: g'' ≤ 0 means (1−τ) y^(2τ) ≥ 1 + τ, and at y = 3 the
 *       logarithm of the ratio, 2τ ln 3 − 2 artanh τ, is concave in τ and vanishes at 0 and ½. So by Jensen's inequality E g(Y) ≤ g(E Y) = g(η) = 2cosh(2u ln η) − 2 for |u| ≤ ¼.
 *   <li>2cosh x − 2 ≤ x² cosh x ≤ 2x² where cosh x ≤ 2. So with t = |u| ≤ ¼ and 2t ln η ≤ arcosh 2: D_{1+t} ≤ D + 8t (ln η)², D_{1−t} ≥ D − 8t (ln η)².
 *   <li>From {@link FiniteHoeffding}, without h, −ln β_ε ≥ n D_{1−t} − (1−t)/t ln(1/ε) ≥ nD − 8nt(ln η)² − ln(1/ε)/t. From monotonicity of D_α for 1 &lt; α ≤ 2, as in {@link SandwichedConverse}, −ln β_ε ≤ n D_{1+t} + (1+t)/t ln(1/(1−ε)) ≤ nD + 8nt(ln η)² +
 *       (1 + 1/t) ln(1/(1−ε)). With L the logarithm in question, t = √(L/(8n)) / ln η gives the two statements.
 * </ol>
 *
 * <p>So the hypotheses are t ≤ ¼ and 2t ln η ≤ arcosh 2 for that t, that is n large enough. They are checked; the constants hold in every case where they are.
 */
final class Stein {

    static final String SOURCE =
            "K. M. R. Audenaert, M. Mosonyi, F. Verstraete, J. Math. Phys. 53, 122205 (2012), theorem 3.3 (from memory; derived again)";

    /** arcosh 2 = 1.31695789..., rounded down. */
    private static final double ARCOSH_TWO = 1.3169578;

    private final Enclosure divergence;
    private final Enclosure lnEta;

    private Stein(Enclosure divergence, Enclosure lnEta) {
        this.divergence = divergence;
        this.lnEta = lnEta;
    }

    /** D and ln η; empty if they may be infinite. */
    static Optional<Stein> of(StatePair pair) {
        Enclosure d = RelativeEntropy.value(pair);
        Enclosure eta = Petz.value(pair, 1.5)
                .times(0.5)
                .exp()
                .plus(Petz.value(pair, 0.5).times(-0.5).exp())
                .plus(Enclosure.ONE);
        return d.isFinite() && eta.isFinite() ? Optional.of(new Stein(d, eta.ln())) : Optional.empty();
    }

    /** n D. */
    Enclosure first(int n) {
        return divergence.times(n);
    }

    /** 4√2 ln η √(nL) for L ≥ 0; empty if n is too small for the hypotheses. */
    Optional<Enclosure> second(int n, Enclosure logarithm) {
        Enclosure root = logarithm.max(Enclosure.ZERO).times(n).sqrt();
        double t = root.dividedBy(lnEta.times(n)).upper() / Math.sqrt(8) * (1 + 0x1p-50);
        return t <= 0.25 && 2 * t * lnEta.upper() <= ARCOSH_TWO
                ? Optional.of(root.times(lnEta).times(Enclosure.exact(32).sqrt()))
                : Optional.empty();
    }
}
