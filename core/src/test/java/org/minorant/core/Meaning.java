package org.minorant.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import org.junit.jupiter.api.function.Executable;

/** Checks what a positive operator promises against the operator it means, known exactly. */
final class Meaning {

    private Meaning() {}

    /** The operator meant by entries: their positive part. */
    static ExactMatrix ofEntries(PositiveOperator a) {
        ExactMatrix entries = ExactMatrix.of(a);
        return entries.isPositiveDefinite() ? entries : entries.positivePart();
    }

    /** The operator meant by a factor of exact numbers. */
    static ExactMatrix ofColumns(Operator x) {
        return ExactMatrix.of(x).squared();
    }

    /** The sandwich of the factor, the defect of the entries, and the trace. */
    static void assertMeans(ExactMatrix meant, PositiveOperator a) {
        assertSandwich(meant, a.factor());
        BigDecimal distance = ExactMatrix.of(a).minus(meant).traceNorm();
        assertTrue(
                distance.compareTo(new BigDecimal(a.entryDefect()).add(oracleError(meant))) <= 0,
                () -> "entries are " + distance.doubleValue() + " away, more than " + a.entryDefect());
        BigDecimal slack = oracleError(meant);
        BigDecimal trace = meant.trace();
        assertTrue(
                new BigDecimal(a.traceEnclosure().lower()).compareTo(trace.add(slack)) <= 0
                        && trace.subtract(slack)
                                        .compareTo(new BigDecimal(
                                                a.traceEnclosure().upper()))
                                <= 0,
                () -> trace.doubleValue() + " is not in " + a.traceEnclosure());
    }

    /** (1 − η) XX* − N₁ ≤ A ≤ (1 + η) XX* + N₂ with traces of N₁, N₂ at most ν. */
    static void assertSandwich(ExactMatrix meant, PositiveFactor f) {
        ExactMatrix square = ExactMatrix.of(f.columns()).squared();
        BigDecimal eta = new BigDecimal(f.relativeError());
        assertAlmostPositive("lower", meant.minus(square.times(BigDecimal.ONE.subtract(eta))), meant, f);
        assertAlmostPositive("upper", square.times(BigDecimal.ONE.add(eta)).minus(meant), meant, f);
    }

    private static void assertAlmostPositive(String side, ExactMatrix d, ExactMatrix meant, PositiveFactor f) {
        BigDecimal negative;
        BigDecimal limit;
        if (f.traceError() == 0) {
            // scaling to unit diagonal keeps the sign and shows the smallest directions
            negative = d.scaledBy(ExactMatrix.of(f.columns()).squared()).negativeTrace();
            limit = new BigDecimal("1e-85");
        } else {
            negative = d.negativeTrace();
            limit = new BigDecimal(f.traceError()).add(oracleError(meant));
        }
        assertTrue(
                negative.compareTo(limit) <= 0,
                () -> side + " side: negative trace " + negative.doubleValue() + ", eta " + f.relativeError() + ", nu "
                        + f.traceError());
    }

    private static BigDecimal oracleError(ExactMatrix meant) {
        return meant.largest().scaleByPowerOfTen(-85);
    }

    static void assertRefusal(String message, Executable action) {
        assertEquals(message, assertThrows(InvalidInputException.class, action).getMessage());
    }
}
