package org.minorant.bounds;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Random;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.ShrinkingMode;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.KrausChannel;
import org.minorant.core.PositiveOperator;
import org.minorant.core.StandardChannels;
import org.minorant.core.state.RandomStates;

/** The assisted capacity against closed forms (C. H. Bennett et al. 1999 and 2002, from memory), each evaluated here in double. */
final class AssistedCapacityTest {

    /** What double loses in a closed form. */
    private static final double ROUNDING = 1e-14;

    private static final double SMALL_GAP = 1e-12;

    private static double term(double x) {
        return x > 0 ? -x * Math.log(x) / Math.log(2) : 0;
    }

    private static double h(double x) {
        return term(x) + term(1 - x);
    }

    private static void assertBits(double expected, KrausChannel channel) {
        AssistedCapacity c = AssistedCoding.of(channel).capacity();
        Enclosure bits = c.value().bits();
        assertTrue(bits.widen(ROUNDING).contains(expected), () -> expected + " " + bits.toIntervalString(17));
        assertTrue(c.gap() < SMALL_GAP, c::toString);
    }

    @Test
    void denseCodingOfAQubitIsTwoBits() {
        assertBits(2, StandardChannels.identity(2));
        assertBits(2 * Math.log(3) / Math.log(2), StandardChannels.identity(3));
    }

    @ParameterizedTest
    @ValueSource(doubles = {0.01, 0.1, 0.5, 1})
    void depolarising(double p) {
        assertBits(2 - term(1 - 0.75 * p) - 3 * term(p / 4), StandardChannels.depolarising(2, p));
        double q = p / 9;
        assertBits(2 * Math.log(3) / Math.log(2) - term(1 - 8 * q) - 8 * term(q), StandardChannels.depolarising(3, p));
    }

    @ParameterizedTest
    @ValueSource(doubles = {0.01, 0.3, 1})
    void dephasing(double p) {
        assertBits(2 - h(p / 2), StandardChannels.dephasing(2, p));
    }

    @ParameterizedTest
    @ValueSource(doubles = {0.1, 0.5, 0.9})
    void erasure(double p) {
        assertBits(2 * (1 - p), StandardChannels.erasure(2, p));
        assertBits(2 * (1 - p) * Math.log(3) / Math.log(2), StandardChannels.erasure(3, p));
    }

    /** The largest h(q) + h((1−γ)q) − h(γq) over the population q of the upper level. */
    @ParameterizedTest
    @ValueSource(doubles = {0.01, 0.1, 0.3, 0.5, 0.8, 0.99})
    void amplitudeDamping(double gamma) {
        double q = Unimodal.minimiser(x -> -h(x) - h((1 - gamma) * x) + h(gamma * x), 0, 1);
        assertBits(h(q) + h((1 - gamma) * q) - h(gamma * q), StandardChannels.amplitudeDamping(gamma));
    }

    /** Unitaries before and after change nothing but what they round: 1e-15 of entropies of a few bits. */
    @Test
    void turnedChannels() {
        Random random = new Random(11);
        AssistedCapacity c = AssistedCoding.of(AssistedChannels.turned(StandardChannels.amplitudeDamping(0.3), random))
                .capacity();
        AssistedCapacity straight =
                AssistedCoding.of(StandardChannels.amplitudeDamping(0.3)).capacity();
        assertEquals(straight.value().bits().midpoint(), c.value().bits().midpoint(), 2e-14);
        assertTrue(c.gap() < SMALL_GAP, c::toString);
    }

    /** No input has more than the upper end, and the one found has what is said of it: its mutual information as a relative entropy. */
    @Property(tries = 25, shrinking = ShrinkingMode.OFF)
    void capacityOfRandomChannels(@ForAll long seed) {
        Random random = new Random(seed);
        int in = 2 + random.nextInt(2);
        int out = 2 + random.nextInt(2);
        KrausChannel channel = AssistedChannels.random(random, in, out, 2 + random.nextInt(3));
        AssistedCapacity c = AssistedCoding.of(channel).capacity();
        assertTrue(c.gap() < 1e-9, () -> c + " " + channel);
        Enclosure own = information(channel, c.input());
        assertTrue(own.widen(1e-13).contains(c.value().nats().lower()), () -> own + " " + c);
        for (int k = 0; k < 4; k++) {
            DensityOperator other = RandomStates.hilbertSchmidt(in, random.nextLong());
            Enclosure i = information(channel, other);
            assertTrue(i.lower() <= c.value().nats().upper(), () -> i + " " + c);
        }
    }

    /** D(N(θ)‖θ_R ⊗ N(θ_A)). */
    private static Enclosure information(KrausChannel channel, DensityOperator input) {
        AssistedInput root = AssistedInput.of(input);
        PositiveOperator joint = root.joint(channel);
        return Divergences.relativeEntropy(DensityOperator.of(joint), DensityOperator.of(root.product(channel)))
                .nats();
    }
}
