package org.minorant.core;

import java.util.Arrays;
import org.minorant.core.internal.kernel.Products;
import org.minorant.core.internal.message.Checks;

/**
 * A dense complex matrix, rows × columns, immutable: a linear map between two finite-dimensional spaces with chosen
 * bases.
 *
 * <p><b>Accuracy.</b> Entries are doubles. Sums round once per entry; a product's entry is within
 * (n+2)·2^-52·Σ|a||b| of the exact one. Where a certified result is wanted, see {@link EnclosedMatrix}.
 *
 * <p><b>Entries</b> are finite by construction. An operator whose imaginary parts are all zero is held as a real matrix, and
 * costs half the memory. Immutable and thread-safe.
 */
public sealed class Operator permits HermitianOperator {

    private final int rows;
    private final int columns;
    /** Row-major real parts. */
    private final double[] re;
    /** Row-major imaginary parts; empty if all are zero. */
    private final double[] im;

    /**
     * Takes over validated arrays.
     *
     * @param rows the number of rows
     * @param columns the number of columns
     * @param re real parts, row-major, owned by this object from here on
     * @param im imaginary parts, row-major, or empty
     */
    Operator(int rows, int columns, double[] re, double[] im) {
        this.rows = rows;
        this.columns = columns;
        this.re = withoutNegativeZeros(re);
        this.im = im.length == 0 || isZero(im) ? new double[0] : withoutNegativeZeros(im);
    }

    /** Shares the arrays of another operator, which nobody changes. */
    Operator(Operator other) {
        this.rows = other.rows;
        this.columns = other.columns;
        this.re = other.re;
        this.im = other.im;
    }

    /** Zeros have one sign, so that equal operators have equal bits, also after the adjoint or a file. */
    private static double[] withoutNegativeZeros(double[] a) {
        for (int i = 0; i < a.length; i++) {
            a[i] += 0.0;
        }
        return a;
    }

    private static boolean isZero(double[] a) {
        for (double v : a) {
            if (v != 0) {
                return false;
            }
        }
        return true;
    }

    /**
     * Returns the operator with these entries.
     *
     * @param re real parts, rows × columns
     * @param im imaginary parts, same shape
     * @return the operator
     * @throws InvalidInputException if the arrays are empty, ragged, of different shapes, or an entry is not finite
     */
    public static Operator of(double[][] re, double[][] im) {
        Checks.sameShape("Operator.of", re, im);
        return new Operator(
                re.length,
                re[0].length,
                Checks.flatten("Operator.of, real part", re),
                Checks.flatten("Operator.of, imaginary part", im));
    }

    /**
     * Returns the real operator with these entries.
     *
     * @param re entries, rows × columns
     * @return the operator
     * @throws InvalidInputException if the array is empty, ragged, or an entry is not finite
     */
    public static Operator ofReal(double[][] re) {
        double[] flat = Checks.flatten("Operator.ofReal", re);
        return new Operator(re.length, re[0].length, flat, new double[0]);
    }

    /**
     * Returns the operator with these entries in row-major order.
     *
     * @param rows the number of rows, at least 1
     * @param columns the number of columns, at least 1
     * @param re rows · columns real parts
     * @param im rows · columns imaginary parts, or an empty array for a real operator
     * @return the operator
     * @throws InvalidInputException if a length does not fit or an entry is not finite
     */
    public static Operator ofRowMajor(int rows, int columns, double[] re, double[] im) {
        Checks.dimensions("Operator.ofRowMajor", rows, columns);
        Checks.length("Operator.ofRowMajor, real part", re, rows * columns);
        if (im.length != 0) {
            Checks.length("Operator.ofRowMajor, imaginary part", im, rows * columns);
        }
        return new Operator(
                rows,
                columns,
                Checks.finite("Operator.ofRowMajor, real part", re.clone()),
                Checks.finite("Operator.ofRowMajor, imaginary part", im.clone()));
    }

    /**
     * Returns the number of rows.
     *
     * @return the dimension of the space mapped into
     */
    public final int rows() {
        return rows;
    }

    /**
     * Returns the number of columns.
     *
     * @return the dimension of the space mapped from
     */
    public final int columns() {
        return columns;
    }

