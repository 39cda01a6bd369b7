package org.minorant.core.internal.kernel;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.util.Random;
import org.junit.jupiter.api.Test;

class ProductsTest {

    private static double[] random(int n, int spread, Random r) {
        double[] a = new double[n];
        for (int i = 0; i < n; i++) {
            a[i] = Math.scalb(r.nextGaussian(), spread == 0 ? 0 : r.nextInt(spread) - spread / 2);
        }
        return a;
    }

    /** One part of an entry, exactly: Σ xy. */
    private static BigDecimal exact(double[] x, double[] y, int i, int j, int inner, int columns) {
        BigDecimal s = BigDecimal.ZERO;
        for (int k = 0; x.length != 0 && y.length != 0 && k < inner; k++) {
            s = s.add(new BigDecimal(x[i * inner + k]).multiply(new BigDecimal(y[k * columns + j])));
        }
        return s;
    }

    @Test
    void everyEntryIsWithinTheStatedBound() {
        Random r = new Random(11);
        int[][] shapes = {
            {1, 1, 1}, {2, 3, 5}, {5, 4, 3}, {7, 33, 20}, {4, 64, 17}, {3, 130, 40}, {9, 2, 300}, {6, 31, 1}
        };
        for (int[] s : shapes) {
            for (int kind = 0; kind < 4; kind++) {
                for (int spread : new int[] {0, 80}) {
                    double[] are = random(s[0] * s[1], spread, r);
                    double[] bre = random(s[1] * s[2], spread, r);
                    double[] aim = kind % 2 == 0 ? new double[0] : random(s[0] * s[1], spread, r);
                    double[] bim = kind / 2 == 0 ? new double[0] : random(s[1] * s[2], spread, r);
                    check(s, are, aim, bre, bim);
                }
            }
        }
    }

    private static void check(int[] s, double[] are, double[] aim, double[] bre, double[] bim) {
        int inner = s[1];
        int columns = s[2];
        double[] cre = new double[s[0] * columns];
        double[] cim = aim.length == 0 && bim.length == 0 ? new double[0] : new double[s[0] * columns];
        Products.multiply(s[0], inner, columns, are, aim, bre, bim, cre, cim);
        for (int i = 0; i < s[0]; i++) {
            for (int j = 0; j < columns; j++) {
                BigDecimal re = exact(are, bre, i, j, inner, columns).subtract(exact(aim, bim, i, j, inner, columns));
                BigDecimal im = exact(are, bim, i, j, inner, columns).add(exact(aim, bre, i, j, inner, columns));
                double size = 0;
                for (int k = 0; k < inner; k++) {
                    double x = aim.length == 0 ? 0 : aim[i * inner + k];
                    double y = bim.length == 0 ? 0 : bim[k * columns + j];
                    size += Math.hypot(are[i * inner + k], x) * Math.hypot(bre[k * columns + j], y);
                }
                double computed = cim.length == 0 ? 0 : cim[i * columns + j];
                double dx = re.subtract(new BigDecimal(cre[i * columns + j])).doubleValue();
                double dy = im.subtract(new BigDecimal(computed)).doubleValue();
                double bound = Products.gamma(inner) * size + Products.underflow(inner);
                assertTrue(Math.hypot(dx, dy) <= bound, () -> "inner " + inner + ", error " + Math.hypot(dx, dy));
            }
        }
    }

    @Test
    void integersAreExact() {
        // small integers round nowhere, so that a term lost or counted twice shows at once
        Random r = new Random(2);
        for (int inner = 1; inner < 140; inner++) {
            double[] a = random(3 * inner, 0, r);
            double[] b = random(inner * 9, 0, r);
            double[] c = random(3 * inner, 0, r);
            double[] d = random(inner * 9, 0, r);
            for (double[] x : new double[][] {a, b, c, d}) {
                for (int i = 0; i < x.length; i++) {
                    x[i] = Math.rint(100 * x[i]);
                }
            }
            double[] re = new double[27];
            double[] im = new double[27];
            Products.multiply(3, inner, 9, a, c, b, d, re, im);
            for (int i = 0; i < 3; i++) {
                for (int j = 0; j < 9; j++) {
                    double x = 0;
                    double y = 0;
                    for (int k = 0; k < inner; k++) {
                        x += a[i * inner + k] * b[k * 9 + j] - c[i * inner + k] * d[k * 9 + j];
                        y += a[i * inner + k] * d[k * 9 + j] + c[i * inner + k] * b[k * 9 + j];
                    }
                    assertEquals(x, re[i * 9 + j]);
                    assertEquals(y, im[i * 9 + j]);
                }
            }
        }
    }

    @Test
    void depthGrowsSlowly() {
        assertEquals(5, Products.depth(1));
        assertEquals(3 + 16 + 8, Products.depth(256));
        assertEquals(3 + 16 + 64, Products.depth(2048));
    }
}
