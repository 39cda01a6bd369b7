package org.minorant.core;

/** How a matrix that is not quite a state is brought back to one, after its Hermitian part was taken. */
public enum StateRepair {
    /** The nearest state in Hilbert–Schmidt norm: the spectrum is projected on the simplex, so that what is missing from the trace is spread evenly. */
    NEAREST,
    /** The positive part divided by its trace: ratios of the positive eigenvalues are kept. */
    CUT_AND_NORMALISE
}
