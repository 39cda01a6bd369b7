package org.minorant.core.pair;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Arrays;
import java.util.Random;
import java.util.concurrent.CancellationException;
import org.junit.jupiter.api.Test;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;

/** Copies through bins against copies through all types, where both can be had. */
class LikelihoodBinsTest {

    private static final double[] WEIGHTS = {1e-30, 1e-3, 0.1, 1, 7, 1e3, 1e20};
    private static final Effort COARSE = Effort.DEFAULT.withTolerance(1e-3);

    /** 1024 bins lose about (n range)²/(50 bins²): 2 % for 40 copies over a range of ten. */
    private static final double WIDE = 0.05;

    @Test
    void encloseCommutingCopies() {
        Random random = new Random(8);
        for (int letters = 2; letters <= 4; letters++) {
            for (int trial = 0; trial < 4; trial++) {
                double[] a = random.doubles(letters, 0.05, 1).toArray();
                double[] b = random.doubles(letters, 0.05, 1).toArray();
                int n = 2 + random.nextInt(letters == 4 ? 130 : 240);
                BinnedSum bins = BinnedSum.of(Letters.ofSpectra(a, b), n, COARSE);
                PositivePair exact = PositivePair.ofSpectra(a, b).copies(n);
                for (double w : WEIGHTS) {
                    WideDouble t = WideDouble.of(w);
                    Enclosure e = exact.traceMinimum(WideDouble.ONE, t);
                    Enclosure f = bins.sum(WideDouble.ONE, t, e.lowerWide().exponent() + 4);
                    meet(e, f, "n = " + n + ", t = " + w);
                }
            }
        }
    }

    /** From all types of two copies or of one: squared seven times, letters multiplied in, bins coarsened. */
    @Test
    void encloseAfterManySquarings() {
        double[][][] pairs = {
            {{0.3, 0.7}, {0.45, 0.55}},
            {{0.4, 0.3, 0.2, 0.1}, {0.15, 0.25, 0.25, 0.35}},
            {{0.5, 1e-9, 0.5}, {0.4, 0.2, 0.4}}
        };
        for (double[][] p : pairs) {
            for (int n : new int[] {127, 200}) {
                BinnedSum bins = BinnedSum.of(Letters.ofSpectra(p[0], p[1]), n, COARSE, 11);
                PositivePair exact = PositivePair.ofSpectra(p[0], p[1]).copies(n);
                for (double w : WEIGHTS) {
                    WideDouble t = WideDouble.of(w);
                    Enclosure e = exact.traceMinimum(WideDouble.ONE, t);
                    Enclosure f = bins.sum(WideDouble.ONE, t, e.lowerWide().exponent() + 4);
                    String what = "n = " + n + ", t = " + w + ": " + f + " and " + e;
                    assertTrue(f.lowerWide().compareTo(e.upperWide()) <= 0, what);
                    assertTrue(f.upperWide().compareTo(e.lowerWide()) >= 0, what);
                    // nineteen decades between letters cost accuracy
                    assertTrue(p[0].length == 3 || f.relativeWidth() < WIDE, what);
                }
            }
        }
    }

    @Test
    void encloseRankOneCopies() {
        Random random = new Random(9);
        for (int letters = 2; letters <= 4; letters++) {
            for (int trial = 0; trial < 3; trial++) {
                double[] w = random.doubles(letters, 0.05, 1).toArray();
                double[] b = random.doubles(letters, 0.05, 1).toArray();
                // half of the measures meet the kernel
                double[] weights = Arrays.copyOf(w, letters + 1);
                double[] values = Arrays.copyOf(b, letters + 1);
                weights[letters] = trial % 2 == 0 ? 0 : 1e-3;
                int n = 2 + random.nextInt(letters == 4 ? 40 : 90);
                SpectralMeasure m = SpectralMeasure.of(
                        Arrays.stream(weights).mapToObj(Letters::wide).toList(),
                        Arrays.stream(values).mapToObj(Letters::wide).toList(),
                        0,
                        0);
                BinnedSecular bins = BinnedSecular.of(m, n, COARSE);
                PositivePair exact =
                        PositivePair.ofSpectralMeasure(weights, values).copies(n);
                for (double x : WEIGHTS) {
                    Enclosure e = exact.traceMinimum(1, x);
                    Enclosure f = bins.value(WideDouble.of(x), exact.firstTrace(), CopyErrors.kernel(m, n), 0);
                    meet(e, f, "n = " + n + ", t = " + x);
                }
            }
        }
    }

    private static void meet(Enclosure exact, Enclosure f, String what) {
        String both = what + ": " + f.toIntervalString(12) + " and " + exact.toIntervalString(17);
        // neither end may be inside by more than the width of the exact enclosure
        assertTrue(f.lowerWide().compareTo(exact.upperWide()) <= 0, both);
        assertTrue(f.upperWide().compareTo(exact.lowerWide()) >= 0, both);
        assertTrue(f.relativeWidth() < WIDE, both);
    }

    /** Eight letters, where only bins are left: finer bins inside coarser ones, and the tolerance is heard. */
    @Test
    void answerWhereTypesAreTooMany() {
        double[] a = {.3, .2, .15, .1, .1, .07, .05, .03};
        double[] b = {.05, .07, .1, .12, .13, .16, .18, .19};
        PositivePair pair = PositivePair.ofSpectra(a, b).copies(150);
        Enclosure coarse = pair.withEffort(COARSE).traceMinimum(1);
        Enclosure fine = pair.withEffort(Effort.DEFAULT.withTolerance(1e-5)).traceMinimum(1);
        assertTrue(coarse.relativeWidth() < 0.05, coarse::toString);
        assertTrue(fine.relativeWidth() < coarse.relativeWidth() / 4, fine::toString);
        assertTrue(coarse.lowerWide().compareTo(fine.upperWide()) <= 0
                && fine.lowerWide().compareTo(coarse.upperWide()) <= 0);
        Enclosure pure = PositivePair.ofSpectralMeasure(a, b)
                .copies(150)
                .withEffort(COARSE)
                .traceMinimum(1);
        // deep: f ≈ t Σ w b
        assertTrue(pure.relativeWidth() < 0.05, pure::toString);
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
        PositivePair stopped = pair.withEffort(COARSE.withListener(stop));
        assertThrows(CancellationException.class, () -> stopped.traceMinimum(1));
        assertEquals(coarse, pair.withEffort(COARSE).traceMinimum(1), "the same bits again");
    }
}
