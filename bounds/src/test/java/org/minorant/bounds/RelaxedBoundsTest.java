package org.minorant.bounds;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.Random;
import java.util.function.DoubleUnaryOperator;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.ShrinkingMode;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;
import org.minorant.core.Complex;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;
import org.minorant.core.InvalidInputException;
import org.minorant.core.state.LightStates;
import org.minorant.core.state.Truncation;

/** The bounds that hold for every channel and any number of uses, against the exact ones, closed forms and each other. */
final class RelaxedBoundsTest {

    /** Searches stop within 1e-9 of the best order's logarithm, where the value is stationary; what is left is rounding of n uses. */
    private static final double SEARCH = 1e-9;

    private static ClassicalQuantumChannel symmetric(double e) {
        return ClassicalQuantumChannel.ofStochasticMatrix(new double[][] {{1 - e, e}, {e, 1 - e}});
    }

    private static ClassicalQuantumChannel kets(double overlap) {
        return ClassicalQuantumChannel.of(
                DensityOperator.ofKet(Channels.ket(overlap, false)),
                DensityOperator.ofKet(Channels.ket(overlap, true)));
    }

    /** The least value of a function that falls and then rises, by thirds. */
    private static double least(DoubleUnaryOperator f, double from, double to) {
        double low = from;
        double high = to;
        for (int i = 0; i < 100; i++) {
            double third = (high - low) / 3;
            boolean left = f.applyAsDouble(low + third) < f.applyAsDouble(high - third);
            low = left ? low : low + third;
            high = left ? high - third : high;
        }
        return f.applyAsDouble(0.5 * (low + high));
    }

    /** Two kets of overlap c, equal mixture of eigenvalues l = (1 ± c)/2: Q_s = Σ l^(1+s), as W^(1−s) = W and ⟨ψ|ρ^s|ψ⟩ = Σ l · l^s. */
    @ParameterizedTest
    @CsvSource({"0.78, 100, 1e-3", "0.5, 1000, 1e-6", "0.78, 1000000, 0.25"})
    void chernoffOfTwoKets(double c, int n, double epsilon) {
        double others = -least(
                s -> {
                    double q = Math.pow((1 + c) / 2, 1 + s) + Math.pow((1 - c) / 2, 1 + s);
                    return -(Math.log(epsilon) - n * Math.log(q)) / s;
                },
                1e-9,
                1);
        double best = others + Math.log1p(Math.exp(-others));
        CodingBounds uses = CodingBounds.of(kets(c)).uses(n);
        Enclosure nats = uses.chernoffAchievable(epsilon).nats();
        assertEquals(best, nats.midpoint(), n * SEARCH);
        assertTrue(nats.width() < 1e-9 * Math.max(1, n * 1e-3), nats.toIntervalString(17));
        if (n <= 1000) {
            assertTrue(nats.lower() <= uses.achievable(epsilon).nats().upper());
        }
    }

    /** A binary symmetric channel: D_α against the fair coin is ln 2 + ln((1−e)^α + e^α)/(α−1), and the fair coin is the best output state by symmetry. */
    @ParameterizedTest
    @CsvSource({"0.11, 100, 1e-3", "0.11, 1000000, 0.999", "0.3, 1, 0.5"})
    void strongConverseOfASymmetricChannel(double e, int n, double epsilon) {
        double ofAll = least(
                u -> {
                    double alpha = 1 / (1 - u);
                    double d = Math.log(2) + Math.log(Math.pow(1 - e, alpha) + Math.pow(e, alpha)) / (alpha - 1);
                    return n * d - Math.log(1 - epsilon) / u;
                },
                1e-9,
                0.8);
        double best = Math.min(ofAll, n * Math.log(2 * (1 - e)) - Math.log(1 - epsilon));
        Enclosure nats =
                CodingBounds.of(symmetric(e)).uses(n).strongConverse(epsilon).nats();
        assertEquals(best, nats.midpoint(), n * SEARCH);
    }

