package org.minorant.bounds;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.Random;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.ShrinkingMode;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.function.Executable;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;
import org.minorant.core.InvalidInputException;
import org.minorant.core.state.RandomStates;
import org.minorant.measurement.Ensemble;
import org.minorant.measurement.PrettyGoodMeasurement;

/** Two senders: against the true errors of all small codes, single senders, a channel of the sum of both letters, and words as letters. */
final class TwoSendersTest {

    private static void assertMeet(Enclosure a, Enclosure b, double relative) {
        Enclosure wide = a.times(Enclosure.ONE.widen(relative));
        assertTrue(
                wide.isPossiblyBelow(b) && b.isPossiblyBelow(wide),
                () -> a.toIntervalString(17) + " " + b.toIntervalString(17));
    }

    private static List<List<DensityOperator>> random(Random random, int x, int y) {
        List<List<DensityOperator>> w = new ArrayList<>();
        for (int u = 0; u < x; u++) {
            List<DensityOperator> row = new ArrayList<>();
            for (int v = 0; v < y; v++) {
                row.add(
                        random.nextBoolean()
                                ? RandomStates.pure(2, random.nextLong())
                                : RandomStates.hilbertSchmidt(2, random.nextLong()));
            }
            w.add(row);
        }
        return w;
    }

    /** The mean of the true errors of the pretty-good measurement over all codes of two by M messages, each as often as it is drawn. */
    @Property(tries = 6, shrinking = ShrinkingMode.OFF)
    void meanErrorOfAllCodes(@ForAll long seed) {
        Random random = new Random(seed);
        List<List<DensityOperator>> w = random(random, 2, 2);
        double[] p = Channels.distribution(random, 2);
        double[] q = Channels.distribution(random, 2);
        int others = 1 + random.nextInt(2);
        double mean = 0;
        for (int code = 0; code < 1 << (2 + others); code++) {
            double probability = 1;
            int[] x = {code & 1, code >> 1 & 1};
            int[] y = new int[others];
            probability *= p[x[0]] * p[x[1]];
            for (int k = 0; k < others; k++) {
                y[k] = code >> (2 + k) & 1;
                probability *= q[y[k]];
            }
            List<DensityOperator> states = new ArrayList<>();
            for (int u : x) {
                for (int v : y) {
                    states.add(w.get(u).get(v));
                }
            }
            mean += probability
                    * PrettyGoodMeasurement.of(Ensemble.equiprobable(states))
                            .errorProbability()
                            .midpoint();
        }
        double found = mean;
        Enclosure bound = TwoSenders.of(w).withInputs(p, q).achievableError(2, others);
        assertTrue(found <= bound.upper() + 1e-12, () -> found + " above " + bound);
        assertTrue(found >= 0.2 * bound.lower(), () -> found + " far below " + bound);
    }

    /** One message of the second sender leaves the single sender's bound, averaged over its letter. */
    @Test
    void oneMessageIsOneSender() {
        List<List<DensityOperator>> w = random(new Random(2), 3, 2);
        double[] p = {0.2, 0.5, 0.3};
        double[] q = {0.4, 0.6};
        TwoSenders both = TwoSenders.of(w).withInputs(p, q);
        for (long m : new long[] {2, 5}) {
            Enclosure mean = Enclosure.ZERO;
            for (int y = 0; y < 2; y++) {
                int letter = y;
                ClassicalQuantumChannel c = ClassicalQuantumChannel.of(
                        w.stream().map(row -> row.get(letter)).toList());
                mean = mean.plus(
                        CodingBounds.of(c).withInput(p).achievableError(m).times(q[y]));
            }
            assertMeet(mean, both.achievableError(m, 1), 1e-13);
        }
        assertEquals(Enclosure.ZERO, both.achievableError(1, 1));
    }

    private static List<List<DensityOperator>> sum(double e) {
        DensityOperator zero = DensityOperator.ofEigenvalues(1 - e, e);
        DensityOperator one = DensityOperator.ofEigenvalues(e, 1 - e);
        return List.of(List.of(zero, one), List.of(one, zero));
    }

