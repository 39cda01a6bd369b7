package org.minorant.core.pair;

import java.util.List;
import java.util.Optional;
import java.util.function.IntFunction;
import org.minorant.core.Enclosure;
import org.minorant.core.InvalidInputException;
import org.minorant.core.WideDouble;

/** A weighted direct sum of pairs: the minimum of block-diagonal operators is block-diagonal, so f = Σ w_i f_i. */
final class DirectSumPair extends PositivePair {

    private final List<PositivePair> pairs;
    private final double[] weights;
    /** n copies of the operators that the blocks were found in. */
    private final Optional<IntFunction<PositivePair>> many;

    private DirectSumPair(List<PositivePair> pairs, double[] weights, Optional<IntFunction<PositivePair>> many) {
        this.pairs = pairs;
        this.weights = weights;
        this.many = many;
    }

    /** The blocks of two operators. */
    static DirectSumPair ofBlocks(List<PositivePair> blocks, IntFunction<PositivePair> many) {
        double[] ones = new double[blocks.size()];
        java.util.Arrays.fill(ones, 1);
        return new DirectSumPair(List.copyOf(blocks), ones, Optional.of(many));
    }

    @Override
    PositivePair power(int n) {
        return many.isPresent() ? many.get().apply(n) : super.power(n);
    }

    static DirectSumPair of(List<? extends PositivePair> pairs, double[] weights) {
        String asked = "PositivePair.directSum";
        if (pairs.isEmpty() || pairs.size() != weights.length) {
            throw new InvalidInputException(
                    asked,
                    pairs.size() + " pairs and " + weights.length + " weights",
                    "as many of each, at least 1",
                    "give one weight per pair");
        }
        for (int i = 0; i < weights.length; i++) {
            if (!(weights[i] >= 0 && weights[i] < Double.POSITIVE_INFINITY)) {
                throw new InvalidInputException(
                        asked, "weight " + i + " is " + weights[i], "at least 0 and finite", "check the weights");
            }
        }
        return new DirectSumPair(List.copyOf(pairs), weights.clone(), Optional.empty());
    }

    @Override
    Enclosure value(WideDouble a, WideDouble b) {
        Enclosure s = Enclosure.ZERO;
        for (int i = 0; i < weights.length; i++) {
            if (weights[i] > 0) {
                s = s.plus(pairs.get(i).traceMinimum(a, b).times(weights[i]));
            }
        }
        return s;
    }

    @Override
    public Enclosure firstTrace() {
        Enclosure s = Enclosure.ZERO;
        for (int i = 0; i < weights.length; i++) {
            s = s.plus(pairs.get(i).firstTrace().times(weights[i]));
        }
        return s;
    }

    @Override
    public Enclosure secondTrace() {
        Enclosure s = Enclosure.ZERO;
        for (int i = 0; i < weights.length; i++) {
            s = s.plus(pairs.get(i).secondTrace().times(weights[i]));
        }
        return s;
    }

    @Override
    public int dimension() {
        return pairs.stream().mapToInt(PositivePair::dimension).sum();
    }

    @Override
    public PairKind kind() {
        return PairKind.DIRECT_SUM;
    }
}
