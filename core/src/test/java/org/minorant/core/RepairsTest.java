package org.minorant.core;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Random;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import org.junit.jupiter.api.Test;
import org.minorant.core.OperatorGenerator.Case;

/** What {@code nearest} returns is the projection, and says by how much it moved. */
class RepairsTest {

    @Provide
    Arbitrary<Case> cases() {
        return OperatorGenerator.cases(6);
    }

    /**
     * P is the projection of A on a convex set exactly if ⟨A − P, Q − P⟩ ≤ 0 for every Q in the set (Kolmogorov's criterion).
     */
    @Property(tries = 80, seed = "41")
    void nearestStateObeysTheProjectionCriterion(@ForAll("cases") Case c) {
        Random r = c.random();
        Operator a = OperatorGenerator.gaussian(c.dimension(), c.dimension(), c.complex(), r);
        Repaired<DensityOperator> repaired = DensityOperator.nearest(a);
        DensityOperator p = repaired.operator();
        for (int k = 0; k < 8; k++) {
            Operator q = k % 2 == 0
                    ? new Case(c.kind(), c.dimension(), c.complex(), r.nextLong()).state()
                    : DensityOperator.ofKet(amplitudes(c, r, true), amplitudes(c, r, false));
            assertTrue(inner(a.minus(p), q.minus(p)) <= 1e-13);
        }
        double distance = a.minus(p).hilbertSchmidtNorm().midpoint();
        assertEquals(distance, repaired.distance(), 1e-14);
        assertEquals(1, p.traceEnclosure().midpoint(), 1e-15);
    }

    private static double[] amplitudes(Case c, Random r, boolean real) {
        Operator k = OperatorGenerator.ket(c.dimension(), c.complex(), new Random(c.seed() + r.nextInt(1)));
        return real || !k.isReal() ? (real ? k.realParts() : k.imaginaryParts()) : new double[c.dimension()];
    }

    private static double inner(Operator a, Operator b) {
        return a.adjoint().times(b).trace().re();
    }

    @Property(tries = 80, seed = "42")
    void nearestPositiveOperatorObeysTheProjectionCriterion(@ForAll("cases") Case c) {
        Random r = c.random();
        Operator a = OperatorGenerator.gaussian(c.dimension(), c.dimension(), c.complex(), r);
        Repaired<? extends PositiveOperator> repaired = PositiveOperator.nearest(a);
        PositiveOperator p = repaired.operator();
        for (int k = 0; k < 8; k++) {
            PositiveOperator q = new Case(c.kind(), c.dimension(), c.complex(), r.nextLong()).positive();
            assertTrue(inner(a.minus(p), q.minus((Operator) p)) <= 1e-13);
        }
        HermitianOperator h = HermitianOperator.nearest(a).operator();
        assertEquals(h.negativePart().trace().re(), repaired.negativePart(), 1e-13);
        assertEquals(h.trace().re(), repaired.traceBefore(), 1e-14);
    }

    @Test
    void hermitianPart() {
        Operator a = Operator.of(new double[][] {{1, 3}, {1, 2}}, new double[][] {{0.5, 1}, {1, 0}});
        Repaired<? extends HermitianOperator> r = HermitianOperator.nearest(a);
        assertEquals(HermitianOperator.of(new double[][] {{1, 2}, {2, 2}}, new double[2][2]), r.operator());
        // the antihermitian part ((0.5i, 1 + i), (−1 + i, 0))
        assertEquals(Math.sqrt(0.25 + 2 + 2), r.hermitianDefect(), 1e-15);
        assertEquals(r.hermitianDefect(), r.distance());
        assertEquals(0, r.negativePart());
        assertEquals(3, r.traceBefore());
    }

    @Test
    void nothingToRepair() {
        DensityOperator d = DensityOperator.ofEigenvalues(0.5, 0.25, 0.25);
        for (StateRepair how : StateRepair.values()) {
            Repaired<DensityOperator> r = DensityOperator.nearest(d, how);
            assertEquals(d, r.operator());
            assertEquals(0, r.distance());
            assertEquals(0, r.negativePart());
            assertEquals(1, r.traceBefore());
        }
    }

    @Test
    void theTwoWaysDifferWhereTheyShould() {
        HermitianOperator h = HermitianOperator.diagonal(0.9, 0.5, -0.2);
        Repaired<DensityOperator> nearest = DensityOperator.nearest(h);
        assertArrayEquals(new double[] {0.7, 0.3, 0}, diagonal(nearest.operator()), 1e-15);
        Repaired<DensityOperator> cut = DensityOperator.nearest(h, StateRepair.CUT_AND_NORMALISE);
        assertArrayEquals(new double[] {0.9 / 1.4, 0.5 / 1.4, 0}, diagonal(cut.operator()), 1e-15);
        assertEquals(0.2, cut.negativePart());
        assertEquals(1.2, cut.traceBefore(), 1e-15);
        assertTrue(nearest.distance() < cut.distance());
    }

    private static double[] diagonal(Operator a) {
        double[] d = new double[a.rows()];
        for (int i = 0; i < d.length; i++) {
            d[i] = a.re(i, i);
        }
        return d;
    }

    @Test
    void hugeAndNegativeMatricesHaveANearestState() {
        assertArrayEquals(
                new double[] {1, 0},
                diagonal(DensityOperator.nearest(HermitianOperator.diagonal(1e200, -1e200))
                        .operator()));
        assertArrayEquals(
                new double[] {0.5, 0.5},
                diagonal(DensityOperator.nearest(HermitianOperator.diagonal(-3, -3))
                        .operator()));
        assertArrayEquals(
                new double[] {0.5, 0.5},
                diagonal(DensityOperator.nearest(HermitianOperator.diagonal(0, 0))
                        .operator()));
    }

    @Test
    void refusals() {
        Operator wide = Operator.ofReal(new double[1][2]);
        Meaning.assertRefusal(
                "HermitianOperator.nearest: the operator is 1 x 2, expected a square operator; check the shape",
                () -> HermitianOperator.nearest(wide));
        Meaning.assertRefusal(
                "PositiveOperator.nearest: the operator is 1 x 2, expected a square operator; check the shape",
                () -> PositiveOperator.nearest(wide));
        Meaning.assertRefusal(
                "DensityOperator.nearest: the operator is 1 x 2, expected a square operator; check the shape",
                () -> DensityOperator.nearest(wide));
        Meaning.assertRefusal(
                "DensityOperator.nearest: the positive part has trace 0.0, expected a positive finite trace; rescale, or use"
                        + " StateRepair.NEAREST, which needs none",
                () -> DensityOperator.nearest(HermitianOperator.diagonal(-1, 0), StateRepair.CUT_AND_NORMALISE));
    }
}
