package org.minorant.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Random;
import org.junit.jupiter.api.Test;

/** Partial traces, partial transposes and permutations against their definitions, index by index. */
class TensorLayoutTest {

    private static final TensorLayout LAYOUT = TensorLayout.of(2, 3, 2);

    private static Operator random(int n) {
        return OperatorGenerator.gaussian(n, n, true, new Random(5));
    }

    /** The index of (i, j, k) for dimensions 2, 3, 2. */
    private static int at(int i, int j, int k) {
        return (i * 3 + j) * 2 + k;
    }

    @Test
    void shapes() {
        assertEquals(12, LAYOUT.dimension());
        assertEquals(3, LAYOUT.subsystems());
        assertEquals(3, LAYOUT.dimension(1));
        assertEquals("2 x 3 x 2", LAYOUT.toString());
        assertEquals(TensorLayout.of(3), LAYOUT.without(2, 0));
        assertEquals(TensorLayout.of(1), LAYOUT.without(0, 1, 2));
        assertEquals(1, LAYOUT.without(0, 1, 2).dimension());
        assertEquals(TensorLayout.of(2, 2, 3), LAYOUT.permuted(2, 0, 1));
        assertEquals(TensorLayout.of(2, 2).hashCode(), LAYOUT.without(1).hashCode());
        assertNotEquals(TensorLayout.of(3, 2, 2), LAYOUT);
    }

    @Test
    void partialTraceOverTheMiddle() {
        Operator a = random(12);
        Operator t = LAYOUT.partialTrace(a, 1);
        for (int i = 0; i < 4; i++) {
            for (int j = 0; j < 4; j++) {
                double re = 0;
                double im = 0;
                for (int m = 0; m < 3; m++) {
                    re += a.re(at(i / 2, m, i % 2), at(j / 2, m, j % 2));
                    im += a.im(at(i / 2, m, i % 2), at(j / 2, m, j % 2));
                }
                assertEquals(re, t.re(i, j), 1e-15);
                assertEquals(im, t.im(i, j), 1e-15);
            }
        }
    }

    @Test
    void partialTraceOverTheEnds() {
        Operator a = random(12);
        Operator t = LAYOUT.partialTrace(a, 2, 0);
        for (int i = 0; i < 3; i++) {
            for (int j = 0; j < 3; j++) {
                double re = 0;
                for (int p = 0; p < 2; p++) {
                    for (int q = 0; q < 2; q++) {
                        re += a.re(at(p, i, q), at(p, j, q));
                    }
                }
                assertEquals(re, t.re(i, j), 1e-15);
            }
        }
        assertEquals(a.trace().re(), LAYOUT.partialTrace(a, 0, 1, 2).re(0, 0), 1e-14);
        assertEquals(a, LAYOUT.partialTrace(a));
    }

    @Test
    void partialTransposes() {
        Operator a = random(12);
        Operator t = LAYOUT.partialTranspose(a, 1, 2);
        for (int i = 0; i < 12; i++) {
            for (int j = 0; j < 12; j++) {
                int p = i / 6 * 6 + j % 6;
                int q = j / 6 * 6 + i % 6;
                assertEquals(a.re(i, j), t.re(p, q));
                assertEquals(a.im(i, j), t.im(p, q));
            }
        }
        assertEquals(a.transpose(), LAYOUT.partialTranspose(a, 0, 1, 2));
        assertEquals(a, LAYOUT.partialTranspose(LAYOUT.partialTranspose(a, 1), 1));
        assertEquals(a, LAYOUT.partialTranspose(a));
    }

    @Test
    void partialTransposeOfAnEntangledStateIsNotPositive() {
        double h = Math.sqrt(0.5);
        DensityOperator bell = DensityOperator.ofKet(h, 0, 0, h);
        HermitianOperator t = TensorLayout.of(2, 2).partialTranspose(bell, 1);
        assertEquals(-0.5, t.eigenvalues()[0], 1e-15);
    }

    @Test
    void permutations() {
        Operator a = random(12);
        Operator p = LAYOUT.permute(a, 2, 0, 1);
        for (int i = 0; i < 12; i++) {
            for (int j = 0; j < 12; j++) {
                // index (k, i, j) of the result with dimensions 2, 2, 3
                int from = at(i / 3 % 2, i % 3, i / 6);
                int to = at(j / 3 % 2, j % 3, j / 6);
                assertEquals(a.re(from, to), p.re(i, j));
                assertEquals(a.im(from, to), p.im(i, j));
            }
        }
        assertEquals(a, LAYOUT.permuted(2, 0, 1).permute(p, 1, 2, 0));
    }

