package org.minorant.core.pair;

import org.minorant.core.EnclosedMatrix;
import org.minorant.core.internal.number.DoubleDouble;
import org.minorant.core.internal.number.WideDoubleDouble;

/**
 * The weights w, wr, wr², … of one operator's columns in a spin block, 0 ≤ r ≤ 1, in units of 2^shift, and their square roots: relative errors below (i + 4) · 2^-101 beside that of w. Weights below 2^-1000 of the unit are left out.
 */
final class GeometricColumns {

    private static final int LEAST = -1000;

    private final DoubleDouble[] power;
    private final DoubleDouble[] root;
    private final int held;

    GeometricColumns(WideDoubleDouble weight, DoubleDouble ratio, int count, long shift) {
        power = new DoubleDouble[count];
        root = new DoubleDouble[count];
        WideDoubleDouble r = WideDoubleDouble.of(ratio);
        WideDoubleDouble p = weight;
        int n = 0;
        while (n < count && p.significand().hi() != 0 && p.exponent() - shift >= LEAST) {
            power[n] = p.toDoubleDouble(shift);
            WideDoubleDouble unit = new WideDoubleDouble(p.significand(), p.exponent() - shift);
            root[n] = unit.sqrt().toDoubleDouble(0);
            p = p.times(r);
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