    /**
     * Tells whether every entry is real.
     *
     * @return whether all imaginary parts are zero
     */
    public final boolean isReal() {
        return im.length == 0;
    }

    /**
     * Returns the real part of an entry.
     *
     * @param i row, from 0
     * @param j column, from 0
     * @return Re of entry (i, j)
     */
    public final double re(int i, int j) {
        return re[i * columns + j];
    }

    /**
     * Returns the imaginary part of an entry.
     *
     * @param i row, from 0
     * @param j column, from 0
     * @return Im of entry (i, j)
     */
    public final double im(int i, int j) {
        return im.length == 0 ? 0.0 : im[i * columns + j];
    }

    /**
     * Returns a copy of the real parts in row-major order.
     *
     * @return rows · columns real parts
     */
    public final double[] realParts() {
        return re.clone();
    }

    /**
     * Returns a copy of the imaginary parts in row-major order.
     *
     * @return rows · columns imaginary parts; empty for a real operator
     */
    public final double[] imaginaryParts() {
        return im.clone();
    }

    /**
     * Returns the sum.
     *
     * @param other an operator of the same shape
     * @return this + other
     * @throws InvalidInputException if the shapes differ or an entry overflows
     */
    public Operator plus(Operator other) {
        return combine("Operator.plus", other, 1);
    }

    /**
     * Returns the difference.
     *
     * @param other an operator of the same shape
     * @return this − other
     * @throws InvalidInputException if the shapes differ or an entry overflows
     */
    public Operator minus(Operator other) {
        return combine("Operator.minus", other, -1);
    }

    /** this + weight · other; the product is rounded once, then the sum. */
    final Operator combine(String asked, Operator other, double weight) {
        Checks.equalShapes(asked, this, other);
        double[] r = axpy(re, other.re, weight);
        double[] m = im.length == 0 && other.im.length == 0
                ? new double[0]
                : axpy(im.length == 0 ? new double[re.length] : im, other.im, weight);
        return new Operator(rows, columns, Checks.finite(asked, r), Checks.finite(asked, m));
    }

    private static double[] axpy(double[] a, double[] b, double w) {
        double[] c = a.clone();
        for (int i = 0; i < b.length; i++) {
            c[i] += w * b[i];
        }
        return c;
    }

    /**
     * Returns the product.
     *
     * @param other an operator with as many rows as this has columns
     * @return this · other
     * @throws InvalidInputException if the inner dimensions differ or an entry overflows
     */
    public Operator times(Operator other) {
        if (columns != other.rows) {
            throw new InvalidInputException(
                    "Operator.times",
                    "the right factor has " + other.rows + " rows",
                    columns + " rows, as the left factor has columns",
                    "check the order of the factors");
        }
        Checks.dimensions("Operator.times", rows, other.columns);
        double[] r = new double[rows * other.columns];
        double[] m = isReal() && other.isReal() ? new double[0] : new double[rows * other.columns];
        Products.multiply(rows, columns, other.columns, re, im, other.re, other.im, r, m);
        return new Operator(
                rows, other.columns, Checks.finite("Operator.times", r), Checks.finite("Operator.times", m));
    }

    /**
     * Returns the product with a real number.
     *
     * @param factor the number
     * @return factor · this
     * @throws InvalidInputException if the factor is not finite or an entry overflows
     */
    public Operator times(double factor) {
        double[] r = Arrays.stream(re).map(x -> factor * x).toArray();
        double[] m = Arrays.stream(im).map(x -> factor * x).toArray();
        return new Operator(rows, columns, Checks.finite("Operator.times", r), Checks.finite("Operator.times", m));
    }

    /**
     * Returns the adjoint: the conjugate transpose.
     *
     * @return the adjoint, columns × rows
     */
    public Operator adjoint() {
        double[] r = new double[re.length];
        double[] m = new double[im.length];
        for (int i = 0; i < rows; i++) {
            for (int j = 0; j < columns; j++) {
                r[j * rows + i] = re[i * columns + j];
                if (m.length != 0) {
                    m[j * rows + i] = -im[i * columns + j];
                }
            }
        }
        return new Operator(columns, rows, r, m);
    }

