package org.minorant.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Random;
import org.junit.jupiter.api.Test;

/** The textbook channels do what their formulas say. */
class StandardChannelsTest {

    private static final DensityOperator RHO = DensityOperator.ofBloch(0.3, -0.4, 0.5);

    private static void assertBloch(double x, double y, double z, DensityOperator d) {
        assertEquals(x / 2, d.re(1, 0), 1e-15);
        assertEquals(y / 2, d.im(1, 0), 1e-15);
        assertEquals((1 + z) / 2, d.re(0, 0), 1e-15);
        assertEquals((1 - z) / 2, d.re(1, 1), 1e-15);
    }

    @Test
    void qubitChannelsActOnBlochVectors() {
        assertBloch(0.3, -0.4, 0.5, StandardChannels.identity(2).apply(RHO));
        assertBloch(
                0.3 * 0.7,
                -0.4 * 0.7,
                0.5 * 0.7,
                StandardChannels.depolarising(2, 0.3).apply(RHO));
        assertBloch(
                0.3 * 0.7, -0.4 * 0.7, 0.5, StandardChannels.dephasing(2, 0.3).apply(RHO));
        assertBloch(0.3, -0.4 * 0.4, 0.5 * 0.4, StandardChannels.bitFlip(0.3).apply(RHO));
        assertBloch(0.3 * 0.4, -0.4 * 0.4, 0.5, StandardChannels.phaseFlip(0.3).apply(RHO));
        double r = Math.sqrt(0.7);
        assertBloch(
                0.3 * r,
                -0.4 * r,
                0.3 + 0.7 * 0.5,
                StandardChannels.amplitudeDamping(0.3).apply(RHO));
    }

    @Test
    void largerDimensions() {
        DensityOperator d = new OperatorGenerator.Case(OperatorGenerator.SpectrumKind.RANDOM, 3, true, 8).state();
        DensityOperator depolarised = StandardChannels.depolarising(3, 0.25).apply(d);
        DensityOperator dephased = StandardChannels.dephasing(3, 0.25).apply(d);
        DensityOperator erased = StandardChannels.erasure(3, 0.25).apply(d);
        for (int i = 0; i < 3; i++) {
            for (int j = 0; j < 3; j++) {
                assertEquals(0.75 * d.re(i, j) + (i == j ? 0.25 / 3 : 0), depolarised.re(i, j), 1e-15);
                assertEquals(0.75 * d.im(i, j), depolarised.im(i, j), 1e-15);
                assertEquals((i == j ? 1 : 0.75) * d.re(i, j), dephased.re(i, j), 1e-15);
                assertEquals(0.75 * d.re(i, j), erased.re(i, j), 1e-15);
            }
            assertEquals(0, erased.re(i, 3));
        }
        assertEquals(0.25, erased.re(3, 3), 1e-15);
    }

    @Test
    void unitaryAndIsometry() {
        Operator u = OperatorGenerator.unitary(3, true, new Random(4));
        DensityOperator d = DensityOperator.ofKet(0.6, 0, 0.8);
        Operator expected = u.times(d).times(u.adjoint());
        assertTrue(expected.minus(StandardChannels.unitary(u).apply(d))
                        .hilbertSchmidtNorm()
                        .upper()
                < 1e-15);
        Operator isometry = Operator.ofReal(new double[][] {{1, 0}, {0, 0.6}, {0, 0.8}});
        assertEquals(3, StandardChannels.unitary(isometry).apply(RHO).dimension());
    }

    @Test
    void allTheWayAndNotAtAll() {
        assertEquals(RHO, StandardChannels.depolarising(2, 0).apply(RHO));
        assertBloch(0, 0, 0, StandardChannels.depolarising(2, 1).apply(RHO));
        assertBloch(0, 0, 1, StandardChannels.amplitudeDamping(1).apply(RHO));
        assertEquals(1, StandardChannels.erasure(2, 1).apply(RHO).re(2, 2), 1e-15);
    }

    @Test
    void refusals() {
        String rest = ": the probability is 1.5, expected between 0.0 and 1.0; give a number in that range";
        Meaning.assertRefusal("StandardChannels.depolarising" + rest, () -> StandardChannels.depolarising(2, 1.5));
        Meaning.assertRefusal("StandardChannels.dephasing" + rest, () -> StandardChannels.dephasing(2, 1.5));
        Meaning.assertRefusal("StandardChannels.amplitudeDamping" + rest, () -> StandardChannels.amplitudeDamping(1.5));
        Meaning.assertRefusal("StandardChannels.bitFlip" + rest, () -> StandardChannels.bitFlip(1.5));
        Meaning.assertRefusal("StandardChannels.phaseFlip" + rest, () -> StandardChannels.phaseFlip(1.5));
        Meaning.assertRefusal("StandardChannels.erasure" + rest, () -> StandardChannels.erasure(2, 1.5));
        Meaning.assertRefusal(
                "StandardChannels.bitFlip: the probability is NaN, expected between 0.0 and 1.0; give a number in that range",
                () -> StandardChannels.bitFlip(Double.NaN));
        Meaning.assertRefusal(
                "StandardChannels.depolarising: the shape is 0 x 0, expected at least 1 x 1; give at least one entry",
                () -> StandardChannels.depolarising(0, 0.5));
        long limit = Math.min(Runtime.getRuntime().maxMemory(), 16L * Integer.MAX_VALUE);
        Meaning.assertRefusal(
                "StandardChannels.depolarising, all Kraus operators: the shape is 1000001 x 1000000, which takes 16000016000000 bytes,"
                        + " expected at most " + limit + " bytes; reduce the dimension or raise the heap (-Xmx)",
                () -> StandardChannels.depolarising(1000, 0.5));
    }
}
