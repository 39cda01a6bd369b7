package org.minorant.bounds;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import org.minorant.core.Enclosure;
import org.minorant.core.pair.CommutingPowers;
import org.minorant.core.pair.PositivePair;

/**
 * n uses of a classical channel. Over words drawn letter by letter from P the mean of the curves is one curve, that of n copies of the commuting pair
 *
 * <pre>A = (P(x) W(y|x)),   B = (P(x) Q(y)),   Q = Σ_x P(x) W_x.</pre>
 *
 * <p>Against an output state alone, the curve of a word depends on its letters only through the pairs (W(y|x), Q(y)), in whatever order of y. Where these are the
 * same for all letters, as for symmetric channels, so are the curves of all words; otherwise a word's curve depends on how many letters of each kind it has ({@link WordTypes}).
 */
final class CommutingWords {

    /** Letters whose sorted eigenvalues differ by more than this, relatively, are of different kinds. */
    private static final double ALIKE = 0x1p-44;

    private static final double U = 0x1p-53;

    private final double[][] rows;
    private final Enclosure traces;
    private final int n;

    CommutingWords(double[][] rows, Enclosure traces, int n) {
        this.rows = rows;
        this.traces = traces;
        this.n = n;
    }

    /**
     * The mean over all words.
     *
     * @param p the distribution of letters
     * @param q its output, as rounded
     */
    WordCurves mean(double[] p, double[] q) {
        int outcomes = q.length;
        double[] a = new double[rows.length * outcomes];
        double[] b = new double[a.length];
        for (int x = 0; x < rows.length; x++) {
            for (int y = 0; y < outcomes; y++) {
                a[x * outcomes + y] = p[x] * rows[x][y];
                b[x * outcomes + y] = p[x] * q[y];
            }
        }
        MergedSpectra merged = MergedSpectra.of(a, b);
        Enclosure sum = Traces.sum(p);
        Enclosure one = Enclosure.ONE;
        Enclosure scaleA = one.dividedBy(sum.times(traces));
        Enclosure slack = scaleA.hull(scaleA.dividedBy(sum)).hull(one);
        double error = merged.error() + (rows.length + 8) * U;
        return WordCurves.of(merged.copies(n), sum.times(traces), slack, error, 0, n);
    }

    /**
     * All words against an output state.
     *
     * @param s its eigenvalues
     * @param trace what holds their sum, over its true value
     */
    WordCurves against(double[] s, Enclosure trace) {
        List<MergedSpectra> kinds = new ArrayList<>();
        double error = 0;
        for (double[] row : rows) {
            MergedSpectra letter = MergedSpectra.of(row, s);
            int k = 0;
            while (k < kinds.size() && !(kinds.get(k).distance(letter) <= ALIKE)) {
                k++;
            }
            if (k == kinds.size()) {
                kinds.add(letter);
            }
            MergedSpectra kind = kinds.get(k);
            error = Math.max(error, kind.error() + letter.error() + 2 * kind.distance(letter));
        }
        List<PositivePair> pairs = kinds.size() == 1 ? List.of(kinds.get(0).copies(n)) : WordTypes.pairs(kinds, n);
        Enclosure one = Enclosure.ONE;
        Enclosure slack = one.dividedBy(traces).hull(one.dividedBy(trace)).hull(one);
        return WordCurves.of(pairs, traces, slack, error, 0, n);
    }

    /**
     * Words of single types against an output state.
     *
     * @param s its eigenvalues
     * @param trace what holds their sum, over its true value
     */
    TypedWords typed(double[] s, Enclosure trace) {
        List<MergedSpectra> letters =
                Arrays.stream(rows).map(row -> MergedSpectra.of(row, s)).toList();
        double error = letters.stream().mapToDouble(MergedSpectra::error).max().orElse(0);
        CommutingPowers powers = CommutingPowers.of(
                letters.stream().map(MergedSpectra::a).toList(),
                letters.stream().map(MergedSpectra::b).toList(),
                n);
        Enclosure one = Enclosure.ONE;
        Enclosure slack = one.dividedBy(traces).hull(one.dividedBy(trace)).hull(one);
        return new TypedWords(powers::pair, powers::terms, traces, slack, error, n);
    }
}
