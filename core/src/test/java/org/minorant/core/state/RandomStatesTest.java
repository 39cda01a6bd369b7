package org.minorant.core.state;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Arrays;
import java.util.SplittableRandom;
import java.util.function.LongFunction;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;
import org.minorant.core.DensityOperator;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.InvalidInputException;
import org.minorant.core.Operator;

/**
 * Means over fixed seeds against the measures' moments. A sample mean of n values with variance at most v is farther than 5√(v/n) from its
 * expectation with probability below 1e-6; the seeds are fixed, so a test that passes always passes.
 */
class RandomStatesTest {

    private static double tolerance(double variance, int samples) {
        return 5 * Math.sqrt(variance / samples);
    }

    @Test
    void theGeneratorIsSplitMix64() {
        for (long seed : new long[] {0, 1, -7, Long.MAX_VALUE}) {
            SeededNormals normals = new SeededNormals(seed);
            SplittableRandom platform = new SplittableRandom(seed);
            for (int i = 0; i < 100; i++) {
                assertEquals(platform.nextLong(), normals.nextLong());
            }
        }
    }

    @Test
    void normalsHaveTheirMomentsAndDistribution() {
        int n = 200_000;
        SeededNormals normals = new SeededNormals(42);
        double[] x = new double[n];
        for (int i = 0; i < n; i++) {
            x[i] = normals.next();
        }
        // variances of x, x², x³, x⁴ and of the product of neighbours: 1, 2, 15, 96, 1
        assertEquals(0, mean(x, 1), tolerance(1, n));
        assertEquals(1, mean(x, 2), tolerance(2, n));
        assertEquals(0, mean(x, 3), tolerance(15, n));
        assertEquals(3, mean(x, 4), tolerance(96, n));
        double product = 0;
        for (int i = 1; i < n; i++) {
            product += x[i] * x[i - 1] / n;
        }
        assertEquals(0, product, tolerance(1, n));
        // Φ(−2), Φ(−1) (common tables), and the largest a standard normal shows in 2e5
        Arrays.sort(x);
        assertEquals(0.02275013194817921, below(x, -2), tolerance(0.0223, n));
        assertEquals(0.15865525393145707, below(x, -1), tolerance(0.1335, n));
        assertTrue(x[n - 1] < 6 && x[n - 1] > 3.5 && x[0] > -6);
    }

    private static double mean(double[] x, int power) {
        return Arrays.stream(x).map(v -> Math.pow(v, power)).average().orElseThrow();
    }

    private static double below(double[] sorted, double limit) {
        return (double) -(Arrays.binarySearch(sorted, limit) + 1) / sorted.length;
    }

    private static double purity(DensityOperator rho) {
        double s = 0;
        for (int i = 0; i < rho.dimension(); i++) {
            for (int j = 0; j < rho.dimension(); j++) {
                s += rho.re(i, j) * rho.re(i, j) + rho.im(i, j) * rho.im(i, j);
            }
        }
        return s;
    }

    /** The mean purity of n states of dimension d; the variance is at most (1 − μ)(μ − 1/d) (Bhatia and Davis). */
    private static void checkPurity(double expected, int d, int n, LongFunction<DensityOperator> family) {
        double sum = 0;
        for (long seed = 0; seed < n; seed++) {
            DensityOperator rho = family.apply(seed);
            assertTrue(rho.traceEnclosure().widen(d * 0x1p-50).contains(1));
            sum += purity(rho);
        }
        assertEquals(expected, sum / n, tolerance((1 - expected) * (expected - 1.0 / d), n));
    }

    /** 2d/(d² + 1): Życzkowski and Sommers 2001 (memory). */
    @ParameterizedTest
    @ValueSource(ints = {2, 3, 5})
    void hilbertSchmidtStatesHaveTheirMeanPurity(int d) {
        checkPurity(2.0 * d / (d * d + 1), d, 4000, seed -> RandomStates.hilbertSchmidt(d, seed));
    }

    /** (5d² + 1)/(2d(d² + 2)): Sommers and Życzkowski 2004 (memory); 7/8 for a qubit. */
    @ParameterizedTest
    @ValueSource(ints = {2, 3, 5})
    void buresStatesHaveTheirMeanPurity(int d) {
        double expected = (5.0 * d * d + 1) / (2.0 * d * (d * d + 2));
        assertTrue(d != 2 || expected == 0.875);
        checkPurity(expected, d, 4000, seed -> RandomStates.bures(d, seed));
    }

