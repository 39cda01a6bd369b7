package org.minorant.study;

import java.util.ArrayList;
import java.util.List;
import org.minorant.bounds.Side;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;
import org.minorant.measurement.Ensemble;
import org.minorant.measurement.PrettyGoodMeasurement;
import org.minorant.study.StudyFile.EnsembleLine;

/**
 * What there is to know of telling several states apart. For two states the least error is known; for more, how far that of the pretty-good
 * measurement can be from it.
 */
final class EnsembleSection {

    private static final String QUANTITY = "pretty-good measurement";

    private EnsembleSection() {}

    static Section of(EnsembleLine line, States states) {
        double[] priors =
                line.priors().stream().mapToDouble(Double::doubleValue).toArray();
        PrettyGoodMeasurement measurement = PrettyGoodMeasurement.of(Ensemble.of(states.get(line.states()), priors));
        Rows rows = new Rows();
        leastError(rows, measurement);
        rows.exact(QUANTITY, "its error", measurement.errorProbability(), Unit.PROBABILITY, Citation.PRETTY_GOOD);
        loss(rows, measurement);
        rows.exact(
                QUANTITY,
                "mutual information of state and outcome",
                measurement.jointDistribution().mutualInformation().bits(),
                Unit.BITS,
                Citation.PRETTY_GOOD);
        List<String> parts = new ArrayList<>();
        for (int i = 0; i < line.states().size(); i++) {
            parts.add(line.states().get(i) + " (prior " + line.priors().get(i) + ")");
        }
        return new Section("ensemble", line.name(), String.join(", ", parts), rows.all(), List.of());
    }

    private static void leastError(Rows rows, PrettyGoodMeasurement measurement) {
        String quantity = "minimum error";
        Enclosure least = measurement.optimalErrorProbability();
        if (measurement.ensemble().size() == 2) {
            rows.exact(quantity, "", least, Unit.PROBABILITY, Citation.HELSTROM);
            return;
        }
        Enclosure error = measurement.errorProbability();
        rows.bound(quantity, "", Side.LOWER, point(least.lowerWide()), Unit.PROBABILITY, Citation.BARNUM_KNILL);
        rows.bound(quantity, "", Side.UPPER, error, Unit.PROBABILITY, Citation.PRETTY_GOOD);
    }

    /** For two states both numbers are known, for more only how large they can be. */
    private static void loss(Rows rows, PrettyGoodMeasurement measurement) {
        // the difference cannot be negative, rounding can make it look so
        Enclosure lost = measurement
                .errorProbability()
                .minus(measurement.optimalErrorProbability())
                .clip(0, 1);
        Enclosure ratio = measurement.barnumKnillRatio();
        boolean known = measurement.ensemble().size() == 2;
        Side side = known ? Side.EXACT : Side.UPPER;
        Citation by = known ? Citation.HELSTROM : Citation.BARNUM_KNILL;
        Unit difference = Unit.PROBABILITY_DIFFERENCE;
        rows.bound(QUANTITY, "what it loses", side, known ? lost : point(lost.upperWide()), difference, by);
        rows.bound(
                QUANTITY, "error over minimum error", side, known ? ratio : point(ratio.upperWide()), Unit.RATIO, by);
    }

    /** A bound that is known as one number, rounded to its safe side. */
    private static Enclosure point(WideDouble bound) {
        return Enclosure.of(bound, bound);
    }
}
