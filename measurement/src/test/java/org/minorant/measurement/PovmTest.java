package org.minorant.measurement;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.minorant.measurement.HypothesisPairTest.assertNear;
import static org.minorant.measurement.HypothesisPairTest.assertRefusal;

import java.util.ArrayList;
import java.util.List;
import java.util.Random;
import java.util.SplittableRandom;
import org.junit.jupiter.api.Test;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.HermitianOperator;
import org.minorant.core.Information;
import org.minorant.core.Operator;

/** Measurements: validation, probabilities, sampling, repair, scores. */
class PovmTest {

    private static final DensityOperator UP = DensityOperator.ofKet(1, 0);

    /** A random measurement S^(-½) A_j S^(-½) of random positive A_j, by the library's own repair. */
    private static Povm random(int dimension, int outcomes, Random random) {
        List<HermitianOperator> a = new ArrayList<>();
        for (int j = 0; j < outcomes; j++) {
            a.add(Samples.effect(dimension, random));
        }
        return Povm.nearest(a).povm();
    }

    @Test
    void probabilitiesOfABasis() {
        Povm z = Povm.ofBasis(Operator.ofReal(new double[][] {{1, 0}, {0, 1}}));
        List<Enclosure> p = z.probabilities(DensityOperator.ofKet(0x1p-80, 1));
        assertTrue(p.get(0).contains(0x1p-160) && p.get(0).relativeWidth() < 1e-8);
        assertNear(1, p.get(1), 3e-16);
        assertEquals(Enclosure.ZERO, z.probability(1, UP));
        assertEquals(2, z.size());
        assertEquals(2, z.dimension());
        assertEquals(0, z.negativityDefect());
        assertTrue(z.completenessDefect() < 1e-15);
        assertEquals("Povm with 2 outcomes, dimension 2", z.toString());
        assertEquals(z.elements().get(1), z.element(1));
    }

    @Test
    void probabilitiesHoldForTheEntriesStored() {
        Povm povm = Povm.of(List.of(HermitianOperator.diagonal(0.25, 0.5), HermitianOperator.diagonal(0.75, 0.5)));
        DensityOperator rho = DensityOperator.ofEigenvalues(0.125, 0.875);
        assertNear(0.125 * 0.25 + 0.875 * 0.5, povm.probability(0, rho), 1e-16);
        // entries of a pure state: the eigenvalue that is zero is rounding noise, and known to be so
        DensityOperator entries = DensityOperator.ofReal(new double[][] {{0.36, 0.48}, {0.48, 0.64}});
        assertNear(0.36 * 0.25 + 0.64 * 0.5, povm.probability(0, entries), 1e-13);
    }

