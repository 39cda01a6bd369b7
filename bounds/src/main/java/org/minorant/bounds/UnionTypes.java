package org.minorant.bounds;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import java.util.stream.IntStream;
import java.util.stream.Stream;
import org.minorant.core.InvalidInputException;

/**
 * Goes through the joint types of a codeword and an output: for each its probability and the probability T that another codeword, drawn from the input, is at least as likely.
 *
 * <p>T depends on the output only through the numbers m_c of outcomes in each class c. Given these, another codeword's types are independent over the classes; with D the decoder's metric, T is the sum of
 * their probabilities over types with a metric of at least D, of which ties are decided exactly ({@link TieKeys}).
 *
 * <p><b>Left out.</b> Types with a count outside its window have probability at most twice e^(−depth) for each window. Of T they make at most e^(−D) Z times the same bound, with Z the mean of e^D over the input: the
 * laws e^D P/Z are those of the letters given the outcomes, for which the windows are made.
 */
final class UnionTypes {

    /** Types for one output, sorted with their places in the low bits of a long. */
    private static final int PLACES = 24;

    /** About a minute's work. */
    private static final double MOST_TYPES = 5e8;

    private static final int MOST_OUTPUTS = 1_000_000;

    private static final int BLOCK = 1 << 20;

    private static final double U = 0x1p-53;

    private final int n;
    private final List<LikelihoodClass> classes;
    private final List<ClassTypes> types = new ArrayList<>();
    private final CountWindow[] outer;
    private final boolean hasKeys;
    private final double depth;
    private final double unsure;
    private final TypeTable factorials;

    UnionTypes(List<LikelihoodClass> classes, int n, double depth) {
        this.n = n;
        this.classes = classes;
        this.depth = depth;
        this.outer = new CountWindow[classes.size()];
        double[] totals = classes.stream().mapToDouble(LikelihoodClass::total).toArray();
        double total = Arrays.stream(totals).sum();
        for (int c = 0; c < totals.length; c++) {
            double rest = 0;
            for (int d = 0; d < totals.length; d++) {
                rest += d == c ? 0 : totals[d];
            }
            outer[c] = CountWindow.of(n, totals[c] / total, rest / total, depth);
        }
        Optional<long[]> keys = keys();
        hasKeys = keys.isPresent();
        int used = 0;
        double largest = 0;
        for (int c = 0; c < outer.length; c++) {
            int levels = classes.get(c).levels();
            long[] own = hasKeys ? Arrays.copyOfRange(keys.get(), used, used + levels) : new long[levels];
            types.add(new ClassTypes(classes.get(c), own, outer[c].to(), depth));
            largest = Math.max(largest, Math.abs(classes.get(c).ln(levels - 1)));
            used += levels;
        }
        // each logarithm is within three roundings, its multiples and their sums within two for each term
        double terms = Math.min(used, n) + Math.min(outer.length, n);
        unsure = n * (2 * U + (2 * terms + 8) * U * largest);
        factorials = TypeTable.factorials(n);
    }

    private Optional<long[]> keys() {
        double[] numerators = classes.stream()
                .flatMapToDouble(c -> Arrays.stream(c.likelihood()))
                .toArray();
        double[] denominators = classes.stream()
                .flatMapToDouble(c -> IntStream.range(0, c.levels()).mapToDouble(j -> c.likelihood()[0]))
                .toArray();
        return TieKeys.of(numerators, denominators, n);
    }

    /** Whether there are not too many types. */
    boolean fits() {
        List<int[]> outputs = outputs();
        return outputs.size() <= MOST_OUTPUTS && fits(sizes(outputs));
    }

    private static boolean fits(double[] sizes) {
        return Arrays.stream(sizes).sum() <= MOST_TYPES
                && Arrays.stream(sizes).max().orElse(0) < 1 << PLACES;
    }

    private double[] sizes(List<int[]> outputs) {
        return outputs.stream().mapToDouble(this::count).toArray();
    }

