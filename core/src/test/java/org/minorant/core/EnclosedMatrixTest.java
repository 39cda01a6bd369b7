package org.minorant.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.math.MathContext;
import java.math.RoundingMode;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.EnumSource;

/** Every operation on balls against exact decimal arithmetic on a point of each ball. */
class EnclosedMatrixTest {

    private static final MathContext WIDE = new MathContext(60, RoundingMode.HALF_EVEN);

    private enum Kind {
        RANDOM,
        GRADED,
        TINY,
        HUGE_AND_TINY
    }

    /** An enclosed matrix and exact entries that lie on the rim of its balls. */
    private record Held(EnclosedMatrix ball, BigDecimal[][] re, BigDecimal[][] im) {}

    private static Held draw(int m, int n, Kind kind, boolean complex, boolean exact, Random r) {
        EnclosedMatrix.Builder b = EnclosedMatrix.builder(m, n);
        BigDecimal[][] re = new BigDecimal[m][n];
        BigDecimal[][] im = new BigDecimal[m][n];
        for (int i = 0; i < m; i++) {
            for (int j = 0; j < n; j++) {
                int e = switch (kind) {
                    case RANDOM -> 0;
                    case GRADED -> -9 * (i + 2 * j);
                    case TINY -> -1000;
                    case HUGE_AND_TINY -> (i + j) % 2 == 0 ? 450 : -450;
                };
                double x = Math.scalb(r.nextGaussian(), e);
                double y = complex ? Math.scalb(r.nextGaussian(), e) : 0;
                double xl = 0.4 * Math.ulp(x) * (r.nextDouble() - 0.5);
                double yl = complex ? 0.4 * Math.ulp(y) * (r.nextDouble() - 0.5) : 0;
                double radius = exact ? 0 : Math.scalb(r.nextDouble(), e - 20 - r.nextInt(90));
                b.set(i, j, x, xl, y, yl, radius);
                // radius · (cos, sin) with cos² + sin² just below one
                double c = r.nextDouble();
                double s = complex ? Math.sqrt(1 - c * c) * (1 - 1e-15) : 0;
                re[i][j] = sum(x, xl).add(new BigDecimal(radius).multiply(new BigDecimal(c)));
                im[i][j] = sum(y, yl).subtract(new BigDecimal(radius).multiply(new BigDecimal(s)));
            }
        }
        return new Held(b.build(), re, im);
    }

    private static BigDecimal sum(double hi, double lo) {
        return new BigDecimal(hi).add(new BigDecimal(lo));
    }

    /** |exact − midpoint| ≤ radius at every entry. */
    private static void contains(EnclosedMatrix a, BigDecimal[][] re, BigDecimal[][] im, String what) {
        for (int i = 0; i < a.rows(); i++) {
            for (int j = 0; j < a.columns(); j++) {
                BigDecimal x = re[i][j].subtract(sum(a.re(i, j), a.reTail(i, j)));
                BigDecimal y = im[i][j].subtract(sum(a.im(i, j), a.imTail(i, j)));
                BigDecimal r = new BigDecimal(a.radius(i, j));
                assertTrue(
                        x.multiply(x).add(y.multiply(y)).compareTo(r.multiply(r)) <= 0,
                        what + ": " + x.doubleValue() + ", " + y.doubleValue() + " beyond " + a.radius(i, j));
            }
        }
    }

    private static BigDecimal[][] combine(BigDecimal[][] a, BigDecimal[][] b, int sign) {
        BigDecimal[][] c = new BigDecimal[a.length][a[0].length];
        for (int i = 0; i < a.length; i++) {
            for (int j = 0; j < a[0].length; j++) {
                c[i][j] = a[i][j].add(b[i][j].multiply(BigDecimal.valueOf(sign)));
            }
        }
        return c;
    }

