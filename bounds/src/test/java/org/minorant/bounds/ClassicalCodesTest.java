package org.minorant.bounds;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
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

/** Dependence testing and the random-coding union of classical channels, against their definitions over all words and against published channels. */
final class ClassicalCodesTest {

    private static final double[][] SYMMETRIC = {{0.89, 0.11}, {0.11, 0.89}};
    private static final double[][] ERASURE = {{0.5, 0.5, 0}, {0, 0.5, 0.5}};

    private static CodingBounds bounds(double[][] rows) {
        return CodingBounds.of(ClassicalQuantumChannel.ofStochasticMatrix(rows));
    }

    /** E[min(1, t P[W(y|X̄) ≥ W(y|X)])] over all words of length n, in exact decimal arithmetic. */
    private static BigDecimal union(double[][] rows, double[] p, int n, long t) {
        BigDecimal[][] w = {{BigDecimal.ONE}};
        BigDecimal[] input = {BigDecimal.ONE};
        for (int use = 0; use < n; use++) {
            w = longer(w, rows);
            input = longer(input, p);
        }
        BigDecimal sum = BigDecimal.ZERO;
        for (int y = 0; y < w[0].length; y++) {
            for (int x = 0; x < w.length; x++) {
                BigDecimal tail = BigDecimal.ZERO;
                for (int other = 0; other < w.length; other++) {
                    if (w[other][y].compareTo(w[x][y]) >= 0) {
                        tail = tail.add(input[other]);
                    }
                }
                BigDecimal least = tail.multiply(BigDecimal.valueOf(t)).min(BigDecimal.ONE);
                sum = sum.add(input[x].multiply(w[x][y]).multiply(least));
            }
        }
        return sum;
    }

    private static BigDecimal[][] longer(BigDecimal[][] words, double[][] rows) {
        BigDecimal[][] all = new BigDecimal[words.length * rows.length][];
        for (int i = 0; i < all.length; i++) {
            all[i] = longer(words[i / rows.length], rows[i % rows.length]);
        }
        return all;
    }

    private static BigDecimal[] longer(BigDecimal[] words, double[] p) {
        BigDecimal[] all = new BigDecimal[words.length * p.length];
        for (int i = 0; i < all.length; i++) {
            all[i] = words[i / p.length].multiply(new BigDecimal(p[i % p.length]));
        }
        return all;
    }

    private static void assertUnion(double[][] rows, double[] p, int n, long messages) {
        Enclosure g = bounds(rows).withInput(p).uses(n).randomCodingUnionError(messages);
        BigDecimal expected = union(rows, p, n, messages - 1).min(BigDecimal.ONE);
        assertTrue(g.contains(expected), () -> g.toIntervalString(17) + " misses " + expected.doubleValue());
        assertTrue(g.relativeWidth() < 1e-9, () -> "width of " + g.toIntervalString(17));
    }

    /** Ties of every kind: like letters, equal products of different likelihoods, classes of outcomes that differ in the input only, and zeros. */
    @Test
    void unionOverAllWords() {
        double[][] powers = {{0.5, 0.25, 0.25}, {0.25, 0.25, 0.5}, {0.125, 0.75, 0.125}};
        for (long m : new long[] {2, 3, 20}) {
            assertUnion(SYMMETRIC, new double[] {0.5, 0.5}, 4, m);
            assertUnion(ERASURE, new double[] {0.5, 0.5}, 4, m);
            assertUnion(new double[][] {{0.8, 0.2}, {0.2, 0.8}}, new double[] {0.375, 0.625}, 4, m);
            assertUnion(new double[][] {{1, 0}, {0.5, 0.5}}, new double[] {0.625, 0.375}, 4, m);
            assertUnion(powers, new double[] {0.5, 0.25, 0.25}, 3, m);
            assertUnion(new double[][] {{0.25, 0.75}, {0.25, 0.75}}, new double[] {0.5, 0.5}, 3, m);
            assertUnion(new double[][] {{0.25, 0.75}, {0.5, 0.5}, {1, 0}}, new double[] {0.5, 0.5, 0}, 4, m);
        }
    }

