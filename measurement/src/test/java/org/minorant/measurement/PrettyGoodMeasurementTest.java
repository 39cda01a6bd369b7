package org.minorant.measurement;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.minorant.measurement.HypothesisPairTest.assertNear;
import static org.minorant.measurement.HypothesisPairTest.assertRefusal;

import java.math.BigDecimal;
import java.math.MathContext;
import java.util.ArrayList;
import java.util.List;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;

/**
 * The pretty-good measurement against published and computed values. Rows marked "computed" are from the project's sheet of check values, 11 to 12 digits;
 * for symmetric ensembles of pure states the pretty-good measurement is optimal, so that minimum errors check it too.
 */
class PrettyGoodMeasurementTest {

    /** A ket of a Bloch vector given by its polar angle and azimuth. */
    private static double[][] ket(double theta, double phi) {
        double s = Math.sin(theta / 2);
        return new double[][] {{Math.cos(theta / 2), 0}, {s * Math.cos(phi), s * Math.sin(phi)}};
    }

    private static Ensemble copies(List<double[][]> kets, int n) {
        List<DensityOperator> states = new ArrayList<>();
        kets.forEach(k -> states.add(Samples.ketPower(k, n)));
        return Ensemble.equiprobable(states);
    }

    private static List<double[][]> circle(int count) {
        List<double[][]> kets = new ArrayList<>();
        for (int k = 0; k < count; k++) {
            kets.add(ket(2 * Math.PI * k / count, 0));
        }
        return kets;
    }

    private static List<double[][]> tetrahedron() {
        List<double[][]> kets = new ArrayList<>();
        kets.add(ket(0, 0));
        for (int k = 0; k < 3; k++) {
            kets.add(ket(Math.acos(-1.0 / 3), 2 * Math.PI * k / 3));
        }
        return kets;
    }

    /** Computed: square-root success of n = 1..6 copies. For one trine, 2/3, and the double trine, (3 + 2√2)/6, also published. */
    @Test
    void copiesOfSymmetricStates() {
        double[] trine = {2.0 / 3, .971404520791, .991581623797, .998102131254, .999503686738, .999878859588};
        double[] corners = {.5, .75, .971404520791, .991581623797, .996903995000, .998930038800};
        double[] square = {.5, .728553390593, .933012701892, .966216088618, .984122918276, .992045577703};
        for (int n = 1; n <= 6; n++) {
            assertNear(
                    trine[n - 1], PrettyGoodMeasurement.of(copies(circle(3), n)).successProbability(), 1e-12);
            assertNear(
                    corners[n - 1],
                    PrettyGoodMeasurement.of(copies(tetrahedron(), n)).successProbability(),
                    1e-12);
            assertNear(
                    square[n - 1],
                    PrettyGoodMeasurement.of(copies(circle(4), n)).successProbability(),
                    1e-12);
        }
        assertNear(
                (3 + 2 * Math.sqrt(2)) / 6,
                PrettyGoodMeasurement.of(copies(circle(3), 2)).successProbability(),
                1e-15);
    }

    /** A. Peres, W. K. Wootters, Phys. Rev. Lett. 66, 1119 (1991): 1.36907 bit, as quoted; computed 1.3690684229. */
    @Test
    void mutualInformationOfTheDoubleTrine() {
        PrettyGoodMeasurement pgm = PrettyGoodMeasurement.of(copies(circle(3), 2));
        assertNear(1.3690684229, pgm.jointDistribution().mutualInformation().bits(), 1e-10);
        assertEquals(4, pgm.povm().size());
        assertNear(
                1.3690684229,
                pgm.povm().jointDistribution(pgm.ensemble()).mutualInformation().bits(),
                1e-10);
    }

    /** Kets with a given Gram matrix, entry (i, j, part) = ⟨i|j⟩, by Cholesky; normalised. */
    private static Ensemble ofGram(double[][][] g) {
        int m = g.length;
        double[][][] l = new double[m][m][2];
        for (int i = 0; i < m; i++) {
            for (int j = 0; j <= i; j++) {
                double x = g[i][j][0];
                double y = g[i][j][1];
                for (int k = 0; k < j; k++) {
                    x -= l[i][k][0] * l[j][k][0] + l[i][k][1] * l[j][k][1];
                    y -= l[i][k][1] * l[j][k][0] - l[i][k][0] * l[j][k][1];
                }
                if (i == j) {
                    l[i][i][0] = Math.sqrt(Math.max(0, x));
                } else {
                    l[i][j][0] = x / l[j][j][0];
                    l[i][j][1] = y / l[j][j][0];
                }
            }
        }
        List<DensityOperator> states = new ArrayList<>();
        for (double[][] row : l) {
            // ⟨i|j⟩ = Σ conj(a_i) a_j and LL* = G: amplitudes are conjugates of the rows
            double[][] a = new double[m][2];
            for (int k = 0; k < m; k++) {
                a[k][0] = row[k][0];
                a[k][1] = -row[k][1];
            }
            states.add(Samples.normalised(a));
        }
        return Ensemble.equiprobable(states);
    }

