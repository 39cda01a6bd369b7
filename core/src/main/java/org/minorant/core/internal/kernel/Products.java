package org.minorant.core.internal.kernel;

import java.util.Arrays;

/**
 * Complex matrix products on split real and imaginary parts, by tiles of a few result rows.
 *
 * <p><b>Error.</b> An entry is summed in chunks of {@value #CHUNK} terms of the inner dimension, two or four terms joined before they
 * enter the chunk, and the chunks are summed in order. No term passes through more than {@link #depth}(n) roundings, in any of
 * the cases (real or complex factors), so each part of an entry is within depth·u/(1 − depth·u) · Σ|a||b| of the exact one (u = 2^-53;
 * Higham, Accuracy and Stability of Numerical Algorithms, 2nd ed., section 4.2, from memory; by Cauchy and Schwarz both real terms of a
 * complex product together have at most the size |a||b|), and the entry in modulus within √2 times that: {@link #gamma}.
 * Underflow adds at most {@link #underflow}.
 *
 * <p>Deterministic: the order of summation depends on the shape only.
 */
public final class Products {

    /** Terms of the inner dimension that are summed before they join the running sum. */
    private static final int CHUNK = 32;

    /** Result rows worked on together, so that a row of the right factor is used several times while it is near. */
    private static final int TILE = 4;

    /** Columns worked on together: what a tile needs of them fits the first-level cache. */
    private static final int BLOCK = 256;

    private static final double[] NONE = new double[0];

    private final double[][] br;
    private final double[][] bi;
    private final int inner;
    private final double[][] sumRe;
    private final double[][] sumIm;
    private final double[][] partRe;
    private final double[][] partIm;

    /**
     * Prepares products with one right factor.
     *
     * @param br real parts of the right factor, by rows
     * @param bi imaginary parts by rows; none for a real factor
     * @param columns the number of columns
     */
    Products(double[][] br, double[][] bi, int columns) {
        this.br = br;
        this.bi = bi;
        this.inner = br.length;
        sumRe = new double[TILE][columns];
        sumIm = new double[TILE][columns];
        partRe = new double[TILE][columns];
        partIm = new double[TILE][columns];
    }

    /** The largest number of roundings between a term of an inner product of n terms and the result. */
    static int depth(int n) {
        // product, two joins; entering the chunk at most (chunk / 2) times; entering the sum once for each chunk
        return 3 + Math.min((n + 1) / 2, CHUNK / 2) + (n + CHUNK - 1) / CHUNK;
    }

    /**
     * The factor γ of the error bound γ·Σ|a||b| in modulus.
     *
     * @param n the inner dimension
     * @return √2 · depth · u / (1 − depth · u), rounded up
     */
    public static double gamma(int n) {
        return 1.4142136 * depth(n) * 0x1p-53 * (1 + 0x1p-20);
    }

    /**
     * What gradual underflow adds to the error bound of an entry.
     *
     * @param n the inner dimension
     * @return at least 2n · 2^-1075 for each part
     */
    public static double underflow(int n) {
        return 4.0 * n * 0x1p-1074;
    }

    /** The real parts of row t of the last tile. */
    double[] re(int t) {
        return sumRe[t];
    }

    /** The imaginary parts of row t of the last tile; zero if both factors are real. */
    double[] im(int t) {
        return sumIm[t];
    }

    /**
     * Computes a tile of rows x_t · B for t below count, on the columns [0, to).
     *
     * @param xr real parts of the left rows
     * @param xi imaginary parts of the left rows; empty rows if real
     * @param count the number of rows, at most {@link #TILE}
     * @param to the columns wanted
     */
    void tile(double[][] xr, double[][] xi, int count, int to) {
        for (int t = 0; t < count; t++) {
            Arrays.fill(sumRe[t], 0, to, 0);
            Arrays.fill(sumIm[t], 0, to, 0);
        }
        for (int from = 0; from < to; from += BLOCK) {
            int end = Math.min(to, from + BLOCK);
            for (int k = 0; k < inner; k += CHUNK) {
                chunk(xr, xi, count, k, Math.min(inner, k + CHUNK), from, end);
            }
        }
    }

    private void chunk(double[][] xr, double[][] xi, int count, int k0, int k1, int from, int end) {
        boolean complex = bi.length != 0 || xi[0].length != 0;
        for (int k = k0; k < k1; k += 4) {
            int top = Math.min(k1, k + 4);
            for (int t = 0; t < count; t++) {
                Rows.addProduct(partRe[t], partIm[t], xr[t], xi[t], br, bi, k, top, from, end);
            }
        }
        for (int t = 0; t < count; t++) {
            Rows.flush(sumRe[t], partRe[t], from, end);
            if (complex) {
                Rows.flush(sumIm[t], partIm[t], from, end);
            }
        }
    }

    /** The number of rows of a tile. */
    static int tileRows() {
        return TILE;
    }

    /**
     * c = a · b for a rows × inner, b inner × columns, all row-major. An empty imaginary array means real; cim must be empty only if both
     * are real.
     */
    public static void multiply(
            int rows,
            int inner,
            int columns,
            double[] are,
            double[] aim,
            double[] bre,
            double[] bim,
            double[] cre,
            double[] cim) {
        Products p = new Products(
                rows(bre, inner, columns), bim.length == 0 ? new double[0][] : rows(bim, inner, columns), columns);
        double[][] xr = new double[TILE][];
        double[][] xi = new double[TILE][];
        for (int i = 0; i < rows; i += TILE) {
            int count = Math.min(TILE, rows - i);
            for (int t = 0; t < count; t++) {
                xr[t] = Arrays.copyOfRange(are, (i + t) * inner, (i + t + 1) * inner);
                xi[t] = aim.length == 0 ? NONE : Arrays.copyOfRange(aim, (i + t) * inner, (i + t + 1) * inner);
            }
            p.tile(xr, xi, count, columns);
            for (int t = 0; t < count; t++) {
                System.arraycopy(p.re(t), 0, cre, (i + t) * columns, columns);
                if (cim.length != 0) {
                    System.arraycopy(p.im(t), 0, cim, (i + t) * columns, columns);
                }
            }
        }
    }

    private static double[][] rows(double[] a, int m, int n) {
        double[][] r = new double[m][];
        for (int i = 0; i < m; i++) {
            r[i] = Arrays.copyOfRange(a, i * n, (i + 1) * n);
        }
        return r;
    }
}
