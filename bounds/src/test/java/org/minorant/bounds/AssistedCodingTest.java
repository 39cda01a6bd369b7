package org.minorant.bounds;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Random;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.ShrinkingMode;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.function.Executable;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;
import org.minorant.core.InvalidInputException;
import org.minorant.core.KrausChannel;
import org.minorant.core.PositiveOperator;
import org.minorant.core.StandardChannels;
import org.minorant.core.TensorLayout;
import org.minorant.core.WideDouble;
import org.minorant.core.pair.PositivePair;
import org.minorant.core.state.RandomStates;
import org.minorant.measurement.Ensemble;
import org.minorant.measurement.PrettyGoodMeasurement;

/** Codes with shared entanglement: against closed forms, dense operators, true errors of explicit codes, and other inputs. */
final class AssistedCodingTest {

    private static final double ERROR = 1e-3;

    private static void assertMeet(Enclosure a, Enclosure b, double relative) {
        Enclosure wide = a.times(Enclosure.ONE.widen(relative));
        assertTrue(
                wide.isPossiblyBelow(b) && b.isPossiblyBelow(wide),
                () -> a.toIntervalString(17) + " " + b.toIntervalString(17));
    }

    /** N(Φ)^⊗n and its marginals as matrices of dimension 4^n. */
    @ParameterizedTest
    @CsvSource({"0.1, 2", "0.4, 2", "0.4, 3"})
    void depolarisingAsDenseOperators(double p, int n) {
        KrausChannel channel = StandardChannels.depolarising(2, p);
        assertDense(channel, AssistedInput.maximallyMixed(2), AssistedCoding.of(channel), n);
    }

    @Test
    void pauliTurnedAsDenseOperators() {
        KrausChannel channel = AssistedChannels.turned(AssistedChannels.pauli(0.7, 0.15, 0.1, 0.05), new Random(5));
        assertDense(channel, AssistedInput.maximallyMixed(2), AssistedCoding.of(channel), 2);
    }

    @Test
    void erasureAsDenseOperators() {
        KrausChannel channel = StandardChannels.erasure(2, 0.3);
        assertDense(channel, AssistedInput.maximallyMixed(2), AssistedCoding.of(channel), 2);
    }

    @Test
    void amplitudeDampingAsDenseOperators() {
        KrausChannel channel = StandardChannels.amplitudeDamping(0.3);
        DensityOperator input = DensityOperator.ofBloch(0.1, 0.2, 0.3);
        assertDense(channel, AssistedInput.of(input), AssistedCoding.of(channel).withInput(input), 2);
    }

    private static void assertDense(KrausChannel channel, AssistedInput input, AssistedCoding bounds, int n) {
        PositiveOperator a = entries(input.joint(channel));
        PositiveOperator b = entries(input.product(channel));
        PositiveOperator manyA = a;
        PositiveOperator manyB = b;
        for (int k = 1; k < n; k++) {
            manyA = entries(manyA.tensor(a));
            manyB = entries(manyB.tensor(b));
        }
        PositivePair dense = PositivePair.of(manyA, manyB);
        for (long m : new long[] {2, 3, 9, 40}) {
            assertMeet(dense.traceMinimum(m - 1), bounds.uses(n).achievableError(m), 1e-12);
        }
    }

    /** The same operator by its entries alone. */
    private static PositiveOperator entries(PositiveOperator a) {
        return (PositiveOperator) PositiveOperator.nearest(a).operator();
    }

    /** f by the sum over the number of errors: (1−3p/4)^(n−k) (p/4)^k 3^k against (M−1) 4^(−n) 3^k, in double. */
    @ParameterizedTest
    @CsvSource({"0.1, 1, 2", "0.1, 5, 30", "0.3, 12, 1000"})
    void depolarisingInClosedForm(double p, int n, long messages) {
        double f = 0;
        double choose = 1;
        for (int k = 0; k <= n; k++) {
            double a = choose * Math.pow(1 - 0.75 * p, n - k) * Math.pow(0.75 * p, k);
            double b = choose * Math.pow(0.25, n - k) * Math.pow(0.75, k) * (messages - 1);
            f += Math.min(a, b);
            choose = choose * (n - k) / (k + 1);
        }
        Enclosure error =
                AssistedCoding.of(StandardChannels.depolarising(2, p)).uses(n).achievableError(messages);
        assertTrue(error.times(Enclosure.ONE.widen(1e-13)).contains(f), error::toString);
        assertTrue(error.relativeWidth() < 1e-13);
    }

