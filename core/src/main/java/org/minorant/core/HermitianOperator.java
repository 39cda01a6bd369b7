package org.minorant.core;

import org.minorant.core.internal.door.HermitianEigen;
import org.minorant.core.internal.message.Checks;

/**
 * A Hermitian operator: equal to its adjoint, exactly, so that its eigenvalues are real by type.
 *
 * <p>Accuracy, range of entries and thread safety are those of {@link Operator}. For certified eigenvalues see {@link
 * EnclosedSpectrum}.
 */
public sealed class HermitianOperator extends Operator permits PositiveOperator {

    /** Takes over validated arrays. */
    HermitianOperator(int n, double[] re, double[] im) {
        super(n, n, re, im);
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
        return new HermitianOperator(a.rows(), a.realParts(), a.imaginaryParts());
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
        return new HermitianOperator(rows(), s.realParts(), s.imaginaryParts());
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
        return new HermitianOperator(rows(), s.realParts(), s.imaginaryParts());
    }

    @Override
    public HermitianOperator times(double factor) {
        Operator s = super.times(factor);
        return new HermitianOperator(rows(), s.realParts(), s.imaginaryParts());
    }

    @Override
    public final HermitianOperator adjoint() {
        return this;
    }

    /**
     * Returns the eigenvalues in ascending order, to double accuracy: within about n · 2^-50 · ‖A‖, not certified.
     *
     * @return n eigenvalues
     */
    public final double[] eigenvalues() {
        return HermitianEigen.valuesOf(rows(), realParts(), imaginaryParts());
    }
}
