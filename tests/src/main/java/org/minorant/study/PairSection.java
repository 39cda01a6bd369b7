package org.minorant.study;

import java.util.List;
import org.minorant.bounds.Divergences;
import org.minorant.bounds.TestingBounds;
import org.minorant.core.Enclosure;
import org.minorant.measurement.BinaryTest;
import org.minorant.measurement.Ensemble;
import org.minorant.measurement.HypothesisPair;
import org.minorant.measurement.PrettyGoodMeasurement;
import org.minorant.study.StudyFile.PairLine;

/**
 * What there is to know of telling two states apart.
 *
 * @param section the numbers
 * @param plot the trade-off curve
 */
record PairSection(Section section, TradeOffPlot plot) {

    /** What the bounds of the ledger are on. */
    static final String MINIMUM_ERROR = "minimum error";

    static PairSection of(PairLine line, States states, List<Double> levels) {
        HypothesisPair pair = HypothesisPair.of(states.get(line.first()), states.get(line.second()));
        Rows rows = new Rows();
        rows.ledger(MINIMUM_ERROR, "", TestingBounds.of(pair, line.prior()));
        prettyGood(rows, pair, line.prior());
        BinaryTest test = pair.helstromTest(line.prior());
        rows.exact(
                "errors of the optimal test", "type I", test.typeOneError(), Unit.PROBABILITY, Citation.HELSTROM_TEST);
        rows.exact(
                "errors of the optimal test", "type II", test.typeTwoError(), Unit.PROBABILITY, Citation.HELSTROM_TEST);
        for (double level : levels) {
            rows.exact(
                    "least type-II error",
                    "type-I error at most " + level,
                    pair.typeTwoError(level),
                    Unit.PROBABILITY,
                    Citation.NEYMAN_PEARSON);
        }
        divergences(rows, pair, line);
        String subject = line.first() + " (prior " + line.prior() + ") or " + line.second();
        List<String> notes =
                List.of("Type I: " + line.first() + " is taken for " + line.second() + ". Type II: the reverse.");
        return new PairSection(new Section("pair", line.name(), subject, rows.all(), notes), TradeOffPlot.of(pair));
    }

    /** What governs the errors when many copies are at hand. */
    private static void divergences(Rows rows, HypothesisPair pair, PairLine line) {
        String quantity = "divergence";
        String ahead = "relative entropy, " + line.first() + " from " + line.second();
        String back = "relative entropy, " + line.second() + " from " + line.first();
        rows.exact(quantity, ahead, Divergences.relativeEntropy(pair.first(), pair.second()));
        rows.exact(quantity, back, Divergences.relativeEntropy(pair.second(), pair.first()));
        rows.exact(
                quantity,
                "Chernoff",
                Divergences.chernoff(pair.first(), pair.second()).value());
    }

    private static void prettyGood(Rows rows, HypothesisPair pair, double prior) {
        Ensemble ensemble = Ensemble.of(List.of(pair.first(), pair.second()), new double[] {prior, 1 - prior});
        PrettyGoodMeasurement measurement = PrettyGoodMeasurement.of(ensemble);
        Enclosure error = measurement.errorProbability();
        Enclosure least = pair.minimumError(prior);
        String quantity = "pretty-good measurement";
        rows.exact(quantity, "its error", error, Unit.PROBABILITY, Citation.PRETTY_GOOD);
        // the difference cannot be negative, rounding can make it look so
        Enclosure lost = error.minus(least).clip(0, 1);
        rows.exact(quantity, "what it loses", lost, Unit.PROBABILITY_DIFFERENCE, Citation.HELSTROM);
        rows.exact(quantity, "error over minimum error", measurement.barnumKnillRatio(), Unit.RATIO, Citation.HELSTROM);
    }
}
