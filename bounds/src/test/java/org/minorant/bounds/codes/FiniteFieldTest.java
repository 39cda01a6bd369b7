package org.minorant.bounds.codes;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.HashSet;
import java.util.Set;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;
import org.minorant.core.InvalidInputException;

class FiniteFieldTest {

    @ParameterizedTest
    @ValueSource(ints = {2, 3, 4, 5, 7, 8, 9, 16, 25, 27})
    void obeysTheAxiomsOfAField(int q) {
        FiniteField f = FiniteField.of(q);
        assertEquals(q, f.size());
        for (int a = 0; a < q; a++) {
            Set<Integer> sums = new HashSet<>();
            Set<Integer> products = new HashSet<>();
            assertEquals(a, f.sum(a, 0));
            assertEquals(a, f.product(a, 1));
            assertEquals(0, f.product(a, 0));
            for (int b = 0; b < q; b++) {
                sums.add(f.sum(a, b));
                products.add(f.product(a, b));
                assertEquals(f.sum(a, b), f.sum(b, a));
                assertEquals(f.product(a, b), f.product(b, a));
                for (int c = 0; c < q; c++) {
                    assertEquals(f.sum(f.sum(a, b), c), f.sum(a, f.sum(b, c)));
                    assertEquals(f.product(f.product(a, b), c), f.product(a, f.product(b, c)));
                    assertEquals(f.product(a, f.sum(b, c)), f.sum(f.product(a, b), f.product(a, c)));
                }
            }
            // every element has a negative, and every one but zero an inverse
            assertEquals(q, sums.size());
            assertEquals(a == 0 ? 1 : q, products.size());
        }
    }

    @Test
    void hasTheCharacteristicOfItsPrime() {
        assertEquals(3, FiniteField.of(27).characteristic());
        FiniteField f = FiniteField.of(27);
        for (int a = 0; a < 27; a++) {
            assertEquals(0, f.sum(a, f.sum(a, a)));
        }
    }

    @Test
    void isTheLargestFieldAnElementGenerates() {
        FiniteField f = FiniteField.of(1 << 16);
        int x = 1;
        int order = 0;
        do {
            x = f.product(x, 2);
            order++;
        } while (x != 1);
        assertEquals(65535, order);
        assertTrue(f.product(65535, 65535) < 65536);
    }

    @ParameterizedTest
    @ValueSource(ints = {-4, 0, 1, 6, 12, 100, 131072})
    void refusesOtherNumbersOfElements(int q) {
        assertThrows(InvalidInputException.class, () -> FiniteField.of(q));
    }
}
