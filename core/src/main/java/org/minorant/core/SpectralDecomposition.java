package org.minorant.core;

import java.util.Arrays;
import java.util.function.DoubleUnaryOperator;
import java.util.stream.IntStream;
import org.minorant.core.internal.door.HermitianEigen;
import org.minorant.core.internal.number.DoubleDouble;

/**
 * A Hermitian operator as A = Σ λ_j v_j v_j*, in double: eigenvalues, orthonormal eigenvectors, and functions f(A) = Σ f(λ_j) v_j v_j*.
 *
 * <p><b>Accuracy.</b> An estimate, not certified: eigenvalues are within about n · 2^-50 · ‖A‖, vectors orthonormal to the same relative accuracy, so
 * that small eigenvalues of a graded operator have few correct digits unless it is diagonal (those are exact). f(A) inherits that:
 * about n · 2^-50 · ‖A‖ · (largest slope of f between eigenvalues) + n · 2^-50 · max|f(λ)|. Certified values: {@link EnclosedSpectrum}.
 *
 * <p>For {@link PositiveOperator}s the decomposition is that of the entries. Immutable and thread-safe; one decomposition serves many functions.
 */
public final class SpectralDecomposition {

    private final double[] values;
    private final Operator vectors;
    /** For a diagonal operator, the position of the j-th smallest entry; empty otherwise. */
    private final int[] positions;

    private SpectralDecomposition(double[] values, Operator vectors, int[] positions) {
        this.values = values;
        this.vectors = vectors;
        this.positions = positions;
    }

    /**
     * Decomposes an operator.
     *
     * @param a the operator
     * @return its spectral decomposition
     */
    public static SpectralDecomposition of(HermitianOperator a) {
        int n = a.rows();
        if (Positivity.isDiagonal(a)) {
            return diagonal(a);
        }
        HermitianEigen e = HermitianEigen.of(n, a.realParts(), a.imaginaryParts());
        double[] im = a.isReal() ? new double[0] : e.vectorsIm();
        return new SpectralDecomposition(e.values(), new Operator(n, n, e.vectorsRe(), im), new int[0]);
    }

    private static SpectralDecomposition diagonal(HermitianOperator a) {
        int n = a.rows();
        int[] order = IntStream.range(0, n)
                .boxed()
                .sorted((i, j) -> Double.compare(a.re(i, i), a.re(j, j)))
                .mapToInt(Integer::intValue)
                .toArray();
        double[] v = new double[n * n];
        double[] values = new double[n];
        for (int j = 0; j < n; j++) {
            values[j] = a.re(order[j], order[j]);
            v[order[j] * n + j] = 1;
        }
        return new SpectralDecomposition(values, new Operator(n, n, v, new double[0]), order);
    }

    /**
     * Returns the dimension.
     *
     * @return the number of eigenvalues
     */
    public int dimension() {
        return values.length;
    }

    /**
     * Returns the eigenvalues.
     *
     * @return a copy, ascending
     */
    public double[] eigenvalues() {
        return values.clone();
    }

    /**
     * Returns the eigenvectors.
     *
     * @return the unitary whose j-th column belongs to the j-th smallest eigenvalue
     */
    public Operator vectors() {
        return vectors;
    }

    /**
     * Returns the operator norm.
     *
     * @return the largest modulus of an eigenvalue
     */
    public double norm() {
        return Math.max(Math.abs(values[0]), Math.abs(values[values.length - 1]));
    }

    /**
     * Returns the numerical rank.
     *
     * @param tolerance decides which eigenvalues count as zero
     * @return how many do not
     */
    public int rank(Tolerance tolerance) {
        double t = tolerance.threshold(values.length, norm());
        return (int) Arrays.stream(values).filter(v -> Math.abs(v) > t).count();
    }

    /**
     * Returns f(A).
     *
     * @param f a function that is finite at every eigenvalue
     * @return Σ f(λ_j) v_j v_j*
     * @throws InvalidInputException if a value of the function is NaN or infinite
     */
    public HermitianOperator apply(DoubleUnaryOperator f) {
        return assemble(values("SpectralDecomposition.apply", f, -1));
    }

    /**
     * Returns f(A) on the support: eigenvalues that count as zero give zero, and the function is not asked there.
     *
     * @param f a function that is finite at every other eigenvalue
     * @param tolerance decides which eigenvalues count as zero
     * @return Σ f(λ_j) v_j v_j* over the others
     * @throws InvalidInputException if a value of the function is NaN or infinite
     */
    public HermitianOperator applyOnSupport(DoubleUnaryOperator f, Tolerance tolerance) {
        return assemble(values("SpectralDecomposition.applyOnSupport", f, tolerance.threshold(values.length, norm())));
    }

