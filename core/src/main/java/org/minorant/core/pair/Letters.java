package org.minorant.core.pair;

import java.util.ArrayList;
import java.util.List;
import org.minorant.core.Enclosure;
import org.minorant.core.InvalidInputException;
import org.minorant.core.WideDouble;
import org.minorant.core.internal.number.DoubleDouble;
import org.minorant.core.internal.number.WideDoubleDouble;

/**
 * The letters that types are made of, two positive numbers each.
 *
 * @param first x_i
 * @param second y_i
 * @param relativeError bound on the relative error of every number
 */
record Letters(List<WideDoubleDouble> first, List<WideDoubleDouble> second, double relativeError) {

    /** Powers of letters beyond 2^±this are refused: exponents of {@link WideDouble} end at 2^30. */
    private static final double MOST_EXPONENT = 0x1p29;

    private static final int MOST_COPIES = 10_000_000;

    int count() {
        return first.size();
    }

    /**
     * The letters of two spectra. Letters of exactly equal ratio a_i/b_i are merged: min(a, b) + min(a', b') = min(a + a', b + b') for them, in every power. A letter where one of them
     * is zero adds nothing and is left out.
     */
    static Letters ofSpectra(double[] a, double[] b) {
        List<WideDoubleDouble> x = new ArrayList<>();
        List<WideDoubleDouble> y = new ArrayList<>();
        List<Integer> representative = new ArrayList<>();
        int sums = 0;
        for (int i = 0; i < a.length; i++) {
            if (a[i] > 0 && b[i] > 0) {
                int j = 0;
                while (j < x.size() && !sameRatio(a[i], b[i], a[representative.get(j)], b[representative.get(j)])) {
                    j++;
                }
                WideDoubleDouble ai = wide(a[i]);
                WideDoubleDouble bi = wide(b[i]);
                if (j == x.size()) {
                    representative.add(i);
                    x.add(ai);
                    y.add(bi);
                } else {
                    sums++;
                    x.set(j, sum(x.get(j), ai));
                    y.set(j, sum(y.get(j), bi));
                }
            }
        }
        return new Letters(List.copyOf(x), List.copyOf(y), sums * DoubleDouble.EPS);
    }

    /** Whether a d = b c, decided exactly on significands. */
    private static boolean sameRatio(double a, double b, double c, double d) {
        DoubleDouble p = DoubleDouble.product(significand(a), significand(d));
        DoubleDouble q = DoubleDouble.product(significand(b), significand(c));
        long e = exponent(a) + exponent(d) - exponent(b) - exponent(c);
        // the products of significands lie in [1, 4)
        return Math.abs(e) <= 2 && p.hi() * Math.scalb(1.0, (int) e) == q.hi() && Math.scalb(p.lo(), (int) e) == q.lo();
    }

    private static double significand(double a) {
        return WideDouble.of(a).significand();
    }

    private static long exponent(double a) {
        return WideDouble.of(a).exponent();
    }

    /** The exact value of a double that is not negative. */
    static WideDoubleDouble wide(double a) {
        return a == 0 ? WideDoubleDouble.ZERO : WideDoubleDouble.of(DoubleDouble.of(significand(a)), exponent(a));
    }

    /** The sum of positive numbers, to 2^-102. */
    static WideDoubleDouble sum(WideDoubleDouble a, WideDoubleDouble b) {
        if (a.significand().hi() == 0) {
            return b;
        }
        if (b.significand().hi() == 0) {
            return a;
        }
        long e = Math.max(a.exponent(), b.exponent());
        return WideDoubleDouble.of(a.toDoubleDouble(e).plus(b.toDoubleDouble(e)), e);
    }

    /** An enclosure of a number known to a relative error. */
    static Enclosure enclosure(WideDoubleDouble a, double relativeError) {
        if (a.significand().hi() == 0) {
            return Enclosure.ZERO;
        }
        double e = relativeError + 0x1p-105;
        return Enclosure.of(
                        WideDouble.of(a.significand().hi(), a.exponent()),
                        WideDouble.of(a.significand().hi(), a.exponent()))
                .plus(Enclosure.exact(a.significand().lo())
                        .times(Enclosure.of(WideDouble.of(1, a.exponent()), WideDouble.of(1, a.exponent()))))
                .times(Enclosure.of(1 - e, Math.nextUp(1 + e)));
    }

    /** ln to a few units in the last place. */
    static double ln(WideDoubleDouble a) {
        return Math.log(a.significand().hi()) + a.exponent() * Math.log(2);
    }

    /** Refuses copies whose numbers would leave the range of exponents. */
    static void checkCopies(int n, Iterable<WideDoubleDouble> numbers) {
        if (n > MOST_COPIES) {
            throw new InvalidInputException(
                    "PositivePair.copies",
                    n + " copies",
                    "at most " + MOST_COPIES,
                    "extrapolate from fewer, or use the exponents");
        }
        for (WideDoubleDouble x : numbers) {
            if ((Math.abs((double) x.exponent()) + 1) * n > MOST_EXPONENT) {
                throw new InvalidInputException(
                        "PositivePair.copies",
                        "an eigenvalue near 2^" + x.exponent() + " to the power " + n,
                        "exponents of two up to 2^29",
                        "take fewer copies, or treat that eigenvalue as zero");
            }
        }
    }
}