    /** Noiseless: f(M−1) = (M−1)/4^n, and no code has more than 4^n/(1−ε) messages. */
    @Test
    void denseCoding() {
        AssistedCoding bounds = AssistedCoding.of(StandardChannels.identity(2)).uses(20);
        Enclosure low = bounds.achievable(ERROR).nats();
        assertTrue(low.widen(1e-8).contains(Math.log(1 + ERROR * Math.pow(4, 20))), low::toString);
        Enclosure high = bounds.converse(ERROR).nats();
        assertTrue(high.widen(1e-8).contains(20 * Math.log(4) - Math.log1p(-ERROR)), high::toString);
        assertEquals(40, bounds.normalApproximation(ERROR).bits(), 1e-5);
    }

    /** A million uses of channels with two or three ratios: enclosures of log2 M narrower than 1e-6. */
    @Test
    void aMillionUses() {
        for (KrausChannel channel : List.of(
                StandardChannels.depolarising(2, 0.1),
                StandardChannels.dephasing(2, 0.3),
                StandardChannels.depolarising(3, 0.2),
                StandardChannels.erasure(2, 0.3))) {
            AssistedCoding bounds = AssistedCoding.of(channel).uses(1_000_000);
            Enclosure low = bounds.achievable(ERROR).bits();
            Enclosure high = bounds.converse(ERROR).bits();
            assertTrue(low.width() < 1e-6, () -> channel + " " + low.toIntervalString(17));
            assertTrue(high.width() < 1e-6, () -> channel + " " + high.toIntervalString(17));
            double normal = bounds.normalApproximation(ERROR).bits();
            // half a logarithm of n is about 10 bits
            assertTrue(low.upper() < high.lower() && high.lower() - low.upper() < 25);
            assertTrue(low.lower() > normal - 25 && high.upper() < normal + 25);
        }
    }

    /** Four different probabilities; a million uses take a minute. */
    @Test
    void manyUsesOfAPauliChannel() {
        AssistedCoding bounds =
                AssistedCoding.of(AssistedChannels.pauli(0.9, 0.05, 0.03, 0.02)).uses(5_000);
        Enclosure low = bounds.achievable(ERROR).bits();
        Enclosure high = bounds.converse(ERROR).bits();
        assertTrue(low.width() < 1e-6, () -> low.toIntervalString(17));
        assertTrue(high.width() < 1e-6, () -> high.toIntervalString(17));
        double normal = bounds.normalApproximation(ERROR).bits();
        assertTrue(low.upper() < high.lower() && high.lower() - low.upper() < 20);
        assertTrue(low.lower() > normal - 20 && high.upper() < normal + 20);
    }

    @Property(tries = 12, shrinking = ShrinkingMode.OFF)
    void achievableIsAtMostConverse(@ForAll long seed) {
        Random random = new Random(seed);
        double x = 0.3 * random.nextDouble();
        double y = 0.3 * random.nextDouble();
        KrausChannel channel = AssistedChannels.turned(AssistedChannels.pauli(1 - x - y, x, y, 0), random);
        int n = 1 + random.nextInt(60);
        double epsilon = Math.pow(10, -4 * random.nextDouble()) * 0.9;
        AssistedCoding bounds = AssistedCoding.of(channel).uses(n);
        Ledger ledger = bounds.ledger(epsilon);
        assertEquals(3, ledger.bounds().size());
        Information low = bounds.achievable(epsilon);
        Information high = bounds.converse(epsilon);
        assertTrue(low.nats().isPossiblyBelow(high.nats()));
        if (high.nats().lower() > 0) {
            Enclosure floor = bounds.converseError(high);
            assertTrue(floor.widen(1e-6 * epsilon).contains(epsilon), () -> floor + " for " + epsilon);
        }
        if (low.nats().lower() > 0) {
            Enclosure there = bounds.achievableError(low);
            assertTrue(there.times(Enclosure.ONE.widen(1e-7)).contains(epsilon), () -> there + " for " + epsilon);
        }
    }

