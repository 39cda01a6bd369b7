package org.minorant.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Random;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import org.junit.jupiter.api.Test;
import org.minorant.core.OperatorGenerator.Case;

/** Kraus channels: definitions, duality, compositions, refusals. */
class KrausChannelTest {

    @Provide
    Arbitrary<Case> cases() {
        return OperatorGenerator.cases(4);
    }

    private static KrausChannel channel(int out, int in, int count, boolean complex, Random r) {
        List<Operator> kraus = new java.util.ArrayList<>();
        for (int k = 0; k < count; k++) {
            kraus.add(OperatorGenerator.gaussian(out, in, complex, r));
        }
        return KrausChannel.nearest(kraus).channel();
    }

    private static void assertClose(Operator expected, Operator actual, double tolerance) {
        double d = expected.minus(actual).hilbertSchmidtNorm().upper();
        assertTrue(d <= tolerance, () -> "distance " + d);
    }

    @Property(tries = 60, seed = "71")
    void allTypesOfInputAgreeAndTracesAreKept(@ForAll("cases") Case c) {
        Random r = c.random();
        KrausChannel phi = channel(3, c.dimension(), 2, c.complex(), r);
        DensityOperator rho = c.state();
        Operator sum = Operator.ofReal(new double[3][3]);
        for (Operator k : phi.krausOperators()) {
            sum = sum.plus(k.times(rho).times(k.adjoint()));
        }
        assertClose(sum, phi.apply(rho), 1e-14);
        assertClose(sum, phi.apply((PositiveOperator) rho), 1e-14);
        assertClose(sum, phi.apply((HermitianOperator) rho), 1e-14);
        assertClose(sum, phi.apply((Operator) rho), 1e-14);
        assertTrue(phi.apply(rho).traceEnclosure().widen(1e-14).contains(1.0));
        assertTrue(phi.traceDefect() <= c.dimension() * 0x1p-48);
        assertEquals(3, phi.outputDimension());
        assertEquals(c.dimension(), phi.inputDimension());
    }

    /** Tr Φ(A) B = Tr A Φ*(B). */
    @Property(tries = 60, seed = "72")
    void adjointMap(@ForAll("cases") Case c) {
        Random r = c.random();
        int n = c.dimension();
        KrausChannel phi = channel(3, n, 2, c.complex(), r);
        Operator a = OperatorGenerator.gaussian(n, n, true, r);
        Operator b = OperatorGenerator.gaussian(3, 3, true, r);
        Complex left = phi.apply(a).times(b).trace();
        Complex right = a.times(phi.applyAdjoint(b)).trace();
        assertEquals(left.re(), right.re(), 1e-13);
        assertEquals(left.im(), right.im(), 1e-13);
        HermitianOperator one = HermitianOperator.identity(3);
        assertClose(HermitianOperator.identity(n), phi.applyAdjoint(one), 1e-14);
        PositiveOperator effect = PositiveOperator.of(one);
        assertClose(HermitianOperator.identity(n), phi.applyAdjoint(effect), 1e-14);
    }

    /** Φ(A) = Tr_in[(Aᵀ ⊗ 1) J] for the Choi operator J on input ⊗ output. */
    @Property(tries = 60, seed = "73")
    void choiOperatorIsTheChannel(@ForAll("cases") Case c) {
        Random r = c.random();
        int n = c.dimension();
        KrausChannel phi = channel(2, n, 2, c.complex(), r);
        PositiveOperator j = phi.choiOperator();
        Operator a = OperatorGenerator.gaussian(n, n, true, r);
        TensorLayout layout = TensorLayout.of(n, 2);
        Operator image = layout.partialTrace(
                a.transpose().tensor((Operator) HermitianOperator.identity(2)).times(j), 0);
        assertClose(phi.apply(a), image, 1e-13);
        assertClose(HermitianOperator.identity(n), layout.partialTrace(j, 1), 1e-13);
        assertEquals(2, j.factor().rank());
    }

