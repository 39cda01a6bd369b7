package org.minorant.bounds;

import static org.junit.jupiter.api.Assertions.assertTrue;

import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;

/**
 * Bits in n uses at error 1e-3, against values computed by independent programs: the binary pure-state channel from the closed form (small n also by brute force there), the binary
 * symmetric channel from binomial sums, the symmetric mixed qubit channel in double precision.
 */
final class UsesCheckValuesTest {

    private static final double ERROR = 1e-3;

    /** Half a unit of the sixth decimal. */
    private static final double SIX = 5.1e-7;

    /** Enclosures are to be narrower than this, in bits; the rounding of each use's trace, n · 2^-52, over a slope of f near 0.003, gives a little more at 10^6 uses. */
    private static double narrow(int n) {
        return Math.max(1e-6, 1.2e-12 * n);
    }

    private static CodingBounds kets(double overlap) {
        return CodingBounds.of(ClassicalQuantumChannel.of(
                DensityOperator.ofKet(Channels.ket(overlap, false)),
                DensityOperator.ofKet(Channels.ket(overlap, true))));
    }

    private static void assertBits(int n, double expected, Information actual, double tolerance) {
        Enclosure bits = actual.bits();
        assertTrue(bits.widen(tolerance).contains(expected), () -> expected + " " + bits.toIntervalString(17));
        assertTrue(bits.width() < narrow(n), () -> bits.toIntervalString(17));
    }

    /** The converse of the last row was computed for this test, by an independent evaluation of the secular equation in 30 digits; a list of double precision has 809176.92875. */
    @ParameterizedTest
    @CsvSource({
        "0.78, 100, 23.094144, 34.574485",
        "0.78, 500, 187.711840, 200.881080",
        "0.78, 1000, 410.781774, 424.563873",
        "0.78, 2000, 872.577952, 886.934613",
        "0.5, 100, 59.37946954, 70.65210694",
        "0.5, 1000, 744.87879219, 758.23635232",
        "0.5, 10000, 7901.68276286, 7916.84679842",
        "0.5, 1000000, 809158.384384, 809176.92888726"
    })
    void binaryPureStateChannel(double overlap, int n, double low, double high) {
        CodingBounds bounds = kets(overlap).uses(n);
        assertBits(n, low, bounds.achievable(ERROR), SIX);
        assertBits(n, high, bounds.converse(ERROR), SIX);
    }

    @ParameterizedTest
    @CsvSource({
        "100, 28.173526, 16.054758",
        "500, 193.278493, 180.064659",
        "1000, 416.835834, 403.056651",
        "2000, 879.434111, 864.635303"
    })
    void binarySymmetricChannel(int n, double high, double low) {
        double e = 0.11;
        CodingBounds bounds = CodingBounds.of(ClassicalQuantumChannel.ofStochasticMatrix(
                        new double[][] {{1 - e, e}, {e, 1 - e}}))
                .uses(n);
        assertBits(n, low, bounds.achievable(ERROR), SIX);
        assertBits(n, high, bounds.converse(ERROR), SIX);
    }

    /** Seven digits are good. The values at n = 500, 135.6581663 and 149.0979743, take too long for every build. */
    @Test
    void symmetricMixedQubitChannel() {
        double angle = 0.8;
        double x = 0.9 * Math.sin(angle);
        double z = 0.9 * Math.cos(angle);
        CodingBounds bounds = CodingBounds.of(
                        ClassicalQuantumChannel.of(DensityOperator.ofBloch(x, 0, z), DensityOperator.ofBloch(-x, 0, z)))
                .uses(100);
        assertBits(100, 8.8583395, bounds.achievable(ERROR), 5.1e-7);
        assertBits(100, 21.0266500, bounds.converse(ERROR), 5.1e-7);
    }
}
