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
import org.junit.jupiter.api.function.Executable;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;
import org.minorant.core.InvalidInputException;
import org.minorant.core.state.RandomStates;
import org.minorant.measurement.Ensemble;
import org.minorant.measurement.PrettyGoodMeasurement;

/** Compression with side information: against classical sums, true errors of all hash codes, words as letters, and the channel with the same states. */
final class SideInformationTest {

    private static final double ERROR = 1e-3;

    private static void assertMeet(Enclosure a, Enclosure b, double relative) {
        Enclosure wide = a.times(Enclosure.ONE.widen(relative));
        assertTrue(
                wide.isPossiblyBelow(b) && b.isPossiblyBelow(wide),
                () -> a.toIntervalString(17) + " " + b.toIntervalString(17));
    }

    /** Nothing known: f(1/M) = Σ min(P, 1/M), and M at least the number of letters that hold 1 − ε, with a fraction of the last. */
    @Test
    void withoutSideInformation() {
        double[] p = {0.5, 0.25, 0.125, 0.125};
        List<DensityOperator> none = List.of(
                DensityOperator.ofEigenvalues(1),
                DensityOperator.ofEigenvalues(1),
                DensityOperator.ofEigenvalues(1),
                DensityOperator.ofEigenvalues(1));
        SideInformationCompression c = SideInformationCompression.of(ClassicalQuantumChannel.of(none), p);
        for (long m = 1; m <= 9; m++) {
            double f = 0;
            for (double x : p) {
                f += Math.min(x, 1.0 / m);
            }
            assertTrue(c.achievableError(m).widen(1e-15).contains(f));
        }
        assertTrue(c.conditionalEntropy().bits().widen(1e-15).contains(1.75));
        // 1 − 0.1 takes two letters and 0.15/0.125 of the rest
        assertEquals(Math.log(3.2), c.converse(0.1).nats().midpoint(), 1e-9);
        assertEquals(0.25, c.converseError(2).midpoint(), 1e-12);
    }

    /** Binary symmetric side information: H(X|B) = h(e); f(1/M) is the channel's f at 2^n/M, as X is uniform. */
    @Test
    void binarySymmetric() {
        double e = 0.11;
        ClassicalQuantumChannel w = ClassicalQuantumChannel.ofStochasticMatrix(new double[][] {{1 - e, e}, {e, 1 - e}});
        SideInformationCompression one = SideInformationCompression.of(w, 0.5, 0.5);
        // 1 − C of the check values, 12 digits
        assertTrue(one.conditionalEntropy().bits().widen(5.1e-13).contains(1 - 0.500084041835));
        int n = 1000;
        SideInformationCompression many = one.uses(n);
        CodingBounds channel = CodingBounds.of(w).uses(n);
        // f(M−1) = ε at 403.056651 bits, converse 416.835834 bits (check values, six decimals)
        assertTrue(many.achievable(ERROR).bits().widen(6e-7).contains(n - 403.056651));
        assertTrue(many.converse(ERROR).bits().widen(6e-7).contains(n - 416.835834));
        assertTrue(many.achievable(ERROR).bits().width() < 1e-6);
        assertTrue(many.converse(ERROR).bits().width() < 1e-6);
        assertEquals(
                n - channel.normalApproximation(ERROR).bits(),
                many.normalApproximation(ERROR).bits(),
                1e-6);
        Enclosure there = many.achievableError(many.achievable(ERROR));
        assertTrue(there.widen(1e-9).contains(ERROR), there::toString);
    }

