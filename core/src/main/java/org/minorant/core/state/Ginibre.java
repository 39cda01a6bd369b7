package org.minorant.core.state;

import org.minorant.core.internal.number.DoubleDouble;

/** A rows × columns matrix with independent standard complex normal entries, column by column, and what is made of it. */
record Ginibre(double[][] re, double[][] im) {

    /** Entry (i, j) is re[j][i] + i·im[j][i]: columns are contiguous. */
    static Ginibre of(int rows, int columns, SeededNormals normals) {
        double[][] re = new double[columns][rows];
        double[][] im = new double[columns][rows];
        for (int j = 0; j < columns; j++) {
            for (int i = 0; i < rows; i++) {
                re[j][i] = normals.next();
                im[j][i] = normals.next();
            }
        }
        return new Ginibre(re, im);
    }

    int rows() {
        return re[0].length;
    }

    int columns() {
        return re.length;
    }

    /**
     * Orthonormalises the columns in place, by Gram and Schmidt, twice for accuracy. The triangle of this factorisation has a positive
     * diagonal, which makes a square result a Haar unitary: F. Mezzadri, Notices AMS 54, 592 (2007) (from memory).
     */
    Ginibre orthonormalise() {
        for (int j = 0; j < columns(); j++) {
            for (int pass = 0; pass < 2; pass++) {
                for (int k = 0; k < j; k++) {
                    removeComponent(j, k);
                }
            }
            scale(j, 1 / Math.sqrt(squaredNorm(j).value()));
        }
        return this;
    }

    private void removeComponent(int j, int k) {
        double x = 0;
        double y = 0;
        for (int i = 0; i < rows(); i++) {
            x += re[k][i] * re[j][i] + im[k][i] * im[j][i];
            y += re[k][i] * im[j][i] - im[k][i] * re[j][i];
        }
        for (int i = 0; i < rows(); i++) {
            re[j][i] -= x * re[k][i] - y * im[k][i];
            im[j][i] -= x * im[k][i] + y * re[k][i];
        }
    }

    private void scale(int j, double factor) {
        for (int i = 0; i < rows(); i++) {
            re[j][i] *= factor;
            im[j][i] *= factor;
        }
    }

    private DoubleDouble squaredNorm(int j) {
        DoubleDouble s = DoubleDouble.ZERO;
        for (int i = 0; i < rows(); i++) {
            s = s.plus(DoubleDouble.product(re[j][i], re[j][i])).plus(DoubleDouble.product(im[j][i], im[j][i]));
        }
        return s;
    }

    /** (1 + U)G for this G, in an order of additions that is fixed here, because the bits are promised. */
    Ginibre plusProduct(Ginibre u) {
        double[][] x = new double[columns()][];
        double[][] y = new double[columns()][];
        for (int j = 0; j < columns(); j++) {
            x[j] = re[j].clone();
            y[j] = im[j].clone();
            for (int k = 0; k < u.columns(); k++) {
                double p = re[j][k];
                double q = im[j][k];
                for (int i = 0; i < rows(); i++) {
                    x[j][i] += p * u.re[k][i] - q * u.im[k][i];
                    y[j][i] += p * u.im[k][i] + q * u.re[k][i];
                }
            }
        }
        return new Ginibre(x, y);
    }

    /** Divides by the Frobenius norm, in place. */
    Ginibre normalise() {
        DoubleDouble s = DoubleDouble.ZERO;
        for (int j = 0; j < columns(); j++) {
            s = s.plus(squaredNorm(j));
        }
        double factor = 1 / Math.sqrt(s.value());
        for (int j = 0; j < columns(); j++) {
            scale(j, factor);
        }
        return this;
    }

    /** The entries in row-major order: real parts, then imaginary parts. */
    double[][] rowMajor() {
        double[][] flat = new double[2][rows() * columns()];
        for (int i = 0; i < rows(); i++) {
            for (int j = 0; j < columns(); j++) {
                flat[0][i * columns() + j] = re[j][i];
                flat[1][i * columns() + j] = im[j][i];
            }
        }
        return flat;
    }
}
