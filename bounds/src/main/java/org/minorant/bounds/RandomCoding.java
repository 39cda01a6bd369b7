package org.minorant.bounds;

import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;
import org.minorant.core.curve.Curve;
import org.minorant.core.curve.CurveRoot;

/**
 * The one-shot achievability bound by f: M codewords drawn independently from P, decoded with the pretty-good measurement, have an expected
 * average error of at most
 *
 * <pre>f(M − 1) = Tr[ρ_XB ∧ (M − 1) ρ_X ⊗ ρ_B] = Σ_x P(x) Tr[W_x ∧ (M − 1) ρ_B],   ρ_B = Σ_x P(x) W_x,</pre>
 *
 * so some code of M messages has an average error no larger. Nothing is assumed of channel or input.
 */
final class RandomCoding {

    static final Theorem THEOREM = new Theorem(
            "one-shot random coding, f(M-1)",
            "H.-C. Cheng, PRX Quantum 4, 040330 (2023), one-shot achievability (theorem number from memory)");

    /** Brackets of more binary digits are halved first. */
    private static final long LONG = 64;

    private RandomCoding() {}

    /** The bound on the error with M − 1 other messages. */
    static Enclosure error(Curve f, Enclosure others) {
        return f.over(others).clip(0, 1);
    }

    /**
     * The largest M − 1, real, with f(M − 1) ≤ ε; below 1 only its upper end is meant.
     *
     * @param f the curve of the channel and its input
     * @param epsilon the error allowed
     * @param saturation a point where f is 1: W_x ≤ ρ_B/P(x), so the inverse of the least positive probability
     * @param relativeGap a relative width that is small enough
     */
    static Enclosure others(Curve f, double epsilon, WideDouble saturation, double relativeGap) {
        WideDouble level = WideDouble.of(epsilon);
        Enclosure none = Enclosure.of(WideDouble.ZERO, WideDouble.of(Math.nextDown(1.0)));
        if (f.at(WideDouble.ONE).lowerWide().compareTo(level) > 0) {
            return none;
        }
        WideDouble[] bracket = {WideDouble.ONE, saturation};
        if (f.guess().isEmpty() && saturation.exponent() > LONG) {
            bracket = ErrorWeight.halved(f, level, bracket[0], bracket[1]);
        }
        Enclosure root = CurveRoot.of(f, level, bracket[0], bracket[1], relativeGap);
        // an end at 1 is one where f exceeds the level
        return root.upperWide().compareTo(WideDouble.ONE) > 0 ? root : none;
    }
}
