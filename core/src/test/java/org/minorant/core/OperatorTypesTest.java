package org.minorant.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertSame;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.junit.jupiter.api.Test;

/** Which type comes out of what, and what each type refuses. */
class OperatorTypesTest {

    private static final HermitianOperator Y = HermitianOperator.of(new double[2][2], new double[][] {{0, -1}, {1, 0}});
    private static final DensityOperator RHO = DensityOperator.ofBloch(0.1, 0.2, 0.3);
    private static final PositiveOperator P = PositiveOperator.ofEigenvalues(1, 2);

    @Test
    void hermitianAlgebra() {
        HermitianOperator x = HermitianOperator.ofReal(new double[][] {{0, 1}, {1, 0}});
        assertEquals(1, x.plus(Y).re(0, 1));
        assertEquals(-1, x.plus(Y).im(0, 1));
        assertEquals(1, x.minus(Y).im(0, 1));
        assertEquals(-2, x.times(-2).re(0, 1));
        assertEquals(x.times(-1), x.negate());
        assertSame(Y, Y.adjoint());
        assertEquals(Y.negate(), Y.conjugate());
        assertEquals(Y.negate(), Y.transpose());
        assertEquals(4, Y.tensor(x).dimension());
        assertEquals(HermitianOperator.of(((Operator) Y).tensor(x)), Y.tensor(x));
        assertEquals(HermitianOperator.of(((Operator) Y).directSum(x)), Y.directSum(x));
        Operator v = Operator.ofReal(new double[][] {{1, 2}});
        assertEquals(HermitianOperator.ofReal(new double[][] {{4}}), x.conjugatedBy(v));
        assertSame(Y, HermitianOperator.of(Y));
        assertSame(RHO, PositiveOperator.of((Operator) RHO));
        assertSame(RHO, DensityOperator.of((Operator) RHO));
    }

    @Test
    void statesStayStates() {
        DensityOperator product = RHO.tensor(RHO);
        assertEquals(4, product.dimension());
        assertTrue(product.traceEnclosure().contains(1.0));
        DensityOperator conjugate = RHO.transpose();
        assertEquals(RHO.im(0, 1), conjugate.im(1, 0));
        assertEquals(RHO, conjugate.conjugate());
        assertEquals(RHO.factor().rank(), conjugate.factor().rank());
    }

    @Test
    void positiveStaysPositive() {
        PositiveOperator sum = P.directSum(RHO);
        assertEquals(4, sum.dimension());
        assertEquals(4, sum.factor().rank());
        assertEquals(PositiveOperator.class, P.tensor(RHO).getClass());
        assertTrue(P.tensor(RHO).isDefinedByFactor());
        assertTrue(!P.directSum(P).isDefinedByFactor());
        assertEquals(2, P.transpose().re(1, 1));
        assertEquals(HermitianOperator.class, P.plus((HermitianOperator) P).getClass());
        assertEquals(P.times(2.0), P.plus(P));
    }

    @Test
    void refusalsOfHermitianOperators() {
        Meaning.assertRefusal(
                "HermitianOperator.of: the operator is not Hermitian, entries (1, 0) and (0, 1) differ from conjugates by 2.0, expected"
                        + " conjugates exactly; use HermitianOperator.nearest, or DensityOperator.nearest, which say by how much they"
                        + " repair",
                () -> HermitianOperator.of(new double[2][2], new double[][] {{0, 1}, {1, 0}}));
        Meaning.assertRefusal(
                "HermitianOperator.of: the operator is not Hermitian, entries (0, 0) and (0, 0) differ from conjugates by 2.0, expected"
                        + " conjugates exactly; use HermitianOperator.nearest, or DensityOperator.nearest, which say by how much they"
                        + " repair",
                () -> HermitianOperator.of(new double[1][1], new double[][] {{1}}));
        Meaning.assertRefusal(
                "HermitianOperator.of: the operator is 2 x 1, expected a square operator; check the shape",
                () -> HermitianOperator.of(Operator.ofReal(new double[2][1])));
        Meaning.assertRefusal(
                "HermitianOperator.diagonal: the shape is 0 x 0, expected at least 1 x 1; give at least one entry",
                HermitianOperator::diagonal);
        Meaning.assertRefusal(
                "HermitianOperator.plus: the second operator is 3 x 3, expected 2 x 2, as the first; both must act on the same space",
                () -> Y.plus(HermitianOperator.identity(3)));
        Meaning.assertRefusal(
                "HermitianOperator.minus: the second operator is 3 x 3, expected 2 x 2, as the first; both must act on the same space",
                () -> Y.minus(HermitianOperator.identity(3)));
        Meaning.assertRefusal(
                "HermitianOperator.conjugatedBy: the operator is 2 x 2, expected 3 x 3; give an operator on the space mapped from",
                () -> Y.conjugatedBy(HermitianOperator.identity(3)));
        Meaning.assertRefusal(
                "PositiveOperator.compression: an index is 2.0, expected between 0.0 and 1.0; give a number in that range",
                () -> PositiveOperator.compression(P, 2));
    }

