package org.minorant.bounds;

/** What the size of a code is counted in when block lengths are compared: rounding to bits moves a block length by tens of uses, as one bit does. */
public enum WholeUnit {
    /** Any whole number of messages. */
    MESSAGES,
    /** A whole number of bits: a power of two of messages. The published block lengths of dependence testing and the random-coding union count so. */
    BITS
}
