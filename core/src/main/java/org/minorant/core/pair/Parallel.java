package org.minorant.core.pair;

import java.util.ArrayList;
import java.util.List;
import java.util.concurrent.CancellationException;
import java.util.concurrent.ExecutionException;
import java.util.concurrent.ExecutorService;
import java.util.concurrent.Executors;
import java.util.concurrent.Future;
import java.util.concurrent.Semaphore;
import java.util.concurrent.ThreadFactory;
import java.util.concurrent.TimeUnit;
import java.util.concurrent.TimeoutException;
import java.util.concurrent.atomic.AtomicBoolean;
import java.util.concurrent.atomic.AtomicReference;
import java.util.function.Function;

/**
 * Work that is prepared in order by the calling thread and finished by several. Results come in the order of the items, so that sums over them do not depend on the number of threads.
 */
final class Parallel {

    private static final ThreadFactory DAEMONS = task -> {
        Thread t = new Thread(task, "minorant-blocks");
        t.setDaemon(true);
        return t;
    };

    /** How often the calling thread asks whether to stop, in milliseconds; it does not wait for the others to notice. */
    private static final long POLL = 20;

    private Parallel() {}

    /** The part of an item's work that any thread may do; it passes the checkpoint many times a second, which may throw. */
    @FunctionalInterface
    interface Part<R> {
        R finish(Runnable checkpoint);
    }

    /**
     * Prepares every item here and finishes it on some thread; at most a few items wait in between, so that memory stays bounded.
     *
     * @param effort asked for cancellation
     * @param items the items
     * @param prepare called in order, on this thread
     * @return the results in order
     */
    static <T, R> List<R> inOrder(Effort effort, List<T> items, Function<T, Part<R>> prepare) {
        return inOrder(effort, items, prepare, Runtime.getRuntime().availableProcessors());
    }

    /** The same on at most so many threads. */
    static <T, R> List<R> inOrder(Effort effort, List<T> items, Function<T, Part<R>> prepare, int most) {
        int threads = Math.min(most, items.size());
        if (threads <= 1) {
            List<R> results = new ArrayList<>();
            for (T item : items) {
                results.add(prepare.apply(item).finish(effort::checkpoint));
            }
            return results;
        }
        ExecutorService pool = Executors.newFixedThreadPool(threads, DAEMONS);
        AtomicBoolean stopped = new AtomicBoolean();
        AtomicReference<Throwable> cause = new AtomicReference<>();
        Runnable checkpoint = () -> {
            if (stopped.get()) {
                throw new CancellationException("another part of the work has ended it");
            }
            effort.checkpoint();
        };
        try {
            Semaphore room = new Semaphore(2 * threads);
            List<Future<R>> futures = new ArrayList<>();
            for (T item : items) {
                Part<R> part = prepare.apply(item);
                while (!room.tryAcquire(POLL, TimeUnit.MILLISECONDS)) {
                    effort.checkpoint();
                }
                effort.checkpoint();
                futures.add(pool.submit(() -> {
                    try {
                        return part.finish(checkpoint);
                    } catch (RuntimeException | Error e) {
                        cause.compareAndSet(null, e);
                        stopped.set(true);
                        throw e;
                    } finally {
                        room.release();
                    }
                }));
            }
            List<R> results = new ArrayList<>();
            for (Future<R> f : futures) {
                results.add(await(f, effort));
            }
            return results;
        } catch (InterruptedException e) {
            Thread.currentThread().interrupt();
            throw new CancellationException("cancelled by an interrupt");
        } catch (ExecutionException e) {
            // what ended the work first, not what the others were ended with
            Throwable first = cause.get();
            if (first instanceof Error error) {
                throw error;
            }
            throw (RuntimeException) first;
        } finally {
            stopped.set(true);
            pool.shutdownNow();
        }
    }

    private static <R> R await(Future<R> f, Effort effort) throws InterruptedException, ExecutionException {
        while (true) {
            try {
                return f.get(POLL, TimeUnit.MILLISECONDS);
            } catch (TimeoutException e) {
                effort.checkpoint();
            }
        }
    }
}
