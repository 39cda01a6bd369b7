package org.minorant.bounds;

import org.minorant.bounds.divergence.Chernoff;
import org.minorant.bounds.divergence.Fidelity;
import org.minorant.bounds.divergence.Hoeffding;
import org.minorant.bounds.divergence.Petz;
import org.minorant.bounds.divergence.PetzCurve;
import org.minorant.bounds.divergence.RelativeEntropy;
import org.minorant.bounds.divergence.Sandwiched;
import org.minorant.bounds.divergence.StatePair;
import org.minorant.bounds.divergence.StrongConverse;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;
import org.minorant.core.InvalidInputException;
import org.minorant.measurement.HypothesisPair;

/**
 * Divergences of two states, certified.
 *
 * <p><b>Convention.</b> Order of arguments: D(ρ‖σ), ρ first. A state whose doubles sum to one only up to rounding stands for ρ/Tr ρ, so
 * that every
 * divergence is at least 0, vanishes for equal states and rises with its order, exactly. Logarithms are natural inside; {@link Information}
 * gives bits too.
 *
 * <p><b>Accuracy.</b> Each result encloses the true value for the stated doubles. For well-scaled states its relative width is a few 1e-16,
 * also for states
 * that nearly agree: spectra, overlaps and logarithms carry about thirty digits (see the classes of {@code org.minorant.bounds.divergence}
 * for
 * the arguments).
 *
 * <p><b>Special cases.</b> An infinite divergence is said: both ends are +∞ where that is certain. Whether the support of ρ lies in that of
 * σ is certain if
 * σ is known to be positive definite (on the basis vectors where it does not vanish), if both states were given by the same numbers, or if
 * a weight
 * outside is clearly positive. Where the numbers do not tell (a singular matrix given by rounded entries), the upper end is +∞ and the
 * lower end
 * still holds. Kets and factors keep their supports exactly.
 *
 * <p>All methods throw {@link InvalidInputException} if the dimensions differ. Thread-safe; same input, same result.
 */
public final class Divergences {

    private Divergences() {}

    private static StatePair pair(String asked, DensityOperator rho, DensityOperator sigma) {
        Checks.sameSpace("Divergences." + asked, rho, sigma);
        return StatePair.of(rho, sigma);
    }

    /**
     * Returns the relative entropy D(ρ‖σ) = Tr ρ(ln ρ − ln σ), +∞ unless supp ρ ⊆ supp σ.
     *
     * <p>Source: H. Umegaki, Kōdai Math. Sem. Rep. 14, 59 (1962) (from memory).
     *
     * @param rho the first state
     * @param sigma the second state
     * @return D(ρ‖σ)
     * @throws InvalidInputException if the dimensions differ
     */
    public static Information relativeEntropy(DensityOperator rho, DensityOperator sigma) {
        return Information.ofNats(RelativeEntropy.value(pair("relativeEntropy", rho, sigma)))
                .withSource("Umegaki 1962");
    }

    /**
     * Returns the relative entropy variance V(ρ‖σ) = Tr ρ(ln ρ − ln σ)² − D(ρ‖σ)², in nats² (divide by (ln 2)² for bits²), +∞ where D is.
     *
     * <p>Source: M. Tomamichel, M. Hayashi, IEEE Trans. Inf. Theory 59, 7693 (2013); K. Li, Ann. Statist. 42, 171 (2014) (from memory).
     *
     * @param rho the first state
     * @param sigma the second state
     * @return V(ρ‖σ) in nats²
     * @throws InvalidInputException if the dimensions differ
     */
    public static Enclosure relativeEntropyVariance(DensityOperator rho, DensityOperator sigma) {
        return RelativeEntropy.variance(pair("relativeEntropyVariance", rho, sigma));
    }

