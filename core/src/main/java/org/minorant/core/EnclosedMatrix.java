package org.minorant.core;

import org.minorant.core.internal.dd.DdProducts;
import org.minorant.core.internal.message.Checks;
import org.minorant.core.internal.number.DoubleDouble;

/**
 * A complex matrix known up to a radius for each entry: |true − midpoint| ≤ radius, entry by entry, with midpoints of about
 * 32 digits (sums of two doubles).
 *
 * <p>The building block of certified results: write a formula with a few products and sums, and the radii carry every
 * rounding error. Radii of a product are γ|A||B| + |A|R_B + R_A(|B| + R_B) with γ ≈ (3.5n + 220)·2^-106 (see DdProducts), computed
 * in double and rounded up. They do not explode as long as a formula stays short; iterations belong outside, their result is
 * then verified in here.
 *
 * <p>Immutable and thread-safe.
 */
public final class EnclosedMatrix {

    /** Covers the relative rounding of a radius computed with a few operations. */
    private static final double UP = 1 + 0x1p-48;

    private static final double[][] NONE = new double[0][];

    private final int rows;
    private final int columns;
    private final double[][] rh;
    private final double[][] rl;
    private final double[][] ih;
    private final double[][] il;
    private final double[][] radius;

    private EnclosedMatrix(
            int rows, int columns, double[][] rh, double[][] rl, double[][] ih, double[][] il, double[][] radius) {
        this.rows = rows;
        this.columns = columns;
        this.rh = rh;
        this.rl = rl;
        this.ih = ih;
        this.il = il;
        this.radius = radius;
    }

    /**
     * Returns an operator, exactly.
     *
     * @param a the operator
     * @return the matrix with these entries and radius zero
     */
    public static EnclosedMatrix of(Operator a) {
        Builder b = new Builder(a.rows(), a.columns(), !a.isReal());
        for (int i = 0; i < a.rows(); i++) {
            for (int j = 0; j < a.columns(); j++) {
                b.rh[i][j] = a.re(i, j);
                if (!a.isReal()) {
                    b.ih[i][j] = a.im(i, j);
                }
            }
        }
        return b.build();
    }

    /**
     * Returns the identity.
     *
     * @param n the dimension
     * @return the n × n identity, exactly
     */
    public static EnclosedMatrix identity(int n) {
        Builder b = new Builder(n, n, false);
        for (int i = 0; i < n; i++) {
            b.rh[i][i] = 1;
        }
        return b.build();
    }

    /**
     * Starts a matrix that is filled entry by entry.
     *
     * @param rows the number of rows, at least 1
     * @param columns the number of columns, at least 1
     * @return a builder with all entries zero and exact
     */
    public static Builder builder(int rows, int columns) {
        return new Builder(rows, columns, true);
    }

    /** Collects the entries of a matrix; not thread-safe, to be used once. */
    public static final class Builder {

        private final int rows;
        private final int columns;
        private final double[][] rh;
        private final double[][] rl;
        private final double[][] ih;
        private final double[][] il;
        private final double[][] radius;

        private Builder(int rows, int columns, boolean complex) {
            Checks.dimensions("EnclosedMatrix.builder", rows, columns);
            this.rows = rows;
            this.columns = columns;
            rh = new double[rows][columns];
            rl = new double[rows][columns];
            ih = complex ? new double[rows][columns] : NONE;
            il = complex ? new double[rows][columns] : NONE;
            radius = new double[rows][columns];
        }

        /**
         * Sets an entry: (reHi + reLo) + i(imHi + imLo), known up to a radius.
         *
         * @param i row, from 0
         * @param j column, from 0
         * @param reHi leading real part
         * @param reLo trailing real part, at most half a unit in the last place of the leading part
         * @param imHi leading imaginary part
         * @param imLo trailing imaginary part
         * @param r the radius in modulus, at least 0
         * @return this builder
         */
        public Builder set(int i, int j, double reHi, double reLo, double imHi, double imLo, double r) {
            rh[i][j] = reHi;
            rl[i][j] = reLo;
            ih[i][j] = imHi;
            il[i][j] = imLo;
            radius[i][j] = r;
            return this;
        }

