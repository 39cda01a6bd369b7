package org.minorant.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import org.junit.jupiter.api.Test;

/** Mixtures and weighted sums: which operator is meant, what the factor keeps, what is refused. */
class MixtureTest {

    private static final DensityOperator UP = DensityOperator.ofKet(1, 0, 0);
    private static final DensityOperator TILTED = DensityOperator.ofKet(0.6, 0.8, 0);

    @Test
    void mixtureOfKetsKeepsRankAndRelativeAccuracy() {
        DensityOperator m = DensityOperator.mixture(List.of(UP, TILTED), 0.3, 0.7);
        assertEquals(0.3 + 0.7 * 0.36, m.re(0, 0), 2e-16);
        assertEquals(0.7 * 0.48, m.re(0, 1), 2e-16);
        assertEquals(0, m.re(2, 2));
        assertEquals(2, m.factor().rank());
        assertEquals(0, m.factor().traceError());
        assertTrue(m.factor().relativeError() <= 0x1p-51);
        assertTrue(m.traceEnclosure().contains(1.0));
    }

    @Test
    void weightsThatArePowersOfFourCostNothing() {
        PositiveOperator p = UP.times(0x1p-700);
        assertEquals(0, p.factor().relativeError());
        assertEquals(0x1p-350, p.factor().columns().re(0, 0));
    }

    @Test
    void zeroWeightsLeaveNoColumn() {
        DensityOperator m = DensityOperator.mixture(List.of(UP, TILTED), 0, 1);
        assertEquals(1, m.factor().rank());
        assertEquals(0, UP.times(0).factor().columns().frobeniusUpper());
    }

    @Test
    void factorIsWorkedOutOnDemand() {
        DensityOperator d = DensityOperator.ofReal(new double[][] {{0.5, 0.25}, {0.25, 0.5}});
        PositiveOperator twice = d.plus(d);
        assertTrue(twice.knownColumns().isEmpty() && !d.isDefinedByFactor() && twice.isDefinedByFactor());
        assertEquals(4, twice.factor().rank());
        assertTrue(twice.knownColumns().isEmpty());
    }

    @Test
    void refusals() {
        assertRefusal(
                "DensityOperator.mixture: the weights sum to 0.9, expected 1 within 1.7763568394002505E-15; divide the weights by"
                        + " their sum, or use PositiveOperator.weightedSum",
                () -> DensityOperator.mixture(List.of(UP, TILTED), 0.5, 0.4));
        assertRefusal(
                "DensityOperator.mixture: weight 1 is NaN, expected between 0.0 and 1.7976931348623157E308; give a number in that"
                        + " range",
                () -> DensityOperator.mixture(List.of(UP, TILTED), 0.5, Double.NaN));
        assertRefusal(
                "DensityOperator.mixture: 2 operators and 1 weights, expected as many of each, at least 1; give one weight per"
                        + " operator",
                () -> DensityOperator.mixture(List.of(UP, TILTED), 1));
        assertRefusal(
                "DensityOperator.mixture: 0 operators and 0 weights, expected as many of each, at least 1; give one weight per"
                        + " operator",
                () -> DensityOperator.mixture(List.of()));
        assertRefusal(
                "PositiveOperator.weightedSum: the second operator is 2 x 2, expected 3 x 3, as the first; both must act on the same"
                        + " space",
                () -> UP.plus(DensityOperator.maximallyMixed(2)));
        assertRefusal(
                "PositiveOperator.weightedSum: weight 0 is -1.0, expected between 0.0 and 1.7976931348623157E308; give a number in"
                        + " that range",
                () -> UP.times(-1));
    }

    private static void assertRefusal(String message, org.junit.jupiter.api.function.Executable action) {
        assertEquals(message, assertThrows(InvalidInputException.class, action).getMessage());
    }
}
