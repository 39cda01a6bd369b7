package org.minorant.study;

import java.util.function.Consumer;
import java.util.function.LongSupplier;

/**
 * Says on what a long study is busy. Nothing is said in the first second. From then on a new step is said within a second of its beginning, at
 * most one line a second; a step that goes on for ten seconds is said again.
 */
final class Progress {

    private static final long SECOND = 1_000_000_000L;

    private static final long QUIET = SECOND;

    private static final long AGAIN = 10 * SECOND;

    private final LongSupplier nanoseconds;
    private final Consumer<String> out;
    private final long start;
    private int steps;
    private int current;
    private String what = "";
    private int said;
    private long lastSaid;

    /**
     * @param nanoseconds a clock that only rises
     * @param out takes each line
     */
    Progress(LongSupplier nanoseconds, Consumer<String> out) {
        this.nanoseconds = nanoseconds;
        this.out = out;
        this.start = nanoseconds.getAsLong();
        this.lastSaid = start;
    }

    /** Says how many steps there will be in all. */
    synchronized void expect(int count) {
        steps = count;
    }

    /** The next step begins. */
    synchronized void step(String description) {
        current++;
        what = description;
        tick();
    }

    /** Looks at the clock; called by a timer as well, since a step may be long. */
    synchronized void tick() {
        long now = nanoseconds.getAsLong();
        if (current == 0 || now - start < QUIET) {
            return;
        }
        boolean fresh = current != said && (said == 0 || now - lastSaid >= SECOND);
        if (fresh || now - lastSaid >= AGAIN) {
            out.accept("[" + (now - start) / SECOND + " s] step " + current + " of " + Math.max(steps, current) + ": "
                    + what);
            said = current;
            lastSaid = now;
        }
    }
}
