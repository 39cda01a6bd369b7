package org.minorant.bounds;

import java.util.Optional;
import org.minorant.core.Enclosure;

/** The letters of a channel, normalised, against one normalised output state σ: what exponents are made of. */
interface LettersAgainst {

    /**
     * A tangent of a convex function of u.
     *
     * @param value its value at u
     * @param slope its slope at u
     */
    record Tangent(Enclosure value, Enclosure slope) {}

    /**
     * Encloses ψ_x(u) = ln Tr W_x^(1−u) σ^u.
     *
     * @param x the letter
     * @param u between 0 and 1, powers being taken on supports
     * @return ψ_x(u); from −∞ on if the trace may vanish
     */
    Enclosure psi(int x, double u);

    /**
     * Finds a tangent of a convex function that is nowhere above ψ_x: of ψ_x itself if the ranks of the operators are certain.
     *
     * @param x the letter
     * @param u between 0 and 1
     * @return the tangent at u; empty if the trace may vanish
     */
    Optional<Tangent> tangent(int x, double u);

    /**
     * Encloses u D̃_α(W_x‖σ) with the sandwiched divergence and u = (α−1)/α.
     *
     * @param x the letter
     * @param u above 0; at most 1, which stands for the max-divergence
     * @return the product; to +∞ if the support of W_x is not certain to lie in that of σ
     */
    Enclosure norm(int x, double u);

    /**
     * Encloses D(σ‖W_x).
     *
     * @param x the letter
     * @return the relative entropy; to +∞ if the support of σ is not certain to lie in that of W_x
     */
    Enclosure reversed(int x);
}
