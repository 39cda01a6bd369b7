package org.minorant.measurement;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.minorant.measurement.HypothesisPairTest.assertRefusal;

import java.util.List;
import org.junit.jupiter.api.Test;
import org.minorant.core.DensityOperator;

class EnsembleTest {

    private static final DensityOperator UP = DensityOperator.ofKet(1, 0);
    private static final DensityOperator PLUS = DensityOperator.ofKet(0.6, 0.8);

    @Test
    void holdsStatesAndPriors() {
        double[] priors = {0.25, 0.75};
        Ensemble e = Ensemble.of(List.of(UP, PLUS), priors);
        priors[0] = 9;
        e.priors()[1] = 9;
        assertArrayEquals(new double[] {0.25, 0.75}, e.priors());
        assertEquals(2, e.size());
        assertEquals(2, e.dimension());
        assertEquals(PLUS, e.state(1));
        assertEquals(List.of(UP, PLUS), e.states());
        assertEquals(0.25, e.prior(0));
        assertEquals("Ensemble of 2 states, dimension 2", e.toString());
    }

    @Test
    void averageStateIsTheMixture() {
        DensityOperator average =
                Ensemble.of(List.of(UP, PLUS), new double[] {0.25, 0.75}).averageState();
        assertEquals(0.25 + 0.75 * 0.36, average.re(0, 0), 1e-16);
        assertEquals(0.75 * 0.48, average.re(0, 1), 1e-16);
        assertTrue(average.traceEnclosure().contains(1));
    }

    @Test
    void equiprobableStates() {
        Ensemble e = Ensemble.equiprobable(List.of(UP, PLUS, UP));
        assertEquals(1.0 / 3, e.prior(2));
    }

    @Test
    void refusals() {
        assertRefusal(
                "Ensemble.of: there is no state, expected at least one; give at least one",
                () -> Ensemble.of(List.of(), new double[0]));
        assertRefusal(
                "Ensemble.equiprobable: there is no state, expected at least one; give at least one",
                () -> Ensemble.equiprobable(List.of()));
        assertRefusal(
                "Ensemble.of: 2 states and 1 priors, expected as many of each; give one prior per state",
                () -> Ensemble.of(List.of(UP, PLUS), new double[] {1}));
        assertRefusal(
                "Ensemble.of: state 1 has dimension 3, expected 2, as the others; all must act on the same space",
                () -> Ensemble.of(List.of(UP, DensityOperator.maximallyMixed(3)), new double[] {0.5, 0.5}));
        assertRefusal(
                "Ensemble.of: probability 1 is NaN, expected between 0.0 and 1.0; give a number in that range",
                () -> Ensemble.of(List.of(UP, PLUS), new double[] {0.5, Double.NaN}));
        assertRefusal(
                "Ensemble.of: probability 0 is -0.5, expected between 0.0 and 1.0; give a number in that range",
                () -> Ensemble.of(List.of(UP, PLUS), new double[] {-0.5, 1.5}));
        assertRefusal(
                "Ensemble.of: the probabilities sum to 0.9, expected 1 within 1.7763568394002505E-15; divide them by their sum",
                () -> Ensemble.of(List.of(UP, PLUS), new double[] {0.5, 0.4}));
        Ensemble e = Ensemble.equiprobable(List.of(UP, PLUS));
        assertRefusal("Ensemble.state: the index is 2, expected between 0 and 1; count from 0", () -> e.state(2));
        assertRefusal("Ensemble.prior: the index is -1, expected between 0 and 1; count from 0", () -> e.prior(-1));
    }
}
