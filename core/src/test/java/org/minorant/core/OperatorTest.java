package org.minorant.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.util.Random;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import org.junit.jupiter.api.Test;
import org.minorant.core.OperatorGenerator.Case;

/** Entries, algebra, norms and refusals of general operators. */
class OperatorTest {

    private static final Operator A =
            Operator.of(new double[][] {{1, 2, 3}, {4, 5, 6}}, new double[][] {{0, 1, 0}, {-1, 0, 2}});
    private static final Operator REAL = Operator.ofReal(new double[][] {{2, -1}, {0, 3}});

    @Provide
    Arbitrary<Case> cases() {
        return OperatorGenerator.cases(4);
    }

    @Test
    void entriesAndShape() {
        assertEquals(2, A.rows());
        assertEquals(3, A.columns());
        assertEquals(6, A.re(1, 2));
        assertEquals(2, A.im(1, 2));
        assertEquals(0, REAL.im(1, 1));
        assertTrue(REAL.isReal());
        assertFalse(A.isReal());
        assertEquals("Operator 2 x 3, complex", A.toString());
        assertEquals("Operator 2 x 2, real", REAL.toString());
    }

    @Test
    void arraysAreCopiedBothWays() {
        double[][] re = {{1, 2}, {3, 4}};
        Operator a = Operator.ofReal(re);
        re[0][0] = 9;
        a.realParts()[0] = 7;
        assertEquals(1, a.re(0, 0));
    }

    @Test
    void zeroImaginaryPartsMakeARealOperator() {
        Operator a = Operator.of(new double[][] {{1}}, new double[][] {{0}});
        assertTrue(a.isReal());
        assertEquals(Operator.ofReal(new double[][] {{1}}), a);
        assertEquals(Operator.ofReal(new double[][] {{1}}).hashCode(), a.hashCode());
        assertNotEquals(A, REAL);
    }

    @Test
    void adjointTransposeConjugateNegate() {
        assertEquals(A.transpose(), A.adjoint().conjugate());
        assertEquals(-2, A.adjoint().im(2, 1));
        assertEquals(2, A.transpose().im(2, 1));
        assertEquals(-2, A.conjugate().im(1, 2));
        assertEquals(A, A.negate().negate());
        assertEquals(-6, A.negate().re(1, 2));
        assertEquals(A, A.adjoint().adjoint());
    }

    @Test
    void multiples() {
        Operator t = A.times(new Complex(0, 2));
        assertEquals(-4, t.re(1, 2));
        assertEquals(12, t.im(1, 2));
        assertEquals(A.times(3.0), A.times(new Complex(3, 0)));
        assertEquals(new Complex(5, 0), REAL.trace());
    }

    @Test
    void kroneckerProductPutsTheSecondIndexFastest() {
        Operator k = A.tensor(REAL);
        assertEquals(4, k.rows());
        assertEquals(6, k.columns());
        for (int i = 0; i < 4; i++) {
            for (int j = 0; j < 6; j++) {
                double b = REAL.re(i % 2, j % 2);
                assertEquals(A.re(i / 2, j / 2) * b + 0.0, k.re(i, j));
                assertEquals(A.im(i / 2, j / 2) * b + 0.0, k.im(i, j));
            }
        }
    }

    @Test
    void directSumPutsBlocksOnTheDiagonal() {
        Operator s = A.directSum(REAL);
        assertEquals(4, s.rows());
        assertEquals(5, s.columns());
        assertEquals(2, s.im(1, 2));
        assertEquals(-1, s.re(2, 4));
        assertEquals(0, s.re(0, 3));
        assertEquals(0, s.re(3, 0));
    }

    @Property(tries = 40, seed = "21")
    void algebraAgainstExactArithmetic(@ForAll("cases") Case c) {
        Random r = c.random();
        Operator x = OperatorGenerator.gaussian(c.dimension(), 3, c.complex(), r);
        Operator y = OperatorGenerator.gaussian(3, 2, !c.complex(), r);
        Operator z = OperatorGenerator.gaussian(c.dimension(), 3, true, r);
        assertClose(ExactMatrix.of(x).times(ExactMatrix.of(y)), x.times(y), 5 * 0x1p-52 * 6);
        assertClose(ExactMatrix.of(x).plus(ExactMatrix.of(z)), x.plus(z), 0x1p-52);
        assertClose(ExactMatrix.of(x).minus(ExactMatrix.of(z)), x.minus(z), 0x1p-52);
        assertClose(ExactMatrix.tensor(ExactMatrix.of(x), ExactMatrix.of(y)), x.tensor(y), 0x1p-51);
    }

