package org.minorant.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.math.MathContext;
import java.util.Random;
import java.util.concurrent.CancellationException;
import java.util.concurrent.atomic.AtomicInteger;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.EnumSource;
import org.minorant.core.internal.TestMatrices;
import org.minorant.core.internal.TestMatrices.Flat;
import org.minorant.core.internal.TestMatrices.Spectrum;
import org.minorant.core.internal.work.Checkpoint;

class EnclosedSpectrumTest {

    private static HermitianOperator operator(Flat a) {
        return HermitianOperator.of(a.rowsRe(), a.rowsIm());
    }

    @ParameterizedTest
    @EnumSource(Spectrum.class)
    void thirtyDigitsOnEverySpectrum(Spectrum kind) {
        for (int n : new int[] {1, 2, 3, 8, 20}) {
            for (boolean complex : new boolean[] {false, true}) {
                Random random = new Random(7L * n + (complex ? 1 : 0));
                double[] values = TestMatrices.spectrum(kind, n, random);
                HermitianOperator a = operator(TestMatrices.hermitian(values, complex, random));
                EnclosedSpectrum s = EnclosedSpectrum.of(a);
                String where = kind + ", n = " + n + (complex ? ", complex" : ", real");
                // radii of the products behind it: γ ≈ (3.5n + 220)·2^-106 times ‖V‖_F² = n, and little more
                double allowed = 4 * (3.5 * n + 220) * n * 0x1p-106;
                assertTrue(s.residual() <= allowed, where + ": residual " + s.residual());
                assertTrue(s.defect() <= allowed, where + ": defect " + s.defect());
                java.util.Arrays.sort(values);
                for (int i = 0; i < n; i++) {
                    // rounding of the matrix itself moves its eigenvalues by a few n·u
                    assertEquals(values[i], s.value(i), 16 * (n + 4) * 0x1p-53, where);
                    assertTrue(i == 0 || s.value(i - 1) <= s.value(i), where + " is out of order");
                    assertTrue(s.eigenvalue(i).contains(s.value(i)) || s.valueTail(i) != 0);
                    assertTrue(Math.abs(s.valueTail(i)) <= Math.ulp(s.value(i)));
                }
                // the trace is known exactly from the entries, and the enclosed eigenvalues must add up to it
                Enclosure trace = Enclosure.ZERO;
                BigDecimal exact = BigDecimal.ZERO;
                for (int i = 0; i < n; i++) {
                    trace = trace.plus(s.eigenvalue(i));
                    exact = exact.add(new BigDecimal(a.re(i, i)));
                }
                assertTrue(trace.contains(exact), where + ": trace " + trace);
            }
        }
    }

    @Test
    void twoByTwoInClosedForm() {
        Random r = new Random(1);
        MathContext wide = new MathContext(80);
        for (int i = 0; i < 300; i++) {
            double a = r.nextGaussian();
            double b = a + r.nextGaussian() * Math.pow(10, -r.nextInt(18));
            double x = r.nextGaussian() * Math.pow(10, -r.nextInt(18));
            double y = r.nextGaussian() * Math.pow(10, -r.nextInt(18));
            HermitianOperator h =
                    HermitianOperator.of(new double[][] {{a, x}, {x, b}}, new double[][] {{0, -y}, {y, 0}});
            EnclosedSpectrum s = EnclosedSpectrum.of(h);
            // ½(a + b) ± √(¼(a − b)² + x² + y²)
            BigDecimal two = BigDecimal.valueOf(2);
            BigDecimal half = new BigDecimal(a).add(new BigDecimal(b)).divide(two);
            BigDecimal gap = new BigDecimal(a).subtract(new BigDecimal(b)).divide(two);
            BigDecimal square = gap.pow(2).add(new BigDecimal(x).pow(2)).add(new BigDecimal(y).pow(2));
            BigDecimal root = square.signum() == 0 ? square : square.sqrt(wide);
            assertTrue(s.eigenvalue(0).contains(half.subtract(root)), "lower eigenvalue, case " + i);
            assertTrue(s.eigenvalue(1).contains(half.add(root)), "upper eigenvalue, case " + i);
            assertTrue(s.eigenvalueRadius() < 1e-28 * (Math.abs(a) + Math.abs(b) + Math.abs(x) + Math.abs(y)));
        }
    }

    @Test
    void scaleDoesNotMatter() {
        Random random = new Random(2);
        Flat a = TestMatrices.hermitian(TestMatrices.spectrum(Spectrum.CLUSTERED, 6, random), true, random);
        double one = EnclosedSpectrum.of(operator(a)).residual();
        for (int power : new int[] {-400, 400}) {
            EnclosedSpectrum s = EnclosedSpectrum.of(operator(a.scaled(power)));
            assertTrue(Math.scalb(s.residual(), -power) <= 10 * one, "2^" + power + ": " + s.residual());
        }
    }

    @Test
    void enclosedInputWidensTheResult() {
        EnclosedMatrix.Builder b = EnclosedMatrix.builder(2, 2);
        b.set(0, 0, 1, 0, 0, 0, 1e-10).set(1, 1, 2, 0, 0, 0, 0);
        EnclosedSpectrum s = EnclosedSpectrum.of(b.build());
        assertTrue(s.residual() >= 1e-10 && s.residual() < 1.1e-10);
        assertTrue(s.eigenvalue(0).contains(1 + 1e-10) && s.eigenvalue(0).contains(1 - 1e-10));
        assertEquals(2, s.dimension());
    }

    @Test
    void asksTheCheckpointOfItsThreadOnly() {
        Random random = new Random(3);
        HermitianOperator a =
                operator(TestMatrices.hermitian(TestMatrices.spectrum(Spectrum.CLUSTERED, 6, random), true, random));
        AtomicInteger asked = new AtomicInteger();
        AtomicInteger outer = new AtomicInteger();
        double residual = Checkpoint.during(
                outer::incrementAndGet,
                () -> Checkpoint.during(
                        asked::incrementAndGet, () -> EnclosedSpectrum.of(a).residual()));
        // the decomposition, one step, two products, the certificate; rounds add to it
        assertTrue(asked.get() >= 5, () -> asked + " polls");
        assertEquals(0, outer.get());
        int before = asked.get();
        assertEquals(residual, EnclosedSpectrum.of(a).residual());
        assertEquals(before, asked.get());
        for (int k = 1; k <= before; k++) {
            int last = k;
            AtomicInteger polls = new AtomicInteger();
            Runnable stop = () -> {
                if (polls.incrementAndGet() == last) {
                    throw new CancellationException();
                }
            };
            assertThrows(CancellationException.class, () -> Checkpoint.during(stop, () -> EnclosedSpectrum.of(a)));
            assertEquals(last, polls.get());
        }
        // cancelled work leaves nothing behind
        assertEquals(residual, EnclosedSpectrum.of(a).residual());
        assertEquals(before, asked.get());
    }

    @Test
    void zeroMatrixAndRefusal() {
        EnclosedSpectrum s = EnclosedSpectrum.of(HermitianOperator.of(new double[3][3], new double[3][3]));
        assertTrue(s.eigenvalue(2).contains(0.0) && s.residual() == 0);
        assertThrows(
                InvalidInputException.class,
                () -> EnclosedSpectrum.of(EnclosedMatrix.builder(2, 3).build()));
    }
}
