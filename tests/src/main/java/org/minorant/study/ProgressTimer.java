package org.minorant.study;

import java.util.concurrent.Executors;
import java.util.concurrent.ScheduledExecutorService;
import java.util.concurrent.TimeUnit;

/** Lets a progress look at the clock five times a second until closed; the thread is a daemon, so it holds up nothing. */
final class ProgressTimer implements AutoCloseable {

    private final ScheduledExecutorService timer = Executors.newSingleThreadScheduledExecutor(task -> {
        Thread thread = new Thread(task, "study-progress");
        thread.setDaemon(true);
        return thread;
    });

    private final Progress progress;

    ProgressTimer(Progress progress) {
        this.progress = progress;
    }

    void start() {
        timer.scheduleAtFixedRate(progress::tick, 200, 200, TimeUnit.MILLISECONDS);
    }

    @Override
    public void close() {
        timer.shutdownNow();
    }
}
