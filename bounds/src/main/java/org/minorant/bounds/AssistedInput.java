package org.minorant.bounds;

import org.minorant.core.DensityOperator;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.HermitianOperator;
import org.minorant.core.KrausChannel;
import org.minorant.core.Operator;
import org.minorant.core.PositiveOperator;
import org.minorant.core.SpectralDecomposition;

/**
 * A purification of an input: θ = Σ_i |i⟩ ⊗ x_i for a matrix X of doubles with columns x_i, so that θ_A = XX* and θ_R is the transpose of X*X. As any entangled state may be shared, nothing is lost by
 * taking X for what is meant.
 *
 * @param root X, with independent columns
 */
record AssistedInput(Operator root) {

    /** Eigenvalues below this part of the largest are left out of a purification. */
    private static final double NONE = 1e-14;

    /** X is a root of the input, rounded: diagonal for a diagonal input, else of eigenvectors. */
    static AssistedInput of(DensityOperator input) {
        int d = input.dimension();
        double[] values = new double[d];
        Operator vectors = HermitianOperator.identity(d);
        if (DiagonalOutputs.isDiagonal(input)) {
            for (int i = 0; i < d; i++) {
                values[i] = Math.max(0, input.re(i, i));
            }
        } else {
            SpectralDecomposition s = input.spectralDecomposition();
            values = s.eigenvalues();
            vectors = s.vectors();
        }
        double most = 0;
        for (double v : values) {
            most = Math.max(most, v);
        }
        int[] kept = new int[d];
        int r = 0;
        for (int i = 0; i < d; i++) {
            if (values[i] > NONE * most) {
                kept[r++] = i;
            }
        }
        double[] re = new double[d * r];
        double[] im = new double[d * r];
        for (int j = 0; j < r; j++) {
            double root = Math.sqrt(values[kept[j]]);
            for (int a = 0; a < d; a++) {
                re[a * r + j] = vectors.re(a, kept[j]) * root;
                im[a * r + j] = vectors.im(a, kept[j]) * root;
            }
        }
        return new AssistedInput(Operator.ofRowMajor(d, r, re, im));
    }

    static AssistedInput maximallyMixed(int d) {
        return new AssistedInput(HermitianOperator.identity(d).times(Math.sqrt(1.0 / d)));
    }

    /** Whether XX* is a multiple of the identity, exactly. */
    boolean isUniform() {
        boolean uniform = root.rows() == root.columns() && root.isReal();
        for (int i = 0; uniform && i < root.rows(); i++) {
            for (int j = 0; j < root.columns(); j++) {
                uniform &= root.re(i, j) == (i == j ? root.re(0, 0) : 0);
            }
        }
        return uniform;
    }

    boolean isFull() {
        return root.rows() == root.columns();
    }

    /** XX* as a state; its trace is one up to rounding. */
    DensityOperator state() {
        return DensityOperator.of(PositiveOperator.ofFactor(root));
    }

    /** XX*, enclosed. */
    EnclosedMatrix matrix() {
        EnclosedMatrix x = EnclosedMatrix.of(root);
        return x.times(x.adjoint());
    }

    /** θ_R. */
    PositiveOperator reference() {
        return PositiveOperator.ofFactor(root.transpose());
    }

    /** N(θ) on R ⊗ B. */
    PositiveOperator joint(KrausChannel channel) {
        return channel.choiOperator()
                .conjugatedBy(root.transpose().tensor(HermitianOperator.identity(channel.outputDimension())));
    }

    /** θ_R ⊗ N(θ_A). */
    PositiveOperator product(KrausChannel channel) {
        return reference().tensor(channel.apply(PositiveOperator.ofFactor(root)));
    }
}
