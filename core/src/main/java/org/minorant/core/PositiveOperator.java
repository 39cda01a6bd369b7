package org.minorant.core;

import java.util.List;
import java.util.OptionalInt;
import java.util.function.DoubleUnaryOperator;
import org.minorant.core.internal.message.Checks;

/**
 * A positive semidefinite operator: ⟨v, Av⟩ ≥ 0 for every v.
 *
 * <p><b>Which operator is meant.</b> If it was given by entries, the positive part of the matrix of these entries: rounding makes
 * eigenvalues such as −1e-17 unavoidable, and they are cut off ({@link #entryDefect()} bounds by how much). If it was given by a
 * factor or a ket, XX* of exactly these numbers, of which the entries are a rounded copy. If it was computed from other positive operators
 * (a multiple, a sum, a mixture, …), exactly that function of the operators meant, of which the entries are again a rounded copy.
 *
 * <p>{@link #factor()} carries what is needed for relative accuracy. Immutable and thread-safe.
 */
public sealed class PositiveOperator extends HermitianOperator permits DensityOperator {

    private final double entryDefect;
    private final boolean definedByFactor;
    private final FactorSource factor;

    /** Takes over checked entries, which define the operator. */
    PositiveOperator(Operator entries, double entryDefect) {
        super(entries);
        this.entryDefect = entryDefect;
        this.factor = FactorSource.later(() -> FactorOfEntries.of(this));
        this.definedByFactor = false;
    }

    /** Takes over entries that are a rounded copy of what the factor describes. */
    PositiveOperator(Operator entries, double entryDefect, FactorSource factor) {
        this(entries, entryDefect, factor, true);
    }

    /** Takes over entries; if they define the operator, the factor is a shortcut to its own. */
    PositiveOperator(Operator entries, double entryDefect, FactorSource factor, boolean definedByFactor) {
        super(entries);
        this.entryDefect = entryDefect;
        this.factor = factor;
        this.definedByFactor = definedByFactor;
    }

    /** Shares another operator's data. */
    PositiveOperator(PositiveOperator other) {
        this(other, other.entryDefect, other.factor, other.definedByFactor);
    }

    /**
     * Returns the positive operator with these entries.
     *
     * @param re real parts, n × n, symmetric
     * @param im imaginary parts, n × n, antisymmetric
     * @return the operator
     * @throws InvalidInputException if the shape is wrong, an entry is not finite, the matrix is not exactly Hermitian, or it has an
     *     eigenvalue below −n · 2^-48 · ‖A‖, which rounding does not explain
     */
    public static PositiveOperator of(double[][] re, double[][] im) {
        return of(Operator.of(re, im));
    }

    /**
     * Returns an operator as a positive one.
     *
     * @param a an exactly Hermitian operator
     * @return the same entries
     * @throws InvalidInputException if it is not square, not exactly Hermitian, or has an eigenvalue below −n · 2^-48 · ‖A‖
     */
    public static PositiveOperator of(Operator a) {
        if (a instanceof PositiveOperator p) {
            return p;
        }
        requireHermitian("PositiveOperator.of", a);
        return ofEntries("PositiveOperator.of", a);
    }

    /** Checks positivity of a Hermitian operator; the entries define the result. */
    static PositiveOperator ofEntries(String asked, Operator a) {
        double defect = Positivity.negativeTrace(asked, a);
        return new PositiveOperator(a, defect);
    }

    /**
     * Returns XX* for a factor of exact numbers.
     *
     * @param columns X, dimension × rank
     * @return the positive operator XX*, exactly that of the factor
     */
    public static PositiveOperator ofFactor(Operator columns) {
        return ofFactor(new PositiveFactor(EnclosedMatrix.of(columns), 0, 0));
    }

    /**
     * Returns the positive operator of a factor whose errors are known.
     *
     * @param factor the factor with its errors
     * @return the positive operator it describes
     */
    public static PositiveOperator ofFactor(PositiveFactor factor) {
        FactorSource source = FactorSource.of(factor);
        MeantOperator meant = MeantOperator.byFactor(factor);
        RoundedCopy copy = RoundedCopy.of("PositiveOperator.ofFactor", meant.matrix());
        double defect = (copy.traceNormError() + meant.traceNormError()) * (1 + 0x1p-50);
        return new PositiveOperator(copy.operator(), defect, source);
    }

    /**
     * Returns the diagonal operator with these eigenvalues; small ones keep their digits.
     *
     * @param diagonal eigenvalues, each at least 0
     * @return the operator
     * @throws InvalidInputException if an entry is negative, NaN or infinite, or there is none
     */
    public static PositiveOperator ofEigenvalues(double... diagonal) {
        HermitianOperator d = HermitianOperator.diagonal(diagonal);
        for (int i = 0; i < diagonal.length; i++) {
            Checks.inRange("PositiveOperator.ofEigenvalues", "eigenvalue " + i, diagonal[i], 0, Double.MAX_VALUE);
        }
        return new PositiveOperator(d, 0);
    }

