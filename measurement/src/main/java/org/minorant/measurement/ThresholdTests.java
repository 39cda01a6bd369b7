package org.minorant.measurement;

import java.util.Arrays;
import org.minorant.core.DensityOperator;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.EnclosedSpectrum;
import org.minorant.core.HermitianOperator;
import org.minorant.core.SpectralDecomposition;
import org.minorant.core.WideDouble;
import org.minorant.core.curve.Supremum;

/**
 * Explicit tests between two states: projectors onto the positive part of aρ − bσ, and mixtures of two of them.
 *
 * <p>Nothing here needs to be certified: {@link BinaryTest} evaluates what was stored. By duality a mixture of two threshold tests with type-I error
 * exactly ε exceeds β_ε by at most the product of the distances of their thresholds and of their type-I errors, so that it is optimal once either
 * is small; a kernel at the threshold need not be recognised.
 */
final class ThresholdTests {

    private static final int MOST_STEPS = 40;

    /** Up to this dimension eigenvectors are worked out to 30 digits, so that the entries are rounded but once; above, in double. */
    private static final int FINE = 48;

    /** A type-II error this near the least is what entries stored in doubles can attain. */
    private static final double ATTAINED = 0x1p-51;

    private static final int MOST_CORRECTIONS = 60;

    private final DensityOperator first;
    private final DensityOperator second;

    ThresholdTests(DensityOperator first, DensityOperator second) {
        this.first = first;
        this.second = second;
    }

    BinaryTest helstrom(double prior) {
        if (prior == 0 || prior == 1) {
            return BinaryTest.of(constant(prior), first, second);
        }
        return BinaryTest.of(projector(prior, 1 - prior), first, second);
    }

    private HermitianOperator constant(double weight) {
        return HermitianOperator.identity(first.dimension()).times(weight);
    }

    /** The projector onto the positive part of aρ − bσ. */
    private HermitianOperator projector(double a, double b) {
        EnclosedMatrix difference = EnclosedMatrix.of(first)
                .times(a)
                .minus(EnclosedMatrix.of(second).times(b));
        int n = first.dimension();
        double[] values = new double[n];
        EnclosedMatrix vectors;
        if (n <= FINE) {
            EnclosedSpectrum s = EnclosedSpectrum.of(difference.midpoint());
            Arrays.setAll(values, s::value);
            vectors = s.vectors();
        } else {
            SpectralDecomposition s = Projectors.hermitian(difference).spectralDecomposition();
            values = s.eigenvalues();
            vectors = EnclosedMatrix.of(s.vectors());
        }
        int k = 0;
        while (k < n && values[k] <= 0) {
            k++;
        }
        return k == n ? constant(0) : k == 0 ? constant(1) : Projectors.onto(vectors, k, n);
    }

    /** The projector at the threshold t, scaled so that neither weight is far above one. */
    private Threshold at(WideDouble t) {
        boolean large = t.compareTo(WideDouble.ONE) > 0;
        double a = large ? 1 : t.toDoubleUp();
        double b = large ? WideDouble.ONE.dividedByUp(t).toDoubleUp() : 1;
        return new Threshold(t, BinaryTest.of(projector(a, b), first, second));
    }

    /** A test with the t it belongs to. */
    private record Threshold(WideDouble t, BinaryTest test) {

        double typeOne() {
            return test.typeOneError().midpoint();
        }

        double typeTwo() {
            return test.typeTwoError().midpoint();
        }
    }