    /**
     * Returns the product with a complex number.
     *
     * @param factor the number
     * @return factor · this; each entry within √5 · 2^-53 of its modulus, relatively
     * @throws InvalidInputException if a part of the factor is not finite or an entry overflows
     */
    public final Operator times(Complex factor) {
        Checks.finite("Operator.times, factor", new double[] {factor.re(), factor.im()});
        return TensorProducts.tensor(
                "Operator.times", new Operator(1, 1, new double[] {factor.re()}, new double[] {factor.im()}), this);
    }

    /**
     * Returns the negative, exactly.
     *
     * @return −this
     */
    public Operator negate() {
        return new Operator(rows, columns, negated(re), negated(im));
    }

    static double[] negated(double[] a) {
        double[] c = new double[a.length];
        for (int i = 0; i < a.length; i++) {
            c[i] = -a[i];
        }
        return c;
    }

    /**
     * Returns the Kronecker product: entry (i·p + k, j·q + l) is a_ij b_kl for a p × q right factor. The result of two Hermitian operators, two
     * positive ones or two states is again one, where both are so by static type.
     *
     * @param other the right factor; its indices run fastest
     * @return this ⊗ other, each entry rounded as one complex product
     * @throws InvalidInputException if the product is too large for memory, said before any is taken, or an entry overflows
     */
    public final Operator tensor(Operator other) {
        return TensorProducts.tensor("Operator.tensor", this, other);
    }

    /**
     * Returns the direct sum: both operators as blocks on the diagonal, exactly.
     *
     * @param other the lower right block
     * @return this ⊕ other
     * @throws InvalidInputException if the sum is too large for memory, said before any is taken
     */
    public final Operator directSum(Operator other) {
        return TensorProducts.directSum("Operator.directSum", this, other);
    }

    /**
     * Returns the transpose, exactly.
     *
     * @return the transpose, columns × rows
     */
    public Operator transpose() {
        return adjoint().conjugate();
    }

    /**
     * Returns the entrywise complex conjugate, exactly.
     *
     * @return the conjugate
     */
    public Operator conjugate() {
        return new Operator(rows, columns, re.clone(), negated(im));
    }

    /**
     * Returns the Hilbert–Schmidt norm √Tr A*A of the entries.
     *
     * @return an enclosure, of relative width about N · 2^-52 for N entries
     */
    public final Enclosure hilbertSchmidtNorm() {
        return Norms.hilbertSchmidt(this);
    }

    /**
     * Returns the trace norm of the entries, the sum of the singular values.
     *
     * @return an enclosure, of width about n² · 2^-50 times the Hilbert–Schmidt norm, from one Hermitian eigendecomposition; exact sums for diagonal Hermitian
     *     operators
     * @throws InvalidInputException if the operator is not Hermitian by type and the Hermitian operator of dimension rows + columns that stands for it is
     *     too large for memory
     */
    public final Enclosure traceNorm() {
        return Norms.trace(this);
    }

    /**
     * Returns the operator norm of the entries, the largest singular value.
     *
     * @return an enclosure, of width about n² · 2^-50 times the Hilbert–Schmidt norm, from one Hermitian eigendecomposition; exact for diagonal Hermitian operators
     * @throws InvalidInputException as {@link #traceNorm()}
     */
    public final Enclosure operatorNorm() {
        return Norms.operator(this);
    }

    /**
     * Returns the trace, the sum of the diagonal in order.
     *
     * @return the trace, within rows · 2^-53 · Σ|diagonal| of the exact sum
     * @throws InvalidInputException if the operator is not square
     */
    public final Complex trace() {
        Checks.square("Operator.trace", this);
        double r = 0;
        double m = 0;
        for (int i = 0; i < rows; i++) {
            r += re(i, i);
            m += im(i, i);
        }
        return new Complex(r, m);
    }

    @Override
    public final boolean equals(Object o) {
        return o instanceof Operator p
                && rows == p.rows
                && columns == p.columns
                && Arrays.equals(re, p.re)
                && Arrays.equals(im, p.im);
    }

    @Override
    public final int hashCode() {
        return Arrays.hashCode(new int[] {rows, columns, Arrays.hashCode(re), Arrays.hashCode(im)});
    }

    @Override
    public String toString() {
        return getClass().getSimpleName() + " " + rows + " x " + columns + (isReal() ? ", real" : ", complex");
    }
}
