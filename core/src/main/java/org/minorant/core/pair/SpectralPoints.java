package org.minorant.core.pair;

import org.minorant.core.Enclosure;
import org.minorant.core.internal.number.WideDoubleDouble;

/**
 * The measure of an operator B in a vector ψ, as the secular equation wants it: doubles with exponents of their own.
 *
 * @param weights w_i
 * @param values b_i, as many
 * @param total a = ‖ψ‖², of which the weights and the kernel are parts
 * @param kernel the weight of ψ in the kernel of B
 * @param weightError bound on the relative error of every weight
 * @param valueError bound on the relative error of every value
 */
record SpectralPoints(
        WideArray weights, WideArray values, Enclosure total, Enclosure kernel, double weightError, double valueError) {

    /** The points of a measure, rounded to double. */
    static SpectralPoints of(SpectralMeasure m) {
        WideArray w = new WideArray(m.weights().size());
        WideArray b = new WideArray(m.weights().size());
        double weightError = 0;
        double valueError = 0;
        for (int i = 0; i < m.weights().size(); i++) {
            weightError = Math.max(weightError, add(w, m.weights().get(i)));
            valueError = Math.max(valueError, add(b, m.values().get(i)));
        }
        return new SpectralPoints(
                w,
                b,
                m.totalEnclosure(),
                m.kernelEnclosure(),
                weightError + m.weightError(),
                valueError + m.valueError());
    }

    /** Adds the rounded number and tells its relative error. */
    private static double add(WideArray a, WideDoubleDouble v) {
        a.add(v.significand().hi(), v.exponent());
        return Math.abs(v.significand().lo());
    }

    /** The same, the values known less well. */
    SpectralPoints withValueError(double e) {
        return new SpectralPoints(weights, values, total, kernel, weightError, e);
    }

    /** The same with another total and kernel, the values known less well by the given amount. */
    SpectralPoints withTotal(Enclosure newTotal, Enclosure newKernel, double off) {
        return new SpectralPoints(weights, values, newTotal, newKernel, weightError, valueError + off);
    }
}
