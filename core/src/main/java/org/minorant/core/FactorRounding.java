package org.minorant.core;

import java.util.OptionalDouble;
import org.minorant.core.internal.door.LinearSolve;

/**
 * What an error of the columns of a factor does to the operator.
 *
 * <p><b>Columns that span the space.</b> Let Z = DM with D diagonal (powers of two) and M square and invertible, and let the true factor be Z + DF. Then
 * ‖F*Dw‖ ≤ ‖F‖‖M⁻¹‖‖M*Dw‖ for every w, so ⟨w,Aw⟩^½ is within a factor 1 ± θ of ‖Z*w‖ with θ = ‖F‖‖M⁻¹‖: a relative error 2θ + θ² only. Rows that vanish
 * exactly are left out of M. (The same argument as in {@link ScaledCholesky}.)
 *
 * <p><b>All others.</b> For every τ &gt; 0, (X+E)(X+E)* ≤ (1+τ)XX* + (1+1/τ)EE*, and with X and X+E exchanged and −E for E the same holds the other way
 * round. So the true operator is in the sandwich of X with relative error τ and trace error (1+1/τ)‖E‖²_F: the error of the columns
 * enters squared, 2^-100 in the columns is 2^-140 in the trace. A relative error alone will not do there, since rounding turns the range.
 */
final class FactorRounding {

    /** τ: so far below the accuracy of a double that nobody sees a sum of hundreds. */
    private static final double RELATIVE = 0x1p-60;

    /** A relative error above this is not worth having instead. */
    private static final double WORTH = 1e-13;

    private FactorRounding() {}

    /** A factor whose entries are known up to their radii. */
    static PositiveFactor ofRadii(EnclosedMatrix columns) {
        EnclosedMatrix midpoint = columns.midpoint();
        double frobenius = columns.minus(midpoint).frobeniusUpper();
        if (frobenius == 0) {
            return new PositiveFactor(midpoint, 0, 0);
        }
        OptionalDouble theta = conditioned(columns);
        if (theta.isPresent()) {
            double t = theta.getAsDouble();
            return new PositiveFactor(midpoint, (2 * t + t * t) * (1 + 0x1p-50), 0);
        }
        double trace = (1 + 1 / RELATIVE) * frobenius * frobenius * (1 + 0x1p-48) + Double.MIN_VALUE;
        return new PositiveFactor(midpoint, RELATIVE, trace);
    }

    /** A factor whose entries have a relative error in modulus of at most the given one, or 2^-1070 where they underflow. */
    static PositiveFactor entrywise(EnclosedMatrix columns, double relative) {
        EnclosedMatrix.Builder b = EnclosedMatrix.builder(columns.rows(), columns.columns());
        for (int i = 0; i < columns.rows(); i++) {
            for (int j = 0; j < columns.columns(); j++) {
                b.set(
                        i,
                        j,
                        columns.re(i, j),
                        columns.reTail(i, j),
                        columns.im(i, j),
                        columns.imTail(i, j),
                        columns.modulusUpper(i, j) * relative + 0x1p-1070);
            }
        }
        return ofRadii(b.build());
    }

    /** θ for columns that span the space of the rows that do not vanish; empty if they do not, or θ is too large to be worth having. */
    private static OptionalDouble conditioned(EnclosedMatrix z) {
        int n = z.columns();
        int[] rows = new int[n];
        int[] shift = new int[n];
        int r = 0;
        for (int i = 0; i < z.rows(); i++) {
            double most = 0;
            for (int j = 0; j < n; j++) {
                most = Math.max(most, z.modulusUpper(i, j));
            }
            if (most > 0) {
                if (r == n) {
                    return OptionalDouble.empty();
                }
                shift[r] = -Math.getExponent(most);
                rows[r++] = i;
            }
        }
        if (r < n) {
            return OptionalDouble.empty();
        }
        EnclosedMatrix.Builder m = EnclosedMatrix.builder(n, n);
        EnclosedMatrix.Builder f = EnclosedMatrix.builder(n, n);
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                int k = rows[i];
                int e = shift[i];
                m.set(
                        i,
                        j,
                        Math.scalb(z.re(k, j), e),
                        Math.scalb(z.reTail(k, j), e),
                        Math.scalb(z.im(k, j), e),
                        Math.scalb(z.imTail(k, j), e),
                        0x1p-1060);
                f.set(i, j, 0, 0, 0, 0, Math.scalb(z.radius(k, j), e) + 0x1p-1060);
            }
        }
        double theta = f.build().frobeniusUpper() * inverseNorm(m.build()) * (1 + 0x1p-50);
        return theta <= WORTH ? OptionalDouble.of(theta) : OptionalDouble.empty();
    }

    /** A bound on ‖M⁻¹‖, from an approximate inverse W: ‖M⁻¹‖ ≤ ‖W‖/(1 − ‖1 − WM‖); infinite if it cannot be had. */
    private static double inverseNorm(EnclosedMatrix m) {
        int n = m.rows();
        double[][] ar = new double[n][n];
        double[][] ai = new double[n][n];
        double[][] wr = new double[n][n];
        double[][] wi = new double[n][n];
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                ar[i][j] = m.re(i, j);
                ai[i][j] = m.im(i, j);
            }
            wr[i][i] = 1;
        }
        LinearSolve.solve(ar, ai, wr, wi);
        EnclosedMatrix.Builder b = EnclosedMatrix.builder(n, n);
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                b.set(i, j, wr[i][j], 0, wi[i][j], 0, 0);
            }
        }
        EnclosedMatrix w = b.build();
        double rest = w.times(m).minus(EnclosedMatrix.identity(n)).frobeniusUpper();
        return rest < 0.5 ? w.frobeniusUpper() / (1 - rest) * (1 + 0x1p-50) : Double.POSITIVE_INFINITY;
    }
}
