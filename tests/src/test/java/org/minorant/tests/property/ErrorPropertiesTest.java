package org.minorant.tests.property;

import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.util.List;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.constraints.IntRange;
import org.minorant.bounds.Bound;
import org.minorant.bounds.Ledger;
import org.minorant.bounds.Side;
import org.minorant.bounds.TestingBounds;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.measurement.BinaryTest;
import org.minorant.measurement.Ensemble;
import org.minorant.measurement.HypothesisPair;
import org.minorant.measurement.PrettyGoodMeasurement;
import org.minorant.tests.reference.ReferenceDivergences;
import org.minorant.tests.reference.ReferenceOperator;

/** Theorems about errors, across the modules: what measures, what bounds, and the curve below both. */
class ErrorPropertiesTest {

    private static final String SEED = "20262";
    private static final int TRIES = 60;

    private static void below(Enclosure least, Enclosure most, String what) {
        assertTrue(least.isPossiblyBelow(most), () -> what + ": " + least + " exceeds " + most);
    }

    /** A prior k/64. */
    private static double prior(Exactly draw) {
        return (1 + draw.random().nextInt(63)) * 0x1p-6;
    }

    /** Barnum and Knill, J. Math. Phys. 43, 2097 (2002), from memory: the square-root measurement succeeds at least with the square of the best probability. */
    @Property(seed = SEED, tries = TRIES)
    void barnumAndKnill(
            @ForAll long seed, @ForAll @IntRange(min = 1, max = 5) int n, @ForAll Spectrum a, @ForAll Spectrum b) {
        Exactly draw = new Exactly(seed);
        DensityOperator rho = ExactState.draw(draw, n, a).asState();
        DensityOperator sigma = ExactState.draw(draw, n, b).asState();
        double p = prior(draw);
        Enclosure best = HypothesisPair.of(rho, sigma).minimumError(p);
        PrettyGoodMeasurement m = PrettyGoodMeasurement.of(Ensemble.of(List.of(rho, sigma), new double[] {p, 1 - p}));
        below(best, m.errorProbability(), "optimality");
        Enclosure success = best.complement();
        below(success.times(success), m.successProbability(), "the square");
        below(m.errorProbability(), best.times(2), "twice the error");
    }

    /**
     * f ≤ a^s b^(1−s) Tr ρ^s σ^(1−s) (Audenaert et al., PRL 98, 160501, 2007) and f ≥ ½ Σ min(aP, bQ) (Nussbaum and Szkoła, Ann. Stat. 37, 1040, 2009; both from
     * memory), the right sides by another arithmetic.
     */
    @Property(seed = SEED, tries = TRIES)
    void chernoffFromAboveNussbaumAndSzkolaFromBelow(
            @ForAll long seed,
            @ForAll @IntRange(min = 1, max = 4) int n,
            @ForAll Spectrum a,
            @ForAll Spectrum b,
            @ForAll @IntRange(min = 0, max = 16) int sixteenths) {
        Exactly draw = new Exactly(seed);
        ExactMatrix rho = ExactState.draw(draw, n, fullRank(a));
        ExactMatrix sigma = ExactState.draw(draw, n, fullRank(b));
        double p = prior(draw);
        double s = sixteenths / 16.0;
        Enclosure f = HypothesisPair.of(rho.asState(), sigma.asState()).minimumError(p);
        ReferenceDivergences d = ReferenceDivergences.of(
                ReferenceOperator.ofEntries(rho.re(), rho.im()), ReferenceOperator.ofEntries(sigma.re(), sigma.im()));
        Enclosure weights = Enclosure.exact(p)
                .ln()
                .times(s)
                .plus(Enclosure.exact(1 - p).ln().times(1 - s))
                .exp();
        below(f, weights.times(around(d.overlap(s))), "Chernoff");
        below(around(d.nussbaumSzkola(p)).times(0.5), f, "Nussbaum and Szkoła");
    }

    private static Spectrum fullRank(Spectrum s) {
        return s == Spectrum.DEFICIENT ? Spectrum.PRESCRIBED : s;
    }

    private static Enclosure around(BigDecimal value) {
        double v = value.doubleValue();
        return Enclosure.of(Math.nextDown(v), Math.nextUp(v));
    }

