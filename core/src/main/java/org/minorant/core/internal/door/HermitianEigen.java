package org.minorant.core.internal.door;

import org.minorant.core.internal.kernel.HermitianSolver;

/**
 * Eigenvalues and orthonormal eigenvectors of a Hermitian matrix, in double, not certified ({@link EigenResidual} does that).
 *
 * <p>The matrix is scaled to order one by a power of two first, so that neither tiny nor huge entries meet underflow or overflow. Values
 * come in ascending order, column j of the vectors belongs to value j. One thread, no random choices: same input, same bits.
 *
 * <p><b>Why not the linear-algebra dependency.</b> Its complex type works on boxed numbers (17 to 35 times slower than LAPACK), its real one
 * takes longer and more memory than ours on the tridiagonal matrix alone, and it starts threads of its own; see DEVELOPERS.md for the numbers.
 */
public final class HermitianEigen {

    private static final double[][] NONE = new double[0][];

    private final int n;
    private final double[] values;
    private final double[][] re;
    private final double[][] im;

    private HermitianEigen(double[] values, double[][] re, double[][] im) {
        this.n = values.length;
        this.values = values;
        this.re = re;
        this.im = im;
    }

    /**
     * Decomposes a Hermitian matrix.
     *
     * @param n the dimension
     * @param are real parts, row-major, symmetric, finite
     * @param aim imaginary parts, row-major, antisymmetric, finite; empty for a real matrix
     * @return the decomposition
     * @throws IllegalArgumentException if an entry is not finite or the arrays do not hold n² entries
     * @throws ArithmeticException if the iteration does not converge
     */
    public static HermitianEigen of(int n, double[] are, double[] aim) {
        Scale s = Scale.of(n, are, aim);
        HermitianSolver h = HermitianSolver.vectors(s.rows(are), aim.length == 0 ? NONE : s.rows(aim));
        return new HermitianEigen(s.unscale(h.values()), h.re(), h.im());
    }

    /**
     * Finds the eigenvalues only, in about a third of the time.
     *
     * @param n the dimension
     * @param are real parts, row-major, symmetric, finite
     * @param aim imaginary parts, row-major, antisymmetric, finite; empty for a real matrix
     * @return the eigenvalues, ascending
     * @throws IllegalArgumentException if an entry is not finite or the arrays do not hold n² entries
     * @throws ArithmeticException if the iteration does not converge
     */
    public static double[] valuesOf(int n, double[] are, double[] aim) {
        Scale s = Scale.of(n, are, aim);
        return s.unscale(HermitianSolver.values(s.rows(are), aim.length == 0 ? NONE : s.rows(aim)));
    }

    /** The dimension. */
    public int dimension() {
        return n;
    }

    /** Eigenvalues, ascending; owned by the caller from here on. */
    public double[] values() {
        return values;
    }

    /** Real parts of the eigenvectors, row-major, one column each: a fresh copy. */
    public double[] vectorsRe() {
        return flat(re);
    }

    /** Imaginary parts of the eigenvectors, row-major, one column each: a fresh copy, all zero for a real matrix. */
    public double[] vectorsIm() {
        return flat(im);
    }

    private double[] flat(double[][] rows) {
        double[] f = new double[n * n];
        for (int i = 0; i < rows.length; i++) {
            System.arraycopy(rows[i], 0, f, i * n, n);
        }
        return f;
    }

    /** Real parts of the eigenvectors by rows, not copied. */
    double[][] rowsRe() {
        return re;
    }

    /** Imaginary parts of the eigenvectors by rows, not copied; no rows for a real matrix. */
    double[][] rowsIm() {
        return im;
    }
}
