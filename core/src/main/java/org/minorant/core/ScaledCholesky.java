package org.minorant.core;

import java.util.Arrays;
import java.util.Comparator;
import java.util.stream.IntStream;

/**
 * Cholesky factorisation A ≈ LL* in double-double with a certified relative error in the Loewner order.
 *
 * <p><b>Argument.</b> Let D be the diagonal matrix of powers of two near √a_ii and write A = D H D, L = D M. With E = A − LL* known
 * entry by entry, ‖D⁻¹ED⁻¹‖ ≤ ε, and ‖M⁻¹‖ ≤ κ, every vector w obeys |⟨w,Ew⟩| ≤ ε‖Dw‖² ≤ εκ²‖M*Dw‖² = εκ²⟨w,LL*w⟩, so
 * (1 − εκ²) LL* ≤ A ≤ (1 + εκ²) LL*. The condition number of H matters, not that of A: a graded matrix keeps the relative accuracy of
 * its small eigenvalues (Demmel and Veselić, SIAM J. Matrix Anal. Appl. 13, 1204, 1992). κ comes from an approximate inverse W of M:
 * ‖M⁻¹‖ ≤ ‖W‖/(1 − ‖1 − WM‖).
 *
 * <p><b>Order.</b> Rows are taken by decreasing diagonal, and put back afterwards: L is lower triangular in that order only. What holds above holds in any order, but the
 * columns of L are well-conditioned up to their lengths only in this one.
 */
record ScaledCholesky(EnclosedMatrix factor, double relativeError) {

    private static final ScaledCholesky FAILED =
            new ScaledCholesky(EnclosedMatrix.identity(1), Double.POSITIVE_INFINITY);

    static ScaledCholesky of(EnclosedMatrix a) {
        int n = a.rows();
        int[] power = new int[n];
        EnclosedMatrix.Builder h = EnclosedMatrix.builder(n, n);
        for (int i = 0; i < n; i++) {
            if (!(a.re(i, i) > Double.MIN_NORMAL)) {
                return FAILED;
            }
            power[i] = Math.getExponent(a.re(i, i)) / 2;
        }
        int[] order = heaviestFirst(power);
        int[] shift = Arrays.stream(order).map(i -> power[i]).toArray();
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                int e = -shift[i] - shift[j];
                int p = order[i];
                int q = order[j];
                h.set(
                        i,
                        j,
                        Math.scalb(a.re(p, q), e),
                        Math.scalb(a.reTail(p, q), e),
                        Math.scalb(a.im(p, q), e),
                        Math.scalb(a.imTail(p, q), e),
                        Math.scalb(a.radius(p, q), e) + underflow(a, p, q, e));
            }
        }
        EnclosedMatrix scaled = h.build();
        DdCholesky m = new DdCholesky(scaled);
        if (!m.run()) {
            return FAILED;
        }
        EnclosedMatrix lower = m.factor(new int[n], IntStream.range(0, n).toArray());
        double epsilon = scaled.minus(lower.times(lower.adjoint())).frobeniusUpper();
        double kappa = inverseNorm(lower);
        double eta = epsilon * kappa * kappa * (1 + 0x1p-40);
        return new ScaledCholesky(m.factor(shift, order), eta < 1 ? eta : Double.POSITIVE_INFINITY);
    }

    /** The indices by decreasing power: light columns then lie in light rows, and are not nearly parallel to heavy ones. */
    private static int[] heaviestFirst(int[] power) {
        return IntStream.range(0, power.length)
                .boxed()
                .sorted(Comparator.comparingInt(i -> -power[i]))
                .mapToInt(Integer::intValue)
                .toArray();
    }

    /** What scaling by a power of two loses when a result is subnormal. */
    private static double underflow(EnclosedMatrix a, int i, int j, int e) {
        boolean exact = survives(a.re(i, j), e)
                && survives(a.reTail(i, j), e)
                && survives(a.im(i, j), e)
                && survives(a.imTail(i, j), e)
                && survives(a.radius(i, j), e);
        return exact ? 0 : 0x1p-1070;
    }

    private static boolean survives(double v, int e) {
        return Math.scalb(Math.scalb(v, e), -e) == v;
    }

    /** A bound on the norm of the inverse of a lower triangular matrix; infinite if it cannot be had. */
    private static double inverseNorm(EnclosedMatrix m) {
        int n = m.rows();
        EnclosedMatrix.Builder w = EnclosedMatrix.builder(n, n);
        for (int c = 0; c < n; c++) {
            double[] x = new double[n];
            double[] y = new double[n];
            for (int i = c; i < n; i++) {
                double p = i == c ? 1 : 0;
                double q = 0;
                for (int k = c; k < i; k++) {
                    p -= m.re(i, k) * x[k] - m.im(i, k) * y[k];
                    q -= m.re(i, k) * y[k] + m.im(i, k) * x[k];
                }
                x[i] = p / m.re(i, i);
                y[i] = q / m.re(i, i);
                w.set(i, c, x[i], 0, y[i], 0, 0);
            }
        }
        EnclosedMatrix inverse = w.build();
        double rest = inverse.times(m).minus(EnclosedMatrix.identity(n)).frobeniusUpper();
        return rest < 0.5 ? inverse.frobeniusUpper() / (1 - rest) * (1 + 0x1p-50) : Double.POSITIVE_INFINITY;
    }
}
