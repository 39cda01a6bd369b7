package org.minorant.core.pair;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;

/** Four commuting letters by pairs: against brute force over every type, against types one by one, and against two letters that are the same pair. */
class PairedLinesTest {

    /** The lines as they are, with windows that hold all types, against sums in 55 digits. */
    @Test
    void sumsOfAllTypes() {
        Random random = new Random(8);
        for (int trial = 0; trial < 30; trial++) {
            int n = 1 + random.nextInt(16);
            double[] a = random.doubles(4).toArray();
            double[] b = random.doubles(4).toArray();
            if (trial % 3 == 0) {
                a[1] *= 1e-30;
                b[2] *= 1e-20;
            }
            if (trial % 3 == 1) {
                b[3] = a[3] * (b[0] / a[0]);
            }
            double w = Math.pow(10, 6 * random.nextDouble() - 3);
            BigDecimal exact = BigDecimal.ZERO;
            for (ExactTypes.Point p : ExactTypes.points(a, b, n)) {
                BigDecimal y = p.second().multiply(new BigDecimal(w), ExactTypes.MC);
                exact = exact.add(p.multiplicity().multiply(p.first().min(y), ExactTypes.MC), ExactTypes.MC);
            }
            int[] from = new int[4];
            int[] to = {n, n, n, n};
            Letters letters = Letters.ofSpectra(a, b);
            // random ratios; the deliberately equal one may merge, and then there is nothing to test
            if (letters.count() == 4) {
                PairedLines lines = new PairedLines(
                        n,
                        from,
                        to,
                        (i, lo, hi) -> PowerTable.scaledPowers(letters.first().get(i), lo, hi),
                        (i, lo, hi) -> PowerTable.scaledPowers(letters.second().get(i), lo, hi));
                double factorial = Factorials.of(n).significand().hi();
                long exponent = Factorials.of(n).exponent();
                double sum = 0;
                for (int m = lines.outerFrom(); m <= lines.outerTo(); m++) {
                    WideDouble v = WideDouble.of(w);
                    sum += lines.sum(m, factorial, exponent, factorial * v.significand(), exponent + v.exponent());
                }
                assertEquals(1, sum / exact.doubleValue(), lines.error() + (n + 8) * 0x1p-52);
            }
        }
    }

    /** Windows cut the types; as many as are in them are summed by both ways. */
    @Test
    void sameWindowsAsTypesOneByOne() {
        double[] a = {0.8, 0.1, 0.07, 0.03};
        double[] b = {0.25, 0.26, 0.24, 0.25};
        Letters letters = Letters.ofSpectra(a, b);
        int n = 300;
        int[] from = {200, 10, 0, 5};
        int[] to = {280, 60, 33, 20};
        TypeBox.Tables x =
                (i, lo, hi) -> PowerTable.scaledPowers(letters.first().get(i), lo, hi);
        TypeBox.Tables y =
                (i, lo, hi) -> PowerTable.scaledPowers(letters.second().get(i), lo, hi);
        PairedLines lines = new PairedLines(n, from, to, x, y);
        TypeBox box = TypeBox.of(n, from, to, x, y);
        double f = Factorials.of(n).significand().hi();
        long e = Factorials.of(n).exponent();
        LineSum one = new LineSum(box, 0, Effort.DEFAULT);
        for (int k = box.outerFrom(); k <= box.outerTo(); k++) {
            box.lines(k, f, e, f, e + 300, one);
        }
        double sum = 0;
        for (int m = lines.outerFrom(); m <= lines.outerTo(); m++) {
            sum += lines.sum(m, f, e, f, e + 300);
        }
        assertTrue(sum > 1e-3);
        assertEquals(1, sum / (one.high() + one.low()), 1e-13);
    }

    /** Two ratios, each split into two letters whose ratios differ in the last place: the same number to n roundings, from two letters in a million copies. */
    @Test
    void aMillionCopies() {
        int n = 1_000_000;
        double[] a = {0.6, 0.25, 0.09, 0.06};
        double[] b = {0.3, Math.nextUp(0.125), 0.345, Math.nextDown(0.23)};
        PositivePair four = PositivePair.ofSpectra(a, b).copies(n);
        PositivePair two = PositivePair.ofSpectra(new double[] {0.85, 0.15}, new double[] {0.425, 0.575})
                .copies(n);
        // ln t where f is about a thousandth
        double lnT = n * (0.85 * Math.log(2) + 0.15 * Math.log(0.15 / 0.575)) - 3.1 * 1000 * 0.73;
        WideDouble t = WideDouble.expDown(lnT);
        Enclosure f = four.traceMinimum(WideDouble.ONE, t);
        Enclosure g = two.traceMinimum(WideDouble.ONE, t);
        assertTrue(g.lower() > 1e-6 && g.upper() < 1e-1, g::toString);
        assertTrue(f.relativeWidth() < 3e-11, () -> f.toIntervalString(17));
        assertEquals(1, f.midpoint() / g.midpoint(), 4e-10);
    }
}
