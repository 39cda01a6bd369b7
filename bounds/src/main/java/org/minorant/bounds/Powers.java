package org.minorant.bounds;

import org.minorant.core.Enclosure;

/** Powers of enclosed numbers that are not negative, by repeated squaring: at any depth, with every rounding outward. */
final class Powers {

    private Powers() {}

    static Enclosure of(Enclosure base, int n) {
        Enclosure result = Enclosure.ONE;
        Enclosure square = base;
        for (int k = n; k > 0; k >>= 1) {
            if ((k & 1) == 1) {
                result = result.times(square);
            }
            if (k > 1) {
                square = square.square();
            }
        }
        return result;
    }
}
