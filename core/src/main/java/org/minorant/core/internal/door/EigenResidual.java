package org.minorant.core.internal.door;

import org.minorant.core.internal.kernel.Defects;

/**
 * What a double eigendecomposition A ≈ VΛV* is worth, a posteriori: from bounds on R = AV − VΛ and on δ ≥ ‖V*V − 1‖_F that include the
 * rounding of their own computation ({@link Defects}).
 *
 * <p><b>Argument.</b> Let δ &lt; ½ and V = ŨS with Ũ unitary and S = (V*V)^½ (polar form), so ‖S − 1‖_F ≤ δ and ‖S⁻¹‖ ≤ 1/√(1−δ). From
 * A = VΛV⁻¹ + RV⁻¹ and VΛV⁻¹ = Ũ SΛS⁻¹ Ũ* follows A − ŨΛŨ* = Ũ((S−1)Λ − Λ(S−1))S⁻¹Ũ* + RV⁻¹. Since ‖XY‖₁ ≤ ‖X‖_F ‖Y‖_F and ‖R‖₁ ≤ √n ‖R‖_F,
 * its trace norm is at most
 *
 * <pre>(√n ‖R‖_F + 2δ ‖Λ‖_F)/√(1−δ),</pre>
 *
 * and so is Σ|λ_i(A) − Λ_i| with both in ascending order (Mirsky). Its Frobenius norm is at most (‖R‖_F + 2δ max|Λ|)/√(1−δ).
 */
public final class EigenResidual {

    private static final double U = 0x1p-53;

    private final double[] values;
    private final double traceError;
    private final double frobeniusError;
    private final double defect;

    private EigenResidual(double[] values, double traceError, double frobeniusError, double defect) {
        this.values = values;
        this.traceError = traceError;
        this.frobeniusError = frobeniusError;
        this.defect = defect;
    }

    /**
     * Bounds the error of a decomposition.
     *
     * @param n the dimension
     * @param are real parts of the matrix, row-major
     * @param aim imaginary parts, row-major; empty for a real matrix
     * @param e a decomposition of that matrix
     * @return its error
     * @throws ArithmeticException if the vectors are not nearly orthonormal
     */
    public static EigenResidual of(int n, double[] are, double[] aim, HermitianEigen e) {
        if (n != e.dimension() || (aim.length == 0) != (e.rowsIm().length == 0)) {
            throw new IllegalArgumentException("the decomposition belongs to another matrix");
        }
        Scale s = Scale.of(n, are, aim);
        double[] lambda = s.scaled(e.values());
        double residual = Defects.residual(
                (i, row) -> s.copyRow(are, i, row), (i, row) -> s.copyRow(aim, i, row), e.rowsRe(), e.rowsIm(), lambda);
        double defect = Defects.orthonormality(e.rowsRe(), e.rowsIm());
        if (!(defect < 0.5)) {
            throw new ArithmeticException("the eigenvectors are not orthonormal: defect " + defect);
        }
        double norm = 0;
        double most = 0;
        for (double l : lambda) {
            norm += l * l;
            most = Math.max(most, Math.abs(l));
        }
        norm = Math.sqrt(norm) * (1 + n * U) + 0x1p-500;
        double error = (Math.sqrt(n) * residual + 2 * defect * norm) / Math.sqrt(1 - defect) * (1 + 16 * U);
        double frobenius = (residual + 2 * defect * most) / Math.sqrt(1 - defect) * (1 + 16 * U) + 0x1p-500;
        return new EigenResidual(e.values(), s.unscaleUp(error), s.unscaleUp(frobenius), defect);
    }

    /**
     * Returns a bound on ‖V*V − 1‖_F, and so on ‖V − Ũ‖_F.
     *
     * @return the defect of orthonormality
     */
    public double defect() {
        return defect;
    }

    /**
     * Returns a bound on the trace norm of A − ŨΛŨ*.
     *
     * @return the bound, possibly infinite if it exceeds the largest double
     */
    public double traceError() {
        return traceError;
    }

    /**
     * Returns a bound on the Frobenius norm of A − ŨΛŨ*.
     *
     * @return the bound, possibly infinite if it exceeds the largest double
     */
    public double frobeniusError() {
        return frobeniusError;
    }

    /**
     * Returns an upper end of the trace of the negative part of A.
     *
     * @return the bound
     */
    public double negativeTraceUpper() {
        double s = 0;
        for (double v : values) {
            s += Math.max(0, -v);
        }
        return (s + traceError) * (1 + values.length * 2 * U);
    }
}
