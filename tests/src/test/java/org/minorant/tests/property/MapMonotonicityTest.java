package org.minorant.tests.property;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.util.List;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.constraints.IntRange;
import org.minorant.core.Enclosure;
import org.minorant.core.pair.PositivePair;

/**
 * Tr[Λ(A) ∧ Λ(B)] ≥ Tr[A ∧ B] for every positive trace-preserving Λ, completely positive or not: Λ(A ∧ B) lies below both images and keeps its trace.
 */
class MapMonotonicityTest {

    private static final String SEED = "20261";
    private static final int TRIES = 150;

    private static void notLower(Enclosure before, Enclosure after) {
        assertTrue(before.isPossiblyBelow(after), () -> "from " + before + " to " + after);
    }

    /** Completely positive maps by their Kraus operators, between spaces of different dimensions. */
    @Property(seed = SEED, tries = TRIES)
    void krausChannels(
            @ForAll long seed,
            @ForAll @IntRange(min = 1, max = 5) int n,
            @ForAll @IntRange(min = 1, max = 5) int m,
            @ForAll Spectrum a,
            @ForAll Spectrum b) {
        Exactly draw = new Exactly(seed);
        ExactMatrix x = draw.factor(n, a);
        ExactMatrix y = draw.factor(n, b);
        List<ExactMatrix> kraus = draw.kraus(n, m);
        ExactMatrix u = Exactly.image(kraus, x);
        ExactMatrix v = Exactly.image(kraus, y);
        // trace-preserving exactly, or the theorem would not apply
        assertEquals(0, x.squares().compareTo(u.squares()));
        notLower(
                PositivePair.of(x.asFactor(), y.asFactor()).traceMinimum(1),
                PositivePair.of(u.asFactor(), v.asFactor()).traceMinimum(1));
    }

    /** Transposition, positive and not completely positive, changes nothing at all: it keeps spectra. */
    @Property(seed = SEED, tries = TRIES)
    void transposition(
            @ForAll long seed, @ForAll @IntRange(min = 1, max = 6) int n, @ForAll Spectrum a, @ForAll Spectrum b) {
        Exactly draw = new Exactly(seed);
        ExactMatrix x = draw.factor(n, a);
        ExactMatrix y = draw.factor(n, b);
        Enclosure before = PositivePair.of(x.asFactor(), y.asFactor()).traceMinimum(1);
        // (XX*)ᵀ = X̄X̄*
        Enclosure after = PositivePair.of(
                        x.conjugate().asFactor(), y.conjugate().asFactor())
                .traceMinimum(1);
        notLower(before, after);
        notLower(after, before);
    }

    /** A channel after transposition: positive, in general not completely positive, and no longer spectrum-preserving. */
    @Property(seed = SEED, tries = TRIES)
    void channelAfterPartialTransposition(
            @ForAll long seed, @ForAll @IntRange(min = 2, max = 4) int n, @ForAll Spectrum a, @ForAll Spectrum b) {
        Exactly draw = new Exactly(seed);
        ExactMatrix x = draw.factor(n, a);
        ExactMatrix y = draw.factor(n, b);
        List<ExactMatrix> kraus = draw.kraus(n, 2);
        notLower(
                PositivePair.of(x.asFactor(), y.asFactor()).traceMinimum(1),
                PositivePair.of(
                                Exactly.image(kraus, x.conjugate()).asFactor(),
                                Exactly.image(kraus, y.conjugate()).asFactor())
                        .traceMinimum(1));
    }

    /** A ↦ (Tr A · 1 − A)/(d − 1), the reduction map: positive, not completely positive for d > 2; d − 1 is a power of two here. */
    @Property(seed = SEED, tries = TRIES)
    void reduction(
            @ForAll long seed, @ForAll @IntRange(min = 0, max = 2) int power, @ForAll Spectrum a, @ForAll Spectrum b) {
        int n = 1 + (1 << power);
        Exactly draw = new Exactly(seed);
        ExactMatrix p = entries(draw, n, a);
        ExactMatrix q = entries(draw, n, b);
        notLower(
                PositivePair.of(p.asEntries(), q.asEntries()).traceMinimum(1),
                PositivePair.of(reduced(p).asEntries(), reduced(q).asEntries()).traceMinimum(1));
    }

    private static ExactMatrix entries(Exactly draw, int n, Spectrum spectrum) {
        ExactMatrix x = draw.spectralFactor(n, spectrum == Spectrum.GRADED ? Spectrum.CLUSTERED : spectrum);
        return x.times(x.adjoint());
    }

    private static ExactMatrix reduced(ExactMatrix p) {
        BigDecimal trace = p.trace();
        ExactMatrix r = ExactMatrix.identity(p.rows())
                .times(ExactMatrix.exact(trace))
                .minus(p)
                .times(1.0 / (p.rows() - 1));
        assertEquals(0, trace.compareTo(r.trace()));
        return r;
    }
}
