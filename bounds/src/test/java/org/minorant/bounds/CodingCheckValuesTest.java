package org.minorant.bounds;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.pair.PositivePair;

/**
 * The binary pure-state channel of overlap 0.78, n uses built as words, against values computed by an independent program from the closed form
 * (12 digits; small n also by brute force there).
 */
final class CodingCheckValuesTest {

    private static final double OVERLAP = 0.78;

    /** Half a unit of the twelfth digit, and the rounding of the kets to double: n times a few 1e-16. */
    private static final double TWELVE_DIGITS = 5.1e-13;

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
    void achievableErrorOfWords(int n, long messages, double expected) {
        ClassicalQuantumChannel channel = ClassicalQuantumChannel.of(Channels.pureWords(OVERLAP, n));
        CodingBounds bounds = CodingBounds.of(channel).withInput(Channels.uniform(1 << n));
        Enclosure error = bounds.achievableError(messages);
        assertEquals(expected, error.midpoint(), TWELVE_DIGITS);
        assertTrue(error.relativeWidth() < 1e-12, error.toIntervalString(17));
    }

    /** All 1024 words give the same value: one pair is enough. */
    @Test
    void achievableErrorOfTenUses() {
        double[] word = {1};
        double[] output = {1};
        for (int use = 0; use < 10; use++) {
            word = Channels.tensor(word, Channels.ket(OVERLAP, use % 3 == 0));
            output = Channels.tensor(output, new double[] {(1 + OVERLAP) / 2, (1 - OVERLAP) / 2});
        }
        PositivePair pair = PositivePair.of(DensityOperator.ofKet(word), DensityOperator.ofEigenvalues(output));
        // weights M − 1 = 3; the letters' common value is also their mean
        Enclosure error = pair.traceMinimum(3);
        assertEquals(.224535331522, error.midpoint(), TWELVE_DIGITS);
        assertTrue(error.relativeWidth() < 1e-12, error.toIntervalString(17));
    }

    @ParameterizedTest
    @CsvSource({
        "1, .01, .749549865132",
        "1, .1, .596927593751",
        "2, .01, .586144526189",
        "2, .1, .435323747668",
        "4, .01, .362701422889",
        "4, .1, .240312574160"
    })
    void typeTwoErrorAgainstTheOutput(int n, double epsilon, double expected) {
        ClassicalQuantumChannel channel = ClassicalQuantumChannel.of(Channels.pureWords(OVERLAP, n));
        CodingBounds bounds = CodingBounds.of(channel).withOutputState(channel.outputState(Channels.uniform(1 << n)));
        Enclosure beta = bounds.converse(epsilon).nats().negate().exp();
        assertEquals(expected, beta.midpoint(), TWELVE_DIGITS);
        assertTrue(beta.relativeWidth() < 1e-12, beta.toIntervalString(17));
    }

    /** The default input and output state of a symmetric channel are the uniform ones. */
    @Test
    void defaultsOfASymmetricChannel() {
        ClassicalQuantumChannel channel = ClassicalQuantumChannel.of(Channels.pureWords(OVERLAP, 2));
        CodingBounds bounds = CodingBounds.of(channel);
        org.junit.jupiter.api.Assertions.assertArrayEquals(Channels.uniform(4), bounds.input());
        assertEquals(.938539061641, bounds.achievableError(4).midpoint(), TWELVE_DIGITS);
        assertEquals(.435323747668, bounds.converse(.1).nats().negate().exp().midpoint(), TWELVE_DIGITS);
        assertEquals(2 * 0.4999159581645, channel.capacity().value().bits().midpoint(), 1e-12);
    }
}
