package org.minorant.bounds;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;

/** Classical channels against {@link ExactClassicalBounds}: every enclosure contains the exact value for the doubles given. */
final class ClassicalCodingTest {

    private static final double[][] SYMMETRIC = {{0.89, 0.11}, {0.11, 0.89}};

    private static double[][] symmetricWords(int n) {
        return Channels.words(SYMMETRIC, n);
    }

    @ParameterizedTest
    @ValueSource(ints = {1, 2, 5})
    void binarySymmetricWords(int n) {
        double[][] rows = symmetricWords(n);
        double[] uniform = Channels.uniform(rows.length);
        ExactClassicalBounds exact = new ExactClassicalBounds(rows);
        CodingBounds bounds = CodingBounds.of(ClassicalQuantumChannel.ofStochasticMatrix(rows))
                .withInput(uniform)
                .withOutputState(DensityOperator.maximallyMixed(rows.length));
        for (long m : new long[] {2, 3, 5, 8, 1L << n}) {
            BigDecimal value = exact.dependenceTesting(uniform, BigDecimal.valueOf(m - 1));
            contains(bounds.achievableError(m), value.min(BigDecimal.ONE), 1e-13);
        }
        for (double epsilon : new double[] {1e-6, 0.01, 0.1, 0.25, 0.6, 0.95}) {
            inverted(bounds, exact, uniform, epsilon);
            if (n <= 2) {
                // the number of corners and crossings grows like the fourth power of the number of words
                contains(bounds.converse(epsilon).nats().negate().exp(), exact.converse(uniform, epsilon), 1e-12);
            }
        }
    }

    private static void contains(Enclosure e, BigDecimal value, double width) {
        assertTrue(e.contains(value), () -> e.toIntervalString(17) + " misses " + value);
        assertTrue(e.relativeWidth() < width, () -> "width of " + e.toIntervalString(17));
    }

    /** e^(ln M) − 1 of the threshold against the exact crossing, wherever that is at least two messages. */
    private static void inverted(CodingBounds bounds, ExactClassicalBounds exact, double[] input, double epsilon) {
        BigDecimal[] root = exact.othersAt(input, epsilon);
        Enclosure m = bounds.achievable(epsilon).nats().exp();
        if (root[1].compareTo(BigDecimal.ONE) < 0) {
            assertEquals(Enclosure.ONE, m);
        } else if (root[0].compareTo(BigDecimal.ONE) > 0) {
            assertTrue(
                    m.contains(root[0].add(BigDecimal.ONE)), () -> m.toIntervalString(17) + " misses 1 + " + root[0]);
            assertTrue(m.relativeWidth() < 1e-11, m.toIntervalString(17));
        }
    }

    /** Ten uses, 1024 words, against the closed form by types, in decimal arithmetic. */
    @Test
    void tenUsesOfTheBinarySymmetricChannel() {
        int n = 10;
        double[][] rows = symmetricWords(n);
        CodingBounds bounds = CodingBounds.of(ClassicalQuantumChannel.ofStochasticMatrix(rows))
                .withInput(Channels.uniform(rows.length))
                .withOutputState(DensityOperator.maximallyMixed(rows.length));
        BigDecimal p = new BigDecimal("0.11");
        BigDecimal q = new BigDecimal("0.89");
        BigDecimal uniform = new BigDecimal(0x1p-10);
        for (long m : new long[] {2, 16}) {
            BigDecimal sum = BigDecimal.ZERO;
            BigDecimal binomial = BigDecimal.ONE;
            for (int k = 0; k <= n; k++) {
                BigDecimal word = p.pow(k).multiply(q.pow(n - k));
                sum = sum.add(binomial.multiply(word.min(uniform.multiply(BigDecimal.valueOf(m - 1)))));
                binomial = binomial.multiply(BigDecimal.valueOf(n - k))
                        .divide(BigDecimal.valueOf(k + 1), ExactClassicalBounds.DIGITS);
            }
            double expected = sum.doubleValue();
            // each of ten factors and nine products is rounded to double
            Enclosure error = bounds.achievableError(m);
            assertTrue(
                    error.widen(20 * 0x1p-53 * expected).contains(expected),
                    () -> error.toIntervalString(17) + " misses " + expected);
            assertTrue(error.relativeWidth() < 1e-12, error.toIntervalString(17));
        }
        for (double epsilon : new double[] {1e-3, 0.1}) {
            double expected = neymanPearson(n, p, epsilon).doubleValue();
            Enclosure beta = bounds.converse(epsilon).nats().negate().exp();
            // the rounding of the words' probabilities, at most 20 units, moves the test by as much, relative to 1 -
            // epsilon at worst
            assertTrue(
                    beta.widen(40 * 0x1p-53).contains(expected),
                    () -> beta.toIntervalString(17) + " misses " + expected);
            assertTrue(beta.relativeWidth() < 1e-11, beta.toIntervalString(17));
        }
    }

