package org.minorant.bounds;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Random;
import org.junit.jupiter.api.Test;
import org.minorant.bounds.divergence.TestStates;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;

/** Pure states, deficient supports, equal states, infinities that are certain and some that the numbers leave open. */
class DivergenceSpecialCasesTest {

    private static final DensityOperator KET = DensityOperator.ofKet(0.6, 0.8);
    private static final DensityOperator OTHER = DensityOperator.ofKet(Math.sqrt(0.5), Math.sqrt(0.5));
    private static final DensityOperator MIXED = DensityOperator.ofBloch(0.1, 0.2, 0.3);
    private static final Information RATE = Information.ofNats(0.3);

    /** ⟨ψ|σ|ψ⟩ for the ket (0.6, 0.8) and the Bloch vector (0.1, 0.2, 0.3). */
    private static final double EXPECTATION = 0.5 * (1 + 0.1 * 2 * 0.48 - 0.3 * (0.64 - 0.36));

    private static void assertClose(double truth, Enclosure value) {
        // inputs and closed forms are rounded: a few units
        assertEquals(truth, value.midpoint(), 8 * Math.ulp(Math.max(1, Math.abs(truth))), value::toString);
        assertTrue(value.width() <= 4e-15 * Math.max(1, Math.abs(truth)), () -> value.toIntervalString(17));
    }

    private static void assertInfinite(Information value) {
        assertTrue(value.nats().isInfinite(), value.nats()::toString);
        assertTrue(value.bits().isInfinite(), value.bits()::toString);
    }

    @Test
    void aKetAgainstAMixedState() {
        Enclosure relative = Divergences.relativeEntropy(KET, MIXED).nats();
        double r = Math.sqrt(0.14);
        double along = (0.1 * 0.96 - 0.3 * 0.28) / r;
        double truth = -(0.5 * (1 + along) * Math.log(0.5 * (1 + r)) + 0.5 * (1 - along) * Math.log(0.5 * (1 - r)));
        assertClose(truth, relative);
        double difference = Math.log((1 + r) / (1 - r));
        assertClose(
                0.25 * (1 - along * along) * difference * difference, Divergences.relativeEntropyVariance(KET, MIXED));
        assertClose(
                -Math.log(EXPECTATION), Divergences.chernoff(KET, MIXED).value().nats());
        assertEquals(0, Divergences.chernoff(KET, MIXED).s());
        assertClose(
                -Math.log(EXPECTATION), Divergences.chernoff(MIXED, KET).value().nats());
        assertEquals(1, Divergences.chernoff(MIXED, KET).s());
        assertClose(Math.sqrt(EXPECTATION), Divergences.fidelity(KET, MIXED));
        assertClose(
                -Math.log(EXPECTATION), Divergences.minDivergence(KET, MIXED).nats());
        assertEquals(Enclosure.ZERO, Divergences.minDivergence(MIXED, KET).nats());
        assertClose(
                -Math.log(EXPECTATION),
                Divergences.sandwichedRenyi(KET, MIXED, 0.5).nats());
        // D_max = ln ⟨ψ|σ⁻¹|ψ⟩, σ⁻¹ = 2(1 − r·X)/(1 − r²) = (2 − 2σ)·2/(1 − r²)
        assertClose(
                Math.log((4 - 4 * EXPECTATION) / (1 - 0.14)),
                Divergences.maxDivergence(KET, MIXED).nats());
        assertClose(
                Math.log((4 - 4 * EXPECTATION) / (1 - 0.14)),
                Divergences.petzRenyi(KET, MIXED, 2).nats());
    }