    /**
     * Returns the product with a number; its factor is the scaled one, with the accuracy said at {@link #weightedSum}.
     *
     * @param weight the number, at least 0
     * @return weight · A
     * @throws InvalidInputException if the weight is negative or not finite, or an entry overflows
     */
    @Override
    public PositiveOperator times(double weight) {
        return weightedSum(List.of(this), weight);
    }

    /**
     * Returns the sum of two positive operators, which is positive; its factor is the columns of both.
     *
     * @param other an operator of the same dimension
     * @return A + B
     * @throws InvalidInputException if the dimensions differ or an entry overflows
     */
    public final PositiveOperator plus(PositiveOperator other) {
        return weightedSum(List.of(this, other), 1, 1);
    }

    /**
     * Returns Σ w_i A_i of the operators meant, exactly; the entries are a copy of it, rounded once.
     *
     * <p><b>Accuracy of the factor.</b> It is the columns of all summands side by side, times the roots of the weights, so that a sum of kets has as
     * many columns as kets and keeps relative accuracy: columns that are plain doubles (kets) add |w/s² − 1| ≤ 2^-51 to the relative error, where s
     * is the rounded root (nothing for powers of four), and nothing to the trace error; columns of 32 digits add 2^-60 and, to the
     * trace error, about 2^-139 of the trace. It is worked out when first asked for.
     *
     * @param operators operators of one dimension, at least one
     * @param weights as many numbers, each at least 0
     * @return the weighted sum
     * @throws InvalidInputException if the list is empty, the lengths or dimensions differ, a weight is negative or not finite, or an entry
     *     overflows
     */
    public static PositiveOperator weightedSum(List<? extends PositiveOperator> operators, double... weights) {
        return WeightedSum.of("PositiveOperator.weightedSum", operators, weights);
    }

    /**
     * Returns an upper end of the trace norm of (entries − the operator meant).
     *
     * @return what rounding of the entries, or cutting off their negative part, amounts to at most
     */
    public final double entryDefect() {
        return entryDefect;
    }

    /**
     * Returns the operator as a sum of squares, with its errors. For operators given by entries structure is found here:
     * diagonal matrices, positive definite ones (Cholesky in double-double), all others by their certified spectrum.
     *
     * @return the factor; worked out at the first call, and kept
     */
    public final PositiveFactor factor() {
        return factor.get();
    }

    /**
     * Returns the number of columns of {@link #factor()} if it is known without decomposing a matrix: the operator was given by a factor, or
     * computed from operators that all were. It depends on how the operator was made only, not on what was asked of it before.
     *
     * @return the number of columns, an upper bound on the rank; empty if finding it takes a decomposition
     */
    public final OptionalInt knownColumns() {
        return factor.columns();
    }

    /**
     * Returns the compression of an operator to some of the basis vectors: the principal submatrix. Its factor is the rows of the whole one's,
     * with the same relative error.
     *
     * @param a the operator
     * @param indices the basis vectors to keep, distinct, in the order wanted, at least one
     * @return the operator on the span of these vectors
     * @throws InvalidInputException if there is no index or one is out of range
     */
    public static PositiveOperator compression(PositiveOperator a, int... indices) {
        return Compression.of(a, indices);
    }

    /**
     * Tells whether something else than the entries defines the operator, so that its entries are a rounded copy: it was given by a factor, or
     * was computed from other positive operators.
     *
     * @return whether the factor, not the entries, says which operator is meant
     */
    public final boolean isDefinedByFactor() {
        return definedByFactor;
    }

    /**
     * Returns an enclosure of the trace of the operator meant.
     *
     * @return Tr A, from the factor where {@link #knownColumns()} tells that it is cheap, otherwise from the diagonal
     */
    public final Enclosure traceEnclosure() {
        if (knownColumns().isPresent()) {
            return factor().trace();
        }
        Enclosure s = Enclosure.ZERO;
        for (int i = 0; i < rows(); i++) {
            s = s.plus(Enclosure.exact(re(i, i)));
        }
        return s.widen(entryDefect).max(Enclosure.ZERO);
    }

    /**
     * Returns the Kronecker product of two positive operators, which is positive: that of the operators meant. Its factor is that of the factors; where the
     * products of their entries are exact, as for real kets of doubles, no error is added, otherwise 2^-60 relatively and about
     * 2^-138 of the trace.
     *
     * @param other the right factor; its indices run fastest
     * @return this ⊗ other
     * @throws InvalidInputException as {@link Operator#tensor}
     */
    public final PositiveOperator tensor(PositiveOperator other) {
        return PositiveCombinations.tensor(this, other);
    }

    /**
     * Returns the direct sum of two positive operators, which is positive; its factor is both factors as blocks, without further error.
     *
     * @param other the lower right block
     * @return this ⊕ other
     * @throws InvalidInputException as {@link Operator#directSum}
     */
    public final PositiveOperator directSum(PositiveOperator other) {
        return PositiveCombinations.directSum(this, other);
    }

    /**
     * Returns the complex conjugate, which for a Hermitian operator is the transpose; that of the operator meant.
     *
     * @return the conjugate, with the conjugate factor
     */
    @Override
    public PositiveOperator conjugate() {
        return PositiveCombinations.conjugate(this, super.conjugate());
    }

