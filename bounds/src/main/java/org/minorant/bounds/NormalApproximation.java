package org.minorant.bounds;

import org.apache.commons.numbers.gamma.InverseErfc;

/**
 * Approximations of ln M in n uses from the capacity and the dispersion V, see {@link ChannelDispersion}: the normal one,
 *
 * <pre>ln M ≈ nC − √(nV) Q⁻¹(ε),</pre>
 *
 * and that of moderate deviations, for errors ε or 1 − ε that vanish, though more slowly than exponentially,
 *
 * <pre>ln M ≈ nC − √(2nV ln 1/ε)   or   nC + √(2nV ln 1/(1−ε)).</pre>
 *
 * <p>V is the least one for ε &lt; ½ and the largest one for ε &gt; ½. No term of order ln n is added.
 */
final class NormalApproximation {

    private static final String SOURCE =
            "normal approximation nC - sqrt(nV) Q^-1(e), without a logarithmic term: V. Strassen (1962); Y. Polyanskiy, H. V. Poor, S. Verdu, IEEE Trans. Inf. Theory 56,"
                    + " 2307 (2010); M. Tomamichel, V. Y. F. Tan, Commun. Math. Phys. 338, 103 (2015) (all from memory)";

    private static final String MODERATE =
            "moderate deviations nC - sqrt(2nV ln 1/e): C. T. Chubb, V. Y. F. Tan, M. Tomamichel, Commun. Math. Phys. 355, 1283 (2017); H.-C. Cheng, M.-H. Hsieh, IEEE Trans. Inf. Theory 64,"
                    + " 1385 (2018) (both from memory)";

    private NormalApproximation() {}

    static Approximation of(ClassicalQuantumChannel channel, int n, double epsilon) {
        double quantile = Math.sqrt(2) * InverseErfc.value(2 * epsilon);
        return shifted(channel, n, epsilon, quantile, SOURCE);
    }

    static Approximation moderate(ClassicalQuantumChannel channel, int n, double epsilon) {
        double shift = epsilon <= 0.5 ? Math.sqrt(-2 * Math.log(epsilon)) : -Math.sqrt(-2 * Math.log1p(-epsilon));
        return shifted(channel, n, epsilon, shift, MODERATE);
    }

    /** nC − √(nV) times the shift. */
    private static Approximation shifted(
            ClassicalQuantumChannel channel, int n, double epsilon, double shift, String source) {
        double mean = n * channel.capacity().value().nats().midpoint();
        double v = channel.dispersion().at(epsilon);
        return new Approximation(mean - Math.sqrt(n * v) * shift, source);
    }
}
