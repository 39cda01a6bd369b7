package org.minorant.core.curve;

import java.util.Map;
import java.util.Optional;
import java.util.TreeMap;

/**
 * The peak of F(t) − at by the guess of F alone.
 *
 * @param lnT where it is
 * @param left how far to the left of it the next certified value should be taken, in ln t
 * @param right and to the right
 * @param gap what chords through these three should leave open, relative to the height
 */
record GuessedPeak(double lnT, double left, double right, double gap) {

    private static final int MOST = 60;

    /** t falls by 2^-1, 2^-3, 2^-7, … down to 2^-262143 in search of a bracket. */
    private static final int MOST_LEAPS = 18;

    /** How much further the next node is taken where the last have climbed in one direction. */
    private static final double FURTHER = 4;

    private static final double LN2 = Math.log(2);

    /** What logarithms near a thousand cannot resolve. */
    private static final double ROUNDING = 0x1p-50;

    /**
     * Looks for the peak.
     *
     * @param guess the guess
     * @param lnRate ln a
     * @param lnEnd ln of a point that the peak does not lie beyond
     * @param target the gap to reach
     * @return the peak, if the guess has one
     */
    static Optional<GuessedPeak> of(Guess guess, double lnRate, double lnEnd, double target) {
        Nodes nodes = new Nodes(guess, lnRate, lnEnd);
        return nodes.bracket() ? nodes.refine(target) : Optional.empty();
    }

    private static final class Nodes {

        private final Guess guess;
        private final double lnRate;
        private final double lnEnd;
        private final TreeMap<Double, Double> values = new TreeMap<>();
        private double best = Double.NaN;
        private double highest = Double.NEGATIVE_INFINITY;

        Nodes(Guess guess, double lnRate, double lnEnd) {
            this.guess = guess;
            this.lnRate = lnRate;
            this.lnEnd = lnEnd;
        }

        /** Asks at one point; returns the logarithm of the height there, −∞ where F ≤ at or nothing is guessed. */
        private double ask(double lnT) {
            double y = guess.lnValue(lnT);
            double h = y + Math.log(-Math.expm1(lnRate + lnT - y));
            if (Double.isFinite(y)) {
                values.put(lnT, y);
            }
            double height = Double.isFinite(y) && Double.isFinite(h) ? h : Double.NEGATIVE_INFINITY;
            if (height > highest) {
                highest = height;
                best = lnT;
            }
            return height;
        }

        boolean bracket() {
            for (int j = 1; j <= MOST_LEAPS; j++) {
                double before = highest;
                double h = ask(lnEnd - ((1L << j) - 1) * LN2);
                if (before > Double.NEGATIVE_INFINITY && h < before) {
                    return true;
                }
            }
            return false;
        }

        Optional<GuessedPeak> refine(double target) {
            double reach = 1;
            double direction = 0;
            for (int step = 0; ; step++) {
                Peak p = peak();
                if (!p.isBracketed()) {
                    return Optional.empty();
                }
                double gap = p.gap();
                double least = Math.max(target, ROUNDING * Math.max(1, Math.abs(values.get(best))) / share());
                if (gap <= least || step == MOST) {
                    return Optional.of(new GuessedPeak(best, p.left(), p.right(), gap));
                }
                double before = best;
                double x = p.next(least, step % 2 != 0, reach);
                double next = best + (Double.isNaN(x) ? p.halfWay() : x);
                if (values.containsKey(next)) {
                    return Optional.of(new GuessedPeak(best, p.left(), p.right(), gap));
                }
                ask(next);
                double moved = Math.signum(best - before);
                reach = moved != 0 && moved == direction ? FURTHER * reach : 1;
                direction = moved;
            }
        }

        private double share() {
            return -Math.expm1(lnRate + best - values.get(best));
        }

        private Peak peak() {
            int n = values.size() + 1;
            double[] x = new double[n];
            double[] y = new double[n];
            double y0 = values.get(best);
            int i = 0;
            int at = 0;
            for (Map.Entry<Double, Double> e : values.entrySet()) {
                x[i] = e.getKey() - best;
                y[i] = e.getValue() - y0;
                at = e.getKey() == best ? i : at;
                i++;
            }
            x[i] = lnEnd - best;
            y[i] = Double.NaN;
            return new Peak(x, y, at, share());
        }
    }
}
