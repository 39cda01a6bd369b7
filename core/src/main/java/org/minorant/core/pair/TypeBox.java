package org.minorant.core.pair;

import java.util.Arrays;
import java.util.Comparator;
import java.util.stream.IntStream;

/**
 * The types (n_1, …, n_K) of n copies with every count in its window, visited line by line: on a line two letters share what the others leave, the two with the widest windows. Nothing is stored.
 *
 * <p><b>Rounding.</b> Products along the way to a line add two relative errors of 2^-53 for each letter (table and product) to that of the start; the line itself adds as many for its two letters.
 */
final class TypeBox {

    /** What is done on a line: the inner letter occurs k times for from ≤ k ≤ to, the last one m − k times. */
    @FunctionalInterface
    interface Line {
        void visit(int m, int from, int to, double first, long firstExponent, double second, long secondExponent);
    }

    private final int n;
    private final int[] from;
    private final int[] to;
    private final PowerTable[] first;
    private final PowerTable[] second;
    /** Sums of from and of to over the letters behind each. */
    private final long[] least;

    private final long[] most;

    private TypeBox(int n, int[] from, int[] to, PowerTable[] first, PowerTable[] second) {
        this.n = n;
        this.from = from;
        this.to = to;
        this.first = first;
        this.second = second;
        int k = from.length;
        least = new long[k];
        most = new long[k];
        for (int i = k - 2; i >= 0; i--) {
            least[i] = least[i + 1] + from[i + 1];
            most[i] = most[i + 1] + to[i + 1];
        }
    }

    /** Makes the table of a letter for a range of counts. */
    @FunctionalInterface
    interface Tables {
        PowerTable table(int letter, int from, int to);
    }

    /** The box of the given windows, a single letter paired with one that does not occur. */
    static TypeBox of(int n, int[] from, int[] to, Tables first, Tables second) {
        int k = from.length;
        int[] order = order(from, to);
        int size = Math.max(2, k);
        PowerTable[] x = new PowerTable[size];
        PowerTable[] y = new PowerTable[size];
        int[] lo = new int[size];
        int[] hi = new int[size];
        for (int j = 0; j < size; j++) {
            if (j < k) {
                int i = order[j];
                lo[j] = from[i];
                hi[j] = to[i];
                x[j] = first.table(i, lo[j], hi[j]);
                y[j] = second.table(i, lo[j], hi[j]);
            } else {
                x[j] = PowerTable.NOTHING;
                y[j] = PowerTable.NOTHING;
            }
        }
        return new TypeBox(n, lo, hi, x, y);
    }

    /** The letters by the width of their windows, narrow ones first. */
    private static int[] order(int[] from, int[] to) {
        return IntStream.range(0, from.length)
                .boxed()
                .sorted(Comparator.comparingInt((Integer i) -> to[i] - from[i]).thenComparing(i -> i))
                .mapToInt(Integer::intValue)
                .toArray();
    }

    /** No fewer types than there are in the windows: all but the widest multiplied, or all types if these are fewer. */
    static double count(int n, int[] from, int[] to) {
        double[] width = new double[from.length];
        for (int i = 0; i < width.length; i++) {
            width[i] = to[i] - from[i] + 1.0;
        }
        Arrays.sort(width);
        double box = 1;
        double all = 1;
        for (int i = 0; i + 1 < width.length; i++) {
            box *= width[i];
            all *= (n + i + 1.0) / (i + 1.0);
        }
        return Math.min(box, all);
    }

    int letters() {
        return from.length;
    }

    /** The table of the inner letter of a line, or of the last one. */
    PowerTable firstOf(int i) {
        return first[i];
    }

    PowerTable secondOf(int i) {
        return second[i];
    }

    /** The counts of the outermost letter; a single one if there are two letters only. */
    int outerFrom() {
        return letters() == 2 ? 0 : Math.max(from[0], (int) Math.max(0, n - most[0]));
    }

    int outerTo() {
        return letters() == 2 ? 0 : (int) Math.min(to[0], n - least[0]);
    }

    /** Visits the lines on which the outermost letter has the given count. */
    void lines(int outer, double a, long ea, double b, long eb, Line line) {
        if (letters() == 2) {
            visit(0, n, a, ea, b, eb, line);
        } else {
            descend(0, outer, n, a, ea, b, eb, line);
        }
    }

    private void descend(int i, int k, int m, double a, long ea, double b, long eb, Line line) {
        int j = k - from[i];
        double x = a * first[i].significand[j];
        double y = b * second[i].significand[j];
        int sx = Math.getExponent(x);
        int sy = Math.getExponent(y);
        visit(
                i + 1,
                m - k,
                x * power(-sx),
                ea + first[i].exponent[j] + sx,
                y * power(-sy),
                eb + second[i].exponent[j] + sy,
                line);
    }

    private void visit(int i, int m, double a, long ea, double b, long eb, Line line) {
        int lo = (int) Math.max(from[i], m - most[i]);
        int hi = (int) Math.min(to[i], m - least[i]);
        if (lo > hi) {
            return;
        }
        if (i == letters() - 2) {
            line.visit(m, lo, hi, a, ea, b, eb);
            return;
        }
        for (int k = lo; k <= hi; k++) {
            descend(i, k, m, a, ea, b, eb, line);
        }
    }

    /** 2^e for |e| &lt; 1022. */
    private static double power(int e) {
        return Double.longBitsToDouble((long) (e + 1023) << 52);
    }

    /** v · 2^e, for e above 900 something beyond every answer, below −900 zero. */
    static double scaled(double v, long e) {
        if (e < -900) {
            return 0;
        }
        return v * power((int) Math.min(e, 900));
    }
}
