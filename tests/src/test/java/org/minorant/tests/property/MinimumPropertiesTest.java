package org.minorant.tests.property;

import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.constraints.IntRange;
import org.minorant.core.Enclosure;
import org.minorant.core.PositiveOperator;
import org.minorant.core.WideDouble;
import org.minorant.core.pair.PositivePair;

/** What holds for Tr[A ∧ B] of any positive A and B. Sources: one line of proof each, from A ∧ B being the largest in trace below both. */
class MinimumPropertiesTest {

    private static final String SEED = "20260";
    private static final int TRIES = 150;

    private static Enclosure minimum(ExactMatrix x, ExactMatrix y) {
        return PositivePair.of(x.asFactor(), y.asFactor()).traceMinimum(1);
    }

    private static void below(Enclosure least, Enclosure most) {
        assertTrue(least.isPossiblyBelow(most), () -> least + " exceeds " + most);
    }

    private static void equal(Enclosure one, Enclosure other) {
        below(one, other);
        below(other, one);
    }

    /** A ≤ A + C implies Tr[A ∧ B] ≤ Tr[(A + C) ∧ B], and the same in B. */
    @Property(seed = SEED, tries = TRIES)
    void isMonotoneInEachArgument(
            @ForAll long seed, @ForAll @IntRange(min = 1, max = 6) int n, @ForAll Spectrum a, @ForAll Spectrum b) {
        Exactly draw = new Exactly(seed);
        ExactMatrix x = draw.factor(n, a);
        ExactMatrix y = draw.factor(n, b);
        ExactMatrix more = draw.factor(n, a);
        below(minimum(x, y), minimum(x.beside(more), y));
        below(minimum(x, y), minimum(x, y.beside(more)));
    }

    /** (A₁ ∧ B₁) + (A₂ ∧ B₂) lies below A₁ + A₂ and B₁ + B₂. */
    @Property(seed = SEED, tries = TRIES)
    void isJointlySuperadditive(
            @ForAll long seed, @ForAll @IntRange(min = 1, max = 6) int n, @ForAll Spectrum a, @ForAll Spectrum b) {
        Exactly draw = new Exactly(seed);
        ExactMatrix x1 = draw.factor(n, a);
        ExactMatrix y1 = draw.factor(n, b);
        ExactMatrix x2 = draw.factor(n, b);
        ExactMatrix y2 = draw.factor(n, a);
        below(minimum(x1, y1).plus(minimum(x2, y2)), minimum(x1.beside(x2), y1.beside(y2)));
    }

    @Property(seed = SEED, tries = TRIES)
    void isAdditiveOnDirectSums(
            @ForAll long seed, @ForAll @IntRange(min = 1, max = 4) int n, @ForAll Spectrum a, @ForAll Spectrum b) {
        Exactly draw = new Exactly(seed);
        ExactMatrix x1 = draw.factor(n, a);
        ExactMatrix y1 = draw.factor(n, b);
        int m = 1 + draw.random().nextInt(4);
        ExactMatrix x2 = draw.factor(m, b);
        ExactMatrix y2 = draw.factor(m, a);
        Enclosure sum = minimum(x1, y1).plus(minimum(x2, y2));
        equal(sum, minimum(x1.directSum(x2), y1.directSum(y2)));
        PositivePair pairs = PositivePair.directSum(
                List.of(PositivePair.of(x1.asFactor(), y1.asFactor()), PositivePair.of(x2.asFactor(), y2.asFactor())),
                new double[] {1, 1});
        equal(sum, pairs.traceMinimum(1));
    }

    /** Tr[cA ∧ cB] = c Tr[A ∧ B], with c in the weights, in the columns and in the entries. */
    @Property(seed = SEED, tries = TRIES)
    void isHomogeneous(
            @ForAll long seed,
            @ForAll @IntRange(min = 1, max = 6) int n,
            @ForAll Spectrum a,
            @ForAll Spectrum b,
            @ForAll @IntRange(min = -60, max = 60) int power) {
        Exactly draw = new Exactly(seed);
        ExactMatrix x = draw.factor(n, a);
        ExactMatrix y = draw.factor(n, b);
        Enclosure f = minimum(x, y);
        double root = Math.scalb(1.0, power);
        Enclosure scaled = f.times(root).times(root);
        equal(scaled, minimum(x.times(root), y.times(root)));
        equal(scaled, PositivePair.of(x.asFactor(), y.asFactor()).traceMinimum(root * root, root * root));
        WideDouble wide = WideDouble.of(1, 4000);
        Enclosure far = PositivePair.of(x.asFactor(), y.asFactor()).traceMinimum(wide, wide);
        equal(
                f,
                Enclosure.of(
                        far.lowerWide().timesPowerOfTwo(-4000), far.upperWide().timesPowerOfTwo(-4000)));
    }

