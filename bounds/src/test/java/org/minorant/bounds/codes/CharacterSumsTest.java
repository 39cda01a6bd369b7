package org.minorant.bounds.codes;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.Arguments;
import org.junit.jupiter.params.provider.MethodSource;
import org.minorant.bounds.ClassicalQuantumChannel;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.pair.WorkListener;

class CharacterSumsTest {

    private static final Watch WATCH = new Watch(WorkListener.NONE);

    private static final ClassicalQuantumChannel TWO =
            ClassicalQuantumChannel.of(DensityOperator.ofKet(1, 0), DensityOperator.ofKet(0.6, 0.8));

    /** A phase between two kets changes nothing. */
    private static final ClassicalQuantumChannel PHASE = ClassicalQuantumChannel.of(
            DensityOperator.ofKet(1, 0), DensityOperator.ofKet(new double[] {0.36, 0.8}, new double[] {0.48, 0}));

    /** Kets (1, e^(iφ), e^(2iφ))/√3 at q equal angles: complex inner products that depend on the difference of the angles. */
    private static ClassicalQuantumChannel phases(int q) {
        DensityOperator[] kets = new DensityOperator[q];
        double r = 1 / Math.sqrt(3);
        for (int x = 0; x < q; x++) {
            double phi = 2 * Math.PI * x / q;
            kets[x] = DensityOperator.ofKet(
                    new double[] {r, r * Math.cos(phi), r * Math.cos(2 * phi)},
                    new double[] {0, r * Math.sin(phi), r * Math.sin(2 * phi)});
        }
        return ClassicalQuantumChannel.of(kets);
    }

    private static List<Arguments> codes() {
        RationalInput half = RationalInput.uniform(2);
        return List.of(
                Arguments.of(TWO, half, 7, 16),
                Arguments.of(TWO, half, 4, 32),
                Arguments.of(TWO, half, 50, 8),
                Arguments.of(PHASE, half, 5, 8),
                Arguments.of(TWO, RationalInput.of(2, 2), 5, 8),
                Arguments.of(TWO, RationalInput.of(4, 4), 3, 64),
                Arguments.of(phases(3), RationalInput.uniform(3), 4, 27),
                Arguments.of(phases(5), RationalInput.uniform(5), 4, 25),
                Arguments.of(phases(7), RationalInput.uniform(7), 3, 7));
    }

    /** Against the Gram matrix to 30 digits, for codes with and without words that are equal. */
    @ParameterizedTest
    @MethodSource("codes")
    void agreesWithTheGramMatrix(ClassicalQuantumChannel channel, RationalInput input, int n, int messages) {
        LetterColumns letters = LetterColumns.of(channel);
        for (int seed = 0; seed < 4; seed++) {
            Codebook code = CodebookFamily.of(input, n, messages).draw(seed);
            Enclosure e = CharacterSums.of(code, letters, WATCH).orElseThrow().error();
            WordColumns words = WordColumns.of(code, letters);
            Enclosure expected = new WordGram(words, WATCH).precise();
            if (input.letters() == input.denominator()) {
                assertEquals(
                        words.size(),
                        CharacterSums.of(code, letters, WATCH).orElseThrow().size());
            }
            assertTrue(!e.isCertainlyBelow(expected) && !expected.isCertainlyBelow(e), () -> e + " and " + expected);
            assertTrue(e.width() < 1e-5, e::toString);
            if (expected.lower() > 1e-25 && expected.upper() < 1e-9) {
                assertTrue(e.relativeWidth() < 1e-6, e::toString);
            }
        }
    }

    /** All words of 12 letters, each letter r times: the eigenvalues are products of 1 ± c^r, so that h = (½√(1+c^r) + ½√(1−c^r))^12. */
    @Test
    void holdsTheClosedFormOfAllWords() {
        for (int r : new int[] {1, 2, 5, 20, 60}) {
            int n = 12 * r;
            int[] coefficients = new int[n * 13];
            for (int j = 0; j < n; j++) {
                coefficients[j * 13 + 1 + j / r] = 1;
            }
            Codebook code = CodebookFamily.of(RationalInput.uniform(2), n, 4096).ofCoefficients(List.of(coefficients));
            Enclosure e = PrettyGoodDecoder.of(TWO).errorProbability(code);
            // 1 − h² = 1 − (1 − x)^12 with 1 − x = ((½(√(1+g) + √(1−g)))² = ½(1 + √(1−g²)): Helstrom's success of two
            // kets
            double g2 = Math.pow(0.6, 2 * r);
            double x = g2 / 2 / (1 + Math.sqrt(1 - g2));
            double closed = -Math.expm1(12 * Math.log1p(-x));
            double slack = closed * r * 1e-13;
            assertTrue(e.lower() <= closed + slack && e.upper() >= closed - slack, () -> closed + " " + e);
            // for r = 1 the least eigenvalue is 0.4^12, and rounding is in proportion to the largest, 1.6^12
            assertTrue(e.relativeWidth() < 1e-9, () -> e + " " + e.relativeWidth());
        }
    }

    /** 2^14 messages, where no matrix would fit. */
    @Test
    void goesBeyondMatrices() {
        Codebook code = CodebookFamily.of(RationalInput.uniform(2), 50, 1 << 14).draw(4);
        Enclosure e = PrettyGoodDecoder.of(TWO).errorProbability(code);
        assertTrue(e.upper() < 0.05 && e.lower() > 0, e::toString);
        assertTrue(e.width() < 1e-8, e::toString);
    }

    @Test
    void leavesOtherCodesAlone() {
        ClassicalQuantumChannel three = ClassicalQuantumChannel.of(
                DensityOperator.ofKet(1, 0), DensityOperator.ofKet(0.6, 0.8), DensityOperator.ofKet(0.8, 0.6));
        ClassicalQuantumChannel mixed =
                ClassicalQuantumChannel.of(DensityOperator.ofKet(1, 0), DensityOperator.ofBloch(0.1, 0, 0.2));
        RationalInput half = RationalInput.uniform(2);
        assertFalse(
                found(three, CodebookFamily.of(RationalInput.uniform(3), 4, 9).draw(1)));
        assertFalse(found(mixed, CodebookFamily.of(half, 4, 8).draw(1)));
        // 7 messages are no group, two fields are not one, 1:2 is not symmetric, and words given have no coefficients
        assertFalse(found(TWO, CodebookFamily.of(half, 4, 7).draw(1)));
        assertFalse(found(TWO, CodebookFamily.of(RationalInput.of(3, 3), 4, 8).draw(1)));
        assertFalse(found(TWO, CodebookFamily.of(RationalInput.of(1, 2), 4, 9).draw(1)));
        assertFalse(found(TWO, Codebook.of(new int[] {0, 0}, new int[] {0, 1}, new int[] {1, 0}, new int[] {1, 1})));
        assertTrue(found(TWO, CodebookFamily.of(half, 4, 8).draw(1)));
    }

    private static boolean found(ClassicalQuantumChannel channel, Codebook code) {
        return CharacterSums.of(code, LetterColumns.of(channel), WATCH).isPresent();
    }
}
