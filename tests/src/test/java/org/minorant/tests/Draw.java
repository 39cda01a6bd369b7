package org.minorant.tests;

import java.util.random.RandomGenerator;

/** Random matrices for tests, in plain double arithmetic; what they are used for may not depend on their rounding. */
public final class Draw {

    private Draw() {}

    /**
     * A complex matrix as two arrays of rows.
     *
     * @param re real parts
     * @param im imaginary parts
     */
    public record Matrix(double[][] re, double[][] im) {

        /**
         * The zero matrix.
         *
         * @param rows rows
         * @param columns columns
         */
        public Matrix(int rows, int columns) {
            this(new double[rows][columns], new double[rows][columns]);
        }

        /**
         * The number of rows.
         *
         * @return rows
         */
        public int rows() {
            return re.length;
        }

        /**
         * The number of columns.
         *
         * @return columns
         */
        public int columns() {
            return re[0].length;
        }

        /**
         * The product.
         *
         * @param other the right factor
         * @return this · other
         */
        public Matrix times(Matrix other) {
            Matrix c = new Matrix(rows(), other.columns());
            for (int i = 0; i < rows(); i++) {
                for (int k = 0; k < columns(); k++) {
                    for (int j = 0; j < other.columns(); j++) {
                        c.re[i][j] += re[i][k] * other.re[k][j] - im[i][k] * other.im[k][j];
                        c.im[i][j] += re[i][k] * other.im[k][j] + im[i][k] * other.re[k][j];
                    }
                }
            }
            return c;
        }

        /**
         * The conjugate transpose.
         *
         * @return the adjoint
         */
        public Matrix adjoint() {
            Matrix c = new Matrix(columns(), rows());
            for (int i = 0; i < rows(); i++) {
                for (int j = 0; j < columns(); j++) {
                    c.re[j][i] = re[i][j];
                    c.im[j][i] = -im[i][j];
                }
            }
            return c;
        }

        /**
         * The weighted sum.
         *
         * @param own weight of this
         * @param other another matrix
         * @param weight weight of the other
         * @return own · this + weight · other
         */
        public Matrix combine(double own, Matrix other, double weight) {
            Matrix c = new Matrix(rows(), columns());
            for (int i = 0; i < rows(); i++) {
                for (int j = 0; j < columns(); j++) {
                    c.re[i][j] = own * re[i][j] + weight * other.re[i][j];
                    c.im[i][j] = own * im[i][j] + weight * other.im[i][j];
                }
            }
            return c;
        }

        /**
         * The matrix with column j multiplied by a number.
         *
         * @param factors one for each column
         * @return the scaled matrix
         */
        public Matrix scaleColumns(double... factors) {
            Matrix c = new Matrix(rows(), columns());
            for (int i = 0; i < rows(); i++) {
                for (int j = 0; j < columns(); j++) {
                    c.re[i][j] = re[i][j] * factors[j];
                    c.im[i][j] = im[i][j] * factors[j];
                }
            }
            return c;
        }

        /**
         * The product with a number.
         *
         * @param factor the number
         * @return factor · this
         */
        public Matrix times(double factor) {
            double[] f = new double[columns()];
            java.util.Arrays.fill(f, factor);
            return scaleColumns(f);
        }

        /**
         * The matrix with its lower triangle copied onto the upper, so that it is Hermitian exactly.
         *
         * @return a Hermitian matrix
         */
        public Matrix hermitian() {
            Matrix c = new Matrix(rows(), rows());
            for (int i = 0; i < rows(); i++) {
                for (int j = 0; j <= i; j++) {
                    c.re[i][j] = re[i][j];
                    c.re[j][i] = re[i][j];
                    c.im[i][j] = i == j ? 0 : im[i][j];
                    c.im[j][i] = i == j ? 0 : -im[i][j];
                }
            }
            return c;
        }

        /**
         * The trace of the real parts.
         *
         * @return Re Tr
         */
        public double trace() {
            double s = 0;
            for (int i = 0; i < rows(); i++) {
                s += re[i][i];
            }
            return s;
        }

        /**
         * The first columns.
         *
         * @param count how many
         * @return a copy of them
         */
        public Matrix firstColumns(int count) {
            Matrix c = new Matrix(rows(), count);
            for (int i = 0; i < rows(); i++) {
                System.arraycopy(re[i], 0, c.re[i], 0, count);
                System.arraycopy(im[i], 0, c.im[i], 0, count);
            }
            return c;
        }
    }

