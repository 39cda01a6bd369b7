package org.minorant.bounds.divergence;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.BitSet;
import java.util.List;
import java.util.OptionalInt;
import java.util.function.Supplier;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.EnclosedSpectrum;
import org.minorant.core.Operator;
import org.minorant.core.PositiveFactor;
import org.minorant.core.PositiveOperator;

/** The three ways to a {@link SpectralState}, each with the argument that certifies it. */
final class SpectralStates {

    /** An eigenvalue counts as positive when it exceeds the error of the decomposition by this factor. */
    private static final double CLEAR = 0x1p20;

    private SpectralStates() {}

    static SpectralState decompose(PositiveOperator a) {
        EnclosedMatrix x = a.isDefinedByFactor() ? a.factor().columns() : EnclosedMatrix.of(a);
        BitSet rows = nonzeroRows(x);
        if (a.isDefinedByFactor() && a.factor().traceError() > 0) {
            // what the factor misses may lie anywhere
            rows.set(0, a.dimension());
        }
        if (rows.isEmpty()) {
            return new SpectralState(EnclosedMatrix.builder(a.dimension(), 1).build(), List.of(), 0, 0, rows, true);
        }
        if (!a.isDefinedByFactor()) {
            if (isDiagonal(a)) {
                return diagonal(a);
            }
            EnclosedMatrix h = EnclosedMatrix.of(submatrix(a, rows));
            return ofMatrix(h, 0, () -> ExactRank.of(h), rows, a.dimension());
        }
        PositiveFactor f = a.factor();
        if (f.traceError() == 0 && f.rank() <= rows.cardinality()) {
            SpectralState s = ofColumns(f, rows);
            if (s.rank() == f.rank()) {
                return s;
            }
        }
        EnclosedMatrix y = restricted(x, rows);
        EnclosedMatrix m = y.times(y.adjoint());
        // −ηXX* − N₁ ≤ A − XX* ≤ ηXX* + N₂ bounds the trace norm of the difference by 2(η Tr XX* + ν)
        double error = 2.1 * (f.relativeError() * m.traceRe().upper() + f.traceError());
        // (1 − η)XX* ≤ A ≤ (1 + η)XX*: the rank is that of X
        Supplier<OptionalInt> rank = () -> f.traceError() == 0 ? ExactRank.of(y) : OptionalInt.empty();
        return ofMatrix(m, error, rank, rows, a.dimension());
    }

    private static BitSet nonzeroRows(EnclosedMatrix x) {
        BitSet rows = new BitSet();
        for (int i = 0; i < x.rows(); i++) {
            for (int j = 0; j < x.columns(); j++) {
                if (x.re(i, j) != 0 || x.im(i, j) != 0) {
                    rows.set(i);
                }
            }
        }
        return rows;
    }

    private static boolean isDiagonal(Operator a) {
        for (int i = 0; i < a.rows(); i++) {
            for (int j = 0; j < i; j++) {
                if (a.re(i, j) != 0 || a.im(i, j) != 0) {
                    return false;
                }
            }
        }
        return true;
    }

    /** The positive part of a diagonal matrix: its positive entries, exactly. */
    private static SpectralState diagonal(PositiveOperator a) {
        BitSet rows = new BitSet();
        List<Ball> values = new ArrayList<>();
        for (int i = 0; i < a.dimension(); i++) {
            if (a.re(i, i) > 0) {
                rows.set(i);
                values.add(Ball.of(a.re(i, i)));
            }
        }
        EnclosedMatrix.Builder b = EnclosedMatrix.builder(a.dimension(), Math.max(1, values.size()));
        int j = 0;
        for (int i = rows.nextSetBit(0); i >= 0; i = rows.nextSetBit(i + 1)) {
            b.set(i, j++, 1, 0, 0, 0, 0);
        }
        return new SpectralState(b.build(), List.copyOf(values), 0, 0, rows, true);
    }

