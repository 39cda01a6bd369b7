package org.minorant.study;

import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.function.Function;
import java.util.regex.Pattern;

/** The words of one line behind its keyword, taken one after the other; every refusal names the line. */
final class StudyWords {

    private static final Pattern NAME = Pattern.compile("[A-Za-z0-9][A-Za-z0-9_-]{0,39}");

    private static final Pattern DECIMAL = Pattern.compile("[0-9]{1,40}(\\.[0-9]{1,40})?([eE][+-]?[0-9]{1,4})?");

    private static final Pattern WHOLE = Pattern.compile("[0-9]{1,18}");

    /** For each prior; what the library allows an ensemble, since decimals seldom sum to one exactly as doubles. */
    private static final double PRIOR_ROUNDING = 0x1p-50;

    /** What the library takes where it is cheapest. */
    private static final int MOST_COPIES = 1_000_000;

    private final Path path;
    private final int line;
    private final String keyword;
    private String rest;

    StudyWords(Path path, int line, String keyword, String rest) {
        this.path = path;
        this.line = line;
        this.keyword = keyword;
        this.rest = rest;
    }

    int line() {
        return line;
    }

    String keyword() {
        return keyword;
    }

    BadInputException fault(String message) {
        return BadInputException.at(path, line, message);
    }

    boolean hasNext() {
        return !rest.isEmpty();
    }

    /** The next word. */
    String next(String what) {
        if (rest.isEmpty()) {
            throw fault("the line ends where " + what + " should stand");
        }
        String[] parts = rest.split("\\s+", 2);
        rest = parts.length < 2 ? "" : parts[1];
        return parts[0];
    }

    /** All that is left, spaces included. */
    String rest(String what) {
        if (rest.isEmpty()) {
            throw fault("the line ends where " + what + " should stand");
        }
        String all = rest;
        rest = "";
        return all;
    }

    void expect(String word) {
        String found = next("'" + word + "'");
        if (!found.equals(word)) {
            throw fault("found " + OneLine.quote(found) + " where '" + word + "' should stand");
        }
    }

    void end() {
        if (!rest.isEmpty()) {
            throw fault(OneLine.quote(rest) + " is left over at the end of the line");
        }
    }

    String name() {
        String name = next("a name");
        if (!NAME.matcher(name).matches()) {
            throw fault(OneLine.quote(name)
                    + " is not a name; use up to 40 letters, digits, '-' and '_', beginning with a letter or digit");
        }
        return name;
    }

    double decimal(String word) {
        if (!DECIMAL.matcher(word).matches()) {
            throw fault(OneLine.quote(word) + " is not a number; write it like 0.25 or 1e-3");
        }
        return Double.parseDouble(word);
    }

    double probability(String word) {
        double p = decimal(word);
        if (!(p >= 0 && p <= 1)) {
            throw fault(OneLine.quote(word) + " is not a probability; give a number between 0 and 1");
        }
        return p;
    }

    double level(String word) {
        double p = decimal(word);
        if (!(p > 0 && p < 1)) {
            throw fault(OneLine.quote(word) + " is not an error level; give a number above 0 and below 1");
        }
        return p;
    }

    long count(String word) {
        if (!WHOLE.matcher(word).matches() || Long.parseLong(word) < 2) {
            throw fault(OneLine.quote(word) + " is not a number of messages; give a whole number from 2 to 10^18");
        }
        return Long.parseLong(word);
    }

    int uses(String word) {
        return repeats(word, "uses");
    }

    int copies(String word) {
        return repeats(word, "copies");
    }

    private int repeats(String word, String what) {
        if (!WHOLE.matcher(word).matches() || Long.parseLong(word) < 1 || Long.parseLong(word) > MOST_COPIES) {
            throw fault(OneLine.quote(word) + " is not a number of " + what + "; give a whole number from 1 to "
                    + MOST_COPIES);
        }
        return Integer.parseInt(word);
    }

    void sumToOne(List<Double> priors) {
        double sum = priors.stream().mapToDouble(Double::doubleValue).sum();
        if (!(Math.abs(sum - 1) <= priors.size() * PRIOR_ROUNDING)) {
            throw fault("the priors sum to " + sum + ", expected 1; correct them, or give none for equal priors");
        }
    }

    /** The rest of the line as a list that rises strictly, so that tables and charts read in one direction. */
    <T extends Comparable<T>> List<T> increasing(String what, Function<String, T> parse) {
        List<T> all = new ArrayList<>();
        do {
            String word = next(what);
            T value = parse.apply(word);
            if (!all.isEmpty() && value.compareTo(all.get(all.size() - 1)) <= 0) {
                throw fault(
                        OneLine.quote(word) + " does not exceed the value before it; give them in increasing order");
            }
            all.add(value);
        } while (hasNext());
        return all;
    }
}