    /**
     * A matrix of independent complex Gaussian numbers.
     *
     * @param random the source of randomness
     * @param rows rows
     * @param columns columns
     * @return the matrix
     */
    public static Matrix gaussian(RandomGenerator random, int rows, int columns) {
        Matrix m = new Matrix(rows, columns);
        for (int i = 0; i < rows; i++) {
            for (int j = 0; j < columns; j++) {
                m.re()[i][j] = random.nextGaussian();
                m.im()[i][j] = random.nextGaussian();
            }
        }
        return m;
    }

    /**
     * A unitary matrix, Haar distributed up to rounding: Gram–Schmidt, twice, on a Gaussian matrix.
     *
     * @param random the source of randomness
     * @param n the dimension
     * @return the matrix, unitary to about 1e-15
     */
    public static Matrix unitary(RandomGenerator random, int n) {
        return orthonormal(gaussian(random, n, n));
    }

    /**
     * Makes columns orthonormal.
     *
     * @param m a matrix of full column rank
     * @return a matrix of the same leading column spaces
     */
    public static Matrix orthonormal(Matrix m) {
        Matrix q = m.times(1);
        for (int j = 0; j < q.columns(); j++) {
            for (int pass = 0; pass < 2; pass++) {
                for (int k = 0; k < j; k++) {
                    double r = 0;
                    double s = 0;
                    for (int i = 0; i < q.rows(); i++) {
                        r += q.re()[i][k] * q.re()[i][j] + q.im()[i][k] * q.im()[i][j];
                        s += q.re()[i][k] * q.im()[i][j] - q.im()[i][k] * q.re()[i][j];
                    }
                    for (int i = 0; i < q.rows(); i++) {
                        double x = q.re()[i][k];
                        double y = q.im()[i][k];
                        q.re()[i][j] -= x * r - y * s;
                        q.im()[i][j] -= x * s + y * r;
                    }
                }
                double norm = 0;
                for (int i = 0; i < q.rows(); i++) {
                    norm += q.re()[i][j] * q.re()[i][j] + q.im()[i][j] * q.im()[i][j];
                }
                norm = Math.sqrt(norm);
                for (int i = 0; i < q.rows(); i++) {
                    q.re()[i][j] /= norm;
                    q.im()[i][j] /= norm;
                }
            }
        }
        return q;
    }

    /**
     * The Hermitian matrix with these eigenvalues, up to rounding, in a given basis.
     *
     * @param basis a unitary matrix
     * @param eigenvalues one for each column
     * @return U diag(eigenvalues) U*, exactly Hermitian
     */
    public static Matrix withSpectrum(Matrix basis, double... eigenvalues) {
        return basis.scaleColumns(eigenvalues).times(basis.adjoint()).hermitian();
    }

    /**
     * The matrix with these diagonal entries.
     *
     * @param entries the diagonal
     * @return the diagonal matrix
     */
    public static Matrix diagonal(double... entries) {
        Matrix m = new Matrix(entries.length, entries.length);
        for (int i = 0; i < entries.length; i++) {
            m.re()[i][i] = entries[i];
        }
        return m;
    }

    /**
     * A number whose logarithm is uniform.
     *
     * @param random the source of randomness
     * @param leastPower power of ten of the least value
     * @param mostPower power of ten of the largest
     * @return a number between
     */
    public static double logUniform(RandomGenerator random, double leastPower, double mostPower) {
        return StrictMath.pow(10, leastPower + (mostPower - leastPower) * random.nextDouble());
    }

    /**
     * The n-th tensor power; every entry is a product of n entries, rounded after each factor.
     *
     * @param m a matrix
     * @param n the number of factors, at least 1
     * @return m ⊗ … ⊗ m
     */
    public static Matrix power(Matrix m, int n) {
        Matrix p = m;
        for (int f = 1; f < n; f++) {
            Matrix t = new Matrix(p.rows() * m.rows(), p.columns() * m.columns());
            for (int i = 0; i < t.rows(); i++) {
                for (int j = 0; j < t.columns(); j++) {
                    double a = p.re[i / m.rows()][j / m.columns()];
                    double b = p.im[i / m.rows()][j / m.columns()];
                    double c = m.re[i % m.rows()][j % m.columns()];
                    double d = m.im[i % m.rows()][j % m.columns()];
                    t.re[i][j] = a * c - b * d;
                    t.im[i][j] = a * d + b * c;
                }
            }
            p = t;
        }
        return p;
    }
}
