package org.minorant.bounds;

import java.util.ArrayList;
import java.util.List;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.InvalidInputException;
import org.minorant.core.WideDouble;

/**
 * n uses of a classical channel of two senders, by types: with letters i = (x, y, z), a = P(x) Q(y) W(z|xy), and b, c, d the same with ρ_y(z), ρ_x(z), ρ(z) in place of W,
 *
 * <pre>g = Σ over types of multinomial · min(Π a_i^{n_i}, α Π b_i^{n_i} + β Π c_i^{n_i} + αβ Π d_i^{n_i}),   α = M₁ − 1, β = M₂ − 1.</pre>
 *
 * <p>Letters whose four numbers are proportional are merged, and such with a = 0 left out: they add nothing. All products are enclosed; what rounding did to the numbers, and merging to proportions, is a relative error of each use.
 */
final class TwoSenderTypes implements TwoSenders.TwoSenderBound {

    private static final int MOST_TYPES = 300_000;

    /** Proportions closer than this are equal: they differ by the rounding of the data. */
    private static final double CLOSE = 0x1p-49;

    private final List<double[]> letters;
    private final int n;
    private final Enclosure slack;
    /** x^k/k! for each letter and each of its four numbers. */
    private final Enclosure[][][] powers;

    private TwoSenderTypes(List<double[]> letters, int n, Enclosure slack) {
        this.letters = letters;
        this.n = n;
        this.slack = slack;
        this.powers = new Enclosure[letters.size()][4][n + 1];
        for (int i = 0; i < letters.size(); i++) {
            for (int r = 0; r < 4; r++) {
                Enclosure e = Enclosure.ONE;
                for (int k = 0; k <= n; k++) {
                    powers[i][r][k] = e;
                    e = e.times(letters.get(i)[r]).dividedBy(Enclosure.exact(k + 1.0));
                }
            }
        }
    }

    static TwoSenderTypes of(List<List<DensityOperator>> outputs, double[] p, double[] q, int n) {
        int d = outputs.get(0).get(0).dimension();
        List<double[]> merged = new ArrayList<>();
        int members = 1;
        for (int x = 0; x < p.length; x++) {
            for (int y = 0; y < q.length; y++) {
                for (int z = 0; z < d; z++) {
                    double[] letter = letter(outputs, p, q, x, y, z);
                    deep(letter, p[x] > 0 && q[y] > 0 && outputs.get(x).get(y).re(z, z) > 0);
                    if (letter[0] > 0) {
                        members++;
                        merge(merged, letter);
                    }
                }
            }
        }
        double types = 1;
        for (int i = 1; i < merged.size(); i++) {
            types *= (n + i) / (double) i;
        }
        if (!(types <= MOST_TYPES)) {
            throw new InvalidInputException(
                    "TwoSenders.uses",
                    n + " uses with " + merged.size() + " different likelihoods, so " + types + " types",
                    "at most " + MOST_TYPES,
                    "ask for fewer uses");
        }
        List<DensityOperator> all = new ArrayList<>();
        outputs.forEach(all::addAll);
        // sums of at most all states, products of three, and proportions that were taken for equal
        double error = (members + p.length * q.length + 16) * 0x1p-52 + 2 * members * CLOSE;
        Enclosure rounding = Enclosure.ONE.widen(error);
        return new TwoSenderTypes(
                merged, n, TwoSenders.slack(all, p, q).times(rounding).power(n));
    }

    /** Refuses products that gradual underflow may have spoilt. */
    private static void deep(double[] letter, boolean occurs) {
        if (occurs && letter[0] < TwoSenders.SHALLOW) {
            throw new InvalidInputException(
                    "TwoSenders.uses",
                    "a letter and its outcome have the probability " + letter[0],
                    "0, or at least " + TwoSenders.SHALLOW,
                    "leave out what is as rare");
        }
    }

    private static double[] letter(List<List<DensityOperator>> w, double[] p, double[] q, int x, int y, int z) {
        double ofY = 0;
        double ofX = 0;
        double all = 0;
        for (int u = 0; u < p.length; u++) {
            ofY += p[u] * Math.max(0, w.get(u).get(y).re(z, z));
            for (int v = 0; v < q.length; v++) {
                all += p[u] * q[v] * Math.max(0, w.get(u).get(v).re(z, z));
            }
        }
        for (int v = 0; v < q.length; v++) {
            ofX += q[v] * Math.max(0, w.get(x).get(v).re(z, z));
        }
        double pq = p[x] * q[y];
        return new double[] {pq * Math.max(0, w.get(x).get(y).re(z, z)), pq * ofY, pq * ofX, pq * all};
    }

    private static void merge(List<double[]> merged, double[] letter) {
        for (double[] m : merged) {
            boolean same = true;
            for (int r = 1; r < 4; r++) {
                same &= Math.abs(m[r] * letter[0] - m[0] * letter[r]) <= CLOSE * m[0] * letter[r];
            }
            if (same) {
                for (int r = 0; r < 4; r++) {
                    m[r] += letter[r];
                }
                return;
            }
        }
        merged.add(letter);
    }

    @Override
    public Enclosure at(WideDouble otherFirst, WideDouble otherSecond) {
        Enclosure factorial = Enclosure.ONE;
        for (int k = 2; k <= n; k++) {
            factorial = factorial.times(k);
        }
        Enclosure a = Enclosure.of(otherFirst, otherFirst);
        Enclosure b = Enclosure.of(otherSecond, otherSecond);
        return sum(
                        0,
                        n,
                        factorial,
                        factorial.times(a),
                        factorial.times(b),
                        factorial.times(a).times(b))
                .times(slack);
    }

    private Enclosure sum(int i, int left, Enclosure a, Enclosure b, Enclosure c, Enclosure d) {
        if (i == letters.size() - 1) {
            return term(i, left, a, b, c, d);
        }
        Enclosure s = Enclosure.ZERO;
        for (int k = 0; k <= left; k++) {
            s = s.plus(sum(
                    i + 1,
                    left - k,
                    a.times(powers[i][0][k]),
                    b.times(powers[i][1][k]),
                    c.times(powers[i][2][k]),
                    d.times(powers[i][3][k])));
        }
        return s;
    }

    private Enclosure term(int i, int k, Enclosure a, Enclosure b, Enclosure c, Enclosure d) {
        return a.times(powers[i][0][k])
                .min(b.times(powers[i][1][k]).plus(c.times(powers[i][2][k])).plus(d.times(powers[i][3][k])));
    }
}