    @Test
    void refusalsOfStates() {
        Meaning.assertRefusal(
                "DensityOperator.of: the trace is 3.0, expected 1 within 1.7763568394002505E-15; use DensityOperator.nearest to"
                        + " normalise",
                () -> DensityOperator.of(P));
        Meaning.assertRefusal(
                "DensityOperator.of: the operator is not Hermitian, entries (1, 0) and (0, 1) differ from conjugates by 0.5, expected"
                        + " conjugates exactly; use HermitianOperator.nearest, or DensityOperator.nearest, which say by how much they"
                        + " repair",
                () -> DensityOperator.ofReal(new double[][] {{0.5, 0.5}, {0, 0.5}}));
        Meaning.assertRefusal(
                "DensityOperator.of: the smallest diagonal entry is -0.5, expected at least -1.0658141036401503E-14 (rounding); check the"
                        + " matrix, or use DensityOperator.nearest, which projects and says by how much",
                () -> DensityOperator.ofReal(new double[][] {{1.5, 0}, {0, -0.5}}));
        Meaning.assertRefusal(
                "Operator.of, real part: entry (0, 1) is NaN, expected a finite number; check the computation that made it",
                () -> DensityOperator.of(new double[][] {{1, Double.NaN}, {0, 0}}, new double[2][2]));
        Meaning.assertRefusal(
                "Operator.of, real part: row 1 has 1 entries, expected 2, as row 0; give every row the same length",
                () -> DensityOperator.of(new double[][] {{1, 0}, {0}}, new double[2][2]));
        Meaning.assertRefusal(
                "DensityOperator.ofKet: the squared norm is 2.0, expected 1 within 1.7763568394002505E-15; divide the ket by its norm",
                () -> DensityOperator.ofKet(1, 1));
        Meaning.assertRefusal(
                "DensityOperator.ofKet, imaginary part: the array has 1 entries, expected 2 entries; check the shape",
                () -> DensityOperator.ofKet(new double[2], new double[1]));
        Meaning.assertRefusal(
                "Operator.ofRowMajor, real part: entry 0 (row-major) is NaN, expected a finite number; check the computation that made"
                        + " it",
                () -> DensityOperator.ofKet(Double.NaN, 1));
        Meaning.assertRefusal(
                "Operator.ofRowMajor: the shape is 0 x 1, expected at least 1 x 1; give at least one entry",
                DensityOperator::ofKet);
        Meaning.assertRefusal(
                "DensityOperator.maximallyMixed: the shape is 0 x 0, expected at least 1 x 1; give at least one entry",
                () -> DensityOperator.maximallyMixed(0));
        Meaning.assertRefusal(
                "DensityOperator.of: the trace is 0.75, expected 1 within 1.7763568394002505E-15; use DensityOperator.nearest to"
                        + " normalise",
                () -> DensityOperator.ofEigenvalues(0.5, 0.25));
        long limit = Math.min(Runtime.getRuntime().maxMemory(), 16L * Integer.MAX_VALUE);
        Meaning.assertRefusal(
                "DensityOperator.maximallyMixed: the shape is 2000000 x 2000000, which takes 64000000000000 bytes, expected at most "
                        + limit + " bytes; reduce the dimension or raise the heap (-Xmx)",
                () -> DensityOperator.maximallyMixed(2_000_000));
    }
}
