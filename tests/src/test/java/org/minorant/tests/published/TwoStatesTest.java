package org.minorant.tests.published;

import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.measurement.HypothesisPair;

/**
 * Minimum errors of n copies of two qubit states, as dense tensor products. Source: computed by an independent program with 100-digit arithmetic (rows with
 * many digits) or in double precision, n ≤ 8 also by brute force (rows with 14).
 */
class TwoStatesTest {

    /** Lengths and angle of the two Bloch vectors are decimals: each of n copies differs by 2^-52 in trace norm, and the error by that. */
    private static double rounding(int n) {
        return n * 0x1p-51;
    }

    private static Enclosure minimumError(DensityOperator rho, DensityOperator sigma, int n, double prior) {
        DensityOperator a = rho;
        DensityOperator b = sigma;
        for (int i = 1; i < n; i++) {
            a = a.tensor(rho);
            b = b.tensor(sigma);
        }
        return HypothesisPair.of(a, b).minimumError(prior);
    }

    @ParameterizedTest
    @CsvSource({"1, 0.3197224362268005353440389", "2, 0.2574710914690333082964585"})
    void pairX(int n, String error) {
        DensityOperator rho = DensityOperator.ofBloch(0, 0, 0.9);
        DensityOperator sigma = DensityOperator.ofBloch(0.6, 0, 0.5);
        Printed.of(error).isIn(minimumError(rho, sigma, n, 0.5), rounding(n));
    }

    @ParameterizedTest
    @CsvSource({"1, .21715728752538", "2, .17503846381456", "3, .11175761347764", "6, .04717073694610"})
    void pairOfEqualLengthsAtRightAngles(int n, String error) {
        DensityOperator rho = DensityOperator.ofBloch(0, 0, 0.8);
        DensityOperator sigma = DensityOperator.ofBloch(0.8, 0, 0);
        Printed.of(error).isIn(minimumError(rho, sigma, n, 0.5), rounding(n));
    }

    @ParameterizedTest
    @CsvSource({"1, .30474375810233", "2, .22068476044478", "3, .17937071489262", "6, .10730473766671"})
    void pairOfDifferentLengths(int n, String error) {
        DensityOperator rho = DensityOperator.ofBloch(0, 0, 0.9);
        DensityOperator sigma = DensityOperator.ofBloch(0.5 * Math.sqrt(0.75), 0, 0.25);
        Printed.of(error).isIn(minimumError(rho, sigma, n, 0.5), rounding(n));
    }

    /** At one copy measuring is not worth it: the prior itself is the error. */
    @ParameterizedTest
    @CsvSource({"1, 0.3", "7, 0.08079190075909707256660"})
    void unequalPriors(int n, String error) {
        DensityOperator rho = DensityOperator.ofBloch(0, 0, 0.7);
        DensityOperator sigma = DensityOperator.ofBloch(0.4 * Math.sqrt(0.91), 0, -0.12);
        Printed.of(error).isIn(minimumError(rho, sigma, n, 0.3), rounding(n));
    }
}
