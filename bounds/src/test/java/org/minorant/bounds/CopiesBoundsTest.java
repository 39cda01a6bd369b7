package org.minorant.bounds;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Random;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.constraints.IntRange;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.pair.PositivePair;
import org.minorant.measurement.HypothesisPair;

/** Bounds on the minimum error of n copies: closed forms, direct sums over all strings, and against the exact value. */
class CopiesBoundsTest {

    /** Bloch lengths 0.8 at a right angle: Tr √ρ√σ = 0.8, F² = 0.68. */
    private static final HypothesisPair RIGHT =
            HypothesisPair.of(DensityOperator.ofBloch(0, 0, 0.8), DensityOperator.ofBloch(0.8, 0, 0));

    private static Enclosure value(HypothesisPair pair, double prior, TestingBound bound) {
        return bound.on(TestingProblem.of(pair, prior)).orElseThrow().value();
    }

    /** Logarithms of one copy are known to a few 1e-15 and enter n times; so do the rounded numbers of the states. */
    private static void assertLn(double expected, Enclosure e, int n) {
        double tolerance = 5e-15 * n + 1e-15 * Math.abs(expected) + 1e-14;
        assertEquals(expected, e.lnLower(), tolerance);
        assertEquals(expected, e.lnUpper(), tolerance);
    }

    @ParameterizedTest
    @ValueSource(ints = {1, 3, 50, 4000})
    void powersAtAnyDepth(int n) {
        HypothesisPair many = RIGHT.copies(n);
        double half = Math.log(0.5);
        assertLn(half + n * Math.log(0.8), value(many, 0.5, new ChernoffAtHalf()), n);
        // by symmetry the best s is ½
        assertLn(half + n * Math.log(0.8), value(many, 0.5, new ChernoffBound()), n);
        assertLn(half + 0.5 * n * Math.log(0.68), value(many, 0.5, new FidelityFromAbove()), n);
        double f2 = Math.pow(0.68, n);
        // ½(1 − √(1 − x)) = x/(2(1 + √(1 − x))), which needs no small x
        double low = n * Math.log(0.68) - Math.log(2 * (1 + Math.sqrt(1 - f2)));
        assertLn(low, value(many, 0.5, new FidelityFromBelow()), n);
    }

    /** At the priors p and 1 − p the best s is that of p^s (1−p)^(1−s) Q_s^n, on a fine grid here. */
    @Test
    void theBestExponentMovesWithPriorAndCopies() {
        int n = 7;
        double p = 0.1;
        double best = Double.POSITIVE_INFINITY;
        for (double s = 0; s <= 1; s += 1e-5) {
            double t = 1 - s;
            double q = 0.5 * (Math.pow(0.9, s) + Math.pow(0.1, s)) * (Math.pow(0.9, t) + Math.pow(0.1, t));
            best = Math.min(best, s * Math.log(p) + t * Math.log(1 - p) + n * Math.log(q));
        }
        // the minimum is flat: a step of 1e-5 misses it by about n · 1e-10
        assertEquals(best, value(RIGHT.copies(n), p, new ChernoffBound()).lnUpper(), 2e-9);
    }

    /** Σ over all strings of pairs, one by one: eigenvalues (1 ± r)/2, squared overlaps (1 ± cos θ)/2 for qubits. */
    @ParameterizedTest
    @ValueSource(ints = {2, 3, 5})
    void nussbaumSzkolaAgainstAllStrings(int n) {
        double r = 0.9;
        double s = 0.5;
        double cosine = 0.28;
        double prior = 0.3;
        HypothesisPair pair =
                HypothesisPair.of(DensityOperator.ofBloch(0, 0, r), DensityOperator.ofBloch(s * 0.96, 0, s * cosine));
        double[] p = new double[4];
        double[] q = new double[4];
        for (int k = 0; k < 4; k++) {
            int i = k / 2;
            int j = k % 2;
            double overlap = 0.5 * (1 + (i == j ? cosine : -cosine));
            p[k] = overlap * 0.5 * (i == 0 ? 1 + r : 1 - r);
            q[k] = overlap * 0.5 * (j == 0 ? 1 + s : 1 - s);
        }
        double sum = 0;
        for (int string = 0; string < 1 << (2 * n); string++) {
            double a = prior;
            double b = 1 - prior;
            for (int k = 0; k < n; k++) {
                a *= p[string >> (2 * k) & 3];
                b *= q[string >> (2 * k) & 3];
            }
            sum += Math.min(a, b);
        }
        Enclosure e = value(pair.copies(n), prior, new HalfNussbaumSzkola());
        assertEquals(0.5 * sum, e.lower(), 1e-14);
        assertEquals(0.5 * sum, e.upper(), 1e-14);
    }