    /** The output is x + y mod 2 with noise: all three competitors are uniform, and M₁M₂ − 1 of them are the binary symmetric channel's M − 1. */
    @ParameterizedTest
    @CsvSource({"1", "30", "1000"})
    void sumOfBothLetters(int n) {
        double e = 0.11;
        TwoSenders both = TwoSenders.of(sum(e)).uses(n);
        CodingBounds single = CodingBounds.of(ClassicalQuantumChannel.ofStochasticMatrix(
                        new double[][] {{1 - e, e}, {e, 1 - e}}))
                .uses(n);
        Information half = Information.ofBits(0.15 * n);
        Information whole = Information.ofBits(half.bits().times(2));
        assertMeet(single.achievableError(whole), both.achievableError(half, half), 1e-9);
        double epsilon = 0.01;
        if (n == 1000) {
            Enclosure rest = both.achievable(half, epsilon).orElseThrow().nats();
            assertMeet(single.achievable(epsilon).nats(), rest.plus(half.nats()), 1e-9);
        }
        assertMeet(
                single.converse(epsilon).nats().plus(Enclosure.ONE),
                both.converse(epsilon).nats().plus(Enclosure.ONE),
                1e-9);
    }

    /** Words as letters of one use: classical by types, others by the same way in smaller steps. */
    @Test
    void wordsAsLetters() {
        Random random = new Random(4);
        List<List<DensityOperator>> classical = new ArrayList<>();
        for (int x = 0; x < 2; x++) {
            List<DensityOperator> row = new ArrayList<>();
            for (int y = 0; y < 2; y++) {
                row.add(DensityOperator.ofEigenvalues(Channels.distribution(random, 2)));
            }
            classical.add(row);
        }
        for (List<List<DensityOperator>> w : List.of(classical, random(random, 2, 2))) {
            double[] p = {0.3, 0.7};
            double[] q = {0.6, 0.4};
            List<List<DensityOperator>> words = new ArrayList<>();
            for (int x = 0; x < 4; x++) {
                List<DensityOperator> row = new ArrayList<>();
                for (int y = 0; y < 4; y++) {
                    DensityOperator a = w.get(x / 2).get(y / 2);
                    row.add(a.tensor(w.get(x % 2).get(y % 2)));
                }
                words.add(row);
            }
            TwoSenders one = TwoSenders.of(words).withInputs(Channels.tensor(p, p), Channels.tensor(q, q));
            TwoSenders two = TwoSenders.of(w).withInputs(p, q).uses(2);
            for (long m : new long[] {1, 2, 4}) {
                assertMeet(one.achievableError(m, 3), two.achievableError(m, 3), 1e-12);
            }
        }
    }

    /** A classical channel without symmetry: the bound by types against one evaluated as matrices. */
    @Test
    void typesAgainstMatrices() {
        double[] a = {0.7, 0.2, 0.1};
        double[] b = {0.1, 0.8, 0.1};
        double[] c = {0.3, 0.3, 0.4};
        double[] d = {0.05, 0.15, 0.8};
        List<List<DensityOperator>> diagonal = List.of(
                List.of(DensityOperator.ofEigenvalues(a), DensityOperator.ofEigenvalues(b)),
                List.of(DensityOperator.ofEigenvalues(c), DensityOperator.ofEigenvalues(d)));
        double[] p = {0.4, 0.6};
        double[] q = {0.7, 0.3};
        double[][][] rows = {{a, b}, {c, d}};
        double g = 0;
        for (int x = 0; x < 2; x++) {
            for (int y = 0; y < 2; y++) {
                for (int z = 0; z < 3; z++) {
                    double ofY = p[0] * rows[0][y][z] + p[1] * rows[1][y][z];
                    double ofX = q[0] * rows[x][0][z] + q[1] * rows[x][1][z];
                    double all = 0;
                    for (int u = 0; u < 2; u++) {
                        all += p[u] * (q[0] * rows[u][0][z] + q[1] * rows[u][1][z]);
                    }
                    g += p[x] * q[y] * Math.min(rows[x][y][z], 1 * ofY + 2 * ofX + 2 * all);
                }
            }
        }
        assertTrue(TwoSenders.of(diagonal)
                .withInputs(p, q)
                .achievableError(2, 3)
                .widen(1e-14)
                .contains(g));
    }

