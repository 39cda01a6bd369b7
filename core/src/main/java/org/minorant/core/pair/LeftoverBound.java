package org.minorant.core.pair;

import org.minorant.core.EnclosedMatrix;
import org.minorant.core.WideDouble;

/**
 * An upper end of f for a pair whose columns are already nearly orthogonal.
 *
 * <p><b>Lemma.</b> Let z_1..z_r be all columns (of X and of Y) by decreasing w_i = ‖z_i‖², r of them, ẑ_i = z_i/‖z_i‖. Suppose |⟨ẑ_i,ẑ_j⟩| ≤ ε = 1/(8r) for i ≠ j, and
 * |⟨z_i,z_j⟩| ≤ κ √max(w_i,w_j) for columns of opposite type. Then f ≤ 4klκ².
 *
 * <p><b>Proof.</b> Orthonormalise in that order: ẑ_j = Σ_{i≤j} R_ij e_i. The test that projects on the e_i of type X errs by Tr A(1−T) + Tr BT = Σ w_j|R_ij|², summed over i &lt; j of
 * opposite type, and f is at most that. By induction |R_ij| ≤ 2ε (since |Σ_k R̄_ki R_kj| ≤ r·4ε² = ε/2 and R_ii² ≥ 1 − ε/2), and for opposite types |R_ij| ≤ 2κ/√w_j: each product
 * R̄_ki R_kj has one factor of opposite type, at most 2κ/√w_i or 2κ/√w_j ≤ 2κ/√w_j (w_j is the smallest), the other at most 2ε, so the sum is at most κ/(2√w_j), while the first term is at most
 * κ√w_i/(√w_i √w_j). ∎
 *
 * <p>Columns too light to matter, or too light to satisfy the hypothesis, are left out and their weight is added: Tr[(A₁+A₂) ∧ B] ≤ Tr[A₁ ∧ B] + Tr A₂.
 */
final class LeftoverBound {

    /** Columns lighter than this part of f (divided by their number) are left out at once. */
    private static final double LIGHT = 0x1p-57;

    private final int k;
    private final int r;
    private final EnclosedMatrix gramX;
    private final EnclosedMatrix gramY;
    private final EnclosedMatrix across;
    private final double unit;
    private final double[] weight;
    private final boolean[] kept;

    private LeftoverBound(EnclosedMatrix gramX, EnclosedMatrix gramY, EnclosedMatrix across, int exponent) {
        this.gramX = gramX;
        this.gramY = gramY;
        this.across = across;
        this.k = gramX.rows();
        this.r = k + gramY.rows();
        this.unit = Math.scalb(1.0, Math.max(exponent, -1000));
        this.weight = new double[r];
        this.kept = new boolean[r];
        for (int i = 0; i < r; i++) {
            EnclosedMatrix g = i < k ? gramX : gramY;
            int j = i < k ? i : i - k;
            weight[i] = Math.max(0, g.re(j, j));
            kept[i] = true;
        }
    }

    /**
     * Bounds f in units of 2^2e.
     *
     * @param gramX inner products of the columns of A
     * @param gramY inner products of the columns of B
     * @param across inner products across, in units of 2^e
     * @param exponent e
     * @param seen what of f is known already, in units of 2^2e
     * @return an upper end of f / 2^2e
     */
    static WideDouble of(
            EnclosedMatrix gramX, EnclosedMatrix gramY, EnclosedMatrix across, int exponent, WideDouble seen) {
        return new LeftoverBound(gramX, gramY, across, exponent).bound(exponent, seen);
    }

    private WideDouble bound(int exponent, WideDouble seen) {
        double light = seen.timesPowerOfTwo(2L * exponent).toDoubleDown() * LIGHT / r;
        WideDouble dropped = WideDouble.ZERO;
        Integer[] order = new Integer[r];
        java.util.Arrays.setAll(order, i -> i);
        java.util.Arrays.sort(order, java.util.Comparator.comparingDouble(i -> -weight[i]));
        double epsilon = 1.0 / (8 * r);
        for (int a = 0; a < r; a++) {
            int j = order[a];
            kept[j] = weightLower(j) > light && weightLower(j) > 0;
            for (int b = 0; b < a && kept[j]; b++) {
                int i = order[b];
                kept[j] = !kept[i]
                        || overlapUpper(i, j) <= epsilon * Math.sqrt(weightLower(i)) * Math.sqrt(weightLower(j));
            }
            if (!kept[j]) {
                dropped = dropped.plusUp(WideDouble.of(weightUpper(j)));
            }
        }
        double square = 0;
        for (int i = 0; i < k; i++) {
            for (int j = k; j < r; j++) {
                if (kept[i] && kept[j]) {
                    double c = across.modulusUpper(i, j - k);
                    // the square root first, so that tiny inner products do not underflow away
                    double ratio = c / Math.sqrt(Math.max(weightLower(i), weightLower(j)));
                    square = Math.max(square, ratio * ratio * (1 + 0x1p-40) + 0x1p-1060);
                }
            }
        }
        // the order was decided with midpoints: 1.01 covers weights that are equal within their radii
        double bound = 4.0 * k * (r - k) * square * 1.01;
        return dropped.timesPowerOfTwo(-2L * exponent).plusUp(WideDouble.of(bound));
    }

    private double radius(int i) {
        return i < k ? gramX.radius(i, i) : gramY.radius(i - k, i - k);
    }

    private double weightLower(int i) {
        return Math.max(0, (weight[i] - radius(i)) * (1 - 0x1p-50));
    }

    private double weightUpper(int i) {
        return (weight[i] + radius(i)) * (1 + 0x1p-50);
    }

    private double overlapUpper(int i, int j) {
        if (i < k && j < k) {
            return gramX.modulusUpper(i, j);
        }
        if (i >= k && j >= k) {
            return gramY.modulusUpper(i - k, j - k);
        }
        return (i < k ? across.modulusUpper(i, j - k) : across.modulusUpper(j, i - k)) * unit * (1 + 0x1p-50);
    }
}
