package org.minorant.bounds;

import java.util.List;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;
import org.minorant.core.InvalidInputException;

/** The checks at the door of channels and coding bounds; NaN fails every one. */
final class ChannelChecks {

    /** Sums of n probabilities may miss one by n times this. */
    private static final double SUM_ROUNDING = 0x1p-50;

    /** Logarithms beyond this have no exponential in the range of the library's numbers. */
    private static final double LARGEST_LOGARITHM = 7e8;

    private ChannelChecks() {}

    /** Refuses an empty list and states of different dimensions. */
    static void outputs(String asked, List<DensityOperator> outputs) {
        if (outputs.isEmpty()) {
            throw noLetter(asked, "give one output state for each input letter");
        }
        int d = outputs.get(0).dimension();
        for (int x = 1; x < outputs.size(); x++) {
            if (outputs.get(x).dimension() != d) {
                throw new InvalidInputException(
                        asked,
                        "output " + x + " has dimension " + outputs.get(x).dimension(),
                        d + ", as output 0",
                        "all outputs must be states of one system");
            }
        }
    }

    /** Returns a copy of a probability distribution on the letters. */
    static double[] input(String asked, double[] p, int letters) {
        if (p.length != letters) {
            throw new InvalidInputException(
                    asked,
                    "the input has " + p.length + " entries",
                    letters + ", one for each letter",
                    "give one probability for each letter, 0 for an unused one");
        }
        return distribution(asked, "the input", p);
    }

    /** Returns a copy of a stochastic matrix. */
    static double[][] rows(String asked, double[][] rows) {
        if (rows.length == 0) {
            throw noLetter(asked, "give one row of probabilities for each input letter");
        }
        double[][] copy = new double[rows.length][];
        for (int x = 0; x < rows.length; x++) {
            copy[x] = row(asked, x, rows[x], rows[0].length);
        }
        return copy;
    }

    private static double[] row(String asked, int x, double[] row, int outcomes) {
        if (row.length == 0) {
            throw new InvalidInputException(
                    asked, "row " + x + " is empty", "at least 1 outcome", "give one probability for each outcome");
        }
        if (row.length != outcomes) {
            throw new InvalidInputException(
                    asked,
                    "row " + x + " has " + row.length + " entries",
                    outcomes + ", one for each outcome",
                    "give every row one probability for each outcome");
        }
        return distribution(asked, "row " + x, row);
    }

    private static InvalidInputException noLetter(String asked, String cure) {
        return new InvalidInputException(asked, "the channel has no letter", "at least 1", cure);
    }

    private static double[] distribution(String asked, String name, double[] p) {
        int letters = p.length;
        double sum = 0;
        for (int x = 0; x < letters; x++) {
            if (!(p[x] >= 0 && p[x] < Double.POSITIVE_INFINITY)) {
                throw new InvalidInputException(
                        asked, name + ", entry " + x + " is " + p[x], "at least 0 and finite", "give probabilities");
            }
            sum += p[x];
        }
        double tolerance = letters * SUM_ROUNDING;
        if (!(Math.abs(sum - 1) <= tolerance)) {
            throw new InvalidInputException(
                    asked, name + " sums to " + sum, "1 within " + tolerance, "divide the probabilities by their sum");
        }
        return p.clone();
    }

    /** Refuses an error probability outside (0, 1). */
    static void error(String asked, double epsilon) {
        if (!(epsilon > 0 && epsilon < 1)) {
            throw new InvalidInputException(
                    asked,
                    "the error probability is " + epsilon,
                    "between 0 and 1, both excluded",
                    "give the average error probability that is allowed");
        }
    }

    /** Refuses a number of messages below one. */
    static void messages(String asked, long messages) {
        if (messages < 1) {
            throw new InvalidInputException(
                    asked, "the number of messages is " + messages, "at least 1", "give the size of the code");
        }
    }

    /** Refuses the logarithm of a number of messages below one or beyond all range. */
    static void messages(String asked, Information lnMessages) {
        Enclosure nats = lnMessages.nats();
        if (!(nats.lower() >= 0 && nats.upper() <= LARGEST_LOGARITHM)) {
            throw new InvalidInputException(
                    asked,
                    "the logarithm of the number of messages is " + nats.toIntervalString(6) + " nats",
                    "between 0 (one message) and " + LARGEST_LOGARITHM,
                    "give the logarithm of the size of the code");
        }
    }
}
