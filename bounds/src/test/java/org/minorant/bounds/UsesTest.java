package org.minorant.bounds;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.Random;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.ShrinkingMode;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;
import org.minorant.core.InvalidInputException;

/** n uses by one pair of copies against one use of the channel whose letters are all words, and what is refused. */
final class UsesTest {

    /** Relative; words are products of rounded entries, a few roundings for each use. */
    private static final double ROUNDING = 1e-12;

    private static boolean meet(Enclosure a, Enclosure b) {
        Enclosure wide = a.times(Enclosure.ONE.widen(ROUNDING));
        return wide.isPossiblyBelow(b) && b.isPossiblyBelow(wide);
    }

    private static void assertSame(CodingBounds words, CodingBounds uses, boolean converse) {
        for (double epsilon : new double[] {1e-4, 0.3}) {
            Information low = uses.achievable(epsilon);
            assertTrue(meet(words.achievable(epsilon).nats(), low.nats()), () -> words.achievable(epsilon) + " " + low);
            if (converse) {
                Information high = uses.converse(epsilon);
                assertTrue(
                        meet(words.converse(epsilon).nats(), high.nats()),
                        () -> words.converse(epsilon).nats().toIntervalString(17) + " "
                                + high.nats().toIntervalString(17));
                assertTrue(low.nats().isPossiblyBelow(high.nats()));
            }
        }
        for (long m : new long[] {2, 1000}) {
            assertTrue(meet(words.achievableError(m), uses.achievableError(m)));
            if (converse) {
                assertTrue(
                        meet(words.converseError(m), uses.converseError(m)),
                        () -> words.converseError(m) + " " + uses.converseError(m));
            }
        }
    }

    private static List<DensityOperator> words(List<DensityOperator> letters, int n) {
        List<DensityOperator> words = letters;
        for (int use = 1; use < n; use++) {
            List<DensityOperator> longer = new ArrayList<>();
            for (DensityOperator w : words) {
                for (DensityOperator x : letters) {
                    longer.add(w.tensor(x));
                }
            }
            words = longer;
        }
        return words;
    }

    private static double[] wordInput(double[] p, int n) {
        double[] q = {1};
        for (int use = 0; use < n; use++) {
            q = Channels.tensor(q, p);
        }
        return q;
    }

    /** Letters, input and output state are the same for the words of length n. */
    private static void assertSame(List<DensityOperator> letters, double[] p, int n) {
        ClassicalQuantumChannel one = ClassicalQuantumChannel.of(letters);
        ClassicalQuantumChannel all = ClassicalQuantumChannel.of(words(letters, n));
        double[] q = wordInput(p, n);
        DensityOperator sigma = one.outputState(p);
        CodingBounds uses =
                CodingBounds.of(one).withInput(p).withOutputState(sigma).uses(n);
        CodingBounds words = CodingBounds.of(all).withInput(q).withOutputState(all.outputState(q));
        assertSame(words, uses, true);
    }

    @ParameterizedTest
    @CsvSource({"2, 0.5", "3, 0.5", "4, 0.5", "3, 0.9"})
    void classicalWords(int n, double p) {
        double[][] rows = {{0.89, 0.11}, {0.2, 0.8}};
        double[] input = {p, 1 - p};
        CodingBounds uses = CodingBounds.of(ClassicalQuantumChannel.ofStochasticMatrix(rows))
                .withInput(input)
                .uses(n);
        CodingBounds words = CodingBounds.of(ClassicalQuantumChannel.ofStochasticMatrix(Channels.words(rows, n)))
                .withInput(wordInput(input, n));
        assertSame(words, uses, true);
    }

    /** An output that only one letter has, and one that no letter has. */
    @Test
    void classicalWordsWithZeros() {
        double[][] rows = {{1, 0, 0}, {0.5, 0.5, 0}};
        CodingBounds uses = CodingBounds.of(ClassicalQuantumChannel.ofStochasticMatrix(rows))
                .withInput(0.5, 0.5)
                .uses(3);
        CodingBounds words = CodingBounds.of(ClassicalQuantumChannel.ofStochasticMatrix(Channels.words(rows, 3)))
                .withInput(Channels.uniform(8));
        assertSame(words, uses, true);
    }

    /** Rows that are permutations of each other, and so are columns: both sides. */
    @Test
    void symmetricClassicalWords() {
        double[][] rows = {{0.7, 0.2, 0.1}, {0.1, 0.7, 0.2}, {0.2, 0.1, 0.7}};
        CodingBounds uses = CodingBounds.of(ClassicalQuantumChannel.ofStochasticMatrix(rows))
                .uses(3);
        CodingBounds words = CodingBounds.of(ClassicalQuantumChannel.ofStochasticMatrix(Channels.words(rows, 3)));
        assertSame(words, uses, true);
    }

