package org.minorant.core.curve;

import java.util.ArrayList;
import java.util.List;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;

/**
 * Certified values of a curve F in ascending order of t, and what they say about F in between.
 *
 * <p><b>Argument.</b> F is concave and nondecreasing with F(0) = 0, F ≤ t · steepest and F ≤ most. A chord through two samples, extended beyond either, lies
 * above F there; so on the interval between two neighbouring samples F lies below the extended chord from the left, below that from the right, and below the smaller
 * of the two ({@link LineBound}). For one thread.
 */
final class CurveSamples {

    /** Chords to this many samples on either side are tried: the nearest are the steepest, those further away less noisy. */
    static final int CHORDS = 5;

    private final Curve curve;
    private final WideDouble steepest;
    private final WideDouble most;
    private final List<CurveSample> samples = new ArrayList<>();

    CurveSamples(Curve curve, WideDouble steepest, WideDouble most) {
        this.curve = curve;
        this.steepest = steepest;
        this.most = most;
        samples.add(CurveSample.ORIGIN);
    }

    /**
     * An interval between two samples, or between the last and an end of the range.
     *
     * @param bound no larger value does F(t) − ta take in it
     * @param meeting where the two best lines meet, from 0 to 1
     */
    record Interval(WideDouble from, WideDouble to, WideDouble bound, double meeting) {}

    /** A number that F(t)/t does not exceed. */
    WideDouble steepest() {
        return steepest;
    }

    /** A number that F does not exceed. */
    WideDouble most() {
        return most;
    }

    int size() {
        return samples.size();
    }

    CurveSample get(int k) {
        return samples.get(k);
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
    CurveSample at(WideDouble t) {
        int k = before(t);
        if (k < samples.size() && samples.get(k).t().equals(t)) {
            return samples.get(k);
        }
        Enclosure f = curve.at(t);
        CurveSample s = new CurveSample(t, f.lowerWide(), f.upperWide());
        samples.add(k, s);
        return s;
    }

    /** The interval from sample k to the next, or to the end of the range if that comes first. */
    Interval interval(int k, WideDouble a, WideDouble end) {
        WideDouble x = samples.get(k).t();
        WideDouble y = k + 1 == samples.size() ? end : samples.get(k + 1).t().min(end);
        List<LineBound> lines = new ArrayList<>();
        lines.add(line(x.timesUp(steepest), y.timesUp(steepest), x, y, a));
        lines.add(line(most, most, x, y, a));
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
            CurveSample s = samples.get(i);
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
     * The level line through sample r, and chords from samples j &gt; r through it, extended to the left. CurveSample r may lie beyond the end of
     * the range.
     */
    private void addFromRight(List<LineBound> lines, int r, WideDouble x, WideDouble y, WideDouble a) {
        if (r == samples.size()) {
            return;
        }
        CurveSample through = samples.get(r);
        WideDouble u = through.upper();
        lines.add(line(u, u, x, y, a));
        for (int j = r + 1; j < samples.size() && j <= r + CHORDS; j++) {
            CurveSample s = samples.get(j);
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

    /** A line above F, as a line above F(t) − ta. */
    private static LineBound line(WideDouble left, WideDouble right, WideDouble x, WideDouble y, WideDouble a) {
        return new LineBound(up(left, x.timesDown(a)), up(right, y.timesDown(a)));
    }
}
