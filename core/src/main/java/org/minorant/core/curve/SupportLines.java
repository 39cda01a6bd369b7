package org.minorant.core.curve;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;
import org.minorant.core.curve.CurveSamples.Interval;

/**
 * Encloses sup over t ≥ 0 of F(t) − at from certified values of a curve F alone: the Legendre transform of F, or the highest of its support lines.
 *
 * <p><b>Argument.</b> Every t gives a lower end. Between two neighbouring samples F lies below the chords through samples on either side, extended ({@link CurveSample});
 * below F(t) ≤ t · steepest and F ≤ most; and beyond t = most/a the supremum cannot lie. The largest bound of all intervals is the upper end. If only an enclosure of a is
 * given, lower ends take its upper end and the other way round, so the result holds for each a in it.
 *
 * <p><b>Cost.</b> Where the samples are taken is a matter of speed only. With a {@link Guess}, the peak is found on the guess, and then certified values at the peak
 * and beside it close the gap, as near as the tolerance and the widths of the values ask for: 3 to 5 values, if the guess is good. Without one, or as far as the guess
 * was bad, certified values are interpolated in logarithms, and chords are crossed where that fails: 10 to 15 values for smooth curves and tolerances near 1e-9. On a corner
 * of a piecewise linear F the chords meet at the corner and the result is exact.
 *
 * <p>Samples are kept from one slope to the next. For one thread.
 */
public final class SupportLines {

    private static final int MOST_SPLITS = 120;

    /** F may be known badly at one t, a kink hit exactly, and well beside it: then t(1 ± 2^-k) are tried for these k. */
    private static final int[] ASIDE = {20, 26, 32, 38, 44};

    /** A relative gap worth that effort. */
    private static final double POOR = 0x1p-40;

    /** t falls by 2^-1, 2^-3, 2^-7, … down to 2^-262143 while nothing above zero is found. */
    private static final int MOST_LEAPS = 18;

    /** Samples in vain before chords are crossed instead. */
    private static final int IN_VAIN = 3;

    /** Samples in vain that end the search once the gap is within this many widths. */
    private static final int PATIENCE = 6;

    /** Samples in vain that end it once the gap is within so many widths. */
    private static final int STUBBORN = 16;

    private static final double FAR_FROM_NOISE = 32;

    private static final double NEAR_NOISE = 3;

    /** How much further the next sample is taken where the last have climbed in one direction. */
    private static final double FURTHER = 4;

    /** Gaps between three samples that are closed to a few widths of the values are not worth less. */
    private static final double WIDTHS = 4;

    private final Curve curve;
    private final CurveSamples samples;

    /**
     * Starts without any sample.
     *
     * @param curve F
     * @param steepest a number that F(t)/t does not exceed, positive and finite
     * @param most a number that F does not exceed, positive and finite
     */
    public SupportLines(Curve curve, WideDouble steepest, WideDouble most) {
        this.curve = curve;
        this.samples = new CurveSamples(curve, steepest, most);
    }

    /**
     * Tells how many certified values were asked for so far.
     *
     * @return the number of samples, without F(0) = 0
     */
    public int evaluations() {
        return samples.size() - 1;
    }

    /**
     * Encloses the supremum, to one of the given gaps or as near as the values of F allow.
     *
     * @param slope a, not negative; where only an enclosure is known, a positive one
     * @param relativeGap a width that is small enough, relative to the supremum
     * @param absoluteGap a width that is small enough in any case
     * @return sup over t ≥ 0 of F(t) − at
     */
    public Supremum at(Enclosure slope, double relativeGap, double absoluteGap) {
        if (slope.lowerWide().signum() <= 0) {
            return limit();
        }
        if (slope.lowerWide().compareTo(samples.steepest()) >= 0) {
            // then F(t) − ta ≤ t(steepest − a) ≤ 0
            return new Supremum(Enclosure.ZERO, CurveSample.ORIGIN, WideDouble.ZERO, WideDouble.ZERO);
        }
        return new Search(slope, relativeGap, absoluteGap).run();
    }

    /** For a = 0: lim F(t), t → ∞. F does not decrease. */
    private Supremum limit() {
        for (int j = 0; j < MOST_LEAPS; j++) {
            WideDouble before = highest(WideDouble.ZERO).lower();
            CurveSample s = samples.at(WideDouble.ONE.timesPowerOfTwo((1L << j) - 1));
            if (s.lower().compareTo(before) < 0) {
                break;
            }
        }
        CurveSample best = highest(WideDouble.ZERO);
        WideDouble upper = samples.most().max(best.lower());
        return new Supremum(Enclosure.of(best.lower(), upper), best, best.t(), WideDouble.POSITIVE_INFINITY);
    }

