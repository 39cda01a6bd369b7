package org.minorant.bounds.divergence;

import org.minorant.core.Enclosure;

/**
 * The strong converse exponent H*_r(ρ‖σ) = sup over α &gt; 1 of ((α−1)/α)(r − D̃_α(ρ‖σ)) of the normalised operators, in nats.
 *
 * <p><b>Argument.</b> With u = (α−1)/α the function is h(u) = ur − N(u), see {@link Sandwiched}; N is convex on [0, 1] (ln Tr(…)^α is
 * convex in α, Mosonyi
 * and Ogawa 2015, corollary 3.11, and N is its perspective) with N(0) = 0 and N(1) the max-divergence, so h is concave and its supremum a
 * maximum
 * over [0, 1]. Any u gives a lower end. If h is certainly smaller at u₁ &lt; u₀ and at u₂ &gt; u₀ than at u₀, the maximum lies between
 * them, below the
 * chords through neighbouring points, extended.
 */
public final class StrongConverse {

    private static final int GOLDEN_STEPS = 16;

    private static final int PARABOLAS = 40;

    private static final double GOLDEN = 0.6180339887498949;

    private final Sandwiched norm;
    private final Ball rate;

    private StrongConverse(Sandwiched norm, Ball rate) {
        this.norm = norm;
        this.rate = rate;
    }

    /**
     * Encloses H*_r(ρ‖σ), which increases with r.
     *
     * @param pair A and B
     * @param rate r in nats, at least 0
     * @return the exponent in nats; 0 where r ≤ D(ρ‖σ)
     */
    public static Enclosure value(StatePair pair, Enclosure rate) {
        Enclosure low = at(pair, rate.lower());
        return rate.lower() == rate.upper() ? low : low.hull(at(pair, rate.upper()));
    }

    private static Enclosure at(StatePair pair, double rate) {
        if (pair.isSame()) {
            return Enclosure.exact(rate);
        }
        Enclosure d = RelativeEntropy.value(pair);
        if (rate <= d.lower()) {
            return Enclosure.ZERO;
        }
        if (pair.containment() != Containment.CERTAIN) {
            // u(r − D̃_α) ≤ r − D for 0 ≤ u ≤ 1
            return Enclosure.of(
                    0, Enclosure.exact(rate).minus(d).max(Enclosure.ZERO).upper());
        }
        return new StrongConverse(Sandwiched.of(pair), Ball.of(rate)).maximum();
    }

    /** h(u); N(0) = 0 exactly. */
    private Ball height(double u) {
        if (u == 0) {
            return Ball.ZERO;
        }
        Ball n = norm.norm(Ball.of(u)).orElse(new Ball(0, 0, Double.MAX_VALUE / 4));
        return rate.times(u).minus(n);
    }

    private Enclosure maximum() {
        double u = refined(coarse());
        Ball top = height(u);
        double low = Math.max(0, Math.max(top.lower(), height(1).lower()));
        double best = upper(u, top);
        return Enclosure.of(Math.min(low, best), best);
    }

    /** Golden section, down to where parabolas take over. */
    private double coarse() {
        double a = 0;
        double b = 1;
        double x = b - GOLDEN * (b - a);
        double y = a + GOLDEN * (b - a);
        double fx = height(x).hi();
        double fy = height(y).hi();
        for (int i = 0; i < GOLDEN_STEPS; i++) {
            if (fx >= fy) {
                b = y;
                y = x;
                fy = fx;
                x = b - GOLDEN * (b - a);
                fx = height(x).hi();
            } else {
                a = x;
                x = y;
                fx = fy;
                y = a + GOLDEN * (b - a);
                fy = height(y).hi();
            }
        }
        return 0.5 * (a + b);
    }

    /** Vertices of parabolas through three points ever closer; their differences are taken with thirty digits. */
    private double refined(double start) {
        double u = start;
        double step = 1e-3;
        for (int i = 0; i < PARABOLAS; i++) {
            double room = Math.min(u, 1 - u);
            double h = step * room;
            Ball middle = height(u);
            Ball left = height(u - h).minus(middle);
            Ball right = height(u + h).minus(middle);
            double bend = left.plus(right).hi();
            if (!(bend < 0 && room > 1e-12)) {
                return u;
            }
            double shift = 0.5 * h * left.minus(right).hi() / bend;
            if (Math.abs(shift) < 1e-13 * room) {
                return u;
            }
            step = Math.min(step, Math.max(1e-7, Math.abs(shift) / room));
            u = Math.min(Math.max(u + shift, 0.5 * u), 0.5 * (1 + u));
        }
        return u;
    }

    /** An upper end of max h from chords around u. */
    private double upper(double u, Ball top) {
        double left = 0;
        double right = 1;
        Ball atLeft = Ball.ZERO;
        Ball atRight = height(1);
        for (double h = 0x1p-40; h < 1; h *= 4) {
            double t = u - h;
            if (t > 0) {
                Ball v = height(t);
                if (top.minus(v).isPositive()) {
                    left = t;
                    atLeft = v;
                    break;
                }
            }
        }
        for (double h = 0x1p-40; h < 1; h *= 4) {
            double t = u + h;
            if (t < 1) {
                Ball v = height(t);
                if (top.minus(v).isPositive()) {
                    right = t;
                    atRight = v;
                    break;
                }
            }
        }
        // right of u, h lies below the chord from the left; left of u, below the chord from the right
        double onRight = extended(top, atLeft, u - left, right - u);
        double onLeft = extended(top, atRight, right - u, u - left);
        return top.widen(Math.max(onRight, onLeft)).upper();
    }

    /** How far a chord through (0, side) and (run, top) rises over a further distance. */
    private static double extended(Ball top, Ball side, double run, double further) {
        double rise = top.minus(side).upper();
        return rise <= 0 ? 0 : rise * (further / run) * (1 + 1e-9);
    }
}
