package org.minorant.bounds;

import java.util.ArrayList;
import java.util.List;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;
import org.minorant.core.curve.Curve;

/**
 * Global minimisation of a function of (s, f(s)) for a concave nondecreasing f, by branch and bound: between two samples f lies above their
 * chord, and with the chord in place of f the minimum is had in closed form. Samples give the other side. The search stops when both sides
 * are within {@link #ENOUGH} of each other, or after {@link #MOST_SAMPLES}; it is certified whenever it stops.
 */
final class ChordSearch {

    private static final int MOST_SAMPLES = 400;

    /** Relative width that ends the search. */
    private static final double ENOUGH = 1e-11;

    private final Curve f;
    private final ChordObjective objective;
    private final List<WideDouble> points = new ArrayList<>();
    private final List<Enclosure> values = new ArrayList<>();
    private final List<Enclosure> least = new ArrayList<>();
    private WideDouble best = WideDouble.POSITIVE_INFINITY;

    private ChordSearch(Curve f, ChordObjective objective) {
        this.f = f;
        this.objective = objective;
    }

    /** inf over s &gt; t of s f(s)/(s − t). */
    static Enclosure leastError(Curve f, WideDouble t) {
        ChordSearch search = new ChordSearch(f, new ChordObjective.Error(t));
        // at s = 2t the value is at most 2 f(2t) ≤ 4 f(t); for s ≤ 5t/4 it is at least 5 f(t)
        WideDouble s = t.timesUp(WideDouble.of(1.25));
        search.append(s);
        WideDouble outside = f.at(t).lowerWide().timesDown(WideDouble.of(5));
        for (int j = 0; j <= 24; j++) {
            s = t.timesUp(WideDouble.of(1 + Math.scalb(1.0, 2 * j)));
            Enclosure value = search.append(s);
            if (value.lowerWide().compareTo(search.best) >= 0) {
                break;
            }
        }
        // to the right of the last sample the value is at least f there
        WideDouble tail = search.values.get(search.values.size() - 1).lowerWide();
        search.refine();
        WideDouble low = search.lowest().min(outside).min(tail);
        return Enclosure.of(low.min(search.best), search.best);
    }

    /**
     * sup over s &gt; 0 of s(1 − f(s)/ε).
     *
     * @param f the curve
     * @param epsilon ε
     * @param end a point from which on f is at least ε
     */
    static Enclosure largestThreshold(Curve f, double epsilon, WideDouble end) {
        ChordSearch search = new ChordSearch(f, new ChordObjective.Threshold(epsilon));
        WideDouble s = end;
        // the value at s is at most s: what lies below the best so far cannot matter
        WideDouble reached = WideDouble.ZERO;
        do {
            Enclosure value = f.at(s);
            search.insert(0, s, value);
            reached = reached.max(search.best.negate());
            s = s.timesPowerOfTwo(-1);
        } while (search.points.get(0).compareTo(reached) > 0 && search.points.size() < MOST_SAMPLES / 2);
        WideDouble first = search.points.get(0);
        search.refine();
        WideDouble low = search.lowest().min(first.negate());
        return Enclosure.of(
                search.best.negate().max(WideDouble.ZERO), low.negate().max(WideDouble.ZERO));
    }

    private Enclosure append(WideDouble s) {
        Enclosure value = f.at(s);
        insert(points.size(), s, value);
        return value;
    }

    private void insert(int i, WideDouble s, Enclosure value) {
        points.add(i, s);
        values.add(i, value);
        best = best.min(objective.at(s, value).upperWide());
        if (points.size() == 1) {
            return;
        }
        // the piece that the sample divides, or a new one at an end
        least.add(Math.max(0, i - 1), between(Math.max(0, i - 1)));
        if (i > 0 && i + 1 < points.size()) {
            least.set(i, between(i));
        }
    }

    private Enclosure between(int i) {
        return objective.least(line(i));
    }

    private ChordObjective.Line line(int i) {
        return ChordObjective.Line.below(points.get(i), values.get(i), points.get(i + 1), values.get(i + 1));
    }

    /** Where the chord's minimum lies, or the middle of the piece if that is close to an end, so that pieces shrink. */
    private WideDouble split(int i) {
        WideDouble from = points.get(i);
        WideDouble length = points.get(i + 1).plusDown(from.negate());
        WideDouble s = objective.argument(line(i));
        double part = s.plusDown(from.negate()).dividedByDown(length).toDoubleDown();
        return part > 0.25 && part < 0.75 ? s : from.plusDown(length.timesPowerOfTwo(-1));
    }

    private void refine() {
        while (points.size() < MOST_SAMPLES) {
            int worst = 0;
            for (int i = 1; i < least.size(); i++) {
                if (least.get(i).lowerWide().compareTo(least.get(worst).lowerWide()) < 0) {
                    worst = i;
                }
            }
            WideDouble low = least.get(worst).lowerWide();
            WideDouble size = best.max(best.negate()).timesUp(WideDouble.of(ENOUGH));
            if (best.plusDown(low.negate()).compareTo(size) <= 0) {
                return;
            }
            WideDouble s = split(worst);
            if (points.contains(s)) {
                return;
            }
            insert(worst + 1, s, f.at(s));
        }
    }

    private WideDouble lowest() {
        WideDouble low = WideDouble.POSITIVE_INFINITY;
        for (Enclosure e : least) {
            low = low.min(e.lowerWide());
        }
        return low;
    }
}
