package org.minorant.measurement;

import java.util.ArrayList;
import java.util.List;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;
import org.minorant.core.pair.PositivePair;

/**
 * Certified values of F(t) = Tr[tρ ∧ σ] in ascending order of t, and what they say about F in between.
 *
 * <p><b>Argument.</b> F is concave and nondecreasing with F(0) = 0, F ≤ t Tr ρ and F ≤ Tr σ. A chord through two samples, extended beyond either, lies
 * above F there; so on the interval between two neighbouring samples F lies below the extended chord from the left, below that from the right, and below the smaller
 * of the two ({@link LineBound}). For one thread.
 */
final class CurveSamples {

    /** Chords to this many samples on either side are tried: the nearest are the steepest, those further away less noisy. */
    static final int CHORDS = 5;

    private final PositivePair pair;
    private final WideDouble firstTrace;
    private final WideDouble secondTrace;
    private final List<Sample> samples = new ArrayList<>();

    CurveSamples(PositivePair pair) {
        this.pair = pair;
        this.firstTrace = pair.firstTrace().upperWide();
        this.secondTrace = pair.secondTrace().upperWide();
        samples.add(new Sample(WideDouble.ZERO, WideDouble.ZERO, WideDouble.ZERO));
    }

    /** F(t) between two ends. */
    record Sample(WideDouble t, WideDouble lower, WideDouble upper) {

        /** A lower end of F(t) − tα. */
        WideDouble supportDown(WideDouble alpha) {
            return lower.plusDown(t.timesUp(alpha).negate());
        }

        WideDouble width() {
            return upper.plusUp(lower.negate());
        }
    }

    /**
     * An interval between two samples, or between the last and an end of the range.
     *
     * @param bound no larger value does F(t) − tα take in it
     * @param meeting where the two best lines meet, from 0 to 1
     */
    record Interval(WideDouble from, WideDouble to, WideDouble bound, double meeting) {}

    /** An upper end of Tr ρ. */
    WideDouble firstTrace() {
        return firstTrace;
    }

    /** An upper end of Tr σ. */
    WideDouble secondTrace() {
        return secondTrace;
    }

    int size() {
        return samples.size();
    }

    Sample get(int k) {
        return samples.get(k);
    }

    /** The first sample, F(0) = 0. */
    Sample origin() {
        return samples.get(0);
    }

    /** The number of samples before t. */
    int before(WideDouble t) {
        int low = 0;
        int high = samples.size();
        while (low < high) {
            int k = (low + high) >>> 1;
            if (samples.get(k).t().compareTo(t) < 0) {
                low = k + 1;
            } else {
                high = k;
            }
        }
        return low;
    }

    /** The sample at t, taken now if there is none. */
    Sample at(WideDouble t) {
        int k = before(t);
        if (k < samples.size() && samples.get(k).t().equals(t)) {
            return samples.get(k);
        }
        Enclosure f = pair.traceMinimum(t, WideDouble.ONE);
        Sample s = new Sample(t, f.lowerWide(), f.upperWide());
        samples.add(k, s);
        return s;
    }

    /** The interval from sample k to the next, or to the end of the range if that comes first. */
    Interval interval(int k, WideDouble a, WideDouble end) {
        WideDouble x = samples.get(k).t();
        WideDouble y = k + 1 == samples.size() ? end : samples.get(k + 1).t().min(end);
        List<LineBound> lines = new ArrayList<>();
        lines.add(line(x.timesUp(firstTrace), y.timesUp(firstTrace), x, y, a));
        lines.add(line(secondTrace, secondTrace, x, y, a));
        addFromLeft(lines, k, x, y, a);
        addFromRight(lines, k + 1, x, y, a);
        WideDouble least = WideDouble.POSITIVE_INFINITY;
        double meeting = 0.5;
        for (int i = 0; i < lines.size(); i++) {
            for (int j = 0; j <= i; j++) {
                WideDouble m = lines.get(i).mostWith(lines.get(j));
                if (m.compareTo(least) < 0) {
                    least = m;
                    meeting = lines.get(i).meets(lines.get(j));
                }
            }
        }
        return new Interval(x, y, least, meeting);
    }

    /** Chords from samples i &lt; k through sample k, extended to the right. */
    private void addFromLeft(List<LineBound> lines, int k, WideDouble x, WideDouble y, WideDouble a) {
        WideDouble u = samples.get(k).upper();
        for (int i = Math.max(0, k - CHORDS); i < k; i++) {
            Sample s = samples.get(i);
            WideDouble ratio = up(y, x).dividedByUp(down(x, s.t()));
            WideDouble rise = up(u, s.lower()).timesUp(ratio);
            lines.add(line(u, u.plusUp(rise), x, y, a));
        }
        if (k > CHORDS) {
            // the chord from the origin: F(t)/t does not increase
            lines.add(line(u, u.timesUp(y.dividedByUp(x)), x, y, a));
        }
    }

    /**
     * The level line through sample r, and chords from samples j &gt; r through it, extended to the left. Sample r may lie beyond the end of
     * the range.
     */
    private void addFromRight(List<LineBound> lines, int r, WideDouble x, WideDouble y, WideDouble a) {
        if (r == samples.size()) {
            return;
        }
        Sample through = samples.get(r);
        WideDouble u = through.upper();
        lines.add(line(u, u, x, y, a));
        for (int j = r + 1; j < samples.size() && j <= r + CHORDS; j++) {
            Sample s = samples.get(j);
            WideDouble drop = down(s.lower(), u).max(WideDouble.ZERO);
            WideDouble run = up(s.t(), through.t());
            WideDouble atLeft = drop.timesDown(down(through.t(), x).dividedByDown(run));
            WideDouble atRight = drop.timesDown(down(through.t(), y).dividedByDown(run));
            lines.add(line(up(u, atLeft), up(u, atRight), x, y, a));
        }
    }

    /** An upper end of a − b. */
    static WideDouble up(WideDouble a, WideDouble b) {
        return a.plusUp(b.negate());
    }

    /** A lower end of a − b. */
    static WideDouble down(WideDouble a, WideDouble b) {
        return a.plusDown(b.negate());
    }

    /** A line above F, as a line above F(t) − tα. */
    private static LineBound line(WideDouble left, WideDouble right, WideDouble x, WideDouble y, WideDouble a) {
        return new LineBound(up(left, x.timesDown(a)), up(right, y.timesDown(a)));
    }
}