    @Test
    void refusals() {
        HermitianOperator half = HermitianOperator.diagonal(0.5, 0.5);
        assertRefusal(
                "Povm.of: there is no element, expected at least one; give at least one", () -> Povm.of(List.of()));
        assertRefusal(
                "Povm.of: element 1 has dimension 3, expected 2, as the others; all must act on the same space",
                () -> Povm.of(List.of(half, HermitianOperator.identity(3))));
        assertRefusal(
                "Povm.of: of element 1 the smallest diagonal entry is -0.5, expected at least -1.0658141036401503E-14"
                        + " (rounding); check it, or use Povm.nearest, which projects and says by how much",
                () -> Povm.of(List.of(half, HermitianOperator.diagonal(-0.5, 0.5))));
        assertRefusal(
                "Povm.of: the elements sum to an operator at distance " + 0.3535533905935988
                        + " from the identity, expected at most"
                        + " " + 2.8421709430404007E-14
                        + " (rounding); add what is missing as an element, or use Povm.nearest, which says"
                        + " by how much it repairs",
                () -> Povm.of(List.of(half, HermitianOperator.diagonal(0.25, 0.25))));
        Povm povm = Povm.of(List.of(half, half));
        assertRefusal("Povm.element: the outcome is 2, expected between 0 and 1; count from 0", () -> povm.element(2));
        assertRefusal(
                "Povm.probability: the outcome is -1, expected between 0 and 1; count from 0",
                () -> povm.probability(-1, UP));
        assertRefusal(
                "Povm.probability: the state has dimension 1, expected 2, as the others; all must act on the same space",
                () -> povm.probability(0, DensityOperator.maximallyMixed(1)));
        assertRefusal(
                "Povm.sample: the count is -1.0, expected between 0.0 and 2.147483647E9; give a number in that range",
                () -> povm.sample(UP, -1, 0));
        Ensemble three = Ensemble.equiprobable(List.of(UP, UP, UP));
        String few =
                ": the measurement has 2 outcomes for 3 states, expected at least one outcome for each state; add elements"
                        + " (zero operators for states that are never guessed), or ask for the joint distribution";
        assertRefusal("Povm.successProbability" + few, () -> povm.successProbability(three));
        assertRefusal("Povm.errorProbability" + few, () -> povm.errorProbability(three));
        assertRefusal(
                "Povm.relabelled: row 0 has 1 entries, expected 2, one for each outcome; give one row for each new outcome",
                () -> povm.relabelled(new double[][] {{1}}));
        assertRefusal(
                "Povm.relabelled, outcome 1: the probabilities sum to 0.5, expected 1 within 1.7763568394002505E-15; divide"
                        + " them by their sum",
                () -> povm.relabelled(new double[][] {{1, 0.25}, {0, 0.25}}));
        assertRefusal(
                "Povm.nearest: operator 1 is 1 x 2, expected 2 x 2; all must be square and of one dimension",
                () -> Povm.nearest(List.of(half, Operator.ofReal(new double[][] {{1, 2}}))));
    }

    @Test
    void nearestRepairsAndSaysByHowMuch() {
        HermitianOperator a = HermitianOperator.diagonal(1.2, -0.1);
        Operator b = Operator.ofReal(new double[][] {{0, 0.5}, {0.1, 1}});
        RepairedPovm r = Povm.nearest(List.of(a, b));
        assertEquals(0.1, r.negativePart(), 1e-15);
        assertEquals(0.2 * Math.sqrt(2), r.hermitianDefect(), 1e-14);
        assertTrue(r.completenessDefect() > 0.3 && r.completenessDefect() < 1);
        assertTrue(r.distance() > 0.2 && r.distance() < 2);
        assertTrue(r.povm().completenessDefect() < 1e-14);
        Povm exact = Povm.of(List.of(HermitianOperator.diagonal(0.25, 0.5), HermitianOperator.diagonal(0.75, 0.5)));
        RepairedPovm none = Povm.nearest(exact.elements());
        assertEquals(0, none.distance(), 1e-15);
        assertEquals(0, none.negativePart());
        assertEquals(0, none.hermitianDefect());
        assertEquals(0, none.completenessDefect(), 1e-15);
    }

    @Test
    void nearestSharesWhatIsMissing() {
        RepairedPovm r = Povm.nearest(List.of(HermitianOperator.diagonal(1, 0), HermitianOperator.diagonal(-1, -1)));
        assertArrayEquals(new double[] {0.5, 1}, r.povm().element(0).eigenvalues(), 1e-15);
        assertArrayEquals(new double[] {0, 0.5}, r.povm().element(1).eigenvalues(), 1e-15);
        Povm nothing = Povm.nearest(List.of(HermitianOperator.diagonal(-1, -1))).povm();
        assertEquals(HermitianOperator.identity(2), nothing.element(0));
    }

    /** Frequencies of a million outcomes: within five standard deviations of the probabilities (the seed is fixed). */
    @Test
    void samplingFollowsTheProbabilities() {
        Random random = new Random(3);
        Povm povm = random(3, 4, random);
        DensityOperator rho = Samples.state(3, random);
        int count = 1_000_000;
        int[] outcomes = povm.sample(rho, count, 42);
        assertArrayEquals(outcomes, povm.sample(rho, count, 42));
        int[] seen = new int[4];
        for (int o : outcomes) {
            seen[o]++;
        }
        for (int j = 0; j < 4; j++) {
            double p = povm.probability(j, rho).midpoint();
            assertEquals(p, seen[j] / (double) count, 5 * Math.sqrt(p * (1 - p) / count));
        }
        assertEquals(0, povm.sample(rho, 0, 1).length);
    }

