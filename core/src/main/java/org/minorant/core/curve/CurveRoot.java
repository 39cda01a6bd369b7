package org.minorant.core.curve;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;

/**
 * Where a nondecreasing curve crosses a level, from both sides: the largest t with F(t) ≤ level.
 *
 * <p><b>Argument.</b> The lower end is a point where the enclosure of F lies at or below the level, the upper end one where it lies above; F is
 * nondecreasing, so the crossing is between. How the points were found does not matter.
 *
 * <p><b>Cost.</b> With a {@link Guess}, the crossing is found on the guess, and certified values beside it make the ends, as near as the tolerance and the widths of
 * the values ask for: 2 or 3 values, if the guess is good. Without one, inverse interpolation of certified values in logarithms takes about 10.
 */
public final class CurveRoot {

    private static final int MOST_STEPS = 200;

    /** A bracket whose ends differ by less than this, relatively, is not divided further. */
    private static final double CLOSE = 0x1p-51;

    /** Steps after which a bracket is to have shrunk to half its logarithm, or it is halved. */
    private static final int PATIENCE = 4;

    /** A value is certain about this many widths, over the slope, from the crossing. */
    private static final double WIDTHS = 1.1;

    /** No end is bettered that is within this many margins. */
    private static final double MARGINS = 2.5;

    /** A value this many widths from the level, or nearer, is as good as on it. */
    private static final double NOISY = 4;

    /** Logarithmic slopes of concave curves lie between 0 and 1; flatter ones are taken for this. */
    private static final double FLAT = 0x1p-30;

    /** Below this tolerance the crossing itself is looked at first, to learn how well it is known. */
    private static final double ROUGH = 0x1p-44;

    private final Curve curve;
    private final WideDouble level;
    private final WideDouble least;
    private final double target;
    private final List<CurveSample> samples = new ArrayList<>();
    private WideDouble low = WideDouble.ZERO;
    private WideDouble high;
    private double grown = 1;

    private CurveRoot(Curve curve, WideDouble level, WideDouble least, WideDouble most, double relativeGap) {
        this.curve = curve;
        this.level = level;
        this.least = least;
        this.high = most;
        this.target = Math.max(CLOSE, relativeGap);
    }

    /**
     * Encloses the crossing.
     *
     * @param curve a nondecreasing curve
     * @param level the level, positive
     * @param least a positive point, from which on the crossing is of interest
     * @param most a point above it where the curve exceeds the level, known to the caller
     * @param relativeGap a relative width that is small enough; the result is as narrow, or as the values of the curve allow
     * @return the largest t with F(t) ≤ level. If no point from {@code least} on could be certified to lie below the crossing the lower end is 0; if {@code
     *     least} lies above it, it is the upper end
     */
    public static Enclosure of(Curve curve, WideDouble level, WideDouble least, WideDouble most, double relativeGap) {
        CurveRoot r = new CurveRoot(curve, level, least, most, relativeGap);
        r.search();
        return Enclosure.of(r.low, r.high);
    }

    private void search() {
        Optional<GuessedRoot> guess =
                curve.guess().flatMap(g -> GuessedRoot.of(g, Logs.of(level), Logs.of(least), Logs.of(high), target));
        if (guess.isPresent()) {
            WideDouble t = WideDouble.expDown(guess.get().lnT()).min(high);
            add((target < ROUGH ? t : Logs.moved(t, -target / 3)).max(least));
        } else {
            add(least);
        }
        double slope = guess.map(GuessedRoot::slope).orElse(1.0);
        double reached = Double.POSITIVE_INFINITY;
        int vain = 0;
        for (int step = 0; step < MOST_STEPS; step++) {
            double length = Logs.ratio(high, from());
            if (!(length > target)) {
                return;
            }
            vain = length < reached / 2 ? 0 : vain + 1;
            reached = vain == 0 ? length : reached;
            Optional<Aim> next = new Step(slope).next(vain > PATIENCE && vain % 2 == 0);
            if (next.isEmpty()) {
                return;
            }
            Aim aim = next.get();
            add(aim.t());
            grown = isMissed(aim) ? 2 * grown : 1;
        }
    }

