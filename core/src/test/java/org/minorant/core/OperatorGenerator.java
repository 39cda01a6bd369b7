package org.minorant.core;

import java.util.Arrays;
import java.util.Random;
import net.jqwik.api.Arbitraries;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.Combinators;

/** Operators with prescribed spectra in random bases, for property tests: well separated, clustered, repeated, deficient, graded, and at extreme scales. */
final class OperatorGenerator {

    private OperatorGenerator() {}

    /** What spectra look like. */
    enum SpectrumKind {
        RANDOM,
        CLUSTERED,
        REPEATED,
        DEFICIENT,
        GRADED,
        ONE_TINY,
        /** One eigenvalue that rounding could have made negative. */
        SLIGHTLY_NEGATIVE
    }

    /** A spectrum kind, a dimension, whether the basis is complex, and the seed of the rest. */
    record Case(SpectrumKind kind, int dimension, boolean complex, long seed) {

        Random random() {
            return new Random(seed);
        }

        /** A positive operator by its entries, of trace about one. */
        PositiveOperator positive() {
            Random r = random();
            return PositiveOperator.of(
                    hermitian(spectrum(kind, dimension, r), OperatorGenerator.unitary(dimension, complex, r)));
        }

        /** A state by its entries. */
        DensityOperator state() {
            return DensityOperator.of(positive());
        }

        Operator unitary() {
            return OperatorGenerator.unitary(dimension, complex, random());
        }
    }

    static Arbitrary<Case> cases(int mostDimensions) {
        return Combinators.combine(
                        Arbitraries.of(SpectrumKind.values()),
                        Arbitraries.integers().between(1, mostDimensions),
                        Arbitraries.of(true, false),
                        Arbitraries.longs())
                .as(Case::new);
    }

    /** Eigenvalues of this kind, at least zero up to rounding, of sum one. */
    static double[] spectrum(SpectrumKind kind, int n, Random random) {
        double[] v = new double[n];
        for (int i = 0; i < n; i++) {
            v[i] = switch (kind) {
                case RANDOM -> 0.05 + random.nextDouble();
                case CLUSTERED -> (i % 2 == 0 ? 1 : 0.3) + 1e-13 * random.nextDouble();
                case REPEATED -> i % 2 == 0 ? 1 : 0.25;
                case DEFICIENT -> i < (n + 1) / 2 ? 0.2 + random.nextDouble() : 0;
                case GRADED -> Math.pow(10, -4.0 * i) * (1 + random.nextDouble());
                case SLIGHTLY_NEGATIVE -> i == n - 1 && n > 1 ? -1e-15 : 0.5 + random.nextDouble();
                case ONE_TINY -> i == n - 1 && n > 1 ? 1e-11 : 0.1 + random.nextDouble();
            };
        }
        double sum = Arrays.stream(v).sum();
        return Arrays.stream(v).map(x -> x / sum).toArray();
    }

    /** A unitary (orthogonal) matrix by Gram–Schmidt, twice, from Gaussian numbers. */
    static Operator unitary(int n, boolean complex, Random random) {
        double[][] re = new double[n][n];
        double[][] im = new double[n][n];
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                re[i][j] = random.nextGaussian();
                im[i][j] = complex ? random.nextGaussian() : 0;
            }
            for (int pass = 0; pass < 2; pass++) {
                for (int k = 0; k < i; k++) {
                    double x = 0;
                    double y = 0;
                    for (int j = 0; j < n; j++) {
                        x += re[k][j] * re[i][j] + im[k][j] * im[i][j];
                        y += re[k][j] * im[i][j] - im[k][j] * re[i][j];
                    }
                    for (int j = 0; j < n; j++) {
                        re[i][j] -= x * re[k][j] - y * im[k][j];
                        im[i][j] -= x * im[k][j] + y * re[k][j];
                    }
                }
                double s = 0;
                for (int j = 0; j < n; j++) {
                    s += re[i][j] * re[i][j] + im[i][j] * im[i][j];
                }
                for (int j = 0; j < n; j++) {
                    re[i][j] /= Math.sqrt(s);
                    im[i][j] /= Math.sqrt(s);
                }
            }
        }
        return Operator.of(re, im);
    }

    /** U diag(values) U*, Hermitian exactly. */
    static HermitianOperator hermitian(double[] values, Operator u) {
        Operator a = u.times(HermitianOperator.diagonal(values)).times(u.adjoint());
        return HermitianPart.nearest(a);
    }

    /** A normalised ket, as a column. */
    static Operator ket(int n, boolean complex, Random random) {
        Operator u = unitary(n, complex, random);
        double[] re = new double[n];
        double[] im = new double[n];
        for (int i = 0; i < n; i++) {
            re[i] = u.re(0, i);
            im[i] = u.im(0, i);
        }
        return Operator.ofRowMajor(n, 1, re, im);
    }

    /** Any matrix with Gaussian entries. */
    static Operator gaussian(int rows, int columns, boolean complex, Random random) {
        double[] re = random.doubles(rows * (long) columns).map(x -> 2 * x - 1).toArray();
        double[] im = random.doubles(complex ? rows * (long) columns : 0)
                .map(x -> 2 * x - 1)
                .toArray();
        return Operator.ofRowMajor(rows, columns, re, im);
    }
}
