package org.minorant.bounds;

import java.util.ArrayList;
import java.util.List;
import java.util.Random;
import org.minorant.core.DensityOperator;
import org.minorant.core.Operator;
import org.minorant.core.PositiveOperator;

/** Channels for tests: words of a pure-state channel, classical words, and random ones with spectra made nasty on purpose. */
final class Channels {

    private Channels() {}

    /** Kets ψ± = (√((1+c)/2), ±√((1−c)/2)) of overlap c, in the basis in which their equal mixture is diagonal. */
    static double[] ket(double overlap, boolean minus) {
        double b = Math.sqrt((1 - overlap) / 2);
        return new double[] {Math.sqrt((1 + overlap) / 2), minus ? -b : b};
    }

    /** The 2^n words of n uses of the binary pure-state channel: tensor products of its kets. */
    static List<DensityOperator> pureWords(double overlap, int n) {
        List<DensityOperator> words = new ArrayList<>();
        for (int w = 0; w < 1 << n; w++) {
            double[] word = {1};
            for (int use = 0; use < n; use++) {
                word = tensor(word, ket(overlap, (w >> use & 1) == 1));
            }
            words.add(DensityOperator.ofKet(word));
        }
        return words;
    }

    static double[] tensor(double[] a, double[] b) {
        double[] c = new double[a.length * b.length];
        for (int i = 0; i < c.length; i++) {
            c[i] = a[i / b.length] * b[i % b.length];
        }
        return c;
    }

    /** The rows of n uses of a classical channel, words in lexicographic order. */
    static double[][] words(double[][] rows, int n) {
        double[][] words = {{1}};
        for (int use = 0; use < n; use++) {
            double[][] longer = new double[words.length * rows.length][];
            for (int w = 0; w < longer.length; w++) {
                longer[w] = tensor(words[w / rows.length], rows[w % rows.length]);
            }
            words = longer;
        }
        return words;
    }

    static double[] uniform(int letters) {
        double[] p = new double[letters];
        java.util.Arrays.fill(p, 1.0 / letters);
        return p;
    }

    /** A distribution that sums to one within rounding; sometimes uniform, sometimes with zeros or tiny entries. */
    static double[] distribution(Random random, int letters) {
        int kind = random.nextInt(5);
        double[] p = new double[letters];
        for (int x = 0; x < letters; x++) {
            p[x] = kind == 0 ? 1 : -Math.log(1 - random.nextDouble());
            if (kind == 1 && x > 0 && random.nextBoolean()) {
                p[x] = 0;
            }
            if (kind == 2 && x > 0) {
                p[x] *= Math.pow(10, -12 * random.nextDouble());
            }
        }
        return normalised(p);
    }

    static double[] normalised(double[] p) {
        double[] q = p.clone();
        for (int pass = 0; pass < 3; pass++) {
            double sum = 0;
            for (double v : q) {
                sum += v;
            }
            for (int x = 0; x < q.length; x++) {
                q[x] /= sum;
            }
        }
        return q;
    }

    /** A random channel: classical, pure, mixed or both, of few letters. */
    static ClassicalQuantumChannel random(Random random, int mostLetters, int mostDimension) {
        int letters = 1 + random.nextInt(mostLetters);
        int dimension = 2 + random.nextInt(mostDimension - 1);
        int kind = random.nextInt(4);
        if (kind == 0) {
            return randomClassical(random, mostLetters, mostDimension);
        }
        List<DensityOperator> outputs = new ArrayList<>();
        for (int x = 0; x < letters; x++) {
            boolean pure = kind == 1 || (kind == 3 && random.nextBoolean());
            outputs.add(pure ? state(random, dimension, 1) : state(random, dimension));
        }
        if (letters > 1 && random.nextInt(6) == 0) {
            outputs.set(1, outputs.get(0));
        }
        return ClassicalQuantumChannel.of(outputs);
    }

