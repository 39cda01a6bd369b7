package org.minorant.core.pair;

import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;

/**
 * Encloses the smallest fixed point δ in [0, a] of g(δ) = Σ w_i t b_i / (a − δ + t b_i), a = Σ w_i; see {@link RankOnePair}.
 *
 * <p>Uses wide exponents throughout: roots far below the smallest double are found as well.
 */
final class SecularRoot {

    private static final int MOST_STEPS = 200;

    private final double[] weightLower;
    private final double[] weightUpper;
    private final Enclosure[] value;
    private final Enclosure total;

    private SecularRoot(double[] wl, double[] wu, double[] bl, double[] bu, Enclosure t) {
        weightLower = wl;
        weightUpper = wu;
        value = new Enclosure[wl.length];
        Enclosure sum = Enclosure.ZERO;
        for (int i = 0; i < wl.length; i++) {
            value[i] = Enclosure.of(bl[i], bu[i]).times(t);
            sum = sum.plus(Enclosure.of(wl[i], wu[i]));
        }
        total = sum;
    }

    static Enclosure enclose(double[] wl, double[] wu, double[] bl, double[] bu, WideDouble tLower, WideDouble tUpper) {
        return new SecularRoot(wl, wu, bl, bu, Enclosure.of(tLower, tUpper)).enclose();
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
                return Enclosure.of(low, high);
            }
        }
        // f = a, or too close to it to tell: the iterate is a lower end in any case
        return Enclosure.of(guess, most);
    }

    /** g(δ) − δ. */
    private Enclosure excess(WideDouble delta) {
        return apply(delta).minus(Enclosure.of(delta, delta));
    }

    private Enclosure apply(WideDouble delta) {
        Enclosure lambda = total.minus(Enclosure.of(delta, delta)).max(Enclosure.ZERO);
        Enclosure s = Enclosure.ZERO;
        for (int i = 0; i < value.length; i++) {
            if (weightUpper[i] > 0 && value[i].upperWide().signum() > 0) {
                Enclosure w = Enclosure.of(weightLower[i], weightUpper[i]);
                // b/(λ+b) increases with b and decreases with λ
                Enclosure b = value[i];
                WideDouble low = b.lowerWide().signum() == 0
                        ? WideDouble.ZERO
                        : b.lowerWide().dividedByDown(lambda.upperWide().plusUp(b.lowerWide()));
                WideDouble high = b.upperWide().dividedByUp(lambda.lowerWide().plusDown(b.upperWide()));
                s = s.plus(w.times(Enclosure.of(low, high)));
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
                if (weightUpper[i] > 0) {
                    WideDouble denominator = lambda.upperWide().plusUp(value[i].upperWide());
                    if (denominator.signum() > 0) {
                        double ratio =
                                value[i].upperWide().dividedByDown(denominator).toDoubleDown();
                        double rest = WideDouble.of(weightUpper[i])
                                .dividedByDown(denominator)
                                .toDoubleDown();
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
