package org.minorant.bounds;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.Collections;
import java.util.List;
import java.util.stream.IntStream;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;
import org.minorant.core.pair.Effort;
import org.minorant.core.pair.PairPowers;
import org.minorant.core.pair.PositivePair;

/**
 * n uses of a channel of quantum letters that need not be alike: the curve of a word against σ^⊗n depends on how often each letter occurs in it, on its type, only. Kets that are alike against σ count as one.
 *
 * <p><b>Cost.</b> One pair for each type: kets by secular equations, qubits by products of spin blocks, others multiplied out.
 */
final class QuantumWords {

    /** Kets further apart than this are not alike. */
    private static final double ALIKE = 0x1p-40;

    private static final int MOST_TYPES = 20_000;

    /** Spin blocks are costly, and a type of words may take seconds. */
    private static final int MOST_QUBIT_TYPES = 300;

    /** Types that together have less than this probability are left out of a mean. */
    private static final double RARE = 0x1p-70;

    /** The share of a curve's value that truncation may cost; it costs far less as a rule, and M is asked for to 1e-6 bit. */
    private static final double ENOUGH = 1e-7;

    private final List<DensityOperator> letters;
    private final Enclosure traces;
    private final int n;

    /**
     * Takes the letters that words are made of.
     *
     * @param letters their states
     * @param traces what holds their traces
     * @param n the number of uses
     */
    QuantumWords(List<DensityOperator> letters, Enclosure traces, int n) {
        this.letters = letters;
        this.traces = traces;
        this.n = n;
    }

    /**
     * Kinds of letters, each with the letter that stands for it.
     *
     * @param powers products of powers of the letters that stand for a kind
     * @param kind the kind of every letter
     * @param count how many kinds
     * @param distance how far letters are from the one that stands for them, in trace norm
     */
    private record Kinds(PairPowers powers, int[] kind, int count, double distance) {}

    private Kinds kinds(DensityOperator sigma) {
        PairPowers all = PairPowers.of(letters, Collections.nCopies(letters.size(), sigma));
        int[] kind = new int[letters.size()];
        List<Integer> first = new ArrayList<>();
        double distance = 0;
        for (int x = 0; x < kind.length; x++) {
            int k = 0;
            while (k < first.size() && !(all.distance(x, first.get(k)) <= ALIKE)) {
                k++;
            }
            if (k == first.size()) {
                first.add(x);
            } else {
                distance = Math.max(distance, all.distance(x, first.get(k)));
            }
            kind[x] = k;
        }
        if (first.size() == letters.size()) {
            return new Kinds(all, kind, first.size(), 0);
        }
        List<DensityOperator> some = first.stream().map(letters::get).toList();
        PairPowers powers = PairPowers.of(some, Collections.nCopies(some.size(), sigma));
        return new Kinds(powers, kind, some.size(), distance);
    }

    /**
     * All words against an output state.
     *
     * @param sigma the state
     * @param trace what holds its trace
     */
    WordCurves against(DensityOperator sigma, Enclosure trace) {
        Kinds kinds = kinds(sigma);
        List<PositivePair> pairs = new ArrayList<>();
        for (int[] type : types(kinds)) {
            pairs.add(pair(kinds, sigma, type).withEffort(Effort.DEFAULT.withTolerance(ENOUGH)));
        }
        return words(kinds, pairs, trace);
    }

    /**
     * The mean of the curves of all words against their mixture, words drawn letter by letter.
     *
     * @param p the distribution of letters
     * @param mixture the mixture of letters
     */
    WordCurves mean(double[] p, DensityOperator mixture) {
        Kinds kinds = kinds(mixture);
        Enclosure sum = Traces.sum(p);
        Enclosure[] share = new Enclosure[kinds.count];
        Arrays.fill(share, Enclosure.ZERO);
        for (int x = 0; x < p.length; x++) {
            share[kinds.kind[x]] =
                    share[kinds.kind[x]].plus(Enclosure.exact(p[x]).dividedBy(sum));
        }
        TypeProbabilities probabilities = new TypeProbabilities(share, n);
        List<int[]> types = types(kinds);
        double[] weights =
                types.stream().mapToDouble(t -> probabilities.of(t).midpoint()).toArray();
        boolean[] rare = TypeProbabilities.rare(weights, RARE);
        int[] kept = IntStream.range(0, weights.length).filter(i -> !rare[i]).toArray();
        List<PositivePair> pairs = new ArrayList<>();
        for (int i : kept) {
            // errors relative to all: rare types need not be known well
            double tolerance = Math.min(0.25, ENOUGH / (weights[i] * kept.length));
            pairs.add(pair(kinds, mixture, types.get(i)).withEffort(Effort.DEFAULT.withTolerance(tolerance)));
        }
        List<Enclosure> each = Arrays.stream(kept)
                .mapToObj(i -> probabilities.of(types.get(i)))
                .toList();
        return words(kinds, pairs, sum.times(traces)).withMean(new TypeMean(each, WideDouble.of(RARE)));
    }

    private WordCurves words(Kinds kinds, List<PositivePair> pairs, Enclosure trace) {
        Enclosure one = Enclosure.ONE;
        Enclosure slack = one.dividedBy(traces).hull(one.dividedBy(trace)).hull(one);
        return WordCurves.of(pairs, traces, slack, 0, kinds.distance, n);
    }

    private PositivePair pair(Kinds kinds, DensityOperator sigma, int[] type) {
        int[] used = IntStream.range(0, type.length).filter(k -> type[k] > 0).toArray();
        if (used.length == 1 && kinds.count == 1) {
            // copies of one pair have bins where types are too many
            return PositivePair.of(letters.get(0), sigma).copies(n);
        }
        return kinds.powers.pair(type);
    }

    private List<int[]> types(Kinds kinds) {
        double count = TypeProbabilities.count(kinds.count, n);
        boolean costly = kinds.count > 1 && !Double.isFinite(kinds.powers.distance(0, 0));
        int most = costly ? MOST_QUBIT_TYPES : MOST_TYPES;
        double dimension = Math.pow(letters.get(0).dimension(), n);
        boolean large = kinds.powers.isMultipliedOut() && !(dimension <= PairPowers.MOST_DIMENSIONS);
        if (!(count <= most) || large) {
            throw WordCurves.notCovered(
                    large
                            ? "letters of dimension " + letters.get(0).dimension()
                                    + " that are neither kets nor on a qubit, in " + n + " uses"
                            : Math.round(count) + " types of words of " + kinds.count + " kinds of letters, more than "
                                    + most);
        }
        return TypeProbabilities.types(kinds.count, n);
    }

    /**
     * Words of single types against an output state.
     *
     * @param sigma the state
     * @param trace what holds its trace
     */
    TypedWords typed(DensityOperator sigma, Enclosure trace) {
        PairPowers powers = PairPowers.of(letters, Collections.nCopies(letters.size(), sigma));
        if (powers.isMultipliedOut() && !(Math.pow(sigma.dimension(), n) <= PairPowers.MOST_DIMENSIONS)) {
            throw WordCurves.notCovered("letters of dimension " + sigma.dimension()
                    + " that are neither kets nor on a qubit, in " + n + " uses");
        }
        Enclosure one = Enclosure.ONE;
        Enclosure slack = one.dividedBy(traces).hull(one.dividedBy(trace)).hull(one);
        return new TypedWords(
                type -> powers.pair(type).withEffort(Effort.DEFAULT.withTolerance(ENOUGH)),
                type -> 0,
                traces,
                slack,
                0,
                n);
    }
}