    /** A random stochastic matrix, with zeros and tiny entries. */
    static ClassicalQuantumChannel randomClassical(Random random, int mostLetters, int mostOutcomes) {
        double[][] rows = new double[1 + random.nextInt(mostLetters)][];
        int outcomes = 2 + random.nextInt(mostOutcomes - 1);
        for (int x = 0; x < rows.length; x++) {
            rows[x] = distribution(random, outcomes);
        }
        return ClassicalQuantumChannel.ofStochasticMatrix(rows);
    }

    /** A state whose spectrum is prescribed: random, clustered, deficient or graded. */
    static DensityOperator state(Random random, int dimension) {
        int kind = random.nextInt(4);
        int rank = kind == 1 ? 1 + random.nextInt(dimension) : dimension;
        double[] lambda = new double[rank];
        for (int i = 0; i < rank; i++) {
            lambda[i] = kind == 0
                    ? -Math.log(1 - random.nextDouble())
                    : kind == 2 ? Math.pow(10, -4 * i * random.nextDouble()) : 1 + 1e-9 * random.nextGaussian();
        }
        return rotated(random, dimension, normalised(lambda));
    }

    static DensityOperator state(Random random, int dimension, int rank) {
        return rotated(random, dimension, uniform(rank));
    }

    /** Random orthonormal columns times the roots of the eigenvalues, scaled so that the trace is one within rounding. */
    private static DensityOperator rotated(Random random, int d, double[] lambda) {
        int r = lambda.length;
        double[][] re = new double[r][d];
        double[][] im = new double[r][d];
        for (int c = 0; c < r; c++) {
            for (int i = 0; i < d; i++) {
                re[c][i] = random.nextGaussian();
                im[c][i] = random.nextGaussian();
            }
            for (int pass = 0; pass < 2; pass++) {
                for (int b = 0; b < c; b++) {
                    subtractProjection(re[c], im[c], re[b], im[b]);
                }
                scale(re[c], im[c], 1 / norm(re[c], im[c]));
            }
        }
        for (int c = 0; c < r; c++) {
            scale(re[c], im[c], Math.sqrt(lambda[c]));
        }
        return ofColumns(re, im);
    }

    /** The state with these columns as its factor, scaled to trace one. */
    static DensityOperator ofColumns(double[][] re, double[][] im) {
        int r = re.length;
        int d = re[0].length;
        for (int pass = 0; pass < 2; pass++) {
            double trace = 0;
            for (int c = 0; c < r; c++) {
                double norm = norm(re[c], im[c]);
                trace += norm * norm;
            }
            for (int c = 0; c < r; c++) {
                scale(re[c], im[c], 1 / Math.sqrt(trace));
            }
        }
        double[] flatRe = new double[d * r];
        double[] flatIm = new double[d * r];
        for (int i = 0; i < d; i++) {
            for (int c = 0; c < r; c++) {
                flatRe[i * r + c] = re[c][i];
                flatIm[i * r + c] = im[c][i];
            }
        }
        return DensityOperator.of(PositiveOperator.ofFactor(Operator.ofRowMajor(d, r, flatRe, flatIm)));
    }

    private static void subtractProjection(double[] xr, double[] xi, double[] yr, double[] yi) {
        double a = 0;
        double b = 0;
        for (int i = 0; i < xr.length; i++) {
            a += yr[i] * xr[i] + yi[i] * xi[i];
            b += yr[i] * xi[i] - yi[i] * xr[i];
        }
        for (int i = 0; i < xr.length; i++) {
            xr[i] -= a * yr[i] - b * yi[i];
            xi[i] -= a * yi[i] + b * yr[i];
        }
    }

    private static double norm(double[] re, double[] im) {
        double s = 0;
        for (int i = 0; i < re.length; i++) {
            s += re[i] * re[i] + im[i] * im[i];
        }
        return Math.sqrt(s);
    }

    private static void scale(double[] re, double[] im, double factor) {
        for (int i = 0; i < re.length; i++) {
            re[i] *= factor;
            im[i] *= factor;
        }
    }
}
