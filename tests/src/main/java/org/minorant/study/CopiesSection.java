package org.minorant.study;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.TreeMap;
import java.util.function.IntConsumer;
import org.minorant.bounds.Bound;
import org.minorant.bounds.Divergences;
import org.minorant.bounds.ExponentFit;
import org.minorant.bounds.Ledger;
import org.minorant.bounds.Side;
import org.minorant.bounds.TestingBounds;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;
import org.minorant.measurement.HypothesisPair;
import org.minorant.measurement.RepeatedMeasurement;
import org.minorant.study.StudyFile.CopiesLine;
import org.minorant.study.StudyFile.PairLine;

/**
 * What many copies of one of two states are worth: the exact error beside its bounds, what one fixed measurement of each copy reaches, and how all fall with n.
 *
 * @param section the numbers
 * @param plot the curves against n
 */
record CopiesSection(Section section, CopiesPlot plot) {

    /** Ten certain digits are more than a report needs, and cost less than sixteen. */
    private static final double TOLERANCE = 1e-11;

    /** The numbers of copies that are fitted: the largest, where terms of order 1/n are small. */
    private static final int FITTED = 3;

    /** The quantity of the exact value and its bounds, by the number of copies. */
    static String minimumError(int n) {
        return "minimum error, " + copies(n);
    }

    private static String copies(int n) {
        return n == 1 ? "1 copy" : n + " copies";
    }

    /** Computes everything; the listener is told each number of copies before its turn. */
    static CopiesSection of(CopiesLine line, PairLine asked, States states, IntConsumer progress) {
        HypothesisPair pair = HypothesisPair.of(states.get(asked.first()), states.get(asked.second()))
                .withTolerance(TOLERANCE);
        Rows rows = new Rows();
        CopiesPlot.Builder plot = new CopiesPlot.Builder();
        TreeMap<Integer, Enclosure> errors = new TreeMap<>();
        Map<Integer, Enclosure> found = new TreeMap<>();
        for (int n : line.copies()) {
            progress.accept(n);
            Ledger ledger = TestingBounds.of(pair.copies(n), asked.prior());
            rows.ledger(minimumError(n), "", ledger);
            for (Bound b : ledger) {
                plot.add(b.theorem().name(), b.side(), n, b.value());
            }
            errors.put(n, ledger.exact().orElseThrow().value());
            if (isQubit(pair) && asked.prior() > 0 && asked.prior() < 1) {
                Enclosure e =
                        RepeatedMeasurement.bestFound(pair, n, asked.prior()).minimumError(n, asked.prior());
                found.put(n, e);
                plot.add(Citation.FOUND.method(), Side.UPPER, n, e);
            }
        }
        found.forEach((n, e) ->
                rows.exact("each copy measured alone", copies(n) + ", its error", e, Unit.PROBABILITY, Citation.FOUND));
        found.forEach((n, e) -> {
            Enclosure least = errors.get(n);
            if (least.lowerWide().signum() > 0) {
                rows.exact(
                        "each copy measured alone",
                        copies(n) + ", error over minimum error",
                        e.dividedBy(least).max(Enclosure.ONE),
                        Unit.RATIO,
                        Citation.FOUND);
            }
        });
        errors.forEach((n, e) -> rows.exact(
                "exponent of the minimum error, -(1/n) log2",
                copies(n),
                e.ln().negate().dividedBy(Enclosure.exact(2).ln().times(n)),
                Unit.BITS_PER_COPY,
                Citation.HELSTROM));
        Information chernoff = Divergences.chernoff(pair.first(), pair.second()).value();
        rows.exact("divergence", "Chernoff", chernoff);
        String subject = "several copies of " + asked.first() + " (prior " + asked.prior() + "), or as many of "
                + asked.second();
        return new CopiesSection(
                new Section("copies", line.pair(), subject, rows.all(), notes(chernoff, errors, !found.isEmpty())),
                plot.build(chernoff));
    }

    private static boolean isQubit(HypothesisPair pair) {
        return pair.first().dimension() == 2;
    }

    private static List<String> notes(Information chernoff, TreeMap<Integer, Enclosure> errors, boolean found) {
        List<String> notes = new ArrayList<>();
        if (found) {
            notes.add(
                    "Each copy measured alone: the same projective measurement on each, the best decision on all outcomes. Its error is certain;");
            notes.add("that no other direction does better is not: it is the best that a search found.");
        }
        TreeMap<Integer, Enclosure> last = new TreeMap<>();
        for (int n : errors.descendingKeySet()) {
            if (last.size() < FITTED && errors.get(n).lowerWide().signum() > 0) {
                last.put(n, errors.get(n));
            }
        }
        if (last.size() > 1 && chernoff.nats().isFinite()) {
            ExponentFit fit = ExponentFit.of(chernoff, last);
            double bit = 1 / Math.log(2);
            notes.add(String.format(
                    Locale.ROOT,
                    "Estimated from the last %d: -log2 error = n C + %.3f log2 n + %.3f, within %.1e, with C the Chernoff divergence in bits.",
                    last.size(),
                    fit.power(),
                    fit.constant() * bit,
                    Math.max(fit.largestResidual() * bit, 1e-12)));
        }
        return notes;
    }
}