    @Property(seed = SEED, tries = TRIES)
    void isSymmetricInItsArguments(
            @ForAll long seed, @ForAll @IntRange(min = 1, max = 6) int n, @ForAll Spectrum a, @ForAll Spectrum b) {
        Exactly draw = new Exactly(seed);
        ExactMatrix x = draw.factor(n, a);
        ExactMatrix y = draw.factor(n, b);
        double t = Math.scalb(1 + draw.random().nextInt(1 << 20), -10);
        equal(
                PositivePair.of(x.asFactor(), y.asFactor()).traceMinimum(t),
                PositivePair.of(y.asFactor(), x.asFactor()).traceMinimum(t, 1));
    }

    /** |√Tr[A' ∧ B'] − √Tr[A ∧ B]| ≤ ‖X' − X‖_F + ‖Y' − Y‖_F for A = XX*, B = YY*. */
    @Property(seed = SEED, tries = TRIES)
    void itsRootIsLipschitzInTheFactors(
            @ForAll long seed,
            @ForAll @IntRange(min = 1, max = 6) int n,
            @ForAll Spectrum a,
            @ForAll Spectrum b,
            @ForAll @IntRange(min = -30, max = -2) int power) {
        Exactly draw = new Exactly(seed);
        Spectrum first = a == Spectrum.GRADED ? Spectrum.PRESCRIBED : a;
        Spectrum second = b == Spectrum.GRADED ? Spectrum.DEFICIENT : b;
        ExactMatrix x = draw.factor(n, first);
        ExactMatrix y = draw.factor(n, second);
        ExactMatrix e = draw.noise(n, x.columns(), power);
        ExactMatrix d = draw.noise(n, y.columns(), power);
        Enclosure near = minimum(x, y).sqrt();
        Enclosure moved = minimum(x.plus(e), y.plus(d)).sqrt();
        Enclosure step = norm(e).plus(norm(d));
        below(moved, near.plus(step));
        below(near, moved.plus(step));
    }

    private static Enclosure norm(ExactMatrix e) {
        return Enclosure.exact(ExactMatrix.exact(e.squares())).sqrt();
    }

    /** f(t) = Tr[A ∧ tB] is concave, and between 0 and min(Tr A, t Tr B). */
    @Property(seed = SEED, tries = TRIES)
    void theCurveIsConcaveBetweenItsBounds(
            @ForAll long seed, @ForAll @IntRange(min = 1, max = 6) int n, @ForAll Spectrum a, @ForAll Spectrum b) {
        Exactly draw = new Exactly(seed);
        ExactMatrix x = draw.factor(n, a);
        ExactMatrix y = draw.factor(n, b);
        PositivePair pair = PositivePair.of(x.asFactor(), y.asFactor());
        double t = Math.scalb(1 + draw.random().nextInt(1 << 20), -10);
        double s = Math.scalb(1 + draw.random().nextInt(1 << 20), -20);
        Enclosure ends = pair.traceMinimum(s).plus(pair.traceMinimum(t)).times(0.5);
        Enclosure middle = pair.traceMinimum((s + t) / 2);
        below(ends, middle);
        below(pair.traceMinimum(Math.min(s, t)), pair.traceMinimum(Math.max(s, t)));
        below(Enclosure.ZERO, middle);
        below(middle, traceOf(x));
        below(middle, traceOf(y).times((s + t) / 2));
    }

    private static Enclosure traceOf(ExactMatrix x) {
        double s = x.squares().doubleValue();
        return Enclosure.of(Math.nextDown(s), Math.nextUp(s));
    }

    /** The same operator by its factor and by its entries, which are exact here. */
    @Property(seed = SEED, tries = TRIES)
    void factorsAndEntriesAgree(
            @ForAll long seed, @ForAll @IntRange(min = 1, max = 6) int n, @ForAll Spectrum a, @ForAll Spectrum b) {
        Exactly draw = new Exactly(seed);
        ExactMatrix x = draw.spectralFactor(n, a == Spectrum.GRADED ? Spectrum.CLUSTERED : a);
        ExactMatrix y = draw.factor(n, b);
        PositiveOperator byEntries = x.times(x.adjoint()).asEntries();
        equal(minimum(x, y), PositivePair.of(byEntries, y.asFactor()).traceMinimum(1));
    }
}
