package org.minorant.core.pair;

import java.util.Optional;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;

/**
 * The secular equation in δ = a − λ,
 *
 * <pre>δ = g(δ) = Σ w_i t b_i / (a − δ + t b_i),</pre>
 *
 * all terms positive, so that a tiny f keeps its digits. g is increasing and convex with g(0) ≥ 0, and f is its smallest fixed point in [0, a].
 *
 * <p><b>Scale.</b> a is brought into [1, 2), and terms are held in units 2^R of the largest min(w_i, w_i t b_i): every sum is then in plain double, however deep f lies. Where t b_i is
 * below 2^-500 or above 2^500, b/(λ + b) is b/λ or 1 within 2^-498. In units, g and f differ by at most the factor 4 and the number of points from one another.
 *
 * <p><b>Enclosure.</b> h = g − id is positive before f and, being convex, negative between f and the next root. A point where h &gt; 0 is certain is a lower end if h &lt; 0 is certain at a later
 * point (it cannot be beyond the second root then), and that later point is the upper end. The relative error of g is at most that of the weights and values, a/λ times that of a,
 * and 2^-53 for each of seven roundings: b/(λ + b) changes relatively no more than b and λ do.
 *
 * <p><b>How close.</b> With p_i = w_i/(λ + t b_i), which sum to one at f, g'(f) = Σ p_i q_i for q_i = t b_i/(λ + t b_i), and by Jensen's inequality f = λ Σ p_i q_i/(1 − q_i) ≥ λ g'/(1 − g'), so that g'(f) ≤
 * f/a: for f ≤ a/2 the relative error of f is at most twice that of g.
 */
final class FixedPointForm {

    private static final double U = 0x1p-53;
    private static final int MOST_STEPS = 100;

    private final Effort effort;
    /** a is total · 2^scale. */
    private final long scale;

    private final double total;
    private final Enclosure whole;
    /** R, relative to 2^scale. */
    private final long unit;

    private final double[] weight;
    private final double[] value;
    private final int size;
    /** Σ w t b over the points with t b far below λ, and Σ w over those with t b far above. */
    private final double small;

    private final double large;
    private final double skipped;
    private final double error;
    /** Relative width of a. */
    private final double spread;

    /** The equation; points left out add at most the given amount to g wherever λ ≥ a/4. */
    FixedPointForm(SpectralPoints points, WideDouble t, WideDouble skippedAtMost, Effort effort) {
        this.effort = effort;
        whole = points.total();
        WideDouble a = whole.upperWide();
        scale = a.exponent();
        total = a.significand();
        WideArray w = points.weights();
        WideArray b = points.values();
        unit = unit(w, b, t);
        double[] kept = new double[w.size()];
        double[] at = new double[w.size()];
        int n = 0;
        CarefulSum sumSmall = new CarefulSum();
        CarefulSum sumLarge = new CarefulSum();
        for (int i = 0; i < w.size(); i++) {
            double c = b.significand(i) * t.significand();
            long ec = b.exponent(i) + t.exponent() - scale;
            long ew = w.exponent(i) - scale - unit;
            if (ec < -500) {
                sumSmall.add(TypeBox.scaled(w.significand(i) * c, ew + ec));
            } else if (ec > 500) {
                sumLarge.add(TypeBox.scaled(w.significand(i), ew));
            } else if (c > 0 && ew > -900) {
                kept[n] = TypeBox.scaled(w.significand(i), ew);
                at[n++] = TypeBox.scaled(c, ec);
            }
        }
        weight = kept;
        value = at;
        size = n;
        small = sumSmall.value();
        large = sumLarge.value();
        // what was scaled to zero is below 2^-395 each
        WideDouble rest = skippedAtMost.timesPowerOfTwo(-scale - unit);
        skipped = Math.nextUp(rest.toDoubleUp() + w.size() * 0x1p-390);
        spread = whole.relativeWidth();
        error = points.weightError() + points.valueError() + (7.01 + w.size() * (w.size() * U)) * U;
    }

    private long unit(WideArray w, WideArray b, WideDouble t) {
        long r = Long.MIN_VALUE;
        for (int i = 0; i < w.size(); i++) {
            if (w.significand(i) > 0 && b.significand(i) > 0) {
                long e = Math.min(0, b.exponent(i) + t.exponent() - scale);
                r = Math.max(r, w.exponent(i) - scale + e);
            }
        }
        return r == Long.MIN_VALUE ? 0 : r;
    }

    /** The fixed point, if it is certain to be at most about half of a. */
    Optional<Enclosure> solve() {
        double d = 0;
        double slope = 0;
        for (int step = 0; step < MOST_STEPS; step++) {
            effort.checkpoint();
            double lambda = lambda(d);
            double h = apply(lambda) - d;
            slope = TypeBox.scaled(slope(lambda), unit);
            if (slope >= 1 || !(h > 4 * U * d)) {
                break;
            }
            d += h / (1 - slope);
            if (TypeBox.scaled(d, unit) > total / 2) {
                return Optional.empty();
            }
        }
        if (d == 0) {
            return Optional.of(
                    Enclosure.of(WideDouble.ZERO, WideDouble.of(apply(total) * 2 + skipped * 2, unit + scale)));
        }
        double gap = (error + spread + U) / Math.max(0.25, 1 - slope) + skipped / d;
        int tries = 0;
        for (; gap < 0.25; gap *= tries++ < 12 ? 1.25 : 4) {
            double low = d * (1 - gap);
            double high = d * (1 + gap);
            double most = apply(lambda(high));
            double least = apply(lambda(low));
            if (TypeBox.scaled(high, unit) < 0.7 * total
                    && least - least * errorAt(low) > low
                    && most + (most * errorAt(high) + skipped) < high) {
                return Optional.of(Enclosure.of(WideDouble.of(low, unit + scale), WideDouble.of(high, unit + scale)));
            }
        }
        return Optional.empty();
    }

    private double errorAt(double d) {
        return (error + spread * total / lambda(d)) * (1 + 0x1p-20);
    }

    private double lambda(double d) {
        return total - TypeBox.scaled(d, unit);
    }

    /** g in units, for λ in those of a. */
    private double apply(double lambda) {
        double s = small / lambda + large;
        double carried = 0;
        for (int i = 0; i < size; i++) {
            double term = weight[i] * (value[i] / (lambda + value[i]));
            double t = s + term;
            double z = t - s;
            carried += (s - (t - z)) + (term - z);
            s = t;
        }
        return s + carried;
    }

    /** About g' in units. */
    private double slope(double lambda) {
        double s = small / (lambda * lambda);
        for (int i = 0; i < size; i++) {
            double r = 1 / (lambda + value[i]);
            s += weight[i] * value[i] * r * r;
        }
        return s;
    }
}
