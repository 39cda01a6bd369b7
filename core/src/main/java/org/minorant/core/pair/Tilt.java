package org.minorant.core.pair;

/**
 * Where the types that matter lie. For 0 ≤ s ≤ 1, min(x, ty) ≤ x^(1−s)(ty)^s, so that with z_i = x_i^(1−s) y_i^s and Z = Σ z_i
 *
 * <pre>Σ over types of multinomial · min(Π x_i^{n_i}, t Π y_i^{n_i}) ≤ t^s Z^n</pre>
 *
 * (Chernoff), and the types whose count of letter i leaves a window contribute at most t^s Z^n times the probability of that under the binomial law with q_i = z_i/Z, which is at most
 * exp(−n D(k/n ‖ q_i)) on either side. Any s gives a bound; s is chosen to make it small.
 *
 * <p><b>Rounding.</b> Logarithms of letters are at most 10^9/n in size and good to a few units, so that exponents are off by less than 1e-5; every bound is raised by e^0.001.
 */
final class Tilt {

    private static final double SLACK = 1e-3;
    private static final int STEPS = 64;

    private final int n;
    private final double[] q;
    /** 1 − q_i, without cancellation. */
    private final double[] rest;

    private final double lnChernoff;

    private Tilt(int n, double[] q, double[] rest, double lnChernoff) {
        this.n = n;
        this.q = q;
        this.rest = rest;
        this.lnChernoff = lnChernoff;
    }

    /** For letters with logarithms lx, ly. */
    static Tilt of(double[] lx, double[] ly, double lnT, int n) {
        double lo = 0;
        double hi = 1;
        double[] z = new double[lx.length];
        for (int step = 0; step < STEPS; step++) {
            double s = (lo + hi) / 2;
            double ln = tilt(lx, ly, s, z);
            double slope = lnT / n;
            for (int i = 0; i < z.length; i++) {
                slope += z[i] * (ly[i] - lx[i]);
            }
            if (slope < 0) {
                lo = s;
            } else {
                hi = s;
            }
            if (Double.isNaN(ln)) {
                break;
            }
        }
        // at the ends the minimum is attained there exactly
        double s = lo == 0 ? 0 : hi == 1 ? 1 : (lo + hi) / 2;
        return at(s, lx, ly, lnT, n);
    }

    /** The bound for a given s; s = 0 bounds the sum of the x alone. */
    static Tilt at(double s, double[] lx, double[] ly, double lnT, int n) {
        double[] z = new double[lx.length];
        double ln = tilt(lx, ly, s, z);
        double[] rest = new double[z.length];
        double before = 0;
        for (int i = 0; i < z.length; i++) {
            rest[i] = before;
            before += z[i];
        }
        double after = 0;
        for (int i = z.length - 1; i >= 0; i--) {
            rest[i] += after;
            after += z[i];
        }
        return new Tilt(n, z, rest, s * lnT + n * ln + SLACK);
    }

    /** The derivative of ln Z by s, Σ z_i (ly_i − lx_i)/Z. */
    static double slope(double[] lx, double[] ly, double s) {
        double[] z = new double[lx.length];
        tilt(lx, ly, s, z);
        double slope = 0;
        for (int i = 0; i < z.length; i++) {
            slope += z[i] * (ly[i] - lx[i]);
        }
        return slope;
    }

    /** Fills q and returns ln Z. */
    private static double tilt(double[] lx, double[] ly, double s, double[] q) {
        double most = Double.NEGATIVE_INFINITY;
        for (int i = 0; i < q.length; i++) {
            q[i] = s == 0 ? lx[i] : s == 1 ? ly[i] : (1 - s) * lx[i] + s * ly[i];
            most = Math.max(most, q[i]);
        }
        double sum = 0;
        for (int i = 0; i < q.length; i++) {
            q[i] = Math.exp(q[i] - most);
            sum += q[i];
        }
        for (int i = 0; i < q.length; i++) {
            q[i] /= sum;
        }
        return most + Math.log(sum);
    }

    /** The logarithm of the bound t^s Z^n. */
    double lnChernoff() {
        return lnChernoff;
    }

    /** An upper end of the probability that letter i occurs at all. */
    double occurs(int i) {
        return Math.min(1, n * q[i] * (1 + SLACK));
    }

    /** The least count such that fewer have probability at most e^(−ln). */
    int from(int i, double ln) {
        int lo = 0;
        int hi = (int) Math.floor(n * q[i]);
        while (lo < hi) {
            int mid = (lo + hi + 1) >>> 1;
            if (divergence(mid - 1, i) >= ln) {
                lo = mid;
            } else {
                hi = mid - 1;
            }
        }
        return lo;
    }

    /** The largest count such that more have probability at most e^(−ln). */
    int to(int i, double ln) {
        int lo = (int) Math.min(n, Math.ceil(n * q[i]));
        int hi = n;
        while (lo < hi) {
            int mid = (lo + hi) >>> 1;
            if (divergence(mid + 1, i) >= ln) {
                hi = mid;
            } else {
                lo = mid + 1;
            }
        }
        return lo;
    }

    /** n D(k/n ‖ q_i), less the slack; infinite beyond n. */
    private double divergence(int k, int i) {
        if (k > n) {
            return Double.POSITIVE_INFINITY;
        }
        double d = -SLACK;
        if (k > 0) {
            d += k * Math.log(k / (n * q[i]));
        }
        if (k < n) {
            d += (n - k) * Math.log((n - k) / (n * rest[i]));
        }
        return d;
    }
}