    private static Ensemble phases(int count, double photons) {
        double[][][] g = new double[count][count][2];
        for (int i = 0; i < count; i++) {
            for (int j = 0; j < count; j++) {
                double angle = 2 * Math.PI * (j - i) / count;
                double size = Math.exp(-photons * 2 * Math.pow(Math.sin(angle / 2), 2));
                g[i][j][0] = size * Math.cos(photons * Math.sin(angle));
                g[i][j][1] = size * Math.sin(photons * Math.sin(angle));
            }
        }
        return ofGram(g);
    }

    private static Ensemble pulsePositions(int count, double photons) {
        double[][][] g = new double[count][count][2];
        for (int i = 0; i < count; i++) {
            for (int j = 0; j < count; j++) {
                g[i][j][0] = i == j ? 1 : Math.exp(-photons);
            }
        }
        return ofGram(g);
    }

    /** Computed from Gram matrices, 11 digits: coherent states in 2, 4 and 8 phases with N photons on average. */
    @ParameterizedTest
    @CsvSource({
        "2, 0.1, 2.1291118362e-1", "2, 0.2, 1.2896393845e-1", "2, 0.5, 3.5063252484e-2",
        "2, 1, 4.6000703696e-3", "2, 2, 8.3872691604e-5", "2, 4, 2.8133794e-8",
        "4, 0.1, .55672427895", "4, 0.2, .45938573769", "4, 0.5, .26174194954",
        "4, 1, .092421415604", "4, 2, 9.5531773673e-3", "4, 4, 1.6780066e-4",
        "8, 0.1, .77761120780", "8, 0.2, .72631939754", "8, 0.5, .60654342101",
        "8, 1, .44880752087", "8, 2, .22297009755", "8, 4, .053006404611"
    })
    void coherentStatesInPhases(int count, double photons, double expected) {
        PrettyGoodMeasurement pgm = PrettyGoodMeasurement.of(phases(count, photons));
        // half a unit of the last digit given, and what Cholesky in doubles loses on nearly dependent kets
        double digit = photons == 4 && count < 8 ? 5e-8 : 5e-11;
        assertNear(expected, pgm.errorProbability(), expected * digit + 1e-13);
        if (count == 2) {
            double closed = -0.5 * Math.expm1(0.5 * Math.log1p(-Math.exp(-4 * photons)));
            assertEquals(closed, pgm.errorProbability().midpoint(), 1e-14 * closed + 2e-16 * Math.sqrt(closed));
        }
    }

    /**
     * M pulse positions with N photons: closed form ((M−1)/M²)(√(1+(M−1)e^(−N)) − √(1−e^(−N)))², H. P. Yuen, R. S. Kennedy, M. Lax, IEEE Trans. Inf. Theory 21, 125
     * (1975) (from memory); the values are computed from Gram matrices.
     */
    @ParameterizedTest
    @CsvSource({"4, 1, 8.052384772818e-2", "16, 1, 1.810907908716e-1", "64, 2, 7.153309707031e-2"})
    void pulsePositionAlphabets(int count, double photons, double expected) {
        PrettyGoodMeasurement pgm = PrettyGoodMeasurement.of(pulsePositions(count, photons));
        double e = Math.exp(-photons);
        double closed = (count - 1.0)
                / (count * (double) count)
                * Math.pow(Math.sqrt(1 + (count - 1) * e) - Math.sqrt(1 - e), 2);
        assertEquals(expected, closed, 1e-12 * expected);
        assertNear(closed, pgm.errorProbability(), 1e-13);
        assertNear(1 - closed, pgm.successProbability(), 1e-13);
    }