    @Test
    void whatIsInfiniteForAMixedStateAgainstAKetIsSaid() {
        assertInfinite(Divergences.relativeEntropy(MIXED, KET));
        assertTrue(Divergences.relativeEntropyVariance(MIXED, KET).isInfinite());
        assertInfinite(Divergences.petzRenyi(MIXED, KET, 1.5));
        assertInfinite(Divergences.sandwichedRenyi(MIXED, KET, 3));
        assertInfinite(Divergences.maxDivergence(MIXED, KET));
        assertInfinite(Divergences.hoeffding(KET, MIXED, RATE));
        assertTrue(Divergences.petzRenyi(MIXED, KET, 0.99).nats().isFinite());
        assertEquals(
                Enclosure.ZERO, Divergences.strongConverse(MIXED, KET, RATE).nats(), "r is below D");
        // above −ln Tr P_ρ σ it is finite again
        Enclosure h = Divergences.hoeffding(KET, MIXED, Information.ofNats(-Math.log(EXPECTATION) + 0.01))
                .nats();
        assertTrue(h.isFinite() && h.lower() > 0, h::toString);
    }

    @Test
    void twoKets() {
        double overlap = Math.pow(0.6 * Math.sqrt(0.5) + 0.8 * Math.sqrt(0.5), 2);
        assertInfinite(Divergences.relativeEntropy(KET, OTHER));
        assertClose(-Math.log(overlap), Divergences.chernoff(KET, OTHER).value().nats());
        assertClose(Math.sqrt(overlap), Divergences.fidelity(KET, OTHER));
        assertClose(Math.sqrt(2 - 2 * Math.sqrt(overlap)), Divergences.buresDistance(KET, OTHER));
        assertClose(
                -Math.log(overlap) / (1 - 0.3),
                Divergences.petzRenyi(KET, OTHER, 0.3).nats());
        assertClose(
                -Math.log(overlap) * 0.75 / 0.25,
                Divergences.sandwichedRenyi(KET, OTHER, 0.75).nats());
        // a test on ψ alone: β = max(0, overlap at level 0) and 0 once ε reaches it
        assertClose(
                -Math.log(overlap), Divergences.hypothesisTesting(KET, OTHER, 0).nats());
        assertEquals(
                Double.POSITIVE_INFINITY,
                Divergences.hypothesisTesting(KET, OTHER, 0.99).nats().upper());
    }

    @Test
    void orthogonalStates() {
        DensityOperator up = DensityOperator.ofKet(1, 0, 0);
        DensityOperator down = DensityOperator.ofEigenvalues(0, 0.5, 0.5);
        assertInfinite(Divergences.relativeEntropy(up, down));
        assertInfinite(Divergences.petzRenyi(up, down, 0.5));
        assertInfinite(Divergences.sandwichedRenyi(up, down, 0.5));
        assertInfinite(Divergences.chernoff(up, down).value());
        assertInfinite(Divergences.minDivergence(up, down));
        assertInfinite(Divergences.hoeffding(up, down, RATE));
        assertEquals(Enclosure.ZERO, Divergences.fidelity(up, down));
        assertClose(Math.sqrt(2), Divergences.buresDistance(up, down));
        assertClose(Math.PI / 2, Divergences.buresAngle(up, down));
    }

    @Test
    void nearlyOrthogonalByRoundingIsLargeAndOpenAbove() {
        // 0.6 · 0.8 − 0.8 · 0.6 vanishes exactly, which the radii of the overlap cannot know
        Enclosure c = Divergences.chernoff(KET, DensityOperator.ofKet(0.8, -0.6))
                .value()
                .nats();
        assertTrue(c.lower() > 60, c::toString);
        assertEquals(Double.POSITIVE_INFINITY, c.upper());
        Enclosure f = Divergences.fidelity(KET, DensityOperator.ofKet(0.8, -0.6));
        assertTrue(f.contains(0) && f.upper() < 1e-28, f::toString);
    }

