package org.minorant.core.internal.kernel;

/**
 * Eigenvalues and orthonormal eigenvectors of a Hermitian matrix of order one, given by rows: Householder reduction to a real
 * tridiagonal matrix, implicit QL, back-transformation. One thread, no random choices: same input, same bits.
 *
 * <p><b>Accuracy.</b> Backward stable: residual and loss of orthogonality are about n · 2^-53 of the norm. Nothing here is certified.
 *
 * <p><b>Memory.</b> Beside the matrix (whose rows are overwritten) one array of n² for real vectors, two for complex ones.
 */
public final class HermitianSolver {

    private static final double[][] NONE = new double[0][];

    private final double[] values;
    private final double[][] re;
    private final double[][] im;

    private HermitianSolver(double[] values, double[][] re, double[][] im) {
        this.values = values;
        this.re = re;
        this.im = im;
    }

    /**
     * Decomposes a matrix.
     *
     * @param are real parts by rows, symmetric, the largest entry of order one; overwritten
     * @param aim imaginary parts by rows, antisymmetric; overwritten; no rows for a real matrix
     * @return values and vectors
     * @throws ArithmeticException if the iteration does not converge
     */
    public static HermitianSolver vectors(double[][] are, double[][] aim) {
        int n = are.length;
        HouseholderReduction h = HouseholderReduction.of(are, aim);
        double[][] z = new double[n][n];
        for (int i = 0; i < n; i++) {
            z[i][i] = 1;
        }
        double[] d = h.diagonal();
        TridiagonalQl.diagonalise(d, h.offDiagonal(), z);
        sort(d, z);
        transpose(z);
        double[][] y = aim.length == 0 ? NONE : new double[n][n];
        h.reflectors().applyTo(z, y);
        return new HermitianSolver(d, z, y);
    }

    /**
     * Finds the eigenvalues only; the arguments are those of {@link #vectors}.
     *
     * @param are real parts by rows; overwritten
     * @param aim imaginary parts by rows; overwritten; no rows for a real matrix
     * @return the eigenvalues, ascending
     * @throws ArithmeticException if the iteration does not converge
     */
    public static double[] values(double[][] are, double[][] aim) {
        HouseholderReduction h = HouseholderReduction.of(are, aim);
        double[] d = h.diagonal();
        TridiagonalQl.diagonalise(d, h.offDiagonal(), NONE);
        java.util.Arrays.sort(d);
        return d;
    }

    /** Sorts the values, and the rows of z with them; equal values stay in order, so that the result is unique. */
    private static void sort(double[] d, double[][] z) {
        int n = d.length;
        Integer[] order = new Integer[n];
        java.util.Arrays.setAll(order, i -> i);
        java.util.Arrays.sort(order, java.util.Comparator.comparingDouble(i -> d[i]));
        double[] values = d.clone();
        double[][] rows = z.clone();
        for (int i = 0; i < n; i++) {
            d[i] = values[order[i]];
            z[i] = rows[order[i]];
        }
    }

    private static void transpose(double[][] z) {
        for (int i = 0; i < z.length; i++) {
            for (int j = 0; j < i; j++) {
                double t = z[i][j];
                z[i][j] = z[j][i];
                z[j][i] = t;
            }
        }
    }

    /**
     * Returns the eigenvalues.
     *
     * @return ascending values, owned by the caller
     */
    public double[] values() {
        return values;
    }

    /**
     * Returns the real parts of the vectors.
     *
     * @return rows of the matrix of which column j belongs to value j, owned by the caller
     */
    public double[][] re() {
        return re;
    }

    /**
     * Returns the imaginary parts of the vectors.
     *
     * @return rows, or none for a real matrix
     */
    public double[][] im() {
        return im;
    }
}
