package org.minorant.bounds;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.Random;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.constraints.DoubleRange;
import net.jqwik.api.constraints.IntRange;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;
import org.minorant.bounds.divergence.TestStates;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.InvalidInputException;
import org.minorant.core.pair.PositivePair;
import org.minorant.measurement.HypothesisPair;

/** Every bound on the minimum error, against closed forms and against each other. */
class TestingBoundsTest {

    private static final DensityOperator RHO = DensityOperator.ofBloch(0, 0, 0.8);
    private static final DensityOperator SIGMA = DensityOperator.ofBloch(0.8, 0, 0);

    private static Enclosure value(Ledger ledger, String theorem) {
        return ledger.bounds().stream()
                .filter(b -> b.theorem().name().equals(theorem))
                .findFirst()
                .orElseThrow()
                .value();
    }

    private static void assertClose(double truth, Enclosure e, double tolerance) {
        assertEquals(truth, e.midpoint(), tolerance, () -> e.toIntervalString(17));
    }

    /** Bloch lengths 0.8 at a right angle, priors 0.3 and 0.7, all in closed form. */
    @Test
    void closedForms() {
        double p = 0.3;
        Ledger ledger = TestingBounds.of(HypothesisPair.of(RHO, SIGMA), p);
        assertEquals(9, ledger.bounds().size());
        double norm = Math.sqrt(0.8 * 0.8 * (0.09 + 0.49));
        assertClose(0.5 * (1 - Math.max(0.4, norm)), value(ledger, "Holevo-Helstrom"), 1e-15);
        assertClose(0.3, value(ledger, "guess without measuring"), 1e-15);
        // eigenvalues 0.9 and 0.1, all squared overlaps ½
        assertClose(
                0.25 * (0.27 + Math.min(0.27, 0.07) + 0.03 + 0.03),
                value(ledger, "half the Nussbaum-Szkola error"),
                1e-15);
        double q = Math.sqrt(0.21) * 0.5 * (0.9 + 0.1 + 2 * Math.sqrt(0.09));
        assertClose(q, value(ledger, "quantum Chernoff bound, s = 1/2"), 1e-15);
        // F² = ½(1 + r·s + (1 − r²)) for equal lengths
        double f2 = 0.5 * (1 + 1 - 0.64);
        assertClose(Math.sqrt(0.21 * f2), value(ledger, "fidelity, from above"), 1e-15);
        assertClose(0.5 * (1 - Math.sqrt(1 - 0.84 * f2)), value(ledger, "fidelity, from below"), 1e-15);
        double best = Double.POSITIVE_INFINITY;
        for (double s = 0; s <= 1; s += 1e-4) {
            double t = 1 - s;
            double trace = 0.5 * (Math.pow(0.9, s) + Math.pow(0.1, s)) * (Math.pow(0.9, t) + Math.pow(0.1, t));
            best = Math.min(best, Math.pow(p, s) * Math.pow(1 - p, t) * trace);
        }
        assertClose(best, value(ledger, "quantum Chernoff bound, best s"), 1e-8);
        assertClose(
                value(ledger, "pretty-good measurement").midpoint() / 2,
                value(ledger, "half the pretty-good error"),
                1e-16);
    }

    /** For kets the lower fidelity bound is the exact error, and the pretty-good measurement of equal priors is optimal. */
    @Test
    void kets() {
        DensityOperator a = DensityOperator.ofKet(0.6, 0.8);
        DensityOperator b = DensityOperator.ofKet(1, 0);
        Ledger ledger = TestingBounds.of(HypothesisPair.of(a, b), 0.5);
        double exact = 0.5 * (1 - 0.8);
        assertClose(exact, ledger.exact().orElseThrow().value(), 1e-16);
        assertClose(exact, value(ledger, "fidelity, from below"), 1e-16);
        assertClose(exact, value(ledger, "pretty-good measurement"), 1e-15);
        assertClose(0.18, value(ledger, "quantum Chernoff bound, best s"), 1e-15);
        assertClose(0.09, value(ledger, "half the Nussbaum-Szkola error"), 1e-16);
        assertClose(0.3, value(ledger, "fidelity, from above"), 1e-15);
    }

    /** The ledger itself throws if two bounds cross; here every kind of spectrum, any prior. */
    @Property(tries = 40)
    void boundsNeverCross(
            @ForAll long seed,
            @ForAll @IntRange(min = 1, max = 5) int d,
            @ForAll TestStates.Kind first,
            @ForAll TestStates.Kind second,
            @ForAll @DoubleRange(min = 0, max = 1) double prior) {
        Random random = new Random(seed);
        HypothesisPair pair = HypothesisPair.of(TestStates.of(first, d, random), TestStates.of(second, d, random));
        Ledger ledger = TestingBounds.of(pair, prior);
        Enclosure exact = ledger.exact().orElseThrow().value();
        for (Bound b : ledger) {
            assertTrue(
                    b.side() == Side.UPPER || b.value().isPossiblyBelow(exact),
                    () -> b + " exceeds the exact " + exact);
            assertTrue(
                    b.side() == Side.LOWER || exact.isPossiblyBelow(b.value()),
                    () -> b + " is below the exact " + exact);
        }
        assertTrue(exact.contains(ledger.enclosure()));
    }

