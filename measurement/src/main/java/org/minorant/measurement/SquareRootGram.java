package org.minorant.measurement;

import org.minorant.core.EnclosedMatrix;
import org.minorant.core.Enclosure;

/**
 * The square root of the Gram matrix of an ensemble, H = (Z*Z)^½ with Z = (√p_1 X_1, √p_2 X_2, …) and ρ_i = X_i X_i*, by the norms of its blocks: the pretty-good
 * measurement sees outcome j on state i with joint probability ‖H_ij‖².
 *
 * <p><b>Argument.</b> p_i Tr ρ_i S^(-½) p_jρ_j S^(-½) = ‖X_i* S^(-½) X_j‖², S = ZZ*, and Z*S^(-½)Z = (Z*Z)^½. The map Z ↦ (Z*Z)^½ is √2-Lipschitz in Frobenius norm (H. Araki, S.
 * Yamagami, Commun. Math. Phys. 81, 89, 1981, from memory), so no rank is decided. With Z ≈ LPR* as certified by {@link PolarFactors} and L̃, R̃ the orthonormal
 * matrices next to L and R (‖L − L̃‖ ≤ δ_L), H differs from RPR* by at most
 *
 * <pre>√2(‖Z − LPR*‖ + (δ_L(1 + δ_R) + δ_R)‖P‖) + (2δ_R + δ_R²)‖P‖ + √2 e</pre>
 *
 * with e the errors of the columns ({@link WeightedColumns}). This is about 1e-28 for kets, so that an error probability of 1e-30, where ‖H_ij‖ is 1e-15, still has a
 * dozen digits; with singular values of Z below 1e-13 of the largest, which are left out, it is about as large as these.
 */
final class SquareRootGram {

    private final ColumnBlocks blocks;
    private final PolarFactors polar;
    private final EnclosedMatrix root;
    private final double error;

    private SquareRootGram(ColumnBlocks blocks, PolarFactors polar, EnclosedMatrix root, double error) {
        this.blocks = blocks;
        this.polar = polar;
        this.root = root;
        this.error = error;
    }

    static SquareRootGram of(Ensemble ensemble) {
        ColumnBlocks.Builder z = new ColumnBlocks.Builder(ensemble.dimension());
        double errors = 0;
        for (int i = 0; i < ensemble.size(); i++) {
            if (ensemble.prior(i) == 0) {
                z.addEmpty();
                continue;
            }
            WeightedColumns x = WeightedColumns.of(ensemble.state(i).factor(), ensemble.prior(i));
            z.add(x.columns());
            errors += x.error() * x.error();
        }
        ColumnBlocks blocks = z.build();
        PolarFactors polar = PolarFactors.of(blocks.matrix());
        EnclosedMatrix root =
                polar.right().times(polar.core().times(polar.right().adjoint()));
        double p = polar.core().frobeniusUpper();
        double dl = polar.leftDefect();
        double dr = polar.rightDefect();
        double near = polar.residual() + (dl * (1 + dr) + dr) * p + Math.sqrt(errors);
        double error = (Math.sqrt(2) * near + (2 * dr + dr * dr) * p) * (1 + 0x1p-40);
        return new SquareRootGram(blocks, polar, root, error);
    }

    ColumnBlocks blocks() {
        return blocks;
    }

    PolarFactors polar() {
        return polar;
    }

    /** ‖H_ij‖². */
    Enclosure block(int i, int j) {
        return blocks.offset(i) == blocks.offset(i + 1) || blocks.offset(j) == blocks.offset(j + 1)
                ? Enclosure.ZERO
                : widened(norm2(i, j));
    }

    /** Σ_i ‖H_ii‖². */
    Enclosure diagonal() {
        return sum(true);
    }

    /** Σ_{i≠j} ‖H_ij‖². */
    Enclosure offDiagonal() {
        return sum(false);
    }

    private Enclosure sum(boolean diagonal) {
        EnclosedMatrix s = EnclosedMatrix.builder(1, 1).build();
        for (int i = 0; i < blocks.size(); i++) {
            for (int j = 0; j < blocks.size(); j++) {
                if ((i == j) == diagonal) {
                    s = s.plus(norm2(i, j));
                }
            }
        }
        return widened(s);
    }

    private EnclosedMatrix norm2(int i, int j) {
        return Inner.squaredNorm(root, blocks.offset(i), blocks.offset(i + 1), blocks.offset(j), blocks.offset(j + 1));
    }

    /** The square of a Frobenius norm that is known up to the error of H, from the square of the norm computed. */
    private Enclosure widened(EnclosedMatrix square) {
        Enclosure norm = square.enclosureRe(0, 0).sqrt().widen(error).max(Enclosure.ZERO);
        return norm.times(norm);
    }
}
