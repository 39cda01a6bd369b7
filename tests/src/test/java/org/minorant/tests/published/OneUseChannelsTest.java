package org.minorant.tests.published;

import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.math.MathContext;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.minorant.bounds.ClassicalQuantumChannel;
import org.minorant.bounds.CodingBounds;
import org.minorant.core.DensityOperator;
import org.minorant.core.pair.PositivePair;
import org.minorant.measurement.HypothesisPair;

/**
 * The binary pure-state channel of overlap 0.78 with n uses as one use of a larger channel, and the binary symmetric channel through its types. Source: computed by
 * an independent program, closed form; small n also by brute force.
 */
class OneUseChannelsTest {

    private static final double OVERLAP = 0.78;

    /** The products of n of the two kets, in all 2^n ways. */
    private static List<DensityOperator> words(int n) {
        double[][] kets = {{1, 0}, {OVERLAP, Math.sqrt(1 - OVERLAP * OVERLAP)}};
        List<double[]> words = new ArrayList<>(List.of(new double[] {1}));
        for (int i = 0; i < n; i++) {
            List<double[]> longer = new ArrayList<>();
            for (double[] word : words) {
                for (double[] ket : kets) {
                    double[] w = new double[2 * word.length];
                    Arrays.setAll(w, k -> word[k / 2] * ket[k % 2]);
                    longer.add(w);
                }
            }
            words = longer;
        }
        return words.stream().map(DensityOperator::ofKet).toList();
    }

    /** f(M − 1) at the uniform input, to 12 digits. */
    @ParameterizedTest
    @CsvSource({
        "1, 2, .687110243057",
        "2, 2, .532170663716",
        "2, 4, .938539061641",
        "3, 4, .791432948783",
        "5, 2, .273656233970",
        "5, 4, .555807147113",
        "5, 8, .789360642729"
    })
    void achievableErrors(int n, long messages, String error) {
        double[] uniform = new double[1 << n];
        Arrays.fill(uniform, 1.0 / uniform.length);
        CodingBounds bounds =
                CodingBounds.of(ClassicalQuantumChannel.of(words(n))).withInput(uniform);
        Printed.of(error).isIn(bounds.achievableError(messages), n * messages * 0x1p-51);
    }

    /** β_ε of a word against the product of the average output, the same for every word. */
    @ParameterizedTest
    @CsvSource({
        "1, .01, .749549865132",
        "1, .1, .596927593751",
        "2, .01, .586144526189",
        "2, .1, .435323747668",
        "4, .01, .362701422889",
        "4, .1, .240312574160"
    })
    void typeTwoErrorsAgainstTheProductOutput(int n, double level, String beta) {
        List<DensityOperator> letters = words(1);
        DensityOperator average = DensityOperator.mixture(letters, 0.5, 0.5);
        DensityOperator word = letters.get(0);
        DensityOperator product = average;
        for (int i = 1; i < n; i++) {
            word = word.tensor(letters.get(0));
            product = product.tensor(average);
        }
        Printed.of(beta).isIn(HypothesisPair.of(word, product).typeTwoError(level), n * 0x1p-48);
    }

    /**
     * Crossover 0.11: the largest log2 M with f(M − 1) ≤ 1e-3; dependence testing is exactly one bit higher. Source: computed, dependence testing of Polyanskiy, Poor,
     * Verdú, IEEE Trans. IT 56, 2307 (2010).
     */
    @ParameterizedTest
    @CsvSource({
        "100, 16.054758, 17.054747",
        "500, 180.064659, 181.064659",
        "1000, 403.056651, 404.056651",
        "2000, 864.635303, 865.635303"
    })
    void binarySymmetricChannelByTypes(int n, String bits, String dependenceTesting) {
        MathContext digits = new MathContext(40);
        double[] a = new double[n + 1];
        double[] b = new double[n + 1];
        BigDecimal choose = BigDecimal.ONE;
        for (int k = 0; k <= n; k++) {
            a[k] = choose.multiply(new BigDecimal("0.11").pow(k, digits), digits)
                    .multiply(new BigDecimal("0.89").pow(n - k, digits), digits)
                    .doubleValue();
            b[k] = choose.divide(BigDecimal.valueOf(2).pow(n), digits).doubleValue();
            choose = choose.multiply(BigDecimal.valueOf(n - k)).divide(BigDecimal.valueOf(k + 1), digits);
        }
        PositivePair pair = PositivePair.ofSpectra(a, b);
        // the curve increases: just below the printed value the error is below 1e-3, just above it is above
        double printed = Double.parseDouble(bits);
        assertTrue(pair.traceMinimum(Math.pow(2, printed - 1e-6) - 1).upper() < 1e-3);
        assertTrue(pair.traceMinimum(Math.pow(2, printed + 1e-6) - 1).lower() > 1e-3);
        double testing = Double.parseDouble(dependenceTesting);
        assertTrue(pair.traceMinimum((Math.pow(2, testing - 1e-6) - 1) / 2).upper() < 1e-3);
        assertTrue(pair.traceMinimum((Math.pow(2, testing + 1e-6) - 1) / 2).lower() > 1e-3);
    }
}
