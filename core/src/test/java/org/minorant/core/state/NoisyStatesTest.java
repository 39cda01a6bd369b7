package org.minorant.core.state;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;
import org.minorant.core.DensityOperator;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.InvalidInputException;

class NoisyStatesTest {

    private static final DensityOperator ENTRIES = DensityOperator.of(
            new double[][] {{0.5, 0.1, 0.2}, {0.1, 0.25, 0}, {0.2, 0, 0.25}},
            new double[][] {{0, -0.05, 0}, {0.05, 0, 0.1}, {0, -0.1, 0}});

    @ParameterizedTest
    @ValueSource(doubles = {0, 1e-3, 0.5, 1})
    void depolarisingShrinksTheBlochVector(double p) {
        DensityOperator rho = NoisyStates.depolarised(DensityOperator.ofBloch(0.6, -0.3, 0.5), p);
        DensityOperator expected = DensityOperator.ofBloch(0.6 * (1 - p), -0.3 * (1 - p), 0.5 * (1 - p));
        for (int i = 0; i < 2; i++) {
            for (int j = 0; j < 2; j++) {
                assertEquals(expected.re(i, j), rho.re(i, j), 2e-16);
                assertEquals(expected.im(i, j), rho.im(i, j), 2e-16);
            }
        }
    }

    /** ⟨φ|ρ|φ⟩ = ‖X*φ‖² for φ orthogonal to the ket, exactly so in these doubles, is the small eigenvalue p/d. */
    @Test
    void aTinyProbabilityKeepsItsDigits() {
        double p = 3e-40;
        DensityOperator rho = NoisyStates.depolarised(DensityOperator.ofKet(0.6, 0.8), p);
        assertTrue(rho.factor().traceError() < p * 1e-40);
        assertTrue(rho.factor().relativeError() < 1e-15);
        EnclosedMatrix x = rho.factor().columns();
        double small = 0;
        for (int j = 0; j < x.columns(); j++) {
            small += Math.pow(x.re(0, j) * 0.8 - x.re(1, j) * 0.6, 2);
        }
        assertEquals(p / 2, small, p * 1e-15);
    }

    @Test
    void depolarisedDiagonalStatesStayDiagonal() {
        DensityOperator rho = NoisyStates.depolarised(DensityOperator.ofEigenvalues(0.75, 0.25, 0, 0), 0.5);
        assertEquals(0.5, rho.re(0, 0));
        assertEquals(0.25, rho.re(1, 1));
        assertEquals(0.125, rho.re(2, 2));
        assertEquals(0, rho.re(0, 1));
    }

    @ParameterizedTest
    @ValueSource(doubles = {0, 0.25, 1})
    void dephasingShrinksWhatIsOffTheDiagonal(double p) {
        DensityOperator rho = NoisyStates.dephased(ENTRIES, p);
        for (int i = 0; i < 3; i++) {
            for (int j = 0; j < 3; j++) {
                double factor = i == j ? 1 : 1 - p;
                assertEquals(factor * ENTRIES.re(i, j) + 0.0, rho.re(i, j));
                assertEquals(factor * ENTRIES.im(i, j) + 0.0, rho.im(i, j));
            }
        }
    }

    @Test
    void dephasedKetsKeepTheirFactor() {
        DensityOperator psi = DensityOperator.ofKet(new double[] {0.6, 0}, new double[] {0, 0.8});
        DensityOperator rho = NoisyStates.dephased(psi, 1e-30);
        assertTrue(rho.isDefinedByFactor());
        assertTrue(rho.factor().relativeError() < 1e-15);
        assertEquals(-0.48, rho.im(0, 1), 1e-16);
        DensityOperator half = NoisyStates.dephased(psi, 0.5);
        assertEquals(0.36, half.re(0, 0), 1e-16);
        assertEquals(-0.24, half.im(0, 1), 1e-16);
        assertEquals(0, NoisyStates.dephased(psi, 1).im(0, 1), 1e-16);
    }

    @ParameterizedTest
    @ValueSource(doubles = {-1e-300, 1.0000000000000002, Double.NaN, Double.POSITIVE_INFINITY})
    void probabilitiesAreFromZeroToOne(double p) {
        InvalidInputException e = assertThrows(InvalidInputException.class, () -> NoisyStates.depolarised(ENTRIES, p));
        assertEquals(
                "NoisyStates.depolarised: the probability is " + p
                        + ", expected between 0.0 and 1.0; give a number in that range",
                e.getMessage());
        e = assertThrows(InvalidInputException.class, () -> NoisyStates.dephased(ENTRIES, p));
        assertTrue(e.getMessage().startsWith("NoisyStates.dephased: the probability is " + p));
    }
}
