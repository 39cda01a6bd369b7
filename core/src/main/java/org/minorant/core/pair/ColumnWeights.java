package org.minorant.core.pair;

import org.minorant.core.EnclosedMatrix;
import org.minorant.core.internal.number.DoubleDouble;
import org.minorant.core.internal.number.WideDoubleDouble;

/**
 * The weights of one operator's columns in a spin block, not increasing, in units of 2^shift, and their square roots: relative errors below (i + 4) · 2^-101 beside that of the first. Weights below 2^-1000 of the unit
 * are left out.
 */
final class ColumnWeights {

    private static final int LEAST = -1000;

    private final DoubleDouble[] power;
    private final DoubleDouble[] root;
    private final int held;

    ColumnWeights(WideDoubleDouble[] weights, long shift) {
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

    /** w, wr, wr², … for 0 ≤ r ≤ 1. */
    static WideDoubleDouble[] geometric(WideDoubleDouble weight, DoubleDouble ratio, int count) {
        WideDoubleDouble[] w = new WideDoubleDouble[count];
        WideDoubleDouble r = WideDoubleDouble.of(ratio);
        WideDoubleDouble p = weight;
        for (int i = 0; i < count; i++) {
            w[i] = p;
            p = p.times(r);
        }
        return w;
    }

    /** How many columns are heavy enough to be held. */
    int held() {
        return held;
    }

    /** An upper end of the weight that is left out, in units of 2^shift. */
    double leftOut() {
        return (power.length - held) * Math.scalb(1.0, LEAST + 1);
    }

    DoubleDouble root(int i) {
        return root[i];
    }

    DoubleDouble power(int i) {
        return power[i];
    }

    /** The sum of the first weights, rounded once for each. */
    double trace(int count) {
        double s = 0;
        for (int i = 0; i < count; i++) {
            s += power[i].hi();
        }
        return s;
    }

    /** The diagonal matrix of the first weights. */
    EnclosedMatrix gram(int count) {
        EnclosedMatrix.Builder m = EnclosedMatrix.builder(count, count);
        for (int i = 0; i < count; i++) {
            m.set(i, i, power[i].hi(), power[i].lo(), 0, 0, i == 0 ? 0 : power[i].hi() * (i + 4) * 0x1p-100);
        }
        return m.build();
    }
}
