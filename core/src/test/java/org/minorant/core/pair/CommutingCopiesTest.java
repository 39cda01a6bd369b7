package org.minorant.core.pair;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.util.List;
import java.util.Random;
import java.util.concurrent.CancellationException;
import java.util.concurrent.atomic.AtomicLong;
import org.junit.jupiter.api.Test;
import org.minorant.core.Enclosure;
import org.minorant.core.InvalidInputException;
import org.minorant.core.WideDouble;

/** Copies of commuting pairs against brute force over every type, closed forms and published coding bounds. */
class CommutingCopiesTest {

    /** A few units in the last place for each letter; the tests' pairs have at most five. */
    private static final double NARROW = 1e-14;

    private static final double[] BSC_JOINT = {1 - 0.11, 0.11};
    private static final double[] BSC_PRODUCT = {0.5, 0.5};

    @Test
    void enclosesBruteForceOverRandomSpectra() {
        Random random = new Random(31);
        int[] copies = {0, 0, 400, 40, 14, 9};
        for (int letters = 2; letters <= 5; letters++) {
            for (int trial = 0; trial < 6; trial++) {
                double[] a = random.doubles(letters).toArray();
                double[] b = random.doubles(letters).toArray();
                contains(a, b, 2 + random.nextInt(copies[letters]));
            }
        }
    }

    @Test
    void enclosesBruteForceOverNastySpectra() {
        double[][][] pairs = {
            {{0.5, 0.5}, {0.5, 0.5}},
            {{1, 0}, {0, 1}},
            {{1, 0}, {0.5, 0.5}},
            {{0.3, 0.7, 0}, {0, 0.4, 0.6}},
            {{1e-300, 1}, {1, 1e-300}},
            {{1e-100, 1, 1e-200}, {1, 1e-150, 1e-50}},
            {{0.25, 0.25, 0.5}, {0.125, 0.125, 0.75}},
            {{0.5, 0.5}, {0.5 * (1 - 1e-12), 0.5 * (1 + 1e-12)}},
            {{1e5, 3e6}, {2e6, 1e5}},
            {{1}, {0.5}},
            {{Double.MIN_VALUE, 1}, {1, 0.5}},
        };
        for (double[][] p : pairs) {
            for (int n : new int[] {2, 3, 25}) {
                contains(p[0], p[1], n);
            }
        }
    }

    private static void contains(double[] a, double[] b, int n) {
        PositivePair pair = PositivePair.ofSpectra(a, b).copies(n);
        List<ExactTypes.Point> points = ExactTypes.points(a, b, n);
        BigDecimal critical = points.get(points.size() / 2).second().signum() > 0
                        && points.get(points.size() / 2).first().signum() > 0
                ? points.get(points.size() / 2)
                        .first()
                        .divide(points.get(points.size() / 2).second(), ExactTypes.MC)
                : BigDecimal.ONE;
        for (double factor : new double[] {1e-12, 0.3, 1, 1.7, 1e12}) {
            WideDouble t = wide(critical.multiply(new BigDecimal(factor)));
            Enclosure f = pair.traceMinimum(WideDouble.ONE, t);
            BigDecimal exact = ExactTypes.commuting(points, t.toBigDecimal());
            String what = "n = " + n + ", t = " + t + ": " + f.toIntervalString(20) + " against " + exact.doubleValue();
            assertTrue(f.contains(exact), what);
            assertTrue(exact.signum() == 0 || f.relativeWidth() < NARROW, what);
        }
    }

    static WideDouble wide(BigDecimal v) {
        int e = (int) Math.floor((v.precision() - v.scale()) * 3.321928);
        BigDecimal scaled = e >= 0
                ? v.divide(BigDecimal.valueOf(2).pow(e), ExactTypes.MC)
                : v.multiply(BigDecimal.valueOf(2).pow(-e), ExactTypes.MC);
        return WideDouble.of(scaled.doubleValue(), e);
    }

    /** Equal ratios are merged: three letters that are two, and copies of copies. */
    @Test
    void mergesEqualRatiosAndComposes() {
        PositivePair two = PositivePair.ofSpectra(new double[] {0.25, 0.75}, new double[] {0.5, 0.5});
        PositivePair three = PositivePair.ofSpectra(new double[] {0.125, 0.125, 0.75}, new double[] {0.25, 0.25, 0.5});
        Enclosure f = two.copies(60).traceMinimum(1);
        assertTrue(f.isPossiblyBelow(three.copies(60).traceMinimum(1))
                || f.equals(three.copies(60).traceMinimum(1)));
        assertEquals(two.copies(60).traceMinimum(1), two.copies(6).copies(10).traceMinimum(1));
        assertEquals(1, f.intersect(three.copies(60).traceMinimum(1)).relativeWidth() < NARROW ? 1 : 0);
    }