    /**
     * Returns f(A) on the support for a function that is not negative there, as a positive operator given by its factor: the columns √f(λ_j) v_j.
     *
     * @param f a function that is finite and at least 0 at every eigenvalue that does not count as zero
     * @param tolerance decides which eigenvalues count as zero
     * @return Σ f(λ_j) v_j v_j* over the others
     * @throws InvalidInputException if a value of the function is negative, NaN or infinite
     */
    public PositiveOperator applyPositive(DoubleUnaryOperator f, Tolerance tolerance) {
        return positive("SpectralDecomposition.applyPositive", f, tolerance.threshold(values.length, norm()));
    }

    /**
     * Returns the projector onto the support.
     *
     * @param tolerance decides which eigenvalues count as zero
     * @return the sum of v_j v_j* over the eigenvalues that do not
     */
    public PositiveOperator supportProjector(Tolerance tolerance) {
        return applyPositive(x -> 1, tolerance);
    }

    /**
     * Returns the projector onto the kernel.
     *
     * @param tolerance decides which eigenvalues count as zero
     * @return the sum of v_j v_j* over the eigenvalues that do
     */
    public PositiveOperator kernelProjector(Tolerance tolerance) {
        double t = tolerance.threshold(values.length, norm());
        return positive("SpectralDecomposition.kernelProjector", x -> Math.abs(x) > t ? 0 : 1, -1);
    }

    /** Values of f at eigenvalues above the threshold in modulus, zero at the others; a negative threshold asks everywhere. */
    private double[] values(String asked, DoubleUnaryOperator f, double threshold) {
        double[] y = new double[values.length];
        for (int j = 0; j < y.length; j++) {
            if (Math.abs(values[j]) > threshold) {
                y[j] = f.applyAsDouble(values[j]);
                if (!Double.isFinite(y[j])) {
                    throw new InvalidInputException(
                            asked,
                            "the function is " + y[j] + " at the eigenvalue " + values[j],
                            "a finite number",
                            "restrict it to the support, or give a function that is finite there");
                }
            }
        }
        return y;
    }

    /** As {@link #applyPositive} with the threshold worked out. */
    PositiveOperator positive(String asked, DoubleUnaryOperator f, double threshold) {
        double[] y = values(asked, f, threshold);
        for (int j = 0; j < y.length; j++) {
            if (y[j] < 0) {
                throw new InvalidInputException(
                        asked,
                        "the function is " + y[j] + " at the eigenvalue " + values[j],
                        "at least 0",
                        "use apply, which returns a Hermitian operator");
            }
        }
        return positive(y);
    }

    /** Σ y_j v_j v_j* for numbers that are not negative; columns √y_j v_j, exact products of doubles. */
    PositiveOperator positive(double[] y) {
        int n = y.length;
        if (positions.length != 0) {
            double[] diagonal = new double[n];
            for (int j = 0; j < n; j++) {
                diagonal[positions[j]] = y[j];
            }
            return PositiveOperator.ofEigenvalues(diagonal);
        }
        int rank = (int) Arrays.stream(y).filter(v -> v > 0).count();
        EnclosedMatrix.Builder b = EnclosedMatrix.builder(n, Math.max(rank, 1));
        int c = 0;
        for (int j = 0; j < n; j++) {
            if (y[j] > 0) {
                double root = Math.sqrt(y[j]);
                for (int i = 0; i < n; i++) {
                    DoubleDouble re = DoubleDouble.product(root, vectors.re(i, j));
                    DoubleDouble im = DoubleDouble.product(root, vectors.im(i, j));
                    b.set(i, c, re.hi(), re.lo(), im.hi(), im.lo(), 0);
                }
                c++;
            }
        }
        return PositiveOperator.ofFactor(new PositiveFactor(b.build(), 0, 0));
    }

    private HermitianOperator assemble(double[] y) {
        if (positions.length != 0) {
            double[] diagonal = new double[y.length];
            for (int j = 0; j < y.length; j++) {
                diagonal[positions[j]] = y[j];
            }
            return HermitianOperator.diagonal(diagonal);
        }
        Operator scaled = vectors.times(HermitianOperator.diagonal(y));
        return HermitianPart.ofLowerTriangle(scaled.times(vectors.adjoint()));
    }
}
