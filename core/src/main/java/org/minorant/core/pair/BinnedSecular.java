package org.minorant.core.pair;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;
import org.minorant.core.internal.number.WideDoubleDouble;

/**
 * Copies of a vector against an operator through {@link LikelihoodBins}. Every term w tb/(λ + tb) of the secular equation is x·ty/(λx + ty) with x = w, y = wb: concave and homogeneous in (x, y), so that the lower list gives
 * less and the upper list more, for every λ, and so do the roots f of δ = g(δ).
 *
 * <p>For f beyond a/2: what the lower list lacks of a counts as kernel, which can only lower g; what the upper list lacks is a cut of the vector, by which √f moves at most by its length.
 */
final class BinnedSecular {

    private static final double U = 0x1p-53;

    private final LikelihoodBins bins;
    private final SpectralPoints lower;
    private final SpectralPoints upper;
    private final Enclosure lowerSum;
    private final Enclosure upperSum;
    private final Effort effort;

    private BinnedSecular(LikelihoodBins bins, Effort effort) {
        this.bins = bins;
        this.effort = effort;
        PowerTable steps = bins.steps();
        WideDoubleDouble start = bins.firstPower();
        boolean negative = bins.first < 0;
        double s = start.significand().hi();
        long e = start.exponent();
        WideArray[] list = new WideArray[4];
        for (int j = 0; j < 4; j++) {
            list[j] = new WideArray(bins.size());
        }
        for (int i = 0; i < bins.size(); i++) {
            // q^k at this bin: p 2^ep
            double p = negative ? steps.significand[i] / s : steps.significand[i] * s;
            long ep = steps.exponent[i] + (negative ? -e : e);
            if (bins.lower[i] > 0) {
                add(list[0], bins.lower[i] / p, bins.exponent - ep);
                add(list[1], p * p, 2 * ep);
            }
            if (bins.upperX[i] > 0) {
                add(list[2], bins.upperX[i] / p, bins.exponent - ep);
                add(list[3], bins.upperY[i] / bins.upperX[i] * (p * p), 2 * ep);
            }
        }
        double error = bins.error + 8 * U;
        lower = new SpectralPoints(list[0], list[1], Enclosure.ZERO, Enclosure.ZERO, error, 8 * U);
        upper = new SpectralPoints(list[2], list[3], Enclosure.ZERO, Enclosure.ZERO, error, 2 * error);
        lowerSum = sum(lower);
        upperSum = sum(upper);
    }

    /** The bins of n copies of a measure. */
    static BinnedSecular of(SpectralMeasure m, int n, Effort effort) {
        List<WideDoubleDouble> product = new ArrayList<>();
        for (int i = 0; i < m.weights().size(); i++) {
            product.add(m.weights().get(i).times(m.values().get(i)));
        }
        Letters letters = new Letters(m.weights(), product, m.weightError() + m.valueError() + 0x1p-100);
        return new BinnedSecular(BinnedSum.of(letters, n, effort).bins(), effort);
    }

    private static void add(WideArray a, double v, long e) {
        int k = Math.getExponent(v);
        a.add(Math.scalb(v, -k), e + k);
    }

    private static Enclosure sum(SpectralPoints p) {
        Enclosure s = Enclosure.ZERO;
        for (int i = 0; i < p.weights().size(); i++) {
            WideDouble w = WideDouble.of(p.weights().significand(i), p.weights().exponent(i));
            s = s.plus(Enclosure.of(w, w));
        }
        return s.times(Enclosure.of(1 - 2 * p.weightError(), 1 + 2 * p.weightError()));
    }

    /** Encloses f for the weight t, of relative error off, on the operator. */
    Enclosure value(WideDouble t, Enclosure total, Enclosure kernel, double off) {
        SpectralPoints low = lower.withTotal(total, total.minus(lowerSum).max(Enclosure.ZERO), off);
        SpectralPoints high = upper.withTotal(total, kernel, off);
        Optional<Enclosure> least = new FixedPointForm(low, t, WideDouble.ZERO, effort).solve();
        Optional<Enclosure> most = new FixedPointForm(high, t, dropped(t, total), effort).solve();
        WideDouble lowest = least.orElseGet(() -> new EigenvalueForm(low, t, effort).solve())
                .lowerWide();
        WideDouble highest = most.map(Enclosure::upperWide).orElseGet(() -> {
            Enclosure kept = upperSum.plus(kernel);
            WideDouble cut = total.upperWide().plusUp(kept.lowerWide().negate()).max(WideDouble.ZERO);
            Enclosure f = new EigenvalueForm(upper.withTotal(kept, kernel, off), t, effort).solve();
            Enclosure root = f.sqrt().plus(Enclosure.of(WideDouble.ZERO, cut.sqrtUp()));
            return root.square().upperWide();
        });
        WideDouble upperEnd = highest.min(total.upperWide());
        return Enclosure.of(lowest.min(upperEnd), upperEnd);
    }

    /** What was dropped adds at most Σ min(x, 4ty/a) ≤ 2 √(t/a) Σ √(xy) to g for λ ≥ a/4. */
    private WideDouble dropped(WideDouble t, Enclosure total) {
        if (bins.dropped == 0) {
            return WideDouble.ZERO;
        }
        double share = bins.overlap() * bins.dropped * (1 + 0x1p-20);
        return t.dividedByUp(total.lowerWide())
                .sqrtUp()
                .timesUp(WideDouble.of(2 * share))
                .timesPowerOfTwo(bins.exponent);
    }
}
