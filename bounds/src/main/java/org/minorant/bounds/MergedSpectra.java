package org.minorant.bounds;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.stream.IntStream;
import org.minorant.core.pair.PositivePair;

/**
 * Two commuting operators, eigenvalues of nearly equal ratio a/b merged, in falling order of the ratio. Eigenvalues where one of the two is zero add nothing to a trace minimum, in any power, and are left
 * out.
 *
 * <p><b>Error.</b> For equal ratios min(a, tb) + min(a', tb') = min(a + a', t(b + b')), in every power. In a group, b is changed to a · Σb/Σa; the latter ratio lies
 * between those of the group, so each b changes by their spread at most, relatively. With the rounding of the sums, the operators given are within 1 ± error of ones that merge exactly into these.
 *
 * @param a sums of eigenvalues of A
 * @param b sums of eigenvalues of B
 * @param error the relative error e
 */
record MergedSpectra(double[] a, double[] b, double error) {

    /** Ratios closer than this, relatively, are taken for equal: they differ by the rounding of the data. */
    private static final double CLOSE = 0x1p-49;

    private static final double U = 0x1p-53;

    static MergedSpectra of(double[] a, double[] b) {
        List<Integer> order = IntStream.range(0, a.length)
                .filter(i -> a[i] > 0 && b[i] > 0)
                .boxed()
                .sorted(Comparator.comparingDouble((Integer i) -> -a[i] / b[i]))
                .toList();
        List<double[]> groups = new ArrayList<>();
        double first = Double.NaN;
        double error = 0;
        int members = 1;
        for (int i : order) {
            double ratio = a[i] / b[i];
            // ratios beyond the range of doubles stay alone
            boolean joins =
                    first < Double.POSITIVE_INFINITY && ratio > Double.MIN_NORMAL && first - ratio <= CLOSE * first;
            if (joins) {
                double[] g = groups.get(groups.size() - 1);
                g[0] += a[i];
                g[1] += b[i];
                members++;
                error = Math.max(error, (first - ratio) / first * (1 + 0x1p-40) + (members + 8) * 2 * U);
            } else {
                groups.add(new double[] {a[i], b[i]});
                first = ratio;
                members = 1;
            }
        }
        if (groups.isEmpty()) {
            groups.add(new double[] {0, 0});
        }
        return new MergedSpectra(
                groups.stream().mapToDouble(g -> g[0]).toArray(),
                groups.stream().mapToDouble(g -> g[1]).toArray(),
                error);
    }

    /**
     * A bound on the relative error of taking these operators for others, eigenvalue by eigenvalue; infinite if their numbers differ.
     *
     * @param other other operators, merged
     */
    double distance(MergedSpectra other) {
        if (a.length != other.a.length) {
            return Double.POSITIVE_INFINITY;
        }
        double e = 0;
        for (int i = 0; i < a.length; i++) {
            e = Math.max(e, Math.max(relative(a[i], other.a[i]), relative(b[i], other.b[i])));
        }
        return e;
    }

    private static double relative(double x, double y) {
        return x == y ? 0 : Math.abs(x - y) / Math.min(x, y) * (1 + 0x1p-40);
    }

    PositivePair copies(int n) {
        return PositivePair.ofSpectra(a, b).copies(n);
    }
}
