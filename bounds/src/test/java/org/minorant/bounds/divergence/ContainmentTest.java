package org.minorant.bounds.divergence;

import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.util.Random;
import java.util.stream.Stream;
import org.hipparchus.dfp.Dfp;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.Arguments;
import org.junit.jupiter.params.provider.MethodSource;
import org.minorant.bounds.Divergences;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;

/** Every divergence against its definition in 64-digit arithmetic: the true value is inside, and the enclosure is tight. */
class ContainmentTest {

    /** What the reference itself may be wrong by, from golden section and rounding. */
    private static final BigDecimal REFERENCE = new BigDecimal("1e-28");

    private record Case(
            String name, DensityOperator rho, DensityOperator sigma, ReferencePair reference, double width) {
        @Override
        public String toString() {
            return name;
        }
    }

    static Stream<Arguments> cases() {
        Random random = new Random(20240601);
        Stream.Builder<Case> list = Stream.builder();
        list.add(bloch("P1", 0, 0, 0.8, 0.8, 0, 0, 1e-15));
        list.add(bloch("P2", 0, 0, 0.9, 0.5 * Math.sin(Math.PI / 3), 0, 0.25, 1e-15));
        list.add(bloch("complex", 0.1, -0.3, 0.2, 0.5, 0.6, -0.1, 1e-15));
        list.add(bloch("near purity", 0, 0, 1 - 1e-9, 0.3, 0.2, 0.1, 1e-13));
        list.add(entries("random 3", TestStates.Kind.RANDOM, TestStates.Kind.RANDOM, 3, random, 1e-15));
        list.add(entries("random 4", TestStates.Kind.RANDOM, TestStates.Kind.RANDOM, 4, random, 1e-15));
        list.add(entries("clustered", TestStates.Kind.CLUSTERED, TestStates.Kind.RANDOM, 3, random, 1e-15));
        list.add(entries("both clustered", TestStates.Kind.CLUSTERED, TestStates.Kind.CLUSTERED, 3, random, 1e-15));
        list.add(entries("graded", TestStates.Kind.GRADED, TestStates.Kind.GRADED, 3, random, 1e-14));
        list.add(singular());
        list.add(entries("deficient", TestStates.Kind.DEFICIENT, TestStates.Kind.RANDOM, 3, random, 1e-15));
        return list.build().map(Arguments::of);
    }

    /** A state of rank two by entries that are exactly singular, (1, 1, 0; 1, 0, 1)* times itself over 4, against one of full rank. */
    private static Case singular() {
        DensityOperator rho =
                DensityOperator.ofReal(new double[][] {{0.5, 0.25, 0.25}, {0.25, 0.25, 0}, {0.25, 0, 0.25}});
        DensityOperator sigma =
                DensityOperator.ofReal(new double[][] {{0.25, 0.125, 0}, {0.125, 0.5, 0.125}, {0, 0.125, 0.25}});
        return new Case("singular entries", rho, sigma, ReferencePair.of(rho, sigma), 1e-15);
    }

    private static Case bloch(String name, double x, double y, double z, double u, double v, double w, double width) {
        return new Case(
                name,
                DensityOperator.ofBloch(x, y, z),
                DensityOperator.ofBloch(u, v, w),
                new ReferencePair(ReferencePair.bloch(x, y, z), ReferencePair.bloch(u, v, w)),
                width);
    }

    private static Case entries(
            String name, TestStates.Kind first, TestStates.Kind second, int d, Random random, double width) {
        DensityOperator rho = TestStates.of(first, d, random);
        DensityOperator sigma = TestStates.of(second, d, random);
        return new Case(name, rho, sigma, ReferencePair.of(rho, sigma), width);
    }

    private static void check(Case c, String what, Enclosure e, Dfp truth) {
        BigDecimal x = Multiprecision.decimal(truth);
        boolean inside = e.isFinite()
                && e.lowerWide().toBigDecimal().compareTo(x.add(REFERENCE)) <= 0
                && e.upperWide().toBigDecimal().compareTo(x.subtract(REFERENCE)) >= 0;
        assertTrue(inside, () -> c + ", " + what + ": " + e.toIntervalString(20) + " misses " + truth);
        assertTrue(
                e.relativeWidth() <= c.width || e.width() <= 1e-24,
                () -> c + ", " + what + ": " + e.toIntervalString(20) + " is " + e.relativeWidth() + " wide");
    }

    @ParameterizedTest
    @MethodSource("cases")
    void relativeEntropyAndVariance(Case c) {
        check(c, "D", Divergences.relativeEntropy(c.rho, c.sigma).nats(), c.reference.relativeEntropy());
        check(c, "V", Divergences.relativeEntropyVariance(c.rho, c.sigma), c.reference.variance());
    }

    @ParameterizedTest
    @MethodSource("cases")
    void petz(Case c) {
        for (double alpha : new double[] {0.01, 0.5, 0.999, 1.001, 1.5, 2.7, 20}) {
            check(
                    c,
                    "Petz " + alpha,
                    Divergences.petzRenyi(c.rho, c.sigma, alpha).nats(),
                    c.reference.petz(alpha));
        }
        check(c, "min", Divergences.minDivergence(c.rho, c.sigma).nats(), c.reference.minimal());
    }

    @ParameterizedTest
    @MethodSource("cases")
    void sandwiched(Case c) {
        for (double alpha : new double[] {0.5, 0.75, 1.001, 3, 20}) {
            check(
                    c,
                    "sandwiched " + alpha,
                    Divergences.sandwichedRenyi(c.rho, c.sigma, alpha).nats(),
                    c.reference.sandwiched(alpha));
        }
        check(c, "max", Divergences.maxDivergence(c.rho, c.sigma).nats(), c.reference.maximal());
        check(c, "fidelity", Divergences.fidelity(c.rho, c.sigma), c.reference.fidelity());
    }

    /** The reference is slow at maximising, so these take the cases of least dimension. */
    static Stream<Arguments> small() {
        return cases().filter(a -> ((Case) a.get()[0]).rho.dimension() <= 3);
    }

    @ParameterizedTest
    @MethodSource("small")
    void exponents(Case c) {
        check(c, "Chernoff", Divergences.chernoff(c.rho, c.sigma).value().nats(), c.reference.chernoff());
        double d = Divergences.relativeEntropy(c.rho, c.sigma).nats().midpoint();
        double floor = Divergences.minDivergence(c.rho, c.sigma).nats().upper();
        for (double r : new double[] {floor + 0.1 * (d - floor), floor + 0.5 * (d - floor)}) {
            check(
                    c,
                    "Hoeffding " + r,
                    Divergences.hoeffding(c.rho, c.sigma, Information.ofNats(r)).nats(),
                    c.reference.hoeffding(r));
        }
        double most = Divergences.maxDivergence(c.rho, c.sigma).nats().midpoint();
        double r = 0.7 * d + 0.3 * most;
        check(
                c,
                "strong converse " + r,
                Divergences.strongConverse(c.rho, c.sigma, Information.ofNats(r))
                        .nats(),
                c.reference.strongConverse(r));
    }
}
