package org.minorant.bounds;

import java.util.List;
import java.util.Optional;
import org.minorant.core.Enclosure;
import org.minorant.core.InvalidInputException;
import org.minorant.core.WideDouble;
import org.minorant.core.pair.PairPowers;
import org.minorant.core.pair.PositivePair;

/**
 * What one pair of n copies, or one for each type of words, says of all words of n letters: their curves against the n-fold output state are those pairs', within errors.
 *
 * @param pairs one pair for each type of words
 * @param traces what holds the traces of words
 * @param factor what the pairs' curves are to be multiplied with, an enclosure around 1
 * @param off a bound on the trace norm by which a word differs from the operator that its pair stands for
 * @param mean the probabilities of the types if a mean over words is meant
 */
record WordCurves(
        List<PositivePair> pairs, Enclosure traces, Enclosure factor, WideDouble off, Optional<TypeMean> mean) {

    WordCurves {
        pairs = List.copyOf(pairs);
    }

    /** The curves of n uses, all words alike. */
    static WordCurves of(PositivePair pair, Enclosure traces, Enclosure slack, double error, double distance, int n) {
        return of(List.of(pair), traces, slack, error, distance, n);
    }

    /**
     * The curves of n uses.
     *
     * @param pairs one pair for each type of words
     * @param traces what holds the traces of letters
     * @param slack what holds 1 and the factors of normalisation of one use
     * @param error the relative error of the operators of one use
     * @param distance how far a letter is from what the pair stands for, in trace norm
     * @param n the number of uses
     */
    static WordCurves of(
            List<PositivePair> pairs, Enclosure traces, Enclosure slack, double error, double distance, int n) {
        Enclosure one = Enclosure.ONE;
        Enclosure relative = one.widen(error).hull(one.dividedBy(one.widen(error)));
        // ‖A_1 ⊗ … ⊗ A_n − A'_1 ⊗ … ⊗ A'_n‖₁ ≤ n δ T^(n−1), exchanging one factor after the other; T ≥ 1 bounds the
        // traces of both
        WideDouble trace = traces.hull(one).widen(distance).upperWide();
        WideDouble off =
                Enclosure.of(trace, trace).power(n).times(distance).times(n).upperWide();
        return new WordCurves(pairs, traces.power(n), slack.times(relative).power(n), off, Optional.empty());
    }

    /** The same pairs, for a mean over words. */
    WordCurves withMean(TypeMean types) {
        return new WordCurves(pairs, traces, factor, off, Optional.of(types));
    }

    LetterCurves curves() {
        return LetterCurves.ofWords(this);
    }

    /** The refusal of a channel that no one pair describes. */
    static InvalidInputException notCovered(String found) {
        return new InvalidInputException(
                "CodingBounds.uses",
                found,
                "classical letters, kets or qubits with few enough types of words; others while words have a dimension of at most "
                        + PairPowers.MOST_DIMENSIONS,
                "take fewer uses, choose input and output state by the symmetry of the letters, or ask for the relaxed bounds, which hold for every channel");
    }
}
