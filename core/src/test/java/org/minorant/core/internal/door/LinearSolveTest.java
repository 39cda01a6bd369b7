package org.minorant.core.internal.door;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.SplittableRandom;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

/** Solutions put back into their equations, and what the door refuses. */
class LinearSolveTest {

    private static double[][] random(SplittableRandom r, int rows, int columns, double grade) {
        double[][] a = new double[rows][columns];
        for (double[] row : a) {
            double scale = Math.pow(grade, r.nextDouble());
            for (int j = 0; j < columns; j++) {
                row[j] = scale * (r.nextDouble() - 0.5);
            }
        }
        return a;
    }

    private static double[][] copy(double[][] a) {
        double[][] c = new double[a.length][];
        for (int i = 0; i < a.length; i++) {
            c[i] = a[i].clone();
        }
        return c;
    }

    @ParameterizedTest
    @CsvSource({"1, 1, 1", "2, 5, 1", "7, 3, 1e-20", "24, 2, 1e-40", "40, 40, 1e-300"})
    void solutionsObeyTheirEquations(int n, int m, double grade) {
        SplittableRandom r = new SplittableRandom(n);
        for (boolean real : new boolean[] {true, false}) {
            double[][] ar = random(r, n, n, grade);
            double[][] br = random(r, n, m, 1);
            double[][] ai = new double[n][n];
            double[][] bi = new double[n][m];
            for (int i = 0; i < n && !real; i++) {
                // rows keep their scale
                double scale = Math.abs(ar[i][0]);
                for (int j = 0; j < n; j++) {
                    ai[i][j] = scale * (r.nextDouble() - 0.5);
                }
                for (int j = 0; j < m; j++) {
                    bi[i][j] = r.nextDouble() - 0.5;
                }
            }
            double[][] xr = copy(br);
            double[][] xi = copy(bi);
            LinearSolve.solve(ar, ai, xr, xi);
            for (int i = 0; i < n; i++) {
                for (int k = 0; k < m; k++) {
                    double re = -br[i][k];
                    double im = -bi[i][k];
                    double size = 0;
                    for (int j = 0; j < n; j++) {
                        re += ar[i][j] * xr[j][k] - ai[i][j] * xi[j][k];
                        im += ar[i][j] * xi[j][k] + ai[i][j] * xr[j][k];
                        double a = Math.hypot(ar[i][j], ai[i][j]);
                        size += a * Math.hypot(xr[j][k], xi[j][k]);
                    }
                    // backward error n · 2^-53 times the growth of pivoting, some tens for random matrices; a light row
                    // may carry
                    // errors of the heavier ones times its multipliers
                    assertTrue(Math.hypot(re, im) <= n * 1e-12 * size, () -> "row of a system of " + n);
                }
            }
        }
    }

    @Test
    void aSingularMatrixLeavesNumbersThatAreNotFinite() {
        double[][] x = {{1}, {2}};
        LinearSolve.solve(new double[][] {{1, 1}, {1, 1}}, new double[2][2], x, new double[2][1]);
        assertFalse(Double.isFinite(x[0][0]) && Double.isFinite(x[1][0]));
    }

    @ParameterizedTest
    @ValueSource(doubles = {Double.NaN, Double.POSITIVE_INFINITY})
    void numbersThatAreNotFiniteComeBackAsNaN(double bad) {
        double[][] x = {{1}};
        double[][] y = {{0}};
        LinearSolve.solve(new double[][] {{1}}, new double[][] {{bad}}, x, y);
        assertTrue(Double.isNaN(x[0][0]) && Double.isNaN(y[0][0]));
        double[][] b = {{bad}};
        LinearSolve.solve(new double[][] {{1}}, new double[1][1], b, new double[1][1]);
        assertTrue(Double.isNaN(b[0][0]));
    }

    @Test
    void theMatrixIsLeftAlone() {
        double[][] a = {{1, 2}, {3, 4}};
        LinearSolve.solve(a, new double[2][2], new double[][] {{1}, {2}}, new double[2][1]);
        assertArrayEquals(new double[][] {{1, 2}, {3, 4}}, a);
    }

    @Test
    void refusals() {
        double[][] one = {{1}};
        double[][] zero = {{0}};
        assertThrows(
                IllegalArgumentException.class,
                () -> LinearSolve.solve(new double[][] {{1, 2}}, new double[1][2], new double[1][1], new double[1][1]));
        assertThrows(
                IllegalArgumentException.class, () -> LinearSolve.solve(one, zero, new double[2][1], new double[2][1]));
        assertThrows(
                IllegalArgumentException.class, () -> LinearSolve.solve(one, zero, new double[1][0], new double[1][0]));
    }
}
