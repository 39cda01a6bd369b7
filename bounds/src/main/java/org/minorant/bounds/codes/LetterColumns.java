package org.minorant.bounds.codes;

import java.util.ArrayList;
import java.util.List;
import org.minorant.bounds.ClassicalQuantumChannel;
import org.minorant.core.DensityOperator;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.PositiveFactor;

/**
 * The letters of a channel, divided by their traces, as columns: W_x = X_xX_x*, all columns side by side. A column of a word is a word of columns, and the inner products of columns of words are
 * products of inner products of columns of letters.
 *
 * <p><b>Errors.</b> Columns of the letter meant, up to a unitary on their right and columns of zeros, are within e = η‖X‖_F + (1+√2)√ν of those of its factor with relative error η and trace error ν
 * (the argument is that of the pretty-good measurement in org.minorant.measurement); once both are divided by their norms, within 2e/(‖X‖_F − e); 0.99 covers the rounding of the norm. Columns of words are then off by (1+δ)^n − 1 with
 * the largest δ of the letters, exchanging one factor after the other.
 */
final class LetterColumns {

    private static final double UP = 1 + 0x1p-40;

    private final EnclosedMatrix columns;
    private final int[] offsets;
    private final double error;

    private LetterColumns(EnclosedMatrix columns, int[] offsets, double error) {
        this.columns = columns;
        this.offsets = offsets;
        this.error = error;
    }

    static LetterColumns of(ClassicalQuantumChannel channel) {
        List<EnclosedMatrix> parts = new ArrayList<>();
        int[] offsets = new int[channel.letters() + 1];
        double error = 0;
        for (int x = 0; x < channel.letters(); x++) {
            DensityOperator w = channel.outputs().get(x);
            PositiveFactor f = w.factor().reduced();
            EnclosedMatrix c = withoutZeros(f.columns());
            EnclosedMatrix unit = normalised(c);
            double norm = c.frobeniusUpper();
            double e = (f.relativeError() * norm + (1 + Math.sqrt(2)) * Math.sqrt(f.traceError())) * UP;
            EnclosedMatrix miss = norm2(unit).minus(EnclosedMatrix.identity(1));
            error = Math.max(error, 2 * e / (0.99 * norm - e) + miss.modulusUpper(0, 0));
            parts.add(unit);
            offsets[x + 1] = offsets[x] + unit.columns();
        }
        EnclosedMatrix.Builder all = EnclosedMatrix.builder(channel.dimension(), offsets[channel.letters()]);
        int at = 0;
        for (EnclosedMatrix p : parts) {
            for (int c = 0; c < p.columns(); c++, at++) {
                for (int i = 0; i < p.rows(); i++) {
                    all.set(i, at, p.re(i, c), p.reTail(i, c), p.im(i, c), p.imTail(i, c), p.radius(i, c));
                }
            }
        }
        return new LetterColumns(all.build(), offsets, error);
    }

    private static EnclosedMatrix withoutZeros(EnclosedMatrix x) {
        List<Integer> kept = new ArrayList<>();
        for (int c = 0; c < x.columns(); c++) {
            boolean zero = true;
            for (int i = 0; i < x.rows(); i++) {
                zero &= x.modulusUpper(i, c) == 0;
            }
            if (!zero) {
                kept.add(c);
            }
        }
        EnclosedMatrix.Builder b = EnclosedMatrix.builder(x.rows(), kept.size());
        for (int k = 0; k < kept.size(); k++) {
            for (int i = 0; i < x.rows(); i++) {
                int c = kept.get(k);
                b.set(i, k, x.re(i, c), x.reTail(i, c), x.im(i, c), x.imTail(i, c), x.radius(i, c));
            }
        }
        return b.build();
    }

    /** X/‖X‖_F to about 30 digits: the root in double, and one step of Newton's method. */
    private static EnclosedMatrix normalised(EnclosedMatrix x) {
        EnclosedMatrix t = norm2(x);
        double s = 1 / Math.sqrt(t.re(0, 0));
        double rest = EnclosedMatrix.identity(1).minus(t.times(s).times(s)).re(0, 0);
        return x.times(s).plus(x.times(s * rest / 2));
    }

    private static EnclosedMatrix norm2(EnclosedMatrix x) {
        EnclosedMatrix.Builder v = EnclosedMatrix.builder(x.rows() * x.columns(), 1);
        int at = 0;
        for (int i = 0; i < x.rows(); i++) {
            for (int j = 0; j < x.columns(); j++) {
                v.set(at++, 0, x.re(i, j), x.reTail(i, j), x.im(i, j), x.imTail(i, j), x.radius(i, j));
            }
        }
        EnclosedMatrix column = v.build();
        return column.adjoint().times(column);
    }

    /** All columns, those of letter x from {@code offset(x)} on. */
    EnclosedMatrix columns() {
        return columns;
    }

    /** The first column of a letter; that of the letter after the last is the number of columns. */
    int offset(int x) {
        return offsets[x];
    }

    /** The number of columns of a letter. */
    int rank(int x) {
        return offsets[x + 1] - offsets[x];
    }

    /** The inner products of all columns. */
    EnclosedMatrix overlaps() {
        return columns.adjoint().times(columns);
    }

    /** A bound on how far the columns of a word are from those meant, in Frobenius norm, where those of each letter are off by so much more. */
    double wordError(int n, double more) {
        return Math.expm1(n * Math.log1p(error + more)) * UP;
    }
}
