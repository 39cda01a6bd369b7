package org.minorant.core.pair;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Collections;
import java.util.List;
import java.util.SplittableRandom;
import org.junit.jupiter.api.Test;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.InvalidInputException;
import org.minorant.core.PositiveOperator;
import org.minorant.core.WideDouble;

class RankOneProductsTest {

    private static DensityOperator ket(int d, SplittableRandom random) {
        double[] re = new double[d];
        double[] im = new double[d];
        double s = 0;
        for (int i = 0; i < d; i++) {
            re[i] = random.nextDouble() - 0.5;
            im[i] = random.nextDouble() - 0.5;
            s += re[i] * re[i] + im[i] * im[i];
        }
        for (int i = 0; i < d; i++) {
            re[i] /= Math.sqrt(s);
            im[i] /= Math.sqrt(s);
        }
        return DensityOperator.ofKet(re, im);
    }

    private static PositivePair product(List<DensityOperator> kets, PositiveOperator b, int... m) {
        return PositivePair.ofPowers(kets, Collections.nCopies(m.length, b), m);
    }

    private static PositiveOperator power(PositiveOperator a, int n) {
        PositiveOperator p = a;
        for (int i = 1; i < n; i++) {
            p = p.tensor(a);
        }
        return p;
    }

    @Test
    void productsAgreeWithDenseOnes() {
        SplittableRandom random = new SplittableRandom(7);
        int[][] counts = {{1, 1}, {2, 3}, {3, 1}};
        for (int d = 2; d <= 3; d++) {
            for (int[] c : counts) {
                List<DensityOperator> kets = List.of(ket(d, random), ket(d, random));
                DensityOperator third = ket(d, random);
                DensityOperator b = DensityOperator.mixture(
                        List.of(kets.get(0), kets.get(1), third), new double[] {0.3, 0.45, 0.25});
                PositivePair pair = product(kets, b, c);
                PositivePair dense = PositivePair.of(
                        power(kets.get(0), c[0]).tensor(power(kets.get(1), c[1])), power(b, c[0] + c[1]));
                for (double t : new double[] {1e-3, 0.7, 3, 40}) {
                    Enclosure f = pair.traceMinimum(t);
                    // disjoint enclosures would throw
                    f.intersect(dense.traceMinimum(t));
                    assertTrue(f.relativeWidth() < 1e-12, () -> t + ": " + f.relativeWidth());
                }
            }
        }
    }

    /** Powers of one vector in two parts are one power, whose points are found in another way. */
    @Test
    void powersOfOneVectorMultiply() {
        SplittableRandom random = new SplittableRandom(8);
        DensityOperator psi = ket(2, random);
        DensityOperator b = DensityOperator.mixture(List.of(psi, ket(2, random)), new double[] {0.4, 0.6});
        int[][] counts = {{1, 2}, {30, 70}, {900, 100}};
        for (int[] c : counts) {
            PositivePair single = PositivePair.of(psi, b).copies(c[0] + c[1]);
            PositivePair pair = product(List.of(psi, psi), b, c);
            for (double ln : new double[] {0, 0.2, 0.5}) {
                WideDouble t = WideDouble.expDown(ln * (c[0] + c[1]));
                Enclosure f = pair.traceMinimum(WideDouble.ONE, t);
                f.intersect(single.traceMinimum(WideDouble.ONE, t));
                // below what is cut of the vector there is an upper end only
                assertTrue(f.relativeWidth() < 1e-11 || f.upper() < 1e-230, () -> ln + ": " + f);
            }
        }
    }

    /** A letter that B meets on a line only, and one partly in its kernel. */
    @Test
    void eigenvectorsAndKernelsAreCovered() {
        DensityOperator up = DensityOperator.ofKet(new double[] {1, 0, 0}, new double[3]);
        DensityOperator out = DensityOperator.ofKet(new double[] {0.6, 0, 0.8}, new double[3]);
        DensityOperator tilted = DensityOperator.ofKet(new double[] {0.8, 0.6, 0}, new double[3]);
        DensityOperator b = DensityOperator.mixture(List.of(up, tilted), new double[] {0.5, 0.5});
        List<DensityOperator> kets = List.of(up, out, tilted);
        PositivePair pair = product(kets, b, 1, 2, 1);
        PositivePair dense = PositivePair.of(up.tensor(power(out, 2)).tensor(tilted), power(b, 4));
        for (double t : new double[] {0.1, 2, 30}) {
            Enclosure f = pair.traceMinimum(t);
            f.intersect(dense.traceMinimum(t));
            assertTrue(f.upper() - f.lower() < 1e-12, f::toString);
        }
        DensityOperator diagonal = DensityOperator.ofEigenvalues(0.5, 0.3, 0.2);
        Enclosure f = product(kets, diagonal, 1, 2, 1).traceMinimum(2);
        f.intersect(PositivePair.of(up.tensor(power(out, 2)).tensor(tilted), power(diagonal, 4))
                .traceMinimum(2));
        assertTrue(f.relativeWidth() < 1e-12);
    }

    @Test
    void copiesMultiplyCounts() {
        SplittableRandom random = new SplittableRandom(9);
        List<DensityOperator> kets = List.of(ket(2, random), ket(2, random));
        DensityOperator b = DensityOperator.mixture(kets, new double[] {0.5, 0.5});
        assertEquals(
                product(kets, b, 4, 6).traceMinimum(1.5),
                product(kets, b, 2, 3).copies(2).traceMinimum(1.5));
    }

    @Test
    void whatDoesNotFitIsRefused() {
        SplittableRandom random = new SplittableRandom(10);
        List<DensityOperator> kets = List.of(ket(4, random), ket(4, random), ket(4, random), ket(4, random));
        DensityOperator b = DensityOperator.mixture(kets, new double[] {0.25, 0.25, 0.25, 0.25});
        InvalidInputException e = assertThrows(InvalidInputException.class, () -> product(kets, b, 100, 100, 100, 100));
        assertTrue(e.getMessage().contains("types"), e::getMessage);
        assertThrows(InvalidInputException.class, () -> product(kets, b, 1, 0, 1, 1));
        assertThrows(
                InvalidInputException.class,
                () -> PositivePair.ofPowers(List.of(kets.get(0)), List.of(DensityOperator.ofBloch(0, 0, 0)), 1));
    }
}
