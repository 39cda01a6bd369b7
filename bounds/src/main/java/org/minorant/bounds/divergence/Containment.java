package org.minorant.bounds.divergence;

/** Whether the support of the first operator lies in that of the second, on which the finiteness of a divergence hangs. */
public enum Containment {
    /** It does, with certainty. */
    CERTAIN,
    /** It does not, with certainty. */
    REFUTED,
    /** The numbers do not tell. */
    UNDECIDED
}
