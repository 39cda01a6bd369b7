package org.minorant.bounds.divergence;

import java.util.Random;
import org.minorant.core.DensityOperator;
import org.minorant.core.Operator;
import org.minorant.core.PositiveOperator;

/** States with prescribed spectra in random bases, from a seed. */
public final class TestStates {

    private TestStates() {}

    /** The spectra that the properties run over. */
    public enum Kind {
        /** Exponential weights, as of a random state. */
        RANDOM,
        /** Few distinct eigenvalues, apart by rounding only. */
        CLUSTERED,
        /** About half of the eigenvalues zero, exactly: given by a factor. */
        DEFICIENT,
        /** Eigenvalues over ten decades. */
        GRADED;

        double[] spectrum(int d, Random random) {
            double[] x = new double[d];
            for (int i = 0; i < d; i++) {
                x[i] = switch (this) {
                    case RANDOM -> -Math.log(1 - random.nextDouble()) + 1e-3;
                    case CLUSTERED -> (i % 2 + 1) * (1 + 1e-15 * random.nextInt(4));
                    case DEFICIENT -> i <= d / 2 ? 0.1 + random.nextDouble() : 0;
                    case GRADED -> Math.pow(10, -10.0 * i / d) * (0.5 + random.nextDouble());
                };
            }
            double sum = 0;
            for (double v : x) {
                sum += v;
            }
            for (int i = 0; i < d; i++) {
                x[i] /= sum;
            }
            return x;
        }
    }

    /** A state of this kind; a deficient one is given by its factor, the others by entries. */
    public static DensityOperator of(Kind kind, int d, Random random) {
        return withSpectrum(kind.spectrum(d, random), random);
    }

    /** A state with these eigenvalues (zeros exactly, the others up to rounding) in a random basis. */
    public static DensityOperator withSpectrum(double[] p, Random random) {
        int d = p.length;
        double[][][] u = unitary(d, random);
        int rank = 0;
        for (double v : p) {
            rank += v > 0 ? 1 : 0;
        }
        double[][] re = new double[d][rank];
        double[][] im = new double[d][rank];
        int c = 0;
        for (int j = 0; j < d; j++) {
            if (p[j] > 0) {
                for (int i = 0; i < d; i++) {
                    re[i][c] = u[0][i][j] * Math.sqrt(p[j]);
                    im[i][c] = u[1][i][j] * Math.sqrt(p[j]);
                }
                c++;
            }
        }
        return rank < d ? DensityOperator.of(PositiveOperator.ofFactor(Operator.of(re, im))) : ofColumns(re, im);
    }

    /** XX* by its entries, exactly Hermitian and of trace one up to rounding. */
    public static DensityOperator ofColumns(double[][] re, double[][] im) {
        int d = re.length;
        double[][] x = new double[d][d];
        double[][] y = new double[d][d];
        double trace = 0;
        for (int i = 0; i < d; i++) {
            for (int j = 0; j <= i; j++) {
                for (int k = 0; k < re[0].length; k++) {
                    x[i][j] += re[i][k] * re[j][k] + im[i][k] * im[j][k];
                    y[i][j] += im[i][k] * re[j][k] - re[i][k] * im[j][k];
                }
            }
            y[i][i] = 0;
            trace += x[i][i];
        }
        for (int i = 0; i < d; i++) {
            for (int j = 0; j <= i; j++) {
                x[i][j] /= trace;
                y[i][j] /= trace;
                x[j][i] = x[i][j];
                y[j][i] = -y[i][j];
            }
            y[i][i] = 0;
        }
        return DensityOperator.of(x, y);
    }

    /** A unitary matrix, Haar distributed: Gram and Schmidt, twice, on a Gaussian one. Parts 0 and 1 are real and imaginary. */
    public static double[][][] unitary(int d, Random random) {
        double[][][] u = new double[2][d][d];
        for (int j = 0; j < d; j++) {
            for (int i = 0; i < d; i++) {
                u[0][i][j] = random.nextGaussian();
                u[1][i][j] = random.nextGaussian();
            }
            for (int pass = 0; pass < 2; pass++) {
                for (int k = 0; k < j; k++) {
                    double x = 0;
                    double y = 0;
                    for (int i = 0; i < d; i++) {
                        x += u[0][i][k] * u[0][i][j] + u[1][i][k] * u[1][i][j];
                        y += u[0][i][k] * u[1][i][j] - u[1][i][k] * u[0][i][j];
                    }
                    for (int i = 0; i < d; i++) {
                        double a = u[0][i][k];
                        double b = u[1][i][k];
                        u[0][i][j] -= x * a - y * b;
                        u[1][i][j] -= x * b + y * a;
                    }
                }
                double norm = 0;
                for (int i = 0; i < d; i++) {
                    norm += u[0][i][j] * u[0][i][j] + u[1][i][j] * u[1][i][j];
                }
                for (int i = 0; i < d; i++) {
                    u[0][i][j] /= Math.sqrt(norm);
                    u[1][i][j] /= Math.sqrt(norm);
                }
            }
        }
        return u;
    }
}
