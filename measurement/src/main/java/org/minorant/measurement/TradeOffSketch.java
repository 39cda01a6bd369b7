package org.minorant.measurement;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.OptionalDouble;
import java.util.TreeMap;
import java.util.function.DoubleFunction;
import java.util.stream.DoubleStream;
import org.minorant.core.WideDouble;
import org.minorant.core.curve.CurveSample;
import org.minorant.core.curve.Supremum;

/** A trade-off curve in the making: levels at which the least type-II error is enclosed, support lines below and corners above. For one thread. */
final class TradeOffSketch {

    private static final int MOST_LEVELS = 2000;

    /** Levels nearer than this are not told apart. */
    private static final double RESOLUTION = 0x1p-40;

    private final DoubleFunction<Supremum> leastError;
    private final List<CurveSample> below = new ArrayList<>();
    private final TreeMap<Double, WideDouble> above = new TreeMap<>();

    /** A sketch with the least type-II error as a function of the level. */
    TradeOffSketch(DoubleFunction<Supremum> leastError) {
        this.leastError = leastError;
    }

    void add(double level) {
        // no negative zero among the keys
        double key = level + 0.0;
        Supremum s = leastError.apply(key);
        below.add(s.best());
        above.put(key, s.value().upperWide());
    }

    /** Adds levels where the polygons are further apart than the tolerance, as long as that helps. */
    TradeOffCurve refined(double tolerance) {
        add(0);
        add(1);
        while (above.size() < MOST_LEVELS) {
            OptionalDouble next = curve().widths().stream()
                    .filter(w -> w.gap() > tolerance)
                    .sorted(Comparator.comparingDouble(TradeOffCurve.Width::gap).reversed())
                    .flatMapToDouble(w -> newLevels(w.typeOneError()))
                    .findFirst();
            if (next.isEmpty()) {
                break;
            }
            add(next.getAsDouble());
        }
        return curve();
    }

    /**
     * Levels to add where the polygons are apart: there, or, if a level is too near, between that and its neighbours. Where β(0) is not known
     * the gap beside it never closes.
     */
    private DoubleStream newLevels(double level) {
        DoubleStream.Builder out = DoubleStream.builder().add(level);
        Double near = above.floorKey(Math.min(1, level + RESOLUTION));
        if (near != null) {
            Double left = above.lowerKey(near);
            Double right = above.higherKey(near);
            if (right != null) {
                out.add(near + (right - near) / 16);
            }
            if (left != null) {
                out.add(near - (near - left) / 16);
            }
        }
        return out.build().filter(this::isNew);
    }

    private boolean isNew(double level) {
        Double before = above.floorKey(level);
        Double beyond = above.ceilingKey(level);
        return (before == null || level - before > RESOLUTION) && (beyond == null || beyond - level > RESOLUTION);
    }

    TradeOffCurve curve() {
        List<TradeOffPoint> points = new ArrayList<>();
        above.forEach((a, b) -> points.add(new TradeOffPoint(a, b)));
        return TradeOffCurve.of(below, points);
    }
}
