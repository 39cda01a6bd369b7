package org.minorant.bounds;

import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;
import org.minorant.core.curve.Curve;

/**
 * Codes whose largest error is at most ε, from codes of a smaller average error: for every real t ≥ 1 with f(t) ≤ ε some code has a largest error of at most ε and ⌊M⌋ messages,
 *
 * <pre>M = (1 + t)(1 − f(t)/ε).</pre>
 *
 * <p><b>Argument.</b> Some code of K = ⌊1 + t⌋ messages has an average error δ ≤ f(K − 1) ≤ f(t) ({@link RandomCoding}). Fewer than Kδ/ε of them, or none, have an error above ε; the other K(1 − δ/ε) or more, with the same measurement,
 * form a code whose largest error is at most ε. A number of messages is whole, so that there are ⌈K(1 − δ/ε)⌉; and M &lt; (K + 1)(1 − f(t)/ε) ≤ K(1 − δ/ε) + 1, so that ⌊M⌋ is no more than that.
 *
 * <p>f rises by less than in proportion; near its crossing of ε like a power t^a, where M is largest at f = ε/(1 + a): one to 1.44 bits below the crossing. The t is looked for there, and the value at it is enclosed.
 */
final class LargestError {

    static final Theorem THEOREM = new Theorem(
            "one-shot random coding, messages of large error left out",
            "H.-C. Cheng, PRX Quantum 4, 040330 (2023), with expurgation as in C. E. Shannon, Inf. Control 1, 6 (1957) (both from memory)");

    /** How far below the crossing, in nats, the best t is looked for. */
    private static final double REACH = 3;

    private static final int POINTS = 6;

    private static final double WIDTH = 1e-4;

    /** The same where values are costly: M is stationary there, and changes by the square of it. */
    private static final double ROUGH = 0.02;

    private LargestError() {}

    /**
     * M − 1.
     *
     * @param f the curve of the channel and its input
     * @param epsilon the largest error allowed
     * @param crossing what holds the largest t with f(t) ≤ ε
     * @return (1 + t)(1 − f(t)/ε) − 1 at the t that was found, below 1 if there are no two messages
     */
    static Enclosure others(Curve f, double epsilon, Enclosure crossing) {
        if (!(crossing.lowerWide().compareTo(WideDouble.ONE) > 0)) {
            return Enclosure.of(WideDouble.ZERO, WideDouble.of(Math.nextDown(1.0)));
        }
        boolean cheap = f.guess().isPresent();
        double end = crossing.lnLower();
        double begin = Math.max(0, end - REACH);
        double step = (end - begin) / POINTS;
        double best = begin;
        double least = Double.POSITIVE_INFINITY;
        for (int i = 0; i < POINTS; i++) {
            double lost = lost(f, epsilon, begin + i * step);
            best = lost < least ? begin + i * step : best;
            least = Math.min(least, lost);
        }
        double x = Unimodal.minimiser(
                y -> lost(f, epsilon, y),
                Math.max(begin, best - step),
                Math.min(end, best + step),
                cheap ? WIDTH : ROUGH);
        WideDouble t = WideDouble.expDown(x).max(WideDouble.ONE);
        Enclosure kept = f.at(t).dividedBy(Enclosure.exact(epsilon)).complement();
        return Enclosure.of(t, t)
                .plus(Enclosure.ONE)
                .times(kept)
                .minus(Enclosure.ONE)
                .max(Enclosure.ZERO);
    }

    /** About −ln M from ln t. */
    private static double lost(Curve f, double epsilon, double lnT) {
        double value = f.guess()
                .map(g -> Math.exp(g.lnValue(lnT)))
                .orElseGet(() -> f.at(WideDouble.expDown(lnT)).midpoint());
        double kept = 1 - value / epsilon;
        return kept > 0 ? -(lnT + Math.log1p(Math.exp(-lnT))) - Math.log(kept) : Double.POSITIVE_INFINITY;
    }
}
