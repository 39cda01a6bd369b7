package org.minorant.bounds;

import java.util.function.Supplier;

/**
 * A value worked out when first asked for. The recipe is a pure function, so two threads that meet here find the same value.
 *
 * @param <T> an immutable type
 */
final class Lazy<T> {

    private final Supplier<T> recipe;
    private volatile T value;

    Lazy(Supplier<T> recipe) {
        this.recipe = recipe;
    }

    T get() {
        T v = value;
        if (v == null) {
            v = recipe.get();
            value = v;
        }
        return v;
    }
}
