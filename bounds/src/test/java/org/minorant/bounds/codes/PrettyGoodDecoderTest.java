package org.minorant.bounds.codes;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Arrays;
import java.util.List;
import java.util.concurrent.CancellationException;
import java.util.stream.IntStream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.Arguments;
import org.junit.jupiter.params.provider.MethodSource;
import org.minorant.bounds.ClassicalQuantumChannel;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.InvalidInputException;
import org.minorant.core.WideDouble;
import org.minorant.core.pair.WorkListener;
import org.minorant.measurement.PrettyGoodMeasurement;

class PrettyGoodDecoderTest {

    private static final ClassicalQuantumChannel TWO_KETS =
            ClassicalQuantumChannel.of(DensityOperator.ofKet(1, 0), DensityOperator.ofKet(0.28, 0.96));

    private static final ClassicalQuantumChannel TRINE = ClassicalQuantumChannel.of(
            DensityOperator.ofKet(1, 0),
            DensityOperator.ofKet(-0.5, Math.sqrt(0.75)),
            DensityOperator.ofKet(-0.5, -Math.sqrt(0.75)));

    private static final ClassicalQuantumChannel MIXED = ClassicalQuantumChannel.of(
            DensityOperator.ofBloch(0.1, 0.2, 0.8),
            DensityOperator.ofBloch(0.5, -0.3, 0.1),
            DensityOperator.ofKet(0.6, 0.8));

    private static Codebook repetition(int letters, int n) {
        int[][] words = new int[letters][n];
        for (int x = 0; x < letters; x++) {
            Arrays.fill(words[x], x);
        }
        return Codebook.of(words);
    }

    /** Square-root success of n copies, equiprobable; computed independently from Gram matrices. */
    private static List<Arguments> copies() {
        double t = 1 / Math.sqrt(3);
        double h = Math.sqrt(0.5);
        ClassicalQuantumChannel tetrahedron = ClassicalQuantumChannel.of(
                DensityOperator.ofBloch(t, t, t),
                DensityOperator.ofBloch(t, -t, -t),
                DensityOperator.ofBloch(-t, t, -t),
                DensityOperator.ofBloch(-t, -t, t));
        ClassicalQuantumChannel circle = ClassicalQuantumChannel.of(
                DensityOperator.ofKet(1, 0),
                DensityOperator.ofKet(h, h),
                DensityOperator.ofKet(0, 1),
                DensityOperator.ofKet(h, -h));
        double[] trines = {.666666666667, .971404520791, .991581623797, .998102131254, .999503686738, .999878859588};
        double[] tetrahedra = {.5, .75, .971404520791, .991581623797, .996903995000, .998930038800};
        double[] circles = {.5, .728553390593, .933012701892, .966216088618, .984122918276, .992045577703};
        return IntStream.range(0, 6)
                .boxed()
                .flatMap(i -> java.util.stream.Stream.of(
                        Arguments.of(TRINE, 3, i + 1, trines[i]),
                        Arguments.of(tetrahedron, 4, i + 1, tetrahedra[i]),
                        Arguments.of(circle, 4, i + 1, circles[i])))
                .toList();
    }

    @ParameterizedTest
    @MethodSource("copies")
    void decodesRepetitionsAsPublishedForCopies(ClassicalQuantumChannel channel, int letters, int n, double success) {
        Enclosure e = PrettyGoodDecoder.of(channel).errorProbability(repetition(letters, n));
        assertEquals(1 - success, e.midpoint(), 6e-13);
        // singular for one copy, where the root of 1e-27 is what is certain
        assertTrue(e.width() < 1e-12, e::toString);
    }

    /** Two equiprobable kets: the pretty-good measurement is Helstrom's, with error ½(1 − √(1 − c²)) = ½c²/(1 + √(1 − c²)), c = 0.28^distance. */
    @Test
    void isOptimalForTwoKets() {
        for (int n : new int[] {1, 2, 5, 20, 60}) {
            int[] other = new int[n];
            Arrays.fill(other, 0, n, 1);
            Enclosure e = PrettyGoodDecoder.of(TWO_KETS).errorProbability(Codebook.of(new int[n], other));
            // the overlap of the normalised kets, 0.28/|ψ| with the doubles nearest 0.28 and 0.96, is 0.28 within 2
            // units of 2^-53
            double c2 = Math.pow(0.28, 2 * n);
            double helstrom = c2 / 2 / (1 + Math.sqrt(1 - c2));
            double slack = helstrom * n * 0x1p-49;
            assertTrue(e.lower() <= helstrom + slack && e.upper() >= helstrom - slack, () -> n + " " + e);
            // the norm of H off the diagonal is known to 1e-27: 1e-27 over 0.28^n, twice
            double relative = 1e-25 / Math.pow(0.28, n) + 1e-13;
            assertTrue(relative > 1 || e.relativeWidth() < relative, () -> n + " " + e);
        }
    }

