package org.minorant.core.state;

import org.minorant.core.InvalidInputException;

/** Refusals that all families of light share. */
final class LightLimits {

    private LightLimits() {}

    /** Refuses a dimension of which a dense state with its factor does not fit in the heap. */
    static void checkMemory(String asked, int dimension) {
        // entries and a square factor in double-double, complex, and the copies made on the way: about 16 doubles for
        // each entry
        long most = (long) Math.sqrt(Runtime.getRuntime().maxMemory() / 128.0);
        if (dimension > most) {
            throw new InvalidInputException(
                    asked,
                    "the state takes " + dimension + " photon numbers",
                    "at most " + most + " in this heap",
                    "raise the heap (-Xmx), cut off more, or lower the energy");
        }
    }

    /** Refuses a truncation that leaves less than half of the state. */
    static void checkWeight(String asked, int dimension, double discarded) {
        if (!(discarded <= 0.5)) {
            throw new InvalidInputException(
                    asked,
                    "the dimension " + dimension + " discards the weight " + discarded,
                    "at most 0.5",
                    "keep more photon numbers");
        }
    }
}
