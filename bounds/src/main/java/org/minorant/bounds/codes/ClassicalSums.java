package org.minorant.bounds.codes;

import java.util.List;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;

/**
 * The error of the pretty-good measurement of a classical channel, a sum over all words y of outcomes: with a_m = W^n(y|x(m)) and s = Σ a_m,
 *
 * <pre>error = (1/M) Σ_y Σ_m a_m (s − a_m)/s = (1/M) Σ_y 2 Σ_{i&lt;j} a_i a_j / s.</pre>
 *
 * <p><b>Enclosure.</b> No term is negative. A term has 3n products of letters' probabilities, each within (|Y| + 3)u of its quotient by the row's sum, and up to M roundings in each of s and the sum before j;
 * sums over y are nested, n deep and |Y| wide. What underflows adds less than 2^-900.
 */
final class ClassicalSums {

    /** More terms than this are not begun. */
    static final double TERMS = 0x1p34;

    private static final double U = 0x1p-53;

    private final double[][] rows;
    private final int[][] words;
    private final Watch watch;
    private final double[][] products;
    private long visited;
    private final long total;

    private ClassicalSums(double[][] rows, int[][] words, Watch watch) {
        this.rows = rows;
        this.words = words;
        this.watch = watch;
        this.products = new double[words[0].length + 1][words.length];
        this.total = rows[0].length;
    }

    /** Whether all outputs are diagonal, so that they are probabilities of outcomes. */
    static boolean isClassical(List<DensityOperator> outputs) {
        return outputs.stream().allMatch(ClassicalSums::isDiagonal);
    }

    private static boolean isDiagonal(DensityOperator w) {
        if (w.isDefinedByFactor()) {
            return false;
        }
        for (int i = 0; i < w.dimension(); i++) {
            for (int j = 0; j < i; j++) {
                if (w.re(i, j) != 0 || w.im(i, j) != 0) {
                    return false;
                }
            }
        }
        return true;
    }

    /** The number of terms: outputs times messages. */
    static double terms(Codebook code, int outcomes) {
        return Math.pow(outcomes, code.length()) * code.messages();
    }

    /** The rows of the channel, each divided by its sum. */
    static double[][] rows(List<DensityOperator> outputs) {
        double[][] rows = new double[outputs.size()][];
        for (int x = 0; x < rows.length; x++) {
            DensityOperator w = outputs.get(x);
            rows[x] = new double[w.dimension()];
            double sum = 0;
            for (int y = 0; y < rows[x].length; y++) {
                rows[x][y] = Math.max(0, w.re(y, y));
                sum += rows[x][y];
            }
            for (int y = 0; y < rows[x].length; y++) {
                rows[x][y] /= sum;
            }
        }
        return rows;
    }

    static Enclosure error(Codebook code, double[][] rows, Watch watch) {
        ClassicalSums s = new ClassicalSums(rows, code.words(), watch);
        java.util.Arrays.fill(s.products[0], 1);
        double sum = s.over(0);
        int n = code.length();
        int m = code.messages();
        double relative =
                (3.0 * n * (rows[0].length + 4) + 2.0 * m + (double) n * rows[0].length + 16) * U * (1 + 0x1p-20);
        return Enclosure.exact(sum)
                .times(Enclosure.of(1 - relative, 1 + relative))
                .plus(Enclosure.of(0, 0x1p-900))
                .dividedBy(Enclosure.exact(m))
                .min(Enclosure.ONE);
    }

    /** The sum over all continuations of the first outcomes. */
    private double over(int position) {
        double[] before = products[position];
        if (position == words[0].length) {
            return pairs(before);
        }
        double[] after = products[position + 1];
        double sum = 0;
        for (int y = 0; y < rows[0].length; y++) {
            boolean possible = false;
            for (int m = 0; m < after.length; m++) {
                after[m] = before[m] * rows[words[m][position]][y];
                possible |= after[m] > 0;
            }
            sum += possible ? over(position + 1) : 0;
            if (position == 0) {
                watch.done(++visited, total);
            } else if (position < 12) {
                watch.checkpoint();
            }
        }
        return sum;
    }

    private static double pairs(double[] a) {
        double s = 0;
        for (double v : a) {
            s += v;
        }
        double sum = 0;
        double before = 0;
        for (double v : a) {
            sum += v * (before / s);
            before += v;
        }
        return 2 * sum;
    }
}