    /**
     * Returns the Petz–Rényi divergence D_α(ρ‖σ) = (α−1)^(−1) ln Tr ρ^α σ^(1−α). For α &lt; 1 it is +∞ only if the states are orthogonal;
     * for α &gt; 1 unless
     * supp ρ ⊆ supp σ. It obeys data processing for α ≤ 2.
     *
     * <p>Source: D. Petz, Rep. Math. Phys. 23, 57 (1986) (from memory).
     *
     * @param rho the first state
     * @param sigma the second state
     * @param alpha the order α, positive, finite, not 1 (that limit is {@link #relativeEntropy})
     * @return D_α(ρ‖σ)
     * @throws InvalidInputException if the dimensions differ or α is out of range
     */
    public static Information petzRenyi(DensityOperator rho, DensityOperator sigma, double alpha) {
        order("petzRenyi", alpha, Double.MIN_NORMAL, "minDivergence");
        return Information.ofNats(Petz.value(pair("petzRenyi", rho, sigma), alpha))
                .withSource("Petz 1986");
    }

    /**
     * Returns the sandwiched Rényi divergence D̃_α(ρ‖σ) = (α−1)^(−1) ln Tr (σ^((1−α)/2α) ρ σ^((1−α)/2α))^α. For α &lt; 1 it is +∞ only if
     * the states are
     * orthogonal; for α &gt; 1 unless supp ρ ⊆ supp σ. It obeys data processing for all these orders.
     *
     * <p>Source: M. Müller-Lennert, F. Dupuis, O. Szehr, S. Fehr, M. Tomamichel, J. Math. Phys. 54, 122203 (2013), definition 2; M. M.
     * Wilde, A. Winter,
     * D. Yang, Commun. Math. Phys. 331, 593 (2014) (from memory).
     *
     * @param rho the first state
     * @param sigma the second state
     * @param alpha the order α, at least ½, finite, not 1 (that limit is {@link #relativeEntropy})
     * @return D̃_α(ρ‖σ)
     * @throws InvalidInputException if the dimensions differ or α is out of range
     */
    public static Information sandwichedRenyi(DensityOperator rho, DensityOperator sigma, double alpha) {
        order("sandwichedRenyi", alpha, 0.5, "petzRenyi, which is defined for every positive order");
        return Information.ofNats(Sandwiched.value(pair("sandwichedRenyi", rho, sigma), alpha))
                .withSource("Müller-Lennert et al. 2013");
    }

    /**
     * Returns the max-divergence D_max(ρ‖σ) = ln min{x : ρ ≤ xσ}, the limit α → ∞ of {@link #sandwichedRenyi}; +∞ unless supp ρ ⊆ supp σ.
     *
     * <p>Source: N. Datta, IEEE Trans. Inf. Theory 55, 2816 (2009), definition 2 (from memory).
     *
     * @param rho the first state
     * @param sigma the second state
     * @return D_max(ρ‖σ)
     * @throws InvalidInputException if the dimensions differ
     */
    public static Information maxDivergence(DensityOperator rho, DensityOperator sigma) {
        return Information.ofNats(Sandwiched.maximal(pair("maxDivergence", rho, sigma)))
                .withSource("Datta 2009");
    }

    /**
     * Returns the min-divergence in the sense of Datta, D_min(ρ‖σ) = −ln Tr P_ρ σ with P_ρ the support projector of ρ, the limit α → 0 of
     * {@link
     * #petzRenyi}. (Some authors call −2 ln F by that name: that is {@link #sandwichedRenyi} at ½.) It is +∞ only if the states are
     * orthogonal.
     *
     * <p>Source: N. Datta, IEEE Trans. Inf. Theory 55, 2816 (2009), definition 1 (from memory).
     *
     * @param rho the first state
     * @param sigma the second state
     * @return D_min(ρ‖σ)
     * @throws InvalidInputException if the dimensions differ
     */
    public static Information minDivergence(DensityOperator rho, DensityOperator sigma) {
        return Information.ofNats(Petz.minimal(pair("minDivergence", rho, sigma)))
                .withSource("Datta 2009");
    }

