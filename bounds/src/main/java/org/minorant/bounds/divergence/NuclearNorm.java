package org.minorant.bounds.divergence;

import java.util.Comparator;
import java.util.List;
import java.util.stream.IntStream;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.EnclosedSpectrum;
import org.minorant.core.Enclosure;

/**
 * The nuclear norm ‖Z‖₁ = Tr |Z| = value · 2^exponent of a matrix known up to radii.
 *
 * <p><b>Argument.</b> The columns of Z are made orthogonal by a near-unitary V: eigenvectors of Z*Z, and again those of the Gram matrix of the light columns alone, which the
 * heavy ones drown. For B = ZV with columns of lengths s_i and cosines E_ij between them, as they are:
 *
 * <ul>
 *   <li>‖B‖₁ ≤ Σ s_i, because B is a sum of that many matrices of rank one;
 *   <li>‖B‖₁ ≥ ‖BP‖₁ for a projector P on some columns, and for these, with B = QD, ‖B‖₁ ≥ Tr W*B = Tr (Q*Q)^½ D for W = Q(Q*Q)^(−½). As √(1+x) ≥ 1 + x/2 − x²/2
 *       for x ≥ −1, that is at least Σ s_i − ½ Σ_(i≠j) s_i |E_ij|².
 * </ul>
 *
 * So what is left of the cosines enters squared, and columns that are drowned by the rounding of the heavy ones, those below about 1e-20 of the longest, cost their own
 * length only: no root of a small uncertain eigenvalue is taken. V with ‖V*V − 1‖ ≤ δ changes the norm by a factor of at most 1 ± δ; radii Δ by ‖Δ‖₁ ≤ √n ‖Δ‖_F.
 *
 * @param value a ball that holds the norm, times 2^-exponent
 * @param exponent the power of two split off, so that the largest entry is near one
 */
record NuclearNorm(Ball value, int exponent) {

    /** Columns this much shorter than the longest of their group are turned again among themselves. */
    private static final double LIGHT = 0x1p-36;

    /** Covers the rounding of sums of errors. */
    private static final double UP = 1 + 1e-9;

    static NuclearNorm of(EnclosedMatrix z) {
        double most = largest(z);
        if (most == 0) {
            return new NuclearNorm(new Ball(0, 0, Math.sqrt(smaller(z)) * z.frobeniusUpper() * UP), 0);
        }
        int e = Math.getExponent(most);
        EnclosedMatrix tall = z.rows() >= z.columns() ? z : z.adjoint();
        return new NuclearNorm(new Columns(tall.times(Math.scalb(1.0, -e))).norm(), e);
    }

    /** The norm as an enclosure; its ends may be out of the range of double. */
    Enclosure toEnclosure() {
        Enclosure v = value.toEnclosure().clip(0, Double.POSITIVE_INFINITY);
        return Enclosure.of(
                v.lowerWide().timesPowerOfTwo(exponent), v.upperWide().timesPowerOfTwo(exponent));
    }

    private static int smaller(EnclosedMatrix z) {
        return Math.min(z.rows(), z.columns());
    }

    private static double largest(EnclosedMatrix z) {
        double most = 0;
        for (int i = 0; i < z.rows(); i++) {
            for (int j = 0; j < z.columns(); j++) {
                most = Math.max(most, Math.max(Math.abs(z.re(i, j)), Math.abs(z.im(i, j))));
            }
        }
        return most;
    }

    /** √n ‖Δ‖_F for the radii Δ. */
    static double radiusNorm(EnclosedMatrix z) {
        return Math.sqrt(smaller(z)) * z.minus(z.midpoint()).frobeniusUpper() * UP;
    }

    /** The columns while they are turned, exact numbers; the lightest come first. */
    private static final class Columns {

        private EnclosedMatrix columns;
        /** How far the norm is from that of the columns at most: relatively, then absolutely. */
        private double relative;

        private double absolute;

        Columns(EnclosedMatrix z) {
            absolute = radiusNorm(z);
            columns = z.midpoint();
        }

        Ball norm() {
            int light = columns.columns();
            while (light > 1) {
                int next = turn(light);
                light = next < light ? next : 0;
            }
            Ball n = ofColumns();
            return n.widen((absolute + n.magnitude() * relative) * UP);
        }

