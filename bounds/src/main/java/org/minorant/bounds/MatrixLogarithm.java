package org.minorant.bounds;

import org.minorant.bounds.divergence.Ball;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.EnclosedSpectrum;

/**
 * The logarithm of a positive definite matrix S of exact numbers, as a matrix.
 *
 * <p><b>Argument.</b> With S ≈ VΛV*, V = U(1+Δ)^½, U unitary and ‖Δ‖ ≤ δ &lt; ½: ‖S − UΛU*‖ ≤ r = residual + 2δ max Λ, the logarithms of both differ by at most r/(min Λ − r), and ‖V ln Λ V* − U ln Λ U*‖ ≤ 2δ
 * max|ln Λ|.
 *
 * @param matrix V ln Λ V*
 * @param error a bound on the operator norm of ln S minus this
 * @param norm a bound on the operator norm of ln S
 * @param least a lower bound on the eigenvalues of S; where it is not positive nothing is known, and the error is infinite
 */
record MatrixLogarithm(EnclosedMatrix matrix, double error, double norm, double least) {

    private static final double UP = 1 + 0x1p-40;

    static MatrixLogarithm of(EnclosedMatrix s) {
        EnclosedSpectrum spectrum = EnclosedSpectrum.of(s);
        int n = spectrum.dimension();
        double defect = spectrum.defect();
        double most = Math.max(Math.abs(spectrum.value(0)), Math.abs(spectrum.value(n - 1)));
        double r = (spectrum.residual() + 2 * defect * most) * UP;
        double least = spectrum.value(0) * (1 - 0x1p-50) - r;
        if (!(defect < 0.5 && least > 0)) {
            return new MatrixLogarithm(s, Double.POSITIVE_INFINITY, Double.POSITIVE_INFINITY, 0);
        }
        EnclosedMatrix.Builder ln = EnclosedMatrix.builder(n, n);
        double norm = 0;
        for (int i = 0; i < n; i++) {
            Ball b = new Ball(spectrum.value(i), spectrum.valueTail(i), 0).ln();
            ln.set(i, i, b.hi(), b.lo(), 0, 0, b.radius());
            norm = Math.max(norm, b.magnitude());
        }
        EnclosedMatrix v = spectrum.vectors();
        double error = (r / least + 2 * defect * norm) * UP;
        return new MatrixLogarithm(v.times(ln.build()).times(v.adjoint()), error, (norm + error) * UP, least);
    }
}
