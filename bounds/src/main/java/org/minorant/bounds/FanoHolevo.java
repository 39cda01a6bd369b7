package org.minorant.bounds;

import org.minorant.core.Enclosure;
import org.minorant.core.Information;

/**
 * The weak converse from the capacity: a code of M messages with average error ε obeys
 *
 * <pre>ln M ≤ (C + h(ε)) / (1 − ε),   h(ε) = −ε ln ε − (1 − ε) ln(1 − ε).</pre>
 *
 * <p>Fano: (1 − ε) ln M ≤ I(message : outcome) + h(ε); Holevo: that information is at most C, as the message determines the letter. One use of the
 * channel; nothing else is assumed.
 */
final class FanoHolevo {

    static final Theorem THEOREM = new Theorem(
            "weak converse (C + h(e))/(1 - e)",
            "R. M. Fano, Transmission of Information (1961); A. S. Holevo, Probl. Inf. Transm. 9, 177 (1973) (both from memory)");

    private FanoHolevo() {}

    static Information messages(Information capacity, double epsilon) {
        Enclosure e = Enclosure.exact(epsilon);
        Enclosure rest = e.complement();
        Enclosure h = e.times(e.ln()).plus(rest.times(rest.ln())).negate();
        return Information.ofNats(capacity.nats().plus(h).dividedBy(rest)).withSource(THEOREM.toString());
    }
}
