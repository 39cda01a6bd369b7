package org.minorant.core;

import org.minorant.core.internal.message.Checks;

/**
 * Projections onto Hermitian operators, positive ones and states.
 *
 * <p>All three sets are convex and closed under unitaries, so the projection in Hilbert–Schmidt norm keeps eigenvectors and moves the spectrum to
 * the nearest admissible one: the positive part, or the nearest point of the simplex, max(λ − θ, 0) with θ such that the sum is one.
 */
final class Repairs {

    private Repairs() {}

    static Repaired<HermitianOperator> hermitian(Operator a) {
        Checks.square("HermitianOperator.nearest", a);
        HermitianOperator h = HermitianPart.nearest(a);
        double moved = distance(a, h);
        return new Repaired<>(h, moved, 0, h.trace().re(), moved);
    }

    static Repaired<PositiveOperator> positive(Operator a) {
        Checks.square("PositiveOperator.nearest", a);
        HermitianOperator h = HermitianPart.nearest(a);
        SpectralDecomposition s = SpectralDecomposition.of(h);
        double[] y = s.eigenvalues();
        double negative = cut(y);
        PositiveOperator p = s.positive(y);
        return new Repaired<>(p, distance(a, h), negative, h.trace().re(), distance(a, p));
    }

    static Repaired<DensityOperator> state(Operator a, StateRepair how) {
        Checks.square("DensityOperator.nearest", a);
        HermitianOperator h = HermitianPart.nearest(a);
        SpectralDecomposition s = SpectralDecomposition.of(h);
        double[] values = s.eigenvalues();
        double[] y = values.clone();
        double negative = cut(y);
        if (how == StateRepair.NEAREST) {
            y = simplex(values);
        } else {
            normalise(y);
        }
        DensityOperator d = ofTraceOne(s, y);
        return new Repaired<>(d, distance(a, h), negative, h.trace().re(), distance(a, d));
    }

    /** Sets negative numbers to zero and returns the sum of what was removed. */
    private static double cut(double[] y) {
        double negative = 0;
        for (int i = 0; i < y.length; i++) {
            if (y[i] < 0) {
                negative -= y[i];
                y[i] = 0;
            }
        }
        return negative;
    }

    private static void normalise(double[] y) {
        double sum = 0;
        for (double v : y) {
            sum += v;
        }
        if (!(sum > 0) || Double.isInfinite(sum)) {
            throw new InvalidInputException(
                    "DensityOperator.nearest",
                    "the positive part has trace " + sum,
                    "a positive finite trace",
                    "rescale, or use StateRepair.NEAREST, which needs none");
        }
        for (int i = 0; i < y.length; i++) {
            y[i] /= sum;
        }
    }

    /** The nearest point of the simplex to ascending numbers (Held, Wolfe and Crowder, Math. Programming 6, 62, 1974; from memory). */
    private static double[] simplex(double[] ascending) {
        int n = ascending.length;
        double top = ascending[n - 1];
        double sum = 0;
        double theta = 0;
        // relative to the largest, so that large common parts cancel at once
        for (int k = 1; k <= n; k++) {
            double v = ascending[n - k] - top;
            double candidate = (sum + v - 1) / k;
            if (v <= candidate) {
                break;
            }
            sum += v;
            theta = candidate;
        }
        double[] y = new double[n];
        for (int i = 0; i < n; i++) {
            y[i] = Math.max(0, ascending[i] - top - theta);
        }
        return y;
    }

    /** The state with this spectrum in the vectors found, divided by the trace that rounding gave it. */
    private static DensityOperator ofTraceOne(SpectralDecomposition s, double[] y) {
        PositiveOperator p = s.positive(y);
        double trace = p.trace().re();
        if (Math.abs(trace - 1) > 0x1p-52) {
            p = p.times(1 / trace);
        }
        return DensityOperator.of(p);
    }

    private static double distance(Operator a, Operator b) {
        double s = 0;
        double most = 0;
        int n = a.rows();
        for (int pass = 0; pass < 2; pass++) {
            for (int i = 0; i < n; i++) {
                for (int j = 0; j < n; j++) {
                    double m = Math.hypot(a.re(i, j) - b.re(i, j), a.im(i, j) - b.im(i, j));
                    if (pass == 0) {
                        most = Math.max(most, m);
                    } else {
                        s += (m / most) * (m / most);
                    }
                }
            }
            if (most == 0) {
                return 0;
            }
        }
        return Math.sqrt(s) * most;
    }
}
