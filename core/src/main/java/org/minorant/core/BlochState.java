package org.minorant.core;

import java.math.BigDecimal;
import org.minorant.core.internal.number.DoubleDouble;

/**
 * The factor of a qubit state given by its Bloch vector: Cholesky of [[a, c̄], [c, b]] with a = (1+z)/2, b = (1−z)/2, c = (x+iy)/2 and
 * det = (1 − x² − y² − z²)/4 evaluated exactly.
 *
 * <p><b>Error.</b> Each entry of L has relative error at most 2^-99. With L̂ = L(1 + Ξ), |Ξ₂₁| ≤ 2^-98 |c|/√det ≤ 2^-99/√det and ‖Ξ‖ ≤ 2^-98/√det, so the
 * relative error in the Loewner order is at most 2‖Ξ‖ + ‖Ξ‖² ≤ 2^-96/√det.
 *
 * <p><b>Pure states.</b> x² + y² + z² = 1 holds exactly for dyadic numbers on the axes only (squares are 0 or 1 modulo 4, so a common denominator
 * can always be halved); the direction of their kets is exact. A vector longer than one has a direction that is rounded, which is no relative error: see
 * {@link FactorRounding}.
 */
final class BlochState {

    private BlochState() {}

    static PositiveOperator of(double x, double y, double z) {
        BigDecimal one = BigDecimal.ONE;
        BigDecimal square = square(x).add(square(y)).add(square(z));
        if (square.compareTo(one) > 0) {
            return beyondSphere(x, y, z, square);
        }
        BigDecimal quarter = new BigDecimal("0.25");
        BigDecimal half = new BigDecimal("0.5");
        DoubleDouble det = DoubleDouble.of(one.subtract(square).multiply(quarter));
        BigDecimal zz = new BigDecimal(z);
        DoubleDouble up = DoubleDouble.of(one.add(zz).multiply(half));
        DoubleDouble down = DoubleDouble.of(one.subtract(zz).multiply(half));
        if (square.compareTo(one) == 0) {
            return PositiveOperator.ofFactor(axis(x, y, z));
        }
        boolean upper = z >= 0;
        DoubleDouble root = (upper ? up : down).sqrt();
        DoubleDouble cr = DoubleDouble.of(x / 2).dividedBy(root);
        DoubleDouble ci = DoubleDouble.of(y / 2).dividedBy(root);
        EnclosedMatrix.Builder b = EnclosedMatrix.builder(2, 2);
        int p = upper ? 0 : 1;
        int q = 1 - p;
        double sign = upper ? 1 : -1;
        b.set(p, 0, root.hi(), root.lo(), 0, 0, 0);
        b.set(q, 0, cr.hi(), cr.lo(), sign * ci.hi(), sign * ci.lo(), 0);
        DoubleDouble rest = det.sqrt().dividedBy(root);
        b.set(q, 1, rest.hi(), rest.lo(), 0, 0, 0);
        double error = 0x1p-96 / Math.sqrt(det.hi());
        return PositiveOperator.ofFactor(new PositiveFactor(b.build(), error, 0));
    }

    /** The eigenstates of the Pauli operators: (1, 0), (0, 1) or √½ (1, x + iy), where only the length is rounded. */
    private static PositiveFactor axis(double x, double y, double z) {
        EnclosedMatrix.Builder b = EnclosedMatrix.builder(2, 1);
        if (z != 0) {
            return new PositiveFactor(b.set(z > 0 ? 0 : 1, 0, 1, 0, 0, 0, 0).build(), 0, 0);
        }
        DoubleDouble s = DoubleDouble.of(0.5).sqrt();
        b.set(0, 0, s.hi(), s.lo(), 0, 0, 0);
        b.set(1, 0, x * s.hi(), x * s.lo(), y * s.hi(), y * s.lo(), 0);
        return new PositiveFactor(b.build(), 0x1p-100, 0);
    }

    private static BigDecimal square(double v) {
        BigDecimal b = new BigDecimal(v);
        return b.multiply(b);
    }

    /** The positive part of ½(1 + r·σ) for |r| slightly above one: the pure state along r with weight (1 + |r|)/2. */
    private static PositiveOperator beyondSphere(double x, double y, double z, BigDecimal square) {
        double excess = square.subtract(BigDecimal.ONE).doubleValue() / 2;
        if (!(excess <= 0x1p-50)) {
            throw new InvalidInputException(
                    "DensityOperator.ofBloch",
                    "the Bloch vector (" + x + ", " + y + ", " + z + ") has length " + Math.sqrt(square.doubleValue()),
                    "at most 1",
                    "scale it to length at most one");
        }
        DoubleDouble r = DoubleDouble.of(square).sqrt();
        DoubleDouble weight = DoubleDouble.ONE.plus(r).times(0.5);
        boolean upper = z >= 0;
        // the eigenvector to (1+|r|)/2, unnormalised: (|r| + |z|, x ± iy), of squared norm 2|r|(|r| + |z|)
        DoubleDouble first = r.plus(DoubleDouble.of(Math.abs(z)));
        DoubleDouble scale = weight.dividedBy(r.times(first).times(2)).sqrt();
        DoubleDouble a = first.times(scale);
        DoubleDouble cr = scale.times(x);
        DoubleDouble ci = scale.times(upper ? y : -y);
        EnclosedMatrix.Builder b = EnclosedMatrix.builder(2, 1);
        b.set(upper ? 0 : 1, 0, a.hi(), a.lo(), 0, 0, 0);
        b.set(upper ? 1 : 0, 0, cr.hi(), cr.lo(), ci.hi(), ci.lo(), 0);
        return PositiveOperator.ofFactor(FactorRounding.entrywise(b.build(), 0x1p-98));
    }
}