    @Test
    void equalStates() {
        for (DensityOperator[] p : new DensityOperator[][] {
            {KET, DensityOperator.ofKet(0.6, 0.8)},
            {MIXED, MIXED},
            {DensityOperator.maximallyMixed(3), DensityOperator.maximallyMixed(3)}
        }) {
            assertEquals(Enclosure.ZERO, Divergences.relativeEntropy(p[0], p[1]).nats());
            assertEquals(Enclosure.ZERO, Divergences.relativeEntropyVariance(p[0], p[1]));
            assertEquals(Enclosure.ZERO, Divergences.petzRenyi(p[0], p[1], 3).nats());
            assertEquals(
                    Enclosure.ZERO, Divergences.sandwichedRenyi(p[0], p[1], 0.7).nats());
            assertEquals(Enclosure.ZERO, Divergences.maxDivergence(p[0], p[1]).nats());
            assertEquals(Enclosure.ZERO, Divergences.minDivergence(p[0], p[1]).nats());
            assertEquals(
                    Enclosure.ZERO, Divergences.chernoff(p[0], p[1]).value().nats());
            assertEquals(Enclosure.ZERO, Divergences.hoeffding(p[0], p[1], RATE).nats());
            assertEquals(
                    Enclosure.exact(0.3),
                    Divergences.strongConverse(p[0], p[1], RATE).nats());
            assertEquals(Enclosure.ONE, Divergences.fidelity(p[0], p[1]));
            assertEquals(Enclosure.ZERO, Divergences.buresDistance(p[0], p[1]));
            assertEquals(Enclosure.ZERO, Divergences.buresAngle(p[0], p[1]));
        }
    }

    @Test
    void theSameKetWithAnotherPhaseIsZeroOrOpen() {
        DensityOperator flipped = DensityOperator.ofKet(-0.6, -0.8);
        Enclosure c = Divergences.chernoff(KET, flipped).value().nats();
        assertTrue(c.contains(0) && c.upper() < 1e-26, c::toString);
        Enclosure relative = Divergences.relativeEntropy(KET, flipped).nats();
        assertTrue(relative.contains(0) && relative.upper() == Double.POSITIVE_INFINITY, relative::toString);
        assertEquals(Enclosure.of(0, Double.POSITIVE_INFINITY), Divergences.relativeEntropyVariance(KET, flipped));
        assertTrue(Divergences.strongConverse(KET, flipped, RATE).nats().contains(0.3));
    }

    /** Near states: D is of second order in their distance, 1e-18, and keeps nine digits. */
    @Test
    void statesThatNearlyAgree() {
        double h = 0x1p-30;
        Enclosure relative = Divergences.relativeEntropy(
                        DensityOperator.ofBloch(0, 0, 0.5), DensityOperator.ofBloch(0, 0, 0.5 + h))
                .nats();
        // binary relative entropy to third order: h²/(2(1−z²)) (1 + 4zh/(3(1−z²)))
        double truth = h * h / (2 * 0.75) * (1 + 4 * 0.5 * h / (3 * 0.75));
        assertEquals(truth, relative.midpoint(), truth * 1e-8);
        assertTrue(relative.relativeWidth() < 1e-8, relative::toString);
    }

    @Test
    void aCommonBlockOfZerosDoesNotMatter() {
        DensityOperator rho = DensityOperator.ofReal(new double[][] {{0.5, 0.1, 0}, {0.1, 0.5, 0}, {0, 0, 0}});
        DensityOperator sigma = DensityOperator.ofReal(new double[][] {{0.7, 0.2, 0}, {0.2, 0.3, 0}, {0, 0, 0}});
        assertClose(
                Divergences.relativeEntropy(
                                DensityOperator.ofReal(new double[][] {{0.5, 0.1}, {0.1, 0.5}}),
                                DensityOperator.ofReal(new double[][] {{0.7, 0.2}, {0.2, 0.3}}))
                        .nats()
                        .midpoint(),
                Divergences.relativeEntropy(rho, sigma).nats());
        assertTrue(Divergences.maxDivergence(rho, sigma).nats().isFinite());
        assertInfinite(Divergences.relativeEntropy(DensityOperator.maximallyMixed(3), sigma));
        assertTrue(Divergences.relativeEntropy(rho, DensityOperator.maximallyMixed(3))
                .nats()
                .isFinite());
    }

