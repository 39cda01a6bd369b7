package org.minorant.core;

import org.minorant.core.internal.message.Checks;
import org.minorant.core.internal.number.DoubleDouble;

/**
 * A positive semidefinite operator: ⟨v, Av⟩ ≥ 0 for every v.
 *
 * <p><b>Which operator is meant.</b> If it was given by entries, the positive part of the matrix of these entries: rounding makes
 * eigenvalues such as −1e-17 unavoidable, and they are cut off ({@link #entryDefect()} bounds by how much). If it was given by a
 * factor or a ket, XX* of exactly these numbers, of which the entries are a rounded copy.
 *
 * <p>{@link #factor()} carries what is needed for relative accuracy. Immutable and thread-safe.
 */
public sealed class PositiveOperator extends HermitianOperator permits DensityOperator {

    private final double entryDefect;
    private final boolean definedByFactor;
    /** Computed when first asked for if the operator was given by entries; the same value whoever computes it. */
    private volatile PositiveFactor factor;

    /** Takes over validated arrays; a null factor means that the entries define the operator. */
    PositiveOperator(int n, double[] re, double[] im, double entryDefect, PositiveFactor factor) {
        super(n, re, im);
        this.entryDefect = entryDefect;
        this.factor = factor;
        this.definedByFactor = factor != null;
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
        return new PositiveOperator(a.rows(), a.realParts(), a.imaginaryParts(), defect, null);
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
        // trace norm ≤ √n · Frobenius norm ≤ n√n · largest entry
        double defect = n * Math.sqrt(n) * rounding * (1 + 0x1p-40)
                + factor.relativeError() * trace * (1 + 0x1p-40)
                + factor.traceError();
        return new PositiveOperator(n, re, im, defect, factor);
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
        return new PositiveOperator(diagonal.length, d.realParts(), d.imaginaryParts(), 0, null);
    }

    @Override
    public PositiveOperator times(double weight) {
        Checks.inRange("PositiveOperator.times", "the weight", weight, 0, Double.MAX_VALUE);
        Operator scaled = super.times(weight);
        double defect = (entryDefect * weight + weight * 0x1p-52 * trace().re() * rows()) * (1 + 0x1p-50);
        PositiveFactor f = factor();
        DoubleDouble root = DoubleDouble.of(weight).sqrt();
        EnclosedMatrix x =
                f.columns().times(root.hi()).plus(f.columns().times(root.lo())).midpoint();
        PositiveFactor g = new PositiveFactor(
                x, f.relativeError() + x.columns() * x.columns() * 0x1p-98, f.traceError() * weight * (1 + 0x1p-50));
        return new PositiveOperator(rows(), scaled.realParts(), scaled.imaginaryParts(), defect, g);
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
     * Returns the operator as a sum of squares, with its errors. Structure is found here: diagonal matrices, positive
     * definite ones (Cholesky in double-double), all others by their certified spectrum.
     *
     * @return the factor
     */
    public final PositiveFactor factor() {
        PositiveFactor f = factor;
        if (f == null) {
            f = FactorOfEntries.of(this);
            factor = f;
        }
        return f;
    }

    /**
     * Tells whether the operator was given by a factor, so that its entries are a rounded copy.
     *
     * @return whether a factor defines the operator
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
