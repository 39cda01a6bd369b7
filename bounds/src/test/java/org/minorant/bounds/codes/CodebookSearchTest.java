package org.minorant.bounds.codes;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.concurrent.CancellationException;
import java.util.stream.IntStream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.Arguments;
import org.junit.jupiter.params.provider.MethodSource;
import org.minorant.bounds.ClassicalQuantumChannel;
import org.minorant.bounds.CodingBounds;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.Estimate;
import org.minorant.core.InvalidInputException;
import org.minorant.core.pair.WorkListener;

class CodebookSearchTest {

    private static final ClassicalQuantumChannel KETS =
            ClassicalQuantumChannel.of(DensityOperator.ofKet(1, 0), DensityOperator.ofKet(0.6, 0.8));

    private static final ClassicalQuantumChannel BSC =
            ClassicalQuantumChannel.ofStochasticMatrix(new double[][] {{0.875, 0.125}, {0.125, 0.875}});

    private static final ClassicalQuantumChannel QUBITS =
            ClassicalQuantumChannel.of(DensityOperator.ofBloch(0.6, 0, 0.6), DensityOperator.ofBloch(-0.6, 0, 0.6));

    private static final ClassicalQuantumChannel Z =
            ClassicalQuantumChannel.ofStochasticMatrix(new double[][] {{1, 0}, {0.5, 0.5}});

    private static final ClassicalQuantumChannel ANY = ClassicalQuantumChannel.of(
            DensityOperator.ofBloch(0.1, 0.2, 0.8),
            DensityOperator.ofBloch(0.5, -0.3, 0.1),
            DensityOperator.ofKet(0.6, 0.8));

    private static List<Arguments> smallFamilies() {
        RationalInput half = RationalInput.uniform(2);
        return List.of(
                Arguments.of(KETS, half, 1, 2),
                Arguments.of(KETS, half, 3, 2),
                Arguments.of(KETS, half, 2, 4),
                Arguments.of(BSC, half, 3, 4),
                Arguments.of(BSC, RationalInput.of(1, 2), 2, 3),
                Arguments.of(Z, RationalInput.of(2, 3), 2, 5),
                Arguments.of(Z, RationalInput.of(4, 2), 1, 3),
                Arguments.of(QUBITS, half, 2, 3),
                Arguments.of(ANY, RationalInput.of(2, 1, 1), 1, 4),
                Arguments.of(ANY, RationalInput.of(1, 1, 1), 2, 3),
                Arguments.of(ANY, RationalInput.of(1, 2, 3), 1, 3));
    }

    /** f(M − 1) of n uses; of one use of the channel of all words where n uses are not covered. */
    private static Enclosure bound(ClassicalQuantumChannel channel, CodebookFamily family) {
        if (channel != ANY || family.length() == 1) {
            return CodebookSearch.of(channel, family).bound();
        }
        double[] p = family.input().probabilities();
        List<DensityOperator> words = new ArrayList<>();
        List<Double> weights = new ArrayList<>();
        for (int x = 0; x < p.length; x++) {
            for (int y = 0; y < p.length; y++) {
                words.add(channel.outputs().get(x).tensor(channel.outputs().get(y)));
                weights.add(p[x] * p[y]);
            }
        }
        return CodingBounds.of(ClassicalQuantumChannel.of(words))
                .withInput(weights.stream().mapToDouble(w -> w).toArray())
                .achievableError(family.messages());
    }

    /**
     * One-shot random coding for pairwise independent words: over all affine maps of a small field the mean error is at most f(M − 1). It cannot be far below either: for two messages the least error is half of what
     * the pretty-good measurement's is at most, and for the families here no mean is below a third of the bound.
     */
    @ParameterizedTest
    @MethodSource("smallFamilies")
    void meanOfAFamilyKeepsTheRandomCodingBound(
            ClassicalQuantumChannel channel, RationalInput input, int n, int messages) {
        CodebookFamily family = CodebookFamily.of(input, n, messages);
        Enclosure mean = family.averageError(channel);
        Enclosure bound = bound(channel, family);
        // 1e-12 for families that meet the bound
        assertTrue(mean.upper() <= bound.upper() + 1e-12, () -> mean + " and " + bound);
        assertTrue(mean.lower() >= bound.lower() / 3, () -> mean + " and " + bound);
        assertTrue(mean.width() < 1e-11, mean::toString);
    }

