package org.minorant.bounds;

import org.apache.commons.numbers.gamma.InverseErfc;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;
import org.minorant.core.InvalidInputException;
import org.minorant.measurement.HypothesisPair;

/**
 * The second-order expansion of the hypothesis-testing divergence of n copies,
 *
 * <pre>D_H^ε(ρ^⊗n‖σ^⊗n) = n D + √(nV) Φ⁻¹(ε) + O(ln n),</pre>
 *
 * with Φ the standard normal distribution function. D and V are certified. The rest is not known and can be either sign: {@link #nats()} is an approximation of which nothing
 * is promised at any n, and no bound.
 *
 * <p>Source: M. Tomamichel, M. Hayashi, IEEE Trans. Inf. Theory 59, 7693 (2013); K. Li, Ann. Statist. 42, 171 (2014) (from memory).
 *
 * @param copies n
 * @param level ε
 * @param relativeEntropy D(ρ‖σ) of one copy
 * @param variance V(ρ‖σ) of one copy, in nats²
 */
public record SecondOrder(int copies, double level, Information relativeEntropy, Enclosure variance) {

    /**
     * Checks the level.
     *
     * @param copies n
     * @param level ε
     * @param relativeEntropy D(ρ‖σ) of one copy
     * @param variance V(ρ‖σ) of one copy
     * @throws InvalidInputException if the level is not strictly between 0 and 1
     */
    public SecondOrder {
        Checks.inRange("SecondOrder", "the type-I level", level, Double.MIN_VALUE, Math.nextDown(1.0));
    }

    /**
     * Returns the expansion for a pair of copies.
     *
     * @param pair n copies of a pair of two states
     * @param level ε, strictly between 0 and 1
     * @return the expansion
     * @throws InvalidInputException if the level is out of range or the pair has no states
     */
    public static SecondOrder of(HypothesisPair pair, double level) {
        HypothesisPair one = pair.single();
        return new SecondOrder(
                pair.copyCount(),
                level,
                Divergences.relativeEntropy(one.first(), one.second()),
                Divergences.relativeEntropyVariance(one.first(), one.second()));
    }

    /**
     * Returns n D + √(nV) Φ⁻¹(ε).
     *
     * @return the approximation of D_H^ε in nats; +∞ where D is
     */
    public double nats() {
        double d = relativeEntropy.nats().midpoint();
        double v = variance.midpoint();
        if (!(d < Double.POSITIVE_INFINITY && v < Double.POSITIVE_INFINITY)) {
            return Double.POSITIVE_INFINITY;
        }
        return copies * d + Math.sqrt(copies * v) * quantile();
    }

    /**
     * Returns the approximation in bits.
     *
     * @return {@link #nats()} / ln 2
     */
    public double bits() {
        return nats() / Math.log(2);
    }

    /** Φ⁻¹(ε). */
    private double quantile() {
        return -Math.sqrt(2) * InverseErfc.value(2 * level);
    }
}