    /** The left end of what is left to search. */
    private WideDouble from() {
        return low.max(least);
    }

    /** Whether the last sample did not better the end it was meant for, though it is as near to the level as can be told. */
    private boolean isMissed(Aim aim) {
        CurveSample last = samples.get(samples.size() - 1);
        boolean better = aim.margins() < 0 ? low.equals(aim.t()) : aim.margins() == 0 || high.equals(aim.t());
        double noise = last.width().dividedByUp(level).toDoubleUp();
        return !better && Math.abs(excess(last)) <= NOISY * Math.max(noise, CLOSE);
    }

    private void add(WideDouble t) {
        Enclosure f = curve.at(t);
        CurveSample s = new CurveSample(t, f.lowerWide(), f.upperWide());
        samples.add(s);
        if (s.upper().compareTo(level) <= 0) {
            low = low.max(t);
        } else if (s.lower().compareTo(level) > 0) {
            high = high.min(t);
        }
    }

    /**
     * A point to look at.
     *
     * @param t the point
     * @param margins how many margins beyond the expected root it lies
     */
    private record Aim(WideDouble t, int margins) {}

    /** What the samples say, relative to the one nearest to the level. */
    private final class Step {

        private final CurveSample near = samples.stream()
                .min(Comparator.comparingDouble(s -> Math.abs(excess(s))))
                .orElseThrow();
        private final double left = Logs.ratio(from(), near.t());
        private final double right = Logs.ratio(high, near.t());
        private final double root;
        private final double margin;
        private final double smallest;

        Step(double guessedSlope) {
            double[] x = samples.stream()
                    .mapToDouble(s -> s == near ? 0 : Logs.ratio(s.t(), near.t()))
                    .toArray();
            double[] y = samples.stream().mapToDouble(CurveRoot.this::excess).toArray();
            RootNodes nodes = new RootNodes(x, y, guessedSlope);
            root = nodes.root();
            double noise = near.width().dividedByUp(level).toDoubleUp() * WIDTHS / Math.max(FLAT, nodes.slope());
            smallest = Math.max(target / (2 * MARGINS + 1), noise);
            margin = smallest * grown;
        }

        /** The next point, if there is any use in one. */
        Optional<Aim> next(boolean halve) {
            boolean known = known(from());
            boolean below = known && root - left <= MARGINS * margin;
            boolean above = right - root <= MARGINS * margin;
            if (below && above) {
                return Optional.empty();
            }
            if (!known && !(root - margin > left)) {
                return Optional.of(new Aim(from(), 0));
            }
            boolean certain = target > smallest / 2 || Math.abs(root) <= margin;
            int side = below ? 1 : above || certain ? -1 : 0;
            double x = root + side * margin;
            if (!halve && x > left && x < right) {
                WideDouble t = Logs.moved(near.t(), x);
                if (isFresh(t)) {
                    return Optional.of(new Aim(t, side));
                }
            }
            WideDouble t = Logs.moved(near.t(), (left + right) / 2);
            return right - left > 2 * MARGINS * margin && isFresh(t) ? Optional.of(new Aim(t, 0)) : Optional.empty();
        }
    }

    private boolean isFresh(WideDouble t) {
        return !known(t) && t.compareTo(from()) > 0 && t.compareTo(high) < 0;
    }

    private boolean known(WideDouble t) {
        return samples.stream().anyMatch(s -> s.t().equals(t));
    }

    /** ln(F/level), roughly; −∞ where F may be 0. */
    private double excess(CurveSample s) {
        return s.middle().signum() > 0 ? Logs.ratio(s.middle(), level) : Double.NEGATIVE_INFINITY;
    }
}
