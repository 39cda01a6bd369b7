package org.minorant.tests.property;

import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.function.BiFunction;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.constraints.IntRange;
import org.minorant.bounds.ClassicalQuantumChannel;
import org.minorant.bounds.CodingBounds;
import org.minorant.bounds.Divergences;
import org.minorant.core.Answer;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.HermitianOperator;
import org.minorant.core.KrausChannel;
import org.minorant.core.LoewnerComparison;
import org.minorant.core.Operator;
import org.minorant.core.PositiveOperator;
import org.minorant.core.pair.PositivePair;

/** Composite hypotheses and channels after channels: what the modules say together. */
class ComposedPropertiesTest {

    private static final String SEED = "20263";
    private static final int TRIES = 40;

    private static void below(Enclosure least, Enclosure most, String what) {
        assertTrue(least.isPossiblyBelow(most), () -> what + ": " + least + " exceeds " + most);
    }

    /** Σ KρK*, exact. */
    private static ExactMatrix image(List<ExactMatrix> kraus, ExactMatrix rho) {
        ExactMatrix sum = kraus.get(0).times(rho).times(kraus.get(0).adjoint());
        for (ExactMatrix k : kraus.subList(1, kraus.size())) {
            sum = sum.plus(k.times(rho).times(k.adjoint()));
        }
        return sum;
    }

    private static KrausChannel channel(List<ExactMatrix> kraus) {
        return KrausChannel.of(
                kraus.stream().map(k -> Operator.of(k.re(), k.im())).toList());
    }

    /** Data processing without any tolerance: the channel is exact and so are both images. */
    @Property(seed = SEED, tries = TRIES)
    void divergencesDoNotIncreaseUnderExactChannels(
            @ForAll long seed,
            @ForAll @IntRange(min = 1, max = 3) int n,
            @ForAll @IntRange(min = 1, max = 3) int m,
            @ForAll Spectrum a,
            @ForAll Spectrum b) {
        Exactly draw = new Exactly(seed);
        ExactMatrix rho = ExactState.draw(draw, n, a);
        ExactMatrix sigma = ExactState.draw(draw, n, b);
        List<ExactMatrix> kraus = draw.kraus(n, m);
        DensityOperator u = image(kraus, rho).asState();
        DensityOperator v = image(kraus, sigma).asState();
        for (BiFunction<DensityOperator, DensityOperator, Enclosure> d : DIVERGENCES) {
            below(d.apply(u, v), d.apply(rho.asState(), sigma.asState()), "divergence " + DIVERGENCES.indexOf(d));
        }
    }

    /** An isometry loses nothing: every divergence stays what it is. */
    @Property(seed = SEED, tries = TRIES)
    void divergencesDoNotChangeUnderIsometries(
            @ForAll long seed, @ForAll @IntRange(min = 1, max = 4) int n, @ForAll Spectrum a, @ForAll Spectrum b) {
        Exactly draw = new Exactly(seed);
        ExactMatrix rho = ExactState.draw(draw, n, a);
        ExactMatrix sigma = ExactState.draw(draw, n, b);
        List<ExactMatrix> isometry =
                List.of(draw.unitary(Math.max(4, n + draw.random().nextInt(2)), 3)
                        .firstColumns(n));
        DensityOperator u = image(isometry, rho).asState();
        DensityOperator v = image(isometry, sigma).asState();
        for (BiFunction<DensityOperator, DensityOperator, Enclosure> d : DIVERGENCES) {
            Enclosure before = d.apply(rho.asState(), sigma.asState());
            Enclosure after = d.apply(u, v);
            below(after, before, "after an isometry, divergence " + DIVERGENCES.indexOf(d));
            below(before, after, "before an isometry, divergence " + DIVERGENCES.indexOf(d));
        }
    }

    private static final List<BiFunction<DensityOperator, DensityOperator, Enclosure>> DIVERGENCES = List.of(
            (r, s) -> Divergences.relativeEntropy(r, s).nats(),
            (r, s) -> Divergences.petzRenyi(r, s, 0.5).nats(),
            (r, s) -> Divergences.petzRenyi(r, s, 1.5).nats(),
            (r, s) -> Divergences.sandwichedRenyi(r, s, 0.75).nats(),
            (r, s) -> Divergences.sandwichedRenyi(r, s, 2).nats(),
            (r, s) -> Divergences.maxDivergence(r, s).nats(),
            (r, s) -> Divergences.minDivergence(r, s).nats(),
            (r, s) -> Divergences.fidelity(r, s).negate(),
            (r, s) -> Divergences.chernoff(r, s).value().nats(),
            (r, s) -> Divergences.hypothesisTesting(r, s, 0.125).nats());

