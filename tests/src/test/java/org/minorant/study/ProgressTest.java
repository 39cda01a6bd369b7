package org.minorant.study;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.util.ArrayList;
import java.util.List;
import org.junit.jupiter.api.Test;

/** Time here is a variable that the test sets. */
class ProgressTest {

    private static final long MILLISECOND = 1_000_000L;

    private long now = -5_000_000_000L;

    private final List<String> said = new ArrayList<>();

    private final Progress progress = new Progress(() -> now, said::add);

    private void after(long milliseconds) {
        now += milliseconds * MILLISECOND;
    }

    @Test
    void aShortRunIsQuiet() {
        progress.expect(2);
        progress.step("one");
        after(999);
        progress.step("two");
        progress.tick();
        assertEquals(List.of(), said);
    }

    @Test
    void nothingIsSaidBeforeTheFirstStep() {
        after(5000);
        progress.tick();
        assertEquals(List.of(), said);
    }

    @Test
    void aStepStillGoingOnAfterASecondIsSaidOnce() {
        progress.expect(2);
        progress.step("one");
        after(1000);
        progress.tick();
        after(200);
        progress.tick();
        assertEquals(List.of("[1 s] step 1 of 2: one"), said);
    }

    @Test
    void laterStepsAreSaidAtMostOnceASecond() {
        progress.expect(5);
        progress.step("one");
        after(1500);
        progress.step("two");
        after(300);
        progress.step("three");
        after(300);
        progress.step("four");
        after(300);
        progress.tick();
        assertEquals(List.of("[1 s] step 2 of 5: two"), said);
        after(100);
        progress.tick();
        assertEquals(List.of("[1 s] step 2 of 5: two", "[2 s] step 4 of 5: four"), said);
    }

    @Test
    void aLongStepIsSaidAgainAfterTenSeconds() {
        progress.expect(1);
        progress.step("one");
        after(2000);
        progress.tick();
        after(9999);
        progress.tick();
        assertEquals(1, said.size());
        after(1);
        progress.tick();
        assertEquals(List.of("[2 s] step 1 of 1: one", "[12 s] step 1 of 1: one"), said);
    }

    @Test
    void theTotalNeverFallsBehind() {
        progress.expect(1);
        progress.step("one");
        after(1000);
        progress.step("two");
        assertEquals(List.of("[1 s] step 2 of 2: two"), said);
    }
}
