package org.minorant.bounds;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.junit.jupiter.api.Test;
import org.minorant.core.DensityOperator;
import org.minorant.core.InvalidInputException;

/** Block lengths against a look at every n, and what is refused. */
final class BlockLengthTest {

    private static final double C = 0.7136030428840437; // 1 − h(0.05), bits

    private static CodingBounds symmetric() {
        return CodingBounds.of(ClassicalQuantumChannel.ofStochasticMatrix(new double[][] {{0.95, 0.05}, {0.05, 0.95}}));
    }

    @Test
    void everyLengthOfASymmetricChannel() {
        BlockLength found = symmetric().blockLengthFor(0.5, 0.01);
        for (int n = 1; n <= found.sure(); n++) {
            CodingBounds b = symmetric().uses(n);
            double messages = Math.ceil(Math.pow(2, 0.5 * n * C));
            double bits = Math.log(messages) / Math.log(2);
            if (n < found.impossibleBefore()) {
                // at most what a code of more uses carries, which ignores some
                boolean excluded = false;
                for (int more = n; more < found.impossibleBefore() && !excluded; more++) {
                    excluded = symmetric().uses(more).converse(0.01).bits().upper() < bits;
                }
                assertTrue(excluded, "n = " + n);
            }
            boolean isSure = b.randomCodingUnionError((long) messages).upper() <= 0.01
                    || b.dependenceTestingError((long) messages).upper() <= 0.01;
            assertEquals(n == found.sure(), isSure, "n = " + n);
        }
        assertTrue(symmetric()
                        .uses(found.impossibleBefore())
                        .converse(0.01)
                        .bits()
                        .upper()
                >= Math.log(Math.ceil(Math.pow(2, 0.5 * found.impossibleBefore() * C))) / Math.log(2) - 1e-9);
        assertEquals(WholeUnit.MESSAGES, found.unit());
        assertEquals(0.5, found.fraction());
        assertEquals(0.01, found.error());
        assertEquals(TraceMinimumConverse.THEOREM, found.converse());
        assertTrue(
                found.toString().startsWith("impossible before " + found.impossibleBefore() + " uses, sure with "),
                found.toString());
    }

    /** Whole bits are at least as much as any number of messages. */
    @Test
    void bitsTakeMoreUses() {
        BlockLength messages = symmetric().blockLengthFor(0.6, 0.01);
        BlockLength bits = symmetric().blockLengthFor(0.6, 0.01, WholeUnit.BITS);
        assertTrue(messages.sure() <= bits.sure(), () -> messages + " " + bits);
        assertTrue(messages.impossibleBefore() <= bits.impossibleBefore(), () -> messages + " " + bits);
        double whole = Math.ceil(0.6 * bits.sure() * C);
        assertTrue(symmetric()
                        .uses(bits.sure())
                        .randomCodingUnionError(org.minorant.core.Information.ofBits(whole))
                        .upper()
                <= 0.01);
    }

    @Test
    void unsymmetricChannel() {
        CodingBounds z =
                CodingBounds.of(ClassicalQuantumChannel.ofStochasticMatrix(new double[][] {{1, 0}, {0.5, 0.5}}));
        BlockLength found = z.blockLengthFor(0.4, 0.05);
        assertTrue(found.impossibleBefore() <= found.sure());
        double bits = 0.4 * found.sure() * Math.log(1.25) / Math.log(2);
        long m = (long) Math.ceil(Math.pow(2, bits - 1e-9));
        CodingBounds b = z.uses(found.sure());
        assertTrue(Math.min(
                        b.randomCodingUnionError(m).upper(),
                        b.dependenceTestingError(m).upper())
                <= 0.05);
    }

    @Test
    void ketsAndQubits() {
        CodingBounds kets = CodingBounds.of(ClassicalQuantumChannel.of(
                DensityOperator.ofKet(Channels.ket(0.5, false)), DensityOperator.ofKet(Channels.ket(0.5, true))));
        BlockLength found = kets.blockLengthFor(0.7, 0.01);
        double rate = 0.7 * kets.channel().capacity().value().nats().midpoint();
        assertTrue(kets.uses(found.sure()).achievable(0.01).nats().lower() > rate * found.sure() - 1e-9);
        int last = found.impossibleBefore() - 1;
        // two messages are the least that any rate asks for
        assertTrue(
                last > 1 && kets.uses(last).converse(0.01).nats().upper() < Math.log(Math.ceil(Math.exp(rate * last))));
        assertEquals(RandomCoding.THEOREM, found.achievability());
        CodingBounds qubits = CodingBounds.of(ClassicalQuantumChannel.of(
                DensityOperator.ofBloch(0.6, 0, 0.6), DensityOperator.ofBloch(-0.6, 0, 0.6)));
        BlockLength few = qubits.blockLengthFor(0.3, 0.2);
        assertTrue(few.impossibleBefore() <= few.sure() && few.sure() < 60, few::toString);
    }

    @Test
    void refusals() {
        for (double epsilon : new double[] {0, 1, Double.NaN}) {
            refused("the error probability is " + epsilon, () -> symmetric().blockLengthFor(0.9, epsilon));
        }
        for (double fraction : new double[] {0, 1, -0.5, Double.NaN}) {
            refused("the fraction of capacity is " + fraction, () -> symmetric().blockLengthFor(fraction, 0.1));
        }
        CodingBounds nothing =
                CodingBounds.of(ClassicalQuantumChannel.ofStochasticMatrix(new double[][] {{0.3, 0.7}, {0.3, 0.7}}));
        refused("the capacity is", () -> nothing.blockLengthFor(0.9, 0.1));
        refused("more than 1000000 uses are needed", () -> symmetric().blockLengthFor(1 - 1e-9, 1e-3));
        assertThrows(
                InvalidInputException.class,
                () -> new BlockLength(
                        3, 4, 0.5, 0.1, WholeUnit.BITS, RandomCoding.THEOREM, TraceMinimumConverse.THEOREM));
    }

    private static void refused(String part, org.junit.jupiter.api.function.Executable asked) {
        InvalidInputException e = assertThrows(InvalidInputException.class, asked);
        assertTrue(e.getMessage().contains(part), e.getMessage());
    }
}