    /** Every map of three letters to two values, its true error under the pretty-good measurement: the mean is below f(1/2), and none below the converse. */
    @Property(tries = 12, shrinking = ShrinkingMode.OFF)
    void trueErrorsOfAllHashCodes(@ForAll long seed) {
        Random random = new Random(seed);
        int letters = 3;
        double[] p = Channels.distribution(random, letters);
        List<DensityOperator> w = new ArrayList<>();
        for (int x = 0; x < letters; x++) {
            w.add(
                    random.nextBoolean()
                            ? RandomStates.pure(2, random.nextLong())
                            : RandomStates.hilbertSchmidt(2, random.nextLong()));
        }
        SideInformationCompression c = SideInformationCompression.of(ClassicalQuantumChannel.of(w), p);
        double floor = c.converseError(2).lower();
        double mean = 0;
        for (int h = 0; h < 1 << letters; h++) {
            double error = 0;
            for (int value = 0; value < 2; value++) {
                error += errorOfValue(w, p, h, value);
            }
            double found = error;
            assertTrue(found >= floor - 1e-12, () -> found + " below " + floor);
            mean += error / (1 << letters);
        }
        double reached = c.achievableError(2).upper();
        double average = mean;
        assertTrue(average <= reached + 1e-12, () -> average + " above " + reached);
    }

    private static double errorOfValue(List<DensityOperator> w, double[] p, int h, int value) {
        List<DensityOperator> inside = new ArrayList<>();
        List<Double> weights = new ArrayList<>();
        double sum = 0;
        for (int x = 0; x < p.length; x++) {
            if ((h >> x & 1) == value && p[x] > 0) {
                inside.add(w.get(x));
                weights.add(p[x]);
                sum += p[x];
            }
        }
        double total = sum;
        return inside.size() < 2
                ? 0
                : total
                        * PrettyGoodMeasurement.of(Ensemble.of(
                                        inside,
                                        weights.stream()
                                                .mapToDouble(v -> v / total)
                                                .toArray()))
                                .errorProbability()
                                .midpoint();
    }

    /** n letters against one letter that is a word of them: classical, kets, and unequal qubits through blocks. */
    @Test
    void wordsAsLetters() {
        assertWords(List.of(DensityOperator.ofEigenvalues(0.9, 0.1), DensityOperator.ofEigenvalues(0.3, 0.7)), 3, 0.3);
        assertWords(
                List.of(
                        DensityOperator.ofKet(Channels.ket(0.6, false)),
                        DensityOperator.ofKet(Channels.ket(0.6, true))),
                2,
                0.5);
        assertWords(List.of(DensityOperator.ofBloch(0.5, 0, 0.6), DensityOperator.ofBloch(0.1, 0.2, -0.6)), 2, 0.2);
    }

    private static void assertWords(List<DensityOperator> w, int n, double first) {
        double[] p = {first, 1 - first};
        List<DensityOperator> words = w;
        double[] q = p;
        for (int k = 1; k < n; k++) {
            List<DensityOperator> longer = new ArrayList<>();
            for (DensityOperator a : words) {
                for (DensityOperator b : w) {
                    longer.add(a.tensor(b));
                }
            }
            words = longer;
            q = Channels.tensor(q, p);
        }
        SideInformationCompression many =
                SideInformationCompression.of(ClassicalQuantumChannel.of(w), p).uses(n);
        SideInformationCompression one = SideInformationCompression.of(ClassicalQuantumChannel.of(words), q);
        for (long m : new long[] {1, 3}) {
            assertMeet(one.achievableError(m), many.achievableError(m), 1e-11);
            assertMeet(
                    one.converseError(m).plus(Enclosure.ONE),
                    many.converseError(m).plus(Enclosure.ONE),
                    1e-9);
        }
        double epsilon = 0.1;
        if (n > 2 || first == 0.5) {
            assertMeet(one.achievable(epsilon).nats(), many.achievable(epsilon).nats(), 1e-8);
            assertMeet(one.converse(epsilon).nats(), many.converse(epsilon).nats(), 1e-7);
        }
        assertMeet(
                one.conditionalEntropy().nats(),
                many.conditionalEntropy().nats().times(n),
                1e-12);
    }

