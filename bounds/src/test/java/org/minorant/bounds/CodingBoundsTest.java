package org.minorant.bounds;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertNotSame;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;

/** Coding bounds where the answer is known, at the edges, and as users call them. */
final class CodingBoundsTest {

    private static final DensityOperator RHO = DensityOperator.ofBloch(0.0, 0.0, 0.9);
    private static final DensityOperator SIGMA = DensityOperator.ofBloch(0.6, 0.0, 0.5);

    /** The lines of the agreed interface. */
    @Test
    void asUsersCallThem() {
        long messages = 2;
        ClassicalQuantumChannel channel = ClassicalQuantumChannel.of(RHO, SIGMA);
        Capacity capacity = channel.capacity();
        CodingBounds once = CodingBounds.of(channel);
        Enclosure eps = once.achievableError(messages);
        Information lo = once.achievable(0.25);
        Information up = once.converse(0.25);
        assertEquals(2, capacity.input().length);
        assertEquals(2, capacity.outputState().dimension());
        assertTrue(eps.lower() > 0 && eps.upper() < 1);
        assertTrue(lo.nats().isCertainlyBelow(up.nats()));
        assertEquals(eps, once.achievableError(Information.ofBits(1)).intersect(eps));
    }

    /** n letters, no noise, uniform input: f(M−1) = (M−1)/n, and no code exceeds n/(1 − ε) messages. */
    @Test
    void noiselessChannel() {
        int n = 64;
        double[][] rows = new double[n][n];
        for (int x = 0; x < n; x++) {
            rows[x][x] = 1;
        }
        ClassicalQuantumChannel channel = ClassicalQuantumChannel.ofStochasticMatrix(rows);
        assertTrue(
                channel.capacity().value().bits().contains(6),
                channel.capacity().toString());
        CodingBounds bounds = CodingBounds.of(channel);
        assertTrue(bounds.achievableError(17).contains(0.25));
        assertTrue(bounds.achievableError(17).relativeWidth() < 1e-12);
        assertEquals(1, bounds.achievableError(65).upper());
        assertEquals(1, bounds.achievableError(1_000_000_007L).upper());
        assertTrue(bounds.achievable(0.25).nats().exp().contains(17));
        assertTrue(bounds.converse(0.25).nats().exp().widen(1e-12).contains(64 / 0.75));
        assertTrue(bounds.converseError(128).widen(1e-15).contains(0.5));
        // the least of 4(M−1)/n over c: (1+c)(1+1/c) is least at c = 1
        assertTrue(bounds.hayashiNagaokaError(5).widen(1e-12).contains(0.25));
        assertTrue(bounds.hayashiNagaoka(0.25).nats().exp().widen(1e-9).contains(5));
    }

    /** The minimum over every test of a small classical channel, and over c in closed form: (√(α + tβ) + √(tβ))². */
    @Test
    void olderBoundIsTheLeastOverAllTests() {
        Random random = new Random(3);
        for (int run = 0; run < 40; run++) {
            double[][] rows = new double[3][];
            for (int x = 0; x < 3; x++) {
                rows[x] = Channels.distribution(random, 3);
            }
            double[] p = Channels.distribution(random, 3);
            double[] q = new double[3];
            for (int x = 0; x < 3; x++) {
                for (int y = 0; y < 3; y++) {
                    q[y] += p[x] * rows[x][y];
                }
            }
            double t = 0.02 + 0.3 * random.nextDouble();
            double least = 1;
            for (int test = 0; test < 512; test++) {
                double alpha = 0;
                double beta = 0;
                for (int e = 0; e < 9; e++) {
                    boolean accepts = (test >> e & 1) == 1;
                    alpha += accepts ? 0 : p[e / 3] * rows[e / 3][e % 3];
                    beta += accepts ? p[e / 3] * q[e % 3] : 0;
                }
                double root = Math.sqrt(alpha + t * beta) + Math.sqrt(t * beta);
                least = Math.min(least, root * root);
            }
            Enclosure found = CodingBounds.of(ClassicalQuantumChannel.ofStochasticMatrix(rows))
                    .withInput(p)
                    .hayashiNagaokaError(Information.ofNats(Math.log1p(t)));
            double exact = least;
            assertTrue(found.widen(1e-12).contains(exact), () -> found.toIntervalString(17) + " misses " + exact);
        }
    }

