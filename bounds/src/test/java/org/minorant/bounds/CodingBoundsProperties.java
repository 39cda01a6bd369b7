package org.minorant.bounds;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.Random;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.ShrinkingMode;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;

/** What must hold of every channel, input, output state and error. The seed decides all; spectra are prescribed and nasty, see {@link Channels}. */
final class CodingBoundsProperties {

    private static double epsilon(Random random) {
        return random.nextInt(3) == 0
                ? 1e-5 + 0.99998 * random.nextDouble()
                : Math.pow(10, -6 * random.nextDouble()) * 0.999;
    }

    private static CodingBounds bounds(Random random, ClassicalQuantumChannel channel) {
        return CodingBounds.of(channel)
                .withInput(Channels.distribution(random, channel.letters()))
                .withOutputState(channel.outputState(Channels.distribution(random, channel.letters())));
    }

    /** Codes exist up to the achievable threshold and not beyond the converse, whatever input and output state were chosen. */
    @Property(tries = 2000, shrinking = ShrinkingMode.OFF)
    void achievableIsAtMostConverseForClassicalChannels(@ForAll long seed) {
        Random random = new Random(seed);
        achievableIsAtMostConverse(random, Channels.randomClassical(random, 5, 5));
    }

    @Property(tries = 400, shrinking = ShrinkingMode.OFF)
    void achievableIsAtMostConverseForQubits(@ForAll long seed) {
        Random random = new Random(seed);
        achievableIsAtMostConverse(random, Channels.random(random, 4, 2));
    }

    private static void achievableIsAtMostConverse(Random random, ClassicalQuantumChannel channel) {
        CodingBounds bounds = bounds(random, channel);
        double epsilon = epsilon(random);
        Information low = bounds.achievable(epsilon);
        Information high = bounds.converse(epsilon);
        assertTrue(low.nats().isPossiblyBelow(high.nats()), () -> low.nats() + " > " + high.nats());
        // an upper end is infinite where an output is orthogonal to the output state, up to rounding: then the lower
        // end is large
        assertTrue(
                high.nats().width() < 1e-9
                        || (!high.nats().isFinite() && high.nats().lower() > 25),
                high.nats().toIntervalString(17));
        long m = 1 + random.nextInt(5);
        Enclosure reached = bounds.achievableError(m);
        Enclosure floor = bounds.converseError(m);
        assertTrue(floor.isPossiblyBelow(reached), () -> floor + " > " + reached);
    }

    @Property(tries = 40, shrinking = ShrinkingMode.OFF)
    void achievableIsAtMostConverseInHigherDimensions(@ForAll long seed) {
        Random random = new Random(seed);
        ClassicalQuantumChannel channel = Channels.random(random, 5, 6);
        double epsilon = epsilon(random);
        Ledger ledger = CodingBounds.of(channel).ledger(epsilon);
        // dependence testing and the random-coding union where outputs are diagonal
        assertEquals(ClassicalCodes.cover(channel) ? 8 : 6, ledger.bounds().size());
        assertTrue(channel.capacity().gap() < 1e-10, channel.capacity().toString());
    }

    /** The error bound inverts the threshold: f(e^threshold − 1) is ε. */
    @Property(tries = 100, shrinking = ShrinkingMode.OFF)
    void thresholdsAreInverse(@ForAll long seed) {
        Random random = new Random(seed);
        CodingBounds bounds = bounds(random, Channels.random(random, 4, 3));
        double epsilon = 0.5 + 0.499 * random.nextDouble();
        Information low = bounds.achievable(epsilon);
        if (low.nats().lower() > 0) {
            Enclosure there = bounds.achievableError(low);
            assertTrue(there.widen(1e-11).contains(epsilon), () -> there.toIntervalString(17) + " for " + epsilon);
        }
        Information older = bounds.hayashiNagaoka(epsilon);
        if (older.nats().lower() > 0) {
            Enclosure there = bounds.hayashiNagaokaError(older);
            assertTrue(there.widen(1e-9).contains(epsilon), () -> there.toIntervalString(17) + " for " + epsilon);
        }
        Information high = bounds.converse(epsilon);
        if (high.nats().isFinite()) {
            Enclosure there = bounds.converseError(high);
            assertTrue(there.widen(1e-9).contains(epsilon), () -> there.toIntervalString(17) + " for " + epsilon);
        }
    }

    @Property(tries = 150, shrinking = ShrinkingMode.OFF)
    void olderBoundIsNeverBetter(@ForAll long seed) {
        Random random = new Random(seed);
        CodingBounds bounds = bounds(random, Channels.random(random, 4, 3));
        long m = 2 + random.nextInt(4);
        Enclosure newer = bounds.achievableError(m);
        Enclosure older = bounds.hayashiNagaokaError(m);
        assertTrue(newer.isPossiblyBelow(older), () -> newer + " > " + older);
        assertTrue(older.relativeWidth() < 1e-9, older.toIntervalString(17));
        double epsilon = epsilon(random);
        assertTrue(bounds.hayashiNagaoka(epsilon)
                .nats()
                .isPossiblyBelow(bounds.achievable(epsilon).nats()));
    }

