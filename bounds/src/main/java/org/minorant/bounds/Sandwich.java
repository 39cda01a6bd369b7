package org.minorant.bounds;

import java.util.Optional;
import org.minorant.core.Enclosure;
import org.minorant.core.Operator;

/**
 * An input and an output state that is nearly the best for it, at an order above one.
 *
 * @param near the output state in the coordinates of the search, for another to start from; empty where there is nothing to search
 * @param sigma the letters against the output state
 * @param traces Q_x = Tr (σ^(−u/2) W_x σ^(−u/2))^α, not certified, over a factor that keeps them in range
 * @param lnScale the logarithm of that factor
 * @param norm about (1/α) ln Σ P(x) Q_x, the number bounded by {@code lower}
 * @param lower a certified lower end of min over σ of ln ‖ρ_XB^½ (ρ_X ⊗ σ)^(−u) ρ_XB^½‖_α
 */
record Sandwich(
        Optional<Operator> near,
        LettersAgainst sigma,
        double[] traces,
        double lnScale,
        double norm,
        Lazy<Enclosure> lower) {}
