package org.minorant.bounds;

import org.apache.commons.numbers.gamma.InverseErfc;
import org.minorant.core.DensityOperator;

/**
 * The normal approximation of ln M in n uses,
 *
 * <pre>ln M ≈ nC − √(nV) Q⁻¹(ε),   V = Σ_x P(x) V(W_x‖σ),</pre>
 *
 * with P the capacity input that was found and σ its output. V is the dispersion where the capacity input is unique; where several attain the capacity, the expansion asks
 * for the one of least V (ε &lt; ½) or largest V, which is not searched for. No term of order ln n is added.
 */
final class NormalApproximation {

    private static final String SOURCE =
            "normal approximation nC - sqrt(nV) Q^-1(e), without a logarithmic term: V. Strassen (1962); Y. Polyanskiy, H. V. Poor, S. Verdu, IEEE Trans. Inf. Theory 56,"
                    + " 2307 (2010); M. Tomamichel, V. Y. F. Tan, Commun. Math. Phys. 338, 103 (2015) (all from memory)";

    private NormalApproximation() {}

    static Approximation of(ClassicalQuantumChannel channel, int n, double epsilon) {
        double mean = n * channel.capacity().value().nats().midpoint();
        double quantile = Math.sqrt(2) * InverseErfc.value(2 * epsilon);
        return new Approximation(mean - Math.sqrt(n * dispersion(channel)) * quantile, SOURCE);
    }

    private static double dispersion(ClassicalQuantumChannel channel) {
        double[] p = channel.capacity().input();
        DensityOperator sigma = channel.capacity().outputState();
        double v = 0;
        for (int x = 0; x < p.length; x++) {
            if (p[x] > 0) {
                v += p[x]
                        * Divergences.relativeEntropyVariance(channel.outputs().get(x), sigma)
                                .midpoint();
            }
        }
        // 0 for channels of equal spectra and no spread, but for rounding
        return Math.max(0, v);
    }
}
