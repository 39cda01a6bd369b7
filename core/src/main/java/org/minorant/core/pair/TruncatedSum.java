package org.minorant.core.pair;

import java.util.function.DoubleFunction;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;

/**
 * A sum of which small parts are left out, with their bound added to the upper end: how much may be left out depends on the sum, which is guessed first and then known.
 */
final class TruncatedSum {

    private static final int MOST_ROUNDS = 5;
    private static final double LN2 = Math.log(2);

    private TruncatedSum() {}

    /**
     * What was summed, and an upper end of what was not.
     *
     * @param kept an enclosure of the sum of the parts that were evaluated
     * @param dropped an upper end of the rest
     */
    record Parts(Enclosure kept, WideDouble dropped) {}

    /**
     * Encloses the sum.
     *
     * @param log2Guess the base-two logarithm of the size expected; too large a guess costs another round
     * @param tolerance the relative width that truncation may cost
     * @param evaluate evaluates with a target size in base-two logarithm
     */
    static Enclosure enclose(double log2Guess, double tolerance, DoubleFunction<Parts> evaluate) {
        double guess = log2Guess;
        Enclosure best = Enclosure.of(WideDouble.ZERO, WideDouble.POSITIVE_INFINITY);
        for (int round = 0; round < MOST_ROUNDS; round++) {
            Parts parts = evaluate.apply(guess);
            WideDouble lower = parts.kept().lowerWide();
            best = best.intersect(Enclosure.of(lower, parts.kept().upperWide().plusUp(parts.dropped())));
            double seen = log2(lower);
            boolean fine = parts.dropped().compareTo(lower.timesDown(WideDouble.of(tolerance / 2))) <= 0;
            if (fine || seen >= guess || seen == Double.NEGATIVE_INFINITY && round > 1) {
                return best;
            }
            guess = seen == Double.NEGATIVE_INFINITY ? guess * 1.5 - 60 : seen - 0.5;
        }
        return best;
    }

    private static double log2(WideDouble x) {
        return x.signum() <= 0 ? Double.NEGATIVE_INFINITY : x.exponent() + Math.log(x.significand()) / LN2;
    }
}
