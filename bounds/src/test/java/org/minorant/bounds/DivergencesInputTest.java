package org.minorant.bounds;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;

import java.util.List;
import java.util.function.BiFunction;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;
import org.minorant.core.InvalidInputException;

/** What the divergences refuse, and how they say it. */
class DivergencesInputTest {

    private static final DensityOperator RHO = DensityOperator.ofBloch(0, 0, 0.5);
    private static final DensityOperator SIGMA = DensityOperator.ofBloch(0.5, 0, 0);
    private static final Information RATE = Information.ofNats(0.1);

    private static String refusal(Runnable call) {
        return assertThrows(InvalidInputException.class, call::run).getMessage();
    }

    @Test
    void differentDimensions() {
        DensityOperator large = DensityOperator.maximallyMixed(3);
        List<BiFunction<DensityOperator, DensityOperator, Object>> all = List.of(
                Divergences::relativeEntropy,
                Divergences::relativeEntropyVariance,
                (a, b) -> Divergences.petzRenyi(a, b, 0.5),
                (a, b) -> Divergences.sandwichedRenyi(a, b, 0.5),
                Divergences::maxDivergence,
                Divergences::minDivergence,
                Divergences::fidelity,
                Divergences::buresDistance,
                Divergences::buresAngle,
                Divergences::chernoff,
                (a, b) -> Divergences.hoeffding(a, b, RATE),
                (a, b) -> Divergences.strongConverse(a, b, RATE),
                (a, b) -> Divergences.hypothesisTesting(a, b, 0.1));
        for (BiFunction<DensityOperator, DensityOperator, Object> f : all) {
            InvalidInputException e = assertThrows(InvalidInputException.class, () -> f.apply(RHO, large));
            assertEquals("the second operator has dimension 3", e.found());
            assertEquals("2, as the first", e.limit());
        }
        assertEquals(
                "Divergences.hoeffding: the second operator has dimension 3, expected 2, as the first; both must act on the same space",
                refusal(() -> Divergences.hoeffding(RHO, large, RATE)));
    }

    @ParameterizedTest
    @ValueSource(doubles = {0, -1, 1, Double.NaN, Double.POSITIVE_INFINITY})
    void ordersOfPetz(double alpha) {
        refusal(() -> Divergences.petzRenyi(RHO, SIGMA, alpha));
    }

    @ParameterizedTest
    @ValueSource(doubles = {0, 0.49, 1, Double.NaN, Double.POSITIVE_INFINITY})
    void ordersOfTheSandwichedFamily(double alpha) {
        refusal(() -> Divergences.sandwichedRenyi(RHO, SIGMA, alpha));
    }

    @Test
    void ordersAreRefusedWithACure() {
        assertEquals(
                "Divergences.petzRenyi: the order is 1.0, expected at least 2.2250738585072014E-308, finite and not 1; use relativeEntropy, the limit",
                refusal(() -> Divergences.petzRenyi(RHO, SIGMA, 1)));
        assertEquals(
                "Divergences.sandwichedRenyi: the order is Infinity, expected at least 0.5, finite and not 1; use maxDivergence, the limit of the sandwiched family",
                refusal(() -> Divergences.sandwichedRenyi(RHO, SIGMA, Double.POSITIVE_INFINITY)));
        assertEquals(
                "Divergences.sandwichedRenyi: the order is 0.25, expected at least 0.5, finite and not 1; use petzRenyi, which is defined for every positive order",
                refusal(() -> Divergences.sandwichedRenyi(RHO, SIGMA, 0.25)));
    }

    @Test
    void rates() {
        for (Information bad : List.of(
                Information.ofNats(-1e-9),
                Information.ofNats(Double.POSITIVE_INFINITY),
                Information.ofNats(Enclosure.unknown()))) {
            refusal(() -> Divergences.hoeffding(RHO, SIGMA, bad));
            refusal(() -> Divergences.strongConverse(RHO, SIGMA, bad));
        }
        assertEquals(
                "Divergences.hoeffding: the rate is [-1, -1] nat, expected at least 0 and finite; give a rate in that range",
                refusal(() -> Divergences.hoeffding(RHO, SIGMA, Information.ofNats(-1))));
    }

    @ParameterizedTest
    @ValueSource(doubles = {-1e-9, 1, 2, Double.NaN})
    void levels(double level) {
        refusal(() -> Divergences.hypothesisTesting(RHO, SIGMA, level));
    }

    /** An enclosed rate gives the hull of the values at its ends, as both functions are monotone. */
    @Test
    void anEnclosedRate() {
        Information wide = Information.ofNats(Enclosure.of(0.1, 0.2));
        for (double r : new double[] {0.1, 0.15, 0.2}) {
            Information at = Information.ofNats(r);
            assertEquals(
                    true,
                    Divergences.hoeffding(RHO, SIGMA, wide)
                            .nats()
                            .contains(Divergences.hoeffding(RHO, SIGMA, at).nats()));
            Information high = Information.ofNats(r + 1);
            assertEquals(
                    true,
                    Divergences.strongConverse(RHO, SIGMA, Information.ofNats(Enclosure.of(1.1, 1.2)))
                            .nats()
                            .contains(
                                    Divergences.strongConverse(RHO, SIGMA, high).nats()));
        }
    }
}
