package org.minorant.core.pair;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.util.SplittableRandom;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.PositiveOperator;
import org.minorant.core.internal.number.DoubleDouble;

/** Representations of the unitary group: unitary, multiplicative, with the characters of Schur, and windows that agree with the whole. */
class IrrepOverlapsTest {

    /** A unitary to 1e-30: eigenvectors of a random Hermitian matrix. */
    private static DigitMatrix unitary(int d, int seed) {
        SplittableRandom random = new SplittableRandom(seed);
        double[][] x = new double[d][d];
        double[][] y = new double[d][d];
        for (int i = 0; i < d; i++) {
            x[i][i] = random.nextDouble();
            for (int j = 0; j < i; j++) {
                x[i][j] = x[j][i] = random.nextDouble() - 0.5;
                y[i][j] = random.nextDouble() - 0.5;
                y[j][i] = -y[i][j];
            }
            x[i][i] += d;
        }
        PositiveOperator a = PositiveOperator.of(x, y);
        DigitMatrix m = DigitMatrix.zero(d, d);
        for (int i = 0; i < d; i++) {
            for (int j = 0; j < d; j++) {
                m.re()[i][j] = new BigDecimal(a.re(i, j));
                m.im()[i][j] = new BigDecimal(a.im(i, j));
            }
        }
        return DigitSpectrum.of(m).vectors();
    }

    private static QuditOverlaps rounded(DigitMatrix u) {
        int d = u.rows();
        DoubleDouble[][] re = new DoubleDouble[d][d];
        DoubleDouble[][] im = new DoubleDouble[d][d];
        for (int i = 0; i < d; i++) {
            for (int j = 0; j < d; j++) {
                re[i][j] = DoubleDouble.of(u.re()[i][j]);
                im[i][j] = DoubleDouble.of(u.im()[i][j]);
            }
        }
        return new QuditOverlaps(re, im);
    }

    private static PatternWindow window(int[] shape, double[] logs, double threshold) {
        return new PatternWindow(shape, logs, threshold, 10_000);
    }

    /** π_λ(U), boxes added to row after row. */
    private static IrrepOverlaps overlaps(QuditOverlaps u, int[] shape, double[] logs, double rows, double columns) {
        int[] s = new int[shape.length];
        IrrepOverlaps o = IrrepOverlaps.trivial(window(s, logs, rows), window(s, logs, columns), u.isReal());
        for (int row = 0; row < shape.length; row++) {
            for (int box = 0; box < shape[row]; box++) {
                s[row]++;
                o = o.plusBox(u, window(s, logs, rows), window(s, logs, columns), row, () -> {});
            }
        }
        return o;
    }

    private static EnclosedMatrix matrix(IrrepOverlaps o) {
        EnclosedMatrix.Builder b =
                EnclosedMatrix.builder(o.rows().size(), o.columns().size());
        for (int i = 0; i < o.rows().size(); i++) {
            for (int j = 0; j < o.columns().size(); j++) {
                b.set(
                        i,
                        j,
                        o.re(i, j).hi(),
                        o.re(i, j).lo(),
                        o.im(i, j).hi(),
                        o.im(i, j).lo(),
                        o.radius(i, j));
            }
        }
        return b.build();
    }

    private static EnclosedMatrix whole(QuditOverlaps u, int... shape) {
        double all = Double.NEGATIVE_INFINITY;
        return matrix(overlaps(u, shape, new double[shape.length], all, all));
    }

    private static int[] shape(String text) {
        return java.util.Arrays.stream(text.split(" "))
                .mapToInt(Integer::parseInt)
                .toArray();
    }

    /** An enclosure of a matrix that is zero holds zero in every entry, and is narrow: the dimension times 1e-26 is far above what fewer than 20 steps of about 1e-30 each leave. */
    private static void isZero(EnclosedMatrix m) {
        for (int i = 0; i < m.rows(); i++) {
            for (int j = 0; j < m.columns(); j++) {
                double size = Math.hypot(m.re(i, j), m.im(i, j));
                assertTrue(size <= m.radius(i, j), size + " but " + m.radius(i, j));
                assertTrue(m.radius(i, j) <= m.rows() * 1e-26, "radius " + m.radius(i, j));
            }
        }
    }

    @ParameterizedTest
    @CsvSource({"3 0", "4 2", "5 2 0", "4 3 1", "2 2 2", "6 3 0", "3 2 1 0", "4 1 1 0", "2 2 1 1", "2 1 1 0 0"})
    void isUnitary(String text) {
        int[] shape = shape(text);
        EnclosedMatrix p = whole(rounded(unitary(shape.length, 1)), shape);
        assertEquals(Partitions.dimension(shape).intValue(), p.rows());
        isZero(p.adjoint().times(p).minus(EnclosedMatrix.identity(p.rows())));
    }

