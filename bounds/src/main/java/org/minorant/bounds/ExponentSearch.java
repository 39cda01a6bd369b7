package org.minorant.bounds;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;

/**
 * Encloses sup over s and all members of E(s) − sR, see {@link ExponentFamily}.
 *
 * <p><b>From below.</b> Any s, with the member known there.
 *
 * <p><b>From above.</b> Let two neighbouring points a &lt; b have the lines A_x + m_x(s − a) and B_x − n_x(b − s). A member is below the mean of both, hence, for s = (1−t)a + tb and with weight 1−t on the first,
 * below the mean over its own weights of (1−t)A_x + tB_x + t(1−t)(b−a)(m_x − n_x): an excess of second order in b − a over what is interpolated, and no concavity of the maximum over members is needed, which is
 * not there in general. The largest over x of the largest of these quadratics, minus sR, bounds the interval. Beyond the last point lines that fall stay below their value there, others below their caps.
 * Intervals are divided, the worst one first, until the bound meets the value.
 */
final class ExponentSearch {

    private static final double ENOUGH = 1e-12;

    private static final int MOST_POINTS = 90;

    private static final int MOST_ROOT_STEPS = 40;

    /** Without end, s is followed up to here. */
    private static final double FAR = 0x1p14;

    private final ExponentFamily family;
    private final Enclosure rate;
    private final List<ExponentPoint> points = new ArrayList<>();
    private WideDouble best = WideDouble.ZERO;
    private double bestS;

    private ExponentSearch(ExponentFamily family, Enclosure rate) {
        this.family = family;
        this.rate = rate;
    }

    /**
     * The exponent at a rate.
     *
     * @param supremum sup E(s) − sR; infinite if that is certain
     * @param s where the lower end is reached; infinite with the supremum
     */
    record Result(Enclosure supremum, double s) {}

    static Result of(ExponentFamily family, Enclosure rate) {
        return new ExponentSearch(family, rate).run();
    }

    private Result run() {
        ExponentPoint first = noted(family.first());
        double r = rate.midpoint();
        ExponentPoint right = noted(family.at(family.last().orElse(1 + 2 * first.s())));
        while (family.last().isEmpty() && right.s() < FAR && !falls(right)) {
            if (family.lastSlope(right).lowerWide().compareTo(rate.upperWide()) > 0) {
                return new Result(Enclosure.infinite(), Double.POSITIVE_INFINITY);
            }
            right = noted(family.at(Math.min(FAR, 4 * right.s())));
        }
        if (family.last().isEmpty() && rate.upperWide().signum() == 0) {
            WideDouble limit = family.limit().lowerWide();
            bestS = limit.compareTo(best) > 0 ? Double.POSITIVE_INFINITY : bestS;
            best = best.max(limit);
        }
        if (right.slope() < r && first.slope() > r) {
            aroundRoot(first, right);
        }
        return refined();
    }

    /** Whether all lines surely fall, minus sR, from a point on. */
    private boolean falls(ExponentPoint p) {
        return p.lines().stream().allMatch(l -> l.slope().upperWide().compareTo(rate.lowerWide()) <= 0);
    }

    private ExponentPoint noted(ExponentPoint p) {
        points.add(p);
        WideDouble low = p.value().minus(rate.times(p.s())).lowerWide();
        if (low.compareTo(best) > 0 || points.size() == 1) {
            best = low.max(best);
            bestS = p.s();
        }
        return p;
    }

    /** Points close to the root of the slope, found by secants and halving. */
    private void aroundRoot(ExponentPoint left, ExponentPoint right) {
        double r = rate.midpoint();
        ExponentPoint a = left;
        ExponentPoint b = right;
        double s = a.s();
        for (int i = 0; i < MOST_ROOT_STEPS && b.s() - a.s() > 1e-9 * b.s(); i++) {
            double secant = a.s() + (b.s() - a.s()) * (a.slope() - r) / (a.slope() - b.slope());
            s = i % 3 != 2 && secant > a.s() && secant < b.s() ? secant : 0.5 * (a.s() + b.s());
            ExponentPoint p = family.at(s);
            boolean small = Math.abs(p.slope() - r) < 1e-13;
            if (p.slope() > r) {
                a = p;
            } else {
                b = p;
            }
            if (small) {
                break;
            }
        }
        noted(family.at(s));
        double room = 0.5 * Math.min(s - left.s(), right.s() - s);
        for (double away : new double[] {1e-7 * s, 1e-4 * s, 1e-2 * s}) {
            if (away < room) {
                noted(family.at(s - away));
                noted(family.at(s + away));
            }
        }
    }

