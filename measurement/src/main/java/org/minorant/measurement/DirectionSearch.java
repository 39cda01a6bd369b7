package org.minorant.measurement;

import org.minorant.core.Complex;
import org.minorant.core.DensityOperator;
import org.minorant.core.WideDouble;
import org.minorant.core.pair.PositivePair;

/**
 * Looks for the direction m in the plane of two Bloch vectors r and s in which measuring n copies one by one errs least. A search in plain double: what comes of the direction is certified elsewhere.
 *
 * <p>m = cos φ e₁ + sin φ e₂ with e₁ along r − s, the best direction for one copy and equal priors. φ is taken on a grid over half a turn, as opposite directions are the same measurement, then on ever finer grids around the
 * best place. Both Bloch vectors are tried besides.
 */
final class DirectionSearch {

    /** A first grid that a narrow valley would have to be very narrow to hide in. */
    private static final int GRID = 48;

    private static final int FINER = 4;

    /** Bloch vectors this close to the sphere are on it, up to rounding. */
    private static final double PURE = 0x1p-50;

    /** Each round narrows the grid 8 times: down to π/48 · 8^-8, which the flat minimum turns into n · 1e-17. */
    private static final int ROUNDS = 8;

    private final double[] r;
    private final double[] s;
    private final double[] e1;
    private final double[] e2;
    private final int n;
    private final double prior;

    DirectionSearch(DensityOperator first, DensityOperator second, int n, double prior) {
        this.r = bloch(first);
        this.s = bloch(second);
        this.n = n;
        this.prior = prior;
        double[] difference = plus(r, s, -1);
        double[] along = norm(difference) > 0 ? difference : norm(r) > 0 ? r : new double[] {0, 0, 1};
        this.e1 = unit(along);
        double[] sum = plus(r, s, 1);
        double[] across = plus(sum, e1, -dot(sum, e1));
        // states on one line commute, and their line is the best direction
        this.e2 = norm(across) > 1e-15 ? unit(across) : new double[3];
    }

    private static double[] bloch(DensityOperator a) {
        return new double[] {2 * a.re(1, 0), 2 * a.im(1, 0), a.re(0, 0) - a.re(1, 1)};
    }

    /** The ket of the direction found. */
    Complex[] ket() {
        double best = 0;
        double least = lnError(0);
        double[] tried = new double[GRID + 2];
        // valleys around eigenvectors are narrow for nearly pure states, and points for kets
        tried[0] = angle(r);
        tried[1] = angle(s);
        for (int k = 0; k < GRID; k++) {
            tried[k + 2] = Math.PI * (k - GRID / 2) / GRID;
        }
        for (double x : tried) {
            double v = lnError(x);
            if (v < least) {
                least = v;
                best = x;
            }
        }
        double step = Math.PI / GRID;
        for (int round = 0; round < ROUNDS; round++) {
            double middle = best;
            step /= FINER * 2;
            for (int k = -2 * FINER; k <= 2 * FINER; k++) {
                double v = lnError(middle + k * step);
                if (v < least) {
                    least = v;
                    best = middle + k * step;
                }
            }
        }
        return ket(direction(best));
    }

    private double angle(double[] own) {
        return StrictMath.atan2(dot(own, e2), dot(own, e1));
    }

    /** The direction; of a Bloch vector itself without the rounding of its angle. */
    private double[] direction(double angle) {
        for (double[] own : new double[][] {r, s}) {
            if (norm(own) > 0 && angle == angle(own)) {
                return unit(own);
            }
        }
        double[] m = new double[3];
        for (int i = 0; i < 3; i++) {
            m[i] = StrictMath.cos(angle) * e1[i] + StrictMath.sin(angle) * e2[i];
        }
        return norm(m) > 1e-8 ? unit(m) : e1;
    }

    private double lnError(double angle) {
        double[] p = probabilities(r, angle);
        double[] q = probabilities(s, angle);
        return PositivePair.ofSpectra(p, q)
                .copies(n)
                .traceMinimumEstimate(WideDouble.of(prior), WideDouble.of(1 - prior))
                .ln();
    }

    /** (1 ± m·r)/2 without cancellation: (1 − |r|)/2 + |r| cos²(δ/2) and sin², with δ between m and r. */
    private double[] probabilities(double[] own, double angle) {
        double length = norm(own);
        double mixed = length > 1 - PURE ? 0 : 0.5 * (1 - length);
        double half = 0.5 * (angle - angle(own));
        double c = StrictMath.cos(half);
        double d = StrictMath.sin(half);
        return new double[] {mixed + length * c * c, mixed + length * d * d};
    }

    /** The eigenvector of m·σ to +1, from the larger of its two entries. */
    private static Complex[] ket(double[] m) {
        if (m[2] >= 0) {
            double up = Math.sqrt(0.5 * (1 + m[2]));
            return new Complex[] {new Complex(up, 0), new Complex(0.5 * m[0] / up, 0.5 * m[1] / up)};
        }
        double down = Math.sqrt(0.5 * (1 - m[2]));
        return new Complex[] {new Complex(0.5 * m[0] / down, -0.5 * m[1] / down), new Complex(down, 0)};
    }

    private static double dot(double[] a, double[] b) {
        return a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
    }

    private static double norm(double[] a) {
        return Math.sqrt(dot(a, a));
    }

    private static double[] unit(double[] a) {
        double size = norm(a);
        return new double[] {a[0] / size, a[1] / size, a[2] / size};
    }

    private static double[] plus(double[] a, double[] b, double factor) {
        return new double[] {a[0] + factor * b[0], a[1] + factor * b[1], a[2] + factor * b[2]};
    }
}
