package org.minorant.measurement;

import java.util.ArrayList;
import java.util.List;
import org.minorant.core.Enclosure;
import org.minorant.core.InvalidInputException;
import org.minorant.core.WideDouble;
import org.minorant.core.curve.CurveSample;
import org.minorant.core.curve.LineBound;

/**
 * The error trade-off curve α ↦ β(α), the least type-II error at type-I error at most α, between two convex polygons.
 *
 * <p><b>Below</b> lie the support lines Tr[tρ ∧ σ] − tα, each certified for every α; the lower polygon is their upper envelope and β = 0.
 * <b>Above</b> lie chords between certified points of the convex curve; the upper polygon is their convex hull. What lies between the polygons is {@link
 * #gap()} at most. Both polygons hold for exactly the states given, after rounding.
 *
 * <p>Immutable and thread-safe.
 */
public final class TradeOffCurve {

    private final List<CurveSample> lines;
    private final List<TradeOffPoint> lower;
    private final List<TradeOffPoint> upper;

    private TradeOffCurve(List<CurveSample> lines, List<TradeOffPoint> lower, List<TradeOffPoint> upper) {
        this.lines = lines;
        this.lower = lower;
        this.upper = upper;
    }

    /**
     * The curve from support lines of any slopes and from points above it, in ascending order of their type-I error, the first at 0 and the last at
     * 1.
     */
    static TradeOffCurve of(List<CurveSample> lines, List<TradeOffPoint> above) {
        List<CurveSample> envelope = envelope(lines);
        return new TradeOffCurve(envelope, corners(envelope), hull(above));
    }

    /**
     * Returns what is known of β(α).
     *
     * @param typeOneError α, between 0 and 1
     * @return β(α), between the lower and the upper polygon
     * @throws InvalidInputException if α is not between 0 and 1
     */
    public Enclosure typeTwoError(double typeOneError) {
        Checks.inRange("TradeOffCurve.typeTwoError", "the type-I error", typeOneError, 0, 1);
        WideDouble up = above(typeOneError);
        return Enclosure.of(below(typeOneError).min(up), up);
    }

    /**
     * Returns the corners of the lower polygon; the curve lies on or above each of its edges.
     *
     * @return the corners, with ascending type-I error from 0 to 1
     */
    public List<TradeOffPoint> lowerPolygon() {
        return List.copyOf(lower);
    }

    /**
     * Returns the corners of the upper polygon; the curve lies on or below each of its edges.
     *
     * @return the corners, with ascending type-I error from 0 to 1
     */
    public List<TradeOffPoint> upperPolygon() {
        return List.copyOf(upper);
    }

    /**
     * Returns the largest distance between the polygons, along the axis of the type-II error.
     *
     * @return the largest width of {@link #typeTwoError}
     */
    public double gap() {
        return widths().stream().mapToDouble(Width::gap).max().orElse(0);
    }

    /** A type-I error with the distance of the polygons there. */
    record Width(double typeOneError, double gap) {}

    /** The distance of the polygons at each corner; between corners it is linear. */
    List<Width> widths() {
        List<TradeOffPoint> corners = new ArrayList<>(lower);
        corners.addAll(upper);
        List<Width> out = new ArrayList<>();
        for (TradeOffPoint p : corners) {
            double a = p.typeOneError();
            out.add(new Width(a, above(a).plusUp(below(a).negate()).toDoubleUp()));
        }
        return out;
    }

    private WideDouble below(double a) {
        WideDouble alpha = WideDouble.of(a);
        WideDouble most = WideDouble.ZERO;
        for (CurveSample s : lines) {
            most = most.max(s.supportDown(alpha));
        }
        return most;
    }

