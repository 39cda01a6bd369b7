package org.minorant.core;

import java.util.OptionalInt;
import java.util.function.LongBinaryOperator;

/**
 * Tensor products and direct sums of the operators meant, with rounded entries.
 *
 * <p><b>Entries.</b> ‖A'⊗B' − A⊗B‖₁ ≤ δ‖B'‖₁ + ‖A‖₁δ' for entries A', B' within δ, δ' of A, B in trace norm; a complex product of entries is within √5·2^-53
 * of its modulus (Brent, Percival and Zimmermann 2007; from memory), in trace norm √n times the Frobenius norm of that.
 */
final class PositiveCombinations {

    private PositiveCombinations() {}

    static PositiveOperator tensor(PositiveOperator a, PositiveOperator b) {
        Operator entries = TensorProducts.tensor("PositiveOperator.tensor", a, b);
        int n = entries.rows();
        double rounding = Math.sqrt(n) * (0x1p-51 * FrobeniusBound.of(a) * FrobeniusBound.of(b) + n * 0x1p-1070);
        double traceA = a.traceEnclosure().upper();
        // ‖B'‖₁ ≤ Tr B + δ'
        double traceB = b.traceEnclosure().upper() + b.entryDefect();
        double defect = (rounding
                        + FrobeniusBound.times(a.entryDefect(), traceB)
                        + FrobeniusBound.times(b.entryDefect(), traceA))
                * (1 + 0x1p-40);
        return new PositiveOperator(
                entries,
                defect,
                FactorSource.later(() -> FactorShapes.tensor(a.factor(), b.factor()), columns(a, b, (p, q) -> p * q)));
    }

    static PositiveOperator directSum(PositiveOperator a, PositiveOperator b) {
        Operator entries = TensorProducts.directSum("PositiveOperator.directSum", a, b);
        double defect = (a.entryDefect() + b.entryDefect()) * (1 + 0x1p-52);
        // the positive part of a block matrix is that of its blocks: entries that defined both define the sum
        return new PositiveOperator(
                entries,
                defect,
                FactorSource.later(
                        () -> FactorShapes.directSum(a.factor(), b.factor()), columns(a, b, (p, q) -> p + q)),
                a.isDefinedByFactor() || b.isDefinedByFactor());
    }

    static PositiveOperator conjugate(PositiveOperator a, Operator entries) {
        return new PositiveOperator(
                entries,
                a.entryDefect(),
                FactorSource.later(() -> FactorShapes.conjugate(a.factor()), a.knownColumns()),
                a.isDefinedByFactor());
    }

    private static OptionalInt columns(PositiveOperator a, PositiveOperator b, LongBinaryOperator combined) {
        OptionalInt p = a.knownColumns();
        OptionalInt q = b.knownColumns();
        return p.isEmpty() || q.isEmpty()
                ? OptionalInt.empty()
                : OptionalInt.of((int) Math.min(Integer.MAX_VALUE, combined.applyAsLong(p.getAsInt(), q.getAsInt())));
    }
}
