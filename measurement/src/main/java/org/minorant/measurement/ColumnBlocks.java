package org.minorant.measurement;

import java.util.ArrayList;
import java.util.List;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.HermitianOperator;

/**
 * Columns of several operators side by side, Z = (X_1, X_2, …), and the measurement that its polar isometry W = (ZZ*)^(-½)Z makes: M_i = W_i W_i*.
 */
final class ColumnBlocks {

    private final EnclosedMatrix matrix;
    private final int[] offsets;

    private ColumnBlocks(EnclosedMatrix matrix, int[] offsets) {
        this.matrix = matrix;
        this.offsets = offsets;
    }

    /** Collects blocks of rows × any number of columns, none included; at least one column in all. */
    static final class Builder {

        private final int rows;
        private final List<EnclosedMatrix> parts = new ArrayList<>();
        private final List<Integer> offsets = new ArrayList<>(List.of(0));

        Builder(int rows) {
            this.rows = rows;
        }

        void add(EnclosedMatrix block) {
            parts.add(block);
            offsets.add(width() + block.columns());
        }

        /** A block without columns: the zero operator. */
        void addEmpty() {
            offsets.add(width());
        }

        int width() {
            return offsets.get(offsets.size() - 1);
        }

        ColumnBlocks build() {
            EnclosedMatrix.Builder z = EnclosedMatrix.builder(rows, width());
            int c = 0;
            for (EnclosedMatrix x : parts) {
                for (int j = 0; j < x.columns(); j++, c++) {
                    for (int i = 0; i < rows; i++) {
                        z.set(i, c, x.re(i, j), x.reTail(i, j), x.im(i, j), x.imTail(i, j), x.radius(i, j));
                    }
                }
            }
            return new ColumnBlocks(
                    z.build(), offsets.stream().mapToInt(Integer::intValue).toArray());
        }
    }

    /** Z. */
    EnclosedMatrix matrix() {
        return matrix;
    }

    /** The number of blocks. */
    int size() {
        return offsets.length - 1;
    }

    /** The first column of a block; that of the block after the last is the number of columns. */
    int offset(int block) {
        return offsets[block];
    }

    /** M_i = W_i W_i* for each block, rounded to doubles, in a list that the caller may add to. */
    List<HermitianOperator> measurement(PolarFactors polar) {
        List<HermitianOperator> out = new ArrayList<>();
        for (int i = 0; i < size(); i++) {
            out.add(element(polar, i));
        }
        return out;
    }

    private HermitianOperator element(PolarFactors polar, int block) {
        int from = offsets[block];
        int count = offsets[block + 1] - from;
        if (count == 0) {
            return HermitianOperator.identity(matrix.rows()).times(0);
        }
        EnclosedMatrix r = polar.right();
        EnclosedMatrix.Builder b = EnclosedMatrix.builder(count, r.columns());
        for (int i = 0; i < count; i++) {
            for (int j = 0; j < r.columns(); j++) {
                int k = from + i;
                b.set(i, j, r.re(k, j), r.reTail(k, j), r.im(k, j), r.imTail(k, j), 0);
            }
        }
        EnclosedMatrix w = polar.left().times(b.build().adjoint());
        return Projectors.hermitian(w.times(w.adjoint()));
    }

    /** The projector onto what the columns leave out, 1 − LL*, rounded to doubles. */
    static HermitianOperator kernel(PolarFactors polar) {
        EnclosedMatrix l = polar.left();
        return Projectors.hermitian(EnclosedMatrix.identity(l.rows()).minus(l.times(l.adjoint())));
    }
}