    /** β_ε = sup over t of Tr[tρ ∧ σ] − tε: no t gives more, and the best t found by sections gives as much. */
    @Property(seed = SEED, tries = TRIES)
    void typeTwoErrorIsTheLegendreTransformOfTheCurve(
            @ForAll long seed,
            @ForAll @IntRange(min = 1, max = 4) int n,
            @ForAll Spectrum a,
            @ForAll Spectrum b,
            @ForAll @IntRange(min = 1, max = 63) int level) {
        Exactly draw = new Exactly(seed);
        HypothesisPair pair = HypothesisPair.of(
                ExactState.draw(draw, n, a).asState(),
                ExactState.draw(draw, n, b).asState());
        double epsilon = level * 0x1p-6;
        Enclosure beta = pair.typeTwoError(epsilon);
        double low = -30;
        double high = 30;
        double ratio = (Math.sqrt(5) - 1) / 2;
        while (high - low > 1e-9) {
            double x = high - ratio * (high - low);
            double y = low + ratio * (high - low);
            Enclosure gx = line(pair, Math.exp(x), epsilon);
            Enclosure gy = line(pair, Math.exp(y), epsilon);
            below(gx, beta, "the line at t = " + Math.exp(x));
            below(gy, beta, "the line at t = " + Math.exp(y));
            if (gx.midpoint() < gy.midpoint()) {
                low = x;
            } else {
                high = y;
            }
        }
        Enclosure best = line(pair, Math.exp(low), epsilon).max(Enclosure.ZERO);
        // t is within 2e-9 of the best one, relatively, and g changes by at most t per unit of t: by Δt(1 + ε), with t
        // ≤ 1/(1−ε) where β > 0 matters
        below(beta, best.widen(4e-9 * Math.max(1, Math.exp(low))), "the supremum");
    }

    private static Enclosure line(HypothesisPair pair, double t, double epsilon) {
        return pair.curve().traceMinimum(t, 1).minus(Enclosure.exact(t).times(epsilon));
    }

    /** Helstrom's test and that of Neyman and Pearson attain what is promised for the best ones, and no better. */
    @Property(seed = SEED, tries = TRIES)
    void testsAttainTheirErrors(
            @ForAll long seed,
            @ForAll @IntRange(min = 1, max = 4) int n,
            @ForAll Spectrum a,
            @ForAll Spectrum b,
            @ForAll @IntRange(min = 1, max = 63) int level) {
        Exactly draw = new Exactly(seed);
        HypothesisPair pair = HypothesisPair.of(
                ExactState.draw(draw, n, a).asState(),
                ExactState.draw(draw, n, b).asState());
        double p = prior(draw);
        BinaryTest helstrom = pair.helstromTest(p);
        Enclosure best = pair.minimumError(p);
        below(best, helstrom.meanError(p), "a test below the least error");
        below(helstrom.meanError(p), best.widen(1e-13), "Helstrom's test");
        double epsilon = level * 0x1p-6;
        BinaryTest neymanPearson = pair.neymanPearsonTest(epsilon);
        below(neymanPearson.typeOneError(), Enclosure.exact(epsilon).widen(1e-12), "the level");
        below(pair.typeTwoError(epsilon), neymanPearson.typeTwoError().widen(1e-12), "a test below the least error");
        below(neymanPearson.typeTwoError(), pair.typeTwoError(epsilon).widen(1e-9), "the test at level " + epsilon);
    }

    /** Every bound in the ledger is on its side of the exact value. */
    @Property(seed = SEED, tries = TRIES)
    void theLedgerIsInOrder(
            @ForAll long seed, @ForAll @IntRange(min = 1, max = 4) int n, @ForAll Spectrum a, @ForAll Spectrum b) {
        Exactly draw = new Exactly(seed);
        HypothesisPair pair = HypothesisPair.of(
                ExactState.draw(draw, n, a).asState(),
                ExactState.draw(draw, n, b).asState());
        double p = prior(draw);
        Enclosure exact = pair.minimumError(p);
        Ledger ledger = TestingBounds.of(pair, p);
        for (Bound bound : ledger.bounds(Side.LOWER)) {
            below(bound.value(), exact, bound.toString());
        }
        for (Bound bound : ledger.bounds(Side.UPPER)) {
            below(exact, bound.value(), bound.toString());
        }
        assertTrue(
                ledger.bounds(Side.LOWER).size() >= 3
                        && ledger.bounds(Side.UPPER).size() >= 3,
                ledger::toString);
    }
}
