package org.minorant.core.internal.dd;

/**
 * Matrix products in double-double on arrays of rows, with the low word left unnormalised inside the loop (the form the
 * compiler vectorises).
 *
 * <p><b>Error.</b> Let u = 2^-53 and S = Σ|a||b| over the n complex products behind an entry. Each product loses at most 5u²
 * of its size; the low word collects at most 2n terms of size u each relative to the running sum, so that its additions lose
 * at most (4n² + 10n + 8)u²S for each of the two parts. In modulus the entry is within {@link #gamma}(n)·S + {@link
 * #underflow}(n) of the exact one.
 */
public final class DdProducts {

    private static final double U2 = 0x1p-106;

    private DdProducts() {}

    /** The factor γ of the error bound γ·Σ|a||b| for an inner dimension n. */
    public static double gamma(int n) {
        return (6.0 * n * n + 16.0 * n + 16.0) * U2;
    }

    /** The part of the error bound that does not scale with the entries: lost in gradual underflow. */
    public static double underflow(int n) {
        return (8.0 * n + 8.0) * 0x1p-1070;
    }

    /** (ch, cl) += a · b in double-double; a is m × n, b n × p, c m × p, all arrays of rows; sign is 1 or −1. */
    public static void addProduct(
            double[][] ah, double[][] al, double[][] bh, double[][] bl, double sign, double[][] ch, double[][] cl) {
        for (int i = 0; i < ah.length; i++) {
            double[] xh = ah[i];
            double[] xl = al[i];
            for (int k = 0; k < xh.length; k++) {
                if (xh[k] != 0) {
                    addScaled(sign * xh[k], sign * xl[k], bh[k], bl[k], ch[i], cl[i]);
                }
            }
        }
    }

    /** (sh, sl) += (xh + xl) · (bh, bl), entry by entry. */
    private static void addScaled(double xh, double xl, double[] bh, double[] bl, double[] sh, double[] sl) {
        for (int j = 0; j < sh.length; j++) {
            double p = xh * bh[j];
            double e = Math.fma(xh, bh[j], -p) + (xh * bl[j] + xl * bh[j]);
            double s = sh[j] + p;
            double t = s - sh[j];
            sl[j] += ((sh[j] - (s - t)) + (p - t)) + e;
            sh[j] = s;
        }
    }

    /** Brings every pair to |lo| ≤ ½ ulp(hi). */
    public static void normalise(double[][] ch, double[][] cl) {
        for (int i = 0; i < ch.length; i++) {
            double[] h = ch[i];
            double[] l = cl[i];
            for (int j = 0; j < h.length; j++) {
                double s = h[j] + l[j];
                l[j] = l[j] - (s - h[j]);
                h[j] = s;
            }
        }
    }
}
