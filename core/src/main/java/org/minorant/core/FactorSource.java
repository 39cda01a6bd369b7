package org.minorant.core;

import java.util.function.Supplier;

/**
 * The factor of a positive operator, worked out when first asked for; whoever computes it gets the same value.
 *
 * <p>Thread-safe: two threads may compute it at the same time and find the same bits.
 */
final class FactorSource {

    private volatile PositiveFactor value;
    private volatile Supplier<PositiveFactor> recipe;

    private FactorSource(PositiveFactor value, Supplier<PositiveFactor> recipe) {
        this.value = value;
        this.recipe = recipe;
    }

    /** A factor at hand. */
    static FactorSource of(PositiveFactor factor) {
        return new FactorSource(factor, () -> factor);
    }

    /** A factor to be worked out. */
    static FactorSource later(Supplier<PositiveFactor> recipe) {
        return new FactorSource(null, recipe);
    }

    boolean isAtHand() {
        return value != null;
    }

    PositiveFactor get() {
        PositiveFactor f = value;
        if (f == null) {
            f = recipe.get();
            value = f;
            // lets go of the operators that the recipe was made of; a thread that is still computing holds its own
            // reference
            PositiveFactor done = f;
            recipe = () -> done;
        }
        return f;
    }
}
