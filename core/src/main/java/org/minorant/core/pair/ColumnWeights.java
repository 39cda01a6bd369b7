package org.minorant.core.pair;

import org.minorant.core.EnclosedMatrix;
import org.minorant.core.internal.number.DoubleDouble;
import org.minorant.core.internal.number.WideDoubleDouble;

/**
 * The weights of one operator's columns in a spin block, not increasing, in units of 2^shift, and their square roots: relative errors below (steps + 4) · 2^-101 beside that of the first. Weights below 2^-1000 of the unit
 * are left out.
 */
final class ColumnWeights {

    private static final int LEAST = -1000;

    private final DoubleDouble[] power;
    private final DoubleDouble[] root;
    private final int[] steps;
    private final int held;

    ColumnWeights(BlockColumns columns, long shift) {
        WideDoubleDouble[] weights = columns.weights();
        steps = columns.steps();
        power = new DoubleDouble[weights.length];
        root = new DoubleDouble[weights.length];
        int n = 0;
        while (n < weights.length && weights[n].significand().hi() != 0 && weights[n].exponent() - shift >= LEAST) {
            power[n] = weights[n].toDoubleDouble(shift);
            WideDoubleDouble unit = new WideDoubleDouble(weights[n].significand(), weights[n].exponent() - shift);
            root[n] = unit.sqrt().toDoubleDouble(0);
            n++;
        }
        held = n;
    }

    /** How many columns are heavy enough to be held. */
    int held() {
        return held;
    }

    /** An upper end of the weight that is left out, in units of 2^shift. */
    double leftOut() {
        return (power.length - held) * Math.scalb(1.0, LEAST + 1);
    }

    /** How many steps column i is away from the first. */
    int steps(int i) {
        return steps[i];
    }

    DoubleDouble root(int i) {
        return root[i];
    }

    DoubleDouble power(int i) {
        return power[i];
    }

    /** A bound on the relative error of the weights up to i, beside that of the first. */
    double weightError(int i) {
        int most = 0;
        for (int j = 0; j <= i; j++) {
            most = Math.max(most, steps[j]);
        }
        return most == 0 ? 0 : (most + 4) * 0x1p-101;
    }

    /** The sum of the first weights. */
    DoubleDouble trace(int count) {
        DoubleDouble s = DoubleDouble.ZERO;
        for (int i = 0; i < count; i++) {
            s = s.plus(power[i]);
        }
        return s;
    }

    /** The diagonal matrix of the first weights. */
    EnclosedMatrix gram(int count) {
        EnclosedMatrix.Builder m = EnclosedMatrix.builder(count, count);
        for (int i = 0; i < count; i++) {
            m.set(i, i, power[i].hi(), power[i].lo(), 0, 0, i == 0 ? 0 : power[i].hi() * (steps[i] + 4) * 0x1p-100);
        }
        return m.build();
    }
}
