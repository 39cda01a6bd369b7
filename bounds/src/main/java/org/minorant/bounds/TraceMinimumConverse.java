package org.minorant.bounds;

import java.util.Optional;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;
import org.minorant.core.WideDouble;
import org.minorant.core.curve.Curve;
import org.minorant.core.curve.SupportLines;

/**
 * The one-shot converse through f, for any state σ of the output: a code of M messages with average error ε obeys, for every t ≥ 0,
 *
 * <pre>1/M ≥ t(1 − ε) − max over x of Tr(tW_x − σ)₊ = min over x of Tr[tW_x ∧ σ] − tε.</pre>
 *
 * <p><b>Argument.</b> Let T_m be the decoder and x(m) the codewords. Σ_m Tr[(tW_x(m) − σ) T_m] is at most M max_x Tr(tW_x − σ)₊, and it is tM(1−ε) −
 * Σ_m Tr[σT_m] ≥ tM(1−ε) − 1. All letters count, used or not. The right-hand side is concave in t; its supremum S gives ln M ≤ −ln S. For
 * one letter it is the least type-II error of W against σ, so this is the meta-converse with a fixed output state.
 */
final class TraceMinimumConverse {

    static final Theorem THEOREM = new Theorem(
            "one-shot converse, hypothesis testing against an output state",
            "H. Nagaoka, Proc. 1st Asia-Europe Workshop on Concepts in Information Theory (2001); Y. Polyanskiy, H. V. Poor, S. Verdu, IEEE Trans."
                    + " Inf. Theory 56, 2307 (2010), theorem 27 (both from memory)");

    /** A relative gap that is always enough. */
    private static final double ENOUGH = 0x1p-46;

    /** The same for words, in nats: certified values may be costly, and this is far below the gap between the two sides. */
    private static final double ENOUGH_FOR_WORDS = 0x1p-28;

    private TraceMinimumConverse() {}

    /**
     * −ln S.
     *
     * @param letters the curves of all letters against a σ of trace one
     * @param epsilon the average error
     */
    static Information messages(LetterCurves letters, double epsilon) {
        return messages(letters, Enclosure.exact(epsilon));
    }

    private static Information messages(LetterCurves letters, Enclosure epsilon) {
        Enclosure sup = supremum(letters.least(), letters.most(), epsilon);
        return messages(sup.ln().negate());
    }

    private static Information messages(Enclosure nats) {
        return Information.ofNats(nats.max(Enclosure.ZERO)).withSource(THEOREM.toString());
    }

    /**
     * −ln S for letters that are words of many uses, where S lies hundreds of decades down. With a weight s on σ at which F(1) ≤ ε for
     *
     * <pre>F(t) = min over x of Tr[tW_x ∧ sσ],   sS = sup over t of F(t) − tε,</pre>
     *
     * only t ≤ 1 matter: F(t) ≤ tF(1) ≤ tε beyond, as F is concave. So F is replaced by F(1) there, which keeps it concave and nondecreasing, and the search is a short one.
     *
     * @param words the curves of all words against a σ of trace one
     * @param epsilon the average error
     */
    static Information messagesOfWords(LetterCurves words, double epsilon) {
        return messagesOfWords(words, Enclosure.exact(epsilon), ErrorWeight.of(words.leastAgainst(), epsilon));
    }

    /**
     * The same for each average error in an enclosure.
     *
     * @param words the curves of all words against a σ of trace one
     * @param epsilon the average errors
     * @param weight s, if one is known
     */
    static Information messagesOfWords(LetterCurves words, Enclosure epsilon, Optional<WideDouble> weight) {
        if (weight.isEmpty()) {
            return messages(words, epsilon);
        }
        WideDouble s = weight.get();
        Curve f = words.least(s);
        Enclosure last = f.at(WideDouble.ONE);
        Curve values = t -> t.compareTo(WideDouble.ONE) >= 0 ? last : f.at(t);
        Curve cut = f.guess()
                .map(g -> values.withGuess(t -> g.lnValue(Math.min(t, 0))))
                .orElse(values);
        Enclosure sup = new SupportLines(cut, words.most(), last.upperWide())
                .at(epsilon, ENOUGH_FOR_WORDS, 0)
                .value();
        return messages(Enclosure.of(s, s).ln().minus(sup.ln()));
    }

    /**
     * The least average error that the same inequality leaves to M messages: sup over s = 1/t of min over x of Tr[W_x ∧ sσ] − s/M.
     *
     * @param letters the curves of all letters against a σ of trace one
     * @param messages M, at least 1
     */
    static Enclosure error(LetterCurves letters, Enclosure messages) {
        return messages.equals(Enclosure.ONE)
                ? Enclosure.ZERO
                : supremum(letters.leastAgainst(), letters.most(), Enclosure.ONE.dividedBy(messages))
                        .clip(0, 1);
    }

    /** sup over t of c(t) − rate·t, for each rate in the enclosure. */
    private static Enclosure supremum(Curve c, WideDouble most, Enclosure rate) {
        return new SupportLines(c, most, most).at(rate, ENOUGH, 0).value();
    }
}