    @Property(tries = 60, shrinking = ShrinkingMode.OFF)
    void unionOfRandomChannelsOverAllWords(@ForAll long seed) {
        Random random = new Random(seed);
        int letters = 1 + random.nextInt(3);
        double[][] rows = new double[letters][];
        int outcomes = 2 + random.nextInt(2);
        for (int x = 0; x < letters; x++) {
            rows[x] = Channels.distribution(random, outcomes);
        }
        int n = 1 + random.nextInt(3);
        long m = 2 + random.nextInt(5);
        double[] p = Channels.distribution(random, letters);
        // sums that are one only up to rounding are within the enclosure, both ways
        Enclosure g = bounds(rows).withInput(p).uses(n).randomCodingUnionError(m);
        BigDecimal expected = union(rows, p, n, m - 1).min(BigDecimal.ONE);
        assertTrue(g.contains(expected), () -> g.toIntervalString(17) + " misses " + expected.doubleValue());
        Enclosure f = bounds(rows).withInput(p).uses(n).achievableError(m);
        assertTrue(g.isPossiblyBelow(f), () -> g + " above " + f);
    }

    /** T ≤ e^-i, so g ≤ f; and nothing is above the converse. */
    @Property(tries = 25, shrinking = ShrinkingMode.OFF)
    void orderOfBounds(@ForAll long seed) {
        Random random = new Random(seed);
        double[][] rows = {Channels.distribution(random, 2), Channels.distribution(random, 2)};
        int n = 1 + random.nextInt(60);
        CodingBounds b =
                bounds(rows).withInput(Channels.distribution(random, 2)).uses(n);
        double epsilon = 0.9 * Math.pow(10, -4 * random.nextDouble());
        Enclosure low = b.achievable(epsilon).nats();
        Enclosure union = b.randomCodingUnion(epsilon).nats();
        assertTrue(low.isPossiblyBelow(union), () -> low + " above " + union);
        Enclosure most = b.converse(epsilon).nats();
        Enclosure dependence = b.dependenceTesting(epsilon).nats();
        assertTrue(union.isPossiblyBelow(most), () -> union + " above " + most);
        assertTrue(dependence.isPossiblyBelow(most), () -> dependence + " above " + most);
        if (union.lower() > 0) {
            assertTrue(union.width() < 1e-6, () -> union.toIntervalString(17));
            Enclosure there = b.randomCodingUnionError(Information.ofNats(union));
            assertTrue(there.times(Enclosure.ONE.widen(1e-7)).contains(epsilon), () -> there + " for " + epsilon);
        }
    }

    /** f((M−1)/2), exactly: M = 2k + 1 has the error that f(M−1) has at k + 1. */
    @ParameterizedTest
    @CsvSource({"1", "7", "100"})
    void dependenceTestingIsOneBitBeyond(int n) {
        CodingBounds b = bounds(SYMMETRIC).uses(n);
        for (long k : new long[] {1, 5, 1L << 40}) {
            assertEquals(b.achievableError(k + 1), b.dependenceTestingError(2 * k + 1));
        }
        Enclosure f = b.achievable(0.2).nats().exp().minus(Enclosure.ONE);
        Enclosure dependence = b.dependenceTesting(0.2).nats().exp().minus(Enclosure.ONE);
        if (f.lower() > 0) {
            assertTrue(f.times(2).widen(1e-11 * f.upper()).isPossiblyBelow(dependence));
            assertTrue(dependence.isPossiblyBelow(f.times(2).widen(1e-11 * f.upper())));
        }
        assertTrue(b.dependenceTesting(0.2).source().contains("dependence testing"));
    }

    /** Every word that could have been sent is as likely as the one that was: T = e^-i, and the union bound is f(M−1). */
    @Test
    void erasureChannelHasTiesOnly() {
        CodingBounds b = bounds(ERASURE).uses(2000);
        Enclosure union = b.randomCodingUnion(1e-3).bits();
        Enclosure f = b.achievable(1e-3).bits();
        assertTrue(union.isPossiblyBelow(f) && f.isPossiblyBelow(union), () -> union + " " + f);
        assertTrue(union.width() < 1e-6);
    }

