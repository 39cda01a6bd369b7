package org.minorant.core;

/**
 * A positive operator written as a sum of squares: columns X (dimension × rank) with
 *
 * <pre>(1 − η) XX* − N₁ ≤ A ≤ (1 + η) XX* + N₂,   N₁, N₂ ≥ 0,  Tr N₁, Tr N₂ ≤ ν</pre>
 *
 * in the Loewner order. η is the relative error and ν the trace error; columns are exact numbers of about 32 digits.
 *
 * <p><b>Why.</b> Any quantity that is monotone and homogeneous in A, such as Tr[A ∧ B], inherits η as a relative error: it keeps
 * its digits however small it is. ν is an absolute error, and is zero where the operator's own data fix its small
 * eigenvalues (kets, factors, diagonal and well-conditioned positive matrices).
 *
 * @param columns X, with radius zero
 * @param relativeError η, at least 0 and below 1
 * @param traceError ν, at least 0
 */
public record PositiveFactor(EnclosedMatrix columns, double relativeError, double traceError) {

    /**
     * Validates the errors.
     *
     * @param columns X, with radius zero
     * @param relativeError η, at least 0 and below 1
     * @param traceError ν, at least 0
     * @throws InvalidInputException if an error is negative, NaN or, for the relative one, not below 1, or a column has a radius
     */
    public PositiveFactor {
        if (!(relativeError >= 0 && relativeError < 1 && traceError >= 0)) {
            throw new InvalidInputException(
                    "PositiveFactor",
                    "the errors are " + relativeError + " and " + traceError,
                    "0 <= relative < 1 and 0 <= trace",
                    "check the derivation of the factor");
        }
        for (int i = 0; i < columns.rows(); i++) {
            for (int j = 0; j < columns.columns(); j++) {
                if (columns.radius(i, j) != 0) {
                    throw new InvalidInputException(
                            "PositiveFactor",
                            "entry (" + i + ", " + j + ") has the radius " + columns.radius(i, j),
                            "columns of exact numbers",
                            "use PositiveFactor.ofEnclosed, which turns radii into errors of the factor");
                }
            }
        }
    }

    /**
     * Returns a factor whose true columns are known up to radii: a relative error only where the columns span the space and are well conditioned after
     * scaling of rows, otherwise a relative error of 2^-60 and a trace error of about 2^60 times the squared radii.
     *
     * @param columns an enclosure of X
     * @return the factor with the midpoints as columns
     */
    public static PositiveFactor ofEnclosed(EnclosedMatrix columns) {
        return FactorRounding.ofRadii(columns);
    }

    /**
     * Returns the dimension of the space.
     *
     * @return the number of rows of X
     */
    public int dimension() {
        return columns.rows();
    }

    /**
     * Returns the number of columns, an upper bound on the rank up to the trace error.
     *
     * @return the number of columns of X
     */
    public int rank() {
        return columns.columns();
    }

    /**
     * Returns a factor of the same operator with at most as many columns as dimensions, by Cholesky factorisation of XX* in double-double; this factor itself if it
     * has no more columns already, or if XX* is too ill-conditioned to keep its relative accuracy.
     *
     * @return a factor that is not wider than it is high, where that costs no accuracy worth having
     */
    public PositiveFactor reduced() {
        return rank() <= dimension() ? this : FactorOfEntries.reduced(this);
    }

    /**
     * Returns the trace of the operator.
     *
     * @return Tr XX* = Σ|x|², of relative width about 2^-52, widened by η and ν
     */
    public Enclosure trace() {
        return FactorTrace.of(this);
    }
}