    /**
     * Two kets of any priors, exactly: with G the Gram matrix of √p ψ and √q φ, (√G)_12 = G_12/√(G_11 + G_22 + 2√det G) and the error is 2(√G)_12², in 60
     * digits for exactly the amplitudes stored; down to 1e-48.
     */
    @Test
    void errorOfTwoKetsKeepsItsDigits() {
        for (int k = 0; k <= 80; k++) {
            double x = Math.scalb(1.0, -k);
            double p = k % 3 == 0 ? 0.5 : 0x1p-20;
            DensityOperator phi = k < 30 ? unit(x) : DensityOperator.ofKet(x, 1);
            Enclosure error = PrettyGoodMeasurement.of(
                            Ensemble.of(List.of(DensityOperator.ofKet(1, 0), phi), new double[] {p, 1 - p}))
                    .errorProbability();
            BigDecimal a = Samples.exact(phi.factor().columns().re(0, 0));
            BigDecimal b = Samples.exact(phi.factor().columns().re(1, 0));
            BigDecimal g11 = Samples.exact(p);
            BigDecimal g22 = Samples.exact(1 - p).multiply(a.multiply(a).add(b.multiply(b)));
            BigDecimal cross =
                    Samples.exact(p).multiply(Samples.exact(1 - p)).multiply(a).multiply(a);
            BigDecimal root = g11.multiply(g22).subtract(cross).sqrt(Samples.DIGITS);
            BigDecimal exact =
                    cross.multiply(BigDecimal.valueOf(2)).divide(g11.add(g22).add(root.add(root)), Samples.DIGITS);
            String what = "x " + x + ", prior " + p + ": " + exact.round(new MathContext(20)) + " in "
                    + error.toIntervalString(17);
            assertTrue(error.contains(exact), what);
            // H is known to 1e-27 absolutely, its blocks are of the size of √error
            double width = 4e-15 + 1e-26 / Math.sqrt(exact.doubleValue());
            assertTrue(error.relativeWidth() <= width, what);
        }
    }

    /** Mixed states with real entries: p_iρ_i S^(-½) p_jρ_j S^(-½) in a hundred digits, for exactly the entries stored. */
    @Test
    void mixedStatesAgainstDecimalArithmetic() {
        Random random = new Random(55);
        for (int k = 0; k < 12; k++) {
            int d = 2 + random.nextInt(2);
            int m = 2 + random.nextInt(2);
            List<DensityOperator> states = new ArrayList<>();
            for (int i = 0; i < m; i++) {
                states.add(realState(d, k % 3 == 0 ? 1e-6 : 1, random));
            }
            double[] priors = m == 2 ? new double[] {0.25, 0.75} : new double[] {0.5, 0.375, 0.125};
            PrettyGoodMeasurement pgm = PrettyGoodMeasurement.of(Ensemble.of(states, priors));
            BigDecimal[][] s = ExactMatrices.zero(d);
            for (int i = 0; i < m; i++) {
                s = ExactMatrices.plus(s, ExactMatrices.of(states.get(i), priors[i]), BigDecimal.ONE);
            }
            BigDecimal[][] r = ExactMatrices.inverseRoot(s);
            BigDecimal error = BigDecimal.ZERO;
            for (int i = 0; i < m; i++) {
                BigDecimal[][] left = ExactMatrices.times(ExactMatrices.of(states.get(i), priors[i]), r);
                for (int j = 0; j < m; j++) {
                    BigDecimal[][] right = ExactMatrices.times(ExactMatrices.of(states.get(j), priors[j]), r);
                    BigDecimal exact = ExactMatrices.trace(ExactMatrices.times(left, right));
                    Enclosure p = pgm.jointDistribution().probability(i, j);
                    assertTrue(
                            p.contains(exact),
                            () -> exact.round(new MathContext(20)) + " in " + p.toIntervalString(17));
                    assertTrue(p.width() < 1e-13, () -> p.toIntervalString(17));
                    error = i == j ? error : error.add(exact);
                }
            }
            assertTrue(pgm.errorProbability().contains(error));
        }
    }

    /** AᵀA of a matrix with entries in sixty-fourths, plus a little of the identity, divided by its trace. */
    private static DensityOperator realState(int d, double scale, Random random) {
        double[][] a = new double[d][d];
        for (double[] row : a) {
            for (int j = 0; j < d; j++) {
                row[j] = (random.nextInt(129) - 64) / 64.0 * (j == 0 ? 1 : scale);
            }
        }
        double[][] re = new double[d][d];
        double trace = 0;
        for (int i = 0; i < d; i++) {
            for (int j = 0; j < d; j++) {
                for (int k = 0; k < d; k++) {
                    re[i][j] += a[i][k] * a[j][k];
                }
                re[i][j] += i == j ? 0x1p-10 * scale : 0;
            }
            trace += re[i][i];
        }
        for (double[] row : re) {
            for (int j = 0; j < d; j++) {
                row[j] /= trace;
            }
        }
        return DensityOperator.ofReal(re);
    }

