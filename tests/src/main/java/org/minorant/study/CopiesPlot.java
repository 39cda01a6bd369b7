package org.minorant.study;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import org.minorant.bounds.Side;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;

/**
 * Errors against the number of copies as they are drawn, in logarithms: most of them are far below what a double can hold.
 *
 * @param curves one for each method
 * @param chernoff the exponent that all but the worst share for many copies, in bits; infinite for orthogonal states
 */
record CopiesPlot(List<Curve> curves, double chernoff) {

    /** A curve through the errors of one method. */
    record Curve(String name, Side side, List<Point> points) {
        Curve {
            points = List.copyOf(points);
        }
    }

    /** The logarithm to base 2 of an error, the middle of an enclosure that is too narrow to be seen. */
    record Point(int copies, double log2) {

        /** Bits per copy. */
        double exponent() {
            return -log2 / copies;
        }
    }

    CopiesPlot {
        curves = List.copyOf(curves);
    }

    /** Collects points. */
    static final class Builder {

        private final Map<String, List<Point>> points = new LinkedHashMap<>();
        private final Map<String, Side> sides = new LinkedHashMap<>();

        /** An error of 0, or one of which nothing is known from below, has no place on a logarithmic axis. */
        void add(String name, Side side, int copies, Enclosure error) {
            double log2 = 0.5 * (error.lnLower() + error.lnUpper()) / Math.log(2);
            if (Double.isFinite(log2)) {
                sides.put(name, side);
                points.computeIfAbsent(name, k -> new ArrayList<>()).add(new Point(copies, log2));
            }
        }

        CopiesPlot build(Information chernoff) {
            List<Curve> all = new ArrayList<>();
            points.forEach((name, p) -> all.add(new Curve(name, sides.get(name), p)));
            return new CopiesPlot(all, chernoff.bits().midpoint());
        }
    }
}
