package org.minorant.bounds.divergence;

import java.util.Random;
import org.minorant.core.DensityOperator;

/** Maps on states for the data-processing tests, written out by hand. Each says what rounding it leaves. */
public final class Channels {

    private Channels() {}

    /**
     * A random channel ρ → Σ K_e ρ K_e*, its Kraus operators the blocks of the first d columns of a random unitary on d · k dimensions.
     * Every entry is a sum of k d² products
     * rounded a few times: the result is within d · k · d² · 2^-50 of an exact image in trace norm.
     */
    public static DensityOperator random(DensityOperator rho, int k, Random random) {
        int d = rho.dimension();
        double[][][] u = TestStates.unitary(d * k, random);
        double[][] re = new double[d][d];
        double[][] im = new double[d][d];
        for (int e = 0; e < k; e++) {
            for (int i = 0; i < d; i++) {
                for (int j = 0; j < d; j++) {
                    for (int m = 0; m < d; m++) {
                        for (int n = 0; n < d; n++) {
                            double x = u[0][e * d + i][m];
                            double y = u[1][e * d + i][m];
                            double v = u[0][e * d + j][n];
                            double w = -u[1][e * d + j][n];
                            double a = x * rho.re(m, n) - y * rho.im(m, n);
                            double b = x * rho.im(m, n) + y * rho.re(m, n);
                            re[i][j] += a * v - b * w;
                            im[i][j] += a * w + b * v;
                        }
                    }
                }
            }
        }
        return state(re, im);
    }

    /** Off-diagonal entries set to zero, exactly. */
    public static DensityOperator dephased(DensityOperator rho) {
        int d = rho.dimension();
        double[][] re = new double[d][d];
        for (int i = 0; i < d; i++) {
            re[i][i] = rho.re(i, i);
        }
        return DensityOperator.ofReal(re);
    }

    /** The transpose, exactly: positive, not completely positive, and reversible by itself. */
    public static DensityOperator transposed(DensityOperator rho) {
        int d = rho.dimension();
        double[][] re = new double[d][d];
        double[][] im = new double[d][d];
        for (int i = 0; i < d; i++) {
            for (int j = 0; j < d; j++) {
                re[i][j] = rho.re(j, i);
                im[i][j] = rho.im(j, i);
            }
        }
        return DensityOperator.of(re, im);
    }

    /**
     * The reduction map ρ → (1 − ρ)/(d − 1): positive and trace-preserving, and not completely positive, since it maps half of a maximally
     * entangled state to (1 − d·P)/d(d−1), which has
     * the eigenvalue −1/d. Each entry is rounded twice.
     */
    public static DensityOperator reduced(DensityOperator rho) {
        int d = rho.dimension();
        double[][] re = new double[d][d];
        double[][] im = new double[d][d];
        for (int i = 0; i < d; i++) {
            for (int j = 0; j < d; j++) {
                re[i][j] = ((i == j ? 1 : 0) - rho.re(i, j)) / (d - 1);
                im[i][j] = -rho.im(i, j) / (d - 1);
            }
        }
        return state(re, im);
    }

    /** The Kronecker product; each entry is rounded a few times. */
    public static DensityOperator tensor(DensityOperator a, DensityOperator b) {
        int m = b.dimension();
        int n = a.dimension() * m;
        double[][] re = new double[n][n];
        double[][] im = new double[n][n];
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                double x = a.re(i / m, j / m);
                double y = a.im(i / m, j / m);
                double v = b.re(i % m, j % m);
                double w = b.im(i % m, j % m);
                re[i][j] = x * v - y * w;
                im[i][j] = x * w + y * v;
            }
        }
        return state(re, im);
    }

    /** The state with these entries, made Hermitian and of trace one exactly where they are so up to rounding. */
    private static DensityOperator state(double[][] re, double[][] im) {
        int d = re.length;
        double trace = 0;
        for (int i = 0; i < d; i++) {
            trace += re[i][i];
        }
        for (int i = 0; i < d; i++) {
            for (int j = 0; j <= i; j++) {
                re[i][j] /= trace;
                im[i][j] = i == j ? 0 : im[i][j] / trace;
                re[j][i] = re[i][j];
                im[j][i] = -im[i][j];
            }
        }
        return DensityOperator.of(re, im);
    }
}