    /** The number for one use of any channel holds against every input: β_ε(N(θ_ρ)‖ρ_R ⊗ σ) is at least 1/M, σ the output of the default input. */
    @Property(tries = 3, shrinking = ShrinkingMode.OFF)
    void theConverseHoldsForEveryInput(@ForAll long seed) {
        Random random = new Random(seed);
        KrausChannel channel = random.nextInt(3) == 0
                ? StandardChannels.amplitudeDamping(random.nextDouble())
                : AssistedChannels.random(random, 2, 2 + random.nextInt(2), 2 + random.nextInt(2));
        AssistedCoding bounds = AssistedCoding.of(channel);
        double epsilon = 0.01 + 0.5 * random.nextDouble();
        double limit = bounds.converse(epsilon).nats().upper();
        assertTrue(bounds.achievable(epsilon).nats().lower() <= limit);
        DensityOperator sigma = channel.apply(bounds.input());
        double floor = bounds.converseError(5).lower();
        double best = 0;
        for (int k = 0; k < 5; k++) {
            DensityOperator rho = k == 0 ? bounds.input() : RandomStates.hilbertSchmidt(2, random.nextLong());
            AssistedInput root = AssistedInput.of(rho);
            LetterCurves one = new LetterCurves(
                    List.of(PositivePair.of(
                            root.joint(channel), root.reference().tensor(sigma))),
                    Enclosure.ONE,
                    Enclosure.ONE);
            double nats = TraceMinimumConverse.messages(one, epsilon).nats().lower();
            assertTrue(nats <= limit + 1e-12, () -> nats + " " + limit + " " + rho);
            best = Math.max(best, nats);
            double least = TraceMinimumConverse.error(one, Enclosure.exact(5)).upper();
            assertTrue(floor <= least + 1e-12, () -> floor + " " + least + " " + rho);
        }
        assertTrue(limit < best + 0.7, "far above every input met");
    }

    /** The way for any channel, asked for a symmetric one, finds the same. */
    @ParameterizedTest
    @CsvSource({"0.01", "0.2", "0.7"})
    void bothConversesAgree(double epsilon) {
        KrausChannel channel = AssistedChannels.pauli(0.75, 0.1, 0.1, 0.05);
        Enclosure enclosed = AssistedCoding.of(channel).converse(epsilon).nats();
        Information any =
                AssistedConverse.of(channel, AssistedInput.maximallyMixed(2)).messages(epsilon);
        assertTrue(any.nats().lower() > enclosed.lower() - 1e-12);
        assertEquals(enclosed.upper(), any.nats().upper(), 1e-7);
    }

    /** Position-based codes of two and three messages as they are: R_1 R_2 B or R_1 R_2 R_3 B, pretty-good measurement. */
    @Property(tries = 8, shrinking = ShrinkingMode.OFF)
    void trueErrorsOfPositionBasedCodes(@ForAll long seed) {
        Random random = new Random(seed);
        KrausChannel channel = random.nextBoolean()
                ? AssistedChannels.random(random, 2, 2, 2)
                : StandardChannels.depolarising(2, random.nextDouble());
        DensityOperator input = RandomStates.hilbertSchmidt(2, random.nextLong());
        AssistedInput root = AssistedInput.of(input);
        DensityOperator joint = DensityOperator.of(root.joint(channel));
        DensityOperator reference = DensityOperator.of(root.reference());
        AssistedCoding bounds = AssistedCoding.of(channel).withInput(input);
        DensityOperator first = joint.tensor(reference);
        TensorLayout two = TensorLayout.of(2, 2, 2);
        // R_1 B R_2 to R_1 R_2 B, and to R_2 R_1 B
        assertBelow(List.of(two.permute(first, 0, 2, 1), two.permute(first, 2, 0, 1)), bounds.achievableError(2));
        DensityOperator more = first.tensor(reference);
        TensorLayout three = TensorLayout.of(2, 2, 2, 2);
        assertBelow(
                List.of(
                        three.permute(more, 0, 2, 3, 1),
                        three.permute(more, 2, 0, 3, 1),
                        three.permute(more, 2, 3, 0, 1)),
                bounds.achievableError(3));
    }

