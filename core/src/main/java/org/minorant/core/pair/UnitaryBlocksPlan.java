package org.minorant.core.pair;

import java.math.BigInteger;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.stream.IntStream;
import org.minorant.core.InvalidInputException;
import org.minorant.core.WideDouble;
import org.minorant.core.internal.number.DoubleDouble;
import org.minorant.core.internal.number.WideDoubleDouble;

/**
 * Which irreducible blocks of n copies are evaluated, with which patterns, and an upper end of what is left out.
 *
 * <p>Planned with base-two logarithms in double, whose errors are far below the 1e-7 that is added for them.
 *
 * @param blocks the blocks to evaluate
 * @param dropped an upper end of what the others and the cut tails can contribute
 */
record UnitaryBlocksPlan(List<Block> blocks, WideDouble dropped) {

    static final int MOST_COLUMNS = 1500;
    private static final int MOST_PATTERNS = 100_000;
    private static final double MOST_SHAPES = 2e5;
    private static final double LN2 = Math.log(2);

    /**
     * A block to evaluate.
     *
     * @param shape λ
     * @param first kept patterns of A, by descending weight
     * @param second kept patterns of B
     * @param weightA the weight on A, multiplicity included
     * @param weightB the weight on B
     * @param most an upper end of the block's share, by its traces
     * @param allowance a width of the block's share that does not show in the sum
     */
    record Block(
            int[] shape,
            List<int[]> first,
            List<int[]> second,
            WideDoubleDouble weightA,
            WideDoubleDouble weightB,
            WideDouble most,
            WideDouble allowance) {}

    /** Base-two logarithms of one operator's eigenvalues: of the largest, and of each relative to it. */
    record Logs(double top, double[] relative, double weight) {

        static Logs of(QuditSpectra.Spectrum s, WideDouble weight) {
            double top = s.values()[0].log2();
            double[] relative = new double[s.values().length];
            for (int i = 1; i < relative.length; i++) {
                // eigenvalues that differ in their last digits only must not seem to increase
                relative[i] = Math.min(relative[i - 1], s.values()[i].log2() - top);
            }
            return new Logs(top, relative, weight.exponent() + Math.log(weight.significand()) / LN2);
        }

        /** log₂ of the largest weight in a block, without its multiplicity. */
        double largest(int[] shape, int n) {
            double s = weight + n * top;
            for (int i = 0; i < shape.length; i++) {
                s += shape[i] == 0 ? 0 : shape[i] * relative[i];
            }
            return s;
        }
    }

    /** Kept patterns and an upper end of log₂ of the trace of the others. */
    private record Kept(List<int[]> patterns, double tail) {}

    static UnitaryBlocksPlan of(
            QuditSpectra s, int n, WideDouble wa, WideDouble wb, double log2Guess, double tolerance) {
        int d = s.first().values().length;
        if (shapes(n, d) > MOST_SHAPES) {
            throw refusal(n, d, "more than " + (long) MOST_SHAPES + " irreducible blocks", "fewer");
        }
        Logs a = Logs.of(s.first(), wa);
        Logs b = Logs.of(s.second(), wb);
        List<int[]> shapes = Partitions.of(n, d);
        double[] multiplicity = shapes.stream()
                .mapToDouble(x -> log2(Partitions.multiplicity(x)))
                .toArray();
        double[] dimension =
                shapes.stream().mapToDouble(x -> log2(Partitions.dimension(x))).toArray();
        double[] most = new double[shapes.size()];
        for (int i = 0; i < most.length; i++) {
            most[i] =
                    multiplicity[i] + dimension[i] + Math.min(a.largest(shapes.get(i), n), b.largest(shapes.get(i), n));
        }
        BlockChoice choice = BlockChoice.of(most, log2Guess, tolerance);
        double share = choice.share();
        WideDouble dropped = choice.dropped();
        List<Block> blocks = new ArrayList<>();
        for (int i : choice.kept()) {
            int[] shape = shapes.get(i);
            Kept first = kept(a, shape, n, multiplicity[i], dimension[i], share);
            Kept second = kept(b, shape, n, multiplicity[i], dimension[i], share);
            dropped = dropped.plusUp(BlockChoice.upper(first.tail)).plusUp(BlockChoice.upper(second.tail));
            if (!first.patterns.isEmpty() && !second.patterns.isEmpty()) {
                WideDoubleDouble m = wide(Partitions.multiplicity(shape));
                blocks.add(new Block(
                        shape,
                        first.patterns,
                        second.patterns,
                        m.times(wide(wa)),
                        m.times(wide(wb)),
                        BlockChoice.upper(most[i]),
                        BlockChoice.upper(share)));
            }
        }
        return new UnitaryBlocksPlan(List.copyOf(blocks), dropped);
    }

