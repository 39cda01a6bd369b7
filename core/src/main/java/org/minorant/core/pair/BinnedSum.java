package org.minorant.core.pair;

import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;
import org.minorant.core.internal.number.WideDoubleDouble;

/** Many copies through {@link LikelihoodBins}: the types of a few, squared until there are enough. */
final class BinnedSum {

    private static final int MOST_BINS = 1 << 14;
    private static final int LEAST_BINS = 1 << 10;
    /** So many types are put into bins one by one. */
    private static final double MOST_TYPES = 3e5;

    private static final double U = 0x1p-53;

    private final LikelihoodBins bins;

    private BinnedSum(LikelihoodBins bins) {
        this.bins = bins;
    }

    /** The bins of n copies; more of them for a smaller tolerance, which beyond 2^14 is not reached. */
    static BinnedSum of(Letters letters, int n, Effort effort) {
        return of(letters, n, effort, MOST_TYPES);
    }

    /** The same, with at most so many types put into bins one by one. */
    static BinnedSum of(Letters letters, int n, Effort effort, double mostTypes) {
        int k = letters.count();
        double least = Double.POSITIVE_INFINITY;
        double most = Double.NEGATIVE_INFINITY;
        for (int i = 0; i < k; i++) {
            double l = Letters.ln(letters.second().get(i))
                    - Letters.ln(letters.first().get(i));
            least = Math.min(least, l);
            most = Math.max(most, l);
        }
        // the loss is about (n range)²/(50 bins²)
        double wanted = n * (most - least) / Math.sqrt(50 * effort.tolerance());
        int count = LEAST_BINS;
        while (count < MOST_BINS && count < wanted) {
            count *= 2;
        }
        int shift = 0;
        while (types(n >> shift, k) > mostTypes) {
            shift++;
        }
        int m = n >> shift;
        double width = Math.max(m * (most - least) / count, 1e-9);
        double q = Math.exp(width / 2);
        LikelihoodBins b = TypeBins.of(letters, m, q, 1);
        for (int s = shift - 1; s >= 0; s--) {
            b = b.atMost(count);
            b = b.times(b, effort);
            if ((n >> s & 1) == 1) {
                b = b.times(TypeBins.of(letters, 1, q, b.stride), effort);
            }
            effort.listener().onProgress(shift - s, shift);
        }
        return new BinnedSum(b);
    }

    private static double types(int n, int k) {
        double all = 1;
        for (int i = 1; i < k; i++) {
            all *= (n + i) / (double) i;
        }
        return all;
    }

    /** The bins. */
    LikelihoodBins bins() {
        return bins;
    }

    /** Encloses Σ min(wa x, wb y), about 2^scale in size. */
    Enclosure sum(WideDouble wa, WideDouble wb, long scale) {
        PowerTable steps = bins.steps();
        WideDoubleDouble first = bins.firstPower();
        boolean negative = bins.first < 0;
        double s = first.significand().hi();
        long e = first.exponent();
        CarefulSum low = new CarefulSum();
        CarefulSum high = new CarefulSum();
        for (int i = 0; i < bins.size(); i++) {
            // q^k at this bin: p 2^ep
            double p = negative ? steps.significand[i] / s : steps.significand[i] * s;
            long ep = steps.exponent[i] + (negative ? -e : e);
            long ex = bins.exponent + wa.exponent() - ep - scale;
            long ey = bins.exponent + wb.exponent() + ep - scale;
            double x = wa.significand() / p;
            double y = wb.significand() * p;
            low.add(Math.min(scaled(bins.lower[i] * x, ex), scaled(bins.lower[i] * y, ey)));
            high.add(Math.min(scaled(bins.upperX[i] * x, ex), scaled(bins.upperY[i] * y, ey)));
        }
        double error = bins.error + 12 * U;
        if (!(low.value() < Double.POSITIVE_INFINITY && bins.overlap() * bins.dropped < Double.POSITIVE_INFINITY)) {
            // so many copies that bins say nothing
            return Enclosure.of(WideDouble.ZERO, WideDouble.POSITIVE_INFINITY);
        }
        WideDouble lower = WideDouble.of(Math.max(0, low.value() * (1 - error)), scale);
        double lnRest = Math.log(bins.overlap() * bins.dropped)
                + bins.exponent * Math.log(2)
                + 0.5 * (Math.log(wa.significand()) + Math.log(wb.significand()))
                + 0.5 * (wa.exponent() + wb.exponent()) * Math.log(2)
                + 1e-3;
        WideDouble upper =
                WideDouble.of(high.value() * (1 + error) + 0x1p-860, scale).plusUp(WideDouble.expUp(lnRest));
        return Enclosure.of(lower, upper);
    }

    /** Numbers of any size below 2^900; far larger than the sum is as good as that. */
    private static double scaled(double v, long e) {
        return v == 0 ? 0 : TypeBox.scaled(v, e);
    }
}
