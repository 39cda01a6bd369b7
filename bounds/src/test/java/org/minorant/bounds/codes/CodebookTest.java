package org.minorant.bounds.codes;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.function.Supplier;
import org.junit.jupiter.api.Test;
import org.minorant.bounds.ClassicalQuantumChannel;
import org.minorant.core.DensityOperator;
import org.minorant.core.InvalidInputException;

class CodebookTest {

    private static final ClassicalQuantumChannel TWO =
            ClassicalQuantumChannel.of(DensityOperator.ofKet(1, 0), DensityOperator.ofKet(0.6, 0.8));

    @Test
    void keepsItsWords() {
        int[][] words = {{0, 1, 1}, {2, 0, 0}};
        Codebook c = Codebook.of(words);
        words[0][0] = 7;
        c.word(1)[0] = 7;
        assertArrayEquals(new int[] {0, 1, 1}, c.word(0));
        assertArrayEquals(new int[] {2, 0, 0}, c.word(1));
        assertEquals(1, c.letter(0, 2));
        assertEquals(Codebook.of(new int[] {0, 1, 1}, new int[] {2, 0, 0}), c);
        assertEquals("codebook of 2 words of 3 letters", c.toString());
    }

    @Test
    void makesTheEnsembleOfItsWords() {
        var e = Codebook.of(new int[] {0, 1}, new int[] {1, 1}).ensemble(TWO);
        assertEquals(2, e.size());
        assertEquals(4, e.dimension());
        assertEquals(0.36, e.state(0).re(0, 0), 1e-15);
        assertEquals(0.1296, e.state(1).re(0, 0), 1e-15);
    }

    @Test
    void refusesWhatIsNoCodebook() {
        refused("at least 2", () -> Codebook.of(new int[] {0}));
        refused("at least 2", Codebook::of);
        refused("word 1 has 1 letters, expected 2, as word 0", () -> Codebook.of(new int[] {0, 1}, new int[] {0}));
        refused("at least 1 letter", () -> Codebook.of(new int[0], new int[0]));
        refused("letter 1 of word 0 is -1", () -> Codebook.of(new int[] {0, -1}, new int[] {0, 0}));
        Codebook c = Codebook.of(new int[] {0, 1}, new int[] {0, 2});
        refused("letter 1 of word 1 is 2, expected 0 to 1", () -> c.ensemble(TWO));
        refused("at most 4096", () -> Codebook.of(new int[13], new int[13]).ensemble(TWO));
        refused("the message is 2", () -> c.word(2));
        refused("the position is -1", () -> c.letter(0, -1));
    }

    private static void refused(String part, Supplier<?> asked) {
        InvalidInputException e = assertThrows(InvalidInputException.class, asked::get);
        assertTrue(e.getMessage().contains(part), e::getMessage);
    }
}
