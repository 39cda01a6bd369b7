package org.minorant.core.internal.door;

import java.util.Arrays;
import org.ojalgo.matrix.decomposition.LU;
import org.ojalgo.matrix.store.MatrixStore;
import org.ojalgo.matrix.store.R064Store;

/**
 * Linear equations in double, by the linear-algebra dependency's LU decomposition with partial pivoting. The result is not certified: whoever asks verifies it.
 *
 * <p>Complex equations are solved as real ones of twice the size, [[Re A, −Im A], [Im A, Re A]] (Re X; Im X) = (Re B; Im B), since the dependency's complex type is slower still.
 * Rows may be graded as steeply as double holds: its LU decomposition has no absolute threshold, and gave the same bits on 1, 2 and 16 processors.
 */
public final class LinearSolve {

    private LinearSolve() {}

    /**
     * Solves A X = B; B becomes X. A singular A leaves numbers in X that are not finite, and so do entries that are not: they are not passed on.
     *
     * @param ar real parts of A by rows, n × n
     * @param ai imaginary parts of A by rows, n × n
     * @param br real parts of B by rows, n × m; overwritten by those of X
     * @param bi imaginary parts of B by rows, n × m; overwritten by those of X
     * @throws IllegalArgumentException if the shapes do not fit
     */
    public static void solve(double[][] ar, double[][] ai, double[][] br, double[][] bi) {
        int n = ar.length;
        int m = n == 0 ? 0 : br[0].length;
        if (check(ar, n, n) + check(ai, n, n) + check(br, n, m) + check(bi, n, m) != 0) {
            for (int i = 0; i < n; i++) {
                Arrays.fill(br[i], Double.NaN);
                Arrays.fill(bi[i], Double.NaN);
            }
            return;
        }
        boolean real = isZero(ai) && isZero(bi);
        int size = real ? n : 2 * n;
        R064Store a = R064Store.FACTORY.make(size, size);
        R064Store b = R064Store.FACTORY.make(size, m);
        put(a, ar, 0, 0, 1);
        put(b, br, 0, 0, 1);
        if (!real) {
            put(a, ar, n, n, 1);
            put(a, ai, n, 0, 1);
            put(a, ai, 0, n, -1);
            put(b, bi, n, 0, 1);
        }
        LU<Double> lu = LU.R064.make(a);
        // its own verdict on solvability compares pivots with each other and refuses graded matrices: not asked
        lu.decompose(a);
        MatrixStore<Double> x = lu.getSolution(b);
        if (x.countRows() != size || x.countColumns() != m) {
            throw new ArithmeticException("the solution has another shape than the right-hand side");
        }
        get(x, 0, br);
        if (!real) {
            get(x, n, bi);
        }
    }

    /** Checks a shape; returns how many entries are not finite. */
    private static int check(double[][] a, int rows, int columns) {
        int bad = 0;
        boolean fits = rows > 0 && columns > 0 && a.length == rows;
        for (double[] row : a) {
            fits &= row.length == columns;
            for (double v : row) {
                bad += Double.isFinite(v) ? 0 : 1;
            }
        }
        if (!fits) {
            throw new IllegalArgumentException("a square matrix and as many rows on the right are needed");
        }
        return bad;
    }

    private static boolean isZero(double[][] a) {
        for (double[] row : a) {
            for (double v : row) {
                if (v != 0) {
                    return false;
                }
            }
        }
        return true;
    }

    private static void put(R064Store to, double[][] from, int row, int column, double sign) {
        for (int i = 0; i < from.length; i++) {
            for (int j = 0; j < from[i].length; j++) {
                to.set(row + i, column + j, sign * from[i][j]);
            }
        }
    }

    private static void get(MatrixStore<Double> from, int row, double[][] to) {
        for (int i = 0; i < to.length; i++) {
            for (int j = 0; j < to[i].length; j++) {
                to[i][j] = from.doubleValue(row + i, j);
            }
        }
    }
}