    /**
     * A matrix by entries with the determinant 2^-104: its small eigenvalue is so far below the larger one that it may be zero for all that thirty digits tell. What depends on that is left
     * open, and nothing else.
     */
    @Test
    void anUndecidedRank() {
        // with N = 2^25: (2N² + 1 + 2N)(2N² + 1 − 2N) − (2N²)² = 1, in units of 2^-52
        double[][] entries = {{0.5 + 0x1p-26 + 0x1p-52, 0.5}, {0.5, 0.5 - 0x1p-26 + 0x1p-52}};
        DensityOperator open = DensityOperator.ofReal(entries);
        double norm = Math.hypot(entries[0][0], entries[0][1]);
        DensityOperator ket = DensityOperator.ofKet(entries[0][0] / norm, entries[0][1] / norm);
        Enclosure relative = Divergences.relativeEntropy(open, MIXED).nats();
        assertEquals(Divergences.relativeEntropy(ket, MIXED).nats().midpoint(), relative.midpoint(), 1e-14);
        assertTrue(relative.relativeWidth() < 1e-14, relative::toString);
        assertTrue(Divergences.relativeEntropyVariance(open, MIXED).relativeWidth() < 1e-13);
        for (double alpha : new double[] {0.5, 0.75, 1.5, 3}) {
            Enclosure petz = Divergences.petzRenyi(open, MIXED, alpha).nats();
            assertTrue(petz.contains(
                            Divergences.petzRenyi(ket, MIXED, alpha).nats().midpoint())
                    || petz.width() < 1e-13);
            Enclosure sandwiched =
                    Divergences.sandwichedRenyi(open, MIXED, alpha).nats();
            double truth = Divergences.sandwichedRenyi(ket, MIXED, alpha).nats().midpoint();
            assertEquals(truth, sandwiched.midpoint(), 1e-14 + sandwiched.width());
            assertTrue(sandwiched.width() < 1e-12, sandwiched::toString);
        }
        assertTrue(Divergences.chernoff(open, MIXED)
                .value()
                .nats()
                .contains(Divergences.chernoff(ket, MIXED).value().nats().midpoint()));
        Enclosure reversed = Divergences.relativeEntropy(MIXED, open).nats();
        assertTrue(reversed.lower() > 20 && reversed.upper() == Double.POSITIVE_INFINITY, reversed::toString);
        assertEquals(reversed, Divergences.petzRenyi(MIXED, open, 2).nats(), "the order one bounds the higher ones");
        assertEquals(reversed, Divergences.maxDivergence(MIXED, open).nats());
        Enclosure min = Divergences.minDivergence(open, MIXED).nats();
        double sharp = Divergences.minDivergence(ket, MIXED).nats().midpoint();
        assertTrue(min.contains(0) && min.contains(sharp - 1e-15), min::toString);
        Enclosure h = Divergences.hoeffding(open, MIXED, RATE).nats();
        assertEquals(Double.POSITIVE_INFINITY, h.upper());
        assertTrue(Divergences.strongConverse(open, MIXED, Information.ofNats(1))
                        .nats()
                        .relativeWidth()
                < 1e-13);
        Enclosure f = Divergences.fidelity(open, MIXED);
        assertTrue(f.contains(Divergences.fidelity(ket, MIXED).midpoint()) || f.width() < 1e-13, f::toString);
    }

    /** An eigenvalue that is negative by rounding is cut off with certainty, so that the state is pure with certainty. */
    @Test
    void aRankThatIsDecidedByTheSignOfRounding() {
        double x = 0.5 + 0x1p-53;
        DensityOperator pure = DensityOperator.ofReal(new double[][] {{0.5, x}, {x, 0.5}});
        assertInfinite(Divergences.relativeEntropy(MIXED, pure));
        assertClose(-Math.log(0.55), Divergences.chernoff(pure, MIXED).value().nats());
    }

    @Test
    void eigenvaluesOverHundredsOfDecades() {
        DensityOperator rho = DensityOperator.ofEigenvalues(1 - 1e-30, 1e-30, 1e-200);
        DensityOperator sigma = DensityOperator.ofEigenvalues(1e-250, 1, 1e-300);
        assertClose(250 * Math.log(10), Divergences.relativeEntropy(rho, sigma).nats());
        assertClose(250 * Math.log(10), Divergences.maxDivergence(rho, sigma).nats());
        Enclosure f = Divergences.fidelity(rho, sigma);
        assertEquals(1e-15, f.midpoint(), 1e-28);
        Enclosure petz = Divergences.petzRenyi(rho, sigma, 100).nats();
        assertClose(250 * Math.log(10), petz);
    }