    @Override
    public PositiveOperator transpose() {
        return conjugate();
    }

    /**
     * Returns V A V* for a matrix V of exact numbers, unitary or not: of the operator meant. Its factor is VX; where every row of V has one entry at
     * most and products are exact no error is added, otherwise 2^-60 relatively and about 2^-138 of the trace.
     *
     * @param v a matrix with as many columns as this has dimensions
     * @return V A V*, of dimension v.rows()
     * @throws InvalidInputException if the shape does not fit or an entry overflows
     */
    @Override
    public final PositiveOperator conjugatedBy(Operator v) {
        return KrausSum.apply("PositiveOperator.conjugatedBy", List.of(v), this);
    }

    /**
     * Returns the nearest positive operator in Hilbert–Schmidt norm: the positive part of the Hermitian part.
     *
     * @param a a square operator
     * @return the positive operator, given by its factor, and what was repaired
     * @throws InvalidInputException if the operator is not square
     */
    public static Repaired<? extends PositiveOperator> nearest(Operator a) {
        return Repairs.positive(a);
    }

    /**
     * Returns the positive square root, with the accuracy of {@link SpectralDecomposition}: next to the kernel an error ε of an eigenvalue is one of √ε
     * in its root.
     *
     * @return √A, given by its factor
     */
    public final PositiveOperator squareRoot() {
        return power(0.5, Tolerance.NONE);
    }

    /**
     * Returns a real power on the support, zero on the kernel; the power 0 is the projector onto the support.
     *
     * @param exponent any finite number
     * @param tolerance decides which eigenvalues count as zero; negative ones of the entries always do
     * @return Σ λ_j^exponent v_j v_j* over the eigenvalues that do not, given by its factor
     * @throws InvalidInputException if the exponent is not finite or a power overflows
     */
    public final PositiveOperator power(double exponent, Tolerance tolerance) {
        Checks.inRange("PositiveOperator.power", "the exponent", exponent, -Double.MAX_VALUE, Double.MAX_VALUE);
        return onSupport("PositiveOperator.power", x -> Math.pow(x, exponent), tolerance);
    }

    @Override
    public final PositiveOperator inverse(Tolerance tolerance) {
        return onSupport("PositiveOperator.inverse", x -> 1 / x, tolerance);
    }

    /** A function that is positive on the positive axis, at the eigenvalues above the threshold. */
    private PositiveOperator onSupport(String asked, DoubleUnaryOperator f, Tolerance tolerance) {
        SpectralDecomposition s = spectralDecomposition();
        double t = tolerance.threshold(s.dimension(), s.norm());
        return s.positive(asked, x -> x > t ? f.applyAsDouble(x) : 0, t);
    }

    /**
     * Returns the natural logarithm on the support, zero on the kernel.
     *
     * @param tolerance decides which eigenvalues count as zero; negative ones of the entries always do
     * @return Σ ln λ_j v_j v_j* over the eigenvalues that do not
     */
    public final HermitianOperator logarithm(Tolerance tolerance) {
        return spectralDecomposition().applyOnSupport(x -> x > 0 ? Math.log(x) : 0, tolerance);
    }

    /**
     * Returns the noncommutative quotient B^(−½) A B^(−½) on the support of B, zero on its kernel.
     *
     * <p>Accuracy: about n · 2^-49 · κ · ‖A‖/‖B‖, not certified, with κ the ratio of the largest to the smallest eigenvalue of B that does not count as zero.
     *
     * @param divisor B, on the same space
     * @param tolerance decides which eigenvalues of B count as zero
     * @return the quotient, given by its factor
     * @throws InvalidInputException if the dimensions differ or an entry overflows
     */
    public final PositiveOperator quotient(PositiveOperator divisor, Tolerance tolerance) {
        Checks.equalShapes("PositiveOperator.quotient", this, divisor);
        return conjugatedBy(divisor.power(-0.5, tolerance));
    }

    /**
     * Returns the parallel sum A : B = (A⁻¹ + B⁻¹)⁻¹, for singular operators A − A(A+B)⁺A (Anderson and Duffin, J. Math. Anal. Appl. 26, 576, 1969; from
     * memory).
     *
     * <p>It is computed without cancellation as S^½ K(1 − K) S^½ on the support of S = A + B, with K = S^(−½) A S^(−½) and 1 − K = S^(−½) B S^(−½), both from
     * factors. Accuracy: about n · 2^-48 · ‖S‖ · √κ, not certified, with κ the ratio of the largest to the smallest eigenvalue of S that does not count as
     * zero.
     *
     * @param other B, on the same space
     * @param tolerance decides which eigenvalues of A + B count as zero
     * @return A : B, given by its factor
     * @throws InvalidInputException if the dimensions differ or an entry overflows
     */
    public final PositiveOperator parallelSum(PositiveOperator other, Tolerance tolerance) {
        Checks.equalShapes("PositiveOperator.parallelSum", this, other);
        return ParallelSum.of(this, other, tolerance);
    }
}
