package org.minorant.core.pair;

/** Follows long work. Called from the threads that do it, possibly several at once: implementations are thread-safe and quick. */
public interface WorkListener {

    /** Takes no notice and never cancels. */
    WorkListener NONE = (done, total) -> {};

    /**
     * Told when a part of the work is done.
     *
     * @param done how many parts are done
     * @param total how many there are
     */
    void onProgress(long done, long total);

    /**
     * Asked many times a second. Once true, the call ends with a {@link java.util.concurrent.CancellationException}; so it does when the calling thread is
     * interrupted.
     *
     * @return whether to stop
     */
    default boolean isCancelled() {
        return false;
    }
}
