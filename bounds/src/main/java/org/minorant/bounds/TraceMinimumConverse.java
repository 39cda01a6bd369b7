package org.minorant.bounds;

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

    private TraceMinimumConverse() {}

    /**
     * −ln S.
     *
     * @param letters the curves of all letters against a σ of trace one
     * @param epsilon the average error
     */
    static Information messages(LetterCurves letters, double epsilon) {
        Enclosure sup = supremum(letters.least(), letters.most(), Enclosure.exact(epsilon));
        return Information.ofNats(sup.ln().negate().max(Enclosure.ZERO)).withSource(THEOREM.toString());
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
