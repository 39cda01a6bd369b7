package org.minorant.core.internal.kernel;

/** Rotations of two complex columns held as split arrays; an empty imaginary array means real. */
public final class Rotations {

    private Rotations() {}

    /** Re Σ conj(x) y. */
    public static double dotRe(double[] xr, double[] xi, double[] yr, double[] yi) {
        return xi.length == 0 ? dot(xr, yr) : dot(xr, yr) + dot(xi, yi);
    }

    /** Σ x y in four interleaved sums: one alone would wait for itself, as its order is fixed. */
    private static double dot(double[] x, double[] y) {
        double s = 0;
        double t = 0;
        double u = 0;
        double v = 0;
        int i = 0;
        for (; i + 3 < x.length; i += 4) {
            s += x[i] * y[i];
            t += x[i + 1] * y[i + 1];
            u += x[i + 2] * y[i + 2];
            v += x[i + 3] * y[i + 3];
        }
        for (; i < x.length; i++) {
            s += x[i] * y[i];
        }
        return (s + t) + (u + v);
    }

    /** Im Σ conj(x) y. */
    public static double dotIm(double[] xr, double[] xi, double[] yr, double[] yi) {
        double s = 0;
        for (int i = 0; i < xi.length; i++) {
            s += xr[i] * yi[i] - xi[i] * yr[i];
        }
        return s;
    }

    /** ‖y − (gr + i gi) x‖². */
    public static double distance(double[] yr, double[] yi, double[] xr, double[] xi, double gr, double gi) {
        double s = 0;
        if (yi.length == 0) {
            for (int i = 0; i < yr.length; i++) {
                double d = yr[i] - gr * xr[i];
                s += d * d;
            }
            return s;
        }
        for (int i = 0; i < yr.length; i++) {
            double d = yr[i] - (gr * xr[i] - gi * xi[i]);
            double e = yi[i] - (gr * xi[i] + gi * xr[i]);
            s += d * d + e * e;
        }
        return s;
    }

    /** (x, y) becomes (c x + s y, t x + c y) for complex s and t. */
    public static void mix(
            double[] xr, double[] xi, double[] yr, double[] yi, double c, double sr, double si, double tr, double ti) {
        if (xi.length == 0) {
            for (int i = 0; i < xr.length; i++) {
                double a = xr[i];
                double b = yr[i];
                xr[i] = c * a + sr * b;
                yr[i] = tr * a + c * b;
            }
            return;
        }
        for (int i = 0; i < xr.length; i++) {
            double a = xr[i];
            double b = xi[i];
            double d = yr[i];
            double e = yi[i];
            xr[i] = c * a + (sr * d - si * e);
            xi[i] = c * b + (sr * e + si * d);
            yr[i] = c * d + (tr * a - ti * b);
            yi[i] = c * e + (tr * b + ti * a);
        }
    }

    /** As {@link #mix} on entries from (included) to (excluded). */
    public static void mixRange(
            double[] xr,
            double[] xi,
            double[] yr,
            double[] yi,
            int from,
            int to,
            double c,
            double sr,
            double si,
            double tr,
            double ti) {
        if (xi.length == 0) {
            for (int i = from; i < to; i++) {
                double a = xr[i];
                double d = yr[i];
                xr[i] = c * a + sr * d;
                yr[i] = tr * a + c * d;
            }
            return;
        }
        for (int i = from; i < to; i++) {
            double a = xr[i];
            double b = xi[i];
            double d = yr[i];
            double e = yi[i];
            xr[i] = c * a + (sr * d - si * e);
            xi[i] = c * b + (sr * e + si * d);
            yr[i] = c * d + (tr * a - ti * b);
            yi[i] = c * e + (tr * b + ti * a);
        }
    }
}
