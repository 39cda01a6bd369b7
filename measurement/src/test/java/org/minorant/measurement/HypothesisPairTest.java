package org.minorant.measurement;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.function.Executable;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.InvalidInputException;
import org.minorant.core.pair.PositivePair;

/** The minimum error and the curve of a hypothesis pair. Rows marked "computed" are from the project's sheet of check values. */
class HypothesisPairTest {

    private static final DensityOperator X1 = DensityOperator.ofBloch(0, 0, 0.9);
    private static final DensityOperator X2 = DensityOperator.ofBloch(0.6, 0, 0.5);

    /** Computed, 100-digit arithmetic. The decimals 0.9, 0.6, 0.5 and their doubles differ by 1e-17. */
    @Test
    void minimumErrorOfOneAndTwoCopies() {
        assertNear(0.3197224362268005353440389, HypothesisPair.of(X1, X2).minimumError(0.5), 1e-15);
        HypothesisPair two = HypothesisPair.of(Samples.power(X1, 2), Samples.power(X2, 2));
        assertNear(0.2574710914690333082964585, two.minimumError(0.5), 1e-15);
    }

    /** Computed, double precision and brute force: lengths, angle as a multiple of π, copies, value. */
    @ParameterizedTest
    @CsvSource({
        "0.8, 0.8, 0.5, 1, .21715728752538",
        "0.8, 0.8, 0.5, 2, .17503846381456",
        "0.8, 0.8, 0.5, 3, .11175761347764",
        "0.8, 0.8, 0.5, 6, .04717073694610",
        "0.8, 0.8, 0.5, 8, .02676518217410",
        "0.9, 0.5, 0.3333333333333333, 1, .30474375810233",
        "0.9, 0.5, 0.3333333333333333, 2, .22068476044478",
        "0.9, 0.5, 0.3333333333333333, 3, .17937071489262",
        "0.9, 0.5, 0.3333333333333333, 6, .10730473766671",
        "0.9, 0.5, 0.3333333333333333, 8, .07815095440532"
    })
    void minimumErrorOfCopies(double r, double s, double angle, int copies, double expected) {
        HypothesisPair pair = HypothesisPair.of(
                Samples.power(Samples.bloch(r, 0), copies), Samples.power(Samples.bloch(s, angle * Math.PI), copies));
        // half a unit of the last digit given; beyond dimension 64 a dense pair is known to 1e-12
        assertNear(expected, pair.minimumError(0.5), copies > 6 ? 2e-12 : 3e-13);
        assertEquals(expected, pair.minimumError(0.5).midpoint(), 1e-13);
    }

    /** Computed: this pair is never worth measuring at these priors; the value 0.3 is the smaller prior, exactly. */
    @Test
    void minimumErrorWithoutMeasuring() {
        HypothesisPair pair = HypothesisPair.of(Samples.bloch(0.7, 0), Samples.bloch(0.4, Math.acos(-0.3)));
        Enclosure e = pair.minimumError(0.3);
        assertNear(0.3, e, 1e-15);
    }

    @Test
    void priorsAreMeantExactly() {
        double[] a = {0.75, 0.25};
        double[] b = {0.125, 0.875};
        HypothesisPair pair = HypothesisPair.ofCurve(PositivePair.ofSpectra(a, b));
        Random random = new Random(11);
        for (int k = 0; k < 200; k++) {
            double p = k % 2 == 0 ? random.nextDouble() : Math.pow(10, -20 * random.nextDouble());
            BigDecimal q = BigDecimal.ONE.subtract(Samples.exact(p));
            BigDecimal exact = BigDecimal.ZERO;
            for (int i = 0; i < 2; i++) {
                exact = exact.add(Samples.exact(p).multiply(Samples.exact(a[i])).min(q.multiply(Samples.exact(b[i]))));
            }
            Enclosure e = pair.minimumError(p);
            assertTrue(e.contains(exact), "prior " + p);
            assertTrue(e.relativeWidth() < 1e-15, "prior " + p + ", width " + e.relativeWidth());
        }
    }

    @Test
    void certainPriorsLeaveNoError() {
        HypothesisPair pair = HypothesisPair.of(X1, X2);
        assertEquals(Enclosure.ZERO, pair.minimumError(0));
        assertEquals(Enclosure.ZERO, pair.minimumError(1));
    }