    /** The sample with the highest support line. */
    private CurveSample highest(WideDouble slope) {
        CurveSample best = CurveSample.ORIGIN;
        WideDouble most = WideDouble.ZERO;
        for (int k = 1; k < samples.size(); k++) {
            WideDouble v = samples.get(k).supportDown(slope);
            if (v.compareTo(most) > 0) {
                most = v;
                best = samples.get(k);
            }
        }
        return best;
    }

    /** The search for one slope: the intervals from 0 to most/a with their bounds. */
    private final class Search {

        private final WideDouble least;
        private final WideDouble slope;
        private final double relativeGap;
        private final WideDouble absoluteGap;
        private final WideDouble end;
        private final List<Interval> intervals = new ArrayList<>();
        private double reach = 1;
        private int direction;

        Search(Enclosure a, double relativeGap, double absoluteGap) {
            this.least = a.lowerWide();
            this.slope = a.upperWide();
            this.relativeGap = relativeGap;
            this.absoluteGap = WideDouble.of(absoluteGap);
            end = samples.most().dividedByUp(least);
            int count = samples.before(end);
            for (int k = 0; k < count; k++) {
                intervals.add(samples.interval(k, least, end));
            }
        }

        Supremum run() {
            if (!isEnough(current()) && curve.guess().isPresent()) {
                follow(curve.guess().get());
            }
            if (!isEnough(current()) && !vanishes()) {
                leap();
            }
            return vanishes() ? current() : narrow();
        }

        /** Whether F(t) ≤ ta with certainty from the smallest t on that is worth looking at, as F(t)/t does not increase. */
        private boolean vanishes() {
            CurveSample s = samples.get(Math.min(1, samples.size() - 1));
            return s.t().signum() > 0
                    && s.t().compareTo(smallest()) <= 0
                    && s.upper().compareTo(s.t().timesDown(least)) <= 0;
        }

        private WideDouble smallest() {
            return end.timesPowerOfTwo(1 - (1L << MOST_LEAPS));
        }

        /** Certifies what a guess says. */
        private void follow(Guess guess) {
            double target = Math.max(relativeGap, 0x1p-50) / 2;
            Optional<GuessedPeak> found = GuessedPeak.of(guess, Logs.of(slope), Logs.of(end), target);
            if (found.isEmpty()) {
                add(smallest());
                return;
            }
            GuessedPeak peak = found.get();
            WideDouble t = WideDouble.expDown(peak.lnT());
            CurveSample s = add(t);
            WideDouble height = s.supportDown(slope);
            if (height.signum() <= 0) {
                return;
            }
            // what is known badly needs neighbours further away
            double noise = WIDTHS * s.width().dividedByUp(height).toDoubleUp();
            double further = noise > peak.gap() && peak.gap() > 0 ? Math.sqrt(noise / peak.gap()) : 1;
            for (double x : new double[] {peak.right() * further, -peak.left() * further}) {
                if (!isEnough(current())) {
                    add(Logs.moved(t, Math.max(-1, Math.min(1, x))));
                }
            }
        }

        /** Samples towards t = 0 in growing leaps until the support lines fall again: F(t)/t does not increase. */
        private void leap() {
            for (int j = 1; j <= MOST_LEAPS; j++) {
                CurveSample best = highest(slope);
                boolean above = best.t().signum() > 0;
                if (above && samples.before(best.t()) > 1) {
                    return;
                }
                WideDouble t = above ? leapFrom(best.t()) : end.timesPowerOfTwo(1 - (1L << j));
                CurveSample s = add(t);
                // nothing but the trivial bound is known here, nor will it be further down
                boolean blind = s.lower().signum() == 0 && s.upper().compareTo(t.timesDown(samples.steepest())) >= 0;
                if (blind || isEnough(current())) {
                    return;
                }
            }
        }

        /** Twice as far from the first sample as the second is, the other way. */
        private WideDouble leapFrom(WideDouble first) {
            WideDouble second = samples.size() > 2 ? samples.get(2).t().min(end) : end;
            return Logs.moved(first, -2 * Logs.ratio(second, first));
        }

