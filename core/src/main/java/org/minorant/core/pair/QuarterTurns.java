package org.minorant.core.pair;

import java.util.Optional;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.PositiveOperator;

/**
 * A diagonal unitary D of phases 1 and i that makes two operators real: D*AD and D*BD. Such a change of basis is exact, leaves Tr[A ∧ tB] as it is, and a real problem costs a quarter of a complex one.
 *
 * <p><b>How it is found.</b> Every nonzero entry must be purely real or purely imaginary; it asks that the turns of its row and its column be equal, or differ. These are equations modulo two, solved by a union of
 * basis vectors with parities. Columns of a factor take part with a turn of their own, since XX* does not depend on them.
 */
final class QuarterTurns {

    private final int[] turn;

    private QuarterTurns(int[] turn) {
        this.turn = turn;
    }

    /** The turns for two operators that are not both real already; empty if there are none. */
    static Optional<QuarterTurns> find(PositiveOperator a, PositiveOperator b) {
        if (a.isReal() && b.isReal() || !cheap(a) || !cheap(b)) {
            return Optional.empty();
        }
        int n = a.dimension();
        Parities p = new Parities(n + columns(a) + columns(b));
        if (!link(a, p, n) || !link(b, p, n + columns(a))) {
            return Optional.empty();
        }
        int[] turn = new int[n];
        for (int i = 0; i < n; i++) {
            turn[i] = p.parity(i);
        }
        return Optional.of(new QuarterTurns(turn));
    }

    private static boolean cheap(PositiveOperator a) {
        return !a.isDefinedByFactor() || a.knownColumns().isPresent();
    }

    private static int columns(PositiveOperator a) {
        return a.isDefinedByFactor() ? a.factor().rank() : 0;
    }

    private static boolean link(PositiveOperator a, Parities p, int firstColumn) {
        if (!a.isDefinedByFactor()) {
            for (int i = 0; i < a.dimension(); i++) {
                for (int j = 0; j < i; j++) {
                    if (!p.link(i, j, a.re(i, j), a.im(i, j))) {
                        return false;
                    }
                }
            }
            return true;
        }
        EnclosedMatrix x = a.factor().columns();
        for (int i = 0; i < x.rows(); i++) {
            for (int c = 0; c < x.columns(); c++) {
                if (!p.link(i, firstColumn + c, x.re(i, c), x.im(i, c))) {
                    return false;
                }
            }
        }
        return true;
    }

    /** Entry (i, j) of D*CD, which is real, from the parts of the entry of C. */
    double entry(int i, int j, double re, double im) {
        if (turn[i] == turn[j]) {
            return re;
        }
        // conj(i)·(i·y) = y and (i·y)·i = −y
        return turn[i] == 1 ? im : -im;
    }

    /** Columns D*X, each turned to be real; empty if a column is not made real by one turn, as those of a numerical factor may be. */
    Optional<EnclosedMatrix> columns(EnclosedMatrix x) {
        EnclosedMatrix.Builder b = EnclosedMatrix.builder(x.rows(), x.columns());
        for (int c = 0; c < x.columns(); c++) {
            int first = 0;
            while (first < x.rows() - 1 && x.re(first, c) == 0 && x.im(first, c) == 0) {
                first++;
            }
            // the turn of the column makes its first nonzero entry real, and with it all others
            int own = turn[first] ^ (x.im(first, c) != 0 ? 1 : 0);
            for (int i = 0; i < x.rows(); i++) {
                boolean same = turn[i] == own;
                if ((same ? x.im(i, c) : x.re(i, c)) != 0) {
                    return Optional.empty();
                }
                double sign = same || turn[i] == 1 ? 1 : -1;
                double hi = same ? x.re(i, c) : sign * x.im(i, c);
                double lo = same ? x.reTail(i, c) : sign * x.imTail(i, c);
                b.set(i, c, hi, lo, 0, 0, x.radius(i, c));
            }
        }
        return Optional.of(b.build());
    }

    /** Union-find with the parity of each element relative to its root. */
    private static final class Parities {

        private final int[] root;
        private final int[] parity;

        Parities(int n) {
            root = new int[n];
            parity = new int[n];
            java.util.Arrays.setAll(root, i -> i);
        }

        /** Adds the equation of an entry; false if it is neither real nor imaginary, or contradicts the others. */
        boolean link(int i, int j, double re, double im) {
            if (re == 0 && im == 0) {
                return true;
            }
            if (re != 0 && im != 0) {
                return false;
            }
            int differ = im != 0 ? 1 : 0;
            int p = parity(i);
            int q = parity(j);
            int a = find(i);
            int b = find(j);
            if (a == b) {
                return (p ^ q) == differ;
            }
            root[a] = b;
            parity[a] = p ^ q ^ differ;
            return true;
        }

        private int find(int i) {
            while (root[i] != i) {
                i = root[i];
            }
            return i;
        }

        int parity(int i) {
            int p = 0;
            while (root[i] != i) {
                p ^= parity[i];
                i = root[i];
            }
            return p;
        }
    }
}
