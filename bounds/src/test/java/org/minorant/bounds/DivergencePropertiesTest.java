package org.minorant.bounds;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Random;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.constraints.IntRange;
import org.junit.jupiter.api.Test;
import org.minorant.bounds.divergence.Channels;
import org.minorant.bounds.divergence.TestStates;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;

/** Order, limits, symmetry, additivity and the commuting case. */
class DivergencePropertiesTest {

    private static void assertBelow(Enclosure low, Enclosure high, String what) {
        assertTrue(low.isPossiblyBelow(high), () -> what + ": " + low + " exceeds " + high);
    }

    private static void assertSame(Enclosure a, Enclosure b, String what) {
        assertBelow(a, b, what);
        assertBelow(b, a, what);
    }

    @Property(tries = 12)
    void ordersAreOrdered(
            @ForAll long seed,
            @ForAll @IntRange(min = 2, max = 5) int d,
            @ForAll TestStates.Kind first,
            @ForAll TestStates.Kind second) {
        Random random = new Random(seed);
        DensityOperator rho = TestStates.of(first, d, random);
        DensityOperator sigma = TestStates.of(second, d, random);
        Enclosure relative = Divergences.relativeEntropy(rho, sigma).nats();
        Enclosure before = Divergences.minDivergence(rho, sigma).nats();
        for (double alpha : new double[] {0.01, 0.3, 0.5, 0.8, 0.999, 1.001, 1.5, 2, 4}) {
            Enclosure petz = Divergences.petzRenyi(rho, sigma, alpha).nats();
            assertBelow(before, petz, "Petz at " + alpha);
            assertBelow(alpha < 1 ? petz : relative, alpha < 1 ? relative : petz, "relative entropy at " + alpha);
            before = petz;
        }
        before = Enclosure.ZERO;
        for (double alpha : new double[] {0.5, 0.8, 0.999, 1.001, 1.5, 2, 4, 100}) {
            Enclosure sandwiched =
                    Divergences.sandwichedRenyi(rho, sigma, alpha).nats();
            Enclosure petz = Divergences.petzRenyi(rho, sigma, alpha).nats();
            assertBelow(before, sandwiched, "sandwiched at " + alpha);
            assertBelow(sandwiched, petz, "Araki-Lieb-Thirring at " + alpha);
            if (alpha < 1) {
                // R. Iten, J. M. Renes, D. Sutter, IEEE Trans. Inf. Theory 63, 1270 (2017): α D_α ≤ D̃_α (memory)
                assertBelow(petz.times(alpha), sandwiched, "reversed at " + alpha);
            }
            before = sandwiched;
        }
        assertBelow(before, Divergences.maxDivergence(rho, sigma).nats(), "max");
    }

    /** |D_α − D| ≤ |α − 1| V for α close enough to 1: the slope there is V/2. */
    @Property(tries = 8)
    void bothFamiliesMeetTheRelativeEntropy(@ForAll long seed, @ForAll @IntRange(min = 2, max = 5) int d) {
        Random random = new Random(seed);
        DensityOperator rho = TestStates.of(TestStates.Kind.RANDOM, d, random);
        DensityOperator sigma = TestStates.of(TestStates.Kind.RANDOM, d, random);
        double relative = Divergences.relativeEntropy(rho, sigma).nats().midpoint();
        double variance = Divergences.relativeEntropyVariance(rho, sigma).midpoint();
        for (double h : new double[] {-1e-5, 1e-5, -1e-8, 1e-8}) {
            double slope = 0.5 * variance * h;
            double rounding = 4 * Math.ulp(relative);
            double curved = 1e3 * h * h;
            assertEquals(
                    relative + slope,
                    Divergences.petzRenyi(rho, sigma, 1 + h).nats().midpoint(),
                    rounding + curved);
            assertEquals(
                    relative + slope,
                    Divergences.sandwichedRenyi(rho, sigma, 1 + h).nats().midpoint(),
                    rounding + curved);
        }
    }

