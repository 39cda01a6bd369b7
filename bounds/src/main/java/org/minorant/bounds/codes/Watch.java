package org.minorant.bounds.codes;

import java.util.concurrent.CancellationException;
import org.minorant.core.pair.WorkListener;

/** Tells a listener how far the work is, and ends it when asked to. */
record Watch(WorkListener listener) {

    /** Ends the work if the listener has asked for it, or the thread was interrupted. */
    void checkpoint() {
        if (listener.isCancelled() || Thread.currentThread().isInterrupted()) {
            throw new CancellationException("cancelled by the listener or by an interrupt");
        }
    }

    /** The same, after a part of the work is done. */
    void done(long parts, long total) {
        listener.onProgress(parts, total);
        checkpoint();
    }
}
