package org.minorant.measurement;

import org.minorant.core.EnclosedMatrix;

/**
 * Hilbert–Schmidt inner products ⟨A, B⟩ = Tr A*B and squared norms to about 30 digits, with their radii; the cost is one multiplication an
 * entry.
 *
 * <p>Entries are taken row by row in pieces of bounded length, so that the error bound of a product, which grows with the square of its inner
 * dimension, stays near 2^-86 however large the matrices are.
 */
final class Inner {

    private static final int PIECE = 128;

    private Inner() {}

    /** The 1 × 1 matrix Tr A*B = Σ conj(a_ij) b_ij. */
    static EnclosedMatrix product(EnclosedMatrix a, EnclosedMatrix b) {
        return product(a, b, 0, a.rows(), 0, a.columns());
    }

    /** The 1 × 1 matrix Σ |a_ij|² over the given rows and columns, ends excluded. */
    static EnclosedMatrix squaredNorm(EnclosedMatrix a, int fromRow, int toRow, int fromColumn, int toColumn) {
        return product(a, a, fromRow, toRow, fromColumn, toColumn);
    }

    private static EnclosedMatrix product(EnclosedMatrix a, EnclosedMatrix b, int r0, int r1, int c0, int c1) {
        EnclosedMatrix sum = EnclosedMatrix.builder(1, 1).build();
        int width = c1 - c0;
        long count = (long) (r1 - r0) * width;
        for (long from = 0; from < count; from += PIECE) {
            int length = (int) Math.min(PIECE, count - from);
            EnclosedMatrix.Builder x = EnclosedMatrix.builder(length, 1);
            EnclosedMatrix.Builder y = EnclosedMatrix.builder(length, 1);
            for (int k = 0; k < length; k++) {
                int i = r0 + (int) ((from + k) / width);
                int j = c0 + (int) ((from + k) % width);
                copy(a, i, j, x, k);
                copy(b, i, j, y, k);
            }
            sum = sum.plus(x.build().adjoint().times(y.build()));
        }
        return sum;
    }

    private static void copy(EnclosedMatrix a, int i, int j, EnclosedMatrix.Builder to, int k) {
        to.set(k, 0, a.re(i, j), a.reTail(i, j), a.im(i, j), a.imTail(i, j), a.radius(i, j));
    }
}
