package org.minorant.measurement;

import java.math.BigDecimal;
import java.math.MathContext;
import java.util.ArrayList;
import java.util.List;
import java.util.Random;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.HermitianOperator;

/** States, measurements and exact sums that several tests share. */
final class Samples {

    static final MathContext DIGITS = new MathContext(60);

    private Samples() {}

    /** The qubit state of a Bloch vector in the plane of X and Z, of given length and angle from Z. */
    static DensityOperator bloch(double length, double angle) {
        return DensityOperator.ofBloch(length * Math.sin(angle), 0, length * Math.cos(angle));
    }

    /** A unitary from Gram–Schmidt on Gaussian columns; entry (row, column, part). */
    static double[][][] unitary(int n, Random random) {
        double[][][] u = new double[n][n][2];
        for (int c = 0; c < n; c++) {
            for (int i = 0; i < n; i++) {
                u[i][c][0] = random.nextGaussian();
                u[i][c][1] = random.nextGaussian();
            }
            for (int pass = 0; pass < 2; pass++) {
                for (int b = 0; b < c; b++) {
                    double x = 0;
                    double y = 0;
                    for (int i = 0; i < n; i++) {
                        x += u[i][b][0] * u[i][c][0] + u[i][b][1] * u[i][c][1];
                        y += u[i][b][0] * u[i][c][1] - u[i][b][1] * u[i][c][0];
                    }
                    for (int i = 0; i < n; i++) {
                        u[i][c][0] -= x * u[i][b][0] - y * u[i][b][1];
                        u[i][c][1] -= x * u[i][b][1] + y * u[i][b][0];
                    }
                }
            }
            double s = 0;
            for (int i = 0; i < n; i++) {
                s += u[i][c][0] * u[i][c][0] + u[i][c][1] * u[i][c][1];
            }
            for (int i = 0; i < n; i++) {
                u[i][c][0] /= Math.sqrt(s);
                u[i][c][1] /= Math.sqrt(s);
            }
        }
        return u;
    }

    /** U diag(values) U*, Hermitian exactly. */
    static HermitianOperator rotated(double[] values, double[][][] u) {
        int n = values.length;
        double[][] re = new double[n][n];
        double[][] im = new double[n][n];
        for (int i = 0; i < n; i++) {
            for (int j = 0; j <= i; j++) {
                for (int k = 0; k < n; k++) {
                    re[i][j] += values[k] * (u[i][k][0] * u[j][k][0] + u[i][k][1] * u[j][k][1]);
                    im[i][j] += values[k] * (u[i][k][1] * u[j][k][0] - u[i][k][0] * u[j][k][1]);
                }
                re[j][i] = re[i][j];
                im[j][i] = -im[i][j];
            }
            im[i][i] = 0;
        }
        return HermitianOperator.of(re, im);
    }

    /** A random state whose spectrum is of one of five kinds: full, clustered, deficient, graded, pure. */
    static DensityOperator state(int n, Random random) {
        double[] p = new double[n];
        int kind = random.nextInt(5);
        double sum = 0;
        for (int i = 0; i < n; i++) {
            p[i] = switch (kind) {
                case 0 -> -Math.log(1 - random.nextDouble());
                case 1 -> 1 + 1e-12 * random.nextDouble();
                case 2 -> i % 2 == 0 ? random.nextDouble() + 0.1 : 0;
                case 3 -> Math.pow(10, -3.0 * i);
                default -> i == 0 ? 1 : 0;
            };
            sum += p[i];
        }
        for (int i = 0; i < n; i++) {
            p[i] /= sum;
        }
        if (kind == 4) {
            return ket(n, random);
        }
        return DensityOperator.of(rotated(p, unitary(n, random)));
    }

    static DensityOperator ket(int n, Random random) {
        double[][][] u = unitary(n, random);
        double[] re = new double[n];
        double[] im = new double[n];
        for (int i = 0; i < n; i++) {
            re[i] = u[i][0][0];
            im[i] = u[i][0][1];
        }
        return DensityOperator.ofKet(re, im);
    }

    /** An operator between 0 and 1 with eigenvalues drawn from 0, 1 and in between. */
    static HermitianOperator effect(int n, Random random) {
        double[] v = new double[n];
        for (int i = 0; i < n; i++) {
            v[i] = Math.min(1, Math.max(0, 1.6 * random.nextDouble() - 0.3));
        }
        return rotated(v, unitary(n, random));
    }

    static Ensemble ensemble(int states, int dimension, Random random) {
        List<DensityOperator> list = new ArrayList<>();
        double[] p = new double[states];
        double sum = 0;
        for (int i = 0; i < states; i++) {
            list.add(state(dimension, random));
            p[i] = random.nextDouble() + 0.05;
            sum += p[i];
        }
        for (int i = 0; i < states; i++) {
            p[i] /= sum;
        }
        return Ensemble.of(list, p);
    }

    static DensityOperator power(DensityOperator rho, int n) {
        DensityOperator a = rho;
        for (int k = 1; k < n; k++) {
            a = a.tensor(rho);
        }
        return a;
    }

    /** The n-fold tensor power of a ket, (amplitude, part), normalised. */
    static DensityOperator ketPower(double[][] ket, int n) {
        double[][] a = {{1, 0}};
        for (int k = 0; k < n; k++) {
            double[][] b = new double[a.length * ket.length][2];
            for (int i = 0; i < b.length; i++) {
                double[] x = a[i / ket.length];
                double[] y = ket[i % ket.length];
                b[i][0] = x[0] * y[0] - x[1] * y[1];
                b[i][1] = x[0] * y[1] + x[1] * y[0];
            }
            a = b;
        }
        return normalised(a);
    }

    static DensityOperator normalised(double[][] a) {
        double s = 0;
        for (double[] z : a) {
            s += z[0] * z[0] + z[1] * z[1];
        }
        double[] re = new double[a.length];
        double[] im = new double[a.length];
        for (int i = 0; i < a.length; i++) {
            re[i] = a[i][0] / Math.sqrt(s);
            im[i] = a[i][1] / Math.sqrt(s);
        }
        return DensityOperator.ofKet(re, im);
    }

    /** Whether the enclosure, and so the number it holds, lies within a distance of a reference value. */
    static boolean near(Enclosure e, double reference, double distance) {
        return e.lower() >= reference - distance && e.upper() <= reference + distance;
    }

    static BigDecimal exact(double x) {
        return new BigDecimal(x);
    }

    /** The least type-II error of commuting states at a level, by the lemma of Neyman and Pearson in exact arithmetic. */
    static BigDecimal neymanPearson(double[] a, double[] b, double level) {
        Integer[] order = java.util.stream.IntStream.range(0, a.length)
                .filter(i -> a[i] > 0 || b[i] > 0)
                .boxed()
                .toArray(Integer[]::new);
        // rejecting first what is least likely under the first state for its weight under the second
        java.util.Arrays.sort(
                order,
                (i, j) ->
                        exact(a[i]).multiply(exact(b[j])).compareTo(exact(a[j]).multiply(exact(b[i]))));
        BigDecimal left = exact(level);
        BigDecimal beta = BigDecimal.ZERO;
        for (int i : order) {
            BigDecimal p = exact(a[i]);
            if (p.compareTo(left) <= 0) {
                left = left.subtract(p);
            } else {
                BigDecimal kept = p.subtract(left).divide(p, DIGITS);
                beta = beta.add(exact(b[i]).multiply(kept));
                left = BigDecimal.ZERO;
            }
        }
        return beta;
    }
}
