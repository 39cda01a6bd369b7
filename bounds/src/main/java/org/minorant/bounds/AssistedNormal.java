package org.minorant.bounds;

import org.apache.commons.numbers.gamma.InverseErfc;
import org.minorant.core.HermitianOperator;
import org.minorant.core.KrausChannel;
import org.minorant.core.SpectralDecomposition;

/**
 * The normal approximation of ln M in n uses with shared entanglement, nC − √(nV) Q⁻¹(ε), V = V(N(θ)‖θ_R ⊗ N(θ_A)) at the input found for the capacity. For covariant channels the expansion is proven from
 * both sides; otherwise codes are known to reach it.
 */
final class AssistedNormal {

    private static final String SOURCE =
            "normal approximation nC - sqrt(nV) Q^-1(e), without a logarithmic term: N. Datta, M. Tomamichel, M. M. Wilde, Quantum Inf. Process. 15, 2569 (2016) (from memory)";

    /** Eigenvalues below this part of the largest count as zero. */
    private static final double NONE = 1e-13;

    private AssistedNormal() {}

    static Approximation of(KrausChannel channel, AssistedCapacity capacity, int n, double epsilon) {
        double mean = n * capacity.value().nats().midpoint();
        AssistedInput input = AssistedInput.of(capacity.input());
        double v = variance(input.joint(channel), input.product(channel));
        double quantile = Math.sqrt(2) * InverseErfc.value(2 * epsilon);
        return new Approximation(mean - Math.sqrt(n * v) * quantile, SOURCE);
    }

    /** Σ a_i |⟨u_i|v_j⟩|² (ln a_i/b_j)² less the square of the mean, in double. */
    static double variance(HermitianOperator a, HermitianOperator b) {
        SpectralDecomposition s = a.spectralDecomposition();
        SpectralDecomposition t = b.spectralDecomposition();
        double first = 0;
        double second = 0;
        var overlaps = s.vectors().adjoint().times(t.vectors());
        for (int i = 0; i < s.dimension(); i++) {
            for (int j = 0; j < s.dimension(); j++) {
                double x = s.eigenvalues()[i];
                double y = t.eigenvalues()[j];
                if (x > NONE * s.norm() && y > NONE * t.norm()) {
                    double p = x * (overlaps.re(i, j) * overlaps.re(i, j) + overlaps.im(i, j) * overlaps.im(i, j));
                    double ln = Math.log(x / y);
                    first += p * ln;
                    second += p * ln * ln;
                }
            }
        }
        return Math.max(0, second - first * first);
    }
}
