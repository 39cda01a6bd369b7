package org.minorant.bounds.divergence;

import java.util.Optional;
import org.minorant.core.Enclosure;

/**
 * The Hoeffding divergence H_r(ρ‖σ) = sup over 0 ≤ s &lt; 1 of (−sr − ln Tr ρ^(1−s) σ^s)/(1 − s) of the normalised operators, in nats; here
 * A belongs to σ and
 * B to ρ, so that ψ(s) = ln Tr σ^s ρ^(1−s).
 *
 * <p><b>Argument.</b> With v = s/(1−s) the function is h(v) = −vr − (1+v)ψ(v/(1+v)), concave because the perspective of the convex ψ is
 * convex; its
 * derivative is k(s) = −r − ψ(s) − (1−s)ψ'(s). Any s gives a lower end. With the convex minorant ψ₋ of {@link PetzCurve} instead, h only
 * grows, and
 * the supremum lies between two points where k is certainly positive and certainly negative, below the tangent at any point between. H_r ≤
 * D(σ‖ρ)
 * caps it; it is infinite if k is certainly positive at s = 1, where h keeps rising.
 */
public final class Hoeffding {

    private static final int STEPS = 200;

    private Hoeffding() {}

    /**
     * Encloses H_r(ρ‖σ), which decreases with r.
     *
     * @param pair σ and ρ, in this order
     * @param rate r in nats, at least 0
     * @return the divergence in nats
     */
    public static Enclosure value(StatePair pair, Enclosure rate) {
        if (pair.isSame()) {
            return Enclosure.ZERO;
        }
        Enclosure high = at(pair, rate.lower());
        return rate.lower() == rate.upper() ? high : high.hull(at(pair, rate.upper()));
    }

    private static Enclosure at(StatePair pair, double rate) {
        if (rate == 0) {
            return RelativeEntropy.value(pair);
        }
        PetzCurve curve = PetzCurve.normalised(pair);
        Optional<Ball> end = slope(curve, 1, rate);
        if (curve.isSharp() && end.isPresent() && end.get().isPositive()) {
            return Enclosure.infinite();
        }
        double s = maximiser(curve, rate);
        Enclosure cap = RelativeEntropy.value(pair);
        Enclosure lower = height(curve, s, rate).max(Enclosure.ZERO);
        if (!curve.isSharp()) {
            for (int i = 0; i < 64; i++) {
                lower = lower.max(height(curve, i / 64.0, rate));
            }
        }
        double upper = Math.min(cap.upper(), above(curve, s, rate));
        return Enclosure.of(Math.min(lower.lower(), upper), upper);
    }

    /** k(s); empty where the curve may be −∞. */
    private static Optional<Ball> slope(PetzCurve curve, double s, double rate) {
        return curve.at(s)
                .map(p -> Ball.of(-rate)
                        .minus(p.value())
                        .minus(Ball.difference(1, s).times(p.slope())));
    }

    /** The value of the function at s, with the whole curve. */
    private static Enclosure height(PetzCurve curve, double s, double rate) {
        Ball scale = Ball.difference(1, s);
        Optional<PetzCurve.Point> p = curve.at(s);
        if (curve.isSharp() && p.isPresent()) {
            return height(p.get(), s, rate).toEnclosure();
        }
        return Enclosure.exact(-rate).times(s).minus(curve.value(s)).dividedBy(scale.toEnclosure());
    }

    private static Ball height(PetzCurve.Point p, double s, double rate) {
        return Ball.of(-rate).times(s).minus(p.value()).dividedBy(Ball.difference(1, s));
    }

    /** The root of k, which decreases, by bisection and secants in its midpoints. */
    private static double maximiser(PetzCurve curve, double rate) {
        double low = 0;
        double high = 1;
        double atLow = middle(curve, 0, rate);
        double atHigh = middle(curve, 1, rate);
        if (atLow <= 0) {
            return 0;
        }
        for (int i = 0; i < STEPS && high - low > Math.ulp(low); i++) {
            double secant = low + (high - low) * (atLow / (atLow - atHigh));
            double s = i % 3 == 2 || !(secant > low && secant < high) ? 0.5 * (low + high) : secant;
            double d = middle(curve, s, rate);
            if (d == 0 || s == low || s == high) {
                return s;
            }
            if (d > 0) {
                low = s;
                atLow = d;
            } else {
                high = s;
                atHigh = d;
            }
        }
        return low;
    }

    private static double middle(PetzCurve curve, double s, double rate) {
        return slope(curve, s, rate).map(Ball::hi).orElse(s < 0.5 ? 1.0 : -1.0);
    }

    /** The tangent at s over a certified bracket, in terms of v. */
    private static double above(PetzCurve curve, double s, double rate) {
        Optional<PetzCurve.Point> p = curve.at(s);
        Optional<Ball> k = slope(curve, s, rate);
        if (p.isEmpty() || k.isEmpty()) {
            return Double.POSITIVE_INFINITY;
        }
        double left = s == 0 ? 0 : bracket(curve, s, rate, -1);
        double right = bracket(curve, s, rate, 1);
        Ball base = height(p.get(), s, rate);
        double up = Math.max(0, k.get().upper());
        double down = Math.max(0, -k.get().lower());
        if (up > 0 && right == 1) {
            return Double.POSITIVE_INFINITY;
        }
        double rise = up == 0 ? 0 : up * ((right - s) / ((1 - right) * (1 - s)));
        double fall = down * ((s - left) / ((1 - left) * (1 - s)));
        return base.widen(Math.max(rise, fall) * (1 + 1e-9)).upper();
    }

    /** A point on one side of s beyond which the supremum cannot lie. */
    private static double bracket(PetzCurve curve, double s, double rate, int side) {
        double room = side < 0 ? s : 1 - s;
        for (double h = 0x1p-44; h < 1; h *= 4) {
            double t = s + side * h * room;
            Optional<Ball> k = t > 0 && t < 1 && t != s ? slope(curve, t, rate) : Optional.empty();
            if (k.isPresent() && (side < 0 ? k.get() : k.get().negate()).isPositive()) {
                return t;
            }
        }
        return side < 0 ? 0 : 1;
    }
}
