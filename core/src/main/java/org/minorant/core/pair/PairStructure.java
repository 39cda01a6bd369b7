package org.minorant.core.pair;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalInt;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.PositiveFactor;
import org.minorant.core.PositiveOperator;

/**
 * Finds the structure of a pair: blocks that neither operator leaves, diagonal form, low rank.
 *
 * <p>Two basis vectors belong to one block if an entry, or a column of the factor that defines the operator, is nonzero at both; this is decided exactly. A pair whose blocks are
 * all of dimension one commutes.
 */
final class PairStructure {

    /** Factors with at most this many columns in all go straight to the certificate of relative accuracy. */
    private static final int FEW_COLUMNS = 48;

    private PairStructure() {}

    static PositivePair find(PositiveOperator a, PositiveOperator b) {
        int[][] blocks = blocks(a, b);
        if (blocks.length == a.dimension() && exactDiagonal(a) && exactDiagonal(b)) {
            return commuting(a, b);
        }
        if (blocks.length == 1) {
            return single(a, b);
        }
        List<PositivePair> pairs = new ArrayList<>();
        for (int[] block : blocks) {
            pairs.add(single(PositiveOperator.compression(a, block), PositiveOperator.compression(b, block)));
        }
        return DirectSumPair.ofBlocks(pairs, n -> power(a, b, n));
    }

    /** The pair of n copies of two operators. */
    static PositivePair power(PositiveOperator a, PositiveOperator b, int n) {
        if (isKet(a) || isKet(b)) {
            Optional<PositivePair> secular =
                    isKet(a) ? RankOneCopies.of(a, b, false, n) : RankOneCopies.of(b, a, true, n);
            if (secular.isPresent()) {
                return secular.get();
            }
        }
        if (a.dimension() == 2) {
            return SpinBlocksPair.of(a, b, n);
        }
        return UnitaryBlocksPair.of(a, b, n);
    }

    static boolean isKet(PositiveOperator a) {
        return a.knownColumns().isPresent() && a.knownColumns().getAsInt() == 1;
    }

    private static PositivePair single(PositiveOperator a, PositiveOperator b) {
        if (exactDiagonal(a) && exactDiagonal(b)) {
            return commuting(a, b);
        }
        OptionalInt columnsA = a.knownColumns();
        OptionalInt columnsB = b.knownColumns();
        boolean few = columnsA.isPresent()
                && columnsB.isPresent()
                && columnsA.getAsInt() + columnsB.getAsInt() <= FEW_COLUMNS;
        if (columnsA.isPresent() && columnsA.getAsInt() == 1 && (exactDiagonal(b) || !few)) {
            return RankOnePair.of(a, b, false);
        }
        if (columnsB.isPresent() && columnsB.getAsInt() == 1 && (exactDiagonal(a) || !few)) {
            return RankOnePair.of(b, a, true);
        }
        if (few) {
            return FactorPair.fromOperators(a, b);
        }
        return new DensePair(a, b);
    }

    private static PositivePair commuting(PositiveOperator a, PositiveOperator b) {
        int n = a.dimension();
        double[] x = new double[n];
        double[] y = new double[n];
        for (int i = 0; i < n; i++) {
            x[i] = Math.max(0, a.re(i, i));
            y[i] = Math.max(0, b.re(i, i));
        }
        return CommutingPair.of(x, y);
    }

    private static boolean exactDiagonal(PositiveOperator a) {
        return !a.isDefinedByFactor() && isDiagonal(a);
    }

    static boolean isDiagonal(PositiveOperator a) {
        for (int i = 0; i < a.dimension(); i++) {
            for (int j = 0; j < i; j++) {
                if (a.re(i, j) != 0 || a.im(i, j) != 0) {
                    return false;
                }
            }
        }
        return true;
    }

    /** The indices of each block, in order of their first index. */
    private static int[][] blocks(PositiveOperator a, PositiveOperator b) {
        int n = a.dimension();
        int[] root = new int[n];
        java.util.Arrays.setAll(root, i -> i);
        link(a, root);
        link(b, root);
        List<List<Integer>> groups = new ArrayList<>();
        int[] number = new int[n];
        java.util.Arrays.fill(number, -1);
        for (int i = 0; i < n; i++) {
            int r = find(root, i);
            if (number[r] < 0) {
                number[r] = groups.size();
                groups.add(new ArrayList<>());
            }
            groups.get(number[r]).add(i);
        }
        return groups.stream()
                .map(g -> g.stream().mapToInt(Integer::intValue).toArray())
                .toArray(int[][]::new);
    }

    private static void link(PositiveOperator a, int[] root) {
        int n = a.dimension();
        if (!a.isDefinedByFactor()) {
            for (int i = 0; i < n; i++) {
                for (int j = 0; j < i; j++) {
                    if (a.re(i, j) != 0 || a.im(i, j) != 0) {
                        union(root, i, j);
                    }
                }
            }
            return;
        }
        if (a.knownColumns().isEmpty()) {
            // rounded entries do not show exact zeros, and finding the factor costs more than blocks would save
            for (int i = 1; i < n; i++) {
                union(root, 0, i);
            }
            return;
        }
        PositiveFactor f = a.factor();
        EnclosedMatrix x = f.columns();
        for (int c = 0; c < x.columns(); c++) {
            int seen = -1;
            for (int i = 0; i < n; i++) {
                if (x.re(i, c) != 0 || x.im(i, c) != 0) {
                    if (seen >= 0) {
                        union(root, seen, i);
                    }
                    seen = i;
                }
            }
        }
    }

    private static int find(int[] root, int i) {
        int r = i;
        while (root[r] != r) {
            root[r] = root[root[r]];
            r = root[r];
        }
        return r;
    }

    private static void union(int[] root, int i, int j) {
        int a = find(root, i);
        int b = find(root, j);
        root[Math.max(a, b)] = Math.min(a, b);
    }
}
