package org.minorant.study;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import org.minorant.bounds.Side;
import org.minorant.core.Enclosure;

/**
 * Bits for each use against the number of uses as they are drawn.
 *
 * @param curves one for each method
 * @param normal the normal approximation, of which nothing is promised
 * @param capacity the capacity in bits
 */
record UsesPlot(List<Curve> curves, List<Point> normal, double capacity) {

    /** A curve through the bounds of one method. */
    record Curve(String name, Side side, List<Point> points) {
        Curve {
            points = List.copyOf(points);
        }
    }

    /** Bits for each use. */
    record Point(int uses, double rate) {}

    UsesPlot {
        curves = List.copyOf(curves);
        normal = List.copyOf(normal);
    }

    /** Collects points. */
    static final class Builder {

        private final Map<String, List<Point>> points = new LinkedHashMap<>();
        private final Map<String, Side> sides = new LinkedHashMap<>();
        private final List<Point> normal = new ArrayList<>();

        void add(String name, Side side, int uses, Enclosure bits) {
            double rate = bits.midpoint() / uses;
            if (Double.isFinite(rate)) {
                sides.put(name, side);
                points.computeIfAbsent(name, k -> new ArrayList<>()).add(new Point(uses, rate));
            }
        }

        void normal(int uses, double bits) {
            normal.add(new Point(uses, bits / uses));
        }

        UsesPlot build(Enclosure capacity) {
            List<Curve> all = new ArrayList<>();
            points.forEach((name, p) -> all.add(new Curve(name, sides.get(name), p)));
            return new UsesPlot(all, normal, capacity.midpoint());
        }
    }
}
