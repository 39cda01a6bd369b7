package org.minorant.tests.oracle;

import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.minorant.core.Enclosure;
import org.minorant.core.PositiveOperator;
import org.minorant.core.pair.PositivePair;
import org.minorant.tests.Draw;
import org.minorant.tests.Draw.Matrix;
import org.minorant.tests.reference.Reference;
import org.minorant.tests.reference.ReferenceMinimum;
import org.minorant.tests.reference.ReferenceOperator;

/** Tr[A ∧ tB] of random pairs beside ½(Tr A + t Tr B − ‖A − tB‖₁) by Hipparchus in double: a second library, within its own error. */
class MinimumOracleTest {

    @Test
    void randomPairsAgreeWithHipparchus() {
        Random random = new Random(11);
        for (int i = 0; i < 200; i++) {
            int n = 1 + i % 24;
            Matrix a = state(random, n, i % 4);
            Matrix b = state(random, n, i / 4 % 4);
            double t = Draw.logUniform(random, -2, 2);
            HipparchusSpectrum s = new HipparchusSpectrum(a.combine(1, b, -t).hermitian());
            double norm = 0;
            for (double v : s.doubled()) {
                norm += Math.abs(v) / 2;
            }
            double f = (a.trace() + t * b.trace() - norm) / 2;
            // n eigenvalues, the rounding of a − tb (two roundings in each of n² entries) and of the sums
            double error = n * s.error() + 4 * n * n * 0x1p-53 * (a.trace() + t * b.trace());
            Enclosure own = pair(a, b).traceMinimum(t);
            assertTrue(
                    own.lower() <= f + error && f - error <= own.upper(),
                    "case " + i + ": " + own + " beside " + f + " +- " + error);
        }
    }

    /** Dimensions above 16 against arbitrary precision: what the families of containment do not reach. */
    @Test
    void largerPairsHoldTheArbitraryPrecisionValue() {
        Random random = new Random(12);
        for (int n : new int[] {20, 28}) {
            Matrix a = state(random, n, 0);
            Matrix b = state(random, n, 2);
            Reference f = ReferenceMinimum.of(
                    BigDecimal.ONE,
                    ReferenceOperator.ofEntries(a.re(), a.im()),
                    BigDecimal.ONE,
                    ReferenceOperator.ofEntries(b.re(), b.im()));
            Enclosure own = pair(a, b).traceMinimum(1);
            assertTrue(f.isCompatibleWith(own), () -> own + " beside " + f);
            assertTrue(own.relativeWidth() < 1e-12, () -> "relative width " + own.relativeWidth());
        }
    }

    private static PositivePair pair(Matrix a, Matrix b) {
        return PositivePair.of(PositiveOperator.of(a.re(), a.im()), PositiveOperator.of(b.re(), b.im()));
    }

    /** Spectra: random, clustered, deficient, graded; of trace about one. */
    private static Matrix state(Random random, int n, int kind) {
        double[] p = new double[n];
        double sum = 0;
        for (int i = 0; i < n; i++) {
            p[i] = switch (kind) {
                case 0 -> random.nextDouble();
                case 1 -> 1 + 1e-12 * random.nextGaussian();
                case 2 -> i == 0 || random.nextBoolean() ? 1 : 0;
                default -> Draw.logUniform(random, -14, 0);
            };
            sum += p[i];
        }
        return Draw.withSpectrum(Draw.unitary(random, n), p).times(1 / sum).hermitian();
    }
}
