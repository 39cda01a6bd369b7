package org.minorant.bounds;

/**
 * The counts of an event in m independent trials that matter: fewer, and more, have probability at most e^(−depth) each, by Chernoff's bound exp(−m D(k/m‖q)).
 *
 * <p><b>Rounding.</b> Exponents are below 1e9 and good to a few units, so off by less than 1e-5; the depth is raised by {@link #SLACK}, which also takes a q that is off by 1e-3/m, relatively.
 *
 * @param from the least count
 * @param to the largest count
 */
record CountWindow(int from, int to) {

    /** What is added to the depth. */
    static final double SLACK = 1e-2;

    /**
     * Finds the window.
     *
     * @param m the number of trials
     * @param q the probability of the event
     * @param rest 1 − q, known by itself
     * @param depth minus ln of what may be left out on either side
     */
    static CountWindow of(int m, double q, double rest, double depth) {
        double ln = depth + SLACK;
        int centre = (int) Math.max(0, Math.min(m, Math.floor(m * q)));
        int lo = 0;
        int hi = centre;
        while (lo < hi) {
            int mid = (lo + hi + 1) >>> 1;
            if (exponent(mid - 1, m, q, rest) >= ln) {
                lo = mid;
            } else {
                hi = mid - 1;
            }
        }
        int from = lo;
        lo = Math.min(m, centre + 1);
        hi = m;
        while (lo < hi) {
            int mid = (lo + hi) >>> 1;
            if (exponent(mid + 1, m, q, rest) >= ln) {
                hi = mid;
            } else {
                lo = mid + 1;
            }
        }
        return new CountWindow(from, lo);
    }

    /** m D(k/m‖q); infinite beyond m. */
    private static double exponent(int k, int m, double q, double rest) {
        if (k > m) {
            return Double.POSITIVE_INFINITY;
        }
        double d = k > 0 ? k * Math.log(k / (m * q)) : 0;
        return k < m ? d + (m - k) * Math.log((m - k) / (m * rest)) : d;
    }

    int size() {
        return to - from + 1;
    }
}
