package org.minorant.core.state;

import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;
import org.minorant.core.internal.number.DoubleDouble;

/**
 * Thermal states: p_n = x^n / Σ_(k&lt;d) x^k with x = m/(m+1); the weight cut off is x^d exactly, and so is the trace distance before rounding.
 *
 * <p><b>Error.</b> x has relative error 2^-101, powers up to d ≤ 2^31 are taken with at most 63 roundings by repeated squaring or d
 * roundings one after the other: relative error at most (d + 70) · 2^-100 for both. Rounding the p_n to double moves the state by at most
 * 2^-53 in trace distance, or by 2^-1075 for each that underflows.
 */
final class ThermalLight {

    private ThermalLight() {}

    static TruncatedState of(String asked, double mean, Truncation truncation) {
        DoubleDouble x = DoubleDouble.of(mean).dividedBy(DoubleDouble.sum(mean, 1));
        int d = truncation.isOfDimension() ? truncation.dimension() : dimension(asked, mean, x, truncation.tail());
        LightLimits.checkMemory(asked, d);
        WideComplex cut = power(x, d);
        double error = (d + 70.0) * 0x1p-100;
        double m = cut.re().hi();
        WideDouble lower = WideDouble.of(m * (1 - error) - Math.ulp(m), cut.exponent());
        WideDouble upper = WideDouble.of(m * (1 + error) + Math.ulp(m), cut.exponent());
        Enclosure discarded = m == 0 ? Enclosure.ZERO : Enclosure.of(lower, upper);
        LightLimits.checkWeight(asked, d, discarded.upper());
        double distance = (discarded.upper() + 0x1p-53 + d * Double.MIN_VALUE) * (1 + 0x1p-50);
        return new TruncatedState(
                DensityOperator.ofEigenvalues(probabilities(x, d)), discarded, mean == 0 ? 0 : distance);
    }

    /** The smallest d with x^d ≤ tail. */
    private static int dimension(String asked, double mean, DoubleDouble x, double tail) {
        // ln x = −ln(1 + 1/m); one below the guess, for the rounding of both logarithms
        double guess = mean == 0 ? 1 : StrictMath.log(tail) / -StrictMath.log1p(1 / mean);
        int d = (int) Math.max(1, Math.min(Integer.MAX_VALUE - 8.0, Math.floor(guess) - 1));
        LightLimits.checkMemory(asked, d);
        WideComplex p = power(x, d);
        while (value(p) > tail) {
            p = p.times(WideComplex.of(x));
            d++;
        }
        return d;
    }

    private static double value(WideComplex p) {
        return p.re(0).hi();
    }

    private static WideComplex power(DoubleDouble x, int exponent) {
        WideComplex result = WideComplex.ONE;
        WideComplex square = WideComplex.of(x);
        for (int e = exponent; e > 0; e >>= 1) {
            if ((e & 1) == 1) {
                result = result.times(square);
            }
            square = square.times(square);
        }
        return result;
    }

    private static double[] probabilities(DoubleDouble x, int d) {
        DoubleDouble[] p = new DoubleDouble[d];
        DoubleDouble sum = DoubleDouble.ZERO;
        DoubleDouble power = DoubleDouble.ONE;
        for (int n = 0; n < d; n++) {
            p[n] = power;
            sum = sum.plus(power);
            power = power.times(x);
        }
        double[] q = new double[d];
        for (int n = 0; n < d; n++) {
            q[n] = p[n].dividedBy(sum).value();
        }
        return q;
    }
}