    @ParameterizedTest
    @CsvSource({"4 2", "4 2 0", "3 2 1", "3 2 1 0", "2 2 1 0", "2 1 1 0 0"})
    void isMultiplicative(String text) {
        int[] shape = shape(text);
        DigitMatrix u = unitary(shape.length, 2);
        DigitMatrix v = unitary(shape.length, 3);
        EnclosedMatrix product = whole(rounded(u.times(v)), shape);
        isZero(whole(rounded(u), shape).times(whole(rounded(v), shape)).minus(product));
    }

    /** By the formula of Jacobi and Trudi s_λ = det h_{λ_i − i + j}, with complete symmetric functions from k h_k = Σ_i p_i h_{k−i} and p_i = Tr U^i. */
    @ParameterizedTest
    @CsvSource({"5 2 0", "4 3 1", "3 2 1 0", "2 2 1 1", "4 2"})
    void hasTheCharacterOfSchur(String text) {
        int[] shape = shape(text);
        int d = shape.length;
        DigitMatrix u = unitary(d, 4);
        int most = shape[0] + d;
        double[][] h = new double[most][2];
        double[][] p = new double[most][2];
        DigitMatrix power = DigitMatrix.identity(d);
        for (int k = 1; k < most; k++) {
            power = power.times(u).rounded(DigitSpectrum.DIGITS);
            for (int i = 0; i < d; i++) {
                p[k][0] += power.re()[i][i].doubleValue();
                p[k][1] += power.im()[i][i].doubleValue();
            }
        }
        h[0][0] = 1;
        for (int k = 1; k < most; k++) {
            for (int i = 1; i <= k; i++) {
                double[] t = times(p[i], h[k - i]);
                h[k][0] += t[0] / k;
                h[k][1] += t[1] / k;
            }
        }
        double[] schur = determinant(shape, h, 0, new boolean[d]);
        EnclosedMatrix m = whole(rounded(u), shape);
        double re = 0;
        double im = 0;
        for (int i = 0; i < m.rows(); i++) {
            re += m.re(i, i);
            im += m.im(i, i);
        }
        // a few hundred roundings of numbers that stay below a hundred
        assertEquals(schur[0], re, 1e-11);
        assertEquals(schur[1], im, 1e-11);
    }

    private static double[] times(double[] a, double[] b) {
        return new double[] {a[0] * b[0] - a[1] * b[1], a[0] * b[1] + a[1] * b[0]};
    }

    /** det h_{λ_i − i + j} over the rows from i on and the free columns. */
    private static double[] determinant(int[] shape, double[][] h, int i, boolean[] used) {
        if (i == shape.length) {
            return new double[] {1, 0};
        }
        double[] sum = {0, 0};
        int sign = 1;
        for (int j = 0; j < shape.length; j++) {
            if (used[j]) {
                continue;
            }
            int k = shape[i] - i + j;
            if (k >= 0) {
                used[j] = true;
                double[] t = times(h[k], determinant(shape, h, i + 1, used));
                used[j] = false;
                sum[0] += sign * t[0];
                sum[1] += sign * t[1];
            }
            sign = -sign;
        }
        return sum;
    }

    @ParameterizedTest
    @CsvSource({"7 3 0, -9, -6", "4 2 1 0, -7, -9", "9 0 0, -4, -30"})
    void windowsAreParts(String text, double rows, double columns) {
        int[] shape = shape(text);
        double[] logs = {0, -1.25, -2.5, -2.75};
        QuditOverlaps u = rounded(unitary(shape.length, 5));
        double all = Double.NEGATIVE_INFINITY;
        IrrepOverlaps whole = overlaps(u, shape, logs, all, all);
        IrrepOverlaps part = overlaps(u, shape, logs, rows, columns);
        assertTrue(part.rows().size() < whole.rows().size());
        for (int i = 0; i < part.rows().size(); i++) {
            for (int j = 0; j < part.columns().size(); j++) {
                int p = whole.rows().find(part.rows().pattern(i));
                int q = whole.columns().find(part.columns().pattern(j));
                double off = Math.hypot(
                        part.re(i, j).minus(whole.re(p, q)).hi(),
                        part.im(i, j).minus(whole.im(p, q)).hi());
                assertTrue(off <= part.radius(i, j) + whole.radius(p, q));
            }
        }
    }
}
