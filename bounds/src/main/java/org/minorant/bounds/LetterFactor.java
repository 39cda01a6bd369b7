package org.minorant.bounds;

import org.minorant.core.DensityOperator;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.EnclosedSpectrum;
import org.minorant.core.Enclosure;
import org.minorant.core.PositiveFactor;
import org.minorant.core.WideDouble;

/**
 * An output state W ≈ XX* with what its entropies need.
 *
 * @param columns X, exact numbers
 * @param trace an enclosure of Tr W
 * @param error a bound on ‖W − XX*‖₁: with relative error η and trace error ν, η Tr XX* + 2ν
 * @param purity Tr Ŵ ln Ŵ for Ŵ = W/Tr W: minus the entropy
 */
record LetterFactor(EnclosedMatrix columns, Enclosure trace, double error, Enclosure purity) {

    private static final double UP = 1 + 0x1p-40;

    static LetterFactor of(DensityOperator w) {
        PositiveFactor f = w.factor();
        Enclosure trace = Traces.of(w);
        double error =
                (f.relativeError() * (trace.upper() + f.traceError()) / (1 - f.relativeError()) + 2 * f.traceError())
                        * UP;
        return new LetterFactor(f.columns(), trace, error, purity(f, trace));
    }

    /** The nonzero eigenvalues of XX* are those of X*X; each eigenvalue of W is within the factor's errors of its own. */
    private static Enclosure purity(PositiveFactor f, Enclosure trace) {
        EnclosedMatrix x = f.columns();
        boolean wide = f.rank() > f.dimension();
        EnclosedSpectrum s =
                EnclosedSpectrum.of(wide ? x.times(x.adjoint()) : x.adjoint().times(x));
        Enclosure relative = Enclosure.exact(1).widen(f.relativeError());
        Enclosure sum = Enclosure.ZERO;
        for (int i = 0; i < s.dimension(); i++) {
            Enclosure lambda =
                    s.eigenvalue(i).max(Enclosure.ZERO).times(relative).widen(f.traceError());
            sum = sum.plus(EntropyTerm.of(lambda.max(Enclosure.ZERO).min(trace)));
        }
        for (int i = s.dimension(); i < f.dimension() && f.traceError() > 0; i++) {
            sum = sum.plus(EntropyTerm.of(Enclosure.of(0, f.traceError())));
        }
        WideDouble most = WideDouble.ZERO;
        Enclosure normalised = sum.dividedBy(trace).minus(trace.ln());
        return Enclosure.of(
                normalised.lowerWide().min(most), normalised.upperWide().min(most));
    }
}
