package org.minorant.core.internal.work;

import java.util.function.Supplier;

/**
 * Lets long matrix computations be ended from outside without a parameter through every product: what a thread runs with {@link #during} asks the given check now and then, which ends the work by an
 * exception. A thread that set nothing asks nobody.
 */
public final class Checkpoint {

    private static final Runnable NONE = () -> {};

    private static final ThreadLocal<Runnable> CHECK = new ThreadLocal<>();

    private Checkpoint() {}

    /** Runs work of this thread with a check, instead of an outer one if there is any. */
    public static <T> T during(Runnable check, Supplier<T> work) {
        Runnable outer = CHECK.get();
        CHECK.set(check);
        try {
            return work.get();
        } finally {
            if (outer == null) {
                CHECK.remove();
            } else {
                CHECK.set(outer);
            }
        }
    }

    /** The check of this thread: to be taken once where it is asked often. */
    public static Runnable current() {
        Runnable check = CHECK.get();
        return check == null ? NONE : check;
    }
}