    /**
     * Returns the fidelity F(ρ, σ) = ‖√ρ√σ‖₁ = Tr √(√ρ σ √ρ), not squared: |⟨ψ|φ⟩| for kets.
     *
     * <p>Source: A. Uhlmann, Rep. Math. Phys. 9, 273 (1976) (from memory), who squares it.
     *
     * @param rho the first state
     * @param sigma the second state
     * @return F, in [0, 1]
     * @throws InvalidInputException if the dimensions differ
     */
    public static Enclosure fidelity(DensityOperator rho, DensityOperator sigma) {
        return Fidelity.value(pair("fidelity", rho, sigma));
    }

    /**
     * Returns the Bures distance √(2 − 2F).
     *
     * <p>Source: D. Bures, Trans. Amer. Math. Soc. 135, 199 (1969) (from memory).
     *
     * @param rho the first state
     * @param sigma the second state
     * @return the distance, in [0, √2]
     * @throws InvalidInputException if the dimensions differ
     */
    public static Enclosure buresDistance(DensityOperator rho, DensityOperator sigma) {
        return Fidelity.buresDistance(pair("buresDistance", rho, sigma));
    }

    /**
     * Returns the Bures angle arccos F, in radians.
     *
     * @param rho the first state
     * @param sigma the second state
     * @return the angle, in [0, π/2]
     * @throws InvalidInputException if the dimensions differ
     */
    public static Enclosure buresAngle(DensityOperator rho, DensityOperator sigma) {
        return Fidelity.buresAngle(pair("buresAngle", rho, sigma));
    }

    /**
     * Returns the Chernoff divergence max over 0 ≤ s ≤ 1 of −ln Tr ρ^s σ^(1−s), the exponent of the least error probability of many copies;
     * +∞ only if the
     * states are orthogonal. Powers are taken on supports.
     *
     * <p>Source: K. M. R. Audenaert et al., Phys. Rev. Lett. 98, 160501 (2007), equation 1; M. Nussbaum, A. Szkoła, Ann. Statist. 37, 1040
     * (2009) (from memory).
     *
     * @param rho the first state
     * @param sigma the second state
     * @return the divergence and the maximising s
     * @throws InvalidInputException if the dimensions differ
     */
    public static ChernoffDivergence chernoff(DensityOperator rho, DensityOperator sigma) {
        StatePair pair = pair("chernoff", rho, sigma);
        if (pair.isSame()) {
            return new ChernoffDivergence(Information.ofNats(Enclosure.ZERO), 0.5, Enclosure.exact(0.5));
        }
        Chernoff c = Chernoff.of(PetzCurve.normalised(pair));
        Enclosure value = c.minimum().negate().clip(0, Double.POSITIVE_INFINITY);
        return new ChernoffDivergence(Information.ofNats(value).withSource("Audenaert et al. 2007"), c.s(), c.place());
    }

    /**
     * Returns the Hoeffding divergence
     *
     * <pre>H_r(ρ‖σ) = sup over 0 ≤ s &lt; 1 of (−sr − ln Tr ρ^(1−s) σ^s)/(1−s) = sup over 0 &lt; α &lt; 1 of ((α−1)/α)(r − D_α(ρ‖σ)),</pre>
     *
     * <p>the best exponent of type-I errors (ρ taken for σ) when type-II errors (σ taken for ρ) fall like e^(−nr). The rate has the same
     * meaning as in {@link
     * #strongConverse}, which takes over at r = D(ρ‖σ), where H_r reaches 0. H_r decreases with r; H_0 = D(σ‖ρ), and H_r is +∞ for r &lt;
     * −ln Tr P_ρ σ.
     *
     * <p>Source: M. Hayashi, Phys. Rev. A 76, 062301 (2007); H. Nagaoka, arXiv:quant-ph/0611289 (2006); K. M. R. Audenaert, M. Nussbaum, A.
     * Szkoła, F.
     * Verstraete, Commun. Math. Phys. 279, 251 (2008) (from memory).
     *
     * @param rho the first state
     * @param sigma the second state
     * @param rate r, at least 0 and finite
     * @return H_r(ρ‖σ)
     * @throws InvalidInputException if the dimensions differ or the rate is out of range
     */
    public static Information hoeffding(DensityOperator rho, DensityOperator sigma, Information rate) {
        Enclosure r = rate("hoeffding", rate);
        Checks.sameSpace("Divergences.hoeffding", rho, sigma);
        return Information.ofNats(Hoeffding.value(StatePair.of(sigma, rho), r))
                .withSource("Hayashi 2007, Nagaoka 2006");
    }

