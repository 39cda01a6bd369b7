package org.minorant.tests.published;

import static org.junit.jupiter.api.Assertions.assertTrue;

import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.measurement.HypothesisPair;

/**
 * Minimum errors of n copies of two qubit states by spin blocks. Source: computed by an independent program with 100-digit arithmetic (rows with many digits) or in double precision
 * (rows with at most 14).
 */
class ManyCopiesTest {

    private static final DensityOperator UP = DensityOperator.ofBloch(0, 0, 0.9);

    /**
     * Directions and lengths that are not decimals are rounded to double. That turns each of n copies by 2^-52 or less; the logarithm of the error, about n times the Chernoff exponent, moves
     * by n times that, and by the state's smallest eigenvalue in the denominator, 16 at most here.
     */
    private static double rounding(int n, String error) {
        return n * 0x1p-47 * Double.parseDouble(error);
    }

    private static void check(DensityOperator rho, DensityOperator sigma, int n, double prior, String error) {
        Enclosure e = HypothesisPair.of(rho, sigma).copies(n).minimumError(prior);
        Printed.of(error).isIn(e, rounding(n, error));
        // truncation stays within 1e-12; states of equal length make every block singular, which costs more
        assertTrue(e.relativeWidth() <= 1e-11, () -> n + " copies: " + e.relativeWidth());
    }

    @ParameterizedTest
    @CsvSource({
        "2, 0.2574710914690333082964585",
        "10, 0.07994611919654871754950617",
        "40, 0.002728244188532257295161601",
        "80, 4.639979251191414659320e-05",
        "200, 3.938023188890161638e-10",
        "500, 1.642877958646013210538e-22",
        "1000, 5.773837507929116670888e-43"
    })
    void pairX(int n, String error) {
        check(UP, DensityOperator.ofBloch(0.6, 0, 0.5), n, 0.5, error);
    }

    @ParameterizedTest
    @CsvSource({
        "2, .17503846381456",
        "3, .11175761347764",
        "6, .04717073694610",
        "8, .02676518217410",
        "50, 9.518055466899646216e-07",
        "100, 9.488101618446099071e-12"
    })
    void pairOfEqualLengthsAtRightAngles(int n, String error) {
        check(DensityOperator.ofBloch(0, 0, 0.8), DensityOperator.ofBloch(0.8, 0, 0), n, 0.5, error);
    }

    @ParameterizedTest
    @CsvSource({
        "2, .22068476044478",
        "3, .17937071489262",
        "6, .10730473766671",
        "8, .07815095440532",
        "200, 1.384476825224074259e-12"
    })
    void pairOfDifferentLengths(int n, String error) {
        check(UP, DensityOperator.ofBloch(0.5 * Math.sqrt(0.75), 0, 0.25), n, 0.5, error);
    }

    @ParameterizedTest
    @CsvSource({"10, .21591037407", "20, .13370364617", "50, 4.0288497e-2", "100, 6.8483334e-3", "200, 2.529894e-4"})
    void pairOfShortVectors(int n, String error) {
        double half = 0.6 * Math.sqrt(0.5);
        check(DensityOperator.ofBloch(0, 0, 0.6), DensityOperator.ofBloch(half, 0, half), n, 0.5, error);
    }

    @ParameterizedTest
    @CsvSource({"7, 0.08079190075909707256660"})
    void unequalPriors(int n, String error) {
        DensityOperator rho = DensityOperator.ofBloch(0, 0, 0.7);
        check(rho, DensityOperator.ofBloch(0.4 * Math.sqrt(0.91), 0, -0.12), n, 0.3, error);
    }
}
