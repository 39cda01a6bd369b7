package org.minorant.core.internal.door;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Random;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.EnumSource;
import org.minorant.core.internal.TestMatrices;
import org.minorant.core.internal.TestMatrices.Flat;
import org.minorant.core.internal.TestMatrices.Spectrum;

class EigenResidualTest {

    @ParameterizedTest
    @EnumSource(Spectrum.class)
    void coversWhatIsKnownToBeWrong(Spectrum kind) {
        // the decomposition of A judged as one of A + c: the eigenvalues are off by c each, n·c in trace norm
        for (int n : new int[] {1, 2, 5, 16, 40}) {
            for (boolean complex : new boolean[] {false, true}) {
                Random random = new Random(n);
                Flat a = TestMatrices.hermitian(TestMatrices.spectrum(kind, n, random), complex, random);
                HermitianEigen e = HermitianEigen.of(n, a.re(), a.im());
                double own = EigenResidual.of(n, a.re(), a.im(), e).traceError();
                String where = kind + ", n = " + n;
                // √n · (a residual of some n·u, and the check's own rounding)
                assertTrue(own < 60.0 * (n + 10) * n * 0x1p-53, where + ": " + own);
                for (double c : new double[] {1e-3, 1e-9, 3e-14}) {
                    Flat b = a.shifted(c);
                    double seen = EigenResidual.of(n, b.re(), b.im(), e).traceError();
                    assertTrue(seen >= n * (c - 0x1p-52) - own, where + ": " + seen);
                    assertTrue(seen <= 1.1 * n * c + 2 * own, where + ": " + seen);
                }
            }
        }
    }

    @Test
    void holdsAtEveryScale() {
        Random random = new Random(8);
        Flat a = TestMatrices.hermitian(TestMatrices.spectrum(Spectrum.RANDOM, 10, random), true, random);
        HermitianEigen e = HermitianEigen.of(10, a.re(), a.im());
        double unit = EigenResidual.of(10, a.re(), a.im(), e).traceError();
        for (int power : new int[] {-900, -550, -300, 300, 550, 900}) {
            Flat b = a.scaled(power);
            HermitianEigen f = HermitianEigen.of(10, b.re(), b.im());
            double seen = EigenResidual.of(10, b.re(), b.im(), f).traceError();
            assertEquals(1, Math.scalb(seen, -power) / unit, 1e-9, "2^" + power);
        }
    }

    @Test
    void seesVectorsThatAreNotOrthonormal() {
        double[] re = {0.5, 0, 0, 1};
        HermitianEigen e = HermitianEigen.of(2, re, new double[0]);
        double before = EigenResidual.of(2, re, new double[0], e).defect();
        e.rowsRe()[0][0] += 1e-6;
        double after = EigenResidual.of(2, re, new double[0], e).defect();
        assertTrue(before < 1e-14 && after >= 1.999e-6 && after < 2.1e-6, before + " " + after);
        e.rowsRe()[0][0] = 3;
        assertThrows(ArithmeticException.class, () -> EigenResidual.of(2, re, new double[0], e));
    }

    @Test
    void negativePartIncludesTheError() {
        double[] re = {1, 0, 0, -0.25};
        EigenResidual r = EigenResidual.of(2, re, new double[0], HermitianEigen.of(2, re, new double[0]));
        assertTrue(r.negativeTraceUpper() >= 0.25 + r.traceError());
        assertEquals(0.25, r.negativeTraceUpper(), 1e-14);
    }

    @Test
    void refusesAnotherMatrix() {
        HermitianEigen e = HermitianEigen.of(2, new double[] {1, 0, 0, 1}, new double[0]);
        assertThrows(IllegalArgumentException.class, () -> EigenResidual.of(1, new double[1], new double[0], e));
        assertThrows(IllegalArgumentException.class, () -> EigenResidual.of(2, new double[4], new double[4], e));
    }
}
