package org.minorant.core.curve;

import java.util.Comparator;
import java.util.stream.IntStream;

/** Where an increasing function vanishes, from values that need not be certified: inverse interpolation of those nearest to zero. */
final class RootNodes {

    private static final int NODES = 4;

    private final double[] x;
    private final double[] y;
    private final double slope;

    /**
     * Takes the nodes.
     *
     * @param x where, in any order, at least one
     * @param y the values; −∞ and NaN say nothing
     * @param slope a slope to go by as long as there is but one value
     */
    RootNodes(double[] x, double[] y, double slope) {
        int[] order = IntStream.range(0, x.length)
                .filter(i -> Double.isFinite(y[i]))
                .boxed()
                .sorted(Comparator.comparingDouble(i -> Math.abs(y[i])))
                .limit(NODES)
                .mapToInt(i -> i)
                .toArray();
        this.x = IntStream.of(order).mapToDouble(i -> x[i]).toArray();
        this.y = IntStream.of(order).mapToDouble(i -> y[i]).toArray();
        this.slope = slope;
    }

    /** The slope between the two nodes nearest to zero. */
    double slope() {
        double s = x.length < 2 ? slope : (y[1] - y[0]) / (x[1] - x[0]);
        return s > 0 && s <= 1 ? s : slope;
    }

    /** The root as far as can be told; NaN if there is nothing to go by. */
    double root() {
        if (x.length == 0) {
            return Double.NaN;
        }
        double linear = x[0] - y[0] / slope();
        double[] p = x.clone();
        for (int k = 1; k < p.length; k++) {
            for (int i = p.length - 1; i >= k; i--) {
                p[i] = (y[i] * p[i - 1] - y[i - k] * p[i]) / (y[i] - y[i - k]);
            }
        }
        double r = p[p.length - 1];
        // a root that the nearest node contradicts: the function increases, no faster than its argument
        boolean sensible = y[0] < 0 ? r >= x[0] - y[0] : r <= x[0] - y[0];
        return sensible ? r : linear;
    }
}
