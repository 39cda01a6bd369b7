package org.minorant.bounds;

import java.util.List;
import java.util.Map;
import java.util.concurrent.ConcurrentHashMap;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;
import org.minorant.core.curve.Curve;

/**
 * The random-coding union bound for n uses of a classical channel: some code of M messages has an average error of at most
 *
 * <pre>g(M−1),   g(t) = E[min(1, t T(X,Y))],   T(x,y) = P[W(y|X̄) ≥ W(y|x)],</pre>
 *
 * with words X̄ drawn like X, independent of X and Y. Ties count as errors. The probabilities are added up by joint types ({@link UnionTypes}, {@link UnionBins}).
 *
 * <p>g is concave and nondecreasing, and g(0) = 0, so that searches treat it like f. As T(x,y) ≤ e^(−i(x;y)) by Markov's inequality, g ≤ f.
 *
 * <p><b>Enclosure.</b> Probabilities of types and of tails are sums and products of positive numbers: n table entries with 6n roundings in all, and as many roundings of the sums as these have terms at most.
 * Both are bounded by relative errors, which g inherits. What windows leave out is in the upper end ({@link UnionTypes}).
 */
final class RandomCodingUnion {

    static final Theorem THEOREM = new Theorem(
            "random-coding union",
            "Y. Polyanskiy, H. V. Poor, S. Verdu, IEEE Trans. Inf. Theory 56, 2307 (2010), theorem 16 (number from memory)");

    /** What may be left out, as a part of the value. */
    private static final double TOLERANCE = 0x1p-36;

    private static final double FIRST_LEVEL = 1e-3;

    private static final double U = 0x1p-53;

    private static final int MOST_ROUNDS = 6;

    private final List<LikelihoodClass> classes;
    private final int n;
    private final Enclosure factor;
    private final double error;
    private final int levels;
    private final Map<Integer, UnionBins> bins = new ConcurrentHashMap<>();

    /**
     * Takes a channel and an input.
     *
     * @param rows the channel
     * @param p the input
     * @param traces what holds the sums of the rows
     * @param n the number of uses
     */
    RandomCodingUnion(double[][] rows, double[] p, Enclosure traces, int n) {
        this.n = n;
        classes = LikelihoodClass.of(rows, p);
        levels = classes.stream().mapToInt(LikelihoodClass::levels).sum();
        error = classes.stream().mapToDouble(LikelihoodClass::error).max().orElse(0);
        // dividing rows and input by their sums scales the probabilities of types and of tails
        Enclosure one = Enclosure.ONE;
        Enclosure input = one.dividedBy(Traces.sum(p));
        Enclosure joint = input.dividedBy(traces);
        factor = one.hull(joint).hull(joint.times(input)).hull(input).power(n);
    }

    /** Whether the types that {@link #near} asks for are not too many. */
    boolean fits(double level) {
        return bins.containsKey(depth(level)) || types(depth(level)).fits();
    }

    /** g(t), as near as windows allow. */
    Enclosure at(WideDouble t) {
        int depth = depth(FIRST_LEVEL);
        UnionBins sums = bins(depth);
        for (int round = 1; ; round++) {
            Enclosure g = sums.at(t);
            boolean enough = sums.leftOut() <= TOLERANCE * g.lower() || sums.leftOut() <= UnionBins.TINY;
            if (enough || round == MOST_ROUNDS) {
                return widened(g, sums);
            }
            double low = Math.max(g.lower(), Double.MIN_NORMAL);
            depth = Math.max(2 * depth, depth(low));
            UnionTypes next = types(depth);
            if (!next.fits()) {
                return widened(g, sums);
            }
            sums = bins(depth);
        }
    }

    /** g for a search of the crossing with a level: values within a small part of the level. */
    Curve near(double level) {
        UnionBins sums = bins(depth(level));
        return t -> widened(sums.at(t), sums);
    }

    /** The least depth, in steps, at which little of a value is left out. */
    private int depth(double value) {
        double ln = Math.log(4.0 * (levels + classes.size()) / TOLERANCE) - Math.log(value);
        return 16 * (int) Math.ceil(ln / 16);
    }

    private UnionTypes types(int depth) {
        return new UnionTypes(classes, n, depth);
    }

    private UnionBins bins(int depth) {
        UnionBins known = bins.get(depth);
        if (known == null) {
            known = types(depth).bins();
            bins.put(depth, known);
        }
        return known;
    }

    private Enclosure widened(Enclosure g, UnionBins sums) {
        double relative = (6.0 * n + sums.roundings()) * U * 1.01 + 2.02 * n * error;
        Enclosure e = Enclosure.of(1 - relative, 1 + relative);
        return g.times(e).times(factor).clip(0, 1);
    }
}
