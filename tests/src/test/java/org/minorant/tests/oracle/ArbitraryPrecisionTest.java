package org.minorant.tests.oracle;

import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.util.ArrayList;
import java.util.List;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.minorant.bounds.Divergences;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.measurement.Ensemble;
import org.minorant.measurement.HypothesisPair;
import org.minorant.measurement.PrettyGoodMeasurement;
import org.minorant.tests.Draw;
import org.minorant.tests.Draw.Matrix;
import org.minorant.tests.reference.Reference;
import org.minorant.tests.reference.ReferenceDivergences;
import org.minorant.tests.reference.ReferenceMeasurement;
import org.minorant.tests.reference.ReferenceMinimum;
import org.minorant.tests.reference.ReferenceOperator;

/** Random states of full rank: every enclosure holds what arbitrary precision says (fixed-point spectra, Apfloat's logarithms and powers). */
class ArbitraryPrecisionTest {

    private static final int CASES = 24;

    /** The reference carries sixty digits and says fifty. */
    private static final BigDecimal REFERENCE_ERROR = new BigDecimal("1e-45");

    /** Spectra: random, clustered, graded over six decades; trace one up to rounding. */
    private static Matrix state(Random random, int n, int kind) {
        double[] p = new double[n];
        double sum = 0;
        for (int i = 0; i < n; i++) {
            p[i] = switch (kind % 3) {
                case 0 -> 0.05 + random.nextDouble();
                case 1 -> 1 + 1e-11 * random.nextGaussian();
                default -> Draw.logUniform(random, -6, 0);
            };
            sum += p[i];
        }
        for (int i = 0; i < n; i++) {
            p[i] /= sum;
        }
        return Draw.withSpectrum(Draw.unitary(random, n), p);
    }

    private static DensityOperator given(Matrix m) {
        return DensityOperator.of(m.re(), m.im());
    }

    private static ReferenceOperator meant(Matrix m) {
        return ReferenceOperator.ofEntries(m.re(), m.im());
    }

    private static void holds(Enclosure enclosure, BigDecimal value, String what) {
        Reference reference = new Reference(value, REFERENCE_ERROR);
        assertTrue(reference.isCompatibleWith(enclosure), () -> what + ": " + value + " is not in " + enclosure);
        assertTrue(
                enclosure.width() <= 1e-9 * (1 + value.abs().doubleValue()),
                () -> what + ": " + enclosure + " is " + enclosure.width() + " wide");
    }

    @Test
    void divergences() {
        Random random = new Random(21);
        for (int i = 0; i < CASES; i++) {
            int n = 1 + i % 5;
            Matrix a = state(random, n, i);
            Matrix b = state(random, n, i / 3);
            DensityOperator rho = given(a);
            DensityOperator sigma = given(b);
            ReferenceDivergences d = ReferenceDivergences.of(meant(a), meant(b));
            String at = "case " + i + ", ";
            holds(Divergences.relativeEntropy(rho, sigma).nats(), d.relativeEntropy(), at + "relative entropy");
            holds(Divergences.relativeEntropyVariance(rho, sigma), d.variance(), at + "variance");
            for (double alpha : new double[] {0.25, 0.5, 0.875, 1.5, 2}) {
                holds(Divergences.petzRenyi(rho, sigma, alpha).nats(), d.petz(alpha), at + "Petz " + alpha);
            }
            for (double alpha : new double[] {0.5, 0.75, 1.5, 2, 3}) {
                holds(
                        Divergences.sandwichedRenyi(rho, sigma, alpha).nats(),
                        d.sandwiched(alpha),
                        at + "sandwiched " + alpha);
            }
        }
    }

    @Test
    void squareRootMeasurements() {
        Random random = new Random(22);
        for (int i = 0; i < CASES; i++) {
            int n = 1 + i % 5;
            List<DensityOperator> states = new ArrayList<>();
            List<ReferenceOperator> meant = new ArrayList<>();
            for (int k = 0; k < 3; k++) {
                Matrix m = state(random, n, i + k);
                states.add(given(m));
                meant.add(meant(m));
            }
            double[] priors = {0.5, 0.25, 0.25};
            holds(
                    PrettyGoodMeasurement.of(Ensemble.of(states, priors)).successProbability(),
                    ReferenceMeasurement.squareRootSuccess(meant, priors),
                    "case " + i);
        }
    }

    /** β_ε is at least Tr[tρ ∧ σ] − tε at the best t of a search in arbitrary precision, and not more than what a concave curve can hide between two t. */
    @Test
    void typeTwoErrors() {
        Random random = new Random(23);
        for (int i = 0; i < 8; i++) {
            int n = 2 + i % 3;
            Matrix a = state(random, n, i);
            Matrix b = state(random, n, i / 2);
            double epsilon = 0.01 + 0.3 * random.nextDouble();
            BigDecimal best = supremum(meant(a), meant(b), new BigDecimal(epsilon));
            Enclosure beta = HypothesisPair.of(given(a), given(b)).typeTwoError(epsilon);
            // t is within 1e-12 of the best: second order in it where the curve is smooth, at most first order
            // elsewhere
            assertTrue(beta.widen(1e-11).contains(best), "case " + i + ": " + best + " is not in " + beta);
            assertTrue(
                    best.compareTo(beta.upperWide().toBigDecimal()) <= 0,
                    "case " + i + ": " + best + " exceeds " + beta);
            assertTrue(beta.width() < 1e-9, "case " + i + ": " + beta);
        }
    }

    private static BigDecimal supremum(ReferenceOperator a, ReferenceOperator b, BigDecimal epsilon) {
        double low = -12;
        double high = 12;
        double ratio = (Math.sqrt(5) - 1) / 2;
        double x = high - ratio * (high - low);
        double y = low + ratio * (high - low);
        BigDecimal gx = line(a, b, x, epsilon);
        BigDecimal gy = line(a, b, y, epsilon);
        while (high - low > 1e-12) {
            if (gx.compareTo(gy) < 0) {
                low = x;
                x = y;
                gx = gy;
                y = low + ratio * (high - low);
                gy = line(a, b, y, epsilon);
            } else {
                high = y;
                y = x;
                gy = gx;
                x = high - ratio * (high - low);
                gx = line(a, b, x, epsilon);
            }
        }
        return gx.max(gy).max(BigDecimal.ZERO);
    }

    private static BigDecimal line(ReferenceOperator a, ReferenceOperator b, double lnT, BigDecimal epsilon) {
        BigDecimal t = new BigDecimal(Math.exp(lnT));
        return ReferenceMinimum.of(t, a, BigDecimal.ONE, b).value().subtract(t.multiply(epsilon));
    }
}