    private static DensityOperator unit(double x) {
        return Samples.normalised(new double[][] {{x, 0}, {1, 0}});
    }

    @Test
    void orthogonalStatesAreToldApart() {
        Ensemble e = Ensemble.of(
                List.of(DensityOperator.ofKet(1, 0, 0), DensityOperator.ofEigenvalues(0, 0.5, 0.5)),
                new double[] {0.25, 0.75});
        PrettyGoodMeasurement pgm = PrettyGoodMeasurement.of(e);
        assertTrue(pgm.errorProbability().upper() < 1e-50, () -> "" + pgm);
        assertNear(1, pgm.successProbability(), 1e-15);
        assertTrue(pgm.barnumKnillRatio().lower() >= 1 && pgm.barnumKnillRatio().upper() <= 2);
    }

    @Test
    void aStateThatIsNeverPrepared() {
        Ensemble e = Ensemble.of(
                List.of(
                        DensityOperator.ofKet(1, 0),
                        DensityOperator.ofKet(0.6, 0.8),
                        DensityOperator.ofBloch(0, 0, 0.5)),
                new double[] {0.5, 0, 0.5});
        PrettyGoodMeasurement pgm = PrettyGoodMeasurement.of(e);
        assertEquals(Enclosure.ZERO, pgm.jointDistribution().probability(1, 1));
        assertEquals(Enclosure.ZERO, pgm.jointDistribution().probability(0, 1));
        assertTrue(pgm.povm().element(1).eigenvalues()[1] == 0);
        assertNear(pgm.successProbability().midpoint(), pgm.povm().successProbability(e), 1e-15);
    }

    /** The measurement in doubles scores what the enclosures say, and is complete. */
    @Test
    void measurementAttainsTheEnclosures() {
        Random random = new Random(51);
        for (int k = 0; k < 30; k++) {
            Ensemble e = Samples.ensemble(1 + random.nextInt(4), 1 + random.nextInt(4), random);
            PrettyGoodMeasurement pgm = PrettyGoodMeasurement.of(e);
            Povm povm = pgm.povm();
            assertTrue(povm.size() == e.size() || povm.size() == e.size() + 1);
            assertTrue(povm.completenessDefect() < 1e-14);
            assertNear(pgm.successProbability().midpoint(), povm.successProbability(e), 1e-13);
            assertNear(pgm.errorProbability().midpoint(), povm.errorProbability(e), 1e-13);
            assertTrue(
                    pgm.successProbability().width() < 1e-12,
                    () -> pgm.successProbability().toIntervalString(17));
            Enclosure joint = pgm.jointDistribution().errorProbability();
            assertTrue(joint.isPossiblyBelow(pgm.errorProbability())
                    && pgm.errorProbability().isPossiblyBelow(joint));
        }
    }

    /** H. Barnum, E. Knill, J. Math. Phys. 43, 2097 (2002): the error is at most twice the least, on random pairs of any rank. */
    @Test
    void barnumKnillBothWays() {
        Random random = new Random(52);
        for (int k = 0; k < 40; k++) {
            Ensemble e = Samples.ensemble(2, 2 + random.nextInt(3), random);
            PrettyGoodMeasurement pgm = PrettyGoodMeasurement.of(e);
            Enclosure least = HypothesisPair.of(e.state(0), e.state(1)).minimumError(e.prior(0));
            Enclosure error = pgm.errorProbability();
            String what = "error " + error.toIntervalString(17) + ", least " + least.toIntervalString(17);
            assertTrue(least.lower() <= error.upper() + 1e-16, what);
            assertTrue(error.lower() <= 2 * least.upper() + 1e-16, what);
            assertTrue(error.lower() * (1 - 1e-13) <= least.upper() * (1 + Math.sqrt(1 - error.lower())) + 1e-16, what);
            Enclosure ratio = pgm.barnumKnillRatio();
            assertTrue(ratio.lower() >= 1 && ratio.upper() <= 2, ratio::toString);
            if (least.lower() > 1e-3) {
                assertEquals(error.midpoint() / least.midpoint(), ratio.midpoint(), 1e-10);
            }
            assertNear(least.midpoint(), pgm.optimalErrorProbability(), 1e-12);
            assertTrue(pgm.optimalSuccessProbability().contains(1 - least.midpoint()));
        }
    }