        /**
         * Returns the matrix. The builder must not be used afterwards.
         *
         * @return the matrix
         */
        public EnclosedMatrix build() {
            boolean real = true;
            for (double[] row : ih) {
                for (double v : row) {
                    real &= v == 0;
                }
            }
            return new EnclosedMatrix(rows, columns, rh, rl, real ? NONE : ih, real ? NONE : il, radius);
        }
    }

    /**
     * Returns the number of rows.
     *
     * @return the number of rows
     */
    public int rows() {
        return rows;
    }

    /**
     * Returns the number of columns.
     *
     * @return the number of columns
     */
    public int columns() {
        return columns;
    }

    /**
     * Tells whether all midpoints are real.
     *
     * @return whether all imaginary parts are zero
     */
    public boolean isReal() {
        return ih.length == 0;
    }

    /**
     * Returns the leading real part of an entry's midpoint.
     *
     * @param i row, from 0
     * @param j column, from 0
     * @return the real part rounded to double
     */
    public double re(int i, int j) {
        return rh[i][j];
    }

    /**
     * Returns the trailing real part of an entry's midpoint.
     *
     * @param i row, from 0
     * @param j column, from 0
     * @return what {@link #re} leaves out
     */
    public double reTail(int i, int j) {
        return rl[i][j];
    }

    /**
     * Returns the leading imaginary part of an entry's midpoint.
     *
     * @param i row, from 0
     * @param j column, from 0
     * @return the imaginary part rounded to double
     */
    public double im(int i, int j) {
        return ih.length == 0 ? 0 : ih[i][j];
    }

    /**
     * Returns the trailing imaginary part of an entry's midpoint.
     *
     * @param i row, from 0
     * @param j column, from 0
     * @return what {@link #im} leaves out
     */
    public double imTail(int i, int j) {
        return il.length == 0 ? 0 : il[i][j];
    }

    /**
     * Returns the radius of an entry.
     *
     * @param i row, from 0
     * @param j column, from 0
     * @return a bound on the modulus of true minus midpoint
     */
    public double radius(int i, int j) {
        return radius[i][j];
    }

    /**
     * Returns an upper end of the modulus of an entry.
     *
     * @param i row, from 0
     * @param j column, from 0
     * @return at least |entry|
     */
    public double modulusUpper(int i, int j) {
        return (RadiusOfProduct.modulus(rh[i][j], im(i, j)) + radius[i][j]) * UP;
    }

    private double[][] moduli() {
        double[][] m = new double[rows][columns];
        for (int i = 0; i < rows; i++) {
            for (int j = 0; j < columns; j++) {
                m[i][j] = RadiusOfProduct.modulus(rh[i][j], im(i, j));
            }
        }
        return m;
    }

    /**
     * Returns the adjoint.
     *
     * @return the conjugate transpose, with the same radii
     */
    public EnclosedMatrix adjoint() {
        return new EnclosedMatrix(
                columns,
                rows,
                transpose(rh, 1),
                transpose(rl, 1),
                transpose(ih, -1),
                transpose(il, -1),
                transpose(radius, 1));
    }

    private double[][] transpose(double[][] a, double sign) {
        if (a.length == 0) {
            return NONE;
        }
        double[][] t = new double[columns][rows];
        for (int i = 0; i < rows; i++) {
            for (int j = 0; j < columns; j++) {
                t[j][i] = sign * a[i][j];
            }
        }
        return t;
    }

    /**
     * Returns an enclosure of the product.
     *
     * @param other a matrix with as many rows as this has columns
     * @return this · other
     * @throws InvalidInputException if the inner dimensions differ
     */
    public EnclosedMatrix times(EnclosedMatrix other) {
        if (columns != other.rows) {
            throw new InvalidInputException(
                    "EnclosedMatrix.times",
                    "the right factor has " + other.rows + " rows",
                    columns + " rows",
                    "check the order of the factors");
        }
        boolean complex = !isReal() || !other.isReal();
        Builder c = new Builder(rows, other.columns, complex);
        DdProducts.addProduct(rh, rl, other.rh, other.rl, 1, c.rh, c.rl);
        if (!isReal() && !other.isReal()) {
            DdProducts.addProduct(ih, il, other.ih, other.il, -1, c.rh, c.rl);
        }
        if (!other.isReal()) {
            DdProducts.addProduct(rh, rl, other.ih, other.il, 1, c.ih, c.il);
        }
        if (!isReal()) {
            DdProducts.addProduct(ih, il, other.rh, other.rl, 1, c.ih, c.il);
        }
        RadiusOfProduct.add(moduli(), radius, other.moduli(), other.radius, c.radius);
        return c.build();
    }