    @Test
    void traceMinimumIsThatOfTheCurve() {
        HypothesisPair pair = HypothesisPair.of(X1, X2);
        assertEquals(pair.curve().traceMinimum(2.5), pair.traceMinimum(2.5));
        // f(t) at t = (1-p)/p is the minimum error over p
        Enclosure scaled = pair.traceMinimum(3).times(0.25);
        assertTrue(scaled.isPossiblyBelow(pair.minimumError(0.25))
                && pair.minimumError(0.25).isPossiblyBelow(scaled));
    }

    @Test
    void pairGivenByItsCurve() {
        HypothesisPair pair = HypothesisPair.ofCurve(PositivePair.of(X1, X2));
        assertFalse(pair.hasStates());
        assertTrue(HypothesisPair.of(X1, X2).hasStates());
        assertEquals(X1, HypothesisPair.of(X1, X2).first());
        assertEquals(X2, HypothesisPair.of(X1, X2).second());
        assertEquals(HypothesisPair.of(X1, X2).minimumError(0.4), pair.minimumError(0.4));
        assertTrue(pair.toString().startsWith("HypothesisPair, dimension 2"));
    }

    @Test
    void refusals() {
        HypothesisPair pair = HypothesisPair.ofCurve(PositivePair.of(X1, X2));
        String cure = "; make the pair with HypothesisPair.of(first, second), or ask for errors instead of tests";
        assertRefusal(
                "HypothesisPair.helstromTest: the pair is known by its curve only, expected two states" + cure,
                () -> pair.helstromTest(0.5));
        assertRefusal(
                "HypothesisPair.neymanPearsonTest: the pair is known by its curve only, expected two states" + cure,
                () -> pair.neymanPearsonTest(0.5));
        assertRefusal(
                "HypothesisPair.first: the pair is known by its curve only, expected two states" + cure, pair::first);
        assertRefusal(
                "HypothesisPair.second: the pair is known by its curve only, expected two states" + cure, pair::second);
        assertRefusal(
                "HypothesisPair.minimumError: the prior is NaN, expected between 0.0 and 1.0; give a number in that range",
                () -> pair.minimumError(Double.NaN));
        assertRefusal(
                "HypothesisPair.minimumError: the prior is 1.5, expected between 0.0 and 1.0; give a number in that range",
                () -> pair.minimumError(1.5));
        assertRefusal(
                "HypothesisPair.helstromTest: the prior is -0.5, expected between 0.0 and 1.0; give a number in that range",
                () -> HypothesisPair.of(X1, X2).helstromTest(-0.5));
        assertRefusal(
                "HypothesisPair.typeTwoError: the type-I level is -1.0, expected between 0.0 and 1.7976931348623157E308; give"
                        + " a number in that range",
                () -> pair.typeTwoError(-1));
        assertRefusal(
                "HypothesisPair.tradeOffCurve: the tolerance is 0.0, expected between 2.2250738585072014E-308 and 1.0; give a"
                        + " number in that range",
                () -> pair.tradeOffCurve(0));
        assertRefusal(
                "HypothesisPair.tradeOffCurveAt: the type-I level is 2.0, expected between 0.0 and 1.0; give a number in that"
                        + " range",
                () -> pair.tradeOffCurveAt(0.5, 2));
        assertRefusal(
                "HypothesisPair.of: the second state has dimension 3, expected 2, as the others; all must act on the same"
                        + " space",
                () -> HypothesisPair.of(X1, DensityOperator.maximallyMixed(3)));
        assertRefusal(
                "HypothesisPair.ofCurve: the trace of the second operator is 1.5, expected 1 within 1.7763568394002505E-15; use"
                        + " PositivePair itself for operators that are not states",
                () -> HypothesisPair.ofCurve(PositivePair.ofSpectra(new double[] {0.5, 0.5}, new double[] {1, 0.5})));
    }

    static void assertRefusal(String message, Executable action) {
        assertEquals(message, assertThrows(InvalidInputException.class, action).getMessage());
    }

    static void assertNear(double expected, Enclosure actual, double distance) {
        assertTrue(
                Samples.near(actual, expected, distance),
                () -> "expected " + expected + " within " + distance + ", got " + actual.toIntervalString(17));
    }
}
