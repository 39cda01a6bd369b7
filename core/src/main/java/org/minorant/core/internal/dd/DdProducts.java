package org.minorant.core.internal.dd;

/**
 * Matrix products in double-double on arrays of rows, with the low word left unnormalised inside the loop (the form the compiler
 * vectorises) and brought back to order after every {@value #CHUNK} terms.
 *
 * <p><b>Error.</b> Let u = 2^-53 and let S = Σ|a||b| over the n complex products behind an entry; each of its two parts is a sum of m = 2n
 * real products p_j of double-doubles, Σ|p_j| ≤ S by Cauchy and Schwarz. Second-order terms are covered by a factor 1 + 2^-20.
 *
 * <ul>
 *   <li>A product (h + l)(h' + l') keeps hh' exactly (product and fused error) and hl' + lh'. It drops ll' (u²), and rounds hl', lh' (u² each),
 *       their sum (2u²) and the sum with the fused error (3u²): 8u²|p_j|, together 8u²S.
 *   <li>The high words are added without error (two-sum), leaving |ε_j| ≤ uS. The low word then takes ε_j + e_j with |e_j| ≤ 3u|p_j|: that sum
 *       rounds by u(uS + 3u|p_j|), and adding it rounds by u|l|. A chunk of c terms starts with |l| ≤ uS, so |l| ≤ (j + 4)uS after j terms,
 *       and the chunk rounds by at most u²S(c²/2 + 5.5c) + 3u²Σ|p_j|.
 *   <li>Normalising is exact if |h| ≥ |l|; else h has cancelled and its two subtractions round by at most 3.1u|l| ≤ 3.1(c + 4)u²S.
 * </ul>
 *
 * <p>A chunk therefore costs u²S(c²/2 + 8.6c + 12.4). For n ≤ 16 a part has two chunks of n terms: u²S(n² + 17.2n + 36). Otherwise the full chunks
 * cost 17.4u²S a term and two are begun in vain: u²S(34.8n + 36). The modulus is at most √2 times larger, whence {@link #gamma}.
 */
public final class DdProducts {

    private static final double U2 = 0x1p-106;

    /** Terms between two normalisations. */
    private static final int CHUNK = 16;

    /** Shorter rows have a loop of their own, which is compiled for what it meets. */
    private static final int SHORT = 16;

    private DdProducts() {}

    /** The factor γ of the error bound γ·Σ|a||b| for an inner dimension n, real or complex. */
    public static double gamma(int n) {
        double units = n <= CHUNK ? 1.5 * n * n + 25.0 * n + 52.0 : 50.0 * n + 52.0;
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
        for (int i = 0; i < ah.length; i++) {
            double[] xh = ah[i];
            double[] xl = al[i];
            for (int from = 0; from < xh.length; from += CHUNK) {
                int to = Math.min(xh.length, from + CHUNK);
                for (int k = from; k < to; k++) {
                    if (xh[k] != 0 || xl[k] != 0) {
                        addScaled(sign * xh[k], sign * xl[k], bh[k], bl[k], ch[i], cl[i]);
                    }
                }
                normalise(ch[i], cl[i]);
            }
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
            double e = Math.fma(xh, bh[j], -p) + (xh * bl[j] + xl * bh[j]);
            double s = sh[j] + p;
            double t = s - sh[j];
            sl[j] += ((sh[j] - (s - t)) + (p - t)) + e;
            sh[j] = s;
        }
    }

    private static void addScaledLong(double xh, double xl, double[] bh, double[] bl, double[] sh, double[] sl) {
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
    private static void normalise(double[] h, double[] l) {
        for (int j = 0; j < h.length; j++) {
            double s = h[j] + l[j];
            l[j] = l[j] - (s - h[j]);
            h[j] = s;
        }
    }
}
