package org.minorant.bounds;

import java.util.List;
import java.util.Optional;
import java.util.function.ToDoubleBiFunction;
import java.util.stream.IntStream;
import java.util.stream.Stream;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;
import org.minorant.core.curve.Curve;
import org.minorant.core.curve.Guess;
import org.minorant.core.pair.PositivePair;

/**
 * The curves t ↦ Tr[W_x ∧ tσ] of some letters of a channel against one state of its output, or of words, of which the least is asked for or a mean.
 *
 * <p><b>Normalisation.</b> Traces and sums of probabilities are one up to rounding only. Scaling A by λ and B by μ scales Tr[A ∧ B] by a number
 * between λ and μ, so the values for the operators given, times an enclosure of such factors, enclose the values for the operators divided
 * by their traces; the factor's enclosure includes 1, so that they enclose the values for those given, too.
 */
final class LetterCurves {

    /** Of more pairs than this a part is enough for a guess. */
    private static final int MANY = 48;

    private static final int FEW = 16;

    private final List<PositivePair> pairs;
    private final Enclosure traces;
    private final Enclosure factor;
    private final WideDouble off;
    /** Empty if the least curve is meant, as for letters. */
    private final Optional<TypeMean> types;

    /**
     * Collects the curves.
     *
     * @param pairs one pair for each letter
     * @param traces what holds the traces of the letters' outputs
     * @param trace what holds the trace of the state, over its true value relative to the pairs' second operator
     */
    LetterCurves(List<PositivePair> pairs, Enclosure traces, Enclosure trace) {
        this.pairs = List.copyOf(pairs);
        this.traces = traces;
        this.factor = Enclosure.ONE
                .dividedBy(traces)
                .hull(Enclosure.ONE.dividedBy(trace))
                .hull(Enclosure.ONE);
        this.off = WideDouble.ZERO;
        this.types = Optional.empty();
    }

    private LetterCurves(WordCurves words) {
        this.pairs = words.pairs();
        this.traces = words.traces();
        this.factor = words.factor();
        this.off = words.off();
        this.types = words.mean();
    }

    /** The curves of words, taken as letters. */
    static LetterCurves ofWords(WordCurves words) {
        return new LetterCurves(words);
    }

    /**
     * The common curve of words that are all alike, or the mean of all words in place of it.
     *
     * @param saturation a point from which on the curve is the words' trace
     * @return t ↦ Tr[W ∧ tρ]
     */
    Curve mean(WideDouble saturation) {
        Enclosure most = traces.hull(Enclosure.ONE);
        return guessed(
                t -> t.compareTo(saturation) >= 0 ? most : least(WideDouble.ONE, t),
                (pair, t) -> lnEstimate(pair, 0, t));
    }

    /**
     * Mixes the curves against the mixture of the letters themselves, ρ = Σ_x P(x) W_x.
     *
     * <p>As W_x ≤ ρ/P(x), the curve is Σ_x P(x) Tr W_x from t = 1/min P on. There the pairs need not be asked.
     *
     * @param weights one positive weight for each letter, summing to one up to rounding
     * @return t ↦ Σ_x P(x) Tr[W_x ∧ tρ]
     */
    Curve mean(double[] weights) {
        PositivePair sum = PositivePair.directSum(pairs, weights);
        Enclosure total = Traces.sum(weights);
        Enclosure scale = Enclosure.ONE.dividedBy(total).times(factor).hull(factor);
        Enclosure most = total.times(traces).hull(Enclosure.ONE);
        WideDouble saturation = saturation(weights);
        Curve values = t -> t.compareTo(saturation) >= 0
                ? most
                : sum.traceMinimum(WideDouble.ONE, t).times(scale);
        return sum.hasCheapEstimate() ? values.withGuess(s -> lnEstimate(sum, 0, s)) : values;
    }

    /** About ln Tr[aA ∧ bB] of a pair, from ln a and ln b. */
    private static double lnEstimate(PositivePair pair, double lnA, double lnB) {
        return pair.traceMinimumEstimate(WideDouble.expDown(lnA), WideDouble.expDown(lnB))
                .ln();
    }

    /** A point beyond 1/min P, also for weights that miss their sum by a rounding. */
    static WideDouble saturation(double[] weights) {
        WideDouble least = WideDouble.POSITIVE_INFINITY;
        for (double w : weights) {
            least = w > 0 ? least.min(WideDouble.of(w)) : least;
        }
        return WideDouble.ONE.dividedByUp(least).timesUp(WideDouble.of(1 + 0x1p-30));
    }

    /** t ↦ min over x of Tr[tW_x ∧ σ], or the mean of words. */
    Curve least() {
        return guessed(t -> least(t, WideDouble.ONE), (pair, t) -> lnEstimate(pair, t, 0));
    }

    /** s ↦ min over x of Tr[W_x ∧ sσ]. */
    Curve leastAgainst() {
        return guessed(s -> least(WideDouble.ONE, s), (pair, s) -> lnEstimate(pair, 0, s));
    }

    /**
     * t ↦ min over x of Tr[tW_x ∧ weight · σ].
     *
     * @param weight a positive number
     */
    Curve least(WideDouble weight) {
        double ln = weight.lnDown();
        return guessed(t -> least(t, weight), (pair, t) -> lnEstimate(pair, t, ln));
    }

    private Curve guessed(Curve values, ToDoubleBiFunction<PositivePair, Double> estimate) {
        boolean many = pairs.size() > MANY;
        int step = many ? pairs.size() / FEW : 1;
        if (types.isPresent()) {
            Guess mean = t -> types.get().lnEstimate(pairs, pair -> estimate.applyAsDouble(pair, t));
            return pairs.stream().allMatch(PositivePair::hasCheapEstimate) ? values.withGuess(mean) : values;
        }
        Guess least = t -> IntStream.range(0, pairs.size())
                .filter(i -> i % step == 0 || i == pairs.size() - 1)
                .parallel()
                .mapToDouble(i -> estimate.applyAsDouble(pairs.get(i), t))
                .min()
                .orElse(Double.NaN);
        return many || pairs.stream().allMatch(PositivePair::hasCheapEstimate) ? values.withGuess(least) : values;
    }

    /** Whether one curve is that of all. */
    boolean areAlike() {
        return pairs.size() == 1;
    }

    /** A number that no value of {@link #least} and {@link #leastAgainst} exceeds, nor its ratio to the weight. */
    WideDouble most() {
        WideDouble most = traces.upperWide();
        for (PositivePair pair : pairs) {
            most = most.max(pair.firstTrace().upperWide())
                    .max(pair.secondTrace().upperWide());
        }
        return most.timesUp(factor.upperWide()).plusUp(off);
    }

    private Enclosure least(WideDouble a, WideDouble b) {
        Enclosure value = types.map(mean -> mean.of(pairs, a, b))
                .orElseGet(() -> leastOf(a, b))
                .times(factor);
        if (types.isPresent()) {
            WideDouble rest = types.get().leftOut().timesUp(traces.upperWide()).timesUp(a);
            value = Enclosure.of(value.lowerWide(), value.upperWide().plusUp(rest));
        }
        if (off.signum() == 0) {
            return value;
        }
        WideDouble d = off.timesUp(a);
        return value.plus(Enclosure.of(d.negate(), d)).max(Enclosure.ZERO);
    }

    private Enclosure leastOf(WideDouble a, WideDouble b) {
        Stream<PositivePair> all = pairs.size() > MANY ? pairs.parallelStream() : pairs.stream();
        return all.map(pair -> pair.traceMinimum(a, b)).reduce(Enclosure.infinite(), Enclosure::min);
    }
}
