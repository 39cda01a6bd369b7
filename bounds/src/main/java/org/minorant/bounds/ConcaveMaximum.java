package org.minorant.bounds;

import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;

/**
 * The supremum over t &gt; 0 of a concave curve that vanishes at 0, enclosed from samples alone: see {@link ConcaveSamples}.
 *
 * <p>Where to sample is a matter of speed only. The peak is bracketed by steps that double in ln t, narrowed by geometric means, then found by
 * alternating the vertex of a parabola (smooth peaks) with the crossing of the neighbouring chords (kinks). A sample close to the peak on one side is
 * followed by one as close on the other, so that the chords on both sides are short and what they leave open is of second order.
 */
final class ConcaveMaximum {

    private static final int MOST_STEPS = 80;

    /** Samples in vain, once the width is good, before the search ends. */
    private static final int PATIENCE = 6;

    private static final double GOOD = 1e-12;

    /** Samples on both sides of the peak within this, relatively, end the search. */
    private static final double CLOSE = 0x1p-43;

    /** The root of a rounding: closer samples of a smooth peak differ by rounding only. */
    private static final double SMOOTH = 0x1p-22;

    /** While a neighbour of the best sample is farther than a factor of four, geometric means are taken. */
    private static final double FAR_RIGHT = 3;

    private static final double FAR_LEFT = 0.75;

    /** Distances on both sides of the peak may differ by this factor. */
    private static final double LOPSIDED = 8;

    /** The least t looked at is end · 2^−2^this. */
    private static final int DEEPEST = 14;

    private final Curve g;
    private final ConcaveSamples samples;

    private ConcaveMaximum(Curve g, WideDouble end, WideDouble beyond) {
        this.g = g;
        this.samples = new ConcaveSamples(beyond);
        samples.add(end, g.at(end));
    }

    /**
     * Encloses the supremum.
     *
     * @param g a concave curve with g(0) = 0
     * @param end a positive point
     * @param beyond a number that g does not exceed to the right of that point
     * @return the supremum of g over t ≥ 0
     */
    static Enclosure of(Curve g, WideDouble end, WideDouble beyond) {
        ConcaveMaximum m = new ConcaveMaximum(g, end, beyond);
        m.bracket(end);
        m.narrow();
        return m.samples.supremum();
    }

    private void bracket(WideDouble end) {
        for (int j = 0; j <= DEEPEST; j++) {
            WideDouble t = end.timesPowerOfTwo(-(1L << j));
            samples.add(t, g.at(t));
            if (samples.best() > 1) {
                return;
            }
        }
    }

    private void narrow() {
        double width = Double.POSITIVE_INFINITY;
        int vain = 0;
        for (int step = 0; step < MOST_STEPS && vain < PATIENCE && !samples.isTight(); step++) {
            double now = samples.supremum().relativeWidth();
            vain = now < GOOD && now > 0.7 * width ? vain + 1 : 0;
            width = Math.min(width, now);
            int b = samples.best();
            if (b == samples.size() - 1 || samples.value(b).upperWide().signum() <= 0) {
                return;
            }
            WideDouble peak = samples.t(b);
            double left = 1 - samples.t(b - 1).dividedByDown(peak).toDoubleDown();
            double right = samples.t(b + 1).dividedByDown(peak).toDoubleDown() - 1;
            double far = Math.max(left, right);
            double near = Math.min(left, right);
            if (far < CLOSE) {
                return;
            }
            // a smooth peak is best closed in at about the root of a rounding; only if that is not enough, something
            // finer is there
            double least = far > SMOOTH ? SMOOTH / 4 : CLOSE / 4;
            double side = right > left ? 1 : -1;
            WideDouble t;
            if (right > FAR_RIGHT) {
                t = peak.sqrtDown().timesDown(samples.t(b + 1).sqrtDown());
            } else if (left > FAR_LEFT) {
                t = b == 1
                        ? peak.timesPowerOfTwo(-2)
                        : peak.sqrtDown().timesDown(samples.t(b - 1).sqrtDown());
            } else if (far > LOPSIDED * near) {
                t = beside(peak, side * Math.max(2 * near, least));
            } else {
                t = step % 2 == 0 ? samples.vertex(b) : samples.crossing();
            }
            if (samples.isNear(t, least / 4)) {
                samples.note(g.at(t));
                t = beside(peak, side * far / 2);
            }
            samples.add(t, g.at(t));
        }
    }

    private static WideDouble beside(WideDouble peak, double relative) {
        return peak.timesDown(WideDouble.of(1 + relative));
    }
}
