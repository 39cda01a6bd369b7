package org.minorant.bounds.divergence;

import java.util.Optional;
import org.minorant.core.Enclosure;

/**
 * The least value of ψ(s) = ln Tr (xA)^s (yB)^(1−s) over 0 ≤ s ≤ 1, of which the negative is the Chernoff divergence.
 *
 * <p><b>Argument.</b> Any s gives an upper end. From below, the convex minorant ψ₋ of {@link PetzCurve} lies above its tangent at s, so
 * that min ψ ≥ ψ₋(s) −
 * |ψ₋'(s)| · (the larger of s and 1 − s); near the minimum the slope is rounding.
 *
 * @param minimum an enclosure of min ψ
 * @param s where ψ was found least; the minimum is attained within {@code place}
 * @param place an enclosure of a minimising s
 */
public record Chernoff(Enclosure minimum, double s, Enclosure place) {

    private static final int GRID = 64;

    private static final int STEPS = 80;

    /**
     * Minimises the curve.
     *
     * @param curve ψ
     * @return its minimum
     */
    public static Chernoff of(PetzCurve curve) {
        Optional<PetzCurve.Point> middle = curve.at(0.5);
        if (middle.isEmpty()) {
            Enclosure v = curve.value(0.5);
            Enclosure low = Enclosure.of(Double.NEGATIVE_INFINITY, Double.NEGATIVE_INFINITY);
            return new Chernoff(v.hull(low), 0.5, Enclosure.of(0, 1));
        }
        double s = minimiser(curve);
        Optional<PetzCurve.Point> p = curve.at(s);
        Enclosure low = Enclosure.exact(Double.NEGATIVE_INFINITY);
        if (p.isPresent()) {
            Enclosure slope = p.get().slope().toEnclosure();
            Enclosure left = slope.times(-s);
            Enclosure right = slope.times(Ball.difference(1, s).toEnclosure());
            Enclosure fall = left.min(right).min(Enclosure.ZERO);
            low = p.get().value().toEnclosure().plus(fall);
        }
        Enclosure high = curve.isSharp() && p.isPresent() ? p.get().value().toEnclosure() : curve.value(s);
        if (!curve.isSharp()) {
            for (int k = 0; k <= GRID; k++) {
                double t = (double) k / GRID;
                Enclosure v = curve.value(t);
                if (v.upperWide().compareTo(high.upperWide()) < 0) {
                    high = v;
                    s = t;
                }
            }
        }
        Enclosure minimum = Enclosure.of(low.lowerWide().min(high.upperWide()), high.upperWide());
        return new Chernoff(minimum, s, place(curve, s));
    }

    /** The root of the slope, by Newton's method held in a bracket. */
    private static double minimiser(PetzCurve curve) {
        double low = 0;
        double high = 1;
        if (slope(curve, 0) >= 0) {
            return 0;
        }
        if (slope(curve, 1) <= 0) {
            return 1;
        }
        double s = 0.5;
        for (int i = 0; i < STEPS; i++) {
            Optional<PetzCurve.Point> p = curve.at(s);
            if (p.isEmpty()) {
                return s;
            }
            double d = p.get().slope().hi();
            low = d < 0 ? s : low;
            high = d > 0 ? s : high;
            double next = s - d / p.get().curvature();
            if (d == 0 || Math.abs(next - s) <= Math.ulp(s)) {
                return s;
            }
            s = next > low && next < high ? next : 0.5 * (low + high);
        }
        return s;
    }

    private static double slope(PetzCurve curve, double s) {
        return curve.at(s).map(p -> p.slope().hi()).orElse(s == 0 ? -1.0 : 1.0);
    }

    /** A convex function that is larger at t than at s has no minimum beyond t. */
    private static Enclosure place(PetzCurve curve, double s) {
        return Enclosure.of(beyond(curve, s, -1), beyond(curve, s, 1));
    }

    private static double beyond(PetzCurve curve, double s, int side) {
        Ball here = curve.isSharp() ? curve.at(s).map(PetzCurve.Point::value).orElse(Ball.ZERO) : Ball.ZERO;
        if (curve.isSharp() && curve.at(s).isPresent()) {
            for (double h = 0x1p-45; h < 1; h *= 4) {
                double t = s + side * h;
                Optional<PetzCurve.Point> p = t > 0 && t < 1 ? curve.at(t) : Optional.empty();
                if (p.isPresent() && p.get().value().minus(here).isPositive()) {
                    return t;
                }
            }
        }
        return side < 0 ? 0 : 1;
    }
}
