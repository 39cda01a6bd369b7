package org.minorant.bounds;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Map;
import java.util.TreeMap;
import org.junit.jupiter.api.Test;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;
import org.minorant.core.InvalidInputException;
import org.minorant.measurement.HypothesisPair;

class ExponentFitTest {

    /** P_e = ½(1 − √(1 − c^(2n))) ≈ ¼ c^(2n) (1 + c^(2n)/4) for kets of overlap c: no power of n, constant ln 4. */
    @Test
    void kets() {
        HypothesisPair pair = HypothesisPair.of(DensityOperator.ofKet(1, 0), DensityOperator.ofKet(0.6, 0.8));
        ExponentFit fit = ExponentFit.of(pair, 0.5, 30, 100, 1000);
        assertEquals(-2 * Math.log(0.6), fit.exponent().nats().midpoint(), 1e-14);
        // n C carries an error of a unit in the last place of C, n times
        assertEquals(0, fit.power(), 1e-11);
        assertEquals(Math.log(4), fit.constant(), 1e-11);
        assertTrue(fit.largestResidual() < 1e-11);
        assertEquals(Math.log(0.25) + 400 * Math.log(0.6), fit.lnError(200), 1e-10);
    }

    /** Errors computed with 100 digits by an independent program: Bloch lengths 0.8 at a right angle, C = ln 1.25. */
    @Test
    void publishedFormForQubits() {
        ExponentFit fit = ExponentFit.of(
                Information.ofNats(Enclosure.exact(1.25).ln()),
                new TreeMap<>(Map.of(
                        50,
                        Enclosure.exact(9.518055466899646216e-07),
                        100,
                        Enclosure.exact(9.488101618446099071e-12))));
        double power =
                (Math.log(9.518055466899646216e-07 / 9.488101618446099071e-12) - 50 * Math.log(1.25)) / Math.log(2);
        assertEquals(power, fit.power(), 1e-12);
        // the square root of n of sums of independent numbers, as for commuting states; not asymptotic yet at n = 100
        assertEquals(0.5, fit.power(), 0.03);
        assertTrue(fit.largestResidual() < 1e-13);
        assertEquals(Math.log(9.488101618446099071e-12), fit.lnError(100), 1e-12);
    }

    /** Commuting states off any lattice: γ → ½. */
    @Test
    void commutingStates() {
        HypothesisPair pair = HypothesisPair.of(
                DensityOperator.ofEigenvalues(0.7, 0.2, 0.1), DensityOperator.ofEigenvalues(0.2, 0.3, 0.5));
        ExponentFit fit = ExponentFit.of(pair, 0.3, 500, 1000, 2000);
        // the next term is of order 1/n
        assertEquals(0.5, fit.power(), 0.01);
        assertTrue(fit.largestResidual() < 0.01);
    }

    @Test
    void refusals() {
        HypothesisPair pair = HypothesisPair.of(DensityOperator.ofKet(1, 0), DensityOperator.ofKet(0.6, 0.8));
        assertThrows(InvalidInputException.class, () -> ExponentFit.of(pair, 0.5, 3));
        assertThrows(InvalidInputException.class, () -> ExponentFit.of(pair, 0.5, 3, 3));
        assertThrows(InvalidInputException.class, () -> ExponentFit.of(pair, 0, 3, 4));
        HypothesisPair apart = HypothesisPair.of(DensityOperator.ofKet(1, 0), DensityOperator.ofKet(0, 1));
        assertThrows(InvalidInputException.class, () -> ExponentFit.of(apart, 0.5, 3, 4));
    }
}