    private WideDouble above(double a) {
        int r = 0;
        while (upper.get(r).typeOneError() < a) {
            r++;
        }
        TradeOffPoint right = upper.get(r);
        if (r == 0 || right.typeOneError() == a) {
            return right.typeTwoError();
        }
        TradeOffPoint left = upper.get(r - 1);
        LineBound chord = new LineBound(left.typeTwoError(), right.typeTwoError());
        return chord.at(left.typeOneError(), a, right.typeOneError());
    }

    /** The lines that the upper envelope over [0, 1] consists of, from the flattest (β = 0) to the steepest. */
    private static List<CurveSample> envelope(List<CurveSample> lines) {
        List<CurveSample> sorted = new ArrayList<>(lines);
        sorted.add(CurveSample.ORIGIN);
        sorted.sort((x, y) -> x.t().equals(y.t()) ? y.lower().compareTo(x.lower()) : x.t().compareTo(y.t()));
        List<CurveSample> out = new ArrayList<>();
        for (CurveSample s : sorted) {
            if (!out.isEmpty() && out.get(out.size() - 1).t().equals(s.t())) {
                continue;
            }
            while (!out.isEmpty() && isHidden(out, s)) {
                out.remove(out.size() - 1);
            }
            if (out.isEmpty() || meeting(out.get(out.size() - 1), s) > 0) {
                out.add(s);
            }
        }
        return List.copyOf(out);
    }

    /** Whether the last line lies below its neighbour and the steeper line s wherever it matters. */
    private static boolean isHidden(List<CurveSample> out, CurveSample s) {
        CurveSample last = out.get(out.size() - 1);
        double before = out.size() == 1 ? 1 : meeting(out.get(out.size() - 2), last);
        return meeting(last, s) >= before;
    }

    /** Where a line meets a steeper one: the steeper is higher before it. */
    private static double meeting(CurveSample flat, CurveSample steep) {
        WideDouble rise = steep.lower().plusDown(flat.lower().negate());
        WideDouble slope = steep.t().plusUp(flat.t().negate());
        return rise.dividedByDown(slope).toDoubleDown();
    }

    /**
     * The corners of the envelope, which ascend strictly since no line in it is hidden. A corner is rounded in its place, so it takes the lower
     * of its two lines there: then each edge lies below the line it belongs to.
     */
    private static List<TradeOffPoint> corners(List<CurveSample> envelope) {
        List<TradeOffPoint> out = new ArrayList<>();
        int last = envelope.size() - 1;
        out.add(new TradeOffPoint(0, envelope.get(last).lower().max(WideDouble.ZERO)));
        for (int i = last; i > 0; i--) {
            double a = meeting(envelope.get(i - 1), envelope.get(i));
            WideDouble alpha = WideDouble.of(a);
            WideDouble b =
                    envelope.get(i).supportDown(alpha).min(envelope.get(i - 1).supportDown(alpha));
            out.add(new TradeOffPoint(a, b.max(WideDouble.ZERO)));
        }
        out.add(new TradeOffPoint(1, envelope.get(0).supportDown(WideDouble.ONE).max(WideDouble.ZERO)));
        return List.copyOf(out);
    }

    /** The lower convex hull of points above the curve: chords of points above a convex curve lie above it. */
    private static List<TradeOffPoint> hull(List<TradeOffPoint> points) {
        List<TradeOffPoint> out = new ArrayList<>();
        for (TradeOffPoint p : points) {
            while (out.size() > 1) {
                TradeOffPoint l = out.get(out.size() - 2);
                TradeOffPoint m = out.get(out.size() - 1);
                WideDouble chord = new LineBound(l.typeTwoError(), p.typeTwoError())
                        .at(l.typeOneError(), m.typeOneError(), p.typeOneError());
                if (m.typeTwoError().compareTo(chord) < 0) {
                    break;
                }
                out.remove(out.size() - 1);
            }
            out.add(p);
        }
        return List.copyOf(out);
    }

    /** The number of corners and the gap. */
    @Override
    public String toString() {
        return "TradeOffCurve, " + lower.size() + " corners below, " + upper.size() + " above, gap " + gap();
    }
}
