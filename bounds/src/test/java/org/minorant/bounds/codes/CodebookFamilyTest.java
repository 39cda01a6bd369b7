package org.minorant.bounds.codes;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigInteger;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.function.Supplier;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.Arguments;
import org.junit.jupiter.params.provider.MethodSource;
import org.minorant.core.InvalidInputException;

class CodebookFamilyTest {

    private static List<Arguments> families() {
        return List.of(
                Arguments.of(RationalInput.of(1, 1), 1, 2),
                Arguments.of(RationalInput.of(1, 1), 1, 4),
                Arguments.of(RationalInput.of(1, 1), 2, 3),
                Arguments.of(RationalInput.of(1, 1), 3, 4),
                Arguments.of(RationalInput.of(1, 2), 2, 3),
                Arguments.of(RationalInput.uniform(3), 1, 9),
                Arguments.of(RationalInput.of(3, 0, 1), 2, 4),
                Arguments.of(RationalInput.of(3, 5), 1, 8),
                Arguments.of(RationalInput.of(2, 3), 2, 5),
                Arguments.of(RationalInput.of(4, 4, 1), 1, 9),
                // two fields: 6 = 2 · 3 symbols, 12 = 4 · 3
                Arguments.of(RationalInput.of(1, 2, 3), 1, 4),
                Arguments.of(RationalInput.of(1, 5), 2, 3),
                Arguments.of(RationalInput.of(7, 5), 1, 4));
    }

    /** Over all choices of A and b, in whole numbers: every pair of words of two messages comes as often as independent letters would have it. */
    @ParameterizedTest
    @MethodSource("families")
    void makesPairwiseIndependentWords(RationalInput input, int n, int messages) {
        CodebookFamily family = CodebookFamily.of(input, n, messages);
        int size = family.size().intValueExact();
        List<Map<List<Integer>, Integer>> pairs = new ArrayList<>();
        for (int i = 0; i < messages * messages; i++) {
            pairs.add(new HashMap<>());
        }
        for (int i = 0; i < size; i++) {
            Codebook c = family.get(BigInteger.valueOf(i));
            for (int m = 0; m < messages; m++) {
                for (int k = 0; k < m; k++) {
                    List<Integer> both = new ArrayList<>();
                    Arrays.stream(c.word(m)).forEach(both::add);
                    Arrays.stream(c.word(k)).forEach(both::add);
                    pairs.get(m * messages + k).merge(both, 1, Integer::sum);
                }
            }
        }
        long letters = Arrays.stream(input.counts()).filter(x -> x > 0).count();
        long symbols = Math.round(Math.pow(input.denominator(), 2 * n));
        for (int m = 0; m < messages; m++) {
            for (int k = 0; k < m; k++) {
                Map<List<Integer>, Integer> seen = pairs.get(m * messages + k);
                assertEquals(Math.round(Math.pow(letters, 2 * n)), seen.size());
                seen.forEach((both, count) -> {
                    long expected = size;
                    for (int x : both) {
                        expected *= input.counts()[x];
                    }
                    assertEquals(expected, count * symbols, () -> both + " " + count);
                });
            }
        }
    }

    /** F_4 by hand: b + a·m with the elements 0, 1, x, x + 1 numbered 0 to 3 and x² = x + 1. */
    @Test
    void evaluatesTheMap() {
        CodebookFamily family = CodebookFamily.of(RationalInput.uniform(4), 1, 4);
        Codebook c = family.ofCoefficients(List.of(new int[] {1, 2}));
        assertEquals(1, c.letter(0, 0));
        assertEquals(3, c.letter(1, 0));
        assertEquals(2, c.letter(2, 0));
        assertEquals(0, c.letter(3, 0));
    }

    @Test
    void drawsTheSameCodebookFromASeedAndFromItsCoefficients() {
        CodebookFamily family = CodebookFamily.of(RationalInput.of(5, 7, 12), 40, 300);
        Codebook c = family.draw(7);
        assertEquals(c, family.draw(7));
        assertEquals(c.hashCode(), family.draw(7).hashCode());
        assertNotEquals(c, family.draw(8));
        assertEquals(c, family.ofCoefficients(c.coefficients()));
        assertEquals(300, c.messages());
        assertEquals(40, c.length());
        // 24 = 8 · 3: fields of 8 and 3 elements, and 300 messages need 3 and 6 digits
        assertEquals(2, c.coefficients().size());
        assertEquals(40 * 4, c.coefficients().get(0).length);
        assertEquals(40 * 7, c.coefficients().get(1).length);
        assertEquals(
                BigInteger.valueOf(8).pow(160).multiply(BigInteger.valueOf(3).pow(280)), family.size());
    }

    /** 200 words of 60 letters: counts within five standard deviations of their means, for this seed. */
    @Test
    void drawsLettersWithTheirProbabilities() {
        CodebookFamily family = CodebookFamily.of(RationalInput.of(1, 3, 0, 6), 6000, 2);
        int[] seen = new int[4];
        Codebook c = family.draw(1);
        for (int m = 0; m < 2; m++) {
            for (int x : c.word(m)) {
                seen[x]++;
            }
        }
        assertEquals(0, seen[2]);
        for (int x : new int[] {0, 1, 3}) {
            double p = family.input().probabilities()[x];
            assertEquals(12000 * p, seen[x], 5 * Math.sqrt(12000 * p * (1 - p)));
        }
    }

    @Test
    void refusesWhatMakesNoCodebook() {
        RationalInput half = RationalInput.uniform(2);
        refused("at least 2", () -> CodebookFamily.of(half, 4, 1));
        refused("at least 1 letter", () -> CodebookFamily.of(half, 0, 2));
        refused("letters in all", () -> CodebookFamily.of(half, 1 << 20, 1 << 10));
        refused("at least 0", () -> RationalInput.of(3, -1));
        refused("2 to 65536", () -> RationalInput.of(1, 0));
        refused("2 to 65536", () -> RationalInput.of(Integer.MAX_VALUE, Integer.MAX_VALUE));
        refused("2 to 65536", RationalInput::of);
        refused("0 to 65535", () -> CodebookFamily.of(half, 8, 2).get(BigInteger.valueOf(65536)));
        refused("0 to 65535", () -> CodebookFamily.of(half, 8, 2).get(BigInteger.valueOf(-1)));
        CodebookFamily family = CodebookFamily.of(half, 2, 2);
        refused("1 fields", () -> family.ofCoefficients(List.of()));
        refused("2 for each position", () -> family.ofCoefficients(List.of(new int[3])));
        refused("0 to 1", () -> family.ofCoefficients(List.of(new int[] {0, 1, 2, 0})));
    }

    private static void refused(String part, Supplier<?> asked) {
        InvalidInputException e = assertThrows(InvalidInputException.class, asked::get);
        assertTrue(e.getMessage().contains(part), e::getMessage);
    }
}