        private Supremum narrow() {
            int aside = 0;
            int vain = 0;
            WideDouble reached = WideDouble.POSITIVE_INFINITY;
            Supremum closest = current();
            for (int split = 0; ; split++) {
                Supremum s = current();
                WideDouble gap = s.gap();
                // a sample known badly can take away more than it gives
                closest = gap.compareTo(closest.gap()) < 0 ? s : closest;
                if (split == MOST_SPLITS || isEnough(s)) {
                    return closest;
                }
                boolean better = gap.compareTo(reached.timesPowerOfTwo(-1)) < 0;
                vain = better ? 0 : vain + 1;
                reached = better ? gap : reached;
                int w = widest();
                WideDouble noise = noise(w);
                boolean hopeless = isHopeless(gap, noise, vain);
                Optional<WideDouble> next = hopeless ? Optional.empty() : next(s, w, split, vain);
                WideDouble upper = s.value().upperWide();
                if (next.isPresent()) {
                    add(next.get());
                    int moved = highest(slope).t().compareTo(s.best().t());
                    reach = moved != 0 && moved == direction ? FURTHER * reach : 1;
                    direction = moved;
                } else if (aside < ASIDE.length && gap.compareTo(upper.timesDown(WideDouble.of(POOR))) > 0) {
                    WideDouble t = noisier(w);
                    double step = Math.scalb(1.0, -ASIDE[aside++]);
                    add(t.timesDown(WideDouble.of(1 - step)));
                    add(t.timesDown(WideDouble.of(1 + step)));
                } else {
                    return closest;
                }
            }
        }

        /** Whether more samples are unlikely to help. */
        private boolean isHopeless(WideDouble gap, WideDouble noise, int vain) {
            double widths = vain > STUBBORN ? FAR_FROM_NOISE : vain > PATIENCE ? NEAR_NOISE : 1;
            return gap.compareTo(noise.timesUp(WideDouble.of(widths))) <= 0;
        }

        /** Whether the gap is as small as was asked for. */
        private boolean isEnough(Supremum s) {
            WideDouble asked = s.value().upperWide().timesDown(WideDouble.of(relativeGap));
            return s.gap().compareTo(asked.max(absoluteGap)) <= 0;
        }

        /** The next t, if there is any that may help. */
        private Optional<WideDouble> next(Supremum s, int w, int split, int vain) {
            Interval i = intervals.get(w);
            WideDouble meeting = splitting(i, split);
            boolean apart = meeting.compareTo(i.from()) > 0 && meeting.compareTo(i.to()) < 0;
            Optional<WideDouble> chords = apart ? Optional.of(meeting) : Optional.empty();
            if (s.value().lowerWide().signum() <= 0) {
                return chords;
            }
            int b = samples.before(s.best().t());
            Optional<WideDouble> far = w == b || w == b - 1
                    ? Optional.empty()
                    : outside(i, s.best().t());
            if (far.isPresent()) {
                return far;
            }
            Peak p = peak(s.best(), s.value().lowerWide());
            if (!p.isBracketed()) {
                return chords;
            }
            Optional<WideDouble> near = near(s, p, split);
            boolean turn = vain % (IN_VAIN + 1) == IN_VAIN;
            return (turn ? chords.or(() -> near) : near.or(() -> chords)).or(() -> step(s.best(), p.halfWay()));
        }

        /** Where interpolation says that the peak is, or a point beside it that closes the gap. */
        private Optional<WideDouble> near(Supremum s, Peak p, int split) {
            WideDouble height = s.value().lowerWide();
            double target =
                    Math.max(relativeGap, absoluteGap.dividedByUp(height).toDoubleUp()) / 2;
            double noise = WIDTHS * s.best().width().dividedByUp(height).toDoubleUp();
            return step(s.best(), p.next(Math.max(target, noise), split % 2 != 0, reach));
        }

        private Optional<WideDouble> step(CurveSample from, double x) {
            return Double.isNaN(x)
                    ? Optional.empty()
                    : Optional.of(Logs.moved(from.t(), x)).filter(this::isNew);
        }

        /**
         * Where a chord is to begin that bounds F far from the best sample: samples close to that one are too close to each other for what is known of F there.
         */
        private Optional<WideDouble> outside(Interval i, WideDouble best) {
            boolean left = i.to().compareTo(best) <= 0;
            WideDouble edge = left ? i.to() : i.from();
            WideDouble other = left ? i.from() : i.to();
            double near = Math.abs(Logs.ratio(edge, best));
            double far = other.signum() == 0 ? 1 : Math.min(1, Math.abs(Logs.ratio(other, edge)));
            double x = Math.sqrt(near * far);
            return x > near && x < far
                    ? Optional.of(Logs.moved(edge, left ? -x : x)).filter(this::isNew)
                    : Optional.empty();
        }

