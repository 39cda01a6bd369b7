package org.minorant.core.pair;

import java.util.concurrent.CancellationException;
import org.minorant.core.InvalidInputException;

/**
 * How much work a value may cost, and who follows it. Only pairs of many copies ask; the others answer to full precision at once.
 *
 * @param tolerance the relative width aimed at, between 1e-15 and 1; truncation is chosen to stay within it
 * @param listener told about progress, and asked whether to go on
 */
public record Effort(double tolerance, WorkListener listener) {

    /** A relative width of 1e-12, and nobody listens. */
    public static final Effort DEFAULT = new Effort(1e-12, WorkListener.NONE);

    /**
     * Checks the tolerance.
     *
     * @param tolerance the relative width aimed at
     * @param listener told about progress
     * @throws InvalidInputException if the tolerance is not between 1e-15 and 1
     */
    public Effort {
        if (!(tolerance >= 1e-15 && tolerance <= 1)) {
            throw new InvalidInputException(
                    "Effort",
                    "the relative tolerance is " + tolerance,
                    "between 1e-15 and 1",
                    "ask for a relative width in that range");
        }
    }

    /**
     * Returns this effort with another tolerance.
     *
     * @param relativeWidth the relative width aimed at
     * @return the effort
     */
    public Effort withTolerance(double relativeWidth) {
        return new Effort(relativeWidth, listener);
    }

    /**
     * Returns this effort with another listener.
     *
     * @param l the listener
     * @return the effort
     */
    public Effort withListener(WorkListener l) {
        return new Effort(tolerance, l);
    }

    /**
     * Ends the work if the listener has asked for it, or the thread was interrupted.
     *
     * @throws CancellationException if so
     */
    void checkpoint() {
        if (listener.isCancelled() || Thread.currentThread().isInterrupted()) {
            throw new CancellationException("cancelled by the listener or by an interrupt");
        }
    }
}
