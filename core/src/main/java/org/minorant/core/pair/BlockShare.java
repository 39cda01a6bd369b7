package org.minorant.core.pair;

import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;

/** What a block adds to a sum, from its value on its own scale. */
final class BlockShare {

    private BlockShare() {}

    /**
     * The share.
     *
     * @param unit the value in units of 2^shift, for weights as rounded
     * @param rounding the relative error of these weights
     * @param leftOut an upper end of what light columns add beyond, in the same units
     * @param shift log2 of the unit
     * @param most an upper end by the traces of the block
     */
    static Enclosure of(Enclosure unit, double rounding, WideDouble leftOut, long shift, WideDouble most) {
        Enclosure f = unit.times(Enclosure.of(1 - rounding, 1 + rounding));
        WideDouble upper = f.upperWide().isInfinite()
                ? most
                : f.upperWide().plusUp(leftOut).timesPowerOfTwo(shift).min(most);
        WideDouble lower = f.lowerWide().max(WideDouble.ZERO).timesPowerOfTwo(shift);
        return Enclosure.of(lower.min(upper), upper);
    }
}