    @Property(tries = 8)
    void theEndsAreLimits(@ForAll long seed, @ForAll @IntRange(min = 2, max = 4) int d, @ForAll TestStates.Kind kind) {
        Random random = new Random(seed);
        DensityOperator rho = TestStates.of(kind, d, random);
        DensityOperator sigma = TestStates.of(TestStates.Kind.RANDOM, d, random);
        double max = Divergences.maxDivergence(rho, sigma).nats().midpoint();
        assertEquals(max, Divergences.sandwichedRenyi(rho, sigma, 1e14).nats().midpoint(), 1e-12);
        double min = Divergences.minDivergence(rho, sigma).nats().midpoint();
        assertEquals(min, Divergences.petzRenyi(rho, sigma, 1e-14).nats().midpoint(), 1e-12);
        double f = Divergences.fidelity(rho, sigma).midpoint();
        assertEquals(
                -2 * Math.log(f),
                Divergences.sandwichedRenyi(rho, sigma, 0.5).nats().midpoint(),
                1e-14);
        assertEquals(Math.sqrt(2 - 2 * f), Divergences.buresDistance(rho, sigma).midpoint(), 1e-13);
        assertEquals(Math.acos(f), Divergences.buresAngle(rho, sigma).midpoint(), 1e-13);
    }

    @Property(tries = 10)
    void chernoffIsSymmetricAndTheBestExponent(
            @ForAll long seed,
            @ForAll @IntRange(min = 2, max = 4) int d,
            @ForAll TestStates.Kind first,
            @ForAll TestStates.Kind second) {
        Random random = new Random(seed);
        DensityOperator rho = TestStates.of(first, d, random);
        DensityOperator sigma = TestStates.of(second, d, random);
        ChernoffDivergence c = Divergences.chernoff(rho, sigma);
        ChernoffDivergence back = Divergences.chernoff(sigma, rho);
        assertSame(c.value().nats(), back.value().nats(), "symmetry");
        assertTrue(c.attainedWithin().contains(c.s()));
        assertSame(c.attainedWithin(), back.attainedWithin().complement(), "place");
        for (double s = 0.0625; s < 1; s += 0.0625) {
            // −ln Tr ρ^s σ^(1−s) = (1−s) D_s
            Enclosure exponent = Divergences.petzRenyi(rho, sigma, s).nats().times(1 - s);
            assertBelow(exponent, c.value().nats(), "exponent at " + s);
        }
        Enclosure half = Divergences.petzRenyi(rho, sigma, 0.5).nats().times(0.5);
        assertBelow(c.value().nats(), half.times(2), "twice the exponent at one half, by concavity");
    }

    /** H_r is the largest of its terms, decreases, meets D(σ‖ρ) at 0, and is the Chernoff divergence where it equals the rate. */
    @Property(tries = 8)
    void hoeffding(@ForAll long seed, @ForAll @IntRange(min = 2, max = 4) int d, @ForAll TestStates.Kind kind) {
        Random random = new Random(seed);
        DensityOperator rho = TestStates.of(kind, d, random);
        DensityOperator sigma = TestStates.of(TestStates.Kind.RANDOM, d, random);
        Enclosure c = Divergences.chernoff(rho, sigma).value().nats();
        assertSame(Divergences.hoeffding(rho, sigma, Information.ofNats(c)).nats(), c, "fixed point");
        assertSame(
                Divergences.hoeffding(rho, sigma, Information.ofNats(0)).nats(),
                Divergences.relativeEntropy(sigma, rho).nats(),
                "rate zero");
        Enclosure before = Divergences.relativeEntropy(sigma, rho).nats();
        for (double r : new double[] {1e-6, 0.01, 0.1, 0.3}) {
            Enclosure h =
                    Divergences.hoeffding(rho, sigma, Information.ofNats(r)).nats();
            assertBelow(h, before, "decreases at " + r);
            for (double alpha : new double[] {0.1, 0.5, 0.9}) {
                Enclosure term = Divergences.petzRenyi(rho, sigma, alpha)
                        .nats()
                        .minus(Enclosure.exact(r))
                        .times(Enclosure.exact(1 - alpha).dividedBy(Enclosure.exact(alpha)));
                // 1 − α is a double only up to rounding
                assertTrue(term.lower() <= h.upper() * (1 + 1e-15) + 1e-15, "term " + alpha + " at " + r);
            }
            before = h;
        }
        Enclosure relative = Divergences.relativeEntropy(rho, sigma).nats();
        Enclosure beyond = Divergences.hoeffding(rho, sigma, Information.ofNats(relative.upper() + 0.01))
                .nats();
        assertTrue(beyond.upper()
                < 1e-26 + Divergences.minDivergence(sigma, rho).nats().upper());
    }

