package org.minorant.bounds;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import java.util.stream.IntStream;

/**
 * Outcomes of a classical channel that are alike to a decoder: given one of them, the likelihoods W(y|x) of the letters stand in the same ratios, for the same probabilities of letters. The outcomes of a
 * binary symmetric channel are one class, at equal input.
 *
 * <p>The letters that are as likely as each other, given the outcome, are one level. Likelihoods that differ by rounding are taken for equal: whatever a decoder compares, its random-coding union bound holds.
 *
 * @param best the likelihood of each class's first level, and of each level: the decoder compares products of {@code likelihood[j]/likelihood[0]}
 * @param joint Σ P(x) W(y|x) over the level and the outcomes of the class
 * @param input Σ P(x) over the level, given one outcome
 * @param error a bound on the relative error of {@code joint} and {@code input}
 */
record LikelihoodClass(double[] likelihood, double[] joint, double[] input, double error) {

    /** Likelihoods, ratios and probabilities closer than this, relatively, differ by rounding. */
    private static final double ALIKE = 0x1p-44;

    private static final double U = 0x1p-53;

    /**
     * Finds the classes of outcomes that occur.
     *
     * @param rows the channel
     * @param p the input
     */
    static List<LikelihoodClass> of(double[][] rows, double[] p) {
        List<LikelihoodClass> classes = new ArrayList<>();
        for (int y = 0; y < rows[0].length; y++) {
            LikelihoodClass one = outcome(rows, p, y);
            if (one.levels() == 0) {
                continue;
            }
            int c = 0;
            while (c < classes.size() && !classes.get(c).isLike(one)) {
                c++;
            }
            if (c == classes.size()) {
                classes.add(one);
            } else {
                classes.set(c, classes.get(c).with(one));
            }
        }
        return classes;
    }

    private static LikelihoodClass outcome(double[][] rows, double[] p, int y) {
        List<Integer> order = IntStream.range(0, rows.length)
                .filter(x -> p[x] > 0 && rows[x][y] > 0)
                .boxed()
                .sorted(Comparator.comparingDouble((Integer x) -> -rows[x][y]))
                .toList();
        double[][] levels = new double[order.size()][3];
        int count = 0;
        for (int x : order) {
            double w = rows[x][y];
            if (count == 0 || levels[count - 1][0] - w > ALIKE * w) {
                levels[count++][0] = w;
            }
            levels[count - 1][1] += p[x] * w;
            levels[count - 1][2] += p[x];
        }
        double[][] kept = Arrays.copyOf(levels, count);
        return new LikelihoodClass(column(kept, 0), column(kept, 1), column(kept, 2), (rows.length + 2) * U);
    }

    private static double[] column(double[][] table, int j) {
        return Arrays.stream(table).mapToDouble(row -> row[j]).toArray();
    }

    int levels() {
        return likelihood.length;
    }

    /** ln of a level's likelihood over that of the first. */
    double ln(int j) {
        return Math.log(likelihood[j] / likelihood[0]);
    }

    /** The probability of the class's outcomes. */
    double total() {
        double s = 0;
        for (double v : joint) {
            s += v;
        }
        return s;
    }

    private boolean isLike(LikelihoodClass o) {
        if (levels() != o.levels()) {
            return false;
        }
        for (int j = 0; j < levels(); j++) {
            double mine = likelihood[j] / likelihood[0];
            double other = o.likelihood[j] / o.likelihood[0];
            if (!(Math.abs(mine - other) <= ALIKE * mine && Math.abs(input[j] - o.input[j]) <= ALIKE * input[j])) {
                return false;
            }
        }
        return true;
    }

    private LikelihoodClass with(LikelihoodClass o) {
        double[] sum = new double[levels()];
        double e = Math.max(error, o.error) + 2 * U;
        for (int j = 0; j < sum.length; j++) {
            sum[j] = joint[j] + o.joint[j];
            double apart = Math.abs(input[j] - o.input[j]) / Math.min(input[j], o.input[j]) * (1 + 0x1p-40);
            e = Math.max(e, o.error + apart);
        }
        return new LikelihoodClass(likelihood, sum, input, e);
    }
}