    private static BigDecimal[][] product(BigDecimal[][] a, BigDecimal[][] b) {
        BigDecimal[][] c = new BigDecimal[a.length][b[0].length];
        for (int i = 0; i < a.length; i++) {
            for (int j = 0; j < b[0].length; j++) {
                c[i][j] = BigDecimal.ZERO;
                for (int k = 0; k < b.length; k++) {
                    c[i][j] = c[i][j].add(a[i][k].multiply(b[k][j]));
                }
            }
        }
        return c;
    }

    private static BigDecimal[][] transpose(BigDecimal[][] a, int sign) {
        BigDecimal[][] t = new BigDecimal[a[0].length][a.length];
        for (int i = 0; i < a.length; i++) {
            for (int j = 0; j < a[0].length; j++) {
                t[j][i] = a[i][j].multiply(BigDecimal.valueOf(sign));
            }
        }
        return t;
    }

    @ParameterizedTest
    @EnumSource(Kind.class)
    void productsHoldTheExactResult(Kind kind) {
        Random r = new Random(kind.ordinal());
        for (int[] s : new int[][] {{1, 1, 1}, {2, 3, 2}, {3, 17, 4}, {2, 40, 18}}) {
            for (int mode = 0; mode < 16; mode++) {
                Held a = draw(s[0], s[1], kind, mode % 2 == 1, mode / 4 % 2 == 1, r);
                Held b = draw(s[1], s[2], kind, mode / 2 % 2 == 1, mode / 8 == 1, r);
                BigDecimal[][] re = combine(product(a.re, b.re), product(a.im, b.im), -1);
                BigDecimal[][] im = combine(product(a.re, b.im), product(a.im, b.re), 1);
                contains(a.ball.times(b.ball), re, im, kind + " product, inner " + s[1] + ", mode " + mode);
            }
        }
    }

    @ParameterizedTest
    @EnumSource(Kind.class)
    void everythingElseHoldsTheExactResult(Kind kind) {
        Random r = new Random(100 + kind.ordinal());
        for (int mode = 0; mode < 8; mode++) {
            Held a = draw(3, 3, kind, mode % 2 == 1, mode / 4 == 1, r);
            Held b = draw(3, 3, kind, mode / 2 % 2 == 1, false, r);
            contains(a.ball.plus(b.ball), combine(a.re, b.re, 1), combine(a.im, b.im, 1), kind + " sum");
            contains(a.ball.minus(b.ball), combine(a.re, b.re, -1), combine(a.im, b.im, -1), kind + " difference");
            contains(a.ball.adjoint(), transpose(a.re, 1), transpose(a.im, -1), kind + " adjoint");
            for (double f : new double[] {0, 1, -0.25, 0x1p-60, 3, 1e-200, -Math.PI}) {
                BigDecimal[][] re = scale(a.re, f);
                contains(a.ball.times(f), re, scale(a.im, f), kind + " times " + f);
            }
            BigDecimal trace = a.re[0][0].add(a.re[1][1]).add(a.re[2][2]);
            assertTrue(a.ball.traceRe().contains(trace), kind + " trace");
            assertTrue(a.ball.enclosureRe(1, 2).contains(a.re[1][2]), kind + " entry");
            BigDecimal squares = BigDecimal.ZERO;
            for (int i = 0; i < 3; i++) {
                for (int j = 0; j < 3; j++) {
                    BigDecimal m2 = a.re[i][j].pow(2).add(a.im[i][j].pow(2));
                    squares = squares.add(m2);
                    BigDecimal upper = new BigDecimal(a.ball.modulusUpper(i, j));
                    assertTrue(upper.pow(2).compareTo(m2) >= 0, kind + " modulus");
                }
            }
            double norm = a.ball.frobeniusUpper();
            assertTrue(new BigDecimal(norm).pow(2).compareTo(squares) >= 0, kind + " norm");
            assertTrue(norm <= squares.sqrt(WIDE).doubleValue() * 1.001 + 1e-300, kind + " norm " + norm);
        }
    }

