package org.minorant.bounds;

import java.util.function.DoubleUnaryOperator;

/** A search for the least value of a function that falls and then rises, by golden sections. What it finds is a choice, and needs no proof. */
final class Unimodal {

    private static final double GOLDEN = 0.5 * (Math.sqrt(5) - 1);

    private static final int STEPS = 60;

    private Unimodal() {}

    static double minimiser(DoubleUnaryOperator f, double from, double to) {
        return minimiser(f, from, to, 1e-9 * (to - from));
    }

    /**
     * Searches to a width.
     *
     * @param f the function
     * @param from where the search begins
     * @param to where it ends
     * @param width a distance from the least value that is small enough
     */
    static double minimiser(DoubleUnaryOperator f, double from, double to, double width) {
        double low = from;
        double high = to;
        double x = high - GOLDEN * (high - low);
        double y = low + GOLDEN * (high - low);
        double fx = f.applyAsDouble(x);
        double fy = f.applyAsDouble(y);
        for (int i = 0; i < STEPS && high - low > width; i++) {
            if (fx <= fy) {
                high = y;
                y = x;
                fy = fx;
                x = high - GOLDEN * (high - low);
                fx = f.applyAsDouble(x);
            } else {
                low = x;
                x = y;
                fx = fy;
                y = low + GOLDEN * (high - low);
                fy = f.applyAsDouble(y);
            }
        }
        return fx <= fy ? x : y;
    }
}
