package org.minorant.core;

import java.util.List;
import java.util.OptionalInt;
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

    /** Takes over validated arrays of entries that define the operator. */
    PositiveOperator(int n, double[] re, double[] im, double entryDefect) {
        super(n, re, im);
        this.entryDefect = entryDefect;
        this.factor = FactorSource.later(() -> FactorOfEntries.of(this));
        this.definedByFactor = false;
    }

    /** Takes over validated arrays that are a rounded copy of what the factor describes. */
    PositiveOperator(int n, double[] re, double[] im, double entryDefect, FactorSource factor) {
        super(n, re, im);
        this.entryDefect = entryDefect;
        this.factor = factor;
        this.definedByFactor = true;
    }

    /** Copies another operator's data. */
    PositiveOperator(PositiveOperator other) {
        super(other.rows(), other.realParts(), other.imaginaryParts());
        this.entryDefect = other.entryDefect;
        this.factor = other.factor;
        this.definedByFactor = other.definedByFactor;
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
        return new PositiveOperator(a.rows(), a.realParts(), a.imaginaryParts(), defect);
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
        EnclosedMatrix x = factor.columns();
        EnclosedMatrix a = x.times(x.adjoint());
        int n = x.rows();
        double[] re = new double[n * n];
        double[] im = a.isReal() ? new double[0] : new double[n * n];
        double rounding = 0;
        double trace = 0;
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                // the upper triangle is copied from the lower, so that the entries are Hermitian exactly
                int p = Math.max(i, j);
                int q = Math.min(i, j);
                re[i * n + j] = a.re(p, q);
                if (im.length != 0 && i != j) {
                    im[i * n + j] = i > j ? a.im(p, q) : -a.im(p, q);
                }
                rounding = Math.max(rounding, a.radius(p, q) + 0x1p-52 * a.modulusUpper(p, q));
            }
            trace += a.re(i, i);
        }
        // trace norm ≤ √n · Frobenius norm ≤ n√n · largest entry. From −(ηXX* + N₁) ≤ A − XX* ≤ ηXX* + N₂ the trace
        // norm of the
        // difference is at most η Tr XX* + Tr N₁ + Tr N₂
        double defect = (n * Math.sqrt(n) * rounding + factor.relativeError() * trace + 2 * factor.traceError())
                * (1 + 0x1p-40);
        Checks.finite("PositiveOperator.ofFactor", re);
        Checks.finite("PositiveOperator.ofFactor", im);
        return new PositiveOperator(n, re, im, defect, FactorSource.of(factor));
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
        return new PositiveOperator(diagonal.length, d.realParts(), d.imaginaryParts(), 0);
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
     * is the rounded root (nothing for powers of four), and nothing to the trace error; columns of 32 digits add 2^-52 and, to the
     * trace error, about 2^-147 of the trace. It is worked out when first asked for.
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
     * @return the factor; worked out at the first call unless {@link #hasFactorAtHand()}
     */
    public final PositiveFactor factor() {
        return factor.get();
    }

    /**
     * Tells whether {@link #factor()} is known already, so that asking for it costs nothing.
     *
     * @return whether the factor was given, or has been worked out before
     */
    public final boolean hasFactorAtHand() {
        return factor.isAtHand();
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
     * @return Tr A
     */
    public final Enclosure traceEnclosure() {
        Enclosure s = Enclosure.ZERO;
        for (int i = 0; i < rows(); i++) {
            s = s.plus(Enclosure.exact(re(i, i)));
        }
        return s.widen(entryDefect).max(Enclosure.ZERO);
    }
}