    /** (d + k)/(dk + 1): Lubkin 1978 (memory). */
    @ParameterizedTest
    @CsvSource({"3,1", "3,2", "2,7", "4,3"})
    void inducedStatesHaveTheirMeanPurityAndRank(int d, int k) {
        checkPurity((double) (d + k) / (d * k + 1), d, 3000, seed -> RandomStates.induced(d, k, seed));
        DensityOperator rho = RandomStates.induced(d, k, 5);
        assertEquals(k, rho.factor().rank());
        assertEquals(0, rho.factor().traceError());
        double[] eigenvalues = rho.eigenvalues();
        for (int i = 0; i < d; i++) {
            assertEquals(i >= d - k, eigenvalues[i] > 1e-14);
        }
    }

    /** |ψ_1|² is beta distributed: mean 1/d, second moment 2/(d(d+1)); its square's variance is below 4! /(d(d+1)(d+2)(d+3)). */
    @Test
    void pureStatesAreUniform() {
        int d = 3;
        int n = 4000;
        double first = 0;
        double second = 0;
        double real = 0;
        for (long seed = 0; seed < n; seed++) {
            DensityOperator psi = RandomStates.pure(d, seed);
            assertEquals(1, psi.factor().rank());
            first += psi.re(0, 0) / n;
            second += psi.re(0, 0) * psi.re(0, 0) / n;
            real += psi.re(0, 1) / n;
        }
        assertEquals(1.0 / d, first, tolerance(2.0 / (d * (d + 1)), n));
        assertEquals(2.0 / (d * (d + 1)), second, tolerance(24.0 / (d * (d + 1) * (d + 2) * (d + 3)), n));
        assertEquals(0, real, tolerance(1.0 / (d * (d + 1)), n));
    }

    /**
     * E|U₁₁|² = 1/d, E|U₁₁|⁴ = 2/(d(d+1)), E[U₁₁U₂₂U̅₁₂U̅₂₁] = −1/(d(d²−1)) (Weingarten 1978, memory), and E Tr U = 0, E|Tr U|² = 1, E|Tr
     * U²|² = 2 (Diaconis and Shahshahani 1994, memory), which fail if the phases of the factorisation are not fixed.
     */
    @Test
    void unitariesAreHaarDistributed() {
        int d = 3;
        int n = 4000;
        double[] m = new double[7];
        for (long seed = 0; seed < n; seed++) {
            Operator u = HaarUnitary.of(d, seed);
            double p = u.re(0, 0) * u.re(0, 0) + u.im(0, 0) * u.im(0, 0);
            m[0] += p / n;
            m[1] += p * p / n;
            double ar = u.re(0, 0) * u.re(1, 1) - u.im(0, 0) * u.im(1, 1);
            double ai = u.re(0, 0) * u.im(1, 1) + u.im(0, 0) * u.re(1, 1);
            double br = u.re(0, 1) * u.re(1, 0) - u.im(0, 1) * u.im(1, 0);
            double bi = u.re(0, 1) * u.im(1, 0) + u.im(0, 1) * u.re(1, 0);
            m[2] += (ar * br + ai * bi) / n;
            m[3] += u.trace().re() / n;
            m[4] += u.trace().im() / n;
            m[5] += Math.pow(u.trace().modulus(), 2) / n;
            m[6] += Math.pow(u.times(u).trace().modulus(), 2) / n;
        }
        assertEquals(1.0 / d, m[0], tolerance(2.0 / (d * (d + 1)), n));
        assertEquals(2.0 / (d * (d + 1)), m[1], tolerance(24.0 / (d * (d + 1) * (d + 2) * (d + 3)), n));
        // |UUUU| ≤ ¼ (|a|² + |b|² + …)² is at most 1; its second moment is below E|U₁₁|⁴
        assertEquals(-1.0 / (d * (d * d - 1)), m[2], tolerance(0.06, n));
        assertEquals(0, m[3], tolerance(0.5, n));
        assertEquals(0, m[4], tolerance(0.5, n));
        // E|Tr U|⁴ = 2, so the variance of |Tr U|² is 1; |Tr U²|² is at most d² = 9 with mean 2
        assertEquals(1, m[5], tolerance(1, n));
        assertEquals(2, m[6], tolerance(2 * 7, n));
    }

    @ParameterizedTest
    @ValueSource(ints = {1, 2, 17, 64})
    void unitariesAreUnitary(int d) {
        Operator u = HaarUnitary.of(d, 9);
        Operator p = u.adjoint().times(u);
        for (int i = 0; i < d; i++) {
            for (int j = 0; j < d; j++) {
                assertEquals(i == j ? 1 : 0, p.re(i, j), d * 0x1p-52 + 0x1p-51);
                assertEquals(0, p.im(i, j), d * 0x1p-52);
            }
        }
    }

