package org.minorant.core.pair;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import org.minorant.core.InvalidInputException;
import org.minorant.core.WideDouble;
import org.minorant.core.internal.number.DoubleDouble;
import org.minorant.core.internal.number.WideDoubleDouble;

/**
 * Which products of spin blocks are evaluated, with which columns, and an upper end of what is left out; planned as {@link SpinBlocksPlan}. A column is kept if its weight is at least the block's budget over its dimension, so that all that
 * are left out weigh no more than the budget.
 *
 * @param blocks the products to evaluate
 * @param dropped an upper end of what the others and the columns left out can contribute
 */
record SpinProductsPlan(List<Block> blocks, WideDouble dropped) {

    static final int MOST_BLOCKS = 1_000_000;

    private static final int MOST_COLUMNS = 4000;

    private static final double LN2 = Math.log(2);

    /**
     * Columns of one operator.
     *
     * @param columns their weights
     * @param indices for each column its index in every factor
     */
    record Columns(BlockColumns columns, int[][] indices) {

        int count() {
            return indices.length;
        }
    }

    /**
     * A product of spin blocks.
     *
     * @param q the number of the block in every factor
     * @param dimension the dimension of the product, or the largest int
     * @param first the columns of A
     * @param second the columns of B
     * @param most an upper end of the share, by the traces
     * @param allowance a width of the share that cannot be seen in the sum
     */
    record Block(int[] q, int dimension, Columns first, Columns second, WideDouble most, WideDouble allowance) {}

    /** One operator in all blocks of one factor. */
    private record Side(
            QubitPower power, WideDoubleDouble[] weight, WideDoubleDouble ratio, double log2Ratio, double gap) {

        static Side of(QubitPower p, QubitSpectra.Spectrum s, WideDoubleDouble[] multiplicity) {
            WideDoubleDouble ratio = WideDoubleDouble.of(s.ratio());
            WideDoubleDouble[] weight = new WideDoubleDouble[multiplicity.length];
            WideDoubleDouble product = WideDoubleDouble.of(s.large()).power(p.n());
            for (int q = 0; q < weight.length; q++) {
                weight[q] = product.times(multiplicity[q]);
                product = product.times(ratio);
            }
            return new Side(
                    p,
                    weight,
                    ratio,
                    ratio.log2(),
                    DoubleDouble.ONE.minus(s.ratio()).hi());
        }

        double log2Trace(int q) {
            double terms = Math.min(power.n() - 2 * q + 1.0, 1 / gap);
            return weight[q].log2() + Math.log(terms) / LN2;
        }
    }

    static SpinProductsPlan of(
            List<QubitPower> powers, WideDouble wa, WideDouble wb, double log2Guess, double tolerance) {
        List<Side> a = new ArrayList<>();
        List<Side> b = new ArrayList<>();
        for (QubitPower p : powers) {
            WideDoubleDouble[] m = SpinBlocksPlan.multiplicities(p.n());
            a.add(Side.of(p, p.spectra().first(), m));
            b.add(Side.of(p, p.spectra().second(), m));
        }
        WideDoubleDouble scaleA = WideDoubleDouble.of(DoubleDouble.of(wa.significand()), wa.exponent());
        WideDoubleDouble scaleB = WideDoubleDouble.of(DoubleDouble.of(wb.significand()), wb.exponent());
        List<int[]> all = choices(powers);
        double[] most = new double[all.size()];
        for (int i = 0; i < most.length; i++) {
            most[i] = Math.min(log2Trace(a, all.get(i), scaleA), log2Trace(b, all.get(i), scaleB));
        }
        BlockChoice choice = BlockChoice.of(most, log2Guess, tolerance);
        double share = choice.share();
        WideDouble dropped = choice.dropped();
        List<Block> blocks = new ArrayList<>();
        for (int i : choice.kept()) {
            int[] q = all.get(i);
            double dimension = 1;
            for (int j = 0; j < q.length; j++) {
                dimension *= powers.get(j).n() - 2 * q[j] + 1;
            }
            Columns first = columns(a, q, scaleA, share - Math.log(dimension) / LN2);
            Columns second = columns(b, q, scaleB, share - Math.log(dimension) / LN2);
            dropped = dropped.plusUp(BlockChoice.upper(share)).plusUp(BlockChoice.upper(share));
            if (first.count() > 0 && second.count() > 0) {
                blocks.add(new Block(
                        q,
                        (int) Math.min(dimension, Integer.MAX_VALUE),
                        first,
                        second,
                        BlockChoice.upper(most[i]),
                        BlockChoice.upper(share)));
            }
        }
        return new SpinProductsPlan(List.copyOf(blocks), dropped);
    }

