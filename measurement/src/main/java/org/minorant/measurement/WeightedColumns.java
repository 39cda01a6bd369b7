package org.minorant.measurement;

import org.minorant.core.EnclosedMatrix;
import org.minorant.core.PositiveFactor;

/**
 * Columns of pA for a positive operator A known by its factor and a prior p, with a bound on their distance from columns that make pA exactly.
 *
 * <p><b>Argument.</b> Let (1−η)XX* − N₁ ≤ A ≤ (1+η)XX* + N₂ with Tr N ≤ ν, and B = XX*. A + N₁ = (1−η)B + D with 0 ≤ D ≤ 2ηB + N, N = N₁ + N₂. Hence D = GG* with
 * G = √(2η)XK₁ + N^½K₂ for a contraction (K₁; K₂). Leaving out N^½K₂ changes the columns (√(1−η)X, G) by at most √(2ν) in Frobenius norm and leaves
 * X((1−η) + 2ηK₁K₁*)X*, which has columns within η‖X‖_F of X. Going from A + N₁ to A moves the square root by at most √ν (R. T. Powers, E. Størmer, Commun. Math.
 * Phys. 16, 1, 1970, from memory), so that some columns of A, up to a unitary on their right and columns of zeros, are within η‖X‖_F + (1+√2)√ν of X. Neither
 * changes the block norms of (Z*Z)^½.
 *
 * @param columns √p X, with radii
 * @param error a bound on the Frobenius distance of the midpoints from columns of pA
 */
record WeightedColumns(EnclosedMatrix columns, double error) {

    static WeightedColumns of(PositiveFactor f, double prior) {
        int shift = Math.floorDiv(Math.getExponent(Math.max(prior, Double.MIN_NORMAL)), 2);
        double p = Math.scalb(prior, -2 * shift);
        double root = Math.sqrt(p);
        // one Newton step: (root + tail)² = p within 2^-104 p
        double tail = Math.fma(-root, root, p) / (2 * root);
        EnclosedMatrix x = f.columns().times(root).plus(f.columns().times(tail)).times(Math.scalb(1.0, shift));
        double size = x.frobeniusUpper();
        double radii = x.minus(x.midpoint()).frobeniusUpper();
        double trace = Math.sqrt(f.traceError() * prior) * (1 + Math.sqrt(2));
        double error = (radii + size * (f.relativeError() + 0x1p-102) + trace) * (1 + 0x1p-40);
        return new WeightedColumns(x.midpoint(), error);
    }
}