    @Property(tries = 60, shrinking = ShrinkingMode.OFF)
    void monotoneInErrorAndMessages(@ForAll long seed) {
        Random random = new Random(seed);
        CodingBounds bounds = bounds(random, Channels.random(random, 3, 3));
        double a = epsilon(random);
        double b = epsilon(random);
        double low = Math.min(a, b);
        double high = Math.max(a, b);
        assertTrue(bounds.achievable(low)
                .nats()
                .isPossiblyBelow(bounds.achievable(high).nats()));
        assertTrue(bounds.hayashiNagaoka(low)
                .nats()
                .isPossiblyBelow(bounds.hayashiNagaoka(high).nats()));
        assertTrue(bounds.converse(low)
                .nats()
                .isPossiblyBelow(bounds.converse(high).nats()));
        long m = 1 + random.nextInt(6);
        assertTrue(bounds.achievableError(m).isPossiblyBelow(bounds.achievableError(m + 1)));
        assertTrue(bounds.hayashiNagaokaError(m).isPossiblyBelow(bounds.hayashiNagaokaError(m + 1)));
        assertTrue(bounds.converseError(m).isPossiblyBelow(bounds.converseError(m + 1)));
    }

    /** Mixing every output with a fixed state, or dephasing, is a channel on the output: nothing gets better. */
    @Property(tries = 80, shrinking = ShrinkingMode.OFF)
    void processingTheOutputHelpsNobody(@ForAll long seed) {
        Random random = new Random(seed);
        ClassicalQuantumChannel channel = Channels.random(random, 3, 3);
        double[] input = Channels.distribution(random, channel.letters());
        DensityOperator sigma = channel.outputState(Channels.distribution(random, channel.letters()));
        double weight = random.nextDouble();
        DensityOperator noise = Channels.state(random, channel.dimension());
        List<DensityOperator> noisy = new ArrayList<>();
        for (DensityOperator w : channel.outputs()) {
            noisy.add(DensityOperator.mixture(List.of(w, noise), 1 - weight, weight));
        }
        double epsilon = epsilon(random);
        CodingBounds before = CodingBounds.of(channel).withInput(input).withOutputState(sigma);
        CodingBounds after = CodingBounds.of(ClassicalQuantumChannel.of(noisy))
                .withInput(input)
                .withOutputState(DensityOperator.mixture(List.of(sigma, noise), 1 - weight, weight));
        // weights that miss one by a rounding: 1e-12 is generous
        assertTrue(after.achievable(epsilon)
                .nats()
                .isPossiblyBelow(before.achievable(epsilon).nats().widen(1e-12)));
        assertTrue(after.converse(epsilon)
                .nats()
                .isPossiblyBelow(before.converse(epsilon).nats().widen(1e-12)));
        assertTrue(before.achievableError(3)
                .isPossiblyBelow(after.achievableError(3).widen(1e-12)));
    }

    @Property(tries = 50, shrinking = ShrinkingMode.OFF)
    void lettersHaveNoOrder(@ForAll long seed) {
        Random random = new Random(seed);
        ClassicalQuantumChannel channel = Channels.random(random, 4, 3);
        int k = channel.letters();
        double[] input = Channels.distribution(random, k);
        List<DensityOperator> rolled = new ArrayList<>();
        double[] rolledInput = new double[k];
        for (int x = 0; x < k; x++) {
            rolled.add(channel.outputs().get((x + 1) % k));
            rolledInput[x] = input[(x + 1) % k];
        }
        ClassicalQuantumChannel other = ClassicalQuantumChannel.of(rolled);
        double epsilon = epsilon(random);
        CodingBounds a = CodingBounds.of(channel).withInput(input);
        CodingBounds b = CodingBounds.of(other).withInput(rolledInput);
        assertTrue(meet(a.achievableError(2), b.achievableError(2)));
        assertTrue(meet(a.achievable(epsilon).nats(), b.achievable(epsilon).nats()));
        assertTrue(
                meet(channel.capacity().value().nats(), other.capacity().value().nats()));
        CodingBounds c = a.withOutputState(channel.outputState(input));
        CodingBounds d = b.withOutputState(other.outputState(rolledInput));
        assertTrue(meet(c.converse(epsilon).nats(), d.converse(epsilon).nats()));
    }

    private static boolean meet(Enclosure a, Enclosure b) {
        return a.isPossiblyBelow(b) && b.isPossiblyBelow(a);
    }

    /** No input carries more than the capacity, and no code beats Fano and Holevo. */
    @Property(tries = 200, shrinking = ShrinkingMode.OFF)
    void capacityIsTheMost(@ForAll long seed) {
        Random random = new Random(seed);
        ClassicalQuantumChannel channel = Channels.random(random, 4, 3);
        Capacity capacity = channel.capacity();
        assertTrue(capacity.gap() < 1e-11, capacity.toString());
        Information some = channel.mutualInformation(Channels.distribution(random, channel.letters()));
        assertTrue(some.nats().isPossiblyBelow(capacity.value().nats()), () -> some + " > " + capacity);
        assertTrue(some.nats().width() < 1e-11, some.nats().toIntervalString(17));
        Information own = channel.mutualInformation(capacity.input());
        assertTrue(
                meet(own.nats(), capacity.value().nats()),
                () -> own.nats() + " and " + capacity.value().nats());
        double epsilon = epsilon(random);
        CodingBounds bounds = CodingBounds.of(channel);
        assertTrue(bounds.achievable(epsilon)
                .nats()
                .isPossiblyBelow(bounds.weakConverse(epsilon).nats()));
    }
}