    @Test
    void outcomesOfProbabilityZeroAreNeverDrawn() {
        Povm povm = Povm.of(List.of(
                HermitianOperator.diagonal(0, 1), HermitianOperator.diagonal(1, 0), HermitianOperator.diagonal(0, 0)));
        for (int o : povm.sample(UP, 1000, 7)) {
            assertEquals(1, o);
        }
    }

    /** The generator is the one of {@link SplittableRandom}, which the platform does not promise to keep. */
    @Test
    void generatorIsSplitMix64() {
        SplitMix mine = new SplitMix(-5);
        SplittableRandom platform = new SplittableRandom(-5);
        for (int k = 0; k < 100; k++) {
            assertEquals(platform.nextLong(), mine.nextLong());
        }
    }

    /** Success and error are sums of their own, and add up to the total. */
    @Test
    void scoresOfRandomMeasurements() {
        Random random = new Random(8);
        for (int k = 0; k < 20; k++) {
            int d = 1 + random.nextInt(4);
            Ensemble e = Samples.ensemble(2 + random.nextInt(3), d, random);
            Povm povm = random(d, e.size() + random.nextInt(2), random);
            Enclosure sum = povm.successProbability(e).plus(povm.errorProbability(e));
            assertNear(1, sum, 1e-13);
            // never better than the optimum, which the pretty-good measurement bounds
            Enclosure best = PrettyGoodMeasurement.of(e).optimalSuccessProbability();
            assertTrue(povm.successProbability(e).lower() <= best.upper() + 1e-13);
            if (e.size() == 2) {
                Enclosure least = HypothesisPair.of(e.state(0), e.state(1)).minimumError(e.prior(0));
                assertTrue(povm.errorProbability(e).upper() >= least.lower() - 1e-13);
            }
        }
    }

    /** Relabelling outcomes at random never raises mutual information (data processing), nor a probability above one. */
    @Test
    void dataProcessing() {
        Random random = new Random(9);
        for (int k = 0; k < 20; k++) {
            int d = 2 + random.nextInt(2);
            Ensemble e = Samples.ensemble(3, d, random);
            Povm povm = random(d, 4, random);
            double[][] w = new double[3][4];
            for (int j = 0; j < 4; j++) {
                double cut = random.nextDouble();
                w[random.nextInt(3)][j] += cut;
                w[random.nextInt(3)][j] += 1 - cut;
            }
            Information before = povm.jointDistribution(e).mutualInformation();
            Information after = povm.relabelled(w).jointDistribution(e).mutualInformation();
            assertTrue(after.nats().lower() <= before.nats().upper() + 1e-13);
            assertTrue(before.nats().width() < 1e-12);
        }
    }

    /**
     * Accessible information of the trine, log2(3/2): A. S. Holevo, Probl. Inf. Transm. 9, 177 (1973) (from memory), attained by the kets
     * orthogonal to the states; of the tetrahedron, log2(4/3), likewise (from memory; computed).
     */
    @Test
    void accessibleInformation() {
        List<DensityOperator> trine = new ArrayList<>();
        List<HermitianOperator> against = new ArrayList<>();
        for (int k = 0; k < 3; k++) {
            double angle = k * 2 * Math.PI / 3;
            trine.add(Samples.bloch(1, angle));
            against.add(Samples.bloch(1, angle + Math.PI).times(2.0 / 3));
        }
        Information trineInformation =
                Povm.of(against).jointDistribution(Ensemble.equiprobable(trine)).mutualInformation();
        // the zero probabilities of the exact trine are 1e-32 with angles in doubles
        assertNear(0.5849625007211562, trineInformation.bits(), 3e-14);

        double s = 1 / Math.sqrt(3);
        double[][] corners = {{s, s, s}, {s, -s, -s}, {-s, s, -s}, {-s, -s, s}};
        List<DensityOperator> tetrahedron = new ArrayList<>();
        List<HermitianOperator> opposite = new ArrayList<>();
        for (double[] c : corners) {
            tetrahedron.add(DensityOperator.ofBloch(c[0], c[1], c[2]));
            opposite.add(DensityOperator.ofBloch(-c[0], -c[1], -c[2]).times(0.5));
        }
        Information corner = Povm.of(opposite)
                .jointDistribution(Ensemble.equiprobable(tetrahedron))
                .mutualInformation();
        assertNear(0.41503749927884376, corner.bits(), 1e-13);
    }