    @Property(tries = 2, shrinking = ShrinkingMode.OFF)
    void achievableIsAtMostConverse(@ForAll long seed) {
        Random random = new Random(seed);
        TwoSenders both = TwoSenders.of(List.of(
                List.of(RandomStates.hilbertSchmidt(3, seed), RandomStates.pure(3, seed + 1)),
                List.of(RandomStates.pure(3, seed + 2), RandomStates.pure(3, seed + 3))));
        double epsilon = 0.3 + 0.6 * random.nextDouble();
        Information two = Information.ofNats(Enclosure.exact(1.5).ln());
        Information most = both.converse(epsilon);
        Optional<Information> rest = both.achievable(two, epsilon);
        rest.ifPresent(r -> {
            assertTrue(r.nats().plus(two.nats()).isPossiblyBelow(most.nats()));
            assertTrue(r.nats().isPossiblyBelow(both.converseOfSecond(epsilon).nats()));
            if (r.nats().lower() > 0) {
                assertTrue(both.achievableError(two, r).widen(1e-8).contains(epsilon));
            }
        });
        assertTrue(
                both.converseOfFirst(epsilon).nats().isPossiblyBelow(most.nats().times(1 + 1e-9)));
    }

    /** Numbers of messages far beyond doubles: all letters are confused. */
    @Test
    void manyMessages() {
        TwoSenders both = TwoSenders.of(random(new Random(9), 2, 2));
        Information many = Information.ofNats(2000.0);
        assertMeet(Enclosure.ONE, both.achievableError(many, many), 1e-13);
        assertMeet(Enclosure.ONE, both.achievableError(many, Information.ofNats(1.0)), 1e-13);
        assertEquals(Optional.empty(), both.achievable(many, 0.1));
    }

    @Test
    void refusals() {
        List<List<DensityOperator>> w = random(new Random(1), 2, 2);
        TwoSenders both = TwoSenders.of(w);
        DensityOperator three = DensityOperator.maximallyMixed(3);
        assertRefused("dimension 3", () -> TwoSenders.of(List.of(w.get(0), List.of(three, three))));
        assertRefused(
                "has 1 states",
                () -> TwoSenders.of(List.of(w.get(0), List.of(w.get(0).get(0)))));
        assertRefused("no", () -> TwoSenders.of(List.of()));
        assertRefused("sums to", () -> both.withInputs(new double[] {0.5, 0.4}, new double[] {0.5, 0.5}));
        assertRefused("entries", () -> both.withInputs(new double[] {0.5, 0.5}, new double[] {1}));
        assertRefused("at least 1", () -> both.uses(0));
        assertRefused("at least 1", () -> both.achievableError(0, 2));
        assertRefused("at least 1", () -> both.achievableError(2, 0));
        assertRefused("logarithm", () -> both.achievableError(Information.ofNats(-1.0), Information.ofNats(1.0)));
        for (double epsilon : new double[] {0, 1, Double.NaN}) {
            assertRefused("both excluded", () -> both.achievable(Information.ofNats(0.0), epsilon));
            assertRefused("both excluded", () -> both.converse(epsilon));
            assertRefused("both excluded", () -> both.converseOfFirst(epsilon));
            assertRefused("both excluded", () -> both.converseOfSecond(epsilon));
        }
        assertRefused("fewer uses", () -> both.uses(7).achievableError(2, 2));
        assertRefused("one use", () -> both.uses(2).converseOfFirst(0.1));
        TwoSenders skew = TwoSenders.of(List.of(
                List.of(DensityOperator.ofEigenvalues(0.7, 0.3), DensityOperator.ofEigenvalues(0.2, 0.8)),
                List.of(DensityOperator.ofEigenvalues(0.6, 0.4), DensityOperator.ofEigenvalues(0.15, 0.85))));
        assertRefused("types", () -> skew.uses(100).achievableError(2, 2));
    }

    private static void assertRefused(String part, Executable asked) {
        InvalidInputException e = assertThrows(InvalidInputException.class, asked);
        assertTrue(e.getMessage().contains(part), e.getMessage());
    }
}