    /** The classical-quantum pair ⊕ P(x)W_x against ⊕ P(x)σ: its relative entropy is the mutual information, and its curve gives f(M − 1). */
    @Property(seed = SEED, tries = TRIES)
    void theBlockDiagonalPairIsTheChannel(
            @ForAll long seed, @ForAll @IntRange(min = 1, max = 3) int n, @ForAll Spectrum a, @ForAll Spectrum b) {
        Exactly draw = new Exactly(seed);
        ExactMatrix w0 = ExactState.draw(draw, n, a);
        ExactMatrix w1 = ExactState.draw(draw, n, b);
        ExactMatrix average = w0.times(0.25).plus(w1.times(0.75));
        ExactMatrix joint = w0.times(0.25).directSum(w1.times(0.75));
        ExactMatrix product = average.times(0.25).directSum(average.times(0.75));
        ClassicalQuantumChannel channel = ClassicalQuantumChannel.of(w0.asState(), w1.asState());
        Enclosure information = channel.mutualInformation(0.25, 0.75).nats();
        Enclosure divergence =
                Divergences.relativeEntropy(joint.asState(), product.asState()).nats();
        below(information, divergence, "mutual information");
        below(divergence, information, "relative entropy");
        Enclosure error = CodingBounds.of(channel).withInput(0.25, 0.75).achievableError(3);
        Enclosure curve =
                PositivePair.of(joint.asEntries(), product.asEntries()).traceMinimum(2);
        below(error, curve, "f(M − 1)");
        below(curve, error, "the curve of the block-diagonal pair");
    }

    /** What is done to the output of a channel helps no code: information and capacity fall, the error rises. */
    @Property(seed = SEED, tries = TRIES)
    void processingTheOutputHelpsNoCode(
            @ForAll long seed, @ForAll @IntRange(min = 2, max = 3) int n, @ForAll Spectrum a, @ForAll Spectrum b) {
        Exactly draw = new Exactly(seed);
        List<ExactMatrix> kraus = draw.kraus(n, 2);
        List<DensityOperator> before = new ArrayList<>();
        List<DensityOperator> after = new ArrayList<>();
        for (Spectrum kind : List.of(a, b, Spectrum.PRESCRIBED)) {
            ExactMatrix w = ExactState.draw(draw, n, kind);
            before.add(w.asState());
            after.add(image(kraus, w).asState());
        }
        ClassicalQuantumChannel first = ClassicalQuantumChannel.of(before);
        ClassicalQuantumChannel second = ClassicalQuantumChannel.of(after);
        double[] input = {0.5, 0.25, 0.25};
        below(
                second.mutualInformation(input).nats(),
                first.mutualInformation(input).nats(),
                "information");
        below(second.capacity().value().nats(), first.capacity().value().nats(), "capacity");
        below(
                CodingBounds.of(first).withInput(input).achievableError(2),
                CodingBounds.of(second).withInput(input).achievableError(2),
                "error");
    }

    /** The library's channel makes of a state what exact arithmetic makes of it. */
    @Property(seed = SEED, tries = TRIES)
    void krausChannelsActAsInExactArithmetic(
            @ForAll long seed,
            @ForAll @IntRange(min = 1, max = 4) int n,
            @ForAll @IntRange(min = 1, max = 4) int m,
            @ForAll Spectrum a,
            @ForAll Spectrum b) {
        Exactly draw = new Exactly(seed);
        ExactMatrix x = draw.factor(n, a);
        ExactMatrix y = draw.factor(n, b);
        List<ExactMatrix> kraus = draw.kraus(n, m);
        KrausChannel channel = channel(kraus);
        Enclosure byLibrary = PositivePair.of(channel.apply(x.asFactor()), channel.apply(y.asFactor()))
                .traceMinimum(1);
        Enclosure exact = PositivePair.of(
                        Exactly.image(kraus, x).asFactor(),
                        Exactly.image(kraus, y).asFactor())
                .traceMinimum(1);
        below(byLibrary, exact, "the library's image");
        below(exact, byLibrary, "the exact image");
        assertTrue(channel.traceDefect() < 1e-14);
    }

    /** A ∧ B is below both and has the largest trace: no certain violation beyond its stated accuracy n · 2^-49 · (‖A‖ + ‖B‖), and the trace of the curve. */
    @Property(seed = SEED, tries = TRIES)
    void theMinimumOperatorLiesBelowBoth(
            @ForAll long seed, @ForAll @IntRange(min = 1, max = 6) int n, @ForAll Spectrum a, @ForAll Spectrum b) {
        Exactly draw = new Exactly(seed);
        PositiveOperator p = ExactState.draw(draw, n, a).asEntries();
        PositiveOperator q = ExactState.draw(draw, n, b).asEntries();
        HermitianOperator minimum = p.minimum(q);
        double accuracy = n * 0x1p-49 * 2;
        HermitianOperator slack = HermitianOperator.identity(n).times(accuracy);
        assertNotEquals(
                Answer.CERTAINLY_NOT,
                LoewnerComparison.of(minimum, p.plus(slack)).isBelow());
        assertNotEquals(
                Answer.CERTAINLY_NOT,
                LoewnerComparison.of(minimum, q.plus(slack)).isBelow());
        Enclosure f = PositivePair.of(p, q).traceMinimum(1);
        assertTrue(f.widen(n * accuracy).contains(minimum.trace().re()), () -> f + " beside " + minimum.trace());
    }
}
