package org.minorant.bounds;

import java.util.List;
import java.util.Locale;
import org.minorant.core.InvalidInputException;
import org.minorant.core.pair.CommutingPowers;
import org.minorant.core.pair.PositivePair;

/**
 * The types of words of n letters, letters of one kind taken for the same: how often each kind occurs. For a type (n_1, n_2, …) the word's curve against σ^⊗n is that of
 *
 * <pre>A_1^⊗n_1 ⊗ A_2^⊗n_2 ⊗ …   against   B_1^⊗n_1 ⊗ B_2^⊗n_2 ⊗ …</pre>
 *
 * with the kind's outputs and the output state restricted to them. All types are kept, those of letters that the input never uses too: a code may use any word.
 */
final class WordTypes {

    /** More types than this are not kept. */
    private static final double MOST_TYPES = 3e5;

    /** More terms than this for one value of all curves would take some ten seconds. */
    private static final double MOST_TERMS = 2e9;

    private WordTypes() {}

    /**
     * One pair for each type.
     *
     * @param kinds the kinds of letters, at least two
     * @param n the length of words
     */
    static List<PositivePair> pairs(List<MergedSpectra> kinds, int n) {
        double count = TypeProbabilities.count(kinds.size(), n);
        if (!(count <= MOST_TYPES)) {
            throw tooMany(String.format(Locale.ROOT, "%.1e types of words", count), kinds, n);
        }
        CommutingPowers powers = CommutingPowers.of(
                kinds.stream().map(MergedSpectra::a).toList(),
                kinds.stream().map(MergedSpectra::b).toList(),
                n);
        List<int[]> types = TypeProbabilities.types(kinds.size(), n);
        double terms = types.stream().mapToDouble(powers::terms).sum();
        if (!(terms <= MOST_TERMS)) {
            throw tooMany(String.format(Locale.ROOT, "about %.0e terms", terms), kinds, n);
        }
        return types.stream().map(powers::pair).toList();
    }

    private static InvalidInputException tooMany(String found, List<MergedSpectra> kinds, int n) {
        return new InvalidInputException(
                "CodingBounds.uses",
                found + " in " + n + " uses of " + kinds.size() + " kinds of letters",
                String.format(Locale.ROOT, "at most %.0e types and %.0e terms", MOST_TYPES, MOST_TERMS),
                "take fewer uses, or an output state against which more letters are alike");
    }
}
