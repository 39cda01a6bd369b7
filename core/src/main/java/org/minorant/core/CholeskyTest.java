package org.minorant.core;

/**
 * A proof of positive definiteness in double: if the floating-point Cholesky factorisation of A − s·1 runs to completion, A is
 * positive definite, provided s exceeds the backward error.
 *
 * <p><b>Argument.</b> A completed factorisation of Â is exact for Â + ΔÂ with |ΔÂ_ij| ≤ γ√(â_ii â_jj), γ = 4(n+4)u for complex
 * arithmetic, hence ‖ΔÂ‖ ≤ γ Tr Â (Demmel 1989; Higham, Accuracy and Stability of Numerical Algorithms, 2nd ed., theorem 10.3;
 * Rump, Verification of positive definiteness, BIT 46, 2006). Taking s = 2γ Tr A covers the rounding of the shift too.
 */
final class CholeskyTest {

    private CholeskyTest() {}

    static boolean isPositiveDefinite(Operator a) {
        int n = a.rows();
        double trace = a.trace().re();
        double shift = 8.0 * (n + 6) * 0x1p-53 * trace;
        if (!(trace > 0x1p-900)) {
            return false;
        }
        double[][] lr = new double[n][];
        double[][] li = new double[n][];
        for (int i = 0; i < n; i++) {
            double[] r = new double[i + 1];
            double[] m = new double[i + 1];
            for (int j = 0; j <= i; j++) {
                double x = a.re(i, j);
                double y = a.im(i, j);
                double[] br = j < i ? lr[j] : r;
                double[] bi = j < i ? li[j] : m;
                for (int k = 0; k < j; k++) {
                    x -= r[k] * br[k] + m[k] * bi[k];
                    y -= m[k] * br[k] - r[k] * bi[k];
                }
                if (j < i) {
                    r[j] = x / br[j];
                    m[j] = y / br[j];
                } else {
                    double pivot = x - shift;
                    if (!(pivot > 0)) {
                        return false;
                    }
                    r[i] = Math.sqrt(pivot);
                }
            }
            lr[i] = r;
            li[i] = m;
        }
        return true;
    }
}