    @Test
    void oneMessageNeverFails() {
        CodingBounds bounds = CodingBounds.of(ClassicalQuantumChannel.of(RHO, SIGMA));
        assertEquals(Enclosure.ZERO, bounds.achievableError(1));
        assertEquals(Enclosure.ZERO, bounds.achievableError(Information.ofNats(0)));
        assertEquals(Enclosure.ZERO, bounds.hayashiNagaokaError(1));
        assertEquals(Enclosure.ZERO, bounds.converseError(1));
        assertEquals(Enclosure.ZERO, bounds.converseError(Information.ofNats(0)));
    }

    /** At a small error no two messages are certified, and that is said. */
    @Test
    void fewerThanTwoMessages() {
        CodingBounds bounds = CodingBounds.of(ClassicalQuantumChannel.of(RHO, SIGMA));
        Information none = bounds.achievable(0.01);
        assertEquals(Enclosure.ZERO, none.nats());
        assertTrue(none.source().endsWith("no two messages; one message never fails"), none.source());
        Information older = bounds.hayashiNagaoka(0.01);
        assertEquals(Enclosure.ZERO, older.nats());
        Information some = bounds.achievable(0.95);
        assertTrue(some.nats().lower() > Math.log(2));
        assertTrue(some.source().startsWith("one-shot random coding, f(M-1) ["), some.source());
    }

    /** Outputs that are all equal carry one message; f(M−1) is min(1, M−1), the converse 1/(1 − ε). */
    @Test
    void identicalOutputs() {
        CodingBounds bounds = CodingBounds.of(ClassicalQuantumChannel.of(SIGMA, SIGMA, SIGMA));
        assertEquals(1, bounds.achievableError(2).upper());
        assertTrue(bounds.achievableError(2).lower() > 1 - 1e-13);
        assertEquals(Enclosure.ZERO, bounds.achievable(0.75).nats());
        assertTrue(bounds.converse(0.75).nats().exp().widen(1e-12).contains(4));
        assertTrue(bounds.converseError(4).widen(1e-12).contains(0.75));
    }

    /** A letter of probability zero takes no part in the codes, but in the converse all letters count. */
    @Test
    void unusedLetters() {
        DensityOperator third = DensityOperator.ofBloch(-0.3, 0.5, 0);
        CodingBounds pair = CodingBounds.of(ClassicalQuantumChannel.of(RHO, SIGMA))
                .withInput(0.25, 0.75)
                .withOutputState(RHO);
        CodingBounds three = CodingBounds.of(ClassicalQuantumChannel.of(RHO, third, SIGMA))
                .withInput(0.25, 0, 0.75)
                .withOutputState(RHO);
        Enclosure a = pair.achievableError(2);
        Enclosure b = three.achievableError(2);
        assertTrue(a.isPossiblyBelow(b) && b.isPossiblyBelow(a));
        assertTrue(
                pair.converse(0.2).nats().isCertainlyBelow(three.converse(0.2).nats()));
    }

    /** An output orthogonal to the output state makes the converse void, and that is said as infinity. */
    @Test
    void voidConverse() {
        ClassicalQuantumChannel channel =
                ClassicalQuantumChannel.of(DensityOperator.ofKet(1, 0), DensityOperator.ofKet(0, 1));
        CodingBounds bounds = CodingBounds.of(channel).withOutputState(DensityOperator.ofKet(1, 0));
        assertTrue(
                bounds.converse(0.1).nats().isInfinite(),
                bounds.converse(0.1).nats().toIntervalString(5));
        assertEquals(Enclosure.ZERO, bounds.converseError(5));
        ClassicalQuantumChannel classical = ClassicalQuantumChannel.ofStochasticMatrix(new double[][] {{1, 0}, {0, 1}});
        assertTrue(CodingBounds.of(classical)
                .withOutputState(DensityOperator.ofEigenvalues(1, 0))
                .converse(0.1)
                .nats()
                .isInfinite());
    }

    /** Weights far beyond the range of double. */
    @Test
    void astronomicallyManyMessages() {
        CodingBounds bounds = CodingBounds.of(ClassicalQuantumChannel.of(RHO, SIGMA));
        for (double ln : new double[] {100, 1e4, 6.9e8}) {
            Information m = Information.ofNats(ln);
            assertEquals(1, bounds.achievableError(m).upper());
            assertTrue(bounds.achievableError(m).lower() > 1 - 1e-12);
            Enclosure floor = bounds.converseError(m);
            assertEquals(1, floor.upper(), 1e-12);
            assertTrue(floor.lower() > 1 - 1e-9 || ln > 1e8, floor.toIntervalString(17));
            assertTrue(bounds.hayashiNagaokaError(m).lower() > 1 - 1e-9);
        }
        assertEquals(1, bounds.achievableError(Long.MAX_VALUE).upper());
    }