    private static void assertClose(ExactMatrix exact, Operator a, double tolerance) {
        assertTrue(exact.minus(ExactMatrix.of(a)).largest().doubleValue() <= tolerance);
    }

    @Property(tries = 60, seed = "22")
    void normsHoldTheExactOnes(@ForAll("cases") Case c) {
        Random r = c.random();
        int shift = r.nextInt(3) * 300 - 300;
        Operator x = OperatorGenerator.gaussian(c.dimension(), 1 + r.nextInt(4), c.complex(), r)
                .times(Math.scalb(1.0, shift));
        PositiveOperator p = c.positive();
        Operator h = p.minus((HermitianOperator) c.positive().times(0.5)).times(Math.scalb(1.0, shift));
        for (Operator a : new Operator[] {x, h, p}) {
            assertNorms(a);
        }
    }

    private static void assertNorms(Operator a) {
        ExactMatrix e = ExactMatrix.of(a);
        BigDecimal trace = BigDecimal.ZERO;
        BigDecimal most = BigDecimal.ZERO;
        BigDecimal squares = BigDecimal.ZERO;
        // squared singular values, each twice
        for (BigDecimal v : e.adjoint().times(e).eigenvalues()) {
            BigDecimal square = v.max(BigDecimal.ZERO);
            BigDecimal s = square.sqrt(ExactMatrix.MC);
            trace = trace.add(s);
            most = most.max(s);
            squares = squares.add(square);
        }
        BigDecimal two = BigDecimal.valueOf(2);
        assertHolds(a.traceNorm(), trace.divide(two), 1e-13, most);
        assertHolds(a.operatorNorm(), most, 1e-13, most);
        assertHolds(a.hilbertSchmidtNorm(), squares.divide(two).sqrt(ExactMatrix.MC), 1e-14, most);
    }

    private static void assertHolds(Enclosure e, BigDecimal value, double width, BigDecimal scale) {
        // the oracle's roots of squared singular values are good to about 40 digits of the largest
        BigDecimal slack = scale.scaleByPowerOfTen(-38);
        assertTrue(
                new BigDecimal(e.lower()).compareTo(value.add(slack)) <= 0
                        && new BigDecimal(e.upper()).compareTo(value.subtract(slack)) >= 0,
                () -> value.doubleValue() + " is not in " + e);
        assertTrue(e.width() <= width * scale.doubleValue() * 4, () -> "too wide: " + e);
    }

    @Test
    void normsOfDiagonalOperatorsAreExact() {
        HermitianOperator d = HermitianOperator.diagonal(3, -4, 0);
        assertEquals(Enclosure.exact(7), d.traceNorm());
        assertEquals(Enclosure.exact(4), d.operatorNorm());
        assertTrue(d.hilbertSchmidtNorm().contains(5.0));
        assertEquals(Enclosure.ZERO, HermitianOperator.diagonal(0, 0).hilbertSchmidtNorm());
        assertEquals(Enclosure.ZERO, HermitianOperator.diagonal(0, 0).traceNorm());
    }

    @Test
    void complexModulus() {
        assertEquals(5, new Complex(3, -4).modulus());
    }

