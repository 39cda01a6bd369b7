package org.minorant.core.pair;

import org.minorant.core.InvalidInputException;

/**
 * How much work a value of the curve is, known before it starts.
 *
 * @param parts how many parts it has, as progress counts them
 * @param largestRank the most columns of both operators together in one part
 * @param bytes about how much memory is alive at once
 */
public record Work(long parts, int largestRank, long bytes) {

    /** Beyond this part of the heap the work is not begun. */
    private static final double SHARE = 0.8;

    /** Rotations and certificates of blocks of so many columns: about 40 matrices of enclosures on every thread. */
    static Work ofRotations(int blocks, long rank) {
        int threads = Math.min(Runtime.getRuntime().availableProcessors(), Math.max(1, blocks));
        return new Work(blocks, (int) rank, 40L * threads * 24 * rank * rank / 4);
    }

    /** The same with more memory. */
    Work plus(long more) {
        return new Work(parts, largestRank, bytes + more);
    }

    /** Refuses work that does not fit the heap. */
    void requireRoom() {
        long heap = Runtime.getRuntime().maxMemory();
        if (bytes > SHARE * heap) {
            throw new InvalidInputException(
                    "PositivePair.traceMinimum",
                    "the largest of " + parts + " blocks has " + largestRank + " columns and takes " + (bytes >> 20)
                            + " MB",
                    "at most " + (long) (SHARE * heap) / (1 << 20) + " MB, part of the heap",
                    "ask for a larger tolerance or fewer copies, or give the JVM more memory (-Xmx)");
        }
    }
}
