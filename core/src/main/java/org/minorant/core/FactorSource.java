package org.minorant.core;

import java.util.OptionalInt;
import java.util.function.Supplier;

/**
 * The factor of a positive operator, worked out when first asked for; whoever computes it gets the same value.
 *
 * <p>Thread-safe: two threads may compute it at the same time and find the same bits.
 */
final class FactorSource {

    private volatile PositiveFactor value;
    private volatile Supplier<PositiveFactor> recipe;

    private final OptionalInt columns;

    private FactorSource(PositiveFactor value, Supplier<PositiveFactor> recipe, OptionalInt columns) {
        this.value = value;
        this.recipe = recipe;
        this.columns = columns;
    }

    /** A factor at hand. */
    static FactorSource of(PositiveFactor factor) {
        return new FactorSource(factor, () -> factor, OptionalInt.of(factor.rank()));
    }

    /** A factor to be worked out by decomposing a matrix. */
    static FactorSource later(Supplier<PositiveFactor> recipe) {
        return new FactorSource(null, recipe, OptionalInt.empty());
    }

    /** A factor to be put together from others; the number of columns is known if no matrix has to be decomposed. */
    static FactorSource later(Supplier<PositiveFactor> recipe, OptionalInt columns) {
        return new FactorSource(null, recipe, columns);
    }

    /** The number of columns, if it is known without decomposing a matrix; it does not depend on what was asked before. */
    OptionalInt columns() {
        return columns;
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
