package org.minorant.bounds;

import org.minorant.core.curve.Curve;

/**
 * The dependence-testing bound: some code of M messages has an average error of at most
 *
 * <pre>E[exp(−(i(X;Y) − ln((M−1)/2))⁺)] = Σ P(x) min(W(y|x), ½(M−1) Q(y)) = f((M−1)/2).</pre>
 *
 * <p>One codeword is tested after the other for its dependence on the output; a wrong one is tried before the right one in half of the cases.
 */
final class DependenceTesting {

    static final Theorem THEOREM = new Theorem(
            "dependence testing",
            "Y. Polyanskiy, H. V. Poor, S. Verdu, IEEE Trans. Inf. Theory 56, 2307 (2010), theorem 17 (number from memory)");

    private DependenceTesting() {}

    /** t ↦ f(t/2), exactly. */
    static Curve of(Curve f) {
        Curve values = t -> f.at(t.timesPowerOfTwo(-1));
        return f.guess()
                .map(g -> values.withGuess(ln -> g.lnValue(ln - Math.log(2))))
                .orElse(values);
    }
}
