package org.minorant.measurement;

import java.util.List;
import java.util.SplittableRandom;
import org.minorant.core.WideDouble;
import org.minorant.core.pair.BlockTest;

/**
 * The optimal collective test of n copies, as a source of simulated outcomes: first the block is drawn (for qubits the total spin, which both states leave as it is), then acceptance or rejection in it. The whole test on d^n
 * dimensions is never formed.
 *
 * <p>Probabilities are estimates to about 1e-8 of the larger ones; simulated frequencies do not show that. The errors of the test are certified by {@link HypothesisPair#minimumError}, not here.
 *
 * <p>Immutable and thread-safe; the same seed gives the same outcomes.
 */
public final class CollectiveTest {

    /** Which state the copies are in. */
    public enum Truth {
        /** All copies are in the first state. */
        FIRST,
        /** All copies are in the second state. */
        SECOND
    }

    /**
     * An outcome of the test.
     *
     * @param order the order of the block that was found, for qubits twice the total spin
     * @param answer the state that the test decides for
     */
    public record Outcome(int order, Truth answer) {}

    private final List<BlockTest> blocks;
    private final double[] first;
    private final double[] second;

    CollectiveTest(List<BlockTest> blocks) {
        this.blocks = List.copyOf(blocks);
        this.first = cumulative(blocks.stream().map(BlockTest::firstTrace).toList());
        this.second = cumulative(blocks.stream().map(BlockTest::secondTrace).toList());
    }

    private static double[] cumulative(List<WideDouble> weights) {
        double[] sums = new double[weights.size()];
        double s = 0;
        for (int i = 0; i < sums.length; i++) {
            s += weights.get(i).toDoubleDown();
            sums[i] = s;
        }
        for (int i = 0; i < sums.length; i++) {
            sums[i] /= s;
        }
        return sums;
    }

    /**
     * Returns the blocks with their probabilities and what the test does in each.
     *
     * @return one entry for each block
     */
    public List<BlockTest> blocks() {
        return blocks;
    }

    /**
     * Draws one outcome.
     *
     * @param truth the state of the copies
     * @param random the source of randomness
     * @return the block and the decision
     */
    public Outcome draw(Truth truth, SplittableRandom random) {
        double[] sums = truth == Truth.FIRST ? first : second;
        double u = random.nextDouble();
        int low = 0;
        int high = sums.length - 1;
        while (low < high) {
            int mid = (low + high) >>> 1;
            if (u < sums[mid]) {
                high = mid;
            } else {
                low = mid + 1;
            }
        }
        BlockTest b = blocks.get(low);
        double accepted = truth == Truth.FIRST ? b.firstAccepted() : b.secondAccepted();
        return new Outcome(b.order(), random.nextDouble() < accepted ? Truth.FIRST : Truth.SECOND);
    }
}
