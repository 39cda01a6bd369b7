package org.minorant.bounds;

import java.util.Arrays;

/**
 * The distributions over some vectors that have the same mean as a given one, and the least of a linear function over them by the simplex method (Bland's rule), in double, within a tolerance.
 *
 * <p>In the form (E | M) after elimination with complete pivoting, equations that vanish within the tolerance are dropped: they say the same twice.
 *
 * <p>Source: V. Chvátal, Linear Programming (1983), chapters 2, 3 and 8 (from memory).
 */
final class MixturePolytope {

    private static final int MOST_PIVOTS = 10000;

    private final double[][] rows;
    private final double[] right;
    private final double[] start;
    private final double close;

    private MixturePolytope(double[][] rows, double[] right, double[] start, double close) {
        this.rows = rows;
        this.right = right;
        this.start = start;
        this.close = close;
    }

    /**
     * Finds the independent equations.
     *
     * @param vectors the vectors
     * @param p a distribution over them
     * @param close what counts as zero
     */
    static MixturePolytope of(double[][] vectors, double[] p, double close) {
        int k = p.length;
        int m = vectors[0].length + 1;
        double[][] a = new double[m][k];
        for (int x = 0; x < k; x++) {
            for (int i = 0; i + 1 < m; i++) {
                a[i][x] = vectors[x][i];
            }
            a[m - 1][x] = 1;
        }
        int rank = 0;
        boolean[] used = new boolean[k];
        for (; rank < Math.min(m, k); rank++) {
            int row = rank;
            int column = 0;
            double most = 0;
            for (int i = rank; i < m; i++) {
                for (int x = 0; x < k; x++) {
                    if (!used[x] && Math.abs(a[i][x]) > most) {
                        most = Math.abs(a[i][x]);
                        row = i;
                        column = x;
                    }
                }
            }
            if (!(most > close)) {
                break;
            }
            double[] swap = a[row];
            a[row] = a[rank];
            a[rank] = swap;
            used[column] = true;
            eliminate(a, rank, column);
        }
        double[][] rows = Arrays.copyOf(a, rank);
        double[] right = new double[rank];
        for (int i = 0; i < rank; i++) {
            for (int x = 0; x < k; x++) {
                right[i] += rows[i][x] * p[x];
            }
        }
        return new MixturePolytope(rows, right, p, close);
    }

    private static void eliminate(double[][] a, int row, int column) {
        double pivot = a[row][column];
        for (int x = 0; x < a[row].length; x++) {
            a[row][x] /= pivot;
        }
        for (int i = 0; i < a.length; i++) {
            double f = a[i][column];
            if (i != row && f != 0) {
                for (int x = 0; x < a[i].length; x++) {
                    a[i][x] -= f * a[row][x];
                }
                a[i][column] = 0;
            }
        }
    }

    /**
     * Minimises a linear function.
     *
     * @param cost its value at each vector
     * @return the least value, at most that of the given distribution
     */
    double least(double[] cost) {
        int k = start.length;
        int r = rows.length;
        double given = 0;
        for (int x = 0; x < k; x++) {
            given += cost[x] * start[x];
        }
        // columns: vectors, one artificial variable for each equation, the right-hand side; last row: reduced costs
        double[][] t = new double[r + 1][k + r + 1];
        int[] basis = new int[r];
        for (int i = 0; i < r; i++) {
            double sign = right[i] < 0 ? -1 : 1;
            for (int x = 0; x < k; x++) {
                t[i][x] = sign * rows[i][x];
                t[r][x] -= t[i][x];
            }
            t[i][k + i] = 1;
            t[i][k + r] = sign * right[i];
            t[r][k + r] -= t[i][k + r];
            basis[i] = k + i;
        }
        run(t, basis, k);
        if (t[r][k + r] < -close) {
            return given;
        }
        leaveArtificial(t, basis, k);
        Arrays.fill(t[r], 0);
        System.arraycopy(cost, 0, t[r], 0, k);
        for (int i = 0; i < r; i++) {
            if (basis[i] < k) {
                double c = t[r][basis[i]];
                for (int x = 0; x <= k + r; x++) {
                    t[r][x] -= c * t[i][x];
                }
            }
        }
        run(t, basis, k);
        return Math.min(given, -t[r][k + r]);
    }

    /** Pivots until no reduced cost of a vector is negative; the first that is enters, the first of the tightest rows leaves. */
    private void run(double[][] t, int[] basis, int k) {
        int r = basis.length;
        int last = t[0].length - 1;
        for (int pivot = 0; pivot < MOST_PIVOTS; pivot++) {
            int column = 0;
            while (column < k && !(t[r][column] < -1e-12)) {
                column++;
            }
            if (column == k) {
                return;
            }
            int row = -1;
            for (int i = 0; i < r; i++) {
                if (t[i][column] > close) {
                    double ratio = t[i][last] / t[i][column];
                    double best = row < 0 ? Double.POSITIVE_INFINITY : t[row][last] / t[row][column];
                    if (ratio < best || (ratio == best && basis[i] < basis[row])) {
                        row = i;
                    }
                }
            }
            if (row < 0) {
                return;
            }
            eliminate(t, row, column);
            basis[row] = column;
        }
    }

    /** Artificial variables that are zero in the basis are exchanged for vectors, where one can take their place. */
    private void leaveArtificial(double[][] t, int[] basis, int k) {
        for (int i = 0; i < basis.length; i++) {
            for (int x = 0; basis[i] >= k && x < k; x++) {
                if (Math.abs(t[i][x]) > close) {
                    eliminate(t, i, x);
                    basis[i] = x;
                }
            }
        }
    }
}
