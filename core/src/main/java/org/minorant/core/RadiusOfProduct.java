package org.minorant.core;

import org.minorant.core.internal.dd.DdProducts;

/**
 * Radii of an enclosed product: γ|A||B| + |A|R_B + R_A(|B| + R_B), rounded up, as γ(|A||B|) + R_A|B| + (|A| + R_A)R_B; γ comes last, γ|A| alone may underflow.
 */
final class RadiusOfProduct {

    /** Covers the relative rounding of a radius computed with a few operations. */
    private static final double UP = 1 + 0x1p-48;

    private RadiusOfProduct() {}

    /** √(x² + y²), rounded up also where the squares under- or overflow. */
    static double modulus(double x, double y) {
        double a = Math.abs(x);
        double b = Math.abs(y);
        double r = Math.sqrt(a * a + b * b);
        if (!(r > 1e-140 && r < 1e150)) {
            r = a + b;
        }
        return r * UP;
    }

    /** Writes the radii of AB to rows of zeros, from the moduli of the midpoints and the radii of A and B. */
    static void add(double[][] ma, double[][] ra, double[][] mb, double[][] rb, double[][] to) {
        int n = mb.length;
        double gamma = DdProducts.gamma(n);
        double up = 1 + (n + 16) * 0x1p-51;
        boolean exact = isZero(ra);
        boolean exactB = isZero(rb);
        boolean[] nonzero = nonzeroColumns(mb, rb);
        for (int i = 0; i < to.length; i++) {
            double[] row = to[i];
            boolean zero = true;
            for (int k = 0; k < n; k++) {
                zero &= ma[i][k] == 0 && ra[i][k] == 0;
                addScaled(row, ma[i][k], mb[k]);
            }
            for (int j = 0; j < row.length; j++) {
                row[j] *= gamma;
            }
            for (int k = 0; k < n && !exact; k++) {
                addScaled(row, ra[i][k], mb[k]);
            }
            for (int k = 0; k < n && !exactB; k++) {
                addScaled(row, (ma[i][k] + ra[i][k]) * UP, rb[k]);
            }
            for (int j = 0; j < row.length; j++) {
                // products with exact zeros are exact
                row[j] = row[j] * up + (zero || !nonzero[j] ? 0 : DdProducts.underflow(n));
            }
        }
    }

    private static boolean[] nonzeroColumns(double[][] m, double[][] r) {
        boolean[] nonzero = new boolean[m[0].length];
        for (int i = 0; i < m.length; i++) {
            for (int j = 0; j < nonzero.length; j++) {
                nonzero[j] |= m[i][j] != 0 || r[i][j] != 0;
            }
        }
        return nonzero;
    }

    private static void addScaled(double[] c, double x, double[] b) {
        for (int j = 0; j < c.length; j++) {
            c[j] += x * b[j];
        }
    }

    private static boolean isZero(double[][] a) {
        for (double[] row : a) {
            for (double v : row) {
                if (v != 0) {
                    return false;
                }
            }
        }
        return true;
    }
}