    /** Errors far below the first windows. */
    @Test
    void deepErrors() {
        CodingBounds b = bounds(SYMMETRIC).uses(400);
        Enclosure g = b.randomCodingUnionError(2);
        assertTrue(g.upper() < 1e-30, g::toString);
        assertTrue(g.relativeWidth() < 1e-9, () -> g.toIntervalString(17));
        assertTrue(g.isPossiblyBelow(b.achievableError(2)));
    }

    @Test
    void identicalOutputsCarryNothing() {
        CodingBounds b = bounds(new double[][] {{0.3, 0.7}, {0.3, 0.7}}).uses(50);
        assertEquals(Enclosure.ZERO, b.randomCodingUnion(0.1).nats());
        assertEquals(Enclosure.ZERO, b.dependenceTesting(0.1).nats());
        assertTrue(b.randomCodingUnionError(2).lower() > 1 - 1e-12);
        assertTrue(b.dependenceTestingError(2).widen(1e-12).contains(0.5));
        assertEquals(Enclosure.ZERO, b.randomCodingUnionError(1));
    }

    @Test
    void lettersNeverUsedDoNotMatter() {
        CodingBounds two = bounds(SYMMETRIC).withInput(0.5, 0.5).uses(30);
        CodingBounds three = bounds(new double[][] {SYMMETRIC[0], {0.3, 0.7}, SYMMETRIC[1]})
                .withInput(0.5, 0, 0.5)
                .uses(30);
        assertTrue(two.randomCodingUnionError(100)
                .times(Enclosure.ONE.widen(1e-12))
                .contains(three.randomCodingUnionError(100)));
        assertTrue(two.dependenceTestingError(100)
                .times(Enclosure.ONE.widen(1e-12))
                .contains(three.dependenceTestingError(100)));
    }

    @Test
    void refusals() {
        CodingBounds b = bounds(SYMMETRIC).uses(10);
        for (double epsilon : new double[] {0, 1, -1, 2, Double.NaN}) {
            refused("the error probability is " + epsilon, () -> b.dependenceTesting(epsilon));
            refused("the error probability is " + epsilon, () -> b.randomCodingUnion(epsilon));
        }
        for (long m : new long[] {0, -5}) {
            refused("the number of messages is " + m + ", expected at least 1", () -> b.dependenceTestingError(m));
            refused("the number of messages is " + m + ", expected at least 1", () -> b.randomCodingUnionError(m));
        }
        refused("the logarithm of the number", () -> b.randomCodingUnionError(Information.ofNats(-1)));
        refused("the logarithm of the number", () -> b.dependenceTestingError(Information.ofNats(-1)));
        refused("sums to 0.75", () -> b.withInput(0.5, 0.25));
        CodingBounds quantum = CodingBounds.of(
                ClassicalQuantumChannel.of(DensityOperator.ofBloch(0.5, 0, 0), DensityOperator.ofBloch(0, 0, 0.7)));
        refused(
                "CodingBounds.dependenceTesting: a channel whose outputs are not",
                () -> quantum.dependenceTesting(0.1));
        refused("CodingBounds.randomCodingUnionError: a channel", () -> quantum.randomCodingUnionError(4));
        double[][] wide = {{0.4, 0.3, 0.2, 0.1}, {0.15, 0.25, 0.28, 0.32}, {0.05, 0.5, 0.11, 0.34}};
        refused("types of outputs in 1000 uses", () -> bounds(wide).uses(1000).randomCodingUnion(0.1));
        double[][] three = {{0.9, 0.1}, {0.5, 0.5}, {0.25, 0.75}};
        CodingBounds many = bounds(three).withInput(0.3, 0.4, 0.3).uses(1000);
        refused("joint types in 1000 uses", () -> many.randomCodingUnion(0.1));
    }

    private static void refused(String part, org.junit.jupiter.api.function.Executable asked) {
        InvalidInputException e = assertThrows(InvalidInputException.class, asked);
        assertTrue(e.getMessage().contains(part), e.getMessage());
    }
}