    /** On generic pairs all inequalities are strict, by far more than any width: a factor lost anywhere would show. */
    @Property(tries = 25)
    void onGenericPairsBoundsAreStrict(@ForAll long seed, @ForAll @IntRange(min = 2, max = 5) int d) {
        Random random = new Random(seed);
        DensityOperator rho = TestStates.of(TestStates.Kind.RANDOM, d, random);
        DensityOperator sigma = TestStates.of(TestStates.Kind.RANDOM, d, random);
        double prior = 0.3 + 0.4 * random.nextDouble();
        Ledger ledger = TestingBounds.of(HypothesisPair.of(rho, sigma), prior);
        Enclosure exact = ledger.exact().orElseThrow().value();
        for (Bound b : ledger.bounds(Side.LOWER)) {
            assertTrue(b.value().isCertainlyBelow(exact), () -> b + " is not certainly below " + exact);
            // the Nussbaum-Szkola half never falls below half the error (Ann. Statist. 37, 1040, and 40 000 pairs tried
            // elsewhere: .5006 at
            // least)
            boolean halfOfIt = b.theorem().name().startsWith("half");
            assertTrue(!halfOfIt || b.value().upper() * 2 > exact.lower() * 0.6, b::toString);
        }
        for (Bound b : ledger.bounds(Side.UPPER)) {
            assertTrue(exact.isPossiblyBelow(b.value()), () -> b + " is below " + exact);
            assertTrue(b.value().relativeWidth() < 1e-11, b::toString);
        }
    }

    /** A pair and a prior for which the classical error between the two distributions is below the quantum one, 0.2641 against 0.2771. */
    @Test
    void theNussbaumSzkolaErrorItselfIsNoUpperBound() {
        HypothesisPair pair =
                HypothesisPair.of(DensityOperator.ofBloch(0.1, 0.2, 0.3), DensityOperator.ofBloch(0.5, 0.2, -0.3));
        Ledger ledger = TestingBounds.of(pair, 0.3);
        Enclosure classical = value(ledger, "half the Nussbaum-Szkola error").times(2);
        assertTrue(classical.upper() < ledger.exact().orElseThrow().value().lower() - 0.01, classical::toString);
    }

    @ParameterizedTest
    @ValueSource(doubles = {0, 1})
    void aCertainHypothesisIsNeverMistaken(double prior) {
        Ledger ledger = TestingBounds.of(HypothesisPair.of(RHO, SIGMA), prior);
        assertEquals(2, ledger.bounds().size());
        assertEquals(Enclosure.ZERO, ledger.exact().orElseThrow().value());
        assertEquals(Enclosure.ZERO, ledger.enclosure());
    }

    @ParameterizedTest
    @ValueSource(doubles = {1e-12, 1e-300, Double.MIN_VALUE, 1 - 1e-12})
    void extremePriors(double prior) {
        Ledger ledger = TestingBounds.of(HypothesisPair.of(RHO, SIGMA), prior);
        assertEquals(9, ledger.bounds().size());
        double least = Math.min(prior, 1 - prior);
        Enclosure exact = ledger.exact().orElseThrow().value();
        assertTrue(exact.lower() <= least && exact.upper() >= least * (1 - 1e-9), exact::toString);
    }

    @Test
    void aPairKnownByItsCurveHasTheBoundsThatNeedNoStates() {
        HypothesisPair pair = HypothesisPair.ofCurve(PositivePair.of(RHO, SIGMA));
        Ledger ledger = TestingBounds.of(pair, 0.5);
        assertEquals(2, ledger.bounds().size());
        assertEquals(
                TestingBounds.of(HypothesisPair.of(RHO, SIGMA), 0.5)
                        .exact()
                        .orElseThrow()
                        .value(),
                ledger.exact().orElseThrow().value());
    }

    @Test
    void aNewTheoremIsOneSmallClass() {
        Theorem theorem = new Theorem("nothing is negative", "arithmetic");
        TestingBound mine = problem -> problem.prior() == 0.5
                ? Optional.of(Bound.of(Side.LOWER, Enclosure.ZERO, theorem, List.of("p = 0.5")))
                : Optional.empty();
        HypothesisPair pair = HypothesisPair.of(RHO, SIGMA);
        assertEquals(10, TestingBounds.of(pair, 0.5, List.of(mine)).bounds().size());
        assertEquals(9, TestingBounds.of(pair, 0.4, List.of(mine)).bounds().size());
        TestingBound wrong = problem -> Optional.of(
                Bound.of(Side.LOWER, problem.pair().minimumError(0.5).times(1.001), theorem, List.of()));
        assertThrows(InconsistentBoundsException.class, () -> TestingBounds.of(pair, 0.5, List.of(wrong)));
    }

    @Test
    void everyBoundNamesItsSource() {
        List<String> names = new ArrayList<>();
        for (Bound b : TestingBounds.of(HypothesisPair.of(RHO, SIGMA), 0.25)) {
            names.add(b.theorem().name());
            assertTrue(b.theorem().source().length() > 10, b::toString);
        }
        assertEquals(names.size(), names.stream().distinct().count());
        assertEquals(names.size(), TestingBounds.known().size());
    }

    @ParameterizedTest
    @ValueSource(doubles = {-1e-9, 1.5, Double.NaN})
    void priorsOutOfRange(double prior) {
        HypothesisPair pair = HypothesisPair.of(RHO, SIGMA);
        assertThrows(InvalidInputException.class, () -> TestingBounds.of(pair, prior));
        InvalidInputException e = assertThrows(InvalidInputException.class, () -> TestingProblem.of(pair, prior));
        assertEquals("the prior is " + prior, e.found());
    }
}
