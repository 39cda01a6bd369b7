package org.minorant.core.pair;

import static org.junit.jupiter.api.Assertions.assertTrue;

import org.junit.jupiter.api.Test;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;

/** A pure state against a multiple of a full-rank one, about the weight at which it stops being too large for it. */
class SecularRootTest {

    private static final double[] ASIDE = {-0.25, -1e-3, -1e-6, -1e-9, -1e-12, 0, 1e-12, 1e-9, 1e-6, 1e-3, 0.25};

    /** f(t) = min(1, t/2) for any ket against the maximally mixed qubit: exact, with a kink at t = 2. */
    @Test
    void keepsItsDigitsAtTheKink() {
        PositivePair pair = PositivePair.of(DensityOperator.ofKet(0.6, 0.8), DensityOperator.ofReal(new double[][] {
            {0.5, 0}, {0, 0.5}
        }));
        for (double x : ASIDE) {
            double t = 2 + x;
            Enclosure f = pair.traceMinimum(t);
            // 0.36 + 0.64 and the doubles of 0.6 and 0.8 agree to 1e-16
            assertTrue(Math.abs(f.midpoint() - Math.min(1, t / 2)) < 1e-15, () -> t + ": " + f.toIntervalString(17));
            assertTrue(f.width() < 2e-15, () -> t + ": width " + f.width());
        }
    }

    /** Σ w_i/(λ + t b_i) = 1 with w = (½, ½), b = (¼, ¾): f = 1 − λ and λ the root of a quadratic; the kink is where Σ w_i/b_i = t. */
    @Test
    void keepsItsDigitsAtTheKinkOfTwoEigenvalues() {
        PositivePair pair = PositivePair.of(
                DensityOperator.ofKet(Math.sqrt(0.5), Math.sqrt(0.5)), DensityOperator.ofEigenvalues(0.25, 0.75));
        double kink = 0.5 / 0.25 + 0.5 / 0.75;
        for (double x : ASIDE) {
            double t = kink + x;
            double p = t * 0.25;
            double q = t * 0.75;
            // λ² + (p + q − 1)λ + pq − (p + q)/2 = 0
            double b = p + q - 1;
            double c = p * q - (p + q) / 2;
            double lambda = c >= 0 ? 0 : -2 * c / (b + Math.sqrt(b * b - 4 * c));
            Enclosure f = pair.traceMinimum(t);
            assertTrue(Math.abs(f.midpoint() - (1 - lambda)) < 2e-15, () -> t + ": " + f.toIntervalString(17));
            assertTrue(f.width() < 2e-15, () -> t + ": width " + f.width());
        }
    }
}
