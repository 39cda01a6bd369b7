package org.minorant.core;

import java.util.Arrays;
import org.minorant.core.internal.kernel.Cholesky;

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
        double[][] re = rows(a.realParts(), n);
        double[][] im = rows(a.imaginaryParts(), n);
        return Cholesky.completes(re, im, shift);
    }

    private static double[][] rows(double[] flat, int n) {
        double[][] r = new double[flat.length / n][];
        for (int i = 0; i < r.length; i++) {
            r[i] = Arrays.copyOfRange(flat, i * n, (i + 1) * n);
        }
        return r;
    }
}