    /** β of the best randomised test of Bernoulli(p)^n against uniform: the likeliest outcomes first, until 1 − ε is reached. */
    private static BigDecimal neymanPearson(int n, BigDecimal p, double epsilon) {
        BigDecimal missing = BigDecimal.ONE.subtract(new BigDecimal(epsilon));
        BigDecimal beta = BigDecimal.ZERO;
        BigDecimal binomial = BigDecimal.ONE;
        for (int k = 0; k <= n; k++) {
            BigDecimal weight = binomial.multiply(p.pow(k))
                    .multiply(BigDecimal.ONE.subtract(p).pow(n - k));
            BigDecimal outcomes = binomial.multiply(new BigDecimal(Math.pow(0.5, n)));
            if (weight.compareTo(missing) >= 0) {
                return beta.add(outcomes.multiply(missing).divide(weight, ExactClassicalBounds.DIGITS));
            }
            missing = missing.subtract(weight);
            beta = beta.add(outcomes);
            binomial = binomial.multiply(BigDecimal.valueOf(n - k))
                    .divide(BigDecimal.valueOf(k + 1), ExactClassicalBounds.DIGITS);
        }
        throw new AssertionError("the whole space covers 1 - epsilon");
    }

    /** Random channels, inputs and output states, with zeros and tiny probabilities. */
    @Test
    void randomClassicalChannels() {
        Random random = new Random(11);
        for (int run = 0; run < 300; run++) {
            int letters = 1 + random.nextInt(5);
            int outcomes = 2 + random.nextInt(6);
            double[][] rows = new double[letters][];
            for (int x = 0; x < letters; x++) {
                rows[x] = Channels.distribution(random, outcomes);
            }
            double[] input = Channels.distribution(random, letters);
            double[] sigma = Channels.distribution(random, outcomes);
            double epsilon = Math.pow(10, -5 * random.nextDouble()) * 0.999;
            ExactClassicalBounds exact = new ExactClassicalBounds(rows);
            CodingBounds bounds = CodingBounds.of(ClassicalQuantumChannel.ofStochasticMatrix(rows))
                    .withInput(input)
                    .withOutputState(DensityOperator.ofEigenvalues(sigma));
            long m = 1 + random.nextInt(6);
            Enclosure error = bounds.achievableError(m);
            BigDecimal value = exact.dependenceTesting(input, BigDecimal.valueOf(m - 1));
            assertTrue(
                    error.contains(value.min(BigDecimal.ONE)), () -> error.toIntervalString(17) + " misses " + value);
            inverted(bounds, exact, input, epsilon);
            Enclosure beta = bounds.converse(epsilon).nats().negate().exp();
            BigDecimal best = exact.converse(sigma, epsilon);
            assertTrue(beta.contains(best), () -> beta.toIntervalString(17) + " misses " + best);
            assertTrue(
                    best.signum() == 0 || beta.relativeWidth() < 1e-11, () -> beta.toIntervalString(17) + " " + best);
        }
    }
}