        private boolean isNew(WideDouble t) {
            int k = samples.before(t);
            return t.signum() > 0
                    && t.compareTo(end) < 0
                    && (k == samples.size() || !samples.get(k).t().equals(t));
        }

        /** The samples around the best one, as nodes. */
        private Peak peak(CurveSample best, WideDouble height) {
            int b = samples.before(best.t());
            int from = Math.max(1, b - CurveSamples.CHORDS);
            int to = Math.min(samples.before(end), b + CurveSamples.CHORDS + 1);
            int n = Math.max(to - from, 0) + 1;
            double[] x = new double[n];
            double[] y = new double[n];
            for (int i = 0; i < n - 1; i++) {
                CurveSample s = samples.get(from + i);
                x[i] = i == b - from ? 0 : Logs.ratio(s.t(), best.t());
                y[i] = s.lower().signum() > 0 ? Logs.ratio(s.middle(), best.middle()) : Double.NaN;
            }
            x[n - 1] = Logs.ratio(end, best.t());
            y[n - 1] = Double.NaN;
            return new Peak(x, y, b - from, height.dividedByDown(best.middle()).toDoubleDown());
        }

        /** What the samples at hand say. */
        private Supremum current() {
            CurveSample best = highest(slope);
            WideDouble lower = best.supportDown(slope);
            WideDouble upper = lower;
            WideDouble from = best.t();
            WideDouble to = best.t();
            for (Interval i : intervals) {
                if (i.bound().compareTo(lower) > 0) {
                    upper = upper.max(i.bound());
                    from = from.min(i.from());
                    to = to.max(i.to());
                }
            }
            return new Supremum(Enclosure.of(lower, upper), best, from, to);
        }

        private int widest() {
            int w = 0;
            for (int k = 1; k < intervals.size(); k++) {
                if (intervals.get(k).bound().compareTo(intervals.get(w).bound()) > 0) {
                    w = k;
                }
            }
            return w;
        }

        /** Takes a sample and renews the bounds that its chords may better. */
        private CurveSample add(WideDouble t) {
            int count = samples.size();
            int p = samples.before(t);
            CurveSample s = samples.at(t);
            if (samples.size() == count || p > intervals.size()) {
                return s;
            }
            if (t.compareTo(end) < 0) {
                intervals.add(p, samples.interval(p, least, end));
            }
            int reach = CurveSamples.CHORDS + 1;
            for (int k = Math.max(0, p - reach); k < Math.min(intervals.size(), p + reach); k++) {
                intervals.set(k, samples.interval(k, least, end));
            }
            return s;
        }

        /**
         * Where to split: at the meeting of the two best lines; in the middle of the exponents every other time while an interval spans
         * decades.
         */
        private WideDouble splitting(Interval w, int split) {
            long span = w.to().exponent() - w.from().exponent();
            boolean open = w.from().signum() == 0;
            if ((open || span > 3) && split % 2 != 0) {
                return w.to().timesPowerOfTwo(open ? -8 : -span / 2);
            }
            WideDouble length = CurveSamples.down(w.to(), w.from());
            return w.from().plusDown(length.timesDown(WideDouble.of(w.meeting())));
        }

        /**
         * Twice the width of the best known value around an interval: a gap below it is not worth splitting. The value at t = 0, which is exact, says
         * nothing about those nearby.
         */
        private WideDouble noise(int w) {
            WideDouble width = WideDouble.POSITIVE_INFINITY;
            // where nothing above zero is known, widths are all there is to see
            int around = highest(slope).t().signum() > 0 ? 1 : 0;
            for (int k = Math.max(1, w - around); k <= Math.min(w + 1 + around, samples.size() - 1); k++) {
                width = width.min(samples.get(k).width());
            }
            return width.timesPowerOfTwo(1);
        }

        /** The end of an interval at which F is known less well. */
        private WideDouble noisier(int w) {
            CurveSample l = samples.get(w);
            boolean right = w + 1 < samples.size() && samples.get(w + 1).width().compareTo(l.width()) > 0;
            return right ? samples.get(w + 1).t() : l.t();
        }
    }
}
