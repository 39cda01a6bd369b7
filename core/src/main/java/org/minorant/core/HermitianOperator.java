package org.minorant.core;

import java.util.List;
import java.util.function.DoubleUnaryOperator;
import org.minorant.core.internal.door.HermitianEigen;
import org.minorant.core.internal.message.Checks;

/**
 * A Hermitian operator: equal to its adjoint, exactly, so that its eigenvalues are real by type.
 *
 * <p>Accuracy, range of entries and thread safety are those of {@link Operator}. Functions of the operator are made in double, from {@link
 * SpectralDecomposition}; for certified eigenvalues see {@link EnclosedSpectrum}. Whatever returns a HermitianOperator works on the entries, which
 * for a {@link PositiveOperator} may be a rounded copy of the operator meant.
 */
public sealed class HermitianOperator extends Operator permits PositiveOperator {

    /** Takes over validated arrays. */
    HermitianOperator(int n, double[] re, double[] im) {
        super(n, n, re, im);
    }

    /** Takes over an operator that is Hermitian exactly: by construction, or because that was checked. */
    HermitianOperator(Operator hermitian) {
        super(hermitian);
    }

    /**
     * Returns the Hermitian operator with these entries.
     *
     * @param re real parts, n × n, symmetric
     * @param im imaginary parts, n × n, antisymmetric
     * @return the operator
     * @throws InvalidInputException if the shape is wrong, an entry is not finite, or the matrix is not exactly Hermitian
     */
    public static HermitianOperator of(double[][] re, double[][] im) {
        return of(Operator.of(re, im));
    }

    /**
     * Returns the real symmetric operator with these entries.
     *
     * @param re entries, n × n, symmetric
     * @return the operator
     * @throws InvalidInputException if the shape is wrong, an entry is not finite, or the matrix is not exactly symmetric
     */
    public static HermitianOperator ofReal(double[][] re) {
        return of(Operator.ofReal(re));
    }

    /**
     * Returns an operator as a Hermitian one.
     *
     * @param a a square operator that equals its adjoint, exactly
     * @return the same entries
     * @throws InvalidInputException if it is not square or not exactly Hermitian
     */
    public static HermitianOperator of(Operator a) {
        if (a instanceof HermitianOperator h) {
            return h;
        }
        requireHermitian("HermitianOperator.of", a);
        return new HermitianOperator(a);
    }

    /** Refuses what is not exactly Hermitian, naming the worst pair of entries. */
    static void requireHermitian(String asked, Operator a) {
        Checks.square(asked, a);
        double worst = 0;
        String where = "";
        for (int i = 0; i < a.rows(); i++) {
            for (int j = 0; j <= i; j++) {
                double d = Math.max(Math.abs(a.re(i, j) - a.re(j, i)), Math.abs(a.im(i, j) + a.im(j, i)));
                if (d > worst) {
                    worst = d;
                    where = "entries (" + i + ", " + j + ") and (" + j + ", " + i + ")";
                }
            }
        }
        if (worst > 0) {
            throw new InvalidInputException(
                    asked,
                    "the operator is not Hermitian, " + where + " differ from conjugates by " + worst,
                    "conjugates exactly",
                    "use HermitianOperator.nearest, or DensityOperator.nearest, which say by how much they repair");
        }
    }

    /**
     * Returns the diagonal operator with these eigenvalues.
     *
     * @param diagonal the diagonal, at least one entry
     * @return the operator
     * @throws InvalidInputException if the array is empty or an entry is not finite
     */
    public static HermitianOperator diagonal(double... diagonal) {
        int n = diagonal.length;
        Checks.dimensions("HermitianOperator.diagonal", n, n);
        Checks.finite("HermitianOperator.diagonal", diagonal);
        double[] re = new double[n * n];
        for (int i = 0; i < n; i++) {
            re[i * n + i] = diagonal[i];
        }
        return new HermitianOperator(n, re, new double[0]);
    }

    /**
     * Returns the identity.
     *
     * @param n the dimension, at least 1
     * @return the identity on n dimensions
     * @throws InvalidInputException if n is below 1 or too large for memory
     */
    public static HermitianOperator identity(int n) {
        Checks.dimensions("HermitianOperator.identity", n, n);
        double[] d = new double[n];
        java.util.Arrays.fill(d, 1);
        return diagonal(d);
    }

