package org.minorant.bounds.divergence;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.util.OptionalInt;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.minorant.core.EnclosedMatrix;

/** Ranks of products of whole-number matrices, and of matrices that only the last digit keeps from being singular. */
class ExactRankTest {

    private static EnclosedMatrix product(Random random, int rows, int columns, int rank, boolean real) {
        long[][][] x = numbers(random, rows, rank, real);
        long[][][] y = numbers(random, rank, columns, real);
        EnclosedMatrix.Builder b = EnclosedMatrix.builder(rows, columns);
        for (int i = 0; i < rows; i++) {
            for (int j = 0; j < columns; j++) {
                long re = 0;
                long im = 0;
                for (int k = 0; k < rank; k++) {
                    re += x[0][i][k] * y[0][k][j] - x[1][i][k] * y[1][k][j];
                    im += x[0][i][k] * y[1][k][j] + x[1][i][k] * y[0][k][j];
                }
                b.set(i, j, Math.scalb((double) re, -70), 0, Math.scalb((double) im, -70), 0, 0);
            }
        }
        return b.build();
    }

    private static long[][][] numbers(Random random, int rows, int columns, boolean real) {
        long[][][] a = new long[2][rows][columns];
        for (int i = 0; i < rows; i++) {
            for (int j = 0; j < columns; j++) {
                a[0][i][j] = random.nextInt(2001) - 1000;
                a[1][i][j] = real ? 0 : random.nextInt(2001) - 1000;
            }
        }
        return a;
    }

    @Test
    void productsHaveTheRankOfTheirFactors() {
        Random random = new Random(3);
        for (int[] shape : new int[][] {{1, 1, 1}, {3, 3, 2}, {5, 4, 3}, {4, 7, 1}, {8, 8, 8}, {12, 12, 7}}) {
            for (boolean real : new boolean[] {true, false}) {
                EnclosedMatrix m = product(random, shape[0], shape[1], shape[2], real);
                assertEquals(OptionalInt.of(shape[2]), ExactRank.of(m), shape[0] + " x " + shape[1] + ", real " + real);
            }
        }
    }

    @Test
    void theZeroMatrixHasRankZero() {
        assertEquals(
                OptionalInt.of(0), ExactRank.of(EnclosedMatrix.builder(3, 3).build()));
    }

    @Test
    void trailingPartsCount() {
        EnclosedMatrix.Builder b = EnclosedMatrix.builder(2, 2);
        b.set(0, 0, 1, 0, 0, 0, 0)
                .set(0, 1, 1, 0, 0, 0, 0)
                .set(1, 0, 1, 0, 0, 0, 0)
                .set(1, 1, 1, 0x1p-100, 0, 0, 0);
        assertEquals(OptionalInt.of(2), ExactRank.of(b.build()));
    }

    @Test
    void whatWouldTakeLongIsNotTried() {
        assertEquals(OptionalInt.empty(), ExactRank.of(product(new Random(4), 100, 100, 50, false)));
    }
}
