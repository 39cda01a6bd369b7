package org.minorant.bounds;

import java.util.ArrayList;
import java.util.List;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;

/**
 * Samples of a concave curve g on t ≥ 0 with g(0) = 0, and what they prove about its supremum.
 *
 * <p><b>Argument.</b> A lower end is the largest lower end of a sample. For an upper end take two neighbouring samples p &lt; q and, further out, any o
 * &lt; p and r &gt; q. By concavity the line through o and p lies above g to the right of p, and the line through q and r above g to the left of
 * q. Raising the value at p or q and lowering that at o or r raises the line, so upper ends serve at p, q and lower ends at o, r.
 * Between p and q, g is at most any mean θL₁ + (1−θ)L₂ of the two lines, a line whose maximum is at p or q; θ is chosen near the best. To
 * the right of the last sample the caller's number holds.
 *
 * <p>Not thread-safe: lives inside one call.
 */
final class ConcaveSamples {

    /** How many samples on one side are tried for the far end of a line. */
    private static final int REACH = 4;

    /** Relative width that is always enough. */
    private static final WideDouble ENOUGH = WideDouble.of(0x1p-46);

    private final WideDouble beyond;
    private WideDouble reached = WideDouble.ZERO;
    private final List<WideDouble> points = new ArrayList<>();
    private final List<Enclosure> values = new ArrayList<>();
    /** What holds between sample i and the next. */
    private final List<Gap> gaps = new ArrayList<>();

    ConcaveSamples(WideDouble beyond) {
        this.beyond = beyond;
        points.add(WideDouble.ZERO);
        values.add(Enclosure.ZERO);
    }

    void add(WideDouble t, Enclosure value) {
        int i = points.size();
        while (points.get(i - 1).compareTo(t) > 0) {
            i--;
        }
        note(value);
        if (points.get(i - 1).equals(t)) {
            // two samples at one point have no chord
            return;
        }
        points.add(i, t);
        values.add(i, value);
        gaps.add(i - 1, Gap.NONE);
        for (int k = Math.max(0, i - 1 - REACH); k <= Math.min(i + REACH, gaps.size() - 1); k++) {
            gaps.set(k, Gap.of(this, k));
        }
    }

    /** Takes note of a value that is to raise the lower end only. */
    void note(Enclosure value) {
        reached = reached.max(value.lowerWide());
    }

    /** Whether there is a sample within this distance, relatively. */
    boolean isNear(WideDouble t, double distance) {
        for (WideDouble p : points) {
            if (Math.abs(relative(p, t)) < distance) {
                return true;
            }
        }
        return false;
    }

    int size() {
        return points.size();
    }

    WideDouble t(int i) {
        return points.get(i);
    }

    Enclosure value(int i) {
        return values.get(i);
    }

    /** The index of the sample of largest certified value, not counting the one at 0. */
    int best() {
        int b = 1;
        for (int i = 2; i < points.size(); i++) {
            if (values.get(i).lowerWide().compareTo(values.get(b).lowerWide()) > 0) {
                b = i;
            }
        }
        return b;
    }

    /** What the samples prove. */
    Enclosure supremum() {
        WideDouble high = beyond;
        for (Gap gap : gaps) {
            high = high.max(gap.upper());
        }
        return Enclosure.of(reached, high.max(reached));
    }

    /** Whether the two sides are about as close to each other as the values are known. */
    boolean isTight() {
        Enclosure s = supremum();
        Enclosure top = values.get(best());
        WideDouble noise = top.upperWide().plusUp(top.lowerWide().negate()).timesUp(WideDouble.of(4));
        WideDouble open = s.upperWide().plusUp(s.lowerWide().negate());
        return s.lowerWide().signum() > 0
                && open.compareTo(noise.plusUp(s.lowerWide().timesUp(ENOUGH))) <= 0;
    }

    /** Where the chords cross in the gap of which least is known. */
    WideDouble crossing() {
        Gap worst = gaps.get(0);
        for (Gap gap : gaps) {
            worst = gap.upper().compareTo(worst.upper()) > 0 ? gap : worst;
        }
        return worst.crossing();
    }

