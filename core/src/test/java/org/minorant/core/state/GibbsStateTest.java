package org.minorant.core.state;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.math.MathContext;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;
import org.minorant.core.DensityOperator;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.HermitianOperator;
import org.minorant.core.InvalidInputException;
import org.minorant.core.Operator;

class GibbsStateTest {

    private static final MathContext DIGITS = new MathContext(60);

    /** Exponents formed exactly, exponentials in 60 digits. */
    @ParameterizedTest
    @CsvSource({"1", "0.37", "150", "-2.5", "-150"})
    void diagonalHamiltoniansKeepEveryDigit(double b) {
        double[] energies = {1000.1, 1000.3, 999.9, 1003.7};
        DensityOperator rho = GibbsState.of(HermitianOperator.diagonal(energies), b);
        BigDecimal sum = BigDecimal.ZERO;
        BigDecimal[] w = new BigDecimal[4];
        double best = b > 0 ? 999.9 : 1003.7;
        for (int i = 0; i < 4; i++) {
            BigDecimal x =
                    new BigDecimal(energies[i]).subtract(new BigDecimal(best)).multiply(new BigDecimal(b), DIGITS);
            w[i] = LightStatesTest.expMinus(x);
            sum = sum.add(w[i]);
        }
        for (int i = 0; i < 4; i++) {
            double expected = w[i].divide(sum, DIGITS).doubleValue();
            assertEquals(expected, rho.re(i, i), expected * 0x1p-50);
        }
    }

    @Test
    void tinyEigenvaluesStayAndVanishingOnesAreZero() {
        DensityOperator rho = GibbsState.of(HermitianOperator.diagonal(0, 700, 744, 2000), 1);
        assertEquals(StrictMath.exp(-700), rho.re(1, 1), StrictMath.exp(-700) * 0x1p-50);
        assertEquals(StrictMath.exp(-744), rho.re(2, 2));
        assertEquals(0, rho.re(3, 3));
        assertEquals(1, rho.re(0, 0));
    }

    /** The number operator at b = ln(1 + 1/m) gives thermal light. */
    @Test
    void gibbsStateOfTheNumberOperatorIsThermalLight() {
        double m = 0.8;
        DensityOperator light =
                LightStates.thermal(m, Truncation.ofDimension(30)).state();
        double[] numbers = new double[30];
        for (int n = 0; n < 30; n++) {
            numbers[n] = n;
        }
        DensityOperator gibbs = GibbsState.of(HermitianOperator.diagonal(numbers), Math.log1p(1 / m));
        for (int n = 0; n < 30; n++) {
            // the rounded b times n, and a few roundings
            assertEquals(light.re(n, n), gibbs.re(n, n), light.re(n, n) * (n + 4) * 0x1p-52);
        }
    }

    /** ½(1 − tanh(b|h|)) = 1/(1 + e^(2b|h|)) for H = h·σ, down to 1e-300: as far as the columns go, relatively. */
    @ParameterizedTest
    @CsvSource({"0.5", "5", "40", "340", "-40"})
    void smallEigenvaluesOfDenseHamiltoniansKeepTheirDigits(double b) {
        // |h| = 1 exactly: (2/3, 1/3, 2/3) times 3
        HermitianOperator h = HermitianOperator.of(new double[][] {{2, 2}, {2, -2}}, new double[][] {{0, -1}, {1, 0}});
        DensityOperator rho = GibbsState.of(h, b / 3);
        double t = Math.tanh(b);
        // the state is ½(1 − tanh(b) h/|h|)
        assertEquals(0.5 - t / 3, rho.re(0, 0), 1e-15);
        assertEquals(-t / 3, rho.re(1, 0), 1e-15);
        assertEquals(-t / 6, rho.im(1, 0), 1e-15);
        EnclosedMatrix x = rho.factor().columns();
        assertEquals(2, x.columns());
        assertEquals(0, rho.factor().relativeError());
        double small = Math.min(squaredNorm(x, 0), squaredNorm(x, 1));
        double expected = 1 / (1 + StrictMath.exp(2 * Math.abs(b)));
        // b/3 is rounded: the exponent moves by 2^-53 of itself
        assertEquals(expected, small, expected * (4 + 2 * Math.abs(b)) * 0x1p-52);
        assertTrue(rho.traceEnclosure().contains(1));
    }

