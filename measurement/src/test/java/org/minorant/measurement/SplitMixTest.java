package org.minorant.measurement;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.junit.jupiter.api.Test;
import org.minorant.core.InvalidInputException;

class SplitMixTest {

    /** The first numbers for the seed 1234567 as published with the generator's reference code (S. Vigna, splitmix64.c; from memory). */
    @Test
    void theFirstNumbersAreThePublishedOnes() {
        SplitMix s = new SplitMix(1234567);
        assertEquals(6457827717110365317L, s.nextLong());
        assertEquals(3203168211198807973L, s.nextLong());
        assertEquals(Long.parseUnsignedLong("9817491932198370423"), s.nextLong());
    }

    @Test
    void boundedNumbersAreSpreadEvenly() {
        SplitMix s = new SplitMix(3);
        int[] counts = new int[7];
        for (int i = 0; i < 70_000; i++) {
            counts[s.below(7)]++;
        }
        for (int c : counts) {
            // six standard deviations of a binomial count, √(70000 · 6/49) = 92.6
            assertTrue(Math.abs(c - 10_000) < 6 * 92.6, () -> String.valueOf(c));
        }
        assertEquals(0, s.below(1));
        assertThrows(InvalidInputException.class, () -> s.below(0));
    }
}
