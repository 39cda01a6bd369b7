package org.minorant.core.pair;

import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;
import org.minorant.core.internal.number.WideDoubleDouble;

/** A weight of a block, its significand rounded to double: a relative error of 2^-52, and of 2^-60 at most from powers of up to 10^9 factors. */
record BlockWeight(WideDoubleDouble value) {

    private static final double ROUNDING = 0x1p-51;

    WideDouble wide() {
        return WideDouble.of(value.significand().hi(), value.exponent());
    }

    Enclosure enclosure() {
        return Enclosure.of(wide(), wide()).times(Enclosure.of(1 - ROUNDING, 1 + ROUNDING));
    }
}
