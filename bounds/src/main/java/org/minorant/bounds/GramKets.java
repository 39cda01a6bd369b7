package org.minorant.bounds;

import java.util.ArrayList;
import java.util.List;
import org.minorant.core.DensityOperator;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.PositiveFactor;
import org.minorant.core.PositiveOperator;

/**
 * Kets with given inner products: if G = XX*, the conjugate of row x of X is a ket ψ_x with ⟨ψ_x|ψ_y⟩ = G_xy.
 *
 * <p><b>Error.</b> Up to one unitary for all kets, which changes no bound, the exact kets are within ζ of those of the factor. If the factor's error η is
 * relative, G = X(1+F)X* with ‖F‖ ≤ η, and ζ = η. Otherwise ‖G − XX*‖₁ ≤ η Tr G + 2ν =: e and ζ = √e, as ‖√A − √B‖_F² ≤ ‖A − B‖₁ (R. T. Powers, E. Størmer,
 * Commun. Math. Phys. 16, 1, 1970, from memory). From (ψ+ε)(ψ+ε)* ≤ (1+ζ)ψψ* + (1+1/ζ)εε*, both ways, the state has relative error ζ and trace error ζ + ζ².
 */
final class GramKets {

    private static final double UP = 1 + 0x1p-40;

    private GramKets() {}

    static List<DensityOperator> of(PositiveOperator gram) {
        PositiveFactor f = gram.factor();
        EnclosedMatrix x = f.columns();
        double eta = f.relativeError();
        double total = eta * gram.dimension() * UP + 2 * f.traceError();
        double zeta = (f.traceError() == 0 ? eta : Math.sqrt(total)) * UP;
        List<DensityOperator> kets = new ArrayList<>();
        for (int row = 0; row < x.rows(); row++) {
            EnclosedMatrix.Builder b = EnclosedMatrix.builder(x.columns(), 1);
            for (int k = 0; k < x.columns(); k++) {
                b.set(k, 0, x.re(row, k), x.reTail(row, k), -x.im(row, k), -x.imTail(row, k), 0);
            }
            kets.add(DensityOperator.of(
                    PositiveOperator.ofFactor(new PositiveFactor(b.build(), zeta, zeta * (1 + zeta) * UP))));
        }
        return kets;
    }
}
