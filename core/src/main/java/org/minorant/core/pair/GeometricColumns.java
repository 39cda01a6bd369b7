package org.minorant.core.pair;

import org.minorant.core.EnclosedMatrix;
import org.minorant.core.internal.number.DoubleDouble;

/** The powers 1, r, r², … of a ratio 0 ≤ r ≤ 1 and their square roots, with relative errors below 2^-94 for the first few thousand; what underflows is zero. */
final class GeometricColumns {

    private static final double TINY = 0x1p-1000;

    private final DoubleDouble[] power;
    private final DoubleDouble[] root;

    GeometricColumns(DoubleDouble ratio, int count) {
        power = new DoubleDouble[count];
        root = new DoubleDouble[count];
        DoubleDouble half = ratio.sqrt();
        DoubleDouble p = DoubleDouble.ONE;
        DoubleDouble h = DoubleDouble.ONE;
        for (int i = 0; i < count; i++) {
            power[i] = p.hi() < TINY ? DoubleDouble.ZERO : p;
            root[i] = h.hi() < TINY ? DoubleDouble.ZERO : h;
            p = p.times(ratio);
            h = h.times(half);
        }
    }

    DoubleDouble root(int i) {
        return root[i];
    }

    DoubleDouble power(int i) {
        return power[i];
    }

    /** The diagonal matrix of the first powers. */
    EnclosedMatrix gram(int count) {
        EnclosedMatrix.Builder m = EnclosedMatrix.builder(count, count);
        for (int i = 0; i < count; i++) {
            double radius = power[i].hi() * (i + 1) * 0x1p-100 + (i == 0 ? 0 : 0x1p-990);
            m.set(i, i, power[i].hi(), power[i].lo(), 0, 0, i == 0 ? 0 : radius);
        }
        return m.build();
    }
}
