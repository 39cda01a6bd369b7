package org.minorant.study;

import java.util.ArrayList;
import java.util.List;
import java.util.TreeSet;
import org.minorant.core.Enclosure;
import org.minorant.measurement.HypothesisPair;
import org.minorant.measurement.TradeOffCurve;
import org.minorant.measurement.TradeOffPoint;

/**
 * The two certified sides of a trade-off curve as they are drawn.
 *
 * @param lower corners of the lower side, by ascending type-I error
 * @param upper corners of the upper side
 * @param logarithmic whether the axes are
 * @param smallest where logarithmic axes begin
 */
record TradeOffPlot(List<Point> lower, List<Point> upper, boolean logarithmic, double smallest) {

    /** A curve that falls below this before the axis has left it looks like a corner; logarithmic axes open it up. */
    private static final double SMALL = 1e-2;

    /** On linear axes 1e-3 is about half the breadth of a line. */
    private static final double TOLERANCE = 1e-3;

    private static final int LOGARITHMIC_LEVELS = 40;

    /** A point of the plane of the two errors. */
    record Point(double typeOne, double typeTwo) {}

    TradeOffPlot {
        lower = List.copyOf(lower);
        upper = List.copyOf(upper);
    }

    static TradeOffPlot of(HypothesisPair pair) {
        Enclosure half = pair.minimumError(0.5);
        // with errors of 1e-100 and less there is nothing left to read off a chart
        return half.upper() < SMALL && half.lower() > 1e-100 ? logarithmic(pair, half.lower()) : linear(pair);
    }

    private static TradeOffPlot linear(HypothesisPair pair) {
        TradeOffCurve curve = pair.tradeOffCurve(TOLERANCE);
        return new TradeOffPlot(points(curve.lowerPolygon()), points(curve.upperPolygon()), false, 0);
    }

    private static List<Point> points(List<TradeOffPoint> corners) {
        return corners.stream()
                .map(p -> new Point(p.typeOneError(), p.typeTwoError().toDoubleUp()))
                .toList();
    }

    /** From the square of the error that can be had on both sides, where the other error is about one, up to one. */
    private static TradeOffPlot logarithmic(HypothesisPair pair, double error) {
        double start = Math.pow(10, Math.floor(2 * Math.log10(error)));
        double[] levels = levels(start);
        TradeOffCurve curve = pair.tradeOffCurveAt(levels);
        List<Point> lower = new ArrayList<>();
        List<Point> upper = new ArrayList<>();
        for (double level : levels) {
            Enclosure beta = curve.typeTwoError(level);
            lower.add(new Point(level, Math.max(beta.lower(), start)));
            upper.add(new Point(level, Math.max(beta.upper(), start)));
        }
        return new TradeOffPlot(lower, upper, true, start);
    }

    /** Levels that are dense on a logarithmic scale at 0 and at 1, where the curve falls steeply. */
    private static double[] levels(double start) {
        TreeSet<Double> levels = new TreeSet<>(List.of(1.0));
        for (int i = 0; i <= LOGARITHMIC_LEVELS; i++) {
            double level = Math.min(1, Math.pow(start, 1 - i / (double) LOGARITHMIC_LEVELS));
            levels.add(level);
            levels.add(1 - level);
        }
        levels.remove(0.0);
        return levels.stream().mapToDouble(Double::doubleValue).toArray();
    }
}
