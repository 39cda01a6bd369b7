package org.minorant.bounds;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;

import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.function.Executable;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;
import org.minorant.core.InvalidInputException;

/** Every refusal of channels and coding bounds, word for word. */
final class ChannelRefusalsTest {

    private static final DensityOperator UP = DensityOperator.ofBloch(0, 0, 0.9);
    private static final DensityOperator SIDE = DensityOperator.ofBloch(0.6, 0, 0.5);
    private static final ClassicalQuantumChannel CHANNEL = ClassicalQuantumChannel.of(UP, SIDE);
    private static final CodingBounds BOUNDS = CodingBounds.of(CHANNEL);

    private static void refused(String message, Executable call) {
        assertEquals(message, assertThrows(InvalidInputException.class, call).getMessage());
    }

    @Test
    void channels() {
        refused(
                "ClassicalQuantumChannel.of: the channel has no letter, expected at least 1; give one output state for each input letter",
                () -> ClassicalQuantumChannel.of(List.of()));
        refused(
                "ClassicalQuantumChannel.of: output 1 has dimension 3, expected 2, as output 0; all outputs must be states of one system",
                () -> ClassicalQuantumChannel.of(UP, DensityOperator.maximallyMixed(3)));
    }

    @Test
    void stochasticMatrices() {
        String asked = "ClassicalQuantumChannel.ofStochasticMatrix: ";
        refused(
                asked
                        + "the channel has no letter, expected at least 1; give one row of probabilities for each input letter",
                () -> ClassicalQuantumChannel.ofStochasticMatrix(new double[0][]));
        refused(
                asked
                        + "row 1 has 3 entries, expected 2, one for each outcome; give every row one probability for each outcome",
                () -> ClassicalQuantumChannel.ofStochasticMatrix(new double[][] {{.5, .5}, {.5, .25, .25}}));
        refused(
                asked + "row 0 is empty, expected at least 1 outcome; give one probability for each outcome",
                () -> ClassicalQuantumChannel.ofStochasticMatrix(new double[][] {{}, {}}));
        refused(
                asked + "row 1, entry 0 is -0.5, expected at least 0 and finite; give probabilities",
                () -> ClassicalQuantumChannel.ofStochasticMatrix(new double[][] {{.5, .5}, {-.5, 1.5}}));
        refused(
                asked + "row 0, entry 1 is NaN, expected at least 0 and finite; give probabilities",
                () -> ClassicalQuantumChannel.ofStochasticMatrix(new double[][] {{.5, Double.NaN}}));
        refused(
                asked + "row 0, entry 0 is Infinity, expected at least 0 and finite; give probabilities",
                () -> ClassicalQuantumChannel.ofStochasticMatrix(new double[][] {{Double.POSITIVE_INFINITY, 0}}));
        refused(
                asked
                        + "row 1 sums to 1.25, expected 1 within 1.7763568394002505E-15; divide the probabilities by their sum",
                () -> ClassicalQuantumChannel.ofStochasticMatrix(new double[][] {{.5, .5}, {.5, .75}}));
    }

    @Test
    void gramMatrices() {
        refused(
                "ClassicalQuantumChannel.ofGram: diagonal entry 1 is 0.5, expected 1, as kets are normalised; divide row and column by its root",
                () -> ClassicalQuantumChannel.ofGram(new double[][] {{1, .5}, {.5, .5}}, new double[2][2]));
        assertThrows(
                InvalidInputException.class,
                () -> ClassicalQuantumChannel.ofGram(new double[][] {{1, 1.5}, {1.5, 1}}, new double[2][2]));
    }

    @Test
    void inputs() {
        refused(
                "CodingBounds.withInput: the input has 3 entries, expected 2, one for each letter; give one probability for each letter, 0 for an"
                        + " unused one",
                () -> BOUNDS.withInput(.5, .25, .25));
        refused(
                "CodingBounds.withInput: the input sums to 0.75, expected 1 within 1.7763568394002505E-15; divide the probabilities by their sum",
                () -> BOUNDS.withInput(.5, .25));
        refused(
                "CodingBounds.withInput: the input, entry 1 is NaN, expected at least 0 and finite; give probabilities",
                () -> BOUNDS.withInput(1, Double.NaN));
        refused(
                "ClassicalQuantumChannel.mutualInformation: the input has 1 entries, expected 2, one for each letter; give one probability for each"
                        + " letter, 0 for an unused one",
                () -> CHANNEL.mutualInformation(1));
        refused(
                "ClassicalQuantumChannel.outputState: the input, entry 0 is -1.0, expected at least 0 and finite; give probabilities",
                () -> CHANNEL.outputState(-1, 2));
    }

    @Test
    void outputStates() {
        refused(
                "CodingBounds.withOutputState: the state has dimension 3, expected 2, as the outputs; give a state of the output system",
                () -> BOUNDS.withOutputState(DensityOperator.maximallyMixed(3)));
    }

    @Test
    void errors() {
        for (double epsilon : new double[] {0, 1, -0.1, 1.5, Double.NaN, Double.POSITIVE_INFINITY}) {
            String rest = ": the error probability is " + epsilon
                    + ", expected between 0 and 1, both excluded; give the average error probability that is allowed";
            refused("CodingBounds.achievable" + rest, () -> BOUNDS.achievable(epsilon));
            refused("CodingBounds.hayashiNagaoka" + rest, () -> BOUNDS.hayashiNagaoka(epsilon));
            refused("CodingBounds.converse" + rest, () -> BOUNDS.converse(epsilon));
            refused("CodingBounds.weakConverse" + rest, () -> BOUNDS.weakConverse(epsilon));
            refused("CodingBounds.ledger" + rest, () -> BOUNDS.ledger(epsilon));
        }
    }

    @Test
    void messages() {
        for (long m : new long[] {0, -1, Long.MIN_VALUE}) {
            String rest = ": the number of messages is " + m + ", expected at least 1; give the size of the code";
            refused("CodingBounds.achievableError" + rest, () -> BOUNDS.achievableError(m));
            refused("CodingBounds.hayashiNagaokaError" + rest, () -> BOUNDS.hayashiNagaokaError(m));
            refused("CodingBounds.converseError" + rest, () -> BOUNDS.converseError(m));
        }
        String rest = ", expected between 0 (one message) and 7.0E8; give the logarithm of the size of the code";
        refused(
                "CodingBounds.achievableError: the logarithm of the number of messages is [-1, -1] nats" + rest,
                () -> BOUNDS.achievableError(Information.ofNats(-1)));
        refused(
                "CodingBounds.converseError: the logarithm of the number of messages is [0, inf] nats" + rest,
                () -> BOUNDS.converseError(Information.ofNats(Enclosure.of(0, Double.POSITIVE_INFINITY))));
        refused(
                "CodingBounds.hayashiNagaokaError: the logarithm of the number of messages is [1.00000e9, 1.00000e9] nats"
                        + rest,
                () -> BOUNDS.hayashiNagaokaError(Information.ofNats(1e9)));
    }
}
