package org.minorant.core.internal;

import java.util.Arrays;
import java.util.Random;

/** Hermitian matrices with a prescribed spectrum and other inputs that are nasty on purpose; everything from a seed. */
public final class TestMatrices {

    /**
     * A matrix on flat row-major arrays.
     *
     * @param n the dimension
     * @param re real parts
     * @param im imaginary parts; empty if real
     */
    public record Flat(int n, double[] re, double[] im) {

        /** The matrix plus c times the identity; the diagonal rounds. */
        public Flat shifted(double c) {
            double[] r = re.clone();
            for (int i = 0; i < n; i++) {
                r[i * n + i] += c;
            }
            return new Flat(n, r, im);
        }

        /** The matrix times 2^power; exact unless it under- or overflows. */
        public Flat scaled(int power) {
            return new Flat(n, scaled(re, power), scaled(im, power));
        }

        private static double[] scaled(double[] a, int power) {
            return Arrays.stream(a).map(x -> Math.scalb(x, power)).toArray();
        }

        /** The real parts as nested rows. */
        public double[][] rowsRe() {
            return rows(re);
        }

        /** The imaginary parts as nested rows, zero if the matrix is real. */
        public double[][] rowsIm() {
            return rows(im.length == 0 ? new double[n * n] : im);
        }

        private double[][] rows(double[] flat) {
            double[][] rows = new double[n][];
            for (int i = 0; i < n; i++) {
                rows[i] = Arrays.copyOfRange(flat, i * n, (i + 1) * n);
            }
            return rows;
        }
    }

    /** Kinds of spectra; the largest eigenvalue in magnitude is 1. */
    public enum Spectrum {
        RANDOM,
        EQUAL,
        TWO_VALUES,
        CLUSTERED,
        DEFICIENT,
        RANK_ONE,
        GRADED,
        SIGNED
    }

    private TestMatrices() {}

    /** A spectrum of the given kind. */
    public static double[] spectrum(Spectrum kind, int n, Random random) {
        double[] v = new double[n];
        for (int i = 0; i < n; i++) {
            v[i] = switch (kind) {
                case RANDOM -> random.nextDouble();
                case EQUAL -> 1;
                case TWO_VALUES -> i % 2 == 0 ? 0.25 : 1;
                case CLUSTERED -> (i % 3 == 0 ? 0.5 : 1) - 1e-13 * random.nextDouble();
                case DEFICIENT -> i < n / 2 ? 0 : random.nextDouble();
                case RANK_ONE -> 0;
                case GRADED -> Math.pow(10, -40.0 * i / n);
                case SIGNED -> 2 * random.nextDouble() - 1;
            };
        }
        v[0] = 1;
        return v;
    }

    /** U diag(values) U* rounded to double and made exactly Hermitian, U random orthogonal or unitary. */
    public static Flat hermitian(double[] values, boolean complex, Random random) {
        int n = values.length;
        double[][][] u = unitary(n, complex, random);
        double[] re = new double[n * n];
        double[] im = complex && n > 1 ? new double[n * n] : new double[0];
        for (int i = 0; i < n; i++) {
            for (int j = 0; j <= i; j++) {
                double x = 0;
                double y = 0;
                for (int k = 0; k < n; k++) {
                    x += values[k] * (u[0][k][i] * u[0][k][j] + u[1][k][i] * u[1][k][j]);
                    y += values[k] * (u[1][k][i] * u[0][k][j] - u[0][k][i] * u[1][k][j]);
                }
                re[i * n + j] = x;
                re[j * n + i] = x;
                if (im.length != 0 && i != j) {
                    im[i * n + j] = y;
                    im[j * n + i] = -y;
                }
            }
        }
        return new Flat(n, re, im);
    }

    /** Random orthonormal rows [re or im][row][entry], by Gram and Schmidt, each step twice. */
    public static double[][][] unitary(int n, boolean complex, Random random) {
        double[][] a = new double[n][n];
        double[][] b = new double[n][n];
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                a[i][j] = random.nextGaussian();
                b[i][j] = complex ? random.nextGaussian() : 0;
            }
            for (int pass = 0; pass < 2; pass++) {
                for (int k = 0; k < i; k++) {
                    double x = 0;
                    double y = 0;
                    for (int j = 0; j < n; j++) {
                        x += a[k][j] * a[i][j] + b[k][j] * b[i][j];
                        y += a[k][j] * b[i][j] - b[k][j] * a[i][j];
                    }
                    for (int j = 0; j < n; j++) {
                        a[i][j] -= x * a[k][j] - y * b[k][j];
                        b[i][j] -= x * b[k][j] + y * a[k][j];
                    }
                }
                double norm = 0;
                for (int j = 0; j < n; j++) {
                    norm += a[i][j] * a[i][j] + b[i][j] * b[i][j];
                }
                norm = Math.sqrt(norm);
                for (int j = 0; j < n; j++) {
                    a[i][j] /= norm;
                    b[i][j] /= norm;
                }
            }
        }
        return new double[][][] {a, b};
    }
}