    /** Light in stray light, as files hold it: eigenvalues fall below the rounding of the entries, and no state is certainly above a letter but those with a floor. */
    @Test
    void lettersOfRoundedEntriesHaveAStrongConverse() {
        List<DensityOperator> letters = new ArrayList<>();
        for (double amplitude : new double[] {-1.2, 0, 1.2}) {
            DensityOperator light = LightStates.displacedThermal(
                            new Complex(amplitude, 0), 0.1, Truncation.ofDimension(14))
                    .state();
            double[][] entries = new double[14][14];
            for (int i = 0; i < 14; i++) {
                for (int j = 0; j < 14; j++) {
                    entries[i][j] = light.re(i, j);
                }
            }
            letters.add(DensityOperator.ofReal(entries));
        }
        Information bound = CodingBounds.of(ClassicalQuantumChannel.of(letters)).strongConverse(0.05);
        // log2 3 + log2 1/0.95 is the bound of order infinity at the even mixture, which is above a third of each
        // letter
        assertTrue(bound.bits().upper() < Math.log(3 / 0.95) / Math.log(2) + 1e-6, bound::toString);
        assertTrue(bound.bits().lower() > 1.1, bound::toString);
    }

    /** Two kets and the mixture at its optimum: D̃_α(ψ‖σ) = (1/u) ln⟨ψ|σ^(−u)|ψ⟩, least for σ ∝ ρ^(1/(1+u)), so that u D̃_α = (1+u) ln Tr ρ^(1/(1+u)). */
    @Test
    void strongConverseOfTwoKets() {
        double c = 0.78;
        int n = 1000;
        double epsilon = 0.1;
        double best = least(
                u -> {
                    double t = Math.pow((1 + c) / 2, 1 / (1 + u)) + Math.pow((1 - c) / 2, 1 / (1 + u));
                    return (n * (1 + u) * Math.log(t) - Math.log(1 - epsilon)) / u;
                },
                1e-9,
                0.8);
        CodingBounds uses = CodingBounds.of(kets(c)).uses(n);
        Enclosure nats = uses.strongConverse(epsilon).nats();
        assertEquals(best, nats.midpoint(), n * SEARCH);
        assertTrue(nats.upper() >= uses.converse(epsilon).nats().lower());
        // a chosen output state is kept to: the maximally mixed one bounds by n ln 2 and more
        Information fixed =
                uses.withOutputState(DensityOperator.maximallyMixed(2)).strongConverse(epsilon);
        assertTrue(fixed.bits().contains(n - Math.log(1 - epsilon) / Math.log(2)), fixed.bits()::toString);
    }

    /** Every channel, one use: the relaxations lie outside of the exact bounds, at the same input and output state. */
    @Property(tries = 20, shrinking = ShrinkingMode.OFF)
    void outsideOfTheExactBoundsInOneUse(@ForAll long seed) {
        Random random = new Random(seed);
        ClassicalQuantumChannel channel = Channels.random(random, 4, 4);
        CodingBounds once = CodingBounds.of(channel).withInput(Channels.distribution(random, channel.letters()));
        double epsilon =
                random.nextBoolean() ? 0.02 + 0.96 * random.nextDouble() : Math.pow(10, -6 * random.nextDouble());
        assertTrue(once.chernoffAchievable(epsilon).nats().lower()
                <= once.achievable(epsilon).nats().upper());
        CodingBounds fixed = once.withOutputState(Channels.state(random, channel.dimension()));
        assertTrue(fixed.strongConverse(epsilon).nats().upper()
                >= fixed.converse(epsilon).nats().lower());
        long m = 2 + random.nextInt(50);
        Enclosure others = Enclosure.exact(m - 1);
        ChernoffWords chernoff = new ChernoffWords(channel.renyi(), once.input(), 1);
        assertTrue(chernoff.error(others).upper() >= once.achievableError(m).lower());
    }

    /** Every channel, n uses: nothing achievable exceeds any converse, and the ledger of both, which would refuse it, exists. */
    @Property(tries = 20, shrinking = ShrinkingMode.OFF)
    void consistentInManyUses(@ForAll long seed) {
        Random random = new Random(seed);
        ClassicalQuantumChannel channel = Channels.random(random, 4, 3);
        int n = 1 + random.nextInt(3000);
        CodingBounds uses = CodingBounds.of(channel).uses(n);
        double epsilon = 0.001 + 0.998 * random.nextDouble();
        Enclosure low = uses.chernoffAchievable(epsilon).nats();
        assertTrue(low.lower() <= uses.strongConverse(epsilon).nats().upper());
        assertTrue(low.lower() <= uses.weakConverse(epsilon).nats().upper());
        assertTrue(low.isFinite());
    }