    /** Errors next to 0 and 1. */
    @Test
    void extremeErrors() {
        CodingBounds bounds = CodingBounds.of(ClassicalQuantumChannel.of(RHO, SIGMA));
        assertEquals(Enclosure.ZERO, bounds.achievable(Double.MIN_VALUE).nats());
        Information tight = bounds.converse(Double.MIN_VALUE);
        assertTrue(
                tight.nats().lower() >= 0 && tight.nats().upper() < 1,
                tight.nats().toIntervalString(17));
        double nearOne = Math.nextDown(1.0);
        assertTrue(bounds.achievable(nearOne).nats().lower() > 0.5);
        assertTrue(bounds.converse(nearOne).nats().lower() > 30);
    }

    @Test
    void choicesMakeNewObjects() {
        CodingBounds bounds = CodingBounds.of(ClassicalQuantumChannel.of(RHO, SIGMA));
        double[] input = {0.25, 0.75};
        CodingBounds other = bounds.withInput(input).withOutputState(RHO);
        assertNotSame(bounds, other);
        input[0] = 7;
        assertArrayEquals(new double[] {0.25, 0.75}, other.input());
        other.input()[0] = 9;
        assertArrayEquals(new double[] {0.25, 0.75}, other.input());
        assertEquals(RHO, other.outputState());
        assertArrayEquals(bounds.channel().capacity().input(), bounds.input());
        assertEquals(bounds.channel().capacity().outputState(), bounds.outputState());
        assertEquals(2, other.channel().letters());
        assertEquals("channel of 2 letters into dimension 2", other.channel().toString());
    }

    /** Two messages through three good letters: the ledger counts whole messages. */
    @Test
    void ledger() {
        double[][] rows = {{.98, .01, .01}, {.01, .98, .01}, {.01, .01, .98}};
        Ledger ledger = CodingBounds.of(ClassicalQuantumChannel.ofStochasticMatrix(rows))
                .ledger(0.4);
        List<Bound> low = ledger.bounds(Side.LOWER);
        assertEquals(5, low.size());
        // f(1) = 1/3·(…) is about 0.34 and f(2) about 0.67: two messages, not three; the first two certify only one
        assertEquals(Enclosure.ZERO, low.get(0).value());
        assertEquals(Enclosure.ZERO, low.get(1).value());
        assertEquals(RandomCoding.THEOREM, low.get(2).theorem());
        assertTrue(low.get(2).value().contains(Math.log(2)), low.get(2).toString());
        // E[min(1, t T)] with T about 1/3 is below 0.4 for t = 1 only; f((M-1)/2) at M = 3 is f(1)
        assertEquals(RandomCodingUnion.THEOREM, low.get(3).theorem());
        assertTrue(low.get(3).value().contains(Math.log(2)), low.get(3).toString());
        assertEquals(DependenceTesting.THEOREM, low.get(4).theorem());
        assertTrue(low.get(4).value().contains(Math.log(3)), low.get(4).toString());
        List<Bound> high = ledger.bounds(Side.UPPER);
        assertEquals(3, high.size());
        assertTrue(high.get(0).value().upper() < 1.7, high.get(0).toString());
        assertEquals("logarithm of the largest number of messages at average error 0.4", ledger.quantity());
    }

    /** A threshold far beyond 2^52 is not rounded to a whole number, but lowered by one message. */
    @Test
    void wholeMessages() {
        assertEquals(Enclosure.ZERO, MessageCount.whole(Enclosure.of(0.2, 0.3)).nats());
        assertTrue(MessageCount.whole(Enclosure.of(1.9, 2)).nats().contains(Math.log(2)));
        Information many = MessageCount.whole(Enclosure.of(1e30, 1e30));
        assertTrue(many.nats().upper() <= Math.log(1e30));
        assertTrue(many.nats().lower() > Math.log(1e30) * (1 - 1e-15));
    }

    /** The same bits whatever thread asks first. */
    @Test
    void deterministic() {
        List<Ledger> ledgers = java.util.stream.IntStream.range(0, 4)
                .parallel()
                .mapToObj(
                        i -> CodingBounds.of(ClassicalQuantumChannel.of(RHO, SIGMA, DensityOperator.ofBloch(0, .8, 0)))
                                .ledger(0.5))
                .toList();
        for (Ledger l : ledgers) {
            assertEquals(ledgers.get(0).toString(), l.toString());
            for (int i = 0; i < 6; i++) {
                assertEquals(
                        ledgers.get(0).bounds().get(i).value(),
                        l.bounds().get(i).value());
            }
        }
    }
}