    private Result refined() {
        points.sort(Comparator.comparingDouble(ExponentPoint::s));
        List<WideDouble> bounds = new ArrayList<>();
        for (int i = 0; i + 1 < points.size(); i++) {
            bounds.add(between(points.get(i), points.get(i + 1)));
        }
        WideDouble tail = family.last().isPresent() ? WideDouble.ZERO : beyond(points.get(points.size() - 1));
        while (points.size() < MOST_POINTS) {
            int worst = worst(bounds);
            double excess = bounds.get(worst).plusUp(best.negate()).toDoubleUp();
            double a = points.get(worst).s();
            double b = points.get(worst + 1).s();
            double s = division(a, b);
            if (!(excess > ENOUGH * (1 + best.toDoubleUp())) || !(s > a && s < b)) {
                break;
            }
            ExponentPoint p = noted(family.at(s));
            points.remove(points.size() - 1);
            points.add(worst + 1, p);
            bounds.set(worst, between(points.get(worst), p));
            bounds.add(worst + 1, between(p, points.get(worst + 2)));
        }
        WideDouble most = tail.max(best);
        for (WideDouble b : bounds) {
            most = most.max(b);
        }
        if (family.last().isEmpty()) {
            // caps hold everywhere, and rounding does not grow with s in them
            WideDouble cap = WideDouble.ZERO;
            for (Enclosure c : points.get(points.size() - 1).caps().get()) {
                cap = cap.max(c.upperWide());
            }
            most = most.min(cap).max(best);
        }
        return new Result(Enclosure.of(best, most), bestS);
    }

    private static int worst(List<WideDouble> bounds) {
        int worst = 0;
        for (int i = 1; i < bounds.size(); i++) {
            worst = bounds.get(i).compareTo(bounds.get(worst)) > 0 ? i : worst;
        }
        return worst;
    }

    /** Half way by the logarithm of the distance from the best point, near which intervals must be short. */
    private double division(double a, double b) {
        double centre = Math.min(bestS, FAR);
        double from = Math.abs(a - centre);
        double to = Math.abs(b - centre);
        if (bestS > a && bestS < b) {
            return bestS;
        }
        double least = Math.min(from, to);
        double most = Math.max(from, to);
        double d = Math.sqrt(Math.max(least, most / 64) * most);
        return centre <= a ? centre + d : centre - d;
    }

    private WideDouble between(ExponentPoint a, ExponentPoint b) {
        Enclosure h = Enclosure.exact(b.s()).minus(Enclosure.exact(a.s()));
        Enclosure low = Enclosure.of(rate.lowerWide(), rate.lowerWide());
        WideDouble most = WideDouble.NEGATIVE_INFINITY;
        for (int x = 0; x < a.lines().size(); x++) {
            Enclosure left = top(a, x).minus(low.times(a.s()));
            Enclosure right = top(b, x).minus(low.times(b.s()));
            WideDouble bend = h.times(
                            a.lines().get(x).slope().minus(b.lines().get(x).slope()))
                    .upperWide();
            most = most.max(quadratic(left, right, bend.max(WideDouble.ZERO)));
        }
        return most;
    }

    private static Enclosure top(ExponentPoint p, int x) {
        WideDouble top = p.lines().get(x).value().upperWide();
        return Enclosure.of(top, top);
    }

    /** An upper end of (1−t)l + tr + t(1−t)k over 0 ≤ t ≤ 1. */
    private static WideDouble quadratic(Enclosure l, Enclosure r, WideDouble k) {
        WideDouble ends = l.upperWide().max(r.upperWide());
        if (ends.isInfinite() || k.isInfinite()) {
            return WideDouble.POSITIVE_INFINITY;
        }
        Enclosure bend = Enclosure.of(k, k);
        Enclosure rise = r.minus(l);
        boolean inside =
                rise.lowerWide().compareTo(k) < 0 && rise.upperWide().compareTo(k.negate()) > 0 && k.signum() > 0;
        // the top is at t = (k + r − l)/2k
        return inside
                ? l.plus(rise.plus(bend).square().dividedBy(bend.times(4)))
                        .upperWide()
                        .max(ends)
                : ends;
    }

    /** A bound on all s from the last point on. */
    private WideDouble beyond(ExponentPoint p) {
        Enclosure low = Enclosure.of(rate.lowerWide(), rate.lowerWide()).times(p.s());
        WideDouble most = WideDouble.ZERO;
        for (int x = 0; x < p.lines().size(); x++) {
            boolean falls = p.lines().get(x).slope().upperWide().compareTo(rate.lowerWide()) <= 0;
            Enclosure height = falls ? top(p, x) : p.caps().get().get(x);
            most = most.max(height.minus(low).upperWide());
        }
        return most;
    }
}
