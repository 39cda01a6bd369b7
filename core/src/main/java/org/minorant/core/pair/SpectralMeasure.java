package org.minorant.core.pair;

import java.util.ArrayList;
import java.util.List;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.Enclosure;
import org.minorant.core.PositiveFactor;
import org.minorant.core.PositiveOperator;
import org.minorant.core.WideDouble;
import org.minorant.core.internal.number.DoubleDouble;
import org.minorant.core.internal.number.WideDoubleDouble;

/**
 * The measure of an operator B in a vector ψ to about 30 digits: w_i = |⟨v_i,ψ⟩|² at the eigenvalues b_i &gt; 0, and the weight in the kernel of B.
 *
 * @param weights w_i &gt; 0
 * @param values b_i, as many
 * @param kernel the weight in the kernel, to {@code kernelError}
 * @param kernelError absolute error of the kernel's weight
 * @param total ‖ψ‖² = Σ w_i + kernel + what is unresolved
 * @param totalError relative error of it
 * @param weightError relative error of every weight
 * @param valueError relative error of every value
 * @param unresolved at most this weight is at values that are not listed, since the amplitudes there vanish within rounding
 * @param unresolvedValue no such value is larger
 */
record SpectralMeasure(
        List<WideDoubleDouble> weights,
        List<WideDoubleDouble> values,
        WideDoubleDouble kernel,
        WideDouble kernelError,
        WideDoubleDouble total,
        double totalError,
        double weightError,
        double valueError,
        WideDouble unresolved,
        WideDouble unresolvedValue) {

    /** Weights and values known to a relative error; a value zero is the kernel. */
    static SpectralMeasure of(
            List<WideDoubleDouble> weights, List<WideDoubleDouble> values, double weightError, double valueError) {
        List<WideDoubleDouble> w = new ArrayList<>();
        List<WideDoubleDouble> b = new ArrayList<>();
        WideDoubleDouble kernel = WideDoubleDouble.ZERO;
        WideDoubleDouble total = WideDoubleDouble.ZERO;
        for (int i = 0; i < weights.size(); i++) {
            if (weights.get(i).significand().hi() == 0) {
                continue;
            }
            total = Letters.sum(total, weights.get(i));
            int same = b.indexOf(values.get(i));
            if (values.get(i).significand().hi() == 0) {
                kernel = Letters.sum(kernel, weights.get(i));
            } else if (same >= 0) {
                // equal eigenvalues are one
                w.set(same, Letters.sum(w.get(same), weights.get(i)));
            } else {
                w.add(weights.get(i));
                b.add(values.get(i));
            }
        }
        double error = weightError + weights.size() * DoubleDouble.EPS;
        WideDouble kernelError =
                kernel.significand().hi() == 0 ? WideDouble.ZERO : WideDouble.of(2 * error, kernel.exponent() + 1);
        return new SpectralMeasure(
                List.copyOf(w),
                List.copyOf(b),
                kernel,
                kernelError,
                total,
                error,
                error,
                valueError,
                WideDouble.ZERO,
                WideDouble.ZERO);
    }

    /** The measure of a diagonal operator given by its entries. */
    static SpectralMeasure ofDiagonal(PositiveFactor psi, PositiveOperator b) {
        List<WideDoubleDouble> weights = new ArrayList<>();
        List<WideDoubleDouble> values = new ArrayList<>();
        for (int i = 0; i < b.dimension(); i++) {
            weights.add(squaredModulus(psi.columns(), i, 0));
            double v = Math.max(0, b.re(i, i));
            values.add(Letters.wide(v));
        }
        return of(weights, values, 4 * DoubleDouble.EPS, 0);
    }

    /** |x_ij|² for the midpoint of an entry, to 4 · 2^-102. */
    static WideDoubleDouble squaredModulus(EnclosedMatrix x, int i, int j) {
        return Letters.sum(square(x.re(i, j), x.reTail(i, j)), square(x.im(i, j), x.imTail(i, j)));
    }

    private static WideDoubleDouble square(double hi, double lo) {
        if (hi == 0) {
            return WideDoubleDouble.ZERO;
        }
        int e = Math.getExponent(hi);
        DoubleDouble v = new DoubleDouble(Math.scalb(hi, -e), Math.scalb(lo, -e));
        return WideDoubleDouble.of(v.times(v), 2L * e);
    }

    /** ‖ψ‖². */
    Enclosure totalEnclosure() {
        return Letters.enclosure(total, totalError);
    }

    /** The weight in the kernel. */
    Enclosure kernelEnclosure() {
        Enclosure k = Letters.enclosure(kernel, 0);
        return k.plus(Enclosure.of(kernelError.negate(), kernelError)).max(Enclosure.ZERO);
    }
}
