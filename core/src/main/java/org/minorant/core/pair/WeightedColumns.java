package org.minorant.core.pair;

import java.util.Optional;
import java.util.function.Supplier;
import org.minorant.core.EnclosedMatrix;

/**
 * Columns X and Y, weights included, with their inner products, those across in units of 2^exponent. The inner products define the pair; the columns, made when first needed, guide the rotations.
 *
 * @param columnsX X, near enough
 * @param columnsY Y, near enough
 * @param gx X*X
 * @param gy Y*Y
 * @param cross X*Y / 2^exponent
 * @param exponent the unit of cross
 */
record WeightedColumns(
        Supplier<EnclosedMatrix> columnsX,
        Supplier<EnclosedMatrix> columnsY,
        EnclosedMatrix gx,
        EnclosedMatrix gy,
        EnclosedMatrix cross,
        int exponent) {

    EnclosedMatrix x() {
        return columnsX.get();
    }

    EnclosedMatrix y() {
        return columnsY.get();
    }

    HyperbolicSweeps sweep(Runnable checkpoint) {
        return HyperbolicSweeps.run(x(), y(), gx, gy, cross, exponent, checkpoint);
    }

    /** The same with the largest inner product across near one; empty if all are zero, which makes f zero. */
    Optional<WeightedColumns> rescaled() {
        double largest = 0;
        for (int i = 0; i < cross.rows(); i++) {
            for (int j = 0; j < cross.columns(); j++) {
                largest = Math.max(largest, cross.modulusUpper(i, j));
            }
        }
        if (largest == 0) {
            return Optional.empty();
        }
        int e = Math.getExponent(largest);
        return Optional.of(new WeightedColumns(columnsX, columnsY, gx, gy, powerOfTwo(cross, -e), exponent + e));
    }

    /** m · 2^e in steps that do not overflow. */
    private static EnclosedMatrix powerOfTwo(EnclosedMatrix m, int e) {
        int half = e / 2;
        return m.times(Math.scalb(1.0, half)).times(Math.scalb(1.0, e - half));
    }
}
