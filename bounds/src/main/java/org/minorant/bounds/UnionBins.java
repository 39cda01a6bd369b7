package org.minorant.bounds;

import java.util.TreeMap;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;

/**
 * Σ a_i min(1, t T_i) for probabilities a_i and T_i, as a function of t, with the T_i collected in narrow bins.
 *
 * <p><b>Enclosure.</b> A bin keeps Σ a, Σ aT and the least and the largest T. With 1/t outside, its part is the one sum or the other, exactly. With 1/t inside, min(1, tT) is concave in T: it lies above its chord,
 * and the sum below min(Σ a, t Σ aT). The two differ by less than Σ a times a quarter of the bin's relative width 2^-11, in one bin only.
 */
final class UnionBins {

    private static final int PER_OCTAVE = 1 << 11;
    private static final int CHUNK = 256;
    private static final int FIELDS = 5;

    /** More than all that is dropped below 2^-1000, also times what T may lack. */
    static final double TINY = 0x1p-600;

    private final TreeMap<Long, double[]> chunks = new TreeMap<>();
    private long lastIndex = Long.MIN_VALUE;
    private double[] last = new double[0];
    private double leftOut;
    private int largest;

    void add(UnionTails tails) {
        double[] a = tails.probability();
        largest = Math.max(largest, a.length);
        for (int i = 0; i < a.length; i++) {
            if (a[i] > 0) {
                add(a[i], tails.low()[i], tails.high()[i], tails.exponent()[i]);
            }
        }
    }

    private void add(double a, double low, double high, long exponent) {
        long key = exponent * PER_OCTAVE + (long) ((low - 1) * PER_OCTAVE);
        long index = Math.floorDiv(key, (long) CHUNK);
        if (index != lastIndex) {
            last = chunks.computeIfAbsent(index, i -> new double[CHUNK * FIELDS]);
            lastIndex = index;
        }
        int at = (int) Math.floorMod(key, (long) CHUNK) * FIELDS;
        double[] b = last;
        b[at + 3] = b[at] == 0 ? low : Math.min(b[at + 3], low);
        b[at + 4] = Math.max(b[at + 4], low);
        b[at] += a;
        b[at + 1] += a * low;
        b[at + 2] += a * high;
    }

    /** Says what probability the types have that were left out. */
    void leftOut(double most) {
        leftOut = most + TINY;
    }

    double leftOut() {
        return leftOut;
    }

    /** A bound on the number of roundings behind any sum, those of its terms apart. */
    double roundings() {
        return 2.0 * largest + (double) chunks.size() * CHUNK + 100;
    }

    /** The sum with its left-out part, before the errors of a_i, T_i and of rounding. */
    Enclosure at(WideDouble t) {
        double lower = 0;
        double upper = 0;
        int perChunk = PER_OCTAVE / CHUNK;
        for (var chunk : chunks.entrySet()) {
            long octave = Math.floorDiv(chunk.getKey(), (long) perChunk);
            double x = TypeList.scaled(t.significand(), octave + t.exponent());
            double[] b = chunk.getValue();
            for (int at = 0; at < b.length; at += FIELDS) {
                double a = b[at];
                if (a > 0) {
                    lower += lower(a, b[at + 1], b[at + 3], b[at + 4], x);
                    upper += b[at + 2] < Double.POSITIVE_INFINITY ? Math.min(a, x * b[at + 2] + TINY) : a;
                }
            }
        }
        return Enclosure.of(Math.min(lower, upper), upper + leftOut);
    }

    private static double lower(double a, double sum, double least, double most, double x) {
        if (x * most <= 1) {
            return x * sum;
        }
        double from = x * least;
        if (from >= 1) {
            return a;
        }
        double along = Math.max(0, sum - a * least) * (1 - from) / (most - least);
        return Math.min(a, a * from + along);
    }
}
