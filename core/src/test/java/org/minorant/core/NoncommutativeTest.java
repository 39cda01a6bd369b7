package org.minorant.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Random;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import org.junit.jupiter.api.Test;
import org.minorant.core.OperatorGenerator.Case;

/** The noncommutative minimum and quotient and the parallel sum. */
class NoncommutativeTest {

    private static final Tolerance T = Tolerance.ROUNDING;

    @Provide
    Arbitrary<Case> cases() {
        return OperatorGenerator.cases(6);
    }

    private static PositiveOperator other(Case c, Random r) {
        return new Case(c.kind(), c.dimension(), c.complex(), r.nextLong()).positive();
    }

    private static void assertClose(Operator expected, Operator actual, double tolerance) {
        double d = expected.minus(actual).hilbertSchmidtNorm().upper();
        assertTrue(d <= tolerance, () -> "distance " + d + " above " + tolerance);
    }

    @Property(tries = 80, seed = "61")
    void minimumIsBelowBothAndHasTheTraceOfTheFormula(@ForAll("cases") Case c) {
        PositiveOperator a = c.positive();
        PositiveOperator b = other(c, c.random());
        HermitianOperator m = a.minimum(b);
        double rounding = c.dimension() * 0x1p-48;
        assertTrue(LoewnerComparison.of(m, a).least().upper() >= -rounding);
        assertTrue(LoewnerComparison.of(m, b).least().upper() >= -rounding);
        double trace =
                0.5 * (a.trace().re() + b.trace().re() - a.minus(b).traceNorm().midpoint());
        assertEquals(trace, m.trace().re(), rounding);
        assertClose(m, b.minimum(a), rounding);
        assertClose(a, a.minimum(a), rounding);
    }

    @Test
    void minimumOfDiagonalOperators() {
        assertEquals(
                HermitianOperator.diagonal(1, -3, 2),
                HermitianOperator.diagonal(1, 2, 2).minimum(HermitianOperator.diagonal(4, -3, 2)));
    }

    /** B^½ (B^(−½) A B^(−½)) B^½ is A on the support of B. */
    @Property(tries = 80, seed = "62")
    void quotientTimesDivisor(@ForAll("cases") Case c) {
        Random r = c.random();
        PositiveOperator a = c.positive();
        Operator u = OperatorGenerator.unitary(c.dimension(), c.complex(), r);
        double[] values = new double[c.dimension()];
        for (int i = 0; i < values.length; i++) {
            values[i] = i > 0 && r.nextInt(3) == 0 ? 0 : 0.1 + r.nextDouble();
        }
        PositiveOperator b = PositiveOperator.of(OperatorGenerator.hermitian(values, u));
        PositiveOperator q = a.quotient(b, T);
        PositiveOperator root = b.power(0.5, T);
        PositiveOperator support = b.supportProjector(T);
        assertClose(support.times(a).times(support), root.times(q).times(root), c.dimension() * 0x1p-46 * 11);
    }

    @Property(tries = 80, seed = "63")
    void parallelSum(@ForAll("cases") Case c) {
        Random r = c.random();
        PositiveOperator a = wellConditioned(c, r);
        PositiveOperator b = wellConditioned(c, r);
        PositiveOperator p = a.parallelSum(b, T);
        double rounding = c.dimension() * 0x1p-46 * 12;
        PositiveOperator inverse = a.inverse(T).plus(b.inverse(T)).inverse(T);
        assertClose(inverse, p, rounding);
        assertClose(p, b.parallelSum(a, T), rounding);
        assertClose(a.times(0.5), a.parallelSum(a, T), rounding);
        // singular operators: A − A(A+B)⁺A
        PositiveOperator x = c.positive();
        PositiveOperator y = PositiveOperator.ofFactor(OperatorGenerator.ket(c.dimension(), c.complex(), r));
        PositiveOperator s = x.plus(y);
        Operator direct = x.minus(x.times(s.inverse(T)).times(x));
        // the ratio of eigenvalues of the sum that are kept enters by its root
        double[] e = s.eigenvalues();
        double least = java.util.Arrays.stream(e)
                .filter(v -> v > T.threshold(e.length, e[e.length - 1]))
                .min()
                .orElse(1);
        double condition = Math.sqrt(e[e.length - 1] / least);
        if (condition < 1e5) {
            assertClose(direct, x.parallelSum(y, T), rounding * condition * condition);
        }
        assertTrue(LoewnerComparison.of(x.parallelSum(y, T), x).least().upper() >= -rounding * condition);
    }

    private static PositiveOperator wellConditioned(Case c, Random r) {
        double[] values = r.doubles(c.dimension()).map(v -> 0.1 + v).toArray();
        return PositiveOperator.of(
                OperatorGenerator.hermitian(values, OperatorGenerator.unitary(c.dimension(), c.complex(), r)));
    }

    @Test
    void parallelSumOfDiagonalOperatorsIsHarmonic() {
        PositiveOperator p =
                PositiveOperator.ofEigenvalues(1, 3, 0, 0).parallelSum(PositiveOperator.ofEigenvalues(1, 6, 5, 0), T);
        assertClose(PositiveOperator.ofEigenvalues(0.5, 2, 0, 0), p, 1e-15);
    }

    /** Two orthogonal projections: the parallel sum is half the projection on the intersection of ranges (Anderson and Duffin). */
    @Test
    void parallelSumOfDifferentKetsVanishes() {
        DensityOperator a = DensityOperator.ofKet(1, 0, 0);
        DensityOperator b = DensityOperator.ofKet(0.6, 0.8, 0);
        assertClose(PositiveOperator.ofEigenvalues(0, 0, 0), a.parallelSum(b, T), 1e-15);
        PositiveOperator p = PositiveOperator.ofEigenvalues(1, 1, 0);
        PositiveOperator q = PositiveOperator.ofEigenvalues(0, 1, 1);
        assertClose(PositiveOperator.ofEigenvalues(0, 0.5, 0), p.parallelSum(q, T), 1e-15);
    }

    @Test
    void shapesAreChecked() {
        PositiveOperator a = PositiveOperator.ofEigenvalues(1, 2);
        PositiveOperator b = PositiveOperator.ofEigenvalues(1);
        String rest = ": the second operator is 1 x 1, expected 2 x 2, as the first; both must act on the same space";
        Meaning.assertRefusal("HermitianOperator.minimum" + rest, () -> a.minimum(b));
        Meaning.assertRefusal("PositiveOperator.quotient" + rest, () -> a.quotient(b, T));
        Meaning.assertRefusal("PositiveOperator.parallelSum" + rest, () -> a.parallelSum(b, T));
    }
}