    private static BigDecimal[][] scale(BigDecimal[][] a, double f) {
        BigDecimal[][] c = new BigDecimal[a.length][a[0].length];
        for (int i = 0; i < a.length; i++) {
            for (int j = 0; j < a[0].length; j++) {
                c[i][j] = a[i][j].multiply(new BigDecimal(f));
            }
        }
        return c;
    }

    @Test
    void radiiSurviveUnderflowOfTheBound() {
        // γ|A| is below the smallest double here, γ|A||B| is not
        Operator a = Operator.ofReal(new double[][] {{0x1p-1000, 0x1p-1000}});
        EnclosedMatrix.Builder b = EnclosedMatrix.builder(2, 1);
        b.set(0, 0, 0x1p1000, 0x1p940, 0, 0, 0).set(1, 0, -0x1p1000, 0x1p930, 0, 0, 0);
        EnclosedMatrix c = EnclosedMatrix.of(a).times(b.build());
        assertTrue(c.radius(0, 0) >= 0x1p-106 && c.radius(0, 0) < 1e-29, "" + c.radius(0, 0));
        EnclosedMatrix tiny = EnclosedMatrix.builder(1, 2)
                .set(0, 0, 0, 0, 0, 0, Double.MIN_VALUE)
                .set(0, 1, 0, 0, 0, 0, Double.MIN_VALUE)
                .build();
        // √2 of the smallest double
        assertTrue(tiny.frobeniusUpper() >= 2 * Double.MIN_VALUE);
    }

    @Test
    void accuracyIsThatOfTwoDoubles() {
        Random r = new Random(9);
        for (int n : new int[] {4, 16, 64}) {
            double[] x = new double[n * n];
            for (int i = 0; i < x.length; i++) {
                x[i] = r.nextGaussian() / Math.sqrt(n);
            }
            EnclosedMatrix a = EnclosedMatrix.of(Operator.ofRowMajor(n, n, x, new double[0]));
            // ‖γ|A||A|‖ ≤ γ‖A‖²_F = γn
            double radius = a.times(a).minus(a.times(a).midpoint()).frobeniusUpper();
            assertTrue(radius < (3.5 * n + 230) * n * 0x1p-105, n + ": " + radius);
        }
    }

    @Test
    void exactCases() {
        EnclosedMatrix one = EnclosedMatrix.identity(3);
        EnclosedMatrix zero = one.times(0);
        assertEquals(0, zero.times(one).frobeniusUpper());
        assertEquals(0, one.minus(one).frobeniusUpper());
        assertTrue(one.traceRe().contains(3) && one.traceRe().width() < 1e-14);
        assertTrue(one.isReal());
        assertEquals(Operator.ofReal(new double[][] {{1, 0, 0}, {0, 1, 0}, {0, 0, 1}}), one.toOperator());
        Operator y = Operator.of(new double[2][2], new double[][] {{0, -1}, {1, 0}});
        assertEquals(y, EnclosedMatrix.of(y).toOperator());
        assertEquals(-1, EnclosedMatrix.of(y).im(0, 1));
        EnclosedMatrix far = EnclosedMatrix.of(Operator.ofReal(new double[][] {{1e300}}));
        assertEquals(Double.POSITIVE_INFINITY, far.times(far).frobeniusUpper());
    }

    @Test
    void refusals() {
        EnclosedMatrix a = EnclosedMatrix.builder(2, 3).build();
        assertThrows(InvalidInputException.class, () -> a.times(a));
        assertThrows(InvalidInputException.class, () -> a.plus(a.adjoint()));
        assertThrows(InvalidInputException.class, () -> a.minus(a.adjoint()));
        assertThrows(InvalidInputException.class, a::traceRe);
        assertThrows(InvalidInputException.class, () -> a.times(Double.NaN));
        assertThrows(InvalidInputException.class, () -> a.times(Double.NEGATIVE_INFINITY));
        assertThrows(InvalidInputException.class, () -> EnclosedMatrix.builder(0, 3));
    }
}
