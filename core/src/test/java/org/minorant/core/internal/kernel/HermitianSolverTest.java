package org.minorant.core.internal.kernel;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Random;
import org.junit.jupiter.api.Test;
import org.minorant.core.internal.TestMatrices;
import org.minorant.core.internal.TestMatrices.Flat;
import org.minorant.core.internal.TestMatrices.Spectrum;

class HermitianSolverTest {

    @Test
    void saysWhenItDoesNotConverge() {
        // the door refuses what is not finite; the iteration itself must end and say so
        double[] d = {1, Double.NaN, 2};
        double[] e = {1, 1, 0};
        assertThrows(ArithmeticException.class, () -> TridiagonalQl.diagonalise(d, e, new double[0][]));
    }

    @Test
    void reductionIsRealTridiagonalAndUnitary() {
        Random random = new Random(4);
        int n = 11;
        Flat a = TestMatrices.hermitian(TestMatrices.spectrum(Spectrum.SIGNED, n, random), true, random);
        HouseholderReduction h = HouseholderReduction.of(a.rowsRe(), a.rowsIm());
        double[][] qr = new double[n][n];
        double[][] qi = new double[n][n];
        for (int i = 0; i < n; i++) {
            qr[i][i] = 1;
        }
        h.reflectors().applyTo(qr, qi);
        // Q T Q* = A, entry by entry
        double[] d = h.diagonal();
        double[] e = h.offDiagonal();
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                double x = 0;
                double y = 0;
                for (int k = 0; k < n; k++) {
                    for (int l = Math.max(0, k - 1); l <= Math.min(n - 1, k + 1); l++) {
                        double t = k == l ? d[k] : e[Math.min(k, l)];
                        x += t * (qr[i][k] * qr[j][l] + qi[i][k] * qi[j][l]);
                        y += t * (qi[i][k] * qr[j][l] - qr[i][k] * qi[j][l]);
                    }
                }
                assertEquals(a.rowsRe()[i][j], x, 40 * n * 0x1p-53);
                assertEquals(a.rowsIm()[i][j], y, 40 * n * 0x1p-53);
            }
        }
    }

    @Test
    void choleskyDecidesWithinRounding() {
        Random random = new Random(6);
        for (boolean complex : new boolean[] {false, true}) {
            for (int n : new int[] {1, 2, 7, 30}) {
                double[] values = TestMatrices.spectrum(Spectrum.RANDOM, n, random);
                values[n - 1] = 1e-6;
                Flat a = TestMatrices.hermitian(values, complex, random);
                assertTrue(Cholesky.completes(a.rowsRe(), imaginary(a), 0.9e-6));
                assertFalse(Cholesky.completes(a.rowsRe(), imaginary(a), 1.1e-6));
                Flat nan = a.shifted(Double.NaN);
                assertFalse(Cholesky.completes(nan.rowsRe(), imaginary(nan), 0));
            }
        }
    }

    private static double[][] imaginary(Flat a) {
        return a.im().length == 0 ? new double[0][] : a.rowsIm();
    }
}
