package org.minorant.bounds;

import org.minorant.core.HermitianOperator;
import org.minorant.core.InvalidInputException;

/** The checks at this package's door; each refusal names what was found, the limit and the cure, and NaN fails it. */
final class Checks {

    private Checks() {}

    /** Refuses a blank text. */
    static void text(String asked, String name, String value) {
        if (value.isBlank()) {
            throw new InvalidInputException(asked, name + " is blank", "a text", "say what it is");
        }
    }

    /** Refuses a number outside a closed range. */
    static double inRange(String asked, String name, double value, double least, double most) {
        if (!(value >= least && value <= most)) {
            throw new InvalidInputException(
                    asked, name + " is " + value, "between " + least + " and " + most, "give a number in that range");
        }
        return value;
    }

    /** Refuses operators on different spaces. */
    static void sameSpace(String asked, HermitianOperator a, HermitianOperator b) {
        if (a.dimension() != b.dimension()) {
            throw new InvalidInputException(
                    asked,
                    "the second operator has dimension " + b.dimension(),
                    a.dimension() + ", as the first",
                    "both must act on the same space");
        }
    }
}