    /** What is reached is never below what is needed, and the ledger is consistent. */
    @Property(tries = 3, shrinking = ShrinkingMode.OFF)
    void achievableIsAtLeastConverse(@ForAll long seed) {
        Random random = new Random(seed);
        int letters = 2 + random.nextInt(3);
        List<DensityOperator> w = new ArrayList<>();
        for (int x = 0; x < letters; x++) {
            w.add(RandomStates.hilbertSchmidt(2, random.nextLong()));
        }
        double epsilon = Math.pow(10, -4 * random.nextDouble()) * 0.9;
        SideInformationCompression c =
                SideInformationCompression.of(ClassicalQuantumChannel.of(w), Channels.distribution(random, letters));
        assertTrue(
                c.converse(epsilon).nats().isPossiblyBelow(c.achievable(epsilon).nats()));
        assertEquals(3, c.ledger(epsilon).bounds().size());
        assertTrue(c.achievableError(c.achievable(epsilon)).widen(1e-8).contains(epsilon));
    }

    /** The trine, perfectly known letters, and a letter that does not occur. */
    @Test
    void specialCases() {
        ClassicalQuantumChannel known =
                ClassicalQuantumChannel.of(DensityOperator.ofKet(1, 0), DensityOperator.ofKet(0, 1));
        SideInformationCompression c = SideInformationCompression.of(known, 0.5, 0.5);
        assertTrue(c.conditionalEntropy().nats().upper() < 1e-14);
        assertEquals(0, c.converse(0.1).nats().upper(), 1e-9);
        SideInformationCompression less = SideInformationCompression.of(
                ClassicalQuantumChannel.of(
                        DensityOperator.ofKet(1, 0), DensityOperator.ofKet(0.6, 0.8), DensityOperator.ofKet(0, 1)),
                0.5,
                0,
                0.5);
        assertMeet(c.achievableError(3), less.achievableError(3), 1e-14);
        Enclosure many = SideInformationCompression.of(Ensemble.equiprobable(List.of(
                        DensityOperator.ofKet(Channels.ket(0.5, false)),
                        DensityOperator.ofKet(Channels.ket(0.5, true)))))
                .uses(10_000)
                .achievable(ERROR)
                .bits();
        // the channel's 7901.68276286 bits (check values, eight decimals), taken from the 10000 of X
        assertTrue(many.widen(1e-7).contains(10_000 - 7901.68276286), many::toString);
    }

    @Test
    void refusals() {
        ClassicalQuantumChannel w =
                ClassicalQuantumChannel.of(DensityOperator.ofBloch(0.1, 0, 0.5), DensityOperator.ofBloch(0, 0.6, 0));
        SideInformationCompression c = SideInformationCompression.of(w, 0.4, 0.6);
        assertRefused("sums to", () -> SideInformationCompression.of(w, 0.4, 0.5));
        assertRefused("entries", () -> SideInformationCompression.of(w, 1));
        assertRefused(
                "dimension",
                () -> ClassicalQuantumChannel.of(DensityOperator.maximallyMixed(2), DensityOperator.maximallyMixed(3)));
        assertRefused("at least 1", () -> c.uses(0));
        assertRefused("at least 1", () -> c.achievableError(0));
        assertRefused("at least 1", () -> c.converseError(0));
        assertRefused("logarithm", () -> c.achievableError(Information.ofNats(-1.0)));
        for (double epsilon : new double[] {0, 1, Double.NaN}) {
            assertRefused("both excluded", () -> c.achievable(epsilon));
            assertRefused("both excluded", () -> c.converse(epsilon));
            assertRefused("both excluded", () -> c.weakConverse(epsilon));
            assertRefused("both excluded", () -> c.normalApproximation(epsilon));
            assertRefused("both excluded", () -> c.ledger(epsilon));
        }
        List<DensityOperator> large = new ArrayList<>();
        for (int x = 0; x < 7; x++) {
            large.add(RandomStates.hilbertSchmidt(2, x));
        }
        SideInformationCompression seven = SideInformationCompression.of(Ensemble.equiprobable(large));
        // 230230 types of words
        assertRefused("not alike", () -> seven.uses(20).achievable(ERROR));
    }

    private static void assertRefused(String part, Executable asked) {
        InvalidInputException e = assertThrows(InvalidInputException.class, asked);
        assertTrue(e.getMessage().contains(part), e.getMessage());
    }
}
