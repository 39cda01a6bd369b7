package org.minorant.core.pair;

import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;

/**
 * The secular equation in the positive eigenvalue λ of ψψ* − tB itself: φ(λ) = w_0/λ + Σ w_i/(λ + t b_i) = 1, w_0 the weight of ψ in the kernel of B, and λ = 0 where φ(0) ≤ 1. Then f = a − λ. For f of the order
 * of a this keeps all digits, also where A stops being too large for B: there the root of {@link FixedPointForm} meets the trivial one δ = a.
 *
 * <p><b>Enclosure.</b> φ decreases, so that φ &gt; 1 certain gives a lower end of λ and φ &lt; 1 certain an upper one. With p_i = w_i/(λ + t b_i), Σ p_i = 1, Jensen's inequality gives −φ' = Σ p_i/(λ + t b_i) ≥
 * 1/Σ p_i(λ + t b_i) = 1/a: a relative error ε of φ moves λ by at most about ε a. 1/φ is a concave function of λ (a weighted harmonic mean), so Newton's method on it goes up to the root from the left.
 */
final class EigenvalueForm {

    private static final double U = 0x1p-53;
    private static final int MOST_STEPS = 200;
    /** So many small steps away from the root before large ones. */
    private static final int CLOSE = 12;

    /** λ below this part of a does not show in f. */
    private static final double LEAST = 0x1p-70;

    private final Effort effort;
    private final long scale;
    private final Enclosure whole;
    private final double[] weight;
    private final double[] value;
    private final int size;
    private final double kernelLow;
    private final double kernelHigh;
    private final double error;

    EigenvalueForm(SpectralPoints points, WideDouble t, Effort effort) {
        this.effort = effort;
        whole = points.total();
        scale = whole.upperWide().exponent();
        WideArray w = points.weights();
        WideArray b = points.values();
        weight = new double[w.size()];
        value = new double[w.size()];
        int n = 0;
        double inKernel = 0;
        for (int i = 0; i < w.size(); i++) {
            double x = TypeBox.scaled(w.significand(i), w.exponent(i) - scale);
            long ec = b.exponent(i) + t.exponent() - scale;
            if (ec < -500) {
                // invisible beside λ ≥ 2^-70
                inKernel += x;
            } else if (ec <= 500) {
                weight[n] = x;
                value[n++] = TypeBox.scaled(b.significand(i) * t.significand(), ec);
            }
        }
        size = n;
        Enclosure k = points.kernel();
        kernelLow = inKernel + k.lowerWide().timesPowerOfTwo(-scale).toDoubleDown();
        kernelHigh = (inKernel + k.upperWide().timesPowerOfTwo(-scale).toDoubleUp()) * (1 + 4 * U);
        // t b, λ + t b, the quotient and the sum are rounded once each, two more with the kernel; comparing with one is
        // exact
        double roundings = (kernelHigh > 0 ? 6.01 : 4.01) + w.size() * (w.size() * U);
        error = (points.weightError() + points.valueError() + roundings * U) * (1 + 0x1p-20);
    }

    /** a − λ. */
    Enclosure solve() {
        double a = whole.upperWide().significand();
        double lambda = iterate();
        double low = 0;
        double high = 2 * a;
        double closest = a * error;
        int step = 0;
        for (double gap = closest; gap < a; gap *= step++ < CLOSE ? 1.1 : 4) {
            if (upper(lambda + gap) < 1) {
                high = lambda + gap;
                break;
            }
        }
        step = 0;
        for (double gap = closest; gap < lambda - LEAST; gap *= step++ < CLOSE ? 1.1 : 4) {
            if (lower(lambda - gap) > 1) {
                low = lambda - gap;
                break;
            }
        }
        if (kernelHigh == 0 && upper(0) < 1) {
            low = 0;
            high = 0;
        }
        Enclosure root = Enclosure.of(WideDouble.of(low, scale), WideDouble.of(high, scale));
        return whole.minus(root).min(whole).max(Enclosure.ZERO);
    }

    /** The root without proof, from the left. */
    private double iterate() {
        double x = kernelHigh > 0 ? LEAST : 0;
        for (int step = 0; step < MOST_STEPS; step++) {
            effort.checkpoint();
            double phi = apply(x) + (x > 0 ? kernelHigh / x : 0);
            if (phi <= 1) {
                return x;
            }
            double next = x + phi * (phi - 1) / slope(x);
            if (!(next > x * (1 + 2 * U))) {
                return x;
            }
            x = next;
        }
        return x;
    }

    // what was left out for being scaled to zero, or for values beyond 2^500, is below 2^-400 beside λ ≥ 2^-70

    private double lower(double x) {
        double phi = kernelHigh == 0 ? apply(x) : apply(x) + kernelLow / x;
        return phi - phi * error;
    }

    private double upper(double x) {
        double phi = kernelHigh == 0 ? apply(x) : apply(x) + kernelHigh / x;
        return phi + (phi * error + 0x1p-400);
    }

    private double apply(double lambda) {
        double s = 0;
        double carried = 0;
        for (int i = 0; i < size; i++) {
            double term = weight[i] / (lambda + value[i]);
            double t = s + term;
            double z = t - s;
            carried += (s - (t - z)) + (term - z);
            s = t;
        }
        return s + carried;
    }

    /** −φ'. */
    private double slope(double lambda) {
        double s = lambda > 0 ? kernelHigh / (lambda * lambda) : 0;
        for (int i = 0; i < size; i++) {
            double r = 1 / (lambda + value[i]);
            s += weight[i] * r * r;
        }
        return s;
    }
}