    private List<int[]> outputs() {
        List<int[]> outputs = new ArrayList<>();
        enumerate(outputs, new int[outer.length], 0, n);
        return outputs;
    }

    /** Collects all types that matter. */
    UnionBins bins() {
        List<int[]> outputs = outputs();
        if (outputs.size() > MOST_OUTPUTS) {
            throw tooMany("more than " + MOST_OUTPUTS + " types of outputs in " + n + " uses");
        }
        double[] sizes = sizes(outputs);
        if (!fits(sizes)) {
            double all = Arrays.stream(sizes).sum();
            throw tooMany(String.format(java.util.Locale.ROOT, "about %.0e joint types in %d uses", all, n));
        }
        UnionBins bins = new UnionBins();
        int next = 0;
        while (next < outputs.size()) {
            int from = next;
            double work = 0;
            while (next < outputs.size() && (next == from || work + sizes[next] <= BLOCK)) {
                work += sizes[next++];
            }
            // made on all threads, added up in order
            Stream<UnionTails> tails = IntStream.range(from, next).parallel().mapToObj(i -> tails(outputs.get(i)));
            tails.toList().forEach(bins::add);
        }
        bins.leftOut(leftOut());
        return bins;
    }

    private static InvalidInputException tooMany(String found) {
        return new InvalidInputException(
                "CodingBounds.randomCodingUnion",
                found,
                String.format(java.util.Locale.ROOT, "at most %.0e that matter", MOST_TYPES),
                "take fewer uses, or the dependence-testing bound");
    }

    /** What the windows leave out of all probability. */
    private double leftOut() {
        int cut = 0;
        for (int c = 0; c < outer.length; c++) {
            cut += (outer[c].size() <= n ? 1 : 0)
                    + IntStream.rangeClosed(outer[c].from(), outer[c].to())
                            .map(types.get(c)::cut)
                            .max()
                            .orElse(0);
        }
        return 2 * cut * Math.exp(-depth);
    }

    private double count(int[] m) {
        double count = 1;
        for (int c = 0; c < m.length; c++) {
            count *= m[c] == 0 ? 1 : types.get(c).count(m[c]);
        }
        return count;
    }

    /** Stops with one output too many. */
    private void enumerate(List<int[]> found, int[] m, int c, int left) {
        if (found.size() > MOST_OUTPUTS) {
            return;
        }
        if (c == m.length - 1) {
            if (left >= outer[c].from() && left <= outer[c].to()) {
                m[c] = left;
                found.add(m.clone());
            }
            return;
        }
        for (int k = outer[c].from(); k <= Math.min(left, outer[c].to()); k++) {
            m[c] = k;
            enumerate(found, m, c + 1, left - k);
        }
    }

    private UnionTails tails(int[] m) {
        TypeList list = TypeList.one();
        double multiplicity = 1;
        long exponent = 0;
        double whole = 1;
        long wholeExponent = 0;
        int cut = 0;
        for (int c = 0; c < m.length; c++) {
            if (m[c] == 0) {
                continue;
            }
            list = list.times(types.get(c).types(m[c]));
            cut += types.get(c).cut(m[c]);
            multiplicity *= factorials.significand(m[c]);
            exponent += factorials.exponent(m[c]) + Math.getExponent(multiplicity);
            multiplicity = Math.scalb(multiplicity, -Math.getExponent(multiplicity));
            whole *= types.get(c).whole().significand(m[c]);
            wholeExponent += types.get(c).whole().exponent(m[c]) + Math.getExponent(whole);
            whole = Math.scalb(whole, -Math.getExponent(whole));
        }
        double missed = 2 * cut * Math.exp(-depth) * 1.001 * whole;
        return UnionTails.of(
                list, hasKeys, unsure, new double[] {factorials.significand(n), multiplicity, missed}, new long[] {
                    factorials.exponent(n), exponent, wholeExponent
                });
    }
}