    /**
     * Returns the dimension.
     *
     * @return the number of rows, which is the number of columns
     */
    public final int dimension() {
        return rows();
    }

    /**
     * Returns the sum of two Hermitian operators, which is Hermitian.
     *
     * @param other an operator of the same dimension
     * @return this + other
     * @throws InvalidInputException if the dimensions differ or an entry overflows
     */
    public final HermitianOperator plus(HermitianOperator other) {
        Operator s = combine("HermitianOperator.plus", other, 1);
        return new HermitianOperator(s);
    }

    /**
     * Returns the difference of two Hermitian operators, which is Hermitian.
     *
     * @param other an operator of the same dimension
     * @return this − other
     * @throws InvalidInputException if the dimensions differ or an entry overflows
     */
    public final HermitianOperator minus(HermitianOperator other) {
        Operator s = combine("HermitianOperator.minus", other, -1);
        return new HermitianOperator(s);
    }

    /**
     * Returns the product with a real number. A {@link PositiveOperator} refuses negative ones, because its result is positive by type: use {@link
     * #negate()}.
     *
     * @param factor the number
     * @return factor · this
     * @throws InvalidInputException if the factor is not finite or an entry overflows
     */
    @Override
    public HermitianOperator times(double factor) {
        Operator s = super.times(factor);
        return new HermitianOperator(s);
    }

    @Override
    public final HermitianOperator negate() {
        return new HermitianOperator(super.negate());
    }

    @Override
    public final HermitianOperator adjoint() {
        return this;
    }

    @Override
    public HermitianOperator conjugate() {
        return new HermitianOperator(super.conjugate());
    }

    @Override
    public HermitianOperator transpose() {
        return conjugate();
    }

    /**
     * Returns the Kronecker product of two Hermitian operators, which is Hermitian.
     *
     * @param other the right factor; its indices run fastest
     * @return this ⊗ other
     * @throws InvalidInputException as {@link Operator#tensor}
     */
    public final HermitianOperator tensor(HermitianOperator other) {
        return new HermitianOperator(TensorProducts.tensor("HermitianOperator.tensor", this, other));
    }

    /**
     * Returns the direct sum of two Hermitian operators, which is Hermitian.
     *
     * @param other the lower right block
     * @return this ⊕ other
     * @throws InvalidInputException as {@link Operator#directSum}
     */
    public final HermitianOperator directSum(HermitianOperator other) {
        return new HermitianOperator(TensorProducts.directSum("HermitianOperator.directSum", this, other));
    }

    /**
     * Returns V A V* for a matrix V, unitary or not.
     *
     * @param v a matrix with as many columns as this has dimensions
     * @return V A V*, of dimension v.rows(); each entry within (2n+6) · 2^-51 · (|V||A||V*|) of the exact one
     * @throws InvalidInputException if the shape does not fit or an entry overflows
     */
    public HermitianOperator conjugatedBy(Operator v) {
        return KrausSum.apply("HermitianOperator.conjugatedBy", List.of(v), this);
    }

    /**
     * Returns the nearest Hermitian operator, ½(A + A*), in every unitarily invariant norm.
     *
     * @param a a square operator
     * @return the Hermitian part, rounded once, with its distance
     * @throws InvalidInputException if the operator is not square
     */
    public static Repaired<? extends HermitianOperator> nearest(Operator a) {
        return Repairs.hermitian(a);
    }

    /**
     * Returns the spectral decomposition in double, from which functions of the operator are made; ask once if several are wanted.
     *
     * @return eigenvalues and vectors
     */
    public final SpectralDecomposition spectralDecomposition() {
        return SpectralDecomposition.of(this);
    }

    /**
     * Returns the eigenvalues in ascending order, to double accuracy: within about n · 2^-50 · ‖A‖, not certified.
     *
     * @return n eigenvalues
     */
    public final double[] eigenvalues() {
        return Positivity.isDiagonal(this)
                ? spectralDecomposition().eigenvalues()
                : HermitianEigen.valuesOf(rows(), realParts(), imaginaryParts());
    }