    @Property(tries = 8)
    void strongConverse(@ForAll long seed, @ForAll @IntRange(min = 2, max = 4) int d, @ForAll TestStates.Kind kind) {
        Random random = new Random(seed);
        DensityOperator rho = TestStates.of(kind, d, random);
        DensityOperator sigma = TestStates.of(TestStates.Kind.RANDOM, d, random);
        Enclosure relative = Divergences.relativeEntropy(rho, sigma).nats();
        assertEquals(
                Enclosure.ZERO,
                Divergences.strongConverse(rho, sigma, Information.ofNats(relative.lower()))
                        .nats());
        Enclosure before = Enclosure.ZERO;
        for (double more : new double[] {1e-4, 0.1, 1, 10}) {
            double r = relative.upper() + more;
            Enclosure h = Divergences.strongConverse(rho, sigma, Information.ofNats(r))
                    .nats();
            assertBelow(before, h, "increases at " + r);
            assertTrue(h.lower() > 0 && h.relativeWidth() < 1e-9, () -> h + " at " + r);
            for (double alpha : new double[] {1.01, 1.5, 3, 50}) {
                Enclosure term = Enclosure.exact(r)
                        .minus(Divergences.sandwichedRenyi(rho, sigma, alpha).nats())
                        .times(Enclosure.exact(alpha - 1).dividedBy(Enclosure.exact(alpha)));
                assertTrue(term.lower() <= h.upper() * (1 + 1e-14), "term " + alpha + " at " + r);
            }
            Enclosure last = Enclosure.exact(r)
                    .minus(Divergences.maxDivergence(rho, sigma).nats());
            assertBelow(last, h, "last term at " + r);
            before = h;
        }
    }

    @Property(tries = 8)
    void hypothesisTestingIsBetweenItsNeighbours(@ForAll long seed, @ForAll TestStates.Kind kind) {
        Random random = new Random(seed);
        DensityOperator rho = TestStates.of(kind, 3, random);
        DensityOperator sigma = TestStates.of(TestStates.Kind.RANDOM, 3, random);
        Enclosure relative = Divergences.relativeEntropy(rho, sigma).nats();
        for (double level : new double[] {0.001, 0.1, 0.5}) {
            Enclosure d = Divergences.hypothesisTesting(rho, sigma, level).nats();
            Enclosure rest = Enclosure.exact(1 - level);
            // D_H^ε ≤ (D + h(ε))/(1−ε) (Wang and Renner 2012) and D_H^ε ≤ D_max − ln(1−ε); both memory
            double entropy = -level * Math.log(level) - (1 - level) * Math.log(1 - level);
            assertTrue(d.lower() <= (relative.upper() + entropy) / (1 - level) + 1e-14);
            assertTrue(d.lower() <= Divergences.maxDivergence(rho, sigma).nats().upper() - Math.log(1 - level) + 1e-14);
            // D_H^ε ≥ D_s − s/(1−s) ln(1/ε): Audenaert, Mosonyi, Verstraete 2012, from the Chernoff inequality (memory)
            for (double s : new double[] {0.3, 0.7}) {
                double floor = Divergences.petzRenyi(rho, sigma, s).nats().lower() - s / (1 - s) * Math.log(1 / level);
                assertTrue(d.upper() >= floor - 1e-13, "floor " + s);
            }
            assertTrue(rest.lower() > 0);
        }
    }

    @Property(tries = 6)
    void tensorProductsAdd(@ForAll long seed) {
        Random random = new Random(seed);
        DensityOperator a = TestStates.of(TestStates.Kind.RANDOM, 2, random);
        DensityOperator b = TestStates.of(TestStates.Kind.RANDOM, 2, random);
        DensityOperator x = TestStates.of(TestStates.Kind.RANDOM, 3, random);
        DensityOperator y = TestStates.of(TestStates.Kind.RANDOM, 3, random);
        DensityOperator ax = Channels.tensor(a, x);
        DensityOperator by = Channels.tensor(b, y);
        // entries of the product are rounded: a trace distance below 36 · 2^-50, relative to the least eigenvalue
        double least = Math.min(ax.eigenvalues()[0], by.eigenvalues()[0]);
        double tolerance = 40 * 36 * 0x1p-50 / least;
        double relative = Divergences.relativeEntropy(a, b).nats().midpoint()
                + Divergences.relativeEntropy(x, y).nats().midpoint();
        assertEquals(relative, Divergences.relativeEntropy(ax, by).nats().midpoint(), tolerance);
        assertEquals(
                Divergences.relativeEntropyVariance(a, b).midpoint()
                        + Divergences.relativeEntropyVariance(x, y).midpoint(),
                Divergences.relativeEntropyVariance(ax, by).midpoint(),
                tolerance * 20);
        for (double alpha : new double[] {0.5, 2.0}) {
            assertEquals(
                    Divergences.petzRenyi(a, b, alpha).nats().midpoint()
                            + Divergences.petzRenyi(x, y, alpha).nats().midpoint(),
                    Divergences.petzRenyi(ax, by, alpha).nats().midpoint(),
                    tolerance);
            assertEquals(
                    Divergences.sandwichedRenyi(a, b, alpha).nats().midpoint()
                            + Divergences.sandwichedRenyi(x, y, alpha).nats().midpoint(),
                    Divergences.sandwichedRenyi(ax, by, alpha).nats().midpoint(),
                    tolerance);
        }
        assertEquals(
                Divergences.maxDivergence(a, b).nats().midpoint()
                        + Divergences.maxDivergence(x, y).nats().midpoint(),
                Divergences.maxDivergence(ax, by).nats().midpoint(),
                tolerance);
        assertEquals(
                Divergences.fidelity(a, b).midpoint()
                        * Divergences.fidelity(x, y).midpoint(),
                Divergences.fidelity(ax, by).midpoint(),
                tolerance);
    }