    private static void assertBelow(List<DensityOperator> states, Enclosure bound) {
        Enclosure error =
                PrettyGoodMeasurement.of(Ensemble.equiprobable(states)).errorProbability();
        assertTrue(error.lower() <= bound.upper() * (1 + 1e-12), () -> error + " " + bound);
        assertTrue(error.lower() > 0.2 * bound.upper(), "the bound is of no use");
    }

    /** Turned Pauli channels have the numbers of straight ones; depolarising of other Kraus operators is the same channel. */
    @Test
    void representationsAgree() {
        KrausChannel straight = AssistedChannels.pauli(0.85, 0.05, 0.05, 0.05);
        KrausChannel turned = AssistedChannels.turned(straight, new Random(3));
        for (KrausChannel c : List.of(turned, StandardChannels.depolarising(2, 0.2))) {
            AssistedCoding one = AssistedCoding.of(straight).uses(300);
            AssistedCoding other = AssistedCoding.of(c).uses(300);
            assertMeet(one.achievable(ERROR).nats(), other.achievable(ERROR).nats(), 1e-9);
            assertMeet(one.converse(ERROR).nats(), other.converse(ERROR).nats(), 1e-9);
        }
    }

    /** Unital, but not symmetric: the copies are there, the converse is not. */
    @Test
    void unitalOfDimensionThree() {
        double s = Math.sqrt(0.5);
        KrausChannel channel = KrausChannel.of(
                org.minorant.core.HermitianOperator.diagonal(1, s, 0),
                org.minorant.core.HermitianOperator.diagonal(0, s, 1));
        AssistedCoding bounds = AssistedCoding.of(channel).withInput(DensityOperator.maximallyMixed(3));
        assertTrue(AssistedLetters.of(channel).isPresent());
        assertDense(channel, AssistedInput.maximallyMixed(3), bounds, 2);
        assertRefused("symmetry was not found", () -> bounds.uses(2).converse(ERROR));
        assertEquals(2, bounds.uses(2).ledger(ERROR).bounds().size());
    }

    @Test
    void refusals() {
        AssistedCoding bounds = AssistedCoding.of(StandardChannels.amplitudeDamping(0.3));
        assertRefused("at least 1", () -> bounds.uses(0));
        assertRefused("dimension 3", () -> bounds.withInput(DensityOperator.maximallyMixed(3)));
        for (double epsilon : new double[] {0, 1, -0.1, Double.NaN}) {
            assertRefused("both excluded", () -> bounds.achievable(epsilon));
            assertRefused("both excluded", () -> bounds.converse(epsilon));
            assertRefused("both excluded", () -> bounds.weakConverse(epsilon));
            assertRefused("both excluded", () -> bounds.normalApproximation(epsilon));
            assertRefused("both excluded", () -> bounds.ledger(epsilon));
        }
        assertRefused("at least 1", () -> bounds.achievableError(0));
        assertRefused("at least 1", () -> bounds.converseError(0));
        assertRefused("logarithm", () -> bounds.achievableError(Information.ofNats(-1.0)));
        assertRefused("symmetry was not found", () -> bounds.uses(2).converse(ERROR));
        assertRefused("symmetry was not found", () -> bounds.uses(2).converseError(4));
        assertEquals(2, bounds.uses(2).ledger(ERROR).bounds().size());
        assertEquals(3, bounds.ledger(ERROR).bounds().size());
        assertEquals(Enclosure.ZERO, bounds.achievableError(1));
        assertEquals(Enclosure.ZERO, bounds.converseError(1));
        assertEquals(WideDouble.ZERO, bounds.achievable(1e-9).nats().upperWide());
    }

    /** A channel that forgets its input carries nothing. */
    @Test
    void nothing() {
        AssistedCoding bounds =
                AssistedCoding.of(StandardChannels.depolarising(2, 1)).uses(7);
        assertTrue(bounds.capacity().value().nats().upper() < 1e-13);
        assertEquals(-Math.log1p(-0.25), bounds.converse(0.25).nats().upper(), 1e-9);
        assertEquals(1, bounds.achievableError(2).lower(), 1e-12);
    }

    private static void assertRefused(String part, Executable asked) {
        InvalidInputException e = assertThrows(InvalidInputException.class, asked);
        assertTrue(e.getMessage().contains(part), e.getMessage());
    }
}
