package org.minorant.tests.containment;

import java.math.BigDecimal;
import org.minorant.core.Enclosure;
import org.minorant.core.pair.PositivePair;
import org.minorant.tests.reference.Reference;
import org.minorant.tests.reference.ReferenceMinimum;

/**
 * One question, Tr[aA ∧ bB].
 *
 * @param a weight on A
 * @param first A
 * @param b weight on B
 * @param second B
 */
record PairCase(double a, GivenOperator first, double b, GivenOperator second) {

    Enclosure answer() {
        return PositivePair.of(first.operator(), second.operator()).traceMinimum(a, b);
    }

    Reference reference() {
        return ReferenceMinimum.of(new BigDecimal(a), first.meant(), new BigDecimal(b), second.meant());
    }

    int dimension() {
        return first.operator().dimension();
    }

    /** min(a Tr A, b Tr B), which no answer exceeds. */
    BigDecimal scale() {
        return new BigDecimal(a)
                .multiply(first.meant().trace(128))
                .min(new BigDecimal(b).multiply(second.meant().trace(128)));
    }

    @Override
    public String toString() {
        return "Tr[aA ∧ bB] with a = " + a + ", b = " + b + "\n  A by " + first + "\n  B by " + second;
    }
}
