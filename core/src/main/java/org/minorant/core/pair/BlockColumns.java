package org.minorant.core.pair;

import org.minorant.core.internal.number.DoubleDouble;
import org.minorant.core.internal.number.WideDoubleDouble;

/**
 * The columns of one operator in a spin block, or in a product of them, by decreasing weight.
 *
 * @param weights the weights, multiplicity included
 * @param steps how many factors below one each weight is away from the first one, which is what its relative error grows with
 */
record BlockColumns(WideDoubleDouble[] weights, int[] steps) {

    /** w, wr, wr², … for 0 ≤ r ≤ 1. */
    static BlockColumns geometric(WideDoubleDouble weight, DoubleDouble ratio, int count) {
        WideDoubleDouble[] w = new WideDoubleDouble[count];
        int[] steps = new int[count];
        WideDoubleDouble r = WideDoubleDouble.of(ratio);
        WideDoubleDouble p = weight;
        for (int i = 0; i < count; i++) {
            w[i] = p;
            steps[i] = i;
            p = p.times(r);
        }
        return new BlockColumns(w, steps);
    }
}
