package org.minorant.core.internal.dd;

import java.util.Arrays;
import org.minorant.core.internal.number.ProductError;
import org.minorant.core.internal.work.Checkpoint;

/**
 * Matrix products in double-double on arrays of rows, with the low word left unnormalised inside the loop (the form the compiler
 * vectorises). Every {@value #CHUNK} terms are summed apart and then merged, which keeps the error bound small.
 *
 * <p><b>Error.</b> Let u = 2^-53 and let S = Σ|a||b| over the n complex products behind an entry; each of its two parts is a sum of n or 2n
 * real products p_j of double-doubles, Σ|p_j| ≤ S by Cauchy and Schwarz, in K ≤ 2(n/8 + 1) chunks of c terms and sizes S_c = Σ|p_j|. Second-order
 * terms are covered by a factor 1 + 2^-20.
 *
 * <ul>
 *   <li>A product (h + l)(h' + l') keeps hh' exactly (product and fused error) and hl' + lh'. It drops ll' (u²), and rounds hl', lh' (u² each),
 *       their sum (2u²) and the sum with the fused error (3u²): 8u²|p_j|, together 8u²S.
 *   <li>In a chunk the high words are added without error (two-sum), leaving |ε_j| ≤ uS_c. The low word then takes ε_j + e_j with |e_j| ≤
 *       3u|p_j|: that sum rounds by u(uS_c + 3u|p_j|), and adding it to l, |l| ≤ (j + 3)uS_c, by u|l|: together at most u²S_c(c²/2 + 4.5c + 3).
 *   <li>Merging (p, q), |q| ≤ (c + 3)uS_c, into (h, l), |l| ≤ uS: the high words leave |ε| ≤ uS; ε + q rounds by u²(S + (c+3)S_c), adding l by
 *       u²(2S + (c+3)S_c); normalising is exact unless the high word has cancelled below the low one, and then rounds by at most 3.1 times the
 *       latter: together u²(9.2S + 5.1(c+3)S_c).
 * </ul>
 *
 * <p>Summed over the chunks with c ≤ 8: u²S(8 + 71 + 56.1 + 9.2K) ≤ u²S(154 + 2.3n); for n ≤ 8, with c = n and K = 2, u²S(n²/2 + 9.6n + 44.7). The
 * modulus is at most √2 times larger, whence {@link #gamma}.
 */
public final class DdProducts {

    private static final double U2 = 0x1p-106;

    /** Terms summed apart. */
    private static final int CHUNK = 8;

    /** Shorter rows have a loop of their own, which is compiled for what it meets. */
    private static final int SHORT = 16;

    /** Rows after which the thread's {@link Checkpoint} is asked. */
    private static final int POLL = 64;

    private DdProducts() {}

    /** The factor γ of the error bound γ·Σ|a||b| for an inner dimension n, real or complex. */
    public static double gamma(int n) {
        double units = n <= CHUNK ? 0.75 * n * n + 14.0 * n + 64.0 : 3.5 * n + 220.0;
        return units * U2 * (1 + 0x1p-20);
    }

    /** The part of the error bound that does not scale with the entries: lost in gradual underflow. */
    public static double underflow(int n) {
        return (8.0 * n + 8.0) * 0x1p-1070;
    }

    /**
     * (ch, cl) += a · b in double-double, normalised at the end; a is m × n, b n × p, c m × p, all arrays of rows; sign is 1 or −1. At most two
     * calls into the same c are covered by {@link #gamma}.
     */
    public static void addProduct(
            double[][] ah, double[][] al, double[][] bh, double[][] bl, double sign, double[][] ch, double[][] cl) {
        Runnable check = Checkpoint.current();
        for (int i = 0; i < ah.length; i++) {
            if (i % POLL == POLL - 1) {
                check.run();
            }
            addRow(ah[i], al[i], bh, bl, sign, ch[i], cl[i], ch[i].length);
        }
    }

    /** The first entries of one row of {@link #addProduct}, as many as asked for. */
    public static void addRow(
            double[] xh, double[] xl, double[][] bh, double[][] bl, double sign, double[] ch, double[] cl, int length) {
        double[] ph = new double[length];
        double[] pl = new double[length];
        for (int from = 0; from < xh.length; from += CHUNK) {
            int to = Math.min(xh.length, from + CHUNK);
            Arrays.fill(ph, 0);
            Arrays.fill(pl, 0);
            for (int k = from; k < to; k++) {
                if (xh[k] != 0 || xl[k] != 0) {
                    addScaled(sign * xh[k], sign * xl[k], bh[k], bl[k], ph, pl);
                }
            }
            merge(ph, pl, ch, cl);
        }
    }

    /** (sh, sl) += (xh + xl) · (bh, bl), entry by entry. */
    private static void addScaled(double xh, double xl, double[] bh, double[] bl, double[] sh, double[] sl) {
        if (sh.length < SHORT) {
            addScaledShort(xh, xl, bh, bl, sh, sl);
        } else {
            addScaledLong(xh, xl, bh, bl, sh, sl);
        }
    }

    private static void addScaledShort(double xh, double xl, double[] bh, double[] bl, double[] sh, double[] sl) {
        for (int j = 0; j < sh.length; j++) {
            double p = xh * bh[j];
            double e = ProductError.of(xh, bh[j], p) + (xh * bl[j] + xl * bh[j]);
            double s = sh[j] + p;
            double t = s - sh[j];
            sl[j] += ((sh[j] - (s - t)) + (p - t)) + e;
            sh[j] = s;
        }
    }

    private static void addScaledLong(double xh, double xl, double[] bh, double[] bl, double[] sh, double[] sl) {
        for (int j = 0; j < sh.length; j++) {
            double p = xh * bh[j];
            double e = ProductError.of(xh, bh[j], p) + (xh * bl[j] + xl * bh[j]);
            double s = sh[j] + p;
            double t = s - sh[j];
            sl[j] += ((sh[j] - (s - t)) + (p - t)) + e;
            sh[j] = s;
        }
    }

    /** (h, l) += (p, q), and every pair is brought to |l| ≤ ½ ulp(h). */
    private static void merge(double[] p, double[] q, double[] h, double[] l) {
        for (int j = 0; j < p.length; j++) {
            double s = h[j] + p[j];
            double t = s - h[j];
            double v = l[j] + (((h[j] - (s - t)) + (p[j] - t)) + q[j]);
            h[j] = s + v;
            l[j] = v - (h[j] - s);
        }
    }
}
