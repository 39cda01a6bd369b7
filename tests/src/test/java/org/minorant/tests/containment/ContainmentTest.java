package org.minorant.tests.containment;

import static org.junit.jupiter.api.Assertions.assertAll;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.util.ArrayList;
import java.util.List;
import java.util.stream.IntStream;
import org.junit.jupiter.api.function.Executable;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.EnumSource;
import org.minorant.core.Enclosure;
import org.minorant.tests.reference.Reference;

/**
 * No enclosure of Tr[aA ∧ bB] may miss the arbitrary-precision value: 2000 pairs in every build, spread evenly over the families, and as many as the
 * system property {@code containment.pairs} asks for. Widths and errors of the first 2000 are held to the limits in {@code accuracy-limits.csv}.
 *
 * <p>A failure names the family, the index and every number given; {@code PairFamily.X.draw(index)} makes the same pair again.
 */
class ContainmentTest {

    /** Pairs whose accuracy is tracked, whatever the length of the run. */
    private static final int TRACKED = 2000;

    private static final int FAMILIES = PairFamily.values().length;
    private static final String[] COLUMNS = {
        "largest relative width", "rms relative width", "largest relative error", "rms relative error",
        "largest absolute width", "rms absolute width", "largest absolute error", "rms absolute error"
    };

    private static int perFamily(int pairs) {
        return (pairs + FAMILIES - 1) / FAMILIES;
    }

    @ParameterizedTest
    @EnumSource
    void everyEnclosureHoldsTheTrueValue(PairFamily family) {
        int pairs = Math.max(TRACKED, Integer.getInteger("containment.pairs", TRACKED));
        AccuracyTable table = new AccuracyTable();
        List<String> escapes = new ArrayList<>();
        for (int i = 0; i < perFamily(pairs); i++) {
            PairCase pair = family.draw(i);
            Reference reference = pair.reference();
            Enclosure answer;
            try {
                answer = pair.answer();
            } catch (RuntimeException e) {
                escapes.add(family + ".draw(" + i + ") threw " + e + "\n" + pair);
                continue;
            }
            if (!reference.isCompatibleWith(answer)) {
                escapes.add(family + ".draw(" + i + ") is " + reference + ", but was enclosed in [" + answer.lowerWide()
                        + ", " + answer.upperWide() + "]\n" + pair);
            }
            if (i < perFamily(TRACKED)) {
                table.add(pair, answer, reference);
            }
        }
        assertTrue(
                escapes.isEmpty(),
                () -> escapes.size() + " of " + perFamily(pairs) + " escaped, the first: " + escapes.get(0));
        if (Boolean.getBoolean("containment.limits")) {
            // the one way to renew accuracy-limits.csv: run with -Dcontainment.limits=true and copy these lines
            System.out.println(table.line(family));
            return;
        }
        withinLimits(family, table.summary());
        family.promise().check(table);
    }

    private static void withinLimits(PairFamily family, double[] measured) {
        double[] limits = AccuracyTable.limits(family);
        assertAll(IntStream.range(0, measured.length)
                .<Executable>mapToObj(i -> () -> assertTrue(
                        measured[i] <= limits[i],
                        family + ": " + COLUMNS[i] + " " + measured[i] + ", limit " + limits[i])));
    }

    /** The deep families are as deep as they say: about 1e-60 of the traces. */
    @ParameterizedTest
    @EnumSource(names = {"DEEP_FACTORS", "DEEP_DEPENDENT_FACTORS", "DEEP_ENTRIES"})
    void deepAnswersLieNearTheSixtiethDecade(PairFamily family) {
        for (int i = 0; i < perFamily(TRACKED); i++) {
            PairCase pair = family.draw(i);
            BigDecimal value = pair.reference().value();
            assertTrue(value.compareTo(new BigDecimal("1e-66")) > 0, family + ".draw(" + i + ") is " + value);
            assertTrue(value.compareTo(new BigDecimal("1e-54")) < 0, family + ".draw(" + i + ") is " + value);
        }
    }
}
