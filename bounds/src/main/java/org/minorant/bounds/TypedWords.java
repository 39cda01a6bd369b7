package org.minorant.bounds;

import java.util.function.Function;
import java.util.function.ToDoubleFunction;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;
import org.minorant.core.curve.Curve;
import org.minorant.core.pair.Effort;
import org.minorant.core.pair.PositivePair;

/**
 * Words of n letters against n copies of one state of the output: their curves depend on their types only, on how often each letter occurs. Nothing is prepared for types that are not asked for.
 *
 * @param pairs the pair that stands for a type
 * @param terms about how many terms a value of a type's curve adds up; 0 if that is not known
 * @param traces what holds the traces of letters
 * @param slack what holds 1 and the factors of normalisation of one use
 * @param error the relative error of the operators of one use
 * @param n the length of words
 */
record TypedWords(
        Function<int[], PositivePair> pairs,
        ToDoubleFunction<int[]> terms,
        Enclosure traces,
        Enclosure slack,
        double error,
        int n) {

    private LetterCurves curves(int[] type) {
        return WordCurves.of(pairs.apply(type), traces, slack, error, 0, n).curves();
    }

    /** s ↦ Tr[W ∧ sσ^⊗n] for a word of the type. */
    Curve curve(int[] type) {
        return curves(type).leastAgainst();
    }

    /**
     * The same curve where it is known to end.
     *
     * @param type how often each letter occurs
     * @param saturation a point from which on the curve is the word's trace
     */
    Curve curve(int[] type, WideDouble saturation) {
        return curves(type).mean(saturation);
    }

    /**
     * The same words, curves truncated within a tolerance.
     *
     * @param tolerance a relative width that is small enough
     */
    TypedWords within(double tolerance) {
        Effort effort = Effort.DEFAULT.withTolerance(tolerance);
        return new TypedWords(type -> pairs.apply(type).withEffort(effort), terms, traces, slack, error, n);
    }
}
