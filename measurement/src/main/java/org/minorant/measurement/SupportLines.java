package org.minorant.measurement;

import java.util.ArrayList;
import java.util.List;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;
import org.minorant.core.pair.PositivePair;
import org.minorant.measurement.CurveSamples.Interval;
import org.minorant.measurement.CurveSamples.Sample;

/**
 * Encloses β(α) = sup over t ≥ 0 of F(t) − tα from certified values of F(t) = Tr[tρ ∧ σ] alone.
 *
 * <p><b>Argument.</b> Every t gives a lower end; between samples, extended chords give upper ends ({@link CurveSamples}); beyond t = Tr σ/α the supremum cannot
 * lie. The interval with the largest bound is split where its two best chords meet, until lower and upper end agree: on a kink of a piecewise linear F the chords
 * meet at the kink and the result is exact; on a smooth F the gap shrinks with the square of the spacing, down to the widths of the values of F.
 *
 * <p>Samples are kept from one α to the next. For one thread.
 */
final class SupportLines {

    private static final int MOST_SPLITS = 120;

    /** F may be known badly at one t, a kink hit exactly, and well beside it: then t(1 ± 2^-k) are tried for these k. */
    private static final int[] ASIDE = {20, 26, 32, 38, 44};

    /** A relative gap worth that effort. */
    private static final double POOR = 0x1p-40;

    /** t falls by 2^-1, 2^-3, 2^-7, … down to 2^-2047 while nothing above zero is found. */
    private static final int MOST_LEAPS = 11;

    private final CurveSamples samples;

    SupportLines(PositivePair pair) {
        samples = new CurveSamples(pair);
    }

    /**
     * What is known of β(α).
     *
     * @param value an enclosure of β(α)
     * @param best the sample with the highest support line at α
     * @param from no maximiser lies before this t
     * @param to nor beyond this t
     */
    record Supremum(Enclosure value, Sample best, WideDouble from, WideDouble to) {}

    /** β(α), to one of the given gaps or as near as the values of F allow. */
    Supremum at(double alpha, double relativeGap, double absoluteGap) {
        WideDouble a = WideDouble.of(alpha);
        if (alpha == 0) {
            return limit();
        }
        if (a.compareTo(samples.firstTrace()) >= 0) {
            // then F(t) − tα ≤ t(Tr ρ − α) ≤ 0
            return new Supremum(Enclosure.ZERO, samples.origin(), WideDouble.ZERO, WideDouble.ZERO);
        }
        return new Search(a).run(relativeGap, absoluteGap);
    }

    /** β(0) = lim F(t), t → ∞: F does not decrease, and stays below Tr σ. */
    private Supremum limit() {
        for (int j = 0; j < MOST_LEAPS; j++) {
            WideDouble before = highest(WideDouble.ZERO).lower();
            Sample s = samples.at(WideDouble.ONE.timesPowerOfTwo((1L << j) - 1));
            if (s.lower().compareTo(before) < 0) {
                break;
            }
        }
        Sample best = highest(WideDouble.ZERO);
        WideDouble upper = samples.secondTrace().max(best.lower());
        return new Supremum(Enclosure.of(best.lower(), upper), best, best.t(), WideDouble.POSITIVE_INFINITY);
    }

    /** The sample with the highest support line at α. */
    private Sample highest(WideDouble a) {
        Sample best = samples.origin();
        WideDouble most = WideDouble.ZERO;
        for (int k = 1; k < samples.size(); k++) {
            WideDouble v = samples.get(k).supportDown(a);
            if (v.compareTo(most) > 0) {
                most = v;
                best = samples.get(k);
            }
        }
        return best;
    }

    /** The search for one α: the intervals from 0 to Tr σ/α with their bounds. */
    private final class Search {

        private final WideDouble a;
        private final WideDouble end;
        private final List<Interval> intervals = new ArrayList<>();

        Search(WideDouble a) {
            this.a = a;
            end = samples.secondTrace().dividedByUp(a);
            leap();
            int count = samples.before(end);
            for (int k = 0; k < count; k++) {
                intervals.add(samples.interval(k, a, end));
            }
        }

        /** Samples towards t = 0 in growing leaps until a support line above zero is found: F(t)/t does not increase. */
        private void leap() {
            for (int j = 1; j <= MOST_LEAPS; j++) {
                WideDouble t = end.timesPowerOfTwo(1 - (1L << j));
                Sample s = samples.at(t);
                boolean above = s.supportDown(a).signum() > 0;
                // nothing but the trivial bound is known here, nor will it be further down
                boolean blind = s.lower().signum() == 0 && s.upper().compareTo(t.timesDown(samples.firstTrace())) >= 0;
                if (above || blind) {
                    return;
                }
            }
        }

        Supremum run(double relativeGap, double absoluteGap) {
            int aside = 0;
            for (int split = 0; ; split++) {
                Supremum s = current();
                WideDouble upper = s.value().upperWide();
                WideDouble gap = CurveSamples.up(upper, s.value().lowerWide());
                WideDouble asked = upper.timesDown(WideDouble.of(relativeGap)).max(WideDouble.of(absoluteGap));
                if (split == MOST_SPLITS || gap.compareTo(asked) <= 0) {
                    return s;
                }
                int w = widest();
                WideDouble next = splitting(intervals.get(w), split);
                boolean apart = next.compareTo(intervals.get(w).from()) > 0
                        && next.compareTo(intervals.get(w).to()) < 0;
                if (apart && gap.compareTo(noise(w)) > 0) {
                    add(next);
                } else if (aside < ASIDE.length && gap.compareTo(upper.timesDown(WideDouble.of(POOR))) > 0) {
                    WideDouble t = noisier(w);
                    double step = Math.scalb(1.0, -ASIDE[aside++]);
                    add(t.timesDown(WideDouble.of(1 - step)));
                    add(t.timesDown(WideDouble.of(1 + step)));
                } else {
                    return s;
                }
            }
        }

        /** β(α) from the samples at hand. */
        private Supremum current() {
            Sample best = highest(a);
            WideDouble lower = best.supportDown(a);
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
        private void add(WideDouble t) {
            int count = samples.size();
            int p = samples.before(t);
            samples.at(t);
            if (samples.size() == count || p > intervals.size()) {
                return;
            }
            if (t.compareTo(end) < 0) {
                intervals.add(p, samples.interval(p, a, end));
            }
            int reach = CurveSamples.CHORDS + 1;
            for (int k = Math.max(0, p - reach); k < Math.min(intervals.size(), p + reach); k++) {
                intervals.set(k, samples.interval(k, a, end));
            }
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
         * Twice the width of the better known value at the ends of an interval: a gap below it is not worth splitting. The value at t = 0,
         * which is exact, says nothing about those nearby.
         */
        private WideDouble noise(int w) {
            WideDouble right = w + 1 < samples.size() ? samples.get(w + 1).width() : WideDouble.POSITIVE_INFINITY;
            WideDouble width = w == 0 ? right : right.min(samples.get(w).width());
            return width.timesPowerOfTwo(1);
        }

        /** The end of an interval at which F is known less well. */
        private WideDouble noisier(int w) {
            Sample l = samples.get(w);
            boolean right = w + 1 < samples.size() && samples.get(w + 1).width().compareTo(l.width()) > 0;
            return right ? samples.get(w + 1).t() : l.t();
        }
    }
}