    @Test
    void jointDistributionOfAClassicalChannel() {
        Ensemble e = Ensemble.of(
                List.of(DensityOperator.ofEigenvalues(0.75, 0.25), DensityOperator.ofEigenvalues(0.25, 0.75)),
                new double[] {0.5, 0.5});
        JointDistribution p =
                Povm.ofBasis(Operator.ofReal(new double[][] {{1, 0}, {0, 1}})).jointDistribution(e);
        assertEquals(2, p.states());
        assertEquals(2, p.outcomes());
        assertNear(0.375, p.probability(1, 1), 1e-15);
        assertNear(0.25, p.errorProbability(), 1e-15);
        assertNear(0.75, p.successProbability(), 1e-15);
        assertNear(0.5, p.stateProbability(1), 1e-15);
        assertNear(0.5, p.outcomeProbability(0), 1e-15);
        // binary symmetric channel: 1 − h(¼) bit
        assertNear(
                1 - (0.25 * 2 + 0.75 * Math.log(4.0 / 3) / Math.log(2)),
                p.mutualInformation().bits(),
                1e-14);
        assertTrue(p.toString().startsWith("JointDistribution of 2 states and 2 outcomes, error 0.25"), p::toString);
        assertRefusal(
                "JointDistribution.probability: the state is 2, expected between 0 and 1; count from 0",
                () -> p.probability(2, 0));
        assertRefusal(
                "JointDistribution.probability: the outcome is 2, expected between 0 and 1; count from 0",
                () -> p.probability(0, 2));
        assertRefusal(
                "JointDistribution.stateProbability: the state is 2, expected between 0 and 1; count from 0",
                () -> p.stateProbability(2));
        assertRefusal(
                "JointDistribution.outcomeProbability: the outcome is 2, expected between 0 and 1; count from 0",
                () -> p.outcomeProbability(2));
    }

    /** x ln(x/q) where x may be zero: checked on a grid of values inside. */
    @Test
    void logarithmicTermsHoldEveryValue() {
        double[][] xs = {{0, 1e-8}, {0, 1e-3}, {0, 0.5}, {0.2, 0.3}, {1e-9, 2e-9}, {0, 0}};
        double[][] margins = {{1e-3, 1e-3}, {0.2, 0.5}, {0.9, 1}, {1, 0.6}};
        for (double[] m : margins) {
            for (double[] x : xs) {
                if (x[1] > Math.min(m[0], m[1])) {
                    continue;
                }
                Enclosure e = LogarithmicTerm.of(
                        Enclosure.of(x[0], x[1]), Enclosure.exact(m[0]), Enclosure.exact(m[1]), Enclosure.ONE);
                for (int k = 0; k <= 100; k++) {
                    double v = x[0] + (x[1] - x[0]) * k / 100;
                    double term = v == 0 ? 0 : v * Math.log(v / (m[0] * m[1]));
                    double slack = 1e-15 * Math.abs(term);
                    assertTrue(
                            e.lower() <= term + slack && term - slack <= e.upper(),
                            () -> v + ": " + e.toIntervalString(17));
                }
            }
        }
        // a column that may be empty says nothing about the ratio, the row still does
        Enclosure e =
                LogarithmicTerm.of(Enclosure.of(0, 1e-30), Enclosure.exact(0.5), Enclosure.of(0, 1e-30), Enclosure.ONE);
        assertTrue(e.upper() < 1e-30 && e.lower() > -1e-30, e::toString);
    }
}
