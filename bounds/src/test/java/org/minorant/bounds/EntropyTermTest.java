package org.minorant.bounds;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.junit.jupiter.api.Test;
import org.minorant.core.Enclosure;

/** x ln x over intervals: the ends, the turn at 1/e, and zero. */
final class EntropyTermTest {

    @Test
    void values() {
        assertEquals(Enclosure.ZERO, EntropyTerm.of(Enclosure.ZERO));
        assertEquals(Enclosure.ZERO, EntropyTerm.of(Enclosure.ONE));
        assertTrue(EntropyTerm.of(Enclosure.exact(0.5)).contains(-0.5 * 0x1.62e42fefa39efp-1));
        assertTrue(EntropyTerm.of(Enclosure.exact(0.5)).relativeWidth() < 1e-14);
        // next to the turn the value is −1/e to second order; 1/e = 0.367879441171442321595…
        assertTrue(EntropyTerm.of(Enclosure.exact(0.3678794411714423)).relativeWidth() < 1e-14);
        assertTrue(EntropyTerm.of(Enclosure.exact(0.3685)).relativeWidth() < 1e-14);
        assertTrue(EntropyTerm.of(Enclosure.exact(0.3685)).lower() > -0.36787944117144227);
    }

    @Test
    void intervals() {
        for (double[] ends :
                new double[][] {{0, 0.1}, {0, 1.001}, {0.1, 0.9}, {0.2, 0.3}, {0.5, 0.7}, {0, 0.37}, {0.99, 1.01}}) {
            Enclosure over = EntropyTerm.of(Enclosure.of(ends[0], ends[1]));
            double least = 0;
            double most = -1;
            for (int i = 0; i <= 1000; i++) {
                double x = ends[0] + (ends[1] - ends[0]) * i / 1000;
                double v = x == 0 ? 0 : x * Math.log(x);
                assertTrue(over.widen(1e-15).contains(v), () -> over + " misses the value at " + x);
                least = Math.min(least, v);
                most = Math.max(most, v);
            }
            assertEquals(least, over.lower(), 1e-6);
            assertEquals(most, over.upper(), 1e-6);
        }
    }
}