    @Test
    void wordsOfMirroredQubits() {
        List<DensityOperator> letters =
                List.of(DensityOperator.ofBloch(0.6, 0.1, 0.5), DensityOperator.ofBloch(-0.6, -0.1, 0.5));
        assertSame(letters, new double[] {0.5, 0.5}, 2);
    }

    /** The mixture is maximally mixed only up to rounding. */
    @Test
    void wordsOfQubitsThatAverageToNothing() {
        List<DensityOperator> letters = new ArrayList<>();
        for (int k = 0; k < 3; k++) {
            letters.add(DensityOperator.ofBloch(
                    0.8 * Math.cos(2 * Math.PI * k / 3), 0, 0.8 * Math.sin(2 * Math.PI * k / 3)));
        }
        assertSame(letters, Channels.uniform(3), 2);
    }

    /** Around the axis, with weights that are not equal but mean the axis. */
    @Test
    void wordsOfQubitsAroundAnAxis() {
        double r = 0.5;
        List<DensityOperator> letters = List.of(
                DensityOperator.ofBloch(r, 0, 0.6),
                DensityOperator.ofBloch(-r, 0, 0.6),
                DensityOperator.ofBloch(0, r, 0.6),
                DensityOperator.ofBloch(0, -r, 0.6));
        assertSame(letters, new double[] {0.375, 0.375, 0.125, 0.125}, 2);
    }

    @Test
    void wordsOfPureQubits() {
        List<DensityOperator> letters = new ArrayList<>();
        for (int k = 0; k < 3; k++) {
            letters.add(DensityOperator.ofKet(Math.cos(Math.PI * k / 3), Math.sin(Math.PI * k / 3)));
        }
        assertSame(letters, Channels.uniform(3), 2);
    }

    /** Kets that are not symmetric to each other in their coordinates, complex and of three dimensions. */
    @Test
    void wordsOfTwoKets() {
        double s = 1 / Math.sqrt(3);
        DensityOperator a = DensityOperator.ofKet(new double[] {s, s, 0}, new double[] {0, 0, s});
        DensityOperator b = DensityOperator.ofKet(new double[] {0.6, 0, 0}, new double[] {0, 0.8, 0});
        ClassicalQuantumChannel one = ClassicalQuantumChannel.of(a, b);
        ClassicalQuantumChannel all = ClassicalQuantumChannel.of(words(List.of(a, b), 2));
        double[] q = Channels.uniform(4);
        assertSame(
                CodingBounds.of(all).withInput(q).withOutputState(all.outputState(q)),
                CodingBounds.of(one).uses(2),
                true);
    }

    @ParameterizedTest
    @CsvSource({
        "1, 2, .687110243057",
        "2, 2, .532170663716",
        "2, 4, .938539061641",
        "3, 4, .791432948783",
        "5, 2, .273656233970",
        "5, 4, .555807147113",
        "5, 8, .789360642729",
        "10, 4, .224535331522"
    })
    void errorOfKets(int n, long messages, double expected) {
        Enclosure error = kets().uses(n).achievableError(messages);
        assertEquals(expected, error.midpoint(), 5.1e-13);
        assertTrue(error.relativeWidth() < 1e-12, () -> error.toIntervalString(17));
    }

    @ParameterizedTest
    @CsvSource({
        "1, .01, .749549865132",
        "1, .1, .596927593751",
        "2, .01, .586144526189",
        "2, .1, .435323747668",
        "4, .01, .362701422889",
        "4, .1, .240312574160"
    })
    void typeTwoErrorOfKets(int n, double epsilon, double expected) {
        Information high = kets().uses(n).converse(epsilon);
        assertEquals(expected, high.nats().negate().exp().midpoint(), 1e-8);
        assertTrue(
                high.nats().widen(2e-12).contains(-Math.log(expected)),
                () -> high.nats().toIntervalString(17));
    }

    private static CodingBounds kets() {
        return CodingBounds.of(ClassicalQuantumChannel.of(
                DensityOperator.ofKet(Channels.ket(0.78, false)), DensityOperator.ofKet(Channels.ket(0.78, true))));
    }

    @Property(tries = 60, shrinking = ShrinkingMode.OFF)
    void achievableIsAtMostConverseForSymmetricClassicalChannels(@ForAll long seed) {
        Random random = new Random(seed);
        int k = 2 + random.nextInt(2);
        double[] row = Channels.distribution(random, k);
        double[][] rows = new double[k][k];
        for (int x = 0; x < k; x++) {
            for (int y = 0; y < k; y++) {
                rows[x][(x + y) % k] = row[y];
            }
        }
        int n = 1 + random.nextInt(k == 2 ? 1000 : 40);
        double[] uniform = Channels.uniform(k);
        ClassicalQuantumChannel channel = ClassicalQuantumChannel.ofStochasticMatrix(rows);
        assertOrdered(
                CodingBounds.of(channel)
                        .withInput(uniform)
                        .withOutputState(channel.outputState(uniform))
                        .uses(n),
                random);
    }