    /** Orders beyond all use still give certified results: the limits are approached, and nothing is thrown. */
    @Test
    void enormousOrders() {
        DensityOperator rho = TestStates.of(TestStates.Kind.RANDOM, 3, new Random(1));
        DensityOperator sigma = TestStates.of(TestStates.Kind.GRADED, 3, new Random(2));
        Enclosure before = Divergences.petzRenyi(rho, sigma, 1e3).nats();
        for (double alpha : new double[] {1e9, 1e11, 1e13, 1e20, 1e300}) {
            Enclosure petz = Divergences.petzRenyi(rho, sigma, alpha).nats();
            assertTrue(before.isPossiblyBelow(petz) && petz.relativeWidth() < 1e-9, () -> alpha + ": " + petz);
            before = petz;
            Enclosure sandwiched =
                    Divergences.sandwichedRenyi(rho, sigma, alpha).nats();
            assertEquals(
                    Divergences.maxDivergence(rho, sigma).nats().midpoint(), sandwiched.midpoint(), 10 / alpha + 1e-14);
            assertTrue(sandwiched.relativeWidth() < 1e-14, () -> alpha + ": " + sandwiched);
        }
        for (double alpha : new double[] {1 - 0x1p-53, 1 + 0x1p-52}) {
            double relative = Divergences.relativeEntropy(rho, sigma).nats().midpoint();
            assertEquals(
                    relative, Divergences.petzRenyi(rho, sigma, alpha).nats().midpoint(), 1e-8);
            assertEquals(
                    relative,
                    Divergences.sandwichedRenyi(rho, sigma, alpha).nats().midpoint(),
                    1e-8);
        }
        assertTrue(Divergences.petzRenyi(rho, sigma, Double.MIN_NORMAL).nats().upper() < 1e-24);
    }

    @Test
    void dimensionOne() {
        DensityOperator one = DensityOperator.ofEigenvalues(1);
        assertEquals(
                Enclosure.ZERO,
                Divergences.relativeEntropy(one, DensityOperator.ofKet(1.0)).nats());
        assertEquals(
                Enclosure.ZERO,
                Divergences.maxDivergence(one, DensityOperator.ofKet(1.0)).nats());
    }

    /** The normalisation: a trace that is one only up to rounding leaves no trace, so that orders stay ordered next to one. */
    @Test
    void tracesAreDividedOut() {
        DensityOperator rho = DensityOperator.ofEigenvalues(0.5, 0.5 - 0x1p-52);
        DensityOperator sigma = DensityOperator.ofEigenvalues(0.5 - 0x1p-51, 0.5 - 0x1p-51);
        // normalised, the states are about (1 ± 2^-52)/2 and 1/2: D is of the order 2^-105, while the raw Tr ρ(ln ρ −
        // ln σ) is −2^-51
        Enclosure relative = Divergences.relativeEntropy(rho, sigma).nats();
        assertTrue(relative.upper() < 1e-27, relative::toString);
        Enclosure close = Divergences.petzRenyi(rho, sigma, 1 + 0x1p-30).nats();
        assertTrue(close.upper() < 1e-18, close::toString);
    }

    @Test
    void sameInputSameBits() {
        DensityOperator rho = TestStates.of(TestStates.Kind.RANDOM, 5, new Random(5));
        DensityOperator sigma = TestStates.of(TestStates.Kind.GRADED, 5, new Random(6));
        assertEquals(
                Divergences.strongConverse(rho, sigma, Information.ofNats(9)),
                Divergences.strongConverse(rho, sigma, Information.ofNats(9)));
        assertEquals(Divergences.chernoff(rho, sigma), Divergences.chernoff(rho, sigma));
        assertFalse(Divergences.chernoff(rho, sigma).value().source().isEmpty());
    }
}
