package org.minorant.core.pair;

import java.util.ArrayList;
import java.util.List;
import org.minorant.core.internal.number.DoubleDouble;

/**
 * The embedding of a representation V_λ of GL(d) into V_μ ⊗ C^d, μ = λ minus a box, in Gelfand–Tsetlin bases:
 *
 * <pre>W|p⟩ = Σ_k Σ_q w(p; q, k) |q⟩ ⊗ |k⟩,</pre>
 *
 * an isometry with W π_λ(U) = (π_μ(U) ⊗ U) W. The pattern q comes from p by taking one box from each of the rows k, …, d, and w is a product over these rows. With l_j = (row m of q)_j − j and l'_j the same for
 * row m − 1, a box taken at place i of row m and i' of row m − 1 contributes
 *
 * <pre>± √| ∏_{j≠i'} (l'_j − l_i − 1)/(l'_j − l'_i' − 1) · ∏_{j≠i} (l_j − l'_i')/(l_j − l_i) |,   − if i' &lt; i,</pre>
 *
 * and in the lowest row that changes, m = k, √| ∏_j (l'_j − l_i − 1) / ∏_{j≠i} (l_j − l_i) | (reduced Wigner coefficients of the unitary group: L. C. Biedenharn, J. D. Louck, Commun. Math. Phys. 8, 89 (1968); N. Ja. Vilenkin,
 * A. U. Klimyk, Representation of Lie Groups and Special Functions, vol. 3, 18.2.10; from memory, and checked by the tests: W is an isometry and commutes with the group).
 *
 * <p>Numerators and denominators are products of integers, at most 2d(d − 1) of them: coefficients err by a relative (d(d − 1) + 2) 2^-102 or less.
 *
 * @param parent for each pattern p the places of its q in the window of μ
 * @param letter the k
 * @param high high words of the coefficients
 * @param low low words
 */
record BoxAddition(int[][] parent, int[][] letter, double[][] high, double[][] low) {

    /** A part of W|p⟩. */
    private record Part(int place, int letter, DoubleDouble coefficient) {}

    /** The embedding of the patterns of one window into the patterns of another, whose shape lacks a box in the given row. */
    static BoxAddition of(PatternWindow child, PatternWindow parent, int row) {
        int n = child.size();
        BoxAddition w = new BoxAddition(new int[n][], new int[n][], new double[n][], new double[n][]);
        for (int p = 0; p < n; p++) {
            List<Part> parts = new ArrayList<>();
            int d = child.shape().length;
            collect(child.pattern(p), parent.shape(), d, row, DoubleDouble.ONE, parent, parts);
            int m = parts.size();
            w.parent[p] = new int[m];
            w.letter[p] = new int[m];
            w.high[p] = new double[m];
            w.low[p] = new double[m];
            for (int i = 0; i < m; i++) {
                w.parent[p][i] = parts.get(i).place();
                w.letter[p][i] = parts.get(i).letter();
                w.high[p][i] = parts.get(i).coefficient().hi();
                w.low[p][i] = parts.get(i).coefficient().lo();
            }
        }
        return w;
    }

    /** The largest number of parts of a pattern. */
    int mostParts() {
        int most = 0;
        for (int[] p : parent) {
            most = Math.max(most, p.length);
        }
        return most;
    }

    /** A box was taken from row m at place i; q has the rows m and above as they are in the parent, the others as in the child. */
    private static void collect(
            int[] q, int[] shape, int m, int i, DoubleDouble square, PatternWindow parent, List<Part> parts) {
        // the sign is carried by the square
        if (interlaced(q, shape, m)) {
            int place = parent.find(q);
            if (place < 0) {
                throw new IllegalStateException("a window that is not closed under removal of boxes");
            }
            DoubleDouble s = square.times(lowest(q, shape, m, i));
            DoubleDouble root = absolute(s).sqrt();
            parts.add(new Part(place, m - 1, s.hi() < 0 ? root.negate() : root));
        }
        for (int j = 0; j < m - 1; j++) {
            int[] next = q.clone();
            next[at(m - 1, j)]--;
            if (interlaced(next, shape, m)) {
                collect(next, shape, m - 1, j, square.times(step(next, shape, m, i, j)), parent, parts);
            }
        }
    }

    private static DoubleDouble absolute(DoubleDouble x) {
        return x.hi() < 0 ? x.negate() : x;
    }

    private static int at(int m, int j) {
        return m * (m - 1) / 2 + j;
    }

    private static int entry(int[] q, int[] shape, int m, int j) {
        return m == shape.length ? shape[j] : q[at(m, j)];
    }

    /** Row m − 1 fits under row m. */
    private static boolean interlaced(int[] q, int[] shape, int m) {
        for (int j = 0; j < m - 1; j++) {
            int x = q[at(m - 1, j)];
            if (x > entry(q, shape, m, j) || x < entry(q, shape, m, j + 1)) {
                return false;
            }
        }
        return true;
    }

    private static DoubleDouble lowest(int[] q, int[] shape, int m, int i) {
        int li = entry(q, shape, m, i) - i;
        DoubleDouble p = DoubleDouble.ONE;
        DoubleDouble r = DoubleDouble.ONE;
        for (int j = 0; j < m - 1; j++) {
            p = p.times(q[at(m - 1, j)] - j - li - 1);
        }
        for (int j = 0; j < m; j++) {
            if (j != i) {
                r = r.times(entry(q, shape, m, j) - j - li);
            }
        }
        return absolute(p.dividedBy(r));
    }

    private static DoubleDouble step(int[] q, int[] shape, int m, int i, int below) {
        int li = entry(q, shape, m, i) - i;
        int lb = q[at(m - 1, below)] - below;
        DoubleDouble p = DoubleDouble.ONE;
        DoubleDouble r = DoubleDouble.ONE;
        for (int j = 0; j < m - 1; j++) {
            if (j != below) {
                int lj = q[at(m - 1, j)] - j;
                p = p.times(lj - li - 1);
                r = r.times(lj - lb - 1);
            }
        }
        for (int j = 0; j < m; j++) {
            if (j != i) {
                int lj = entry(q, shape, m, j) - j;
                p = p.times(lj - lb);
                r = r.times(lj - li);
            }
        }
        DoubleDouble s = absolute(p.dividedBy(r));
        return below < i ? s.negate() : s;
    }
}
