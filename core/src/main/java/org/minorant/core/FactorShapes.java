package org.minorant.core;

import org.minorant.core.internal.message.Checks;
import org.minorant.core.internal.number.DoubleDouble;

/**
 * What tensor products, direct sums, permutations and partial traces of positive operators do to their factors.
 *
 * <p>Permutations, direct sums and partial traces only move numbers: (1 ⊗ ⟨b|)X for all b, side by side, is a factor of the partial trace over
 * the second system. They keep relative errors, and trace errors too since the maps preserve traces. Tensor products multiply numbers; where
 * some product is not exact, {@link FactorRounding} says what it costs.
 */
final class FactorShapes {

    private FactorShapes() {}

    /**
     * (1−η)(1−η')XX*⊗YY* ≤ (A+N)⊗(B+N') and A⊗B ≤ ((1+η)XX*+N)⊗((1+η')YY*+N'), so the relative errors combine and the trace error is at most
     * ν Tr B + Tr A ν' + νν', with Tr A ≤ (1+η) Tr XX* + ν.
     */
    static PositiveFactor tensor(PositiveFactor f, PositiveFactor g) {
        EnclosedMatrix x = f.columns();
        EnclosedMatrix y = g.columns();
        long rows = (long) x.rows() * y.rows();
        long columns = (long) x.columns() * y.columns();
        Checks.dimensions("PositiveOperator.tensor, factor", rows, columns);
        EnclosedMatrix.Builder b = EnclosedMatrix.builder((int) rows, (int) columns);
        boolean exact = true;
        for (int i = 0; i < x.rows(); i++) {
            for (int j = 0; j < x.columns(); j++) {
                DoubleDouble p = re(x, i, j);
                DoubleDouble q = im(x, i, j);
                for (int k = 0; k < y.rows(); k++) {
                    for (int l = 0; l < y.columns(); l++) {
                        exact &= set(b, i * y.rows() + k, j * y.columns() + l, p, q, re(y, k, l), im(y, k, l));
                    }
                }
            }
        }
        EnclosedMatrix z = b.build();
        // each part of a product is a sum of two, with a relative error of 3 · 2^-102 of |x||y|
        PositiveFactor h = exact ? new PositiveFactor(z, 0, 0) : FactorRounding.entrywise(z, 0x1p-99);
        double traceF = trace(f);
        double traceG = trace(g);
        double nu = FrobeniusBound.times(f.traceError(), traceG)
                + FrobeniusBound.times(g.traceError(), traceF)
                + f.traceError() * g.traceError();
        double eta = FactorSums.combined(f.relativeError(), g.relativeError());
        return after(h, eta, nu * (1 + 0x1p-40));
    }

    /** A factor h of what the columns of another were, combined with that one's errors. */
    static PositiveFactor after(PositiveFactor h, double eta, double nu) {
        return new PositiveFactor(
                h.columns(),
                FactorSums.combined(eta, h.relativeError()),
                (nu + h.traceError() * (1 + eta)) * (1 + 0x1p-50));
    }

    /** An upper end of the trace. */
    static double trace(PositiveFactor f) {
        double norm = f.columns().frobeniusUpper();
        return ((1 + f.relativeError()) * norm * norm + f.traceError()) * (1 + 0x1p-48);
    }

    /** Sets an entry to (p + iq)(r + is); tells whether that was exact. */
    private static boolean set(
            EnclosedMatrix.Builder b, int i, int j, DoubleDouble p, DoubleDouble q, DoubleDouble r, DoubleDouble s) {
        DoubleDouble re = p.times(r).minus(q.times(s));
        DoubleDouble im = p.times(s).plus(q.times(r));
        b.set(i, j, re.hi(), re.lo(), im.hi(), im.lo(), 0);
        // one factor real or imaginary: neither part is a sum of two products
        boolean single = p.hi() == 0 || q.hi() == 0 || r.hi() == 0 || s.hi() == 0;
        return single
                && ExactProduct.isExact(p, r)
                && ExactProduct.isExact(q, s)
                && ExactProduct.isExact(p, s)
                && ExactProduct.isExact(q, r);
    }

    private static DoubleDouble re(EnclosedMatrix x, int i, int j) {
        return new DoubleDouble(x.re(i, j), x.reTail(i, j));
    }

    private static DoubleDouble im(EnclosedMatrix x, int i, int j) {
        return new DoubleDouble(x.im(i, j), x.imTail(i, j));
    }

    /** Columns of both operators on their own blocks. */
    static PositiveFactor directSum(PositiveFactor f, PositiveFactor g) {
        Checks.dimensions(
                "PositiveOperator.directSum, factor", (long) f.dimension() + g.dimension(), (long) f.rank() + g.rank());
        EnclosedMatrix.Builder b = EnclosedMatrix.builder(f.dimension() + g.dimension(), f.rank() + g.rank());
        copy(f.columns(), b, 0, 0);
        copy(g.columns(), b, f.dimension(), f.rank());
        double nu = (f.traceError() + g.traceError()) * (1 + 0x1p-52);
        return new PositiveFactor(b.build(), Math.max(f.relativeError(), g.relativeError()), nu);
    }

    private static void copy(EnclosedMatrix x, EnclosedMatrix.Builder b, int row, int column) {
        for (int i = 0; i < x.rows(); i++) {
            for (int j = 0; j < x.columns(); j++) {
                b.set(row + i, column + j, x.re(i, j), x.reTail(i, j), x.im(i, j), x.imTail(i, j), 0);
            }
        }
    }

    /**
     * Moves row i of every column to row[i], and column j to column[i] · rank + j: a permutation if all column[i] are zero, the stacked columns of
     * a partial trace if they count the basis vectors traced over.
     */
    static PositiveFactor moved(PositiveFactor f, int dimension, int copies, int[] row, int[] column) {
        EnclosedMatrix x = f.columns();
        Checks.dimensions("TensorLayout, factor", dimension, (long) copies * f.rank());
        EnclosedMatrix.Builder b = EnclosedMatrix.builder(dimension, copies * f.rank());
        for (int i = 0; i < x.rows(); i++) {
            for (int j = 0; j < x.columns(); j++) {
                b.set(row[i], column[i] * f.rank() + j, x.re(i, j), x.reTail(i, j), x.im(i, j), x.imTail(i, j), 0);
            }
        }
        return new PositiveFactor(b.build(), f.relativeError(), f.traceError());
    }

    /** The conjugate columns. */
    static PositiveFactor conjugate(PositiveFactor f) {
        EnclosedMatrix x = f.columns();
        EnclosedMatrix.Builder b = EnclosedMatrix.builder(x.rows(), x.columns());
        for (int i = 0; i < x.rows(); i++) {
            for (int j = 0; j < x.columns(); j++) {
                b.set(i, j, x.re(i, j), x.reTail(i, j), -x.im(i, j), -x.imTail(i, j), 0);
            }
        }
        return new PositiveFactor(b.build(), f.relativeError(), f.traceError());
    }
}
