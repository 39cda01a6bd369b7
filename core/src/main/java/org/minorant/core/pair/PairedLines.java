package org.minorant.core.pair;

import java.util.Comparator;
import java.util.stream.IntStream;

/**
 * Types of four letters by pairs: with m the count of the first two letters together, a type is i of the first, m − i of the second, j of the third, n − m − j of the fourth, and
 *
 * <pre>Σ over types of min = Σ_m Σ_i Σ_j min(x_i u_j, y_i v_j),</pre>
 *
 * with x, y, u, v products of two table entries. For each i, x_i u_j ≤ y_i v_j on one side of some j, as v_j/u_j is a power; so the sum over j is one of a few sums of u and v, made once for each m, and that j moves one way only as i does. A million copies
 * have 10^11 types in their windows and take 10^7 to 10^8 steps.
 *
 * <p><b>Error.</b> Terms are positive. A product of two entries has 3 roundings, a sum of w terms one after the other w, products with it and the weights 3 more. Where rounding decides the wrong side, both are equal within the roundings
 * of such products. So the relative error is below (2w + 24) · 2^-53, w the longest line. Numbers below 2^-890 of the scale, or of the sum that they belong to, are lost; there are fewer than 2^30 of them.
 */
final class PairedLines {

    static final int LETTERS = 4;

    /** Beyond this many steps a value would take more than ten seconds or so. */
    static final double MOST_STEPS = 1e9;

    private final int n;
    private final int[] from = new int[LETTERS];
    private final int[] to = new int[LETTERS];
    private final PowerTable[] first = new PowerTable[LETTERS];
    private final PowerTable[] second = new PowerTable[LETTERS];

    /** The box of the given windows; the two narrowest belong together. */
    PairedLines(int n, int[] from, int[] to, TypeBox.Tables first, TypeBox.Tables second) {
        this.n = n;
        int[] order = order(from, to);
        for (int k = 0; k < LETTERS; k++) {
            int i = order[k];
            this.from[k] = from[i];
            this.to[k] = to[i];
            this.first[k] = first.table(i, from[i], to[i]);
            this.second[k] = second.table(i, from[i], to[i]);
        }
    }

    private static int[] order(int[] from, int[] to) {
        return IntStream.range(0, from.length)
                .boxed()
                .sorted(Comparator.comparingInt((Integer i) -> to[i] - from[i]).thenComparing(i -> i))
                .mapToInt(Integer::intValue)
                .toArray();
    }

    /** About how many steps the sum takes. */
    static double work(int[] from, int[] to) {
        int[] order = order(from, to);
        double[] w = IntStream.of(order).mapToDouble(i -> to[i] - from[i] + 1.0).toArray();
        return (w[0] + w[1]) * (w[0] + w[2]);
    }

    int outerFrom() {
        return Math.max(from[0] + from[1], n - Math.min(n, to[2] + to[3]));
    }

    int outerTo() {
        return Math.min(Math.min(n, to[0] + to[1]), n - from[2] - from[3]);
    }

    /** A bound on the relative error of the sums. */
    double error() {
        double w = Math.max(to[0] - from[0], to[2] - from[2]) + 1.0;
        return (2 * w + 24) * 0x1p-53;
    }

    /** The products of one pair of letters for one m, in an order in which their ratio does not fall. */
    private static final class Line {
        final double[] x;
        final double[] y;
        final long[] ex;
        final long[] ey;

        Line(int length) {
            x = new double[length];
            y = new double[length];
            ex = new long[length];
            ey = new long[length];
        }

        int length() {
            return x.length;
        }
    }

    /** Letters p and p + 1 that share m; y/x rises along the line if asked to, else x/y does. */
    private Line line(int p, int m, boolean second) {
        int lo = Math.max(from[p], m - Math.min(m, to[p + 1]));
        int hi = Math.min(Math.min(m, to[p]), m - from[p + 1]);
        Line l = new Line(Math.max(0, hi - lo + 1));
        for (int k = 0; k < l.length(); k++) {
            set(l, k, p, lo + k, m);
        }
        int last = l.length() - 1;
        if (last > 0) {
            boolean rises = below(l.x[last] * l.y[0], l.ex[last] + l.ey[0], l.x[0] * l.y[last], l.ex[0] + l.ey[last]);
            if (rises != second) {
                for (int k = 0; k <= last; k++) {
                    set(l, k, p, hi - k, m);
                }
            }
        }
        return l;
    }

    private void set(Line l, int k, int p, int count, int m) {
        int i = count - from[p];
        int j = m - count - from[p + 1];
        l.x[k] = first[p].significand[i] * first[p + 1].significand[j];
        l.ex[k] = first[p].exponent[i] + first[p + 1].exponent[j];
        l.y[k] = second[p].significand[i] * second[p + 1].significand[j];
        l.ey[k] = second[p].exponent[i] + second[p + 1].exponent[j];
    }

    /** Whether a 2^ea ≤ b 2^eb, for significands in [1, 2^10). */
    private static boolean below(double a, long ea, double b, long eb) {
        return ea - eb < 20 && (ea - eb < -20 || a <= TypeBox.scaled(b, eb - ea));
    }

    /**
     * The sum over the types with the given m.
     *
     * @param m the count of the first two letters together
     * @param a significand of the weight of the first terms
     * @param ea its exponent
     * @param b that of the second terms
     * @param eb its exponent
     * @return the sum
     */
    double sum(int m, double a, long ea, double b, long eb) {
        Line near = line(0, m, false);
        Line far = line(2, n - m, true);
        int w = far.length();
        if (near.length() == 0 || w == 0) {
            return 0;
        }
        double[] tail = new double[w];
        long[] tailExponent = new long[w];
        gather(far.x, far.ex, tail, tailExponent, w - 1, -1);
        double[] head = new double[w];
        long[] headExponent = new long[w];
        gather(far.y, far.ey, head, headExponent, 0, 1);
        double sum = 0;
        int j = 0;
        for (int i = 0; i < near.length(); i++) {
            double x = a * near.x[i];
            double y = b * near.y[i];
            long ex = ea + near.ex[i];
            long ey = eb + near.ey[i];
            while (j < w && !below(x * far.x[j], ex + far.ex[j], y * far.y[j], ey + far.ey[j])) {
                j++;
            }
            if (j < w) {
                sum += TypeBox.scaled(x * tail[j], ex + tailExponent[j]);
            }
            if (j > 0) {
                sum += TypeBox.scaled(y * head[j - 1], ey + headExponent[j - 1]);
            }
        }
        return sum;
    }

    /** Running sums, from one end on. */
    private static void gather(double[] v, long[] e, double[] sums, long[] exponents, int start, int step) {
        double s = 0;
        long es = 0;
        for (int k = start; k >= 0 && k < v.length; k += step) {
            if (s == 0 || e[k] > es) {
                s = s == 0 ? 0 : TypeBox.scaled(s, es - e[k]);
                es = e[k];
                s += v[k];
            } else {
                s += TypeBox.scaled(v[k], e[k] - es);
            }
            sums[k] = s;
            exponents[k] = es;
        }
    }
}