        /** Turns the first columns so that they are orthogonal; returns how many of them are light even among these. */
        private int turn(int count) {
            EnclosedMatrix sub = part(columns, 0, count);
            double most = largest(sub);
            if (most < 0x1p-400) {
                return 0;
            }
            EnclosedMatrix scaled =
                    sub.times(Math.scalb(1.0, -Math.getExponent(most))).midpoint();
            EnclosedSpectrum s = EnclosedSpectrum.of(scaled.adjoint().times(scaled));
            if (!(s.defect() < 1e-10)) {
                return 0;
            }
            EnclosedMatrix turned = sub.times(s.vectors());
            // the columns that stay see a factor of one
            relative += s.defect() * UP;
            absolute += radiusNorm(turned) * UP;
            columns = joined(turned.midpoint(), part(columns, count, columns.columns()));
            int light = 0;
            while (light < count && s.value(light) < LIGHT * LIGHT * s.value(count - 1)) {
                light++;
            }
            return light;
        }

        private Ball ofColumns() {
            EnclosedMatrix g = columns.adjoint().times(columns);
            int n = g.columns();
            List<Ball> length =
                    IntStream.range(0, n).mapToObj(i -> length(g, i)).toList();
            int[] order = IntStream.range(0, n)
                    .boxed()
                    .sorted(Comparator.comparingDouble(i -> -length.get(i).hi()))
                    .mapToInt(Integer::intValue)
                    .toArray();
            Ball sum = Ball.ZERO;
            double missing = 0;
            int kept = 0;
            int[] keep = new int[n];
            for (int i : order) {
                Ball s = length.get(i);
                sum = sum.plus(s);
                double cost = s.isPositive() ? cost(g, length, i, keep, kept) : Double.POSITIVE_INFINITY;
                if (cost < s.hi()) {
                    missing += cost * UP;
                    keep[kept++] = i;
                } else {
                    missing += s.magnitude() * UP;
                }
            }
            return missing == 0 ? sum : sum.plus(new Ball(-0.5 * missing, 0, 0.5 * missing));
        }

        /** What keeping another column costs: ½(s_i + s_j)|E_ij|² summed over those kept so far. */
        private static double cost(EnclosedMatrix g, List<Ball> length, int i, int[] keep, int kept) {
            double si = length.get(i).hi() - length.get(i).radius();
            double cost = 0;
            for (int k = 0; k < kept; k++) {
                Ball other = length.get(keep[k]);
                double sj = other.hi() - other.radius();
                double e = g.modulusUpper(i, keep[k]) / si / sj;
                cost += 0.5 * (length.get(i).magnitude() + other.magnitude()) * e * e;
            }
            return cost * UP;
        }

        private static Ball length(EnclosedMatrix g, int i) {
            Ball square = new Ball(g.re(i, i), g.reTail(i, i), g.radius(i, i));
            if (square.isPositive() && square.hi() > 0x1p-900) {
                return square.ln().times(0.5).exp();
            }
            double most = Math.sqrt(square.magnitude()) * UP;
            return new Ball(0.5 * most, 0, 0.5 * most);
        }

        private static EnclosedMatrix part(EnclosedMatrix m, int from, int to) {
            EnclosedMatrix.Builder b = EnclosedMatrix.builder(m.rows(), Math.max(1, to - from));
            copy(m, from, to, b, 0);
            return b.build();
        }

        private EnclosedMatrix joined(EnclosedMatrix first, EnclosedMatrix second) {
            EnclosedMatrix.Builder b = EnclosedMatrix.builder(columns.rows(), columns.columns());
            copy(first, 0, first.columns(), b, 0);
            copy(second, 0, columns.columns() - first.columns(), b, first.columns());
            return b.build();
        }

        private static void copy(EnclosedMatrix m, int from, int to, EnclosedMatrix.Builder b, int at) {
            for (int i = 0; i < m.rows(); i++) {
                for (int j = from; j < to; j++) {
                    b.set(i, at + j - from, m.re(i, j), m.reTail(i, j), m.im(i, j), m.imTail(i, j), m.radius(i, j));
                }
            }
        }
    }
}
