package org.minorant.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.util.Arrays;
import java.util.Random;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import org.junit.jupiter.api.Test;
import org.minorant.core.OperatorGenerator.Case;

/** The Loewner order: extreme eigenvalues of differences hold the exact ones, and what is said to be certain is true. */
class LoewnerComparisonTest {

    @Provide
    Arbitrary<Case> cases() {
        return OperatorGenerator.cases(4);
    }

    @Property(tries = 40, seed = "51")
    void extremeEigenvaluesAreEnclosed(@ForAll("cases") Case c) {
        Random r = c.random();
        PositiveOperator a = c.positive();
        Operator x = OperatorGenerator.gaussian(c.dimension(), 2, c.complex(), r);
        PositiveOperator b = PositiveOperator.ofFactor(x);
        assertEnclosed(a, Meaning.ofEntries(a), b, Meaning.ofColumns(x));
        HermitianOperator h = a.minus(b);
        assertEnclosed(h, ExactMatrix.of(h), b, Meaning.ofColumns(x));
    }

    private static void assertEnclosed(
            HermitianOperator a, ExactMatrix exactA, HermitianOperator b, ExactMatrix exactB) {
        LoewnerComparison comparison = LoewnerComparison.of(a, b);
        BigDecimal[] values = exactB.minus(exactA).eigenvalues();
        Arrays.sort(values);
        assertHolds(comparison.least(), values[0]);
        assertHolds(comparison.largest(), values[values.length - 1]);
        Answer below = comparison.isBelow();
        if (values[0].doubleValue() < -1e-20) {
            assertEquals(Answer.CERTAINLY_NOT, below);
            assertEquals(comparison.least(), comparison.violation().orElseThrow());
            Operator v = comparison.leastVector();
            double energy =
                    v.adjoint().times(b.minus((Operator) a)).times(v).trace().re();
            assertEquals(values[0].doubleValue(), energy, 1e-14);
            assertEquals(1, v.hilbertSchmidtNorm().midpoint(), 1e-14);
        } else {
            assertTrue(comparison.violation().isEmpty());
        }
        if (values[0].doubleValue() > 1e-20) {
            assertEquals(Answer.CERTAINLY, below);
        }
        // the reverse comparison says the same
        LoewnerComparison reverse = LoewnerComparison.of(b, a);
        assertEquals(comparison.isBelow(), reverse.isAbove());
        assertEquals(comparison.isAbove(), reverse.isBelow());
    }

    private static void assertHolds(Enclosure e, BigDecimal value) {
        BigDecimal slack = new BigDecimal("1e-80");
        assertTrue(
                e.contains(value) || e.widen(1e-80).contains(value.subtract(slack)),
                () -> value.doubleValue() + " is not in " + e);
        assertTrue(e.width() <= 2e-15 * Math.abs(value.doubleValue()) + 4e-13, () -> "width " + e.width());
    }

    @Test
    void touchingOperatorsAreLeftUndecidedUnlessDiagonal() {
        DensityOperator psi = DensityOperator.ofKet(0.5, 0.5, 0.5, 0.5);
        PositiveOperator one = PositiveOperator.of(HermitianOperator.identity(4));
        LoewnerComparison c = LoewnerComparison.of(psi, one);
        assertEquals(Answer.UNDECIDED, c.isBelow());
        assertEquals(Answer.CERTAINLY_NOT, c.isAbove());
        assertTrue(c.least().contains(0.0) || c.least().width() < 1e-15);
        LoewnerComparison d = LoewnerComparison.of(HermitianOperator.diagonal(1, 2), HermitianOperator.diagonal(1, 3));
        assertEquals(Answer.CERTAINLY, d.isBelow());
        assertEquals(Enclosure.ZERO, d.least());
        assertEquals(Enclosure.ONE, d.largest());
        assertEquals(1, d.leastVector().re(0, 0));
    }

    @Test
    void diagonalViolation() {
        LoewnerComparison c =
                LoewnerComparison.of(HermitianOperator.diagonal(1, 2), HermitianOperator.diagonal(3, 1.5));
        assertEquals(Enclosure.exact(-0.5), c.violation().orElseThrow());
        assertEquals(1, c.leastVector().re(1, 0));
        assertEquals(Answer.CERTAINLY_NOT, c.isAbove());
    }

    @Test
    void shapesAreChecked() {
        Meaning.assertRefusal(
                "LoewnerComparison.of: the second operator is 3 x 3, expected 2 x 2, as the first; both must act on the same space",
                () -> LoewnerComparison.of(HermitianOperator.identity(2), HermitianOperator.identity(3)));
    }
}
