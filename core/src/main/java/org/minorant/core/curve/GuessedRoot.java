package org.minorant.core.curve;

import java.util.Arrays;
import java.util.Optional;

/**
 * Where a guess of ln F crosses a level.
 *
 * @param lnT where, within the range
 * @param slope d ln F/d ln t there, above 0
 */
record GuessedRoot(double lnT, double slope) {

    private static final int MOST = 40;

    /** What logarithms near a thousand cannot resolve. */
    private static final double ROUNDING = 0x1p-50;

    /**
     * Looks for the crossing.
     *
     * @param guess the guess
     * @param lnLevel ln of the level
     * @param lnLeast the left end of the range
     * @param lnMost the right end, where the curve is above the level
     * @param target the error allowed
     * @return the crossing, if the guess says anything in the range
     */
    static Optional<GuessedRoot> of(Guess guess, double lnLevel, double lnLeast, double lnMost, double target) {
        double[] x = new double[MOST];
        double[] y = new double[MOST];
        double lo = lnLeast;
        double hi = lnMost;
        double next = 0.5 * (lo + hi);
        for (int n = 0; n < MOST; n++) {
            x[n] = next;
            y[n] = guess.lnValue(next) - lnLevel;
            if (Double.isNaN(y[n])) {
                return Optional.empty();
            }
            if (y[n] <= 0) {
                lo = Math.max(lo, next);
            } else {
                hi = Math.min(hi, next);
            }
            RootNodes nodes = new RootNodes(Arrays.copyOf(x, n + 1), Arrays.copyOf(y, n + 1), 1);
            double root = nodes.root();
            double noise = ROUNDING * Math.max(1, Math.abs(lnLevel));
            if (Math.abs(y[n]) <= Math.max(noise, target / 8 * nodes.slope()) || hi - lo <= target / 8) {
                return Optional.of(new GuessedRoot(next, nodes.slope()));
            }
            // every third step halves, so that a rough guess cannot hold the search up
            boolean inside = root > lo && root < hi && n % 3 != 2;
            next = inside ? root : 0.5 * (lo + hi);
            if (next == lo || next == hi) {
                return Optional.of(new GuessedRoot(next, nodes.slope()));
            }
        }
        return Optional.of(new GuessedRoot(0.5 * (lo + hi), 1));
    }
}
