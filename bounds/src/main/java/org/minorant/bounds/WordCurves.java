package org.minorant.bounds;

import org.minorant.core.Enclosure;
import org.minorant.core.InvalidInputException;
import org.minorant.core.WideDouble;
import org.minorant.core.pair.PositivePair;

/**
 * What one pair of n copies says of all words of n letters: their curves against the n-fold output state are this pair's, within errors.
 *
 * @param pair n copies
 * @param traces what holds the traces of words
 * @param factor what the pair's curve is to be multiplied with, an enclosure around 1
 * @param off a bound on the trace norm by which a word differs from the operator that the pair stands for
 */
record WordCurves(PositivePair pair, Enclosure traces, Enclosure factor, WideDouble off) {

    /**
     * The curves of n uses.
     *
     * @param pair n copies
     * @param traces what holds the traces of letters
     * @param slack what holds 1 and the factors of normalisation of one use
     * @param error the relative error of the operators of one use
     * @param distance how far a letter is from what the pair stands for, in trace norm
     * @param n the number of uses
     */
    static WordCurves of(PositivePair pair, Enclosure traces, Enclosure slack, double error, double distance, int n) {
        Enclosure one = Enclosure.ONE;
        Enclosure relative = one.widen(error).hull(one.dividedBy(one.widen(error)));
        // ‖A_1 ⊗ … ⊗ A_n − A'_1 ⊗ … ⊗ A'_n‖₁ ≤ n δ T^(n−1), exchanging one factor after the other; T ≥ 1 bounds the
        // traces of both
        WideDouble trace = traces.hull(one).widen(distance).upperWide();
        WideDouble off =
                Enclosure.of(trace, trace).power(n).times(distance).times(n).upperWide();
        return new WordCurves(pair, traces.power(n), slack.times(relative).power(n), off);
    }

    LetterCurves curves() {
        return LetterCurves.ofWords(this);
    }

    /** The refusal of a channel that no one pair describes. */
    static InvalidInputException notCovered(String found) {
        return new InvalidInputException(
                "CodingBounds.uses",
                found,
                "two equiprobable kets; letters of one classical channel, for the converse with like rows; qubits of like length and angle to the output state",
                "ask for one use, of a channel whose letters are the words, or choose input and output state by the symmetry of the letters");
    }
}
