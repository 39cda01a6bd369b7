package org.minorant.bounds;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Random;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.constraints.IntRange;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;
import org.minorant.bounds.divergence.TestStates;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.InvalidInputException;
import org.minorant.measurement.HypothesisPair;

/** Bounds on the least type-II error, of one copy and of many: closed forms, the steps of their derivations, and against the exact value. */
class TypeTwoBoundsTest {

    /** Bloch lengths 0.9 and 0.5 at 60 degrees. */
    private static final HypothesisPair OBLIQUE = HypothesisPair.of(
            DensityOperator.ofBloch(0, 0, 0.9), DensityOperator.ofBloch(0.5 * Math.sqrt(0.75), 0, 0.25));

    private static final HypothesisPair CLASSICAL = HypothesisPair.of(
            DensityOperator.ofEigenvalues(0.7, 0.2, 0.1), DensityOperator.ofEigenvalues(0.5, 0.3, 0.2));

    private static void assertOrdered(Ledger ledger) {
        Enclosure exact = ledger.exact().orElseThrow().value();
        for (Bound b : ledger) {
            boolean right =
                    b.side() == Side.LOWER ? b.value().isPossiblyBelow(exact) : exact.isPossiblyBelow(b.value());
            assertTrue(right, () -> b + " against the exact " + exact.toIntervalString(17));
        }
    }

    private static List<String> names(Ledger ledger) {
        return ledger.bounds().stream().map(b -> b.theorem().name()).toList();
    }

    /** Against the exact value over random pairs of every kind; the ledger itself refuses bounds that cross. */
    @Property(tries = 30)
    void oneCopy(
            @ForAll long seed,
            @ForAll @IntRange(min = 1, max = 4) int d,
            @ForAll TestStates.Kind first,
            @ForAll TestStates.Kind second) {
        Random random = new Random(seed);
        HypothesisPair pair = HypothesisPair.of(TestStates.of(first, d, random), TestStates.of(second, d, random));
        for (double level : new double[] {0, 1e-3, 0.3, 0.9, 1}) {
            assertOrdered(TestingBounds.typeTwo(pair, level));
        }
    }

    @Property(tries = 8)
    void copiesOfQubits(@ForAll long seed, @ForAll @IntRange(min = 2, max = 25) int n) {
        Random random = new Random(seed);
        double angle = 0.2 + 2.6 * random.nextDouble();
        double r = 0.2 + 0.7 * random.nextDouble();
        double s = 0.2 + 0.7 * random.nextDouble();
        HypothesisPair many = HypothesisPair.of(
                        DensityOperator.ofBloch(0, 0, r),
                        DensityOperator.ofBloch(s * Math.sin(angle), 0, s * Math.cos(angle)))
                .copies(n)
                .withTolerance(1e-4);
        Ledger ledger = TestingBounds.typeTwo(many, 0.02);
        assertOrdered(ledger);
        assertTrue(names(ledger).contains("half the Nussbaum-Szkola type-II error"), ledger::toString);
        assertTrue(names(ledger).contains("sandwiched strong converse"), ledger::toString);
    }

    /** Commuting states and a ket against a mixed state have exact values at large n, where the Stein bounds say something. */
    @ParameterizedTest
    @CsvSource({"100, 0.1", "700, 0.001", "1000, 0.9", "10000, 0.5"})
    void manyCopies(int n, double level) {
        Ledger classical = TestingBounds.typeTwo(CLASSICAL.copies(n), level);
        assertOrdered(classical);
        HypothesisPair ket = HypothesisPair.of(DensityOperator.ofKet(1, 0), DensityOperator.ofBloch(0.3, 0, 0.4));
        Ledger quantum = TestingBounds.typeTwo(ket.copies(Math.min(n, 1000)), level);
        assertOrdered(quantum);
        if (level >= 0.5) {
            Ledger l = n == 1000 ? quantum : classical;
            assertTrue(names(l).contains("finite-sample Stein bound, from below"), l::toString);
            assertTrue(names(l).contains("finite-sample Stein bound, from above"), l::toString);
        }
    }

    /** Where the states commute, the Nussbaum–Szkoła distributions are their spectra. */
    @ParameterizedTest
    @ValueSource(ints = {1, 20, 500})
    void nussbaumSzkolaOfCommutingStates(int n) {
        HypothesisPair many = CLASSICAL.copies(n);
        double expected = many.typeTwoError(0.02).lnLower() - Math.log(2);
        Enclosure e = new HalfNussbaumSzkolaTypeTwo()
                .on(TypeTwoProblem.of(many, 0.01))
                .orElseThrow()
                .value();
        // 0.7 and its like are known to 2^-53, n times, and the level moves the value by its own rounding; values of
        // the supremum to 2^-47
        assertEquals(expected, e.lnLower(), n * 1e-15 + 1e-13);
    }

