package org.minorant.core.internal.kernel;

/**
 * The inner loops that all dense kernels are made of: updates of one row by a few others.
 *
 * <p><b>Why these.</b> The compiler turns a loop into vector code reliably if every array is indexed by the bare loop variable and the loop
 * holds at most four multiply-adds into one row; wider tiles are vectorised in one program and not in the next. Products and sums are
 * rounded one by one (no fused multiply-add), so that every machine returns the same bits, and machines without the fused
 * instruction are not slowed.
 */
final class Rows {

    /**
     * Rows shorter than this have a method of their own: the compiler unrolls a loop according to the lengths it has seen, and a program
     * that begins with small matrices would else keep slow code for large ones (three times, as measured).
     */
    private static final int SHORT = 16;

    private Rows() {}

    /** c += (p·a + q·b) + (r·d + s·e) on the columns [from, to). */
    static void add4(
            double[] c,
            double p,
            double q,
            double r,
            double s,
            double[] a,
            double[] b,
            double[] d,
            double[] e,
            int from,
            int to) {
        if (to - from < SHORT) {
            shortAdd4(c, p, q, r, s, a, b, d, e, from, to);
        } else {
            longAdd4(c, p, q, r, s, a, b, d, e, from, to);
        }
    }

    private static void shortAdd4(
            double[] c,
            double p,
            double q,
            double r,
            double s,
            double[] a,
            double[] b,
            double[] d,
            double[] e,
            int from,
            int to) {
        for (int j = from; j < to; j++) {
            c[j] += (p * a[j] + q * b[j]) + (r * d[j] + s * e[j]);
        }
    }

    private static void longAdd4(
            double[] c,
            double p,
            double q,
            double r,
            double s,
            double[] a,
            double[] b,
            double[] d,
            double[] e,
            int from,
            int to) {
        for (int j = from; j < to; j++) {
            c[j] += (p * a[j] + q * b[j]) + (r * d[j] + s * e[j]);
        }
    }

    /** c += p·a + q·b on the columns [from, to). */
    static void add2(double[] c, double p, double q, double[] a, double[] b, int from, int to) {
        if (to - from < SHORT) {
            shortAdd2(c, p, q, a, b, from, to);
        } else {
            longAdd2(c, p, q, a, b, from, to);
        }
    }

    private static void shortAdd2(double[] c, double p, double q, double[] a, double[] b, int from, int to) {
        for (int j = from; j < to; j++) {
            c[j] += p * a[j] + q * b[j];
        }
    }

    private static void longAdd2(double[] c, double p, double q, double[] a, double[] b, int from, int to) {
        for (int j = from; j < to; j++) {
            c[j] += p * a[j] + q * b[j];
        }
    }

    /** c += a on the columns [from, to), and a is cleared there. */
    static void flush(double[] c, double[] a, int from, int to) {
        for (int j = from; j < to; j++) {
            c[j] += a[j];
        }
        java.util.Arrays.fill(a, from, to, 0);
    }

    /** The plane rotation (x, y) becomes (c·x − s·y, s·x + c·y). */
    static void rotate(double[] x, double[] y, double c, double s) {
        if (x.length < SHORT) {
            shortRotate(x, y, c, s);
        } else {
            longRotate(x, y, c, s);
        }
    }

    private static void shortRotate(double[] x, double[] y, double c, double s) {
        for (int j = 0; j < x.length; j++) {
            double t = y[j];
            y[j] = s * x[j] + c * t;
            x[j] = c * x[j] - s * t;
        }
    }

    private static void longRotate(double[] x, double[] y, double c, double s) {
        for (int j = 0; j < x.length; j++) {
            double t = y[j];
            y[j] = s * x[j] + c * t;
            x[j] = c * x[j] - s * t;
        }
    }

    /** Σ a·b over [0, to), with four running sums. */
    static double dot(double[] a, double[] b, int to) {
        double s0 = 0;
        double s1 = 0;
        double s2 = 0;
        double s3 = 0;
        int j = 0;
        for (; j + 3 < to; j += 4) {
            s0 += a[j] * b[j];
            s1 += a[j + 1] * b[j + 1];
            s2 += a[j + 2] * b[j + 2];
            s3 += a[j + 3] * b[j + 3];
        }
        for (; j < to; j++) {
            s0 += a[j] * b[j];
        }
        return (s0 + s1) + (s2 + s3);
    }

    /** (re, im) += Σ x_k · (row k of b) over k in [k0, k1) on the columns [from, to); empty imaginary parts mean real. */
    static void addProduct(
            double[] re,
            double[] im,
            double[] xr,
            double[] xi,
            double[][] br,
            double[][] bi,
            int k0,
            int k1,
            int from,
            int to) {
        if (xi.length == 0) {
            addReal(re, xr, br, k0, k1, from, to);
            if (bi.length != 0) {
                addReal(im, xr, bi, k0, k1, from, to);
            }
        } else if (bi.length == 0) {
            addReal(re, xr, br, k0, k1, from, to);
            addReal(im, xi, br, k0, k1, from, to);
        } else {
            for (int k = k0; k < k1 - 1; k += 2) {
                add4(re, xr[k], -xi[k], xr[k + 1], -xi[k + 1], br[k], bi[k], br[k + 1], bi[k + 1], from, to);
                add4(im, xi[k], xr[k], xi[k + 1], xr[k + 1], br[k], bi[k], br[k + 1], bi[k + 1], from, to);
            }
            if ((k1 - k0) % 2 != 0) {
                int k = k1 - 1;
                add2(re, xr[k], -xi[k], br[k], bi[k], from, to);
                add2(im, xi[k], xr[k], br[k], bi[k], from, to);
            }
        }
    }

    private static void addReal(double[] c, double[] x, double[][] b, int k0, int k1, int from, int to) {
        int k = k0;
        for (; k + 3 < k1; k += 4) {
            add4(c, x[k], x[k + 1], x[k + 2], x[k + 3], b[k], b[k + 1], b[k + 2], b[k + 3], from, to);
        }
        for (; k < k1; k++) {
            add2(c, x[k], 0, b[k], b[k], from, to);
        }
    }
}