    /** Diagonal states against the classical formulas, and both families agree. */
    @Test
    void commutingStatesAreClassical() {
        double[] p = {0.5, 0.25, 0.125, 0.125, 0};
        double[] q = {0.125, 0.5, 0.25, 0x1p-40, 0.125 - 0x1p-40};
        DensityOperator rho = DensityOperator.ofEigenvalues(p);
        DensityOperator sigma = DensityOperator.ofEigenvalues(q);
        double relative = 0;
        double square = 0;
        double max = 0;
        double half = 0;
        double support = 0;
        for (int i = 0; i < 4; i++) {
            double z = Math.log(p[i] / q[i]);
            relative += p[i] * z;
            square += p[i] * z * z;
            max = Math.max(max, z);
            half += Math.sqrt(p[i] * q[i]);
            support += q[i];
        }
        assertEquals(relative, Divergences.relativeEntropy(rho, sigma).nats().midpoint(), 1e-14);
        assertEquals(
                square - relative * relative,
                Divergences.relativeEntropyVariance(rho, sigma).midpoint(),
                1e-12);
        assertEquals(max, Divergences.maxDivergence(rho, sigma).nats().midpoint(), 1e-14);
        assertEquals(
                -Math.log(support), Divergences.minDivergence(rho, sigma).nats().midpoint(), 1e-16);
        assertEquals(half, Divergences.fidelity(rho, sigma).midpoint(), 1e-15);
        for (double alpha : new double[] {0.5, 0.75, 1.25, 3}) {
            double sum = 0;
            for (int i = 0; i < 4; i++) {
                sum += Math.pow(p[i], alpha) * Math.pow(q[i], 1 - alpha);
            }
            double renyi = Math.log(sum) / (alpha - 1);
            assertEquals(renyi, Divergences.petzRenyi(rho, sigma, alpha).nats().midpoint(), 1e-13);
            assertEquals(
                    renyi, Divergences.sandwichedRenyi(rho, sigma, alpha).nats().midpoint(), 1e-13);
        }
    }

    @Test
    void wellScaledStatesOfDimensionSixteenAreTight() {
        Random random = new Random(16);
        DensityOperator rho = TestStates.of(TestStates.Kind.RANDOM, 16, random);
        DensityOperator sigma = TestStates.of(TestStates.Kind.RANDOM, 16, random);
        Enclosure[] all = {
            Divergences.relativeEntropy(rho, sigma).nats(),
            Divergences.relativeEntropyVariance(rho, sigma),
            Divergences.petzRenyi(rho, sigma, 0.5).nats(),
            Divergences.petzRenyi(rho, sigma, 1.7).nats(),
            Divergences.petzRenyi(rho, sigma, 3).nats(),
            Divergences.sandwichedRenyi(rho, sigma, 0.6).nats(),
            Divergences.sandwichedRenyi(rho, sigma, 4).nats(),
            Divergences.maxDivergence(rho, sigma).nats(),
            Divergences.fidelity(rho, sigma),
            Divergences.buresDistance(rho, sigma),
            Divergences.buresAngle(rho, sigma),
            Divergences.chernoff(rho, sigma).value().nats(),
            Divergences.hoeffding(rho, sigma, Information.ofNats(0.1)).nats(),
            Divergences.strongConverse(rho, sigma, Information.ofNats(2)).nats()
        };
        for (int i = 0; i < all.length; i++) {
            double width = all[i].relativeWidth();
            assertTrue(width <= 3e-15, "quantity " + i + " is " + width + " wide: " + all[i]);
        }
    }
}
