package org.minorant.bounds;

import java.util.function.DoubleUnaryOperator;

/** A search for where an increasing function becomes positive, by regula falsi with halved weights. What it finds is a choice, and needs no proof. */
final class RisingRoot {

    /** A bracket that is narrow enough. */
    private static final double NARROW = 5e-4;

    /** Nothing is looked for beyond. */
    private static final double FAR = 1e7;

    private static final int MOST_STEPS = 60;

    /** Steps after which a bracket is halved instead. */
    private static final int PATIENCE = 8;

    private final DoubleUnaryOperator f;

    RisingRoot(DoubleUnaryOperator f) {
        this.f = f;
    }

    /**
     * Searches from a point on, in leaps of growing length.
     *
     * @param start where to begin
     * @return a point where the function is not negative, or the last one looked at
     */
    double near(double start) {
        double x = start;
        double fx = f.applyAsDouble(x);
        double leap = fx >= 0 ? -1 : 1;
        double y = x + leap;
        double fy = f.applyAsDouble(y);
        for (int i = 0; i < MOST_STEPS && Math.abs(y) < FAR && (fy >= 0) == (fx >= 0); i++) {
            x = y;
            fx = fy;
            leap *= 2;
            y = x + leap;
            fy = f.applyAsDouble(y);
        }
        return leap > 0 ? between(x, fx, y, fy) : between(y, fy, x, fx);
    }

    private double between(double from, double atFrom, double to, double atTo) {
        double low = from;
        double high = to;
        double fl = atFrom;
        double fh = atTo;
        for (int i = 0; i < MOST_STEPS && high - low > NARROW; i++) {
            double x = high - fh / (fh - fl) * (high - low);
            // a point beside the root, so that both ends of the bracket move
            x = Math.max(low + NARROW / 2, Math.min(high - NARROW / 2, x + NARROW / 4));
            if (!(x > low && x < high) || i >= PATIENCE) {
                x = 0.5 * (low + high);
            }
            double fx = f.applyAsDouble(x);
            if (fx >= 0) {
                high = x;
                fh = fx;
                fl /= 2;
            } else {
                low = x;
                fl = fx;
                fh /= 2;
            }
        }
        return high;
    }
}
