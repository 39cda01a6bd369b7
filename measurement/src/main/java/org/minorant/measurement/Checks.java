package org.minorant.measurement;

import java.util.List;
import org.minorant.core.HermitianOperator;
import org.minorant.core.InvalidInputException;

/** The checks at this package's door; each refusal names what was found, the limit and the cure, and NaN fails it. */
final class Checks {

    private Checks() {}

    /** Refuses a number outside a closed range. */
    static double inRange(String asked, String name, double value, double least, double most) {
        if (!(value >= least && value <= most)) {
            throw new InvalidInputException(
                    asked, name + " is " + value, "between " + least + " and " + most, "give a number in that range");
        }
        return value;
    }

    /** Refuses an index outside a list. */
    static int index(String asked, String name, int index, int size) {
        if (index < 0 || index >= size) {
            throw new InvalidInputException(
                    asked, name + " is " + index, "between 0 and " + (size - 1), "count from 0");
        }
        return index;
    }

    /** Refuses an empty list. */
    static void notEmpty(String asked, String what, List<?> list) {
        if (list.isEmpty()) {
            throw new InvalidInputException(asked, "there is no " + what, "at least one", "give at least one");
        }
    }

    /** Refuses an operator on another space. */
    static void dimension(String asked, String name, HermitianOperator a, int dimension) {
        if (a.dimension() != dimension) {
            throw new InvalidInputException(
                    asked,
                    name + " has dimension " + a.dimension(),
                    dimension + ", as the others",
                    "all must act on the same space");
        }
    }

    /** Refuses probabilities that are negative, not finite, or do not sum to one within the tolerance. */
    static void probabilities(String asked, double[] p, double tolerance) {
        double sum = 0;
        for (int i = 0; i < p.length; i++) {
            inRange(asked, "probability " + i, p[i], 0, 1);
            sum += p[i];
        }
        if (!(Math.abs(sum - 1) <= tolerance)) {
            throw new InvalidInputException(
                    asked, "the probabilities sum to " + sum, "1 within " + tolerance, "divide them by their sum");
        }
    }
}
