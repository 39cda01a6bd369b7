package org.minorant.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import org.junit.jupiter.api.Test;

class InformationTest {

    /** ln 2 (published: any table of constants). */
    private static final BigDecimal LN2 = new BigDecimal("0.69314718055994530941723212145817656807550013436");

    @Test
    void convertsOutward() {
        for (double x : new double[] {1, -1, 1e-300, -3.7e200, 0.5, 811278.12}) {
            Information bits = Information.ofBits(x);
            assertTrue(bits.nats().contains(new BigDecimal(x).multiply(LN2)), "bits " + x);
            assertTrue(bits.nats().relativeWidth() < 1e-15);
            assertEquals(Enclosure.exact(x), bits.bits());
            Information nats = Information.ofNats(x);
            // bits · ln 2 = nats: the ends of bits times ln 2 must straddle x
            BigDecimal lower = nats.bits().lowerWide().toBigDecimal().multiply(LN2);
            BigDecimal upper = nats.bits().upperWide().toBigDecimal().multiply(LN2);
            assertTrue(lower.compareTo(new BigDecimal(x)) < 0 && upper.compareTo(new BigDecimal(x)) > 0, "nats " + x);
            assertTrue(nats.bits().relativeWidth() < 1e-15);
        }
        assertEquals(Enclosure.ZERO, Information.ofBits(0).nats());
        assertTrue(Information.ofNats(Enclosure.infinite()).bits().isInfinite());
        assertTrue(Information.ofBits(Enclosure.infinite()).nats().isInfinite());
    }

    @Test
    void carriesItsSource() {
        Information i = Information.ofBits(Enclosure.of(1.5, 1.5)).withSource("a theorem");
        assertEquals("a theorem", i.source());
        assertEquals("", Information.ofBits(1).source());
        assertEquals("1.5 bit", i.toString());
        assertEquals(i, Information.ofBits(1.5).withSource("a theorem"));
        assertEquals(
                i.hashCode(), Information.ofBits(1.5).withSource("a theorem").hashCode());
        assertNotEquals(i, Information.ofBits(1.5));
        assertNotEquals(Information.ofBits(1.5), Information.ofBits(1.25));
    }
}
