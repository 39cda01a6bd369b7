package org.minorant.core.curve;

import java.util.Arrays;
import java.util.Comparator;
import java.util.stream.IntStream;

/** The polynomial through the nodes nearest to one of them, in Newton's form. */
final class Interpolation {

    private final double[] x;
    private final double[] c;

    /**
     * Interpolates.
     *
     * @param x where
     * @param y the values; those that are not finite are left out
     * @param centre the index of the node whose neighbourhood counts
     * @param most how many nodes to take at most
     */
    Interpolation(double[] x, double[] y, int centre, int most) {
        int[] nearest = IntStream.range(0, x.length)
                .filter(i -> Double.isFinite(y[i]))
                .boxed()
                .sorted(Comparator.comparingDouble(i -> Math.abs(x[i] - x[centre])))
                .limit(most)
                .mapToInt(i -> i)
                .toArray();
        this.x = Arrays.stream(nearest).mapToDouble(i -> x[i]).toArray();
        this.c = Arrays.stream(nearest).mapToDouble(i -> y[i]).toArray();
        for (int k = 1; k < c.length; k++) {
            for (int i = c.length - 1; i >= k; i--) {
                c[i] = (c[i] - c[i - 1]) / (this.x[i] - this.x[i - k]);
            }
        }
    }

    double value(double at) {
        double v = 0;
        for (int i = c.length - 1; i >= 0; i--) {
            v = v * (at - x[i]) + c[i];
        }
        return v;
    }

    /** p′(x) e^(p(x) − x) − slope: with p = ln F and x = ln t, the slope of F over the given one, less it. */
    private double excess(double at, double slope) {
        double v = 0;
        double d = 0;
        for (int i = c.length - 1; i >= 0; i--) {
            d = d * (at - x[i]) + v;
            v = v * (at - x[i]) + c[i];
        }
        return d * Math.exp(v - at) - slope;
    }

    /** Where between two points the slope of F falls below a given one; NaN if it does not change sides there. */
    double steepness(double slope, double from, double to, int bisections) {
        double l = from;
        double r = to;
        if (!(excess(l, slope) > 0 && excess(r, slope) < 0)) {
            return Double.NaN;
        }
        for (int k = 0; k < bisections; k++) {
            double m = 0.5 * (l + r);
            if (excess(m, slope) > 0) {
                l = m;
            } else {
                r = m;
            }
        }
        return 0.5 * (l + r);
    }
}