    /** The family of two words of one letter over F_2: each of the four pairs of letters once in four, two of them equal. */
    @Test
    void meanIsThatOfPairsOfLetters() {
        CodebookFamily family = CodebookFamily.of(RationalInput.uniform(2), 1, 2);
        // overlap 0.6: Helstrom's error of the two kets is ½(1 − 0.8)
        Enclosure mean = family.averageError(KETS);
        assertEquals((0.5 + 0.1) / 2, mean.midpoint(), 1e-15);
        assertTrue(mean.width() < 1e-14);
    }

    @Test
    void estimatesTheMeanFromDraws() {
        CodebookFamily family = CodebookFamily.of(RationalInput.uniform(2), 3, 4);
        double mean = family.averageError(BSC).midpoint();
        Estimate e = family.averageErrorEstimate(BSC, 2000, 5);
        assertEquals(mean, e.value(), 4 * e.relativeError() * mean);
        assertTrue(e.relativeError() < 0.02);
        assertEquals(e, family.averageErrorEstimate(BSC, 2000, 5));
    }

    private static List<Arguments> searches() {
        RationalInput half = RationalInput.uniform(2);
        return List.of(
                Arguments.of(KETS, half, 7, 8),
                Arguments.of(KETS, half, 40, 16),
                // rates above capacity, where the converse is far from zero
                Arguments.of(KETS, half, 6, 48),
                Arguments.of(BSC, half, 7, 64),
                Arguments.of(BSC, half, 9, 8),
                Arguments.of(QUBITS, half, 8, 4));
    }

    /** A codebook at or below the bound, above the converse, the same again from the seed and from its coefficients. */
    @ParameterizedTest
    @MethodSource("searches")
    void findsACodebookAtOrBelowTheBound(ClassicalQuantumChannel channel, RationalInput input, int n, int messages) {
        CodebookFamily family = CodebookFamily.of(input, n, messages);
        CodebookSearch search = CodebookSearch.of(channel, family).withSeed(11);
        FoundCodebook found = search.find();
        assertTrue(found.error().upper() <= found.bound().lower());
        Enclosure converse = CodingBounds.of(channel).uses(n).converseError(messages);
        assertTrue(found.error().upper() >= converse.lower(), () -> found + " " + converse);
        assertEquals(found, search.find());
        Codebook again = family.ofCoefficients(found.codebook().coefficients());
        assertEquals(found.codebook(), again);
        assertEquals(found.error(), PrettyGoodDecoder.of(channel).errorProbability(again));
    }

    @Test
    void tellsHowFarItIsAndCanBeCancelled() {
        CodebookFamily family = CodebookFamily.of(RationalInput.uniform(2), 7, 8);
        List<Long> told = new ArrayList<>();
        CodebookSearch search = CodebookSearch.of(KETS, family);
        FoundCodebook found =
                search.withProgress((done, total) -> told.add(done)).find();
        assertEquals(
                IntStream.rangeClosed(1, found.draws()).mapToObj(Long::valueOf).toList(), told);
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
        assertThrows(
                CancellationException.class, () -> search.withProgress(stop).find());
    }

    @Test
    void refusesWhatItCannotFind() {
        CodebookFamily family = CodebookFamily.of(RationalInput.uniform(2), 2, 4);
        refused("at least 1", () -> CodebookSearch.of(KETS, family).withDraws(0));
        refused(
                "allow more draws",
                () -> CodebookSearch.of(KETS, family).withDraws(3).find(Enclosure.exact(1e-9)));
        refused("3, as the channel", () -> CodebookSearch.of(ANY, family));
        refused(
                "use averageErrorEstimate",
                () -> CodebookFamily.of(RationalInput.uniform(2), 20, 4).averageError(KETS));
        refused("at least 2", () -> family.averageErrorEstimate(KETS, 1, 0));
    }

    private static void refused(String part, java.util.function.Supplier<?> asked) {
        InvalidInputException e = assertThrows(InvalidInputException.class, asked::get);
        assertTrue(e.getMessage().contains(part), e::getMessage);
    }
}
