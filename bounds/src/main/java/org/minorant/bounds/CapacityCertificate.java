package org.minorant.bounds;

import java.util.List;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;

/**
 * What relative entropies D(W_x‖σ) to one state σ prove about a channel.
 *
 * <p>With a distribution P and its mixture ρ, I(P) = Σ P(x) D(W_x‖ρ) = Σ P(x) D(W_x‖σ) − D(ρ‖σ), and C ≤ max_x D(W_x‖σ) for every σ. If ρ ≤ e^s σ then
 * 0 ≤ D(ρ‖σ) ≤ s, as the logarithm is operator monotone: s is the slack.
 *
 * @param divergences enclosures of D(W_x‖σ), one for each letter
 * @param mutualInformation an enclosure of I(P)
 */
record CapacityCertificate(List<Enclosure> divergences, Enclosure mutualInformation) {

    CapacityCertificate {
        divergences = List.copyOf(divergences);
    }

    /**
     * Concludes from the slack.
     *
     * @param p P
     * @param divergences enclosures of D(W_x‖σ)
     * @param slack s, of which the upper end counts
     */
    static CapacityCertificate of(double[] p, List<Enclosure> divergences, Enclosure slack) {
        WideDouble most = slack.upperWide().max(WideDouble.ZERO);
        Enclosure information = mean(p, divergences).minus(Enclosure.of(WideDouble.ZERO, most));
        return new CapacityCertificate(divergences, information.max(Enclosure.ZERO));
    }

    /** The same with another enclosure of I(P). */
    CapacityCertificate intersect(Enclosure information) {
        return new CapacityCertificate(divergences, mutualInformation.intersect(information.max(Enclosure.ZERO)));
    }

    /** Σ P(x) v_x / Σ P(x) over the letters used. */
    static Enclosure mean(double[] p, List<Enclosure> values) {
        Enclosure mean = Enclosure.ZERO;
        for (int x = 0; x < p.length; x++) {
            if (p[x] > 0) {
                mean = mean.plus(values.get(x).times(p[x]));
            }
        }
        return mean.dividedBy(Traces.sum(p));
    }

    /** The least number that max D(W_x‖σ), so the capacity, is known not to exceed. */
    WideDouble capacityUpper() {
        WideDouble most = WideDouble.ZERO;
        for (Enclosure d : divergences) {
            most = most.max(d.upperWide());
        }
        return most;
    }

    /** The certified gap between I(P) and the capacity. */
    double gap() {
        return capacityUpper().plusUp(mutualInformation.lowerWide().negate()).toDoubleUp();
    }
}
