package org.minorant.bounds;

import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Optional;
import java.util.Random;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.ShrinkingMode;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;

/** Exponents of random channels: against any input, s and output state, against each other, and as functions of the rate. */
final class ErrorExponentsProperties {

    /** Some 1e-12 as a rule; letters that differ by 1e-9, as some of these do, make the best input so ill determined that 6e-6 was met in some hundred channels. */
    private static final double NARROW = 1e-4;

    private static ErrorExponents at(ClassicalQuantumChannel channel, double nats) {
        return ErrorExponents.of(channel, Information.ofNats(nats));
    }

    /** No input and no s exceed what the certificate says of all of them. */
    @Property(tries = 25, shrinking = ShrinkingMode.OFF)
    void noInputExceedsTheUpperEnd(@ForAll long seed) {
        Random random = new Random(seed);
        ClassicalQuantumChannel channel = Channels.random(random, 4, 3);
        double c = channel.capacity().value().nats().midpoint();
        double rate = c * random.nextDouble();
        ErrorExponents e = at(channel, rate);
        Enclosure reached = e.randomCoding().nats();
        Enclosure packing = e.spherePacking().nats();
        assertTrue(reached.width() < NARROW, reached::toString);
        assertTrue(reached.lower() <= packing.upper(), () -> reached + " " + packing);
        if (e.randomCoding().parameter() < 0.99) {
            assertTrue(packing.lower() <= reached.upper(), () -> reached + " " + packing);
        }
        RenyiOutputs outputs = channel.renyi();
        for (int i = 0; i < 20; i++) {
            double[] p = Channels.distribution(random, channel.letters());
            double s = i < 10 ? random.nextDouble() : Math.exp(4 * random.nextDouble());
            double value = outputs.gallager(s, p).lower() - s * rate * (1 + 1e-15);
            assertTrue(value <= (s <= 1 ? reached : packing).upper() + 1e-15, () -> value + " " + reached + packing);
        }
        Enclosure chosen = e.withInput(Channels.distribution(random, channel.letters()))
                .randomCoding()
                .nats();
        assertTrue(chosen.lower() <= reached.upper() && chosen.width() < 1e-10, () -> chosen + " " + reached);
    }

    /** From rate to rate: falling and convex, from the cutoff rate on; the expurgated one is proven, so sphere packing lies above it. */
    @Property(tries = 10, shrinking = ShrinkingMode.OFF)
    void fallingAndConvex(@ForAll long seed) {
        Random random = new Random(seed);
        ClassicalQuantumChannel channel = Channels.random(random, 3, 3);
        double c = channel.capacity().value().nats().midpoint();
        double step = 0.3 * c * random.nextDouble();
        double first = 0.4 * c * random.nextDouble();
        Enclosure[] e = new Enclosure[3];
        Enclosure[] f = new Enclosure[3];
        for (int i = 0; i < 3; i++) {
            ErrorExponents x = at(channel, first + i * step);
            e[i] = x.randomCoding().nats();
            f[i] = x.spherePacking().nats();
            Enclosure better = x.expurgated().nats();
            assertTrue(better.lower() <= f[i].upper() + 1e-14, () -> better + " " + x.spherePacking());
        }
        for (Enclosure[] g : new Enclosure[][] {e, f}) {
            assertTrue(g[1].lower() <= g[0].upper() + 1e-15 && g[2].lower() <= g[1].upper() + 1e-15);
            // rates first + i·step are rounded, slopes are at most s, up to a few hundred where it matters
            assertTrue(2 * g[1].lower() <= g[0].upper() + g[2].upper() + 1e-13 * (1 + g[0].upper()));
        }
        Enclosure zero = at(channel, 0).randomCoding().nats();
        Enclosure cutoff = at(channel, 0).cutoffRate().nats();
        assertTrue(zero.isPossiblyBelow(cutoff) && cutoff.isPossiblyBelow(zero), () -> zero + " " + cutoff);
    }

    /** Above the capacity: rising and convex, at least what the output state of any order and any other gives. */
    @Property(tries = 10, shrinking = ShrinkingMode.OFF)
    void strongConverseRisesAndIsConvex(@ForAll long seed) {
        Random random = new Random(seed);
        ClassicalQuantumChannel channel = Channels.random(random, 3, 2);
        double c = channel.capacity().value().nats().upper();
        double step = 0.1 + 0.2 * random.nextDouble();
        Enclosure[] e = new Enclosure[3];
        for (int i = 0; i < 3; i++) {
            e[i] = at(channel, c + (i + 1) * step).strongConverse().nats();
            assertTrue(e[i].lower() > 0 || c + step < 1e-6, e[i]::toString);
        }
        assertTrue(e[0].lower() <= e[1].upper() && e[1].lower() <= e[2].upper());
        assertTrue(2 * e[1].lower() <= e[0].upper() + e[2].upper() + 1e-14);
        RenyiOutputs outputs = channel.renyi();
        for (int i = 0; i < 10; i++) {
            double u = 0.9 * random.nextDouble() + 0.01;
            LettersAgainst sigma = i < 5
                    ? outputs.against(Channels.state(random, channel.dimension()))
                    : outputs.sandwich(u, Channels.distribution(random, channel.letters()), Optional.empty())
                            .sigma();
            double most = 0;
            for (int x = 0; x < channel.letters(); x++) {
                most = Math.max(most, sigma.norm(x, u).upper());
            }
            double value = u * (c + step) - most;
            assertTrue(value <= e[0].upper() + 1e-14, () -> value + " " + e[0]);
        }
    }
}