    @Test
    void boundsOnTheOptimumOfManyStates() {
        PrettyGoodMeasurement pgm = PrettyGoodMeasurement.of(copies(circle(3), 1));
        assertTrue(pgm.optimalSuccessProbability().contains(2.0 / 3));
        assertEquals(Math.sqrt(2.0 / 3), pgm.optimalSuccessProbability().upper(), 1e-15);
        assertEquals(
                (1.0 / 3) / (1 + Math.sqrt(2.0 / 3)),
                pgm.optimalErrorProbability().lower(),
                1e-15);
        assertEquals(1.0 / 3, pgm.optimalErrorProbability().upper(), 1e-15);
        assertEquals(1 + Math.sqrt(2.0 / 3), pgm.barnumKnillRatio().upper(), 1e-15);
        assertTrue(pgm.toString().startsWith("PrettyGoodMeasurement of 3 states, error 0.3333333333"), pgm::toString);
    }

    /** For symmetric pure states no weighting, and no other measurement tried, does better. */
    @Test
    void optimalForSymmetricPureStates() {
        Random random = new Random(53);
        for (Ensemble e :
                List.of(copies(circle(3), 1), copies(circle(4), 2), copies(tetrahedron(), 1), phases(4, 0.5))) {
            Enclosure best = PrettyGoodMeasurement.of(e).successProbability();
            for (double s : new double[] {0.5, 2, 3}) {
                assertNear(
                        best.midpoint(), WeightedSquareRootMeasurement.of(e, s).successProbability(), 1e-13);
            }
            for (int k = 0; k < 5; k++) {
                List<org.minorant.core.HermitianOperator> a = new ArrayList<>();
                for (int j = 0; j < e.size(); j++) {
                    a.add(Samples.effect(e.dimension(), random));
                }
                assertTrue(Povm.nearest(a).povm().successProbability(e).lower() < best.upper());
            }
        }
    }

    /** Power 1 is the pretty-good measurement; for nearly orthogonal states of unequal priors power 2 comes nearer to the optimum. */
    @Test
    void weightedPowers() {
        Random random = new Random(54);
        for (int k = 0; k < 15; k++) {
            Ensemble e = Samples.ensemble(3, 3, random);
            WeightedSquareRootMeasurement one = WeightedSquareRootMeasurement.of(e, 1);
            PrettyGoodMeasurement pgm = PrettyGoodMeasurement.of(e);
            assertNear(pgm.successProbability().midpoint(), one.successProbability(), 1e-12);
            WeightedSquareRootMeasurement two = WeightedSquareRootMeasurement.of(e, 2);
            assertEquals(2, two.power());
            assertTrue(two.povm().completenessDefect() < 1e-13);
            assertTrue(two.successProbability().lower()
                    <= pgm.optimalSuccessProbability().upper());
        }
        double x = 0x1p-10;
        Ensemble e = Ensemble.of(List.of(DensityOperator.ofKet(1, 0), unit(x)), new double[] {0.9, 0.1});
        double least =
                HypothesisPair.of(e.state(0), e.state(1)).minimumError(0.9).midpoint();
        double first = PrettyGoodMeasurement.of(e).errorProbability().midpoint() / least;
        WeightedSquareRootMeasurement two = WeightedSquareRootMeasurement.of(e, 2);
        double second = two.errorProbability().midpoint() / least;
        assertTrue(first > 1.2 && Math.abs(second - 1) < 1e-3, first + " and " + second);
        assertTrue(two.toString().startsWith("WeightedSquareRootMeasurement of power 2.0, error "));
        assertNear(two.errorProbability().midpoint(), two.jointDistribution().errorProbability(), 1e-18);
    }

    @Test
    void refusesPowersOutOfRange() {
        Ensemble e = copies(circle(3), 1);
        for (double s : new double[] {0, -1, 17, Double.NaN}) {
            assertRefusal(
                    "WeightedSquareRootMeasurement.of: the power is " + s
                            + ", expected between 2.2250738585072014E-308 and 16.0; give a number in that range",
                    () -> WeightedSquareRootMeasurement.of(e, s));
        }
    }
}