    private static Kept kept(Logs x, int[] shape, int n, double multiplicity, double dimension, double share) {
        double base = x.weight + n * x.top + multiplicity;
        // below this, all patterns together stay within half the share
        double threshold = share - 1 - dimension - base;
        PatternWindow w;
        try {
            w = new PatternWindow(shape, x.relative, threshold, MOST_PATTERNS);
        } catch (PatternWindow.TooMany e) {
            throw refusal(n, shape.length, "more than " + MOST_PATTERNS + " patterns in a block", "at most that");
        }
        double[] logs = new double[w.size()];
        for (int i = 0; i < logs.length; i++) {
            logs[i] = w.log(i);
        }
        List<Integer> order = IntStream.range(0, logs.length)
                .boxed()
                .sorted(Comparator.comparingDouble((Integer i) -> -logs[i]))
                .toList();
        int count = order.size();
        double half = Math.exp((share - 1) * LN2 - share * LN2);
        double tail = 0;
        while (count > 0) {
            double next = tail + Math.exp((base + logs[order.get(count - 1)] - share) * LN2);
            if (!(next <= half)) {
                break;
            }
            tail = next;
            count--;
        }
        if (count > MOST_COLUMNS) {
            throw refusal(n, shape.length, count + " eigenvectors in a block", "at most " + MOST_COLUMNS);
        }
        boolean whole = logs.length >= Math.exp(dimension * LN2) * (1 - 1e-9);
        double rest = (tail + (whole ? 0 : half)) * (1 + 1e-6);
        double log2 = rest == 0 ? Double.NEGATIVE_INFINITY : share + Math.log(rest) / LN2;
        return new Kept(order.subList(0, count).stream().map(w::pattern).toList(), log2);
    }

    private static InvalidInputException refusal(int n, int d, String found, String limit) {
        return new InvalidInputException(
                "PositivePair.copies",
                n + " copies of dimension " + d + " need " + found,
                limit,
                "take fewer copies or a larger tolerance, or bound the answer");
    }

    /** About how many partitions of n into at most d parts there are: n^(d−1)/(d!(d−1)!), n shifted by d(d+1)/4. */
    private static double shapes(int n, int d) {
        double count = 1;
        for (int i = 1; i < d; i++) {
            count *= (n + d * (d + 1) / 4.0) / (i * (i + 1.0));
        }
        return count;
    }

    private static double log2(BigInteger x) {
        int shift = Math.max(0, x.bitLength() - 60);
        return shift + Math.log(x.shiftRight(shift).doubleValue()) / LN2;
    }

    private static WideDoubleDouble wide(BigInteger x) {
        int shift = Math.max(0, x.bitLength() - 120);
        return WideDoubleDouble.of(DoubleDouble.of(new java.math.BigDecimal(x.shiftRight(shift))), shift);
    }

    private static WideDoubleDouble wide(WideDouble w) {
        return WideDoubleDouble.of(DoubleDouble.of(w.significand()), w.exponent());
    }

    /**
     * What evaluating this plan takes on every thread: about 16 matrices of enclosures of the largest space, or of the columns' rotations where that is larger; and overlaps that wait.
     *
     * @param real whether the overlaps are real
     */
    Work work(boolean real) {
        int threads = Math.min(Runtime.getRuntime().availableProcessors(), Math.max(1, blocks.size()));
        long entry = (real ? 3L : 5L) * Double.BYTES;
        double space = 0;
        long rank = 0;
        for (Block b : blocks) {
            space = Math.max(space, Math.min(Partitions.dimension(b.shape()).doubleValue(), IrrepTree.WHOLE));
            rank = Math.max(rank, b.first().size() + (long) b.second().size());
        }
        double cells = Math.max(space * space, rank * (double) rank / 4);
        return new Work(blocks.size(), (int) rank, (long) ((2.0 + 18.0 * threads) * cells * entry));
    }
}
