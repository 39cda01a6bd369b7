package org.minorant.core.internal.dd;

import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.util.Random;
import org.junit.jupiter.api.Test;

/** Products in double-double against exact decimal arithmetic. */
class DdProductsTest {

    private enum Kind {
        RANDOM,
        GRADED,
        CANCELLING
    }

    private static double[][][] draw(int m, int n, Kind kind, Random r) {
        double[][][] a = new double[2][m][n];
        for (int i = 0; i < m; i++) {
            for (int j = 0; j < n; j++) {
                double h = kind == Kind.GRADED ? Math.scalb(r.nextGaussian(), -12 * (i + j)) : r.nextGaussian();
                a[0][i][j] = h;
                a[1][i][j] = Math.ulp(h) * (r.nextDouble() - 0.5);
            }
        }
        return a;
    }

    private static BigDecimal value(double[][][] a, int i, int j) {
        return new BigDecimal(a[0][i][j]).add(new BigDecimal(a[1][i][j]));
    }

    @Test
    void everyEntryIsWithinGamma() {
        Random r = new Random(12);
        double worst = 0;
        for (Kind kind : Kind.values()) {
            for (int n : new int[] {1, 2, 3, 8, 15, 16, 17, 18, 33, 70}) {
                for (int p : new int[] {2, 19}) {
                    worst = Math.max(worst, check(kind, n, p, r));
                }
            }
        }
        // the bound is of the worst case; if nothing came near a thousandth of it, the test would be looking at the
        // wrong thing
        assertTrue(worst > 1e-3, "largest fraction of the bound: " + worst);
    }

    private static double check(Kind kind, int n, int p, Random r) {
        double[][][] a = draw(2, n, kind, r);
        double[][][] b = draw(n, p, kind, r);
        double[][][] c = draw(2, n, kind, r);
        double[][][] d = draw(n, p, kind, r);
        if (kind == Kind.CANCELLING) {
            // the second half of the sum undoes the first, up to the last bits
            for (int k = n / 2; k < n - 1; k++) {
                for (int i = 0; i < 2; i++) {
                    a[0][i][k] = -a[0][i][k - n / 2];
                    a[1][i][k] = -a[1][i][k - n / 2];
                }
                b[0][k] = b[0][k - n / 2].clone();
                b[1][k] = b[1][k - n / 2].clone();
            }
        }
        double[][][] sum = new double[2][2][p];
        // as for the real part of a complex product
        DdProducts.addProduct(a[0], a[1], b[0], b[1], 1, sum[0], sum[1]);
        DdProducts.addProduct(c[0], c[1], d[0], d[1], -1, sum[0], sum[1]);
        double worst = 0;
        for (int i = 0; i < 2; i++) {
            for (int j = 0; j < p; j++) {
                BigDecimal exact = BigDecimal.ZERO;
                double size = 0;
                for (int k = 0; k < n; k++) {
                    exact = exact.add(value(a, i, k).multiply(value(b, k, j)))
                            .subtract(value(c, i, k).multiply(value(d, k, j)));
                    size += Math.abs(a[0][i][k] * b[0][k][j]) + Math.abs(c[0][i][k] * d[0][k][j]);
                }
                double error = exact.subtract(value(sum, i, j)).abs().doubleValue();
                // one part: the bound on the modulus without its √2
                double bound = DdProducts.gamma(n) / Math.sqrt(2) * size + DdProducts.underflow(n);
                assertTrue(error <= bound, kind + ", n = " + n + ": " + error + " > " + bound);
                assertTrue(
                        Math.abs(sum[1][i][j]) <= 0.5 * Math.ulp(sum[0][i][j]) + Double.MIN_VALUE,
                        kind + ", n = " + n + " is not normalised");
                worst = Math.max(worst, error / bound);
            }
        }
        return worst;
    }
}