    @Test
    void productsFallApart() {
        DensityOperator a = DensityOperator.ofBloch(0.3, 0.1, 0.2);
        DensityOperator b = DensityOperator.ofKet(0.6, 0, 0.8);
        TensorLayout layout = TensorLayout.of(2, 3);
        DensityOperator ab = a.tensor(b);
        DensityOperator first = layout.partialTrace(ab, 1);
        DensityOperator swapped = layout.permute(ab, 1, 0);
        for (int i = 0; i < 2; i++) {
            for (int j = 0; j < 2; j++) {
                assertEquals(a.re(i, j), first.re(i, j), 1e-15);
                assertEquals(a.im(i, j), first.im(i, j), 1e-15);
            }
        }
        assertEquals(b.tensor(a), swapped);
        assertEquals(2, ab.factor().rank());
        assertEquals(6, first.factor().rank());
        assertEquals(first.factor().rank(), first.knownColumns().getAsInt());
    }

    @Test
    void typesAreKept() {
        DensityOperator d = DensityOperator.maximallyMixed(6);
        TensorLayout layout = TensorLayout.of(2, 3);
        HermitianOperator h = d;
        PositiveOperator p = d;
        assertEquals(DensityOperator.class, layout.partialTrace(d, 0).getClass());
        assertEquals(DensityOperator.class, layout.permute(d, 1, 0).getClass());
        assertEquals(HermitianOperator.class, layout.partialTrace(h, 0).getClass());
        assertEquals(HermitianOperator.class, layout.permute(h, 1, 0).getClass());
        assertEquals(PositiveOperator.class, layout.partialTrace(p, 0).getClass());
        assertEquals(HermitianOperator.class, layout.partialTranspose(d, 0).getClass());
        assertTrue(!layout.permute(d, 1, 0).isDefinedByFactor());
    }

    @Test
    void refusals() {
        Meaning.assertRefusal(
                "TensorLayout.of: there is no subsystem, expected at least one dimension; give one dimension per subsystem",
                TensorLayout::of);
        Meaning.assertRefusal(
                "TensorLayout.of: dimension 1 is 0, expected at least 1; check the dimensions",
                () -> TensorLayout.of(2, 0));
        Meaning.assertRefusal(
                "TensorLayout.partialTrace: the operator is 4 x 4, expected 12 x 12, as the layout 2 x 3 x 2; check the dimensions of"
                        + " the subsystems",
                () -> LAYOUT.partialTrace(random(4), 0));
        Meaning.assertRefusal(
                "TensorLayout.partialTranspose: the operator is 4 x 4, expected 12 x 12, as the layout 2 x 3 x 2; check the dimensions"
                        + " of the subsystems",
                () -> LAYOUT.partialTranspose(random(4), 0));
        Meaning.assertRefusal(
                "TensorLayout.partialTrace: there is no subsystem 3, expected a number from 0 to 2; subsystems are counted from 0",
                () -> LAYOUT.partialTrace(random(12), 3));
        Meaning.assertRefusal(
                "TensorLayout.dimension: there is no subsystem -1, expected a number from 0 to 2; subsystems are counted from 0",
                () -> LAYOUT.dimension(-1));
        Meaning.assertRefusal(
                "TensorLayout.partialTrace: subsystem 1 occurs twice, expected distinct numbers; name each subsystem once",
                () -> LAYOUT.partialTrace(random(12), 1, 1));
        Meaning.assertRefusal(
                "TensorLayout.permute: the order has 2 numbers, expected 3, one for each subsystem; name every subsystem once",
                () -> LAYOUT.permute(random(12), 1, 0));
        long limit = Math.min(Runtime.getRuntime().maxMemory(), 16L * Integer.MAX_VALUE);
        Meaning.assertRefusal(
                "TensorLayout.of: the shape is 10000000 x 10000000, which takes 1600000000000000 bytes, expected at most "
                        + limit + " bytes; reduce the dimension or raise the heap (-Xmx)",
                () -> TensorLayout.of(1000, 10_000, 100_000));
    }
}