    @Property(tries = 40, seed = "74")
    void compositionTensorAndComplement(@ForAll("cases") Case c) {
        Random r = c.random();
        int n = c.dimension();
        KrausChannel phi = channel(2, n, 2, c.complex(), r);
        KrausChannel psi = channel(3, 2, 1, true, r);
        DensityOperator rho = c.state();
        assertClose(psi.apply(phi.apply(rho)), phi.then(psi).apply(rho), 1e-14);
        assertEquals(2, phi.then(psi).krausOperators().size());
        DensityOperator sigma = DensityOperator.ofBloch(0.3, -0.2, 0.4);
        assertClose(phi.apply(rho).tensor(psi.apply(sigma)), phi.tensor(psi).apply(rho.tensor(sigma)), 1e-14);
        // the isometry V = Σ K_k ⊗ |k⟩ gives both the channel and its complement
        KrausChannel complement = phi.complementary();
        assertEquals(2, complement.outputDimension());
        assertTrue(complement.traceDefect() <= 2 * n * 0x1p-48);
        List<Operator> k = phi.krausOperators();
        DensityOperator environment = complement.apply(rho);
        for (int i = 0; i < 2; i++) {
            for (int l = 0; l < 2; l++) {
                Complex t = k.get(i).times(rho).times(k.get(l).adjoint()).trace();
                assertEquals(t.re(), environment.re(i, l), 1e-14);
                assertEquals(t.im(), environment.im(i, l), 1e-14);
            }
        }
    }

    @Test
    void wideImagesAreMadeSquareWhereThatKeepsAccuracy() {
        KrausChannel phi = StandardChannels.depolarising(4, 0.5);
        DensityOperator rho = DensityOperator.of(
                new OperatorGenerator.Case(OperatorGenerator.SpectrumKind.RANDOM, 4, true, 3).positive());
        DensityOperator image = phi.apply(rho);
        assertEquals(4, image.factor().rank());
        assertEquals(0, image.factor().traceError());
        assertTrue(image.factor().relativeError() < 1e-25);
        assertTrue(image.knownColumns().isEmpty());
    }

    @Test
    void monomialKrausOperatorsKeepKetsExact() {
        DensityOperator ket = DensityOperator.ofKet(new double[] {0.6, 0}, new double[] {0, 0.8});
        DensityOperator image = StandardChannels.amplitudeDamping(0.3).apply(ket);
        assertEquals(0, image.factor().relativeError());
        assertEquals(0, image.factor().traceError());
        assertEquals(2, image.factor().rank());
    }

    @Test
    void nearestSaysByHowMuch() {
        Operator half = HermitianOperator.identity(2).times(0.5);
        RepairedChannel r = KrausChannel.nearest(List.of(half));
        // ‖¼1 − 1‖_F = ¾ √2
        assertEquals(0.75 * Math.sqrt(2), r.traceDefectBefore(), 1e-13);
        assertClose(HermitianOperator.identity(2), r.channel().krausOperators().get(0), 1e-15);
    }

    @Test
    void refusals() {
        Meaning.assertRefusal(
                "KrausChannel.of: there is no Kraus operator, expected at least one; give the list",
                () -> KrausChannel.of(List.of()));
        Operator one = HermitianOperator.identity(2);
        Meaning.assertRefusal(
                "KrausChannel.of: the second operator is 3 x 3, expected 2 x 2, as the first; both must act on the same space",
                () -> KrausChannel.of(one, HermitianOperator.identity(3)));
        String message = org.junit.jupiter.api.Assertions.assertThrows(
                        InvalidInputException.class, () -> KrausChannel.of(one, one))
                .getMessage();
        assertTrue(
                message.startsWith("KrausChannel.of: the sum of K*K differs from the identity by 1.41421356237")
                        && message.endsWith(
                                " in Hilbert-Schmidt norm, expected at most 7.105427357601002E-15; use KrausChannel.nearest, which"
                                        + " repairs and says by how much"),
                message);
        Meaning.assertRefusal(
                "KrausChannel.nearest: the sum of K*K has the eigenvalue 0.0, expected a positive definite sum; some input is mapped to"
                        + " nothing: add a Kraus operator for it",
                () -> KrausChannel.nearest(List.of(HermitianOperator.diagonal(1, 0))));
        KrausChannel identity = StandardChannels.identity(2);
        Meaning.assertRefusal(
                "KrausChannel.apply: the operator is 3 x 3, expected 2 x 2; give an operator on the space mapped from",
                () -> identity.apply(DensityOperator.maximallyMixed(3)));
        Meaning.assertRefusal(
                "KrausChannel.applyAdjoint: the operator is 3 x 3, expected 2 x 2; give an operator on the space mapped from",
                () -> identity.applyAdjoint(HermitianOperator.identity(3)));
        Meaning.assertRefusal(
                "KrausChannel.then: the next channel takes inputs of dimension 3, expected 2, as the outputs of the first; check the"
                        + " order of the channels",
                () -> identity.then(StandardChannels.identity(3)));
        assertEquals("KrausChannel from dimension 2 to 2, 1 Kraus operators", identity.toString());
    }
}