    /**
     * A = XX* up to a relative error η, columns independent. With G = X*X = W(D + E)W*, ‖E‖_F ≤ e: the isometry U = XG^(−½)W has the
     * range of X, exactly, and U*XX*U = W*GW = D + E. It differs from XWD^(−½) by at most e/min D in Frobenius norm, because
     * ‖√G − √(WDW*)‖_F ≤ e/(√min D + √(min D − e)) (van Hemmen and Ando, Commun. Math. Phys. 76, 143, 1980). The computed W is within its
     * defect of the unitary one, which XWD^(−½) multiplies by √(max D/min D) at most.
     *
     * @return the spectrum; one of rank 0 if the columns are too close to dependent
     */
    private static SpectralState ofColumns(PositiveFactor f, BitSet rows) {
        EnclosedMatrix x = f.columns();
        EnclosedSpectrum s = EnclosedSpectrum.of(x.adjoint().times(x));
        double e = distance(s);
        double least = s.value(0);
        if (!(least > CLEAR * e)) {
            return new SpectralState(x, List.of(), 0, 0, rows, false);
        }
        int r = s.dimension();
        List<Ball> values = new ArrayList<>();
        EnclosedMatrix.Builder scale = EnclosedMatrix.builder(r, r);
        for (int i = 0; i < r; i++) {
            Ball d = new Ball(s.value(i), s.valueTail(i), 0);
            values.add(d.widen((e + f.relativeError() * (d.magnitude() + e)) * (1 + 0x1p-48)));
            Ball root = d.ln().times(-0.5).exp();
            scale.set(i, i, root.hi(), root.lo(), 0, 0, root.radius());
        }
        double most = s.value(r - 1);
        double radius = (1.01 * Math.sqrt(most / least) * s.defect() + e / least) * (1 + 0x1p-40);
        EnclosedMatrix v = x.times(s.vectors()).times(scale.build());
        return new SpectralState(masked(v, radius, rows), List.copyOf(values), 0, 0, rows, false);
    }

    /** The columns, widened on the rows where they do not vanish structurally. */
    private static EnclosedMatrix masked(EnclosedMatrix v, double radius, BitSet rows) {
        double[] radii = new double[v.columns()];
        Arrays.fill(radii, radius);
        return widened(restricted(v, rows), radii, v.rows(), rows.stream().toArray(), 0);
    }

    /**
     * A is the positive part of a Hermitian H with ‖H − UΛU*‖_F ≤ e. Let P project on the k largest eigenvalues of H, Ũ be the k columns of
     * U to the
     * largest Λ, and g_i = e/(Λ_i − Λ_(k+1) − e). Column by column, the argument of Davis and Kahan (Bhatia, Matrix Analysis, VII.2) gives
     * ‖(1−P)ũ_i‖ ≤
     * g_i. With C = Ũ*PŨ, |1 − C|_ij ≤ g_i g_j, the isometry U' = PŨC^(−½) has the range of P; its columns are within 2g_i of Ũ's, and
     * U'*HU' = Λ + K with ‖K‖ ≤ e + 3‖g‖(‖gΛ‖ + ‖g‖(‖Λ'‖ + e)), Λ' the values left out, as long as ‖g‖ ≤ ½. What is left is the positive
     * part of (1−P)H(1−P), at most
     * (Λ_(k+1))₊ + e, and zero where all those Λ are below −e, or where elimination in whole numbers shows that H has no more nonzero eigenvalues than are clearly positive or
     * negative.
     */
    private static SpectralState ofMatrix(
            EnclosedMatrix h, double error, Supplier<OptionalInt> exactRank, BitSet rows, int dimension) {
        EnclosedSpectrum s = EnclosedSpectrum.of(h);
        int n = s.dimension();
        double e = (distance(s) + error) * (1 + 0x1p-48);
        int k = split(s, e);
        double[] radius = new double[k];
        double g2 = 0;
        double gl2 = 0;
        for (int i = 0; i < k; i++) {
            double gap = k == n ? Double.POSITIVE_INFINITY : s.value(n - k + i) - s.value(n - k - 1);
            double g = e / (gap * (1 - 0x1p-48) - e) * (1 + 0x1p-48);
            radius[i] = (s.defect() + 2 * g) * (1 + 0x1p-48);
            g2 += g * g;
            gl2 += g * s.value(n - k + i) * g * s.value(n - k + i);
        }
        double left = k == n ? 0 : Math.max(Math.abs(s.value(0)), Math.abs(s.value(n - k - 1)));
        double kappa = (e + 3 * Math.sqrt(g2) * (Math.sqrt(gl2) + Math.sqrt(g2) * (left + e))) * (1 + 0x1p-40);
        int restRank = 0;
        for (int i = 0; i < n - k; i++) {
            restRank += s.value(i) > -e ? 1 : 0;
        }
        if (restRank > 0 && exactRank.get().equals(OptionalInt.of(n - restRank))) {
            restRank = 0;
        }
        double rest = restRank == 0 ? 0 : (Math.max(0, s.value(n - k - 1)) + e) * (1 + 0x1p-48);
        List<Ball> values = new ArrayList<>();
        for (int i = n - k; i < n; i++) {
            values.add(new Ball(s.value(i), s.valueTail(i), 0).widen(kappa));
        }
        EnclosedMatrix v = k == 0
                ? EnclosedMatrix.builder(dimension, 1).build()
                : widened(s.vectors(), radius, dimension, rows.stream().toArray(), n - k);
        return new SpectralState(v, List.copyOf(values), rest, restRank, rows, false);
    }

