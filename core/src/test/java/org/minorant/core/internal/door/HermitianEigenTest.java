package org.minorant.core.internal.door;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Arrays;
import java.util.Random;
import java.util.stream.IntStream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.EnumSource;
import org.minorant.core.internal.TestMatrices;
import org.minorant.core.internal.TestMatrices.Flat;
import org.minorant.core.internal.TestMatrices.Spectrum;

class HermitianEigenTest {

    private static final double U = 0x1p-53;

    private static final int[] DIMENSIONS = {1, 2, 3, 4, 5, 8, 9, 16, 17, 33, 70};

    /** ‖AV − VΛ‖_F and ‖V*V − 1‖_F, plainly. */
    private static double[] defects(Flat a, HermitianEigen e) {
        int n = a.n();
        double[] re = e.vectorsRe();
        double[] im = e.vectorsIm();
        double residual = 0;
        double defect = 0;
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                double x = -re[i * n + j] * e.values()[j];
                double y = -im[i * n + j] * e.values()[j];
                double p = i == j ? -1 : 0;
                double q = 0;
                for (int k = 0; k < n; k++) {
                    double ar = a.re()[i * n + k];
                    double ai = a.im().length == 0 ? 0 : a.im()[i * n + k];
                    x += ar * re[k * n + j] - ai * im[k * n + j];
                    y += ar * im[k * n + j] + ai * re[k * n + j];
                    p += re[k * n + i] * re[k * n + j] + im[k * n + i] * im[k * n + j];
                    q += re[k * n + i] * im[k * n + j] - im[k * n + i] * re[k * n + j];
                }
                residual += x * x + y * y;
                defect += p * p + q * q;
            }
        }
        return new double[] {Math.sqrt(residual), Math.sqrt(defect)};
    }

    @ParameterizedTest
    @EnumSource(Spectrum.class)
    void reproducesPrescribedSpectra(Spectrum kind) {
        for (int n : DIMENSIONS) {
            for (boolean complex : new boolean[] {false, true}) {
                Random random = new Random(31L * n + (complex ? 1 : 0));
                double[] values = TestMatrices.spectrum(kind, n, random);
                Flat a = TestMatrices.hermitian(values, complex, random);
                HermitianEigen e = HermitianEigen.of(n, a.re(), a.im());
                Arrays.sort(values);
                String where = kind + ", n = " + n + (complex ? ", complex" : ", real");
                // forming A costs about 4nu, the decomposition a modest multiple of nu (norm 1)
                double tolerance = 16 * (n + 4) * U;
                assertArrayEquals(values, e.values(), tolerance, where);
                double[] d = defects(a, e);
                assertTrue(d[0] <= tolerance, where + ": residual " + d[0]);
                assertTrue(d[1] <= tolerance, where + ": defect " + d[1]);
                double[] only = HermitianEigen.valuesOf(n, a.re(), a.im());
                assertArrayEquals(e.values(), only, tolerance, where + ", values only");
            }
        }
    }

    @Test
    void scaleDoesNotMatter() {
        Random random = new Random(5);
        int n = 12;
        for (boolean complex : new boolean[] {false, true}) {
            double[] values = TestMatrices.spectrum(Spectrum.SIGNED, n, random);
            Flat a = TestMatrices.hermitian(values, complex, random);
            HermitianEigen e = HermitianEigen.of(n, a.re(), a.im());
            for (int power : new int[] {-900, -600, -100, 100, 600, 1000}) {
                Flat b = a.scaled(power);
                HermitianEigen f = HermitianEigen.of(n, b.re(), b.im());
                assertArrayEquals(e.vectorsRe(), f.vectorsRe(), "2^" + power);
                for (int i = 0; i < n; i++) {
                    assertEquals(Math.scalb(e.values()[i], power), f.values()[i], "2^" + power);
                }
            }
            // subnormal entries keep few digits, but they are digits of this matrix
            for (int power : new int[] {-1040, -1070}) {
                Flat c = a.scaled(power);
                HermitianEigen f = HermitianEigen.of(n, c.re(), c.im());
                Flat back = c.scaled(1000).scaled(-power - 1000);
                HermitianEigen g = HermitianEigen.of(n, back.re(), back.im());
                assertArrayEquals(g.vectorsRe(), f.vectorsRe(), "2^" + power);
                for (int i = 0; i < n; i++) {
                    assertEquals(Math.scalb(g.values()[i], power), f.values()[i]);
                }
            }
        }
    }

    @Test
    void structuredMatrices() {
        int n = 6;
        double[] none = new double[0];
        assertArrayEquals(
                new double[n], HermitianEigen.of(n, new double[n * n], none).values());
        // diagonal, out of order and with tiny entries: exact
        double[] diagonal = new double[n * n];
        double[] entries = {3, -1, 1e-200, 0, 2, -1e-30};
        for (int i = 0; i < n; i++) {
            diagonal[i * n + i] = entries[i];
        }
        assertArrayEquals(
                new double[] {-1, -1e-30, 0, 1e-200, 2, 3},
                HermitianEigen.of(n, diagonal, none).values());
        // the adjacency matrix of a hexagon: 2 cos(2πk/6)
        double[] cycle = new double[n * n];
        for (int i = 0; i < n; i++) {
            cycle[i * n + (i + 1) % n] = 1;
            cycle[((i + 1) % n) * n + i] = 1;
        }
        double[] cosines = {-2, -1, -1, 1, 1, 2};
        assertArrayEquals(cosines, HermitianEigen.of(n, cycle, none).values(), 32 * n * U);
        // the second Pauli matrix
        HermitianEigen pauli = HermitianEigen.of(2, new double[4], new double[] {0, -1, 1, 0});
        assertArrayEquals(new double[] {-1, 1}, pauli.values(), 4 * U);
    }

    @Test
    void gradedByRowsAndColumns() {
        // entries of size 10^-4(i+j): residual and orthogonality must stay at rounding level of the norm, from either
        // end
        int n = 40;
        Random random = new Random(9);
        double[] re = new double[n * n];
        double[] im = new double[n * n];
        for (int i = 0; i < n; i++) {
            for (int j = 0; j <= i; j++) {
                double g = Math.pow(10, -4.0 * (i + j));
                re[i * n + j] = g * random.nextGaussian();
                re[j * n + i] = re[i * n + j];
                if (i != j) {
                    im[i * n + j] = g * random.nextGaussian();
                    im[j * n + i] = -im[i * n + j];
                }
            }
        }
        double norm = Math.abs(re[0]) + 1e-3;
        for (Flat a : new Flat[] {new Flat(n, re, im), new Flat(n, reverse(re), reverse(im))}) {
            double[] d = defects(a, HermitianEigen.of(n, a.re(), a.im()));
            assertTrue(d[0] <= 16 * n * U * norm, "residual " + d[0]);
            assertTrue(d[1] <= 16 * n * U, "defect " + d[1]);
        }
    }

    private static double[] reverse(double[] a) {
        double[] r = a.clone();
        for (int i = 0; i < a.length; i++) {
            r[i] = a[a.length - 1 - i];
        }
        return r;
    }

    @Test
    void sameBitsOnEveryThread() {
        Random random = new Random(3);
        int n = 40;
        Flat a = TestMatrices.hermitian(TestMatrices.spectrum(Spectrum.CLUSTERED, n, random), true, random);
        HermitianEigen first = HermitianEigen.of(n, a.re(), a.im());
        IntStream.range(0, 8).parallel().forEach(i -> {
            HermitianEigen e = HermitianEigen.of(n, a.re(), a.im());
            assertArrayEquals(first.values(), e.values());
            assertArrayEquals(first.vectorsRe(), e.vectorsRe());
            assertArrayEquals(first.vectorsIm(), e.vectorsIm());
        });
    }

    @Test
    void refusesWhatItCannotDecompose() {
        double[] none = new double[0];
        for (double bad : new double[] {Double.NaN, Double.POSITIVE_INFINITY, Double.NEGATIVE_INFINITY}) {
            double[] re = {1, bad, bad, 1};
            double[] im = {0, bad, -bad, 0};
            double[] one = {1, 0, 0, 1};
            assertThrows(IllegalArgumentException.class, () -> HermitianEigen.of(2, re, none));
            assertThrows(IllegalArgumentException.class, () -> HermitianEigen.of(2, one, im));
        }
        assertThrows(IllegalArgumentException.class, () -> HermitianEigen.of(0, none, none));
        assertThrows(IllegalArgumentException.class, () -> HermitianEigen.of(2, new double[3], none));
        assertThrows(IllegalArgumentException.class, () -> HermitianEigen.of(2, new double[4], new double[1]));
        double[] big = {Double.MAX_VALUE, Double.MAX_VALUE, Double.MAX_VALUE, Double.MAX_VALUE};
        assertThrows(ArithmeticException.class, () -> HermitianEigen.of(2, big, none));
    }
}