    @Property(tries = 12, shrinking = ShrinkingMode.OFF)
    void achievableIsAtMostConverseForTwoKets(@ForAll long seed) {
        Random random = new Random(seed);
        double overlap = random.nextInt(4) == 0 ? 1 - Math.pow(10, -8 * random.nextDouble()) : random.nextDouble();
        assertOrdered(
                CodingBounds.of(ClassicalQuantumChannel.of(
                                DensityOperator.ofKet(Channels.ket(overlap, false)),
                                DensityOperator.ofKet(Channels.ket(overlap, true))))
                        .withInput(0.5, 0.5)
                        .uses(1 + random.nextInt(1000)),
                random);
    }

    @Property(tries = 3, shrinking = ShrinkingMode.OFF)
    void achievableIsAtMostConverseForMirroredQubits(@ForAll long seed) {
        Random random = new Random(seed);
        double length = random.nextDouble();
        double angle = Math.PI * random.nextDouble();
        double x = length * Math.sin(angle);
        double z = length * Math.cos(angle);
        assertOrdered(
                CodingBounds.of(ClassicalQuantumChannel.of(
                                DensityOperator.ofBloch(x, 0, z), DensityOperator.ofBloch(-x, 0, z)))
                        .withInput(0.5, 0.5)
                        .uses(1 + random.nextInt(12)),
                random);
    }

    private static void assertOrdered(CodingBounds bounds, Random random) {
        double epsilon = Math.pow(10, -6 * random.nextDouble()) * 0.9;
        Information low = bounds.achievable(epsilon);
        Information high = bounds.converse(epsilon);
        assertTrue(low.nats().isPossiblyBelow(high.nats()), () -> low.nats() + " > " + high.nats());
        assertTrue(high.nats().width() < 1e-6, () -> high.nats().toIntervalString(17));
        if (low.nats().lower() > 0) {
            assertTrue(low.nats().width() < 1e-6, () -> low.nats().toIntervalString(17));
            Enclosure there = bounds.achievableError(low);
            assertTrue(there.times(Enclosure.ONE.widen(1e-7)).contains(epsilon), () -> there + " for " + epsilon);
        }
        Enclosure floor = bounds.converseError(high);
        assertTrue(floor.times(Enclosure.ONE.widen(1e-6)).contains(epsilon), () -> floor + " for " + epsilon);
    }

    @Test
    void normalApproximationIsClose() {
        Approximation normal = CodingBounds.of(
                        ClassicalQuantumChannel.ofStochasticMatrix(new double[][] {{0.89, 0.11}, {0.11, 0.89}}))
                .uses(2000)
                .normalApproximation(1e-3);
        // C and V of the check values, Q^-1(1e-3) = 3.090232306168
        double expected = 2000 * 0.500084041835 - Math.sqrt(2000 * 0.890701701398) * 3.090232306167813;
        assertEquals(expected, normal.bits(), 1e-6);
        assertEquals(normal.bits() * Math.log(2), normal.nats(), 1e-12 * normal.nats());
        assertTrue(normal.source().contains("normal approximation"));
    }

    @Test
    void refusals() {
        CodingBounds skew =
                CodingBounds.of(ClassicalQuantumChannel.ofStochasticMatrix(new double[][] {{0.89, 0.11}, {0.2, 0.8}}));
        assertRefused("at least 1", () -> skew.uses(0));
        CodingBounds qubits = CodingBounds.of(ClassicalQuantumChannel.of(
                        DensityOperator.ofBloch(0.5, 0, 0), DensityOperator.ofBloch(0, 0, 0.7)))
                .withInput(0.5, 0.5);
        assertRefused("401 types", () -> qubits.uses(400).achievable(0.1));
        CodingBounds mixed = CodingBounds.of(ClassicalQuantumChannel.of(
                DensityOperator.maximallyMixed(4),
                DensityOperator.ofBloch(0.1, 0, 0).tensor(DensityOperator.ofBloch(0, 0.2, 0.3))));
        assertRefused("dimension 4", () -> mixed.uses(5).achievable(0.1));
        CodingBounds tilted = CodingBounds.of(
                        ClassicalQuantumChannel.ofStochasticMatrix(new double[][] {{0.89, 0.11}, {0.11, 0.89}}))
                .withOutputState(DensityOperator.ofBloch(0.1, 0, 0));
        assertRefused("does not commute", () -> tilted.uses(2).converse(0.1));
    }

    private static void assertRefused(String part, org.junit.jupiter.api.function.Executable asked) {
        InvalidInputException e = assertThrows(InvalidInputException.class, asked);
        assertTrue(e.getMessage().contains(part), e.getMessage());
    }
}