    private static double squaredNorm(EnclosedMatrix x, int j) {
        // scaled, so that squares of 1e-150 and less do not underflow
        double s = 0;
        double scale = 0;
        for (int i = 0; i < x.rows(); i++) {
            scale = Math.max(scale, x.modulusUpper(i, j));
        }
        for (int i = 0; i < x.rows(); i++) {
            s += Math.pow(x.re(i, j) / scale, 2) + Math.pow(x.im(i, j) / scale, 2);
        }
        return s * scale * scale;
    }

    @ParameterizedTest
    @ValueSource(doubles = {1e-300, 1e-20, 1, 1e20, 1e300})
    void theUnitOfEnergyDoesNotMatter(double unit) {
        HermitianOperator h = HermitianOperator.ofReal(new double[][] {{1, 0.5, 0}, {0.5, -0.25, 2}, {0, 2, 0.75}});
        DensityOperator expected = GibbsState.of(h, 1.5);
        DensityOperator rho = GibbsState.of(h.times(unit), 1.5 / unit);
        DensityOperator diagonal = GibbsState.of(HermitianOperator.diagonal(-unit, unit), 1 / unit);
        assertEquals(1 / (1 + Math.exp(2)), diagonal.re(1, 1), 1e-15);
        for (int i = 0; i < 3; i++) {
            for (int j = 0; j < 3; j++) {
                assertEquals(expected.re(i, j), rho.re(i, j), 1e-15);
            }
        }
    }

    /** Against a Taylor exponential that knows nothing of eigenvectors. */
    @Test
    void denseStatesAreExponentials() {
        HermitianOperator h = HermitianOperator.of(
                new double[][] {{1, 0.5, -0.25}, {0.5, -1, 1}, {-0.25, 1, 0.5}},
                new double[][] {{0, 1, 0.5}, {-1, 0, -0.75}, {-0.5, 0.75, 0}});
        Operator e = Exponential.of(h.times(-0.8));
        DensityOperator rho = GibbsState.of(h, 0.8);
        double z = e.trace().re();
        for (int i = 0; i < 3; i++) {
            for (int j = 0; j < 3; j++) {
                assertEquals(e.re(i, j) / z, rho.re(i, j), 1e-12);
                assertEquals(e.im(i, j) / z, rho.im(i, j), 1e-12);
            }
        }
    }

    @Test
    void infiniteTemperatureAndFlatHamiltoniansGiveTheMaximallyMixedState() {
        HermitianOperator h = HermitianOperator.ofReal(new double[][] {{1, 2}, {2, -3}});
        DensityOperator rho = GibbsState.of(h, 0);
        assertEquals(0.5, rho.re(0, 0), 1e-15);
        assertEquals(0, rho.re(1, 0), 1e-15);
        assertEquals(
                DensityOperator.maximallyMixed(3),
                GibbsState.of(HermitianOperator.identity(3).times(1e300), 5));
        assertEquals(
                DensityOperator.maximallyMixed(3),
                GibbsState.of(HermitianOperator.identity(3).times(0), 5));
    }

    @Test
    void extremesNeitherOverflowNorBecomeNaN() {
        HermitianOperator h = HermitianOperator.diagonal(-Double.MAX_VALUE, Double.MAX_VALUE, 0);
        for (double b : new double[] {Double.MIN_VALUE, 1, Double.MAX_VALUE, -Double.MIN_VALUE, -Double.MAX_VALUE}) {
            DensityOperator rho = GibbsState.of(h, b);
            assertTrue(rho.traceEnclosure().contains(1), "b = " + b);
        }
        assertEquals(1, GibbsState.of(h, Double.MAX_VALUE).re(0, 0));
        assertEquals(1, GibbsState.of(h, -1).re(1, 1));
        HermitianOperator dense = HermitianOperator.ofReal(new double[][] {{0, 1}, {1, 0}});
        assertEquals(0.5, GibbsState.of(dense, 1e300).re(0, 0), 1e-15);
        assertEquals(1, GibbsState.of(dense, 1e300).factor().rank());
        // the subnormal b carries two bits only
        double p = GibbsState.of(h, 0x1p-1074).re(1, 1);
        assertEquals(1 / 3.0, p, 1e-15);
    }

    @ParameterizedTest
    @ValueSource(doubles = {Double.NaN, Double.POSITIVE_INFINITY, Double.NEGATIVE_INFINITY})
    void theInverseTemperatureMustBeFinite(double b) {
        InvalidInputException e =
                assertThrows(InvalidInputException.class, () -> GibbsState.of(HermitianOperator.identity(2), b));
        assertEquals(
                "GibbsState.of: the inverse temperature is " + b
                        + ", expected between -1.7976931348623157E308 and 1.7976931348623157E308; give a number in that range",
                e.getMessage());
    }
}