    @Test
    void refusalsOfEntries() {
        Meaning.assertRefusal(
                "Operator.ofReal: entry (1, 0) is NaN, expected a finite number; check the computation that made it",
                () -> Operator.ofReal(new double[][] {{1, 2}, {Double.NaN, 3}}));
        Meaning.assertRefusal(
                "Operator.of, imaginary part: entry (0, 1) is -Infinity, expected a finite number; check the computation that made it",
                () -> Operator.of(new double[][] {{1, 2}}, new double[][] {{1, Double.NEGATIVE_INFINITY}}));
        Meaning.assertRefusal(
                "Operator.ofReal: row 1 has 1 entries, expected 2, as row 0; give every row the same length",
                () -> Operator.ofReal(new double[][] {{1, 2}, {1}}));
        Meaning.assertRefusal(
                "Operator.ofReal: the array is empty, expected at least 1 x 1; give at least one entry",
                () -> Operator.ofReal(new double[0][]));
        Meaning.assertRefusal(
                "Operator.of, imaginary part: the array is empty, expected at least 1 x 1; give at least one entry",
                () -> Operator.of(new double[][] {{1}}, new double[][] {{}}));
        Meaning.assertRefusal(
                "Operator.of: the imaginary part is 1 x 1, expected 1 x 2, as the real part; give both parts the same shape",
                () -> Operator.of(new double[][] {{1, 2}}, new double[][] {{1}}));
        Meaning.assertRefusal(
                "Operator.ofRowMajor, real part: the array has 3 entries, expected 4 entries; check the shape",
                () -> Operator.ofRowMajor(2, 2, new double[3], new double[0]));
        Meaning.assertRefusal(
                "Operator.ofRowMajor, imaginary part: the array has 1 entries, expected 4 entries; check the shape",
                () -> Operator.ofRowMajor(2, 2, new double[4], new double[1]));
        Meaning.assertRefusal(
                "Operator.ofRowMajor, real part: entry 3 (row-major) is NaN, expected a finite number; check the computation that"
                        + " made it",
                () -> Operator.ofRowMajor(2, 2, new double[] {0, 0, 0, Double.NaN}, new double[0]));
        Meaning.assertRefusal(
                "Operator.ofRowMajor: the shape is 0 x 2, expected at least 1 x 1; give at least one entry",
                () -> Operator.ofRowMajor(0, 2, new double[0], new double[0]));
    }

    @Test
    void refusalsOfShapes() {
        Meaning.assertRefusal(
                "Operator.plus: the second operator is 2 x 2, expected 2 x 3, as the first; both must act on the same space",
                () -> A.plus(REAL));
        Meaning.assertRefusal(
                "Operator.minus: the second operator is 2 x 2, expected 2 x 3, as the first; both must act on the same space",
                () -> A.minus(REAL));
        Meaning.assertRefusal(
                "Operator.times: the right factor has 2 rows, expected 3 rows, as the left factor has columns; check the order of the"
                        + " factors",
                () -> A.times(REAL));
        Meaning.assertRefusal(
                "Operator.trace: the operator is 2 x 3, expected a square operator; check the shape", A::trace);
    }

    @Test
    void overflowIsRefused() {
        Operator big = Operator.ofReal(new double[][] {{1e200}});
        Meaning.assertRefusal(
                "Operator.times: entry 0 (row-major) is Infinity, expected a finite number; check the computation that made it",
                () -> big.times(big));
        Meaning.assertRefusal(
                "Operator.times: entry 0 (row-major) is Infinity, expected a finite number; check the computation that made it",
                () -> big.times(1e200));
        Meaning.assertRefusal(
                "Operator.tensor: entry 0 (row-major) is Infinity, expected a finite number; check the computation that made it",
                () -> big.tensor(big));
        Meaning.assertRefusal(
                "Operator.times, factor: entry 1 (row-major) is NaN, expected a finite number; check the computation that made it",
                () -> big.times(new Complex(1, Double.NaN)));
        Meaning.assertRefusal(
                "PositiveOperator.ofFactor: an entry of the result overflows, expected moduli below 1.7976931348623157E308; scale the"
                        + " operator down by a power of two",
                () -> PositiveOperator.ofFactor(big));
    }

    @Test
    void tooLargeForMemoryIsRefusedBeforeAllocating() {
        long limit = Math.min(Runtime.getRuntime().maxMemory(), 16L * Integer.MAX_VALUE);
        String cure = " bytes, expected at most " + limit + " bytes; reduce the dimension or raise the heap (-Xmx)";
        Meaning.assertRefusal(
                "HermitianOperator.identity: the shape is 2000000 x 2000000, which takes 64000000000000" + cure,
                () -> HermitianOperator.identity(2_000_000));
        Operator column = Operator.ofRowMajor(60_000, 1, new double[60_000], new double[0]);
        Operator row = Operator.ofRowMajor(1, 60_000, new double[60_000], new double[0]);
        Meaning.assertRefusal(
                "Operator.times: the shape is 60000 x 60000, which takes 57600000000" + cure, () -> column.times(row));
        Meaning.assertRefusal(
                "Operator.tensor: the shape is 3600000000 x 1, which takes 57600000000" + cure,
                () -> column.tensor(column));
        Meaning.assertRefusal(
                "Operator.directSum: the shape is 60001 x 60001, which takes 57601920016" + cure,
                () -> column.directSum(row));
        Meaning.assertRefusal(
                "Operator.traceNorm: the shape is 60001 x 60001, which takes 57601920016" + cure, column::traceNorm);
    }
}