    /** Brute force over 3001 types, at answers down to 1e-900. */
    @Test
    void keepsDigitsFarBelowDouble() {
        int n = 3000;
        PositivePair pair = PositivePair.ofSpectra(BSC_JOINT, BSC_PRODUCT).copies(n);
        List<ExactTypes.Point> points = ExactTypes.points(BSC_JOINT, BSC_PRODUCT, n);
        for (int e : new int[] {1300, 0, -2400}) {
            WideDouble t = WideDouble.of(1.25, e);
            Enclosure f = pair.traceMinimum(WideDouble.ONE, t);
            BigDecimal exact = ExactTypes.commuting(points, t.toBigDecimal());
            assertTrue(f.contains(exact), () -> f.toIntervalString(20));
            assertTrue(f.relativeWidth() < NARROW, () -> f.toIntervalString(20));
        }
    }

    /** Where tB is below A on all types but such of no weight, f = t Tr B = t. */
    @Test
    void keepsDigitsOfAMillionCopies() {
        PositivePair pair = PositivePair.ofSpectra(BSC_JOINT, BSC_PRODUCT).copies(1_000_000);
        // the least ratio of A to B is (0.22)^n = 2^-2184424
        WideDouble t = WideDouble.of(1, -2_200_000);
        Enclosure f = pair.traceMinimum(WideDouble.ONE, t);
        assertTrue(f.contains(t), f::toString);
        assertTrue(f.relativeWidth() < NARROW, f::toString);
    }

    /**
     * Dependence testing on the binary symmetric channel, crossover 0.11, ε = 1e-3: f(M − 1) = ε one bit below the figures of Polyanskiy, Poor, Verdú, IEEE Trans. IT 56, 2307 (2010) (computed values, six decimals).
     */
    @Test
    void reproducesDependenceTesting() {
        int[] n = {100, 500, 1000, 2000};
        double[] bits = {16.054758, 180.064659, 403.056651, 864.635303};
        for (int i = 0; i < n.length; i++) {
            PositivePair pair = PositivePair.ofSpectra(BSC_JOINT, BSC_PRODUCT).copies(n[i]);
            int k = i;
            assertTrue(
                    pair.traceMinimum(WideDouble.ONE, messagesLessOne(bits[i] - 6e-7))
                                    .upper()
                            < 1e-3,
                    () -> "n = " + n[k]);
            assertTrue(
                    pair.traceMinimum(WideDouble.ONE, messagesLessOne(bits[i] + 6e-7))
                                    .lower()
                            > 1e-3,
                    () -> "n = " + n[k]);
        }
    }

    /** 2^bits − 1. */
    static WideDouble messagesLessOne(double bits) {
        long e = (long) Math.floor(bits);
        return WideDouble.of(Math.pow(2, bits - e), e).plusUp(WideDouble.of(-1));
    }

    @Test
    void reportsProgressAndStops() {
        PositivePair pair = PositivePair.ofSpectra(new double[] {.4, .3, .2, .1}, new double[] {.1, .2, .3, .4})
                .copies(300);
        AtomicLong calls = new AtomicLong();
        Enclosure f = pair.withEffort(Effort.DEFAULT.withListener((done, total) -> calls.incrementAndGet()))
                .traceMinimum(1);
        assertTrue(calls.get() > 10);
        assertEquals(pair.traceMinimum(1), f, "the same bits, whoever listens");
        WorkListener stop = new WorkListener() {
            @Override
            public void onProgress(long done, long total) {
                // not of interest here
            }

            @Override
            public boolean isCancelled() {
                return true;
            }
        };
        PositivePair stopped = pair.withEffort(Effort.DEFAULT.withListener(stop));
        assertThrows(CancellationException.class, () -> stopped.traceMinimum(1));
    }

    @Test
    void refusesWhatCannotFit() {
        PositivePair pair = PositivePair.ofSpectra(new double[] {1, 1e-300}, new double[] {0.5, 0.5});
        assertThrows(InvalidInputException.class, () -> pair.copies(1_000_000));
        assertThrows(
                InvalidInputException.class,
                () -> PositivePair.ofSpectra(BSC_JOINT, BSC_PRODUCT).copies(100_000_000));
        assertEquals(PairKind.TYPES, pair.copies(2).kind());
        assertEquals(8, pair.copies(3).dimension());
        assertEquals(Integer.MAX_VALUE, pair.copies(31).dimension());
    }
}