    /** Where the states commute the Nussbaum–Szkoła error is the error itself. */
    @ParameterizedTest
    @ValueSource(ints = {2, 40, 3000})
    void commutingStates(int n) {
        HypothesisPair many = HypothesisPair.of(
                        DensityOperator.ofEigenvalues(0.7, 0.2, 0.1), DensityOperator.ofEigenvalues(0.1, 0.3, 0.6))
                .copies(n);
        assertLn(
                many.minimumError(0.4).lnLower(),
                value(many, 0.4, new HalfNussbaumSzkola()).times(2),
                n);
    }

    /** For kets the lower fidelity bound is the error itself, (1 − √(1 − c^(2n)))/2, and the upper bounds are powers too. */
    @ParameterizedTest
    @ValueSource(ints = {2, 30, 5000})
    void kets(int n) {
        HypothesisPair many = HypothesisPair.of(DensityOperator.ofKet(1, 0), DensityOperator.ofKet(0.6, 0.8))
                .copies(n);
        assertLn(many.minimumError(0.5).lnLower(), value(many, 0.5, new FidelityFromBelow()), n);
        assertLn(Math.log(0.5) + 2 * n * Math.log(0.6), value(many, 0.5, new ChernoffBound()), n);
        assertLn(Math.log(0.25) + 2 * n * Math.log(0.6), value(many, 0.5, new HalfNussbaumSzkola()), n);
    }

    /** Against the exact value, which no bound may cross; on generic pairs by much more than rounding. */
    @Property(tries = 8)
    void boundsEncloseTheExactError(@ForAll long seed, @ForAll @IntRange(min = 2, max = 200) int n) {
        Random random = new Random(seed);
        double angle = 0.2 + 2.6 * random.nextDouble();
        double r = 0.2 + 0.75 * random.nextDouble();
        double s = 0.2 + 0.75 * random.nextDouble();
        double prior = 0.2 + 0.6 * random.nextDouble();
        HypothesisPair pair = HypothesisPair.of(
                DensityOperator.ofBloch(0, 0, r), DensityOperator.ofBloch(s * Math.sin(angle), 0, s * Math.cos(angle)));
        // the ledger itself refuses bounds that cross
        Ledger ledger = TestingBounds.of(pair.copies(n).withTolerance(1e-3), prior);
        assertEquals(3, ledger.bounds(Side.UPPER).size() - 1);
        assertEquals(2, ledger.bounds(Side.LOWER).size());
        Enclosure exact = ledger.exact().orElseThrow().value();
        for (Bound b : ledger.bounds(Side.LOWER)) {
            assertTrue(b.value().isCertainlyBelow(exact), b::toString);
            assertTrue(b.value().relativeWidth() < 1e-11, b::toString);
        }
        for (Bound b : ledger.bounds(Side.UPPER)) {
            if (!b.theorem().name().equals("guess without measuring")) {
                assertTrue(exact.isCertainlyBelow(b.value()), b::toString);
                assertTrue(b.value().relativeWidth() < 1e-11, b::toString);
            }
        }
    }

    /** Without states, or where too many types matter, what remains is still there. */
    @Test
    void boundsThatCannotBeHadAreLeftOut() {
        PositivePair curve = RIGHT.curve();
        Ledger ledger = TestingBounds.of(HypothesisPair.ofCurve(curve).copies(3), 0.5);
        assertEquals(
                List.of("Holevo-Helstrom", "guess without measuring"),
                ledger.bounds().stream().map(b -> b.theorem().name()).toList());
        assertEquals(
                List.of("guess without measuring"),
                TestingBounds.known().stream()
                        .map(b -> b.on(TestingProblem.of(RIGHT.copies(2), 1)))
                        .flatMap(java.util.Optional::stream)
                        .filter(b -> b.side() != Side.EXACT)
                        .map(b -> b.theorem().name())
                        .toList());
    }
}
