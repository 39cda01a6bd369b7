package org.minorant.core.pair;

import java.nio.IntBuffer;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;

/**
 * The Gelfand–Tsetlin patterns of a representation of GL(d) whose monomials are not too small: triangles of integers, the shape λ on top (row d), rows m = d−1 … 1 of m integers below it, each
 * row interlacing with the one above. A pattern is a basis vector; the letter m occurs w_m = |row m| − |row m−1| times, so diag(a₁, …, a_d) has there the eigenvalue ∏ a_m^{w_m}.
 *
 * <p>The window holds the patterns with Σ w_m L_m ≥ threshold, L_m = log₂(a_m/a₁) ≤ 0. It is closed under removal of boxes: that lowers a w_m. The sum is rounded, but in a fixed order, and so does not decrease.
 *
 * <p>A pattern is held as its rows one after another, row 1 first; row m begins at m(m−1)/2.
 */
final class PatternWindow {

    private final int[] shape;
    private final double[] logs;
    private final double threshold;
    private final int most;
    private final List<int[]> patterns = new ArrayList<>();
    private final Map<IntBuffer, Integer> index = new HashMap<>();

    /** What is thrown when a window would hold more patterns than allowed. */
    static final class TooMany extends RuntimeException {
        private static final long serialVersionUID = 1;

        TooMany() {
            super("more patterns than allowed", null, false, false);
        }
    }

    /**
     * The window of a shape.
     *
     * @param shape λ, d parts
     * @param logs L_m, descending from 0; −∞ for eigenvalues zero
     * @param threshold the least sum; −∞ for all patterns
     * @param most the largest number of patterns
     */
    PatternWindow(int[] shape, double[] logs, double threshold, int most) {
        this.shape = shape.clone();
        this.logs = logs;
        this.threshold = threshold;
        this.most = most;
        int d = shape.length;
        int[] pattern = new int[d * (d - 1) / 2];
        fill(pattern, d - 1, 0, 0);
    }

    /** Fills row m from entry j on; sum is what the letters above m + 1 weigh. */
    private void fill(int[] pattern, int m, int j, double sum) {
        if (j == m) {
            int letters = total(pattern, m + 1) - total(pattern, m);
            double next = sum + term(letters, logs[m]);
            if (!(next >= threshold)) {
                return;
            }
            if (m == 0) {
                if (patterns.size() == most) {
                    throw new TooMany();
                }
                index.put(IntBuffer.wrap(pattern.clone()), patterns.size());
                patterns.add(pattern.clone());
            } else {
                fill(pattern, m - 1, 0, next);
            }
            return;
        }
        int high = entry(pattern, m + 1, j);
        int low = entry(pattern, m + 1, j + 1);
        for (int x = high; x >= low; x--) {
            pattern[m * (m - 1) / 2 + j] = x;
            fill(pattern, m, j + 1, sum);
        }
    }

    private static double term(int letters, double log) {
        return letters == 0 ? 0 : letters * log;
    }

    private int entry(int[] pattern, int m, int j) {
        return m == shape.length ? shape[j] : pattern[m * (m - 1) / 2 + j];
    }

    private int total(int[] pattern, int m) {
        int s = 0;
        for (int j = 0; j < m; j++) {
            s += entry(pattern, m, j);
        }
        return s;
    }

    int size() {
        return patterns.size();
    }

    int[] shape() {
        return shape.clone();
    }

    /** Entries of the i-th pattern, not to be changed. */
    int[] pattern(int i) {
        return patterns.get(i);
    }

    /** The place of a pattern, −1 if it is not in the window. */
    int find(int[] pattern) {
        return index.getOrDefault(IntBuffer.wrap(pattern), -1);
    }

    /** Σ w_m L_m of the i-th pattern, as it is compared with the threshold. */
    double log(int i) {
        return log(shape, patterns.get(i), logs);
    }

    /** Σ w_m L_m of a pattern of a shape, as it is compared with the threshold. */
    static double log(int[] shape, int[] pattern, double[] logs) {
        int[] w = weight(shape, pattern);
        double s = 0;
        for (int m = w.length - 1; m >= 0; m--) {
            s += term(w[m], logs[m]);
        }
        return s;
    }

    /** How often each letter occurs in a pattern of a shape. */
    static int[] weight(int[] shape, int[] pattern) {
        int d = shape.length;
        int[] w = new int[d];
        int before = 0;
        for (int m = 1; m <= d; m++) {
            int total = 0;
            for (int j = 0; j < m; j++) {
                total += m == d ? shape[j] : pattern[m * (m - 1) / 2 + j];
            }
            w[m - 1] = total - before;
            before = total;
        }
        return w;
    }
}