    /**
     * Returns f(A) = Σ f(λ_j) v_j v_j*, with the accuracy of {@link SpectralDecomposition}, as have all functions here.
     *
     * @param f a function that is finite at every eigenvalue
     * @return f(A)
     * @throws InvalidInputException if a value of the function is NaN or infinite
     */
    public final HermitianOperator apply(DoubleUnaryOperator f) {
        return spectralDecomposition().apply(f);
    }

    /**
     * Returns e^A.
     *
     * @return the exponential, a positive operator given by its factor
     * @throws InvalidInputException if an eigenvalue is so large that its exponential overflows
     */
    public final PositiveOperator exponential() {
        return spectralDecomposition().positive("HermitianOperator.exponential", Math::exp, -1);
    }

    /**
     * Returns |A| = √A².
     *
     * @return the absolute value, A₊ + A₋, a positive operator given by its factor
     */
    public final PositiveOperator absoluteValue() {
        return spectralDecomposition().applyPositive(Math::abs, Tolerance.NONE);
    }

    /**
     * Returns the positive part A₊ of A = A₊ − A₋.
     *
     * @return Σ max(λ_j, 0) v_j v_j*, a positive operator given by its factor
     */
    public final PositiveOperator positivePart() {
        return spectralDecomposition().applyPositive(x -> Math.max(x, 0), Tolerance.NONE);
    }

    /**
     * Returns the negative part A₋ of A = A₊ − A₋.
     *
     * @return Σ max(−λ_j, 0) v_j v_j*, a positive operator given by its factor
     */
    public final PositiveOperator negativePart() {
        return spectralDecomposition().applyPositive(x -> Math.max(-x, 0), Tolerance.NONE);
    }

    /**
     * Returns the sign: +1 and −1 on the spans of positive and negative eigenvalues, 0 on the kernel.
     *
     * @param tolerance decides which eigenvalues count as zero
     * @return Σ sign(λ_j) v_j v_j*
     */
    public final HermitianOperator sign(Tolerance tolerance) {
        return spectralDecomposition().applyOnSupport(Math::signum, tolerance);
    }

    /**
     * Returns the numerical rank.
     *
     * @param tolerance decides which eigenvalues count as zero
     * @return how many do not
     */
    public final int rank(Tolerance tolerance) {
        return spectralDecomposition().rank(tolerance);
    }

    /**
     * Returns the projector onto the support.
     *
     * @param tolerance decides which eigenvalues count as zero
     * @return the projector onto the span of the others' vectors
     */
    public final PositiveOperator supportProjector(Tolerance tolerance) {
        return spectralDecomposition().supportProjector(tolerance);
    }

    /**
     * Returns the projector onto the kernel.
     *
     * @param tolerance decides which eigenvalues count as zero
     * @return the projector onto the span of their vectors
     */
    public final PositiveOperator kernelProjector(Tolerance tolerance) {
        return spectralDecomposition().kernelProjector(tolerance);
    }

    /**
     * Returns the inverse on the support, zero on the kernel: the Moore–Penrose inverse.
     *
     * @param tolerance decides which eigenvalues count as zero
     * @return Σ λ_j⁻¹ v_j v_j* over the eigenvalues that do not
     * @throws InvalidInputException if an inverse overflows
     */
    public HermitianOperator inverse(Tolerance tolerance) {
        return spectralDecomposition().applyOnSupport(x -> 1 / x, tolerance);
    }

    /**
     * Returns the noncommutative minimum A ∧ B = ½(A + B − |A − B|) = A − (A − B)₊, the Hermitian operator of largest trace below both (Holevo 1973,
     * Helstrom 1976; from memory).
     *
     * <p>Accuracy: about n · 2^-49 · (‖A‖ + ‖B‖), not certified; it lies below A and B up to that. The certified trace of it is what {@link
     * org.minorant.core.pair.PositivePair} is for.
     *
     * @param other an operator on the same space
     * @return A ∧ B
     * @throws InvalidInputException if the dimensions differ or an entry overflows
     */
    public final HermitianOperator minimum(HermitianOperator other) {
        Checks.equalShapes("HermitianOperator.minimum", this, other);
        HermitianOperator excess = minus(other).positivePart();
        return minus(excess);
    }
}
