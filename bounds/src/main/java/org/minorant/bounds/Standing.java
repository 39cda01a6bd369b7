package org.minorant.bounds;

/** How sure it is that a formula is the exponent it is named after. The enclosure of the formula's value is certified in either case. */
public enum Standing {

    /** Proved in a published paper, which the exponent names. */
    PROVEN,

    /** Conjectured in a published paper and proved in later manuscripts, both named; the proofs were not read again for this library. */
    ANNOUNCED,

    /** Conjectured in the paper that the exponent names. */
    CONJECTURED
}
