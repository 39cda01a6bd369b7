package org.minorant.benchmarks;

/** Complex products on interleaved storage (re, im, re, im, …), to measure against the split storage that the library uses. */
final class Interleaved {

    private Interleaved() {}

    /** c = a · b, real and imaginary parts side by side, straight from the definition with the loops in row order. */
    static void multiplyPlain(int n, double[] a, double[] b, double[] c) {
        double[] row = new double[2 * n];
        for (int i = 0; i < n; i++) {
            java.util.Arrays.fill(row, 0);
            for (int k = 0; k < n; k++) {
                addPlain(row, a[2 * (i * n + k)], a[2 * (i * n + k) + 1], b, 2 * k * n);
            }
            System.arraycopy(row, 0, c, 2 * i * n, 2 * n);
        }
    }

    private static void addPlain(double[] c, double x, double y, double[] b, int offset) {
        for (int j = 0; j < c.length; j += 2) {
            double p = b[offset + j];
            double q = b[offset + j + 1];
            c[j] += x * p - y * q;
            c[j + 1] += x * q + y * p;
        }
    }

    /** The same with each row of b packed twice, as it is and times i: then c += x·b + y·(ib) runs over bare indices. */
    static void multiplyPacked(int n, double[] a, double[] b, double[] c) {
        double[][] rows = new double[n][];
        double[][] turned = new double[n][2 * n];
        for (int k = 0; k < n; k++) {
            rows[k] = java.util.Arrays.copyOfRange(b, 2 * k * n, 2 * (k + 1) * n);
            for (int j = 0; j < 2 * n; j += 2) {
                turned[k][j] = -rows[k][j + 1];
                turned[k][j + 1] = rows[k][j];
            }
        }
        double[][] tile = new double[4][2 * n];
        for (int i = 0; i < n; i += 4) {
            for (double[] row : tile) {
                java.util.Arrays.fill(row, 0);
            }
            for (int k = 0; k + 1 < n; k += 2) {
                for (int t = 0; t < 4 && i + t < n; t++) {
                    int p = 2 * ((i + t) * n + k);
                    add4(tile[t], a[p], a[p + 1], a[p + 2], a[p + 3], rows[k], turned[k], rows[k + 1], turned[k + 1]);
                }
            }
            for (int t = 0; t < 4 && i + t < n; t++) {
                System.arraycopy(tile[t], 0, c, 2 * (i + t) * n, 2 * n);
            }
        }
    }

    private static void add4(
            double[] c, double p, double q, double r, double s, double[] a, double[] b, double[] d, double[] e) {
        for (int j = 0; j < c.length; j++) {
            c[j] += (p * a[j] + q * b[j]) + (r * d[j] + s * e[j]);
        }
    }
}
