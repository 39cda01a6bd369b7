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
