package org.minorant.bounds;

import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;
import org.minorant.core.curve.Curve;

/**
 * The older one-shot achievability bound, for comparison: M codewords drawn independently from P, decoded with square-root measurements of a
 * test T for each letter. By the operator inequality 1 − (S+R)^(−½) S (S+R)^(−½) ≤ (1+c)(1−S) + (2+c+1/c)R, for every c &gt; 0, the expected
 * average error is at most
 *
 * <pre>(1+c) Tr[ρ_XB (1−T)] + (2+c+1/c)(M−1) Tr[ρ_X ⊗ ρ_B T].</pre>
 *
 * <p>The least value over all tests is (1+c) f((M−1)(1+1/c)), as (2+c+1/c)/(1+c) = 1+1/c. With s = (M−1)(1+1/c) the bound reads
 *
 * <pre>inf over s &gt; M−1 of  s f(s)/(s−M+1),   and as a threshold   M−1 = sup over s &gt; 0 of  s(1 − f(s)/ε).</pre>
 *
 * <p>It is never better than f(M−1), as f is nondecreasing. The infimum and the supremum are enclosed by {@link ChordSearch}.
 */
final class HayashiNagaoka {

    static final Theorem THEOREM = new Theorem(
            "one-shot achievability by the Hayashi-Nagaoka inequality, best test and c",
            "M. Hayashi, H. Nagaoka, IEEE Trans. Inf. Theory 49, 1753 (2003), lemma 2 (from memory)");

    /** An error bound above this says nothing, and need not be known better. */
    private static final double CERTAIN = 1 - 1e-12;

    private HayashiNagaoka() {}

    /** The bound on the error with M − 1 other messages. */
    static Enclosure error(Curve f, Enclosure others) {
        Enclosure low = error(f, others.lowerWide());
        return others.lowerWide().equals(others.upperWide()) ? low : low.hull(error(f, others.upperWide()));
    }

    private static Enclosure error(Curve f, WideDouble others) {
        if (others.signum() == 0) {
            return Enclosure.ZERO;
        }
        // between f(M − 1) and 1 in any case
        Enclosure newer = f.at(others).clip(0, 1);
        return newer.lower() > CERTAIN
                ? newer.hull(Enclosure.ONE)
                : ChordSearch.leastError(f, others).clip(0, 1);
    }

    /**
     * The largest M − 1, real, at which the bound is at most ε.
     *
     * @param f the curve of the channel and its input
     * @param epsilon the error allowed
     * @param root the crossing of f with ε, which no threshold of this bound exceeds
     */
    static Enclosure others(Curve f, double epsilon, Enclosure root) {
        return root.upperWide().compareTo(WideDouble.ONE) < 0
                ? root
                : ChordSearch.largestThreshold(f, epsilon, root.upperWide());
    }
}