    /** The binary symmetric channel with crossover p, by sums over outputs at a given distance, written out. */
    @Test
    void agreesWithClosedFormsOfSmallClassicalCodes() {
        double p = 0.11;
        double q = 1 - p;
        ClassicalQuantumChannel bsc = ClassicalQuantumChannel.ofStochasticMatrix(new double[][] {{q, p}, {p, q}});
        PrettyGoodDecoder decoder = PrettyGoodDecoder.of(bsc);
        // repetition: outputs with k ones, a = q^(n−k)p^k against b = q^k p^(n−k); error ½ Σ 2ab/(a+b)
        for (int n : new int[] {1, 3, 6}) {
            double sum = 0;
            double binomial = 1;
            for (int k = 0; k <= n; k++) {
                double a = Math.pow(q, n - k) * Math.pow(p, k);
                double b = Math.pow(q, k) * Math.pow(p, n - k);
                sum += binomial * a * b / (a + b);
                binomial = binomial * (n - k) / (k + 1);
            }
            assertContains(decoder.errorProbability(repetition(2, n)), sum, 1e-14);
        }
        // even weight, length 3: an even output is a word, or two letters from three; an odd one is one letter from
        // three words, three from one
        Codebook parity = Codebook.of(new int[3], new int[] {0, 1, 1}, new int[] {1, 0, 1}, new int[] {1, 1, 0});
        double even = expectedOf(q * q * q, q * p * p, q * p * p, q * p * p);
        double odd = expectedOf(p * p * p, q * q * p, q * q * p, q * q * p);
        assertContains(decoder.errorProbability(parity), even + odd, 1e-14);
    }

    /** ¼ · 4 outputs of Σ a(s−a)/s. */
    private static double expectedOf(double... a) {
        double s = Arrays.stream(a).sum();
        return Arrays.stream(a).map(x -> x * (s - x) / s).sum();
    }

    private static void assertContains(Enclosure e, double value, double relative) {
        assertTrue(e.lower() <= value * (1 + relative) && e.upper() >= value * (1 - relative), () -> e + " " + value);
        assertTrue(e.relativeWidth() < 1e-12, e::toString);
    }

    /** A classical channel turned to another basis takes the other ways, and must give the same. */
    @Test
    void agreesForAClassicalChannelInAnotherBasis() {
        ClassicalQuantumChannel turned =
                ClassicalQuantumChannel.of(DensityOperator.ofBloch(0.5, 0, 0), DensityOperator.ofBloch(-0.5, 0, 0));
        ClassicalQuantumChannel straight =
                ClassicalQuantumChannel.ofStochasticMatrix(new double[][] {{0.75, 0.25}, {0.25, 0.75}});
        Codebook code = CodebookFamily.of(RationalInput.uniform(2), 4, 8).draw(3);
        Enclosure expected = PrettyGoodDecoder.of(straight).errorProbability(code);
        assertTrue(expected.relativeWidth() < 1e-12);
        for (Enclosure e : allWays(turned, code)) {
            assertTrue(e.width() < 1e-5, e::toString);
            assertOverlap(expected, e);
        }
    }

    /** Kets and mixed letters, real and complex, words that are equal, that span less than their number: the measurement of the ensemble and all ways agree. */
    @Test
    void allWaysAgreeWithTheMeasurementOfTheEnsemble() {
        List<Codebook> codes = List.of(
                CodebookFamily.of(RationalInput.uniform(2), 3, 6).draw(1),
                CodebookFamily.of(RationalInput.uniform(2), 2, 4).draw(5),
                Codebook.of(new int[] {0, 1, 1}, new int[] {1, 1, 0}, new int[] {0, 1, 1}, new int[] {0, 0, 0}),
                Codebook.of(new int[] {1, 1}, new int[] {1, 1}, new int[] {1, 1}));
        for (ClassicalQuantumChannel channel : List.of(TWO_KETS, TRINE, MIXED)) {
            for (Codebook code : codes) {
                Enclosure expected =
                        PrettyGoodMeasurement.of(code.ensemble(channel)).errorProbability();
                // letters are divided by their traces here and not there, each 1 within 2^-52, and priors are rounded
                Enclosure wide = expected.widen(1e-14);
                List<Enclosure> ways = allWays(channel, code);
                // where a matrix is singular, what is left of 1e-28 and of 1e-14 is about its root
                assertTrue(ways.get(0).width() < 1e-12, () -> ways.get(0).toString());
                for (Enclosure e : ways) {
                    assertTrue(e.width() < 1e-5, e::toString);
                    assertOverlap(wide, e);
                }
            }
        }
    }

    /** The Gram matrix to 30 digits and in double, and the space of outputs. */
    private static List<Enclosure> allWays(ClassicalQuantumChannel channel, Codebook code) {
        WordColumns words = WordColumns.of(code, LetterColumns.of(channel));
        Watch watch = new Watch(WorkListener.NONE);
        return List.of(
                new WordGram(words, watch).precise(),
                new WordGram(words, watch).inDouble(),
                new OutputSpace(words, watch).error());
    }