    /** How many of the largest eigenvalues to keep: all that are clearly positive, down to the last wide gap. */
    private static int split(EnclosedSpectrum s, double e) {
        int n = s.dimension();
        if (s.value(0) > CLEAR * e) {
            return n;
        }
        for (int k = n - 1; k > 0; k--) {
            double kept = s.value(n - k);
            double gap = kept - s.value(n - k - 1) - e;
            if (kept > CLEAR * e && gap > kept * 0x1p-9) {
                return k;
            }
        }
        return 0;
    }

    private static Operator submatrix(PositiveOperator a, BitSet rows) {
        int[] place = rows.stream().toArray();
        int n = place.length;
        double[] re = new double[n * n];
        double[] im = new double[n * n];
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                re[i * n + j] = a.re(place[i], place[j]);
                im[i * n + j] = a.im(place[i], place[j]);
            }
        }
        return Operator.ofRowMajor(n, n, re, im);
    }

    private static EnclosedMatrix restricted(EnclosedMatrix x, BitSet rows) {
        int[] place = rows.stream().toArray();
        EnclosedMatrix.Builder b = EnclosedMatrix.builder(place.length, x.columns());
        for (int i = 0; i < place.length; i++) {
            for (int j = 0; j < x.columns(); j++) {
                int p = place[i];
                b.set(i, j, x.re(p, j), x.reTail(p, j), x.im(p, j), x.imTail(p, j), x.radius(p, j));
            }
        }
        return b.build();
    }

    /** The columns from one on, on the rows given, every entry known up to a further radius of its column. */
    private static EnclosedMatrix widened(EnclosedMatrix m, double[] radius, int rows, int[] place, int from) {
        EnclosedMatrix.Builder b = EnclosedMatrix.builder(rows, m.columns() - from);
        for (int i = 0; i < m.rows(); i++) {
            for (int j = from; j < m.columns(); j++) {
                double r = (m.radius(i, j) + radius[j - from]) * (1 + 0x1p-50);
                b.set(place[i], j - from, m.re(i, j), m.reTail(i, j), m.im(i, j), m.imTail(i, j), r);
            }
        }
        return b.build();
    }

    /** An upper end of ‖UΛU* − A‖_F for the exactly unitary polar factor U of the computed vectors. */
    private static double distance(EnclosedSpectrum s) {
        double norm = 0;
        for (int i = 0; i < s.dimension(); i++) {
            norm += s.value(i) * s.value(i);
        }
        // V = U(1 + Δ)^½ with ‖Δ‖_F ≤ defect, so ‖VΛV* − UΛU*‖_F ≤ (2 + defect) · defect · ‖Λ‖_F
        return (s.residual() + 2.1 * s.defect() * Math.sqrt(norm) * (1 + s.dimension() * 0x1p-50)) * (1 + 0x1p-48);
    }
}
