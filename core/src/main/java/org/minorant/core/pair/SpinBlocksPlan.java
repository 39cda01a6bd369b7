package org.minorant.core.pair;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import org.minorant.core.WideDouble;
import org.minorant.core.internal.number.DoubleDouble;
import org.minorant.core.internal.number.WideDoubleDouble;

/**
 * Which spin blocks are evaluated, with how many columns, and an upper end of what is left out.
 *
 * @param blocks the blocks to evaluate, by increasing order k
 * @param dropped an upper end of what the others and the cut tails can contribute
 */
record SpinBlocksPlan(List<Block> blocks, WideDouble dropped) {

    private static final double LN2 = Math.log(2);

    /**
     * A block to evaluate.
     *
     * @param order k
     * @param first how many columns of A
     * @param second how many columns of B
     * @param weightA the weight on diag(x^a), multiplicity included
     * @param weightB the weight on B
     * @param most an upper end of the block's share, by its traces
     * @param allowance a width of the block's share that cannot be seen in the sum
     */
    record Block(
            int order,
            int first,
            int second,
            WideDoubleDouble weightA,
            WideDoubleDouble weightB,
            WideDouble most,
            WideDouble allowance) {

        /** The same with the weight on A changed by a factor near one. */
        Block withFirst(double factor) {
            return new Block(order, first, second, weightA.times(factor), weightB, most, allowance);
        }
    }

    /** One operator in all blocks: log2 of the weight of block q, and the geometric spectrum in it. */
    private record Side(WideDoubleDouble[] weight, double[] log2Weight, double log2Ratio, double gap) {

        static Side of(QubitSpectra.Spectrum s, int n, WideDouble w, WideDoubleDouble[] multiplicity) {
            WideDoubleDouble large = WideDoubleDouble.of(s.large());
            WideDoubleDouble ratio = WideDoubleDouble.of(s.ratio());
            int blocks = multiplicity.length;
            WideDoubleDouble[] weight = new WideDoubleDouble[blocks];
            double[] log2 = new double[blocks];
            WideDoubleDouble power =
                    large.power(n).times(WideDoubleDouble.of(DoubleDouble.of(w.significand()), w.exponent()));
            for (int q = 0; q < blocks; q++) {
                weight[q] = power.times(multiplicity[q]);
                log2[q] = weight[q].log2();
                power = power.times(ratio);
            }
            return new Side(
                    weight,
                    log2,
                    ratio.log2(),
                    DoubleDouble.ONE.minus(s.ratio()).hi());
        }

        /** log2 of the trace from column i on, in block q with k + 1 columns. */
        double tail(int q, int i, int k) {
            if (i > k) {
                return Double.NEGATIVE_INFINITY;
            }
            double terms = Math.min(k + 1.0 - i, 1 / gap);
            return log2Weight[q] + (i == 0 ? 0 : i * log2Ratio) + Math.log(terms) / LN2;
        }

        /** The trace in block q, nearly: w(1 − r^(k+1))/(1 − r). */
        WideDouble trace(int q, int k) {
            double last = Math.exp((k + 1) * log2Ratio * LN2);
            double sum = gap * (k + 1) < 1e-6 ? k + 1 : (1 - last) / gap;
            WideDoubleDouble t = weight[q].times(sum);
            return WideDouble.of(t.significand().hi(), t.exponent());
        }

        /** How many columns leave a tail of at most 2^budget. */
        int columns(int q, int k, double budget) {
            int low = 0;
            int high = k + 1;
            while (low < high) {
                int mid = (low + high) >>> 1;
                if (tail(q, mid, k) <= budget) {
                    high = mid;
                } else {
                    low = mid + 1;
                }
            }
            return low;
        }
    }

    static SpinBlocksPlan of(QubitSpectra s, int n, WideDouble wa, WideDouble wb, double log2Guess, double tolerance) {
        WideDoubleDouble[] multiplicity = multiplicities(n);
        Side a = Side.of(s.first(), n, wa, multiplicity);
        Side b = Side.of(s.second(), n, wb, multiplicity);
        double[] most = new double[multiplicity.length];
        for (int q = 0; q < most.length; q++) {
            most[q] = Math.min(a.tail(q, 0, n - 2 * q), b.tail(q, 0, n - 2 * q));
        }
        BlockChoice choice = BlockChoice.of(most, log2Guess, tolerance);
        double share = choice.share();
        WideDouble dropped = choice.dropped();
        List<Block> blocks = new ArrayList<>();
        for (int q : choice.kept()) {
            int k = n - 2 * q;
            int first = a.columns(q, k, share);
            int second = b.columns(q, k, share);
            dropped = dropped.plusUp(BlockChoice.upper(a.tail(q, first, k)))
                    .plusUp(BlockChoice.upper(b.tail(q, second, k)));
            if (first > 0 && second > 0) {
                blocks.add(new Block(
                        k,
                        first,
                        second,
                        a.weight()[q],
                        b.weight()[q],
                        BlockChoice.upper(most[q]),
                        BlockChoice.upper(share)));
            }
        }
        blocks.sort(Comparator.comparingInt(Block::order));
        return new SpinBlocksPlan(List.copyOf(blocks), dropped);
    }

    /**
     * The traces of both operators in a block, multiplicity included, nearly.
     *
     * @param order k
     * @param first that of A
     * @param second that of B
     */
    record Traces(int order, WideDouble first, WideDouble second) {}

    /** The traces in all blocks, from the largest order down. */
    static List<Traces> traces(QubitSpectra s, int n) {
        WideDoubleDouble[] multiplicity = multiplicities(n);
        Side a = Side.of(s.first(), n, WideDouble.ONE, multiplicity);
        Side b = Side.of(s.second(), n, WideDouble.ONE, multiplicity);
        List<Traces> all = new ArrayList<>();
        for (int q = 0; q < multiplicity.length; q++) {
            int k = n - 2 * q;
            all.add(new Traces(k, a.trace(q, k), b.trace(q, k)));
        }
        return all;
    }

    /** m_q = C(n,q)(k+1)/(n−q+1) = C(n,q) − C(n,q−1), from C(n,q) by exact ratios. */
    static WideDoubleDouble[] multiplicities(int n) {
        WideDoubleDouble[] m = new WideDoubleDouble[n / 2 + 1];
        WideDoubleDouble binomial = WideDoubleDouble.ONE;
        for (int q = 0; q < m.length; q++) {
            if (q > 0) {
                binomial = binomial.times(n - q + 1.0).dividedBy(q);
            }
            m[q] = binomial.times(n - 2 * q + 1.0).dividedBy(n - q + 1.0);
        }
        return m;
    }

    /** What evaluating this plan takes; windows of overlaps are walked through by one thread and wait for the others. */
    Work work() {
        long rank = blocks.stream()
                .mapToLong(b -> b.first() + (long) b.second())
                .max()
                .orElse(0);
        long window = 3L * Double.BYTES * mostFirst() * mostSecond();
        return Work.ofRotations(blocks.size(), rank)
                .plus((2L + 2L * Runtime.getRuntime().availableProcessors()) * window);
    }

    /** The most columns of A that any block keeps. */
    int mostFirst() {
        return blocks.stream().mapToInt(Block::first).max().orElse(0);
    }

    /** The most columns of B that any block keeps. */
    int mostSecond() {
        return blocks.stream().mapToInt(Block::second).max().orElse(0);
    }
}
