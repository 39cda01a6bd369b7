package org.minorant.core;

import java.util.Arrays;
import java.util.OptionalInt;
import org.minorant.core.internal.message.Checks;

/** Principal submatrices of positive operators, with the rows of their factors. */
final class Compression {

    private Compression() {}

    static PositiveOperator of(PositiveOperator a, int[] indices) {
        String asked = "PositiveOperator.compression";
        int m = indices.length;
        Checks.dimensions(asked, m, m);
        int[] keep = indices.clone();
        for (int i : keep) {
            Checks.inRange(asked, "an index", i, 0, a.rows() - 1);
        }
        if (Arrays.stream(keep).distinct().count() != m) {
            throw new InvalidInputException(
                    asked,
                    "an index occurs twice in " + Arrays.toString(keep),
                    "distinct indices",
                    "list each basis vector once");
        }
        double[] re = new double[m * m];
        double[] im = new double[a.isReal() ? 0 : m * m];
        for (int i = 0; i < m; i++) {
            for (int j = 0; j < m; j++) {
                re[i * m + j] = a.re(keep[i], keep[j]);
                if (im.length != 0) {
                    im[i * m + j] = a.im(keep[i], keep[j]);
                }
            }
        }
        Operator entries = new Operator(m, m, re, im);
        // compressing does not increase the trace norm; the positive part of a block is the block of the positive part
        // only if
        // nothing was cut off or the block does not interact with the rest
        if (!a.isDefinedByFactor() && (a.entryDefect() == 0 || isBlock(a, keep))) {
            return new PositiveOperator(entries, a.entryDefect());
        }
        OptionalInt columns = a.knownColumns().isEmpty()
                ? OptionalInt.empty()
                : OptionalInt.of(rows(a.factor(), keep).rank());
        return new PositiveOperator(
                entries, a.entryDefect(), FactorSource.later(() -> rows(a.factor(), keep), columns));
    }

    private static boolean isBlock(PositiveOperator a, int[] keep) {
        boolean[] kept = new boolean[a.rows()];
        for (int i : keep) {
            kept[i] = true;
        }
        for (int i : keep) {
            for (int j = 0; j < a.rows(); j++) {
                if (!kept[j] && (a.re(i, j) != 0 || a.im(i, j) != 0)) {
                    return false;
                }
            }
        }
        return true;
    }

    /** The chosen rows of a factor, without the columns that vanish there. */
    private static PositiveFactor rows(PositiveFactor f, int[] keep) {
        EnclosedMatrix x = f.columns();
        int[] used = java.util.stream.IntStream.range(0, x.columns())
                .filter(c -> Arrays.stream(keep).anyMatch(i -> x.re(i, c) != 0 || x.im(i, c) != 0))
                .toArray();
        EnclosedMatrix.Builder b = EnclosedMatrix.builder(keep.length, Math.max(used.length, 1));
        for (int i = 0; i < keep.length; i++) {
            for (int j = 0; j < used.length; j++) {
                int c = used[j];
                b.set(i, j, x.re(keep[i], c), x.reTail(keep[i], c), x.im(keep[i], c), x.imTail(keep[i], c), 0);
            }
        }
        return new PositiveFactor(b.build(), f.relativeError(), f.traceError());
    }
}