    /** What evaluating this plan takes, once the windows of the factors are made. */
    Work work() {
        long rank = blocks.stream()
                .mapToLong(b -> b.first().count() + (long) b.second().count())
                .max()
                .orElse(0);
        return Work.ofRotations(blocks.size(), rank);
    }

    /** Every choice of one block of each factor. */
    private static List<int[]> choices(List<QubitPower> powers) {
        List<int[]> all = List.of(new int[0]);
        for (QubitPower p : powers) {
            List<int[]> longer = new ArrayList<>();
            for (int[] c : all) {
                for (int q = 0; q <= p.n() / 2; q++) {
                    int[] d = java.util.Arrays.copyOf(c, c.length + 1);
                    d[c.length] = q;
                    longer.add(d);
                }
            }
            all = longer;
        }
        return all;
    }

    private static double log2Trace(List<Side> sides, int[] q, WideDoubleDouble scale) {
        double s = scale.log2();
        for (int i = 0; i < q.length; i++) {
            s += sides.get(i).log2Trace(q[i]);
        }
        return s;
    }

    /** The columns of weight at least 2^least. */
    private static Columns columns(List<Side> sides, int[] q, WideDoubleDouble scale, double least) {
        WideDoubleDouble top = scale;
        for (int i = 0; i < q.length; i++) {
            top = top.times(sides.get(i).weight()[q[i]]);
        }
        List<WideDoubleDouble> weights = new ArrayList<>(List.of(top));
        List<int[]> indices = new ArrayList<>(List.of(new int[0]));
        for (int i = 0; i < q.length; i++) {
            Side s = sides.get(i);
            int k = s.power().n() - 2 * q[i];
            List<WideDoubleDouble> w = new ArrayList<>();
            List<int[]> longer = new ArrayList<>();
            for (int j = 0; j < weights.size(); j++) {
                WideDoubleDouble v = weights.get(j);
                // a little below the threshold, so that rounding of logarithms leaves out nothing that weighs more
                for (int a = 0; a <= k && v.significand().hi() != 0 && v.log2() >= least - 1e-6; a++) {
                    if (w.size() == MOST_COLUMNS) {
                        throw tooManyColumns();
                    }
                    int[] d = java.util.Arrays.copyOf(indices.get(j), i + 1);
                    d[i] = a;
                    w.add(v);
                    longer.add(d);
                    v = v.times(s.ratio());
                }
            }
            weights = w;
            indices = longer;
        }
        List<WideDoubleDouble> found = weights;
        List<Integer> order = new ArrayList<>();
        for (int j = 0; j < found.size(); j++) {
            order.add(j);
        }
        order.sort(Comparator.comparingDouble(j -> -found.get(j).log2()));
        List<int[]> tuples = indices;
        BlockColumns columns = new BlockColumns(
                order.stream().map(found::get).toArray(WideDoubleDouble[]::new),
                order.stream()
                        .mapToInt(j -> java.util.Arrays.stream(tuples.get(j)).sum())
                        .toArray());
        return new Columns(columns, order.stream().map(tuples::get).toArray(int[][]::new));
    }

    private static InvalidInputException tooManyColumns() {
        return new InvalidInputException(
                "PositivePair.ofPowers",
                "a product of spin blocks has more than " + MOST_COLUMNS + " columns that matter",
                "at most " + MOST_COLUMNS,
                "ask for a larger tolerance, fewer copies or fewer factors");
    }

    /** The largest index in factor i that any block keeps of A. */
    int mostFirst(int i) {
        return blocks.stream()
                .flatMap(b -> java.util.Arrays.stream(b.first().indices()))
                .mapToInt(t -> t[i])
                .max()
                .orElse(0);
    }

    /** The largest index in factor i that any block keeps of B. */
    int mostSecond(int i) {
        return blocks.stream()
                .flatMap(b -> java.util.Arrays.stream(b.second().indices()))
                .mapToInt(t -> t[i])
                .max()
                .orElse(0);
    }
}
