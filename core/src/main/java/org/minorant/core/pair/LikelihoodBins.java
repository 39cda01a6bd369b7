package org.minorant.core.pair;

import org.minorant.core.internal.number.WideDoubleDouble;

/**
 * A pair of commuting operators of which types are too many, between two pairs with eigenvalues on a grid of likelihood ratios.
 *
 * <p><b>Argument.</b> min(x, ty) is concave and homogeneous in (x, y). <i>Merging</i> eigenvalue pairs, (x, y) and (x', y') into (x + x', y + y'), raises Σ min; <i>splitting</i> one into two with the same sum
 * lowers it. Each is a stochastic map one way, so the order survives tensor products with anything. The <i>upper</i> list merges whatever falls into one bin. The <i>lower</i> list splits every pair between the two grid
 * points next to its ratio. On the grid products are convolutions. Both are exact in sum and mean, so that the loss is of second order in the width h of a bin: about h²/100 for each merger. (The idea of
 * degrading and upgrading is that of I. Tal and A. Vardy, IEEE Trans. IT 59, 6562, 2013; from memory.)
 *
 * <p>Bin i stands for k = (first + i) · stride and holds c, u, v: lower pair (c q^(−k), c q^k), upper pair (u q^(−k), v q^k), in units of 2^exponent. The numbers have a relative error of at most {@code error}: lower
 * ones are above their true value by no more, upper ones not below by more. What was dropped from the upper list has Σ √(xy) of at most {@code dropped} times that of what was kept, and adds at most √t times that to the
 * upper end, since min(x, ty) ≤ √(txy); in a product these shares add, as that sum is multiplicative and mergers raise it.
 */
final class LikelihoodBins {

    /** Numbers this far below the largest are dropped: products of two others stay above gradual underflow. */
    private static final double NEGLIGIBLE = 1e-120;

    private static final double U = 0x1p-53;

    final double q;
    final long stride;
    final long first;
    final double[] lower;
    final double[] upperX;
    final double[] upperY;
    final long exponent;
    final double error;
    final double dropped;

    LikelihoodBins(double q, long stride, long first, double[][] lists, long exponent, double error, double dropped) {
        this.q = q;
        this.stride = stride;
        this.first = first;
        this.lower = lists[0];
        this.upperX = lists[1];
        this.upperY = lists[2];
        this.exponent = exponent;
        this.error = error;
        this.dropped = dropped;
    }

    int size() {
        return lower.length;
    }

    /** The pair of as many copies as both together, on the same grid. */
    LikelihoodBins times(LikelihoodBins o, Effort effort) {
        double[][] product = {
            convolve(lower, o.lower, effort), convolve(upperX, o.upperX, effort), convolve(upperY, o.upperY, effort)
        };
        double rounding = (Math.min(size(), o.size()) + 4) * U;
        return new LikelihoodBins(
                        q,
                        stride,
                        first + o.first,
                        product,
                        exponent + o.exponent,
                        (error + o.error + rounding) * (1 + error + o.error) * (1 + 0x1p-40),
                        (dropped + o.dropped + dropped * o.dropped) * (1 + 0x1p-20))
                .settled();
    }

    /** Sums of the products of entries, smaller relative error than one rounding for each term. */
    private static double[] convolve(double[] a, double[] b, Effort effort) {
        double[] s = new double[a.length + b.length - 1];
        for (int i = 0; i < a.length; i++) {
            double x = a[i];
            if (x == 0) {
                continue;
            }
            for (int j = 0; j < b.length; j++) {
                s[i + j] += x * b[j];
            }
            if ((i & 255) == 0) {
                effort.checkpoint();
            }
        }
        return s;
    }

    /** Brings the largest number near one and drops negligible ones and bins. */
    private LikelihoodBins settled() {
        double most = 0;
        for (int i = 0; i < size(); i++) {
            most = Math.max(most, Math.max(upperX[i], upperY[i]));
        }
        int e = Math.getExponent(most);
        int from = size();
        int to = -1;
        double lost = 0;
        double[][] lists = {lower.clone(), upperX.clone(), upperY.clone()};
        for (int i = 0; i < size(); i++) {
            lists[0][i] = lower[i] < NEGLIGIBLE * most ? 0 : Math.scalb(lower[i], -e);
            double larger = Math.max(upperX[i], upperY[i]);
            boolean drop = Math.min(upperX[i], upperY[i]) < NEGLIGIBLE * most;
            lost += drop ? larger : 0;
            lists[1][i] = drop ? 0 : Math.scalb(upperX[i], -e);
            lists[2][i] = drop ? 0 : Math.scalb(upperY[i], -e);
            if (!drop || lists[0][i] > 0) {
                from = Math.min(from, i);
                to = i;
            }
        }
        int lo = Math.min(from, Math.max(to, 0));
        int hi = Math.max(to, lo);
        for (int j = 0; j < 3; j++) {
            lists[j] = java.util.Arrays.copyOfRange(lists[j], lo, hi + 1);
        }
        LikelihoodBins kept = new LikelihoodBins(q, stride, first + lo, lists, exponent + e, error, dropped);
        if (lost == 0) {
            return kept;
        }
        // √(uv) is what counts, and at most the larger
        double share = Math.scalb(lost, -e) / kept.overlap() * (1 + 0x1p-20);
        double all = (dropped * (1 + share) + share) * (1 + 0x1p-20);
        return new LikelihoodBins(q, stride, first + lo, lists, exponent + e, error, all);
    }

    /** Σ √(xy) of the upper list, in units of 2^exponent, to a relative 2^-30. */
    double overlap() {
        double s = 0;
        for (int i = 0; i < size(); i++) {
            s += Math.sqrt(upperX[i] * upperY[i]);
        }
        return s;
    }

    /** The same on grids twice as coarse, until there are at most so many bins. */
    LikelihoodBins atMost(int bins) {
        LikelihoodBins b = this;
        while (b.size() > bins) {
            b = b.coarser();
        }
        return b;
    }

    private LikelihoodBins coarser() {
        double step = Math.pow(q, stride);
        long start = Math.floorDiv(first, 2L);
        int n = (int) (Math.floorDiv(first + size(), 2L) - start) + 1;
        double[][] lists = new double[3][n];
        double half = 1 / (step + 1 / step);
        for (int i = 0; i < size(); i++) {
            long k = first + i;
            int j = (int) (Math.floorDiv(k, 2L) - start);
            if ((k & 1) == 0) {
                lists[0][j] += lower[i];
                lists[1][j] += upperX[i];
                lists[2][j] += upperY[i];
            } else {
                lists[0][j] += lower[i] * half;
                lists[0][j + 1] += lower[i] * half;
                lists[1][j] += upperX[i] / step;
                lists[2][j] += upperY[i] * step;
            }
        }
        return new LikelihoodBins(q, 2 * stride, start, lists, exponent, error + 12 * U, dropped);
    }

    /** q^k for every bin, as a table of steps from the first one, and the power at the first. */
    PowerTable steps() {
        return PowerTable.powers(Letters.wide(q).power((int) stride), 0, size() - 1);
    }

    /** q^(|first| stride), to be multiplied or divided by. */
    WideDoubleDouble firstPower() {
        return Letters.wide(q).power((int) stride).power((int) Math.abs(first));
    }
}
