package org.minorant.bounds;

import java.util.List;
import java.util.function.ToDoubleFunction;
import java.util.stream.IntStream;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;
import org.minorant.core.pair.PositivePair;

/**
 * The mean of the curves of words over their types.
 *
 * @param weights the probabilities of the types
 * @param leftOut a bound on the probability of types that are not listed
 */
record TypeMean(List<Enclosure> weights, WideDouble leftOut) {

    /** Of more types than this a part is enough for a guess. */
    private static final int FEW = 12;

    /** Types rarer than this do not show in a guess. */
    private static final double RARE = 1e-6;

    TypeMean {
        weights = List.copyOf(weights);
    }

    /** Σ P(type) Tr[aA ∧ bB] over the types that are listed. */
    Enclosure of(List<PositivePair> pairs, WideDouble a, WideDouble b) {
        List<Enclosure> parts = IntStream.range(0, weights.size())
                .parallel()
                .mapToObj(i -> pairs.get(i).traceMinimum(a, b).times(weights.get(i)))
                .toList();
        // in order, so that the bits do not depend on the threads
        Enclosure sum = Enclosure.ZERO;
        for (Enclosure part : parts) {
            sum = sum.plus(part);
        }
        return sum;
    }

    /** About the logarithm of that, from some types that stand for their neighbours. */
    double lnEstimate(List<PositivePair> pairs, ToDoubleFunction<PositivePair> lnEstimate) {
        int step = Math.max(1, weights.size() / FEW);
        double sum = 0;
        for (int from = 0; from < weights.size(); from += step) {
            int to = Math.min(weights.size(), from + step);
            double weight = 0;
            for (Enclosure w : weights.subList(from, to)) {
                weight += w.midpoint();
            }
            if (weight > RARE) {
                sum += weight * Math.exp(lnEstimate.applyAsDouble(pairs.get((from + to) / 2)));
            }
        }
        return Math.log(sum);
    }
}