    /** The test at a level, from what is known of β and of the t that attains it. */
    BinaryTest neymanPearson(double level, Supremum best) {
        BinaryTest never = BinaryTest.of(constant(0), first, second);
        if (never.typeOneError().upper() <= level) {
            return never;
        }
        if (level == 0) {
            return certain();
        }
        Threshold lo = new Threshold(WideDouble.ZERO, never);
        // no maximiser lies beyond t = Tr σ/ε; there the test that always accepts stands for all others
        WideDouble end = second.traceEnclosure().upperWide().dividedByUp(WideDouble.of(level));
        Threshold hi = new Threshold(end, BinaryTest.of(constant(1), first, second));
        WideDouble[] guesses = {
            best.to(),
            best.from(),
            best.to().timesUp(WideDouble.of(1 + 0x1p-20)),
            best.from().timesDown(WideDouble.of(1 - 0x1p-20))
        };
        for (int step = 0; step < MOST_STEPS && excess(lo, hi, level, best) > ATTAINED; step++) {
            WideDouble t = step < guesses.length ? guesses[step] : between(lo, hi, level, step);
            if (t.compareTo(lo.t()) <= 0 || t.compareTo(hi.t()) >= 0) {
                if (step >= guesses.length) {
                    break;
                }
                continue;
            }
            Threshold m = at(t);
            if (m.typeOne() > level) {
                lo = m;
            } else {
                hi = m;
            }
        }
        return mixed(lo, hi, level);
    }

    /** At level zero: the projector onto the support of the first state if it certifies, else acceptance. */
    private BinaryTest certain() {
        BinaryTest support = BinaryTest.of(projector(1, 0), first, second);
        return support.typeOneError().upper() <= 0 ? support : BinaryTest.of(constant(1), first, second);
    }

    /** How much the mixture of two tests exceeds the least type-II error. */
    private static double excess(Threshold lo, Threshold hi, double level, Supremum best) {
        double w = weight(lo, hi, level);
        double excess = w * hi.typeTwo() + (1 - w) * lo.typeTwo() - best.value().upper();
        double byDuality = difference(hi.t(), lo.t()) * (lo.typeOne() - hi.typeOne()) / 4;
        return Math.min(excess, byDuality);
    }

    private static double difference(WideDouble a, WideDouble b) {
        return a.plusUp(b.negate()).toDoubleUp();
    }

    /** The weight of hi in the mixture with the given type-I error. */
    private static double weight(Threshold lo, Threshold hi, double level) {
        double w = (lo.typeOne() - level) / (lo.typeOne() - hi.typeOne());
        return w >= 0 && w <= 1 ? w : 1;
    }

    /** A threshold between two: by the chord of the type-I errors and by bisection of the exponents, in turn. */
    private static WideDouble between(Threshold lo, Threshold hi, double level, int step) {
        if (lo.t().signum() == 0) {
            return hi.t().timesPowerOfTwo(-8);
        }
        WideDouble ratio = hi.t().dividedByUp(lo.t());
        double share = step % 2 == 0 ? weight(lo, hi, level) : 0.5;
        return lo.t().timesUp(WideDouble.expUp(ratio.lnUp() * share));
    }

    /** The mixture whose stored entries certify the level. */
    private BinaryTest mixed(Threshold lo, Threshold hi, double level) {
        double target = level;
        double step = 0;
        for (int k = 0; k < MOST_CORRECTIONS && target > 0; k++) {
            double w = weight(lo, hi, target);
            BinaryTest t = BinaryTest.of(mixture(lo.test(), hi.test(), w), first, second);
            double over = t.typeOneError().upper() - level;
            if (over <= 0) {
                return t;
            }
            if (w == 1) {
                break;
            }
            step = Math.max(2 * step, over);
            target = Math.min(target, level) - step;
        }
        return towardsAcceptance(hi.test(), level);
    }

    /** Mixes with the test that always accepts, as little as the level asks for. */
    private BinaryTest towardsAcceptance(BinaryTest test, double level) {
        BinaryTest always = BinaryTest.of(constant(1), first, second);
        double keep = Math.min(1, level / test.typeOneError().upper());
        for (double shrink = 0x1p-50; keep > 0x1p-53; keep *= 1 - shrink, shrink = Math.min(0.5, 4 * shrink)) {
            BinaryTest t = BinaryTest.of(mixture(test, always, 1 - keep), first, second);
            if (t.typeOneError().upper() <= level) {
                return t;
            }
        }
        return always;
    }

    private static HermitianOperator mixture(BinaryTest a, BinaryTest b, double weightOfB) {
        if (weightOfB == 0 || weightOfB == 1) {
            return weightOfB == 0 ? a.operator() : b.operator();
        }
        return a.operator().times(1 - weightOfB).plus(b.operator().times(weightOfB));
    }
}
