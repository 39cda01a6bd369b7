package org.minorant.core.internal.door;

import org.minorant.core.internal.kernel.Products;

/**
 * What a double eigendecomposition A ≈ VΛV* is worth, a posteriori: bounds on ‖AV − VΛ‖_F and ‖V*V − 1‖_F that include the
 * rounding of their own computation, with two matrix products.
 *
 * <p><b>Argument.</b> Let ‖V*V − 1‖ ≤ δ &lt; ½ and V = Ũ(1 + Δ)^½ with Ũ unitary (polar form), so ‖V − Ũ‖ ≤ δ. From AV = VΛ + R follows
 * A = VΛV⁻¹ + RV⁻¹; with V⁻¹ = V* + D, ‖D‖ ≤ δ/√(1−δ), the Hermitian matrix A − ŨΛŨ* has Frobenius norm at most
 * (‖R‖_F + 2δ‖Λ‖_F)/√(1−δ), and the sum of all errors in trace norm is at most √n times that.
 */
public final class EigenResidual {

    private static final double U = 0x1p-53;

    private final double[] values;
    private final double traceError;
    private final double defect;

    private EigenResidual(double[] values, double traceError, double defect) {
        this.values = values;
        this.traceError = traceError;
        this.defect = defect;
    }

    /** Bounds the error of a decomposition of the n × n matrix (are, aim), row-major; an empty imaginary part means real. */
    public static EigenResidual of(int n, double[] are, double[] aim, HermitianEigen e) {
        double[] vre = e.vectorsRe();
        double[] vim = e.vectorsIm();
        double[] lambda = e.values();
        double[] pr = new double[n * n];
        double[] pi = new double[n * n];
        Products.multiply(n, n, n, are, aim, vre, vim, pr, pi);
        double residual = 0;
        double values = 0;
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                double x = pr[i * n + j] - vre[i * n + j] * lambda[j];
                double y = pi[i * n + j] - vim[i * n + j] * lambda[j];
                residual += x * x + y * y;
            }
            values += lambda[i] * lambda[i];
        }
        double normA = frobenius(are, aim);
        double normV = frobenius(vre, vim);
        // rounding of the product: γ ‖|A||V|‖_F ≤ γ ‖A‖_F ‖V‖_F, of the differences: 3u ‖V‖_F max|Λ|
        double gamma = 4 * (n + 4) * U;
        residual = Math.sqrt(residual) + gamma * normA * normV + 4 * U * normV * Math.sqrt(values);
        double[] tr = transpose(vre, n, 1);
        double[] ti = transpose(vim, n, -1);
        Products.multiply(n, n, n, tr, ti, vre, vim, pr, pi);
        double defect = 0;
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                double x = pr[i * n + j] - (i == j ? 1 : 0);
                defect += x * x + pi[i * n + j] * pi[i * n + j];
            }
        }
        defect = Math.sqrt(defect) + gamma * normV * normV;
        if (!(defect < 0.5)) {
            throw new ArithmeticException("the eigenvectors are not orthonormal: defect " + defect);
        }
        double error = (residual + 2 * defect * Math.sqrt(values)) / Math.sqrt(1 - defect);
        return new EigenResidual(lambda, error * Math.sqrt(n) * (1 + 8L * n * n * U) + 0x1p-1000, defect);
    }

    private static double frobenius(double[] re, double[] im) {
        double s = 0;
        for (double v : re) {
            s += v * v;
        }
        for (double v : im) {
            s += v * v;
        }
        return Math.sqrt(s);
    }

    private static double[] transpose(double[] a, int n, double sign) {
        double[] t = new double[a.length];
        for (int i = 0; i < n && a.length != 0; i++) {
            for (int j = 0; j < n; j++) {
                t[j * n + i] = sign * a[i * n + j];
            }
        }
        return t;
    }

    /** A bound on ‖V*V − 1‖, and so on ‖V − Ũ‖. */
    public double defect() {
        return defect;
    }

    /** A bound on the trace norm of A − ŨΛŨ*. */
    public double traceError() {
        return traceError;
    }

    /** An upper end of the trace of the negative part of A. */
    public double negativeTraceUpper() {
        double s = 0;
        for (double v : values) {
            s += Math.max(0, -v);
        }
        return (s + traceError) * (1 + values.length * 2 * U);
    }
}
