package org.minorant.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.util.Random;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import org.junit.jupiter.api.Test;
import org.minorant.core.OperatorGenerator.Case;

/** Who is positive: proofs by Cholesky, bounds on what is cut off, and refusals, at every scale. */
class PositivityTest {

    @Provide
    Arbitrary<Case> cases() {
        return OperatorGenerator.cases(4);
    }

    /** What the test calls positive definite is, also where the smallest eigenvalue is at the rounding level on either side of zero. */
    @Property(tries = 120, seed = "81")
    void choleskyProves(@ForAll("cases") Case c) {
        Random r = c.random();
        double[] values = OperatorGenerator.spectrum(c.kind(), c.dimension(), r);
        double edge = Math.pow(10, -12 - 6 * r.nextDouble());
        values[0] = r.nextBoolean() ? edge : -edge;
        int shift = r.nextInt(3) * 250 - 250;
        Operator a = OperatorGenerator.hermitian(values, OperatorGenerator.unitary(c.dimension(), c.complex(), r))
                .times(Math.scalb(1.0, shift));
        BigDecimal least = least(a);
        if (CholeskyTest.isPositiveDefinite(a)) {
            assertTrue(least.signum() > 0);
        } else {
            // and it is not blind: what it leaves open is within the shift it subtracts, twice
            double limit = 2 * 8.0 * (c.dimension() + 6) * 0x1p-53 * a.trace().re();
            assertTrue(least.doubleValue() <= limit);
        }
    }

    private static BigDecimal least(Operator a) {
        BigDecimal least = null;
        for (BigDecimal v : ExactMatrix.of(a).eigenvalues()) {
            least = least == null ? v : least.min(v);
        }
        return least;
    }

    @Property(tries = 60, seed = "82")
    void negativeTraceIsBoundedOrRefused(@ForAll("cases") Case c) {
        Random r = c.random();
        double[] values = OperatorGenerator.spectrum(c.kind(), c.dimension(), r);
        values[0] = -Math.pow(10, -10 - 8 * r.nextDouble());
        int shift = r.nextInt(5) * 400 - 800;
        Operator a = OperatorGenerator.hermitian(values, OperatorGenerator.unitary(c.dimension(), c.complex(), r))
                .times(Math.scalb(1.0, shift));
        ExactMatrix exact = ExactMatrix.of(a);
        BigDecimal negative = exact.negativeTrace();
        BigDecimal norm = exact.traceNorm();
        double relative = negative.divide(norm, ExactMatrix.MC).doubleValue();
        try {
            PositiveOperator p = PositiveOperator.of(a);
            assertTrue(negative.compareTo(new BigDecimal(p.entryDefect())) <= 0);
            assertTrue(relative <= c.dimension() * 0x1p-47);
            assertTrue(p.entryDefect() <= (relative + c.dimension() * c.dimension() * 0x1p-47) * norm.doubleValue());
        } catch (InvalidInputException e) {
            assertTrue(least(a).negate().divide(norm, ExactMatrix.MC).doubleValue() > 0x1p-50);
        }
    }

    @Test
    void positiveDefiniteEntriesAreExact() {
        PositiveOperator p = PositiveOperator.of(new double[][] {{2, 1}, {1, 2}}, new double[][] {{0, 0.5}, {-0.5, 0}});
        assertEquals(0, p.entryDefect());
        assertFalse(p.isDefinedByFactor());
        assertTrue(p.knownColumns().isEmpty());
        assertEquals(2, p.factor().rank());
        assertTrue(p.traceEnclosure().contains(4.0) && p.traceEnclosure().width() < 1e-14);
    }

    @Test
    void zeroIsPositive() {
        PositiveOperator zero = PositiveOperator.of(Operator.ofReal(new double[2][2]));
        assertEquals(0, zero.entryDefect());
        assertEquals(0, zero.factor().columns().frobeniusUpper());
        assertEquals(Enclosure.ZERO, zero.traceEnclosure());
        PositiveOperator nothing = PositiveOperator.ofFactor(Operator.ofReal(new double[2][1]));
        assertEquals(0, nothing.traceEnclosure().lower());
        assertTrue(nothing.traceEnclosure().upper() < 1e-300);
    }

    @Test
    void refusals() {
        Meaning.assertRefusal(
                "PositiveOperator.of: the smallest diagonal entry is -1.0, expected at least -7.105427357601002E-15 (rounding); check the"
                        + " matrix, or use DensityOperator.nearest, which projects and says by how much",
                () -> PositiveOperator.of(HermitianOperator.diagonal(-1, 1)));
        String message = assertThrows(
                        InvalidInputException.class,
                        () -> PositiveOperator.of(Operator.ofReal(new double[][] {{0, 1}, {1, 0}})))
                .getMessage();
        assertTrue(
                message.matches(
                        "PositiveOperator\\.of: the smallest eigenvalue is -(1\\.0|0\\.9999999999999\\d*|1\\.000000000000\\d*), expected at"
                                + " least -7\\.1054273576\\d*E-15 \\(rounding\\); check the matrix, or use DensityOperator\\.nearest, which projects"
                                + " and says by how much"),
                message);
        Meaning.assertRefusal(
                "PositiveOperator.of: the operator is not Hermitian, entries (1, 0) and (0, 1) differ from conjugates by 1.0, expected"
                        + " conjugates exactly; use HermitianOperator.nearest, or DensityOperator.nearest, which say by how much they"
                        + " repair",
                () -> PositiveOperator.of(Operator.ofReal(new double[][] {{1, 1}, {0, 1}})));
        Meaning.assertRefusal(
                "PositiveOperator.of: the operator is 1 x 2, expected a square operator; check the shape",
                () -> PositiveOperator.of(Operator.ofReal(new double[1][2])));
        Meaning.assertRefusal(
                "PositiveOperator.ofEigenvalues: eigenvalue 1 is -1.0E-20, expected between 0.0 and 1.7976931348623157E308; give a number"
                        + " in that range",
                () -> PositiveOperator.ofEigenvalues(1, -1e-20));
        Meaning.assertRefusal(
                "HermitianOperator.diagonal: entry 0 (row-major) is NaN, expected a finite number; check the computation that made it",
                () -> PositiveOperator.ofEigenvalues(Double.NaN));
        Meaning.assertRefusal(
                "PositiveFactor: the errors are 1.0 and 0.0, expected 0 <= relative < 1 and 0 <= trace; check the derivation of the"
                        + " factor",
                () -> new PositiveFactor(EnclosedMatrix.identity(1), 1, 0));
        Meaning.assertRefusal(
                "PositiveFactor: entry (0, 0) has the radius 0.5, expected columns of exact numbers; use PositiveFactor.ofEnclosed, which"
                        + " turns radii into errors of the factor",
                () -> new PositiveFactor(
                        EnclosedMatrix.builder(1, 1).set(0, 0, 1, 0, 0, 0, 0.5).build(), 0, 0));
        Meaning.assertRefusal(
                "PositiveFactor: the errors are 0.0 and NaN, expected 0 <= relative < 1 and 0 <= trace; check the derivation of the"
                        + " factor",
                () -> new PositiveFactor(EnclosedMatrix.identity(1), 0, Double.NaN));
    }
}
