package org.minorant.core.pair;

import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;

/**
 * Encloses f = a − λ for the root λ of Σ w_i/(λ + t b_i) = 1, a = Σ w_i. In δ = a − λ the equation reads
 *
 * <pre>δ = g(δ) = Σ w_i t b_i / (a − δ + t b_i),</pre>
 *
 * all terms positive, so that a tiny f keeps its digits. g is increasing and convex with g(0) ≥ 0, and f is its smallest fixed point in [0, a].
 *
 * <p><b>Near f = a</b>, where A stops being too large for B, that root meets the trivial one δ = a and is lost in it. There the equation in λ itself is used: φ(λ) = Σ w_i/(λ + t b_i)
 * decreases, and its root is simple.
 *
 * <p><b>Enclosure.</b> h = g − id is positive before f and, being convex, negative between f and the next root. A point where h &gt; 0 is certain is a lower end if h &lt; 0 is certain at a later
 * point (it cannot be beyond the second root then), and that later point is the upper end. Signs are decided in outward-rounded arithmetic on intervals for w_i and b_i, with wide exponents
 * throughout.
 */
final class SecularRoot {

    private static final int MOST_STEPS = 200;

    /** A relative width of 2^-48 is as good as rounding allows. */
    private static final int ENOUGH = 49;

    /** Brings a − λ to 2^-60 of a. */
    private static final int BISECTIONS = 60;

    private final Enclosure[] weight;
    private final Enclosure[] value;
    private final Enclosure total;

    private SecularRoot(Enclosure[] weights, Enclosure[] values, Enclosure t) {
        weight = weights;
        value = new Enclosure[weights.length];
        Enclosure sum = Enclosure.ZERO;
        for (int i = 0; i < weights.length; i++) {
            value[i] = values[i].times(t);
            sum = sum.plus(weights[i]);
        }
        total = sum;
    }

    /** The fixed point for weights w_i, values b_i and the weight t on B. */
    static Enclosure enclose(Enclosure[] weights, Enclosure[] values, Enclosure t) {
        return new SecularRoot(weights, values, t).enclose();
    }

    private Enclosure enclose() {
        WideDouble most = total.upperWide();
        if (most.signum() == 0) {
            return Enclosure.ZERO;
        }
        WideDouble guess = iterate();
        for (int bits = 49; bits >= 3; bits -= 2) {
            WideDouble gap = guess.timesPowerOfTwo(-bits);
            WideDouble low = guess.plusDown(gap.negate());
            WideDouble high = guess.plusUp(gap).min(total.lowerWide());
            if (excess(low).lowerWide().signum() > 0
                    && high.compareTo(low) > 0
                    && excess(high).upperWide().signum() < 0) {
                Enclosure f = Enclosure.of(low, high);
                return bits < ENOUGH && guess.compareTo(most.timesPowerOfTwo(-1)) > 0 ? f.intersect(byEigenvalue()) : f;
            }
        }
        // f = a, or too close to it to tell: the iterate is a lower end in any case
        return Enclosure.of(guess, most).intersect(byEigenvalue());
    }

    /** a − λ, with λ between the largest point where φ > 1 is certain and the smallest where φ < 1 is. */
    private Enclosure byEigenvalue() {
        WideDouble low = WideDouble.ZERO;
        WideDouble high = total.upperWide();
        WideDouble least = low;
        WideDouble most = high;
        for (int step = 0; step < BISECTIONS; step++) {
            WideDouble x = low.plusDown(most).timesPowerOfTwo(-1);
            if (phi(x).lowerWide().compareTo(WideDouble.ONE) > 0) {
                low = x;
            } else {
                most = x;
            }
            WideDouble y = least.plusUp(high).timesPowerOfTwo(-1);
            if (phi(y).upperWide().compareTo(WideDouble.ONE) < 0) {
                high = y;
            } else {
                least = y;
            }
        }
        return total.minus(Enclosure.of(low, high)).min(total).max(Enclosure.ZERO);
    }

    /** Σ w_i/(λ + t b_i) for λ > 0. */
    private Enclosure phi(WideDouble lambda) {
        Enclosure at = Enclosure.of(lambda, lambda);
        Enclosure s = Enclosure.ZERO;
        for (int i = 0; i < value.length; i++) {
            s = s.plus(weight[i].dividedBy(value[i].plus(at)));
        }
        return s;
    }

    /** g(δ) − δ. */
    private Enclosure excess(WideDouble delta) {
        return apply(delta).minus(Enclosure.of(delta, delta));
    }

    private Enclosure apply(WideDouble delta) {
        Enclosure lambda = total.minus(Enclosure.of(delta, delta)).max(Enclosure.ZERO);
        Enclosure s = Enclosure.ZERO;
        for (int i = 0; i < value.length; i++) {
            if (weight[i].upperWide().signum() > 0 && value[i].upperWide().signum() > 0) {
                // b/(λ+b) increases with b and decreases with λ
                Enclosure b = value[i];
                WideDouble low = b.lowerWide().signum() == 0
                        ? WideDouble.ZERO
                        : b.lowerWide().dividedByDown(lambda.upperWide().plusUp(b.lowerWide()));
                WideDouble high = b.upperWide().dividedByUp(lambda.lowerWide().plusDown(b.upperWide()));
                s = s.plus(weight[i].times(Enclosure.of(low, high)));
            }
        }
        return s;
    }

    /**
     * Newton's method on h(δ) = g(δ) − δ from 0: h is convex and decreasing there, so the iterates increase to the smallest root. With h rounded down and the slope made steeper
     * than it can be, no iterate passes the root.
     */
    private WideDouble iterate() {
        WideDouble d = WideDouble.ZERO;
        for (int step = 0; step < MOST_STEPS; step++) {
            Enclosure lambda = total.minus(Enclosure.of(d, d));
            double slope = -1 - value.length * 0x1p-48;
            for (int i = 0; i < value.length; i++) {
                if (weight[i].upperWide().signum() > 0) {
                    WideDouble denominator = lambda.upperWide().plusUp(value[i].upperWide());
                    if (denominator.signum() > 0) {
                        double ratio =
                                value[i].upperWide().dividedByDown(denominator).toDoubleDown();
                        double rest =
                                weight[i].upperWide().dividedByDown(denominator).toDoubleDown();
                        slope += ratio * rest;
                    }
                }
            }
            Enclosure h = excess(d);
            WideDouble mid = h.lowerWide();
            if (!(slope < 0) || mid.signum() <= 0) {
                return d;
            }
            WideDouble next = d.plusDown(mid.dividedByDown(WideDouble.of(-slope)));
            if (next.compareTo(d) <= 0 || next.compareTo(total.lowerWide()) >= 0) {
                return d;
            }
            d = next;
        }
        return d;
    }
}