    /**
     * Returns an enclosure of the product entry by entry (Hadamard's, Schur's).
     *
     * @param other a matrix of the same shape
     * @return the matrix of entry(i, j) · other.entry(i, j)
     * @throws InvalidInputException if the shapes differ
     */
    public EnclosedMatrix timesEntrywise(EnclosedMatrix other) {
        requireSameShape("EnclosedMatrix.timesEntrywise", other);
        return EntrywiseProduct.of(this, other);
    }

    private void requireSameShape(String asked, EnclosedMatrix other) {
        if (rows != other.rows || columns != other.columns) {
            throw new InvalidInputException(
                    asked,
                    "the second matrix is " + other.rows + " x " + other.columns,
                    rows + " x " + columns,
                    "both must have the same shape");
        }
    }

    /**
     * Returns an enclosure of the sum.
     *
     * @param other a matrix of the same shape
     * @return this + other
     * @throws InvalidInputException if the shapes differ
     */
    public EnclosedMatrix plus(EnclosedMatrix other) {
        return combine(other, 1);
    }

    /**
     * Returns an enclosure of the difference.
     *
     * @param other a matrix of the same shape
     * @return this − other
     * @throws InvalidInputException if the shapes differ
     */
    public EnclosedMatrix minus(EnclosedMatrix other) {
        return combine(other, -1);
    }

    private EnclosedMatrix combine(EnclosedMatrix other, double sign) {
        requireSameShape("EnclosedMatrix.plus", other);
        Builder c = new Builder(rows, columns, !isReal() || !other.isReal());
        for (int i = 0; i < rows; i++) {
            for (int j = 0; j < columns; j++) {
                DoubleDouble x = new DoubleDouble(rh[i][j], rl[i][j])
                        .plus(new DoubleDouble(sign * other.rh[i][j], sign * other.rl[i][j]));
                c.rh[i][j] = x.hi();
                c.rl[i][j] = x.lo();
                if (c.ih.length != 0) {
                    DoubleDouble y = new DoubleDouble(im(i, j), imTail(i, j))
                            .plus(new DoubleDouble(sign * other.im(i, j), sign * other.imTail(i, j)));
                    c.ih[i][j] = y.hi();
                    c.il[i][j] = y.lo();
                }
                double r = radius[i][j] + other.radius[i][j];
                c.radius[i][j] = (r
                                + DoubleDouble.EPS
                                        * RadiusOfProduct.modulus(c.rh[i][j], c.ih.length == 0 ? 0 : c.ih[i][j]))
                        * UP;
            }
        }
        return c.build();
    }

    /**
     * Returns an enclosure of the product with an exact real number.
     *
     * @param factor the number
     * @return factor · this
     * @throws InvalidInputException if the factor is NaN or infinite
     */
    public EnclosedMatrix times(double factor) {
        if (!(Math.abs(factor) < Double.POSITIVE_INFINITY)) {
            throw new InvalidInputException(
                    "EnclosedMatrix.times",
                    "the factor is " + factor,
                    "a finite number",
                    "check the computation before it");
        }
        Builder c = new Builder(rows, columns, !isReal());
        double f = Math.abs(factor);
        // a power of two loses nothing
        double loss = Math.abs(Math.scalb(1.0, Math.getExponent(f))) == f ? 0 : DoubleDouble.EPS;
        for (int i = 0; i < rows; i++) {
            for (int j = 0; j < columns; j++) {
                DoubleDouble x = new DoubleDouble(rh[i][j], rl[i][j]).times(factor);
                c.rh[i][j] = x.hi();
                c.rl[i][j] = x.lo();
                if (!isReal()) {
                    DoubleDouble y = new DoubleDouble(ih[i][j], il[i][j]).times(factor);
                    c.ih[i][j] = y.hi();
                    c.il[i][j] = y.lo();
                }
                double r = f * radius[i][j] + loss * f * RadiusOfProduct.modulus(rh[i][j], im(i, j));
                // an exact zero stays one; anything else may lose what it had to gradual underflow
                boolean zero = radius[i][j] == 0 && rh[i][j] == 0 && im(i, j) == 0;
                c.radius[i][j] = r * UP + (factor == 0 || zero ? 0 : 0x1p-1068);
            }
        }
        return c.build();
    }