    @Test
    void prescribedSpectraAreKept() {
        double[] spectrum = {0.5, 0, 0.25, 0.25, 1e-20, 1e-120, 1e-300};
        DensityOperator rho = RandomStates.ofSpectrum(spectrum, 3);
        EnclosedMatrix x = rho.factor().columns();
        assertEquals(6, x.columns());
        double[] positive = Arrays.stream(spectrum).filter(p -> p > 0).toArray();
        // X*X = D^½ U*U D^½: scaled by the roots it is the identity up to the orthonormality of U
        for (int j = 0; j < 6; j++) {
            for (int k = 0; k <= j; k++) {
                double re = 0;
                double im = 0;
                for (int i = 0; i < 7; i++) {
                    double a = x.re(i, j) / Math.sqrt(positive[j]);
                    double b = x.im(i, j) / Math.sqrt(positive[j]);
                    double c = x.re(i, k) / Math.sqrt(positive[k]);
                    double d = x.im(i, k) / Math.sqrt(positive[k]);
                    re += a * c + b * d;
                    im += a * d - b * c;
                }
                assertEquals(j == k ? 1 : 0, re, 2e-15);
                assertEquals(0, im, 2e-15);
            }
        }
        assertEquals(
                1, RandomStates.ofSpectrum(new double[] {0, 1, 0}, 3).factor().rank());
    }

    /** Eigenvectors of a prescribed spectrum are Haar distributed: E ρ = 1/d. */
    @Test
    void prescribedSpectraPointEverywhere() {
        int n = 3000;
        double[] mean = new double[3];
        for (long seed = 0; seed < n; seed++) {
            DensityOperator rho = RandomStates.ofSpectrum(new double[] {0.75, 0.25}, seed);
            mean[0] += rho.re(0, 0) / n;
            mean[1] += rho.re(0, 1) / n;
            mean[2] += rho.im(0, 1) / n;
        }
        // each is ¼ a component of a uniform unit vector, of variance 1/3
        assertEquals(0.5, mean[0], tolerance(1.0 / 48, n));
        assertEquals(0, mean[1], tolerance(1.0 / 48, n));
        assertEquals(0, mean[2], tolerance(1.0 / 48, n));
    }

    @Test
    void theSeedDecidesEveryBit() {
        assertEquals(RandomStates.bures(4, 7), RandomStates.bures(4, 7));
        assertEquals(HaarUnitary.of(4, 7), HaarUnitary.of(4, 7));
        assertNotEquals(RandomStates.bures(4, 7), RandomStates.bures(4, 8));
        assertNotEquals(RandomStates.hilbertSchmidt(4, 0), RandomStates.hilbertSchmidt(4, 1));
        // recorded: a change of these bits is a change of every published example
        Operator u = HaarUnitary.of(2, 2026);
        assertEquals(RECORDED[0], u.re(0, 0));
        assertEquals(RECORDED[1], u.im(1, 1));
        assertEquals(RECORDED[2], RandomStates.bures(3, 2026).re(2, 2));
    }

    private static final double[] RECORDED = {-0.5159834616629798, 0.297533390715145, 0.29452217094260486};

    @Test
    void badDimensionsAndSpectraAreRefused() {
        InvalidInputException e = assertThrows(InvalidInputException.class, () -> RandomStates.hilbertSchmidt(0, 1));
        assertEquals(
                "RandomStates.hilbertSchmidt: the shape is 0 x 0, expected at least 1 x 1; give at least one entry",
                e.getMessage());
        assertThrows(InvalidInputException.class, () -> RandomStates.pure(-1, 1));
        assertThrows(InvalidInputException.class, () -> RandomStates.induced(2, 0, 1));
        assertThrows(InvalidInputException.class, () -> RandomStates.bures(1 << 30, 1));
        assertThrows(InvalidInputException.class, () -> HaarUnitary.of(0, 1));
        assertThrows(InvalidInputException.class, () -> RandomStates.ofSpectrum(new double[] {0.5, 0.4}, 1));
        assertThrows(InvalidInputException.class, () -> RandomStates.ofSpectrum(new double[] {1.5, -0.5}, 1));
        assertThrows(InvalidInputException.class, () -> RandomStates.ofSpectrum(new double[] {Double.NaN}, 1));
        assertThrows(InvalidInputException.class, () -> RandomStates.ofSpectrum(new double[0], 1));
    }

    @Test
    void dimensionOneIsTheOneState() {
        assertEquals(1, RandomStates.hilbertSchmidt(1, 3).re(0, 0), 1e-15);
        assertEquals(1, RandomStates.bures(1, 3).re(0, 0), 1e-15);
        assertEquals(1, HaarUnitary.of(1, 3).trace().modulus(), 1e-15);
    }
}
