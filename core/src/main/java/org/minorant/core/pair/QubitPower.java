package org.minorant.core.pair;

import org.minorant.core.internal.number.DoubleDouble;
import org.minorant.core.internal.number.WideDoubleDouble;

/**
 * n copies of two qubit operators.
 *
 * @param spectra one copy
 * @param n how many
 */
record QubitPower(QubitSpectra spectra, int n) {

    /** Eigenvalues are known to 2^-103, and their powers, taken in double-double, to n · 2^-101. */
    private static final double EIGENVALUES = 0x1p-99;

    CopyErrors.Factor first() {
        return factor(spectra.first());
    }

    CopyErrors.Factor second() {
        return factor(spectra.second());
    }

    private CopyErrors.Factor factor(QubitSpectra.Spectrum s) {
        WideDoubleDouble trace = WideDoubleDouble.of(s.large().plus(s.small()));
        return new CopyErrors.Factor(
                Letters.enclosure(trace, 2 * DoubleDouble.EPS), s.relativeError() + EIGENVALUES, s.traceError(), n);
    }
}