    /**
     * Returns an enclosure of the real part of the trace.
     *
     * @return Re Σ entry(i, i)
     * @throws InvalidInputException if the matrix is not square
     */
    public Enclosure traceRe() {
        if (rows != columns) {
            throw new InvalidInputException(
                    "EnclosedMatrix.traceRe",
                    "the matrix is " + rows + " x " + columns,
                    "a square matrix",
                    "check the shape");
        }
        DoubleDouble s = DoubleDouble.ZERO;
        double r = 0;
        double size = 0;
        for (int i = 0; i < rows; i++) {
            s = s.plus(new DoubleDouble(rh[i][i], rl[i][i]));
            r += radius[i][i];
            size += Math.abs(rh[i][i]);
        }
        return ball(s, r * (1 + rows * 0x1p-52) + 2 * rows * DoubleDouble.EPS * size);
    }

    /**
     * Returns an enclosure of the real part of an entry.
     *
     * @param i row, from 0
     * @param j column, from 0
     * @return Re entry(i, j)
     */
    public Enclosure enclosureRe(int i, int j) {
        return ball(new DoubleDouble(rh[i][j], rl[i][j]), radius[i][j]);
    }

    /**
     * Returns an enclosure of the imaginary part of an entry.
     *
     * @param i row, from 0
     * @param j column, from 0
     * @return Im entry(i, j)
     */
    public Enclosure enclosureIm(int i, int j) {
        return ball(new DoubleDouble(im(i, j), imTail(i, j)), radius[i][j]);
    }

    private static Enclosure ball(DoubleDouble mid, double radius) {
        Enclosure exact = Enclosure.exact(mid.hi()).plus(Enclosure.exact(mid.lo()));
        return radius == 0
                ? exact
                : Enclosure.exact(mid.hi()).plus(Enclosure.exact(mid.lo()).widen(radius * UP));
    }

    /**
     * Returns an upper end of the Frobenius norm √Σ|entry|², which bounds the operator norm from above.
     *
     * @return at least the Frobenius norm; +∞ if an entry overflowed
     */
    public double frobeniusUpper() {
        double scale = 0;
        for (int i = 0; i < rows; i++) {
            for (int j = 0; j < columns; j++) {
                scale = Math.max(scale, modulusUpper(i, j));
            }
        }
        if (scale == 0) {
            return 0;
        }
        // NaN comes from overflow: nothing is known then
        if (!(scale < Double.POSITIVE_INFINITY)) {
            return Double.POSITIVE_INFINITY;
        }
        double s = 0;
        for (int i = 0; i < rows; i++) {
            for (int j = 0; j < columns; j++) {
                double m = modulusUpper(i, j) / scale;
                s += m * m;
            }
        }
        // the last term covers what rounding to a subnormal number may lose
        return Math.sqrt(s) * scale * (1 + (2.0 + (double) rows * columns) * 0x1p-51) + 2 * Double.MIN_VALUE;
    }

    /**
     * Returns the midpoint without its radii: an exactly known matrix near this one.
     *
     * @return the same midpoints with radius zero
     */
    public EnclosedMatrix midpoint() {
        return new EnclosedMatrix(rows, columns, rh, rl, ih, il, new double[rows][columns]);
    }

    /**
     * Returns the midpoints rounded to double.
     *
     * @return the operator of leading parts
     */
    public Operator toOperator() {
        double[] r = new double[rows * columns];
        double[] m = isReal() ? new double[0] : new double[rows * columns];
        for (int i = 0; i < rows; i++) {
            System.arraycopy(rh[i], 0, r, i * columns, columns);
            if (!isReal()) {
                System.arraycopy(ih[i], 0, m, i * columns, columns);
            }
        }
        return new Operator(rows, columns, r, m);
    }
}