    /** Exact bounds that are refused are left out of the ledger, and it says so. */
    @Test
    void ledgerOfAChannelThatExactBoundsDoNotCover() {
        ClassicalQuantumChannel channel = ClassicalQuantumChannel.ofStochasticMatrix(
                new double[][] {{0.7, 0.2, 0.1}, {0.1, 0.1, 0.8}, {0.2, 0.6, 0.2}});
        CodingBounds uses = CodingBounds.of(channel).uses(400);
        assertThrows(InvalidInputException.class, () -> uses.converse(0.01));
        Ledger ledger = uses.ledger(0.01);
        assertEquals(
                "logarithm of the largest number of messages at average error 0.01 in 400 uses"
                        + " (not covered for this channel: random-coding union; one-shot converse, hypothesis testing against an output state)",
                ledger.quantity());
        List<String> upper =
                ledger.bounds(Side.UPPER).stream().map(b -> b.theorem().name()).toList();
        assertEquals(
                List.of("weak converse (C + h(e))/(1 - e)", "strong converse by the sandwiched divergence, best order"),
                upper);
        // f(M − 1), dependence testing and the Chernoff-type bound
        assertEquals(3, ledger.bounds(Side.LOWER).size());
        Ledger errors = uses.errorLedger(1L << 40);
        assertTrue(errors.enclosure().lower() >= 0 && errors.enclosure().upper() <= 1);
        assertEquals(4, errors.bounds().size());
    }

    /** Far above capacity errors are nearly one, far below they vanish: the exponents' signs. */
    @Test
    void errorsFromBothSides() {
        ClassicalQuantumChannel channel = symmetric(0.11);
        CodingBounds uses = CodingBounds.of(channel).uses(100);
        long many = 1L << 62;
        Enclosure above = uses.errorLedger(many).enclosure();
        assertTrue(above.lower() > 0.75, above::toString);
        Ledger below = uses.errorLedger(4);
        Bound chernoff = below.bounds(Side.UPPER).stream()
                .filter(b -> b.theorem().equals(ChernoffWords.THEOREM))
                .findFirst()
                .orElseThrow();
        // 3 Q_1^100 at s = 1, Q_1 = ½ (1 + 1/1) in place of Tr W^0 ρ_B = 1: no s below gives more than
        // Bhattacharyya-like decay
        assertTrue(chernoff.value().upper() < 1e-3, chernoff::toString);
        assertTrue(chernoff.value().upper() >= uses.achievableError(4).lower());
    }

    /** No information gets through equal outputs: one message, and the converse of guessing, 1/(1 − ε). */
    @ParameterizedTest
    @ValueSource(ints = {1, 7, 100000})
    void identicalOutputs(int n) {
        DensityOperator w = DensityOperator.ofBloch(0.3, 0, 0.4);
        for (ClassicalQuantumChannel channel : List.of(
                ClassicalQuantumChannel.of(w, w),
                ClassicalQuantumChannel.ofStochasticMatrix(new double[][] {{0.25, 0.75}, {0.25, 0.75}}))) {
            CodingBounds uses = CodingBounds.of(channel).uses(n);
            assertEquals(Enclosure.ZERO, uses.chernoffAchievable(0.25).nats());
            Enclosure most = uses.strongConverse(0.25).nats();
            assertTrue(most.upper() >= Math.log(4 / 3.0) - 1e-15, most::toString);
            // the output state was found in double, and lifted to full support by 2^-43
            assertTrue(most.upper() < Math.log(4 / 3.0) + 1e-12 + n * 1e-12, most::toString);
        }
    }

    @ParameterizedTest
    @ValueSource(doubles = {0, 1, -0.1, 1.5, Double.NaN})
    void errorsOutOfRange(double epsilon) {
        CodingBounds bounds = CodingBounds.of(symmetric(0.1));
        String low = assertThrows(InvalidInputException.class, () -> bounds.chernoffAchievable(epsilon))
                .asked();
        String high = assertThrows(InvalidInputException.class, () -> bounds.strongConverse(epsilon))
                .asked();
        assertEquals("CodingBounds.chernoffAchievable", low);
        assertEquals("CodingBounds.strongConverse", high);
    }
}