    /**
     * Returns the strong converse exponent H*_r(ρ‖σ) = sup over α &gt; 1 of ((α−1)/α)(r − D̃_α(ρ‖σ)): how fast the probability of a correct
     * type-I decision
     * vanishes when type-II errors fall like e^(−nr) with r &gt; D(ρ‖σ). It is 0 for r ≤ D, so also where D is infinite, and increases with
     * r.
     *
     * <p>Source: M. Mosonyi, T. Ogawa, Commun. Math. Phys. 334, 1617 (2015), theorem 4.10 (from memory).
     *
     * @param rho the first state
     * @param sigma the second state
     * @param rate r, at least 0 and finite
     * @return H*_r(ρ‖σ)
     * @throws InvalidInputException if the dimensions differ or the rate is out of range
     */
    public static Information strongConverse(DensityOperator rho, DensityOperator sigma, Information rate) {
        Enclosure r = rate("strongConverse", rate);
        return Information.ofNats(StrongConverse.value(pair("strongConverse", rho, sigma), r))
                .withSource("Mosonyi, Ogawa 2015");
    }

    /**
     * Returns the hypothesis-testing divergence D_H^ε(ρ‖σ) = −ln β_ε, with β_ε the least type-II error Tr σT of all tests 0 ≤ T ≤ 1 with
     * type-I error Tr ρ(1−T) at most ε.
     * Unlike the others it uses the states as given, see {@link HypothesisPair#typeTwoError}. It is +∞ where β_ε = 0, that is where a test
     * as good as ε never errs on σ.
     *
     * <p>Source: L. Wang, R. Renner, Phys. Rev. Lett. 108, 200501 (2012); F. Buscemi, N. Datta, IEEE Trans. Inf. Theory 56, 1447 (2010)
     * (from memory).
     *
     * @param rho the first state
     * @param sigma the second state
     * @param level ε, at least 0 and below 1
     * @return D_H^ε(ρ‖σ)
     * @throws InvalidInputException if the dimensions differ or the level is out of range
     */
    public static Information hypothesisTesting(DensityOperator rho, DensityOperator sigma, double level) {
        Checks.sameSpace("Divergences.hypothesisTesting", rho, sigma);
        Checks.inRange("Divergences.hypothesisTesting", "the type-I level", level, 0, Math.nextDown(1.0));
        return Information.ofNats(
                        HypothesisPair.of(rho, sigma).typeTwoError(level).ln().negate())
                .withSource("Wang, Renner 2012");
    }

    private static void order(String asked, double alpha, double least, String otherwise) {
        if (!(alpha >= least && alpha < Double.POSITIVE_INFINITY) || alpha == 1) {
            throw new InvalidInputException(
                    "Divergences." + asked,
                    "the order is " + alpha,
                    "at least " + least + ", finite and not 1",
                    alpha == 1
                            ? "use relativeEntropy, the limit"
                            : alpha > 1 ? "use maxDivergence, the limit of the sandwiched family" : "use " + otherwise);
        }
    }

    private static Enclosure rate(String asked, Information rate) {
        Enclosure r = rate.nats();
        if (!(r.lower() >= 0 && r.upper() < Double.POSITIVE_INFINITY)) {
            throw new InvalidInputException(
                    "Divergences." + asked,
                    "the rate is " + r.toIntervalString(6) + " nat",
                    "at least 0 and finite",
                    "give a rate in that range");
        }
        return r;
    }
}