    private static void assertOverlap(Enclosure a, Enclosure b) {
        assertTrue(!a.isCertainlyBelow(b) && !b.isCertainlyBelow(a), () -> a + " and " + b);
    }

    /** More columns than are taken to 30 digits, in 2^9 dimensions, and more than 2^8 dimensions hold. */
    @Test
    void waysInDoubleAgreeOnHundredsOfWords() {
        Watch watch = new Watch(WorkListener.NONE);
        Codebook code = firstWords(2, 9, 260);
        WordColumns words = WordColumns.of(code, LetterColumns.of(TWO_KETS));
        assertTrue(words.count() > WordGram.PRECISE);
        Enclosure gram = PrettyGoodDecoder.of(TWO_KETS).errorProbability(code);
        assertTrue(gram.width() < 1e-11, gram::toString);
        assertEquals(new WordGram(words, watch).inDouble(), gram);
        assertOverlap(gram, new OutputSpace(words, watch).error());
        Codebook triples = firstWords(3, 6, 300);
        WordColumns many = WordColumns.of(triples, LetterColumns.of(TRINE));
        assertTrue(many.count() > WordGram.PRECISE);
        Enclosure space = PrettyGoodDecoder.of(TRINE).errorProbability(triples);
        assertTrue(space.width() < 1e-10, space::toString);
        assertEquals(new OutputSpace(many, watch).error(), space);
        assertOverlap(space, new WordGram(many, watch).inDouble());
    }

    /** The digits of 0, 7, 14, … in a base: for 7 prime to it, different words. */
    private static Codebook firstWords(int base, int n, int messages) {
        int size = (int) Math.round(Math.pow(base, n));
        int[][] words = new int[messages][n];
        for (int m = 0; m < messages; m++) {
            for (int j = 0, rest = 7 * m % size; j < n; j++, rest /= base) {
                words[m][j] = rest % base;
            }
        }
        return Codebook.of(words);
    }

    /** Words that no receiver can tell apart, and words that all can. */
    @Test
    void knowsTheExtremes() {
        Codebook same = Codebook.of(new int[] {0, 1}, new int[] {0, 1}, new int[] {0, 1});
        for (ClassicalQuantumChannel channel : List.of(TWO_KETS, TRINE, MIXED)) {
            Enclosure e = PrettyGoodDecoder.of(channel).errorProbability(same);
            assertEquals(2.0 / 3, e.midpoint(), 1e-14);
            assertTrue(e.width() < 1e-14, e::toString);
        }
        ClassicalQuantumChannel apart =
                ClassicalQuantumChannel.of(DensityOperator.ofKet(0.6, 0.8), DensityOperator.ofKet(0.8, -0.6));
        Enclosure none = PrettyGoodDecoder.of(apart).errorProbability(repetition(2, 3));
        assertEquals(0, none.lower());
        assertTrue(none.upper() < 1e-45, none::toString);
        ClassicalQuantumChannel noiseless = ClassicalQuantumChannel.ofStochasticMatrix(new double[][] {{1, 0}, {0, 1}});
        Enclosure zero = PrettyGoodDecoder.of(noiseless).errorProbability(repetition(2, 3));
        assertEquals(0, zero.lower());
        assertTrue(zero.upperWide().compareTo(WideDouble.of(1e-250)) < 0);
    }

    /** Equal letters under two names make linearly dependent words that are not equal. */
    @Test
    void holdsForLettersThatAreAlike() {
        ClassicalQuantumChannel alike =
                ClassicalQuantumChannel.of(DensityOperator.ofKet(0.6, 0.8), DensityOperator.ofKet(0.6, 0.8));
        for (Enclosure e : allWays(alike, repetition(2, 5))) {
            assertTrue(e.contains(0.5), e::toString);
            assertTrue(e.width() < 1e-5, e::toString);
        }
    }

    @Test
    void refusesWhatItCannotDo() {
        PrettyGoodDecoder decoder = PrettyGoodDecoder.of(MIXED);
        refused("letter 0 of word 3 is 3, expected 0 to 2", decoder, repetition(4, 2));
        refused("at most 4096 columns", decoder, repetition(3, 13));
        CodebookFamily many = CodebookFamily.of(RationalInput.uniform(2), 40, 4200);
        refused("at most 4096 columns", PrettyGoodDecoder.of(TWO_KETS), many.draw(1));
    }

    private static void refused(String part, PrettyGoodDecoder decoder, Codebook code) {
        InvalidInputException e = assertThrows(InvalidInputException.class, () -> decoder.errorProbability(code));
        assertTrue(e.getMessage().contains(part), e::getMessage);
    }

    @Test
    void endsWhenAskedTo() {
        WorkListener stop = new WorkListener() {
            @Override
            public void onProgress(long done, long total) {
                // not followed here
            }

            @Override
            public boolean isCancelled() {
                return true;
            }
        };
        PrettyGoodDecoder decoder = PrettyGoodDecoder.of(MIXED).withProgress(stop);
        assertThrows(CancellationException.class, () -> decoder.errorProbability(repetition(3, 2)));
    }
}