    /** The vertex of the parabola through a sample and its two neighbours, or the crossing if that is no maximum between them. */
    WideDouble vertex(int b) {
        double x1 = relative(points.get(b - 1), points.get(b));
        double x3 = relative(points.get(b + 1), points.get(b));
        WideDouble top = middle(b);
        double y1 = relative(middle(b - 1), top) / x1;
        double y3 = relative(middle(b + 1), top) / x3;
        double curvature = (y3 - y1) / (x3 - x1);
        double x = -(y1 - curvature * x1) / (2 * curvature);
        return curvature < 0 && x > x1 && x < x3 ? points.get(b).timesDown(WideDouble.of(1 + x)) : crossing();
    }

    private WideDouble middle(int i) {
        return values.get(i).lowerWide().plusDown(values.get(i).upperWide()).timesPowerOfTwo(-1);
    }

    /** (a − b)/b for positive b, roughly. */
    private static double relative(WideDouble a, WideDouble b) {
        return a.plusDown(b.negate()).dividedByDown(b).toDoubleDown();
    }

    /**
     * What holds between two neighbouring samples.
     *
     * @param upper a number that g does not exceed there
     * @param crossing where the two lines cross, roughly
     */
    private record Gap(WideDouble upper, WideDouble crossing) {

        static final Gap NONE = new Gap(WideDouble.POSITIVE_INFINITY, WideDouble.ZERO);

        static Gap of(ConcaveSamples s, int i) {
            Enclosure p = point(s.t(i));
            Enclosure q = point(s.t(i + 1));
            Enclosure width = q.minus(p);
            Enclosure atP = point(s.value(i).upperWide());
            Enclosure atQ = point(s.value(i + 1).upperWide());
            boolean hasLeft = i > 0;
            boolean hasRight = i + 2 < s.size();
            // the line of the left pair at q, and that of the right pair at p
            Enclosure leftAtQ = Enclosure.infinite();
            Enclosure rightAtP = Enclosure.infinite();
            for (int far = 1; far <= REACH; far++) {
                // all lines pass through the near sample: the lowest at the other end is the lowest throughout
                leftAtQ = i - far >= 0 ? lower(leftAtQ, extended(s, i - far, i, width)) : leftAtQ;
                rightAtP = i + 1 + far < s.size() ? lower(rightAtP, extended(s, i + 1 + far, i + 1, width)) : rightAtP;
            }
            WideDouble upper =
                    atP.max(leftAtQ).upperWide().min(rightAtP.max(atQ).upperWide());
            double share = 0.5;
            if (hasLeft && hasRight) {
                Enclosure above = rightAtP.minus(atP);
                Enclosure overshoot = leftAtQ.minus(atQ);
                share = share(above, above.plus(overshoot));
                double theta = share(rightAtP.minus(atQ), above.plus(overshoot));
                Enclosure w = Enclosure.exact(theta);
                Enclosure rest = w.complement();
                Enclosure mixedAtP = atP.times(w).plus(rightAtP.times(rest));
                Enclosure mixedAtQ = leftAtQ.times(w).plus(atQ.times(rest));
                upper = upper.min(mixedAtP.max(mixedAtQ).upperWide());
            }
            return new Gap(upper, p.plus(width.times(share)).lowerWide());
        }

        private static Enclosure lower(Enclosure a, Enclosure b) {
            return a.upperWide().compareTo(b.upperWide()) <= 0 ? a : b;
        }

        private static Enclosure point(WideDouble v) {
            return Enclosure.of(v, v);
        }

        /** The line from the far sample (low) through the near one (high), this far beyond the near one. */
        private static Enclosure extended(ConcaveSamples s, int far, int near, Enclosure distance) {
            Enclosure run = point(s.t(near)).minus(point(s.t(far)));
            Enclosure base = far < near ? run : run.negate();
            Enclosure rise =
                    point(s.value(near).upperWide()).minus(point(s.value(far).lowerWide()));
            return point(s.value(near).upperWide()).plus(rise.times(distance.dividedBy(base)));
        }

        private static double share(Enclosure part, Enclosure whole) {
            double x = whole.lowerWide().signum() > 0 ? part.dividedBy(whole).midpoint() : 0.5;
            return Math.min(1, Math.max(0, x));
        }
    }
}