    /** Eigenvalues 0.95, 0.05 and 0.75, 0.25, squared overlaps 0.75 and 0.25; the formula on a grid of s. */
    @ParameterizedTest
    @CsvSource({"1, 0.01", "40, 0.001"})
    void hoeffdingAtTheBestOfAGrid(int n, double level) {
        double best = Double.POSITIVE_INFINITY;
        for (double s = 1e-4; s < 1; s += 1e-4) {
            double t = 1 - s;
            double q = 0.75 * (Math.pow(0.95, s) * Math.pow(0.75, t) + Math.pow(0.05, s) * Math.pow(0.25, t))
                    + 0.25 * (Math.pow(0.95, s) * Math.pow(0.25, t) + Math.pow(0.05, s) * Math.pow(0.75, t));
            double factor = t * Math.pow(s, s / t);
            best = Math.min(best, Math.log(factor) + (n * Math.log(q) - s * Math.log(level)) / t);
        }
        Enclosure e = new FiniteHoeffding()
                .on(TypeTwoProblem.of(OBLIQUE.copies(n), level))
                .orElseThrow()
                .value();
        // flat at the minimum: a grid of 1e-4 misses it by about 1e-8 (1 + n)
        assertEquals(best, e.lnUpper(), 2e-8 * (1 + n));
        assertTrue(e.relativeWidth() < 1e-12, e::toString);
    }

    /** β ≥ (1−ε)^(α/(α−1)) e^(−nD̃_α) at every α, with D̃_2 = 0.533455961318 (computed with high precision by an independent program). */
    @Test
    void converseAtOrderTwo() {
        TypeTwoProblem problem = TypeTwoProblem.of(OBLIQUE.copies(10), 0.1);
        assertEquals(
                2 * Math.log(0.9) - 10 * 0.533455961318,
                SandwichedConverse.value(problem, 2).midpoint(),
                1e-10);
    }

    /** Steps 1 and 2 of the derivation in Stein: u D_(1+u) ≤ uD + 2cosh(2u ln η) − 2 for u of either sign up to ¼. */
    @Property(tries = 40)
    void divergencesNearOrderOne(@ForAll long seed, @ForAll @IntRange(min = 2, max = 4) int d) {
        Random random = new Random(seed);
        DensityOperator rho = TestStates.of(TestStates.Kind.RANDOM, d, random);
        DensityOperator sigma = TestStates.of(TestStates.Kind.RANDOM, d, random);
        double relative = Divergences.relativeEntropy(rho, sigma).nats().upper();
        double eta = 1
                + Math.exp(0.5 * Divergences.petzRenyi(rho, sigma, 1.5).nats().upper())
                + Math.exp(-0.5 * Divergences.petzRenyi(rho, sigma, 0.5).nats().lower());
        for (double t : new double[] {0.01, 0.1, 0.25}) {
            double slack = (2 * Math.cosh(2 * t * Math.log(eta)) - 2) / t + 1e-12;
            assertTrue(Divergences.petzRenyi(rho, sigma, 1 + t).nats().lower() <= relative + slack);
            assertTrue(Divergences.petzRenyi(rho, sigma, 1 - t).nats().upper() >= relative - slack);
        }
    }

    /** D, V: computed by an independent program; Φ⁻¹(0.001) = −3.090232306167813 from tables (from memory). */
    @Test
    void secondOrder() {
        SecondOrder e = SecondOrder.of(OBLIQUE.copies(100), 1e-3);
        assertEquals(39.1285208490 - 3.090232306167813 * Math.sqrt(49.8794341736), e.nats(), 1e-8);
        assertEquals(e.nats() / Math.log(2), e.bits(), 1e-12);
        assertEquals(
                50 * 0.391285208490, SecondOrder.of(OBLIQUE.copies(50), 0.5).nats(), 1e-9);
        DensityOperator ket = DensityOperator.ofKet(1, 0);
        HypothesisPair disjoint = HypothesisPair.of(DensityOperator.ofBloch(0, 0, 0), ket);
        assertEquals(Double.POSITIVE_INFINITY, SecondOrder.of(disjoint, 0.1).nats());
        assertThrows(InvalidInputException.class, () -> SecondOrder.of(OBLIQUE, 0));
    }

    /** V. Strassen 1962: what is missing for commuting states is ½ ln n and a constant (from memory). */
    @ParameterizedTest
    @ValueSource(ints = {100, 10_000})
    void secondOrderAgainstTheExactValue(int n) {
        HypothesisPair many = CLASSICAL.copies(n);
        double missing = many.hypothesisTestingDivergence(0.1).nats().midpoint()
                - SecondOrder.of(many, 0.1).nats();
        assertEquals(0.5 * Math.log(n), missing, 1);
    }

    @Test
    void refusals() {
        assertThrows(InvalidInputException.class, () -> TestingBounds.typeTwo(OBLIQUE, -0.1));
        assertThrows(InvalidInputException.class, () -> TestingBounds.typeTwo(OBLIQUE, Double.NaN));
        assertEquals(7, TestingBounds.knownTypeTwo().size());
        Ledger curve = TestingBounds.typeTwo(HypothesisPair.ofCurve(CLASSICAL.curve()), 0.1);
        assertEquals(List.of("quantum Neyman-Pearson duality", "reject at random"), names(curve));
    }
}
