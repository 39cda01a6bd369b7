package org.minorant.bounds;

import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.LinkedHashMap;
import java.util.Map;
import java.util.Random;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.constraints.IntRange;
import org.minorant.bounds.divergence.Channels;
import org.minorant.bounds.divergence.TestStates;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;

/**
 * No map that a physicist could apply makes two states easier to tell apart.
 *
 * <p>Tolerance: the image of a map is known up to a trace distance δ. Moving ρ and σ by δ, when all eigenvalues are at least m, is a factor
 * 1 ± δ/m in the Loewner order; a Rényi
 * divergence of order α moves by at most (α + |α − 1|)/|α − 1| · δ/m, which is below 40 δ/m for the orders used; the others move less.
 */
class DataProcessingTest {

    private static final double[] PETZ = {0.3, 0.5, 0.9, 1.1, 1.5, 2};

    private static final double[] SANDWICHED = {0.5, 0.7, 0.9, 1.1, 2, 5};

    /** What decreases under positive trace-preserving maps. */
    private static Map<String, Enclosure> positive(DensityOperator rho, DensityOperator sigma) {
        Map<String, Enclosure> v = new LinkedHashMap<>();
        v.put("D", Divergences.relativeEntropy(rho, sigma).nats());
        for (double alpha : SANDWICHED) {
            v.put(
                    "sandwiched " + alpha,
                    Divergences.sandwichedRenyi(rho, sigma, alpha).nats());
        }
        v.put("max", Divergences.maxDivergence(rho, sigma).nats());
        v.put("min", Divergences.minDivergence(rho, sigma).nats());
        v.put("minus fidelity", Divergences.fidelity(rho, sigma).negate());
        v.put("Bures distance", Divergences.buresDistance(rho, sigma));
        v.put("Bures angle", Divergences.buresAngle(rho, sigma));
        v.put(
                "hypothesis testing",
                Divergences.hypothesisTesting(rho, sigma, 0.1).nats());
        v.put(
                "minus strong converse",
                Divergences.strongConverse(rho, sigma, Information.ofNats(0.5))
                        .nats()
                        .negate());
        return v;
    }

    /** What decreases under channels, and is not known to under all positive maps. */
    private static Map<String, Enclosure> all(DensityOperator rho, DensityOperator sigma) {
        Map<String, Enclosure> v = positive(rho, sigma);
        for (double alpha : PETZ) {
            v.put("Petz " + alpha, Divergences.petzRenyi(rho, sigma, alpha).nats());
        }
        v.put("Chernoff", Divergences.chernoff(rho, sigma).value().nats());
        v.put(
                "Hoeffding",
                Divergences.hoeffding(rho, sigma, Information.ofNats(0.05)).nats());
        return v;
    }

    private static void assertDecreases(Map<String, Enclosure> before, Map<String, Enclosure> after, double tolerance) {
        before.forEach((name, value) -> assertTrue(
                after.get(name).lower() <= value.upper() + tolerance,
                () -> name + " rose from " + value + " to " + after.get(name) + ", tolerance " + tolerance));
    }

    private static double tolerance(double delta, DensityOperator a, DensityOperator b) {
        return 40 * delta / Math.min(a.eigenvalues()[0], b.eigenvalues()[0]);
    }

    @Property(tries = 12)
    void underRandomChannels(
            @ForAll long seed, @ForAll @IntRange(min = 2, max = 4) int d, @ForAll TestStates.Kind kind) {
        Random random = new Random(seed);
        DensityOperator rho = TestStates.of(kind, d, random);
        DensityOperator sigma = TestStates.of(TestStates.Kind.RANDOM, d, random);
        int k = 1 + random.nextInt(3);
        long channel = random.nextLong();
        DensityOperator first = Channels.random(rho, k, new Random(channel));
        DensityOperator second = Channels.random(sigma, k, new Random(channel));
        if (Math.min(first.eigenvalues()[0], second.eigenvalues()[0]) > 1e-6) {
            assertDecreases(all(rho, sigma), all(first, second), tolerance(d * k * d * d * 0x1p-50, first, second));
        }
    }

    @Property(tries = 12)
    void underDephasingWithoutTolerance(
            @ForAll long seed, @ForAll TestStates.Kind first, @ForAll TestStates.Kind second) {
        Random random = new Random(seed);
        DensityOperator rho = byEntries(TestStates.of(first, 3, random));
        DensityOperator sigma = byEntries(TestStates.of(second, 3, random));
        assertDecreases(all(rho, sigma), all(Channels.dephased(rho), Channels.dephased(sigma)), 1e-15);
    }

    /**
     * The same entries without the factor, so that setting some to zero is a map of the operator meant; a cut-off eigenvalue and the
     * renormalised trace change it by 1e-16.
     */
    private static DensityOperator byEntries(DensityOperator rho) {
        double[][] p = new double[rho.dimension()][rho.dimension()];
        double[][] q = new double[rho.dimension()][rho.dimension()];
        for (int i = 0; i < p.length; i++) {
            for (int j = 0; j < p.length; j++) {
                p[i][j] = rho.re(i, j);
                q[i][j] = rho.im(i, j);
            }
        }
        return DensityOperator.of(p, q);
    }

    /**
     * Transposition is its own inverse, so that nothing may change. It is not completely positive, and Petz's and Chernoff's quantities
     * obey it because it only relabels.
     */
    @Property(tries = 6)
    void transpositionChangesNothing(@ForAll long seed, @ForAll TestStates.Kind kind) {
        Random random = new Random(seed);
        DensityOperator rho = byEntries(TestStates.of(kind, 3, random));
        DensityOperator sigma = TestStates.of(TestStates.Kind.RANDOM, 3, random);
        Map<String, Enclosure> before = all(rho, sigma);
        all(Channels.transposed(rho), Channels.transposed(sigma))
                .forEach((name, value) -> assertTrue(
                        value.isPossiblyBelow(before.get(name))
                                && before.get(name).isPossiblyBelow(value),
                        () -> name + ": " + value + " is not " + before.get(name)));
    }

    /**
     * Under a map that is positive and not completely positive: relative entropy and the sandwiched divergences (A. Müller-Hermes, D. Reeb,
     * Ann. Henri Poincaré 18, 1777, 2017), the fidelity, and
     * what tests of single copies define.
     */
    @Property(tries = 10)
    void underTheReductionMap(
            @ForAll long seed, @ForAll @IntRange(min = 3, max = 5) int d, @ForAll TestStates.Kind kind) {
        Random random = new Random(seed);
        DensityOperator rho = TestStates.of(kind, d, random);
        DensityOperator sigma = TestStates.of(TestStates.Kind.RANDOM, d, random);
        DensityOperator first = Channels.reduced(rho);
        DensityOperator second = Channels.reduced(sigma);
        if (Math.min(first.eigenvalues()[0], second.eigenvalues()[0]) > 1e-6) {
            assertDecreases(positive(rho, sigma), positive(first, second), tolerance(d * d * 0x1p-50, first, second));
        }
    }
}
