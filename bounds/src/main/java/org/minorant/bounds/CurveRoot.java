package org.minorant.bounds;

import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;

/**
 * Where a nondecreasing curve crosses a level, from both sides: the largest t with f(t) ≤ level.
 *
 * <p><b>Argument.</b> The lower end is a point where the enclosure of f lies at or below the level, the upper end one where it lies above; f is
 * nondecreasing, so the crossing is between. How the points were found does not matter. They are found by the Illinois variant of the
 * secant rule; where a value straddles the level, its neighbourhood is left in growing steps until values are certain again.
 */
final class CurveRoot {

    private static final int MOST_STEPS = 200;

    /** A bracket whose ends differ by less than this, relatively, is not divided further. */
    private static final double CLOSE = 0x1p-51;

    /** The secant rule is used once the ends are within this ratio; before that their geometric mean. */
    private static final double NEAR = 4;

    private final Curve f;
    private final WideDouble level;
    private WideDouble low;
    private WideDouble high;

    private CurveRoot(Curve f, double level, WideDouble low, WideDouble high) {
        this.f = f;
        this.level = WideDouble.of(level);
        this.low = low;
        this.high = high;
    }

    /**
     * Encloses the crossing.
     *
     * @param f a nondecreasing curve
     * @param level the level, positive
     * @param low a positive point where f is at most the level with certainty
     * @param high a point above it where f exceeds the level with certainty
     * @return the largest t with f(t) ≤ level
     */
    static Enclosure of(Curve f, double level, WideDouble low, WideDouble high) {
        CurveRoot r = new CurveRoot(f, level, low, high);
        r.search();
        return Enclosure.of(r.low, r.high);
    }

    private void search() {
        double atLow = excess(f.at(low));
        double atHigh = excess(f.at(high));
        int last = 0;
        for (int step = 0; step < MOST_STEPS; step++) {
            double ratio = high.dividedByDown(low).toDoubleDown();
            if (!(ratio - 1 > CLOSE)) {
                return;
            }
            // where the curve is flat at the level the secant rule stands still
            double part =
                    atLow == 0 || step % 4 == 3 ? 0.5 : Math.min(0.999, Math.max(0.001, atLow / (atLow - atHigh)));
            WideDouble t = ratio > NEAR
                    ? low.sqrtDown().timesDown(high.sqrtDown())
                    : low.timesDown(WideDouble.of(1 + part * (ratio - 1)));
            Enclosure value = f.at(t);
            if (value.upperWide().compareTo(level) <= 0) {
                low = t;
                atLow = excess(value);
                atHigh = last < 0 ? atHigh / 2 : atHigh;
                last = -1;
            } else if (value.lowerWide().compareTo(level) > 0) {
                high = t;
                atHigh = excess(value);
                atLow = last > 0 ? atLow / 2 : atLow;
                last = 1;
            } else {
                leave(t, Math.max(CLOSE, Math.min(0.25, value.relativeWidth())));
                return;
            }
        }
    }

    /** (f − level)/level, roughly. */
    private double excess(Enclosure value) {
        Enclosure unit = Enclosure.of(level, level);
        return value.minus(unit).dividedBy(unit).midpoint();
    }

    /** Walks away from a point of uncertain value on both sides. */
    private void leave(WideDouble t, double width) {
        for (double h = width; h < 1; h *= 2) {
            WideDouble below = t.timesDown(WideDouble.of(1 - h));
            if (below.compareTo(low) <= 0) {
                break;
            }
            if (f.at(below).upperWide().compareTo(level) <= 0) {
                low = below;
                break;
            }
        }
        for (double h = width; ; h *= 2) {
            WideDouble above = t.timesUp(WideDouble.of(1 + h));
            if (above.compareTo(high) >= 0) {
                break;
            }
            if (f.at(above).lowerWide().compareTo(level) > 0) {
                high = above;
                break;
            }
        }
    }
}
