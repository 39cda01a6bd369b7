package org.minorant.tests.containment;

import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.util.ArrayList;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.Estimate;
import org.minorant.measurement.HypothesisPair;
import org.minorant.tests.containment.QubitFamily.Qubits;
import org.minorant.tests.reference.Reference;
import org.minorant.tests.reference.ReferenceCopies;

/**
 * No minimum error of n copies of two qubit states may miss the arbitrary-precision value: a few pairs of each family in every build, and as many as the system property
 * {@code copies.pairs} asks for, then to n = 100.
 *
 * <p>A failure names the family, the index, n and the prior; {@code QubitFamily.X.draw(index)} makes the same pair again.
 */
class CopiesContainmentTest {

    private static final int USUAL = 32;
    private static final int[] FEW = {2, 3, 5, 8, 12, 17, 24, 30};
    private static final int[] MANY = {2, 4, 7, 11, 19, 30, 45, 60, 80, 100};
    private static final double[] PRIORS = {0.5, 0.3, 1e-12, 1 - 1e-12, 0.5, 0.97, 1e-3};

    @Test
    void everyMinimumErrorHoldsTheTrueValue() {
        int pairs = Integer.getInteger("copies.pairs", USUAL);
        int[] copies = pairs > USUAL ? MANY : FEW;
        List<String> escapes = new ArrayList<>();
        QubitFamily[] families = QubitFamily.values();
        for (int i = 0; i < pairs; i++) {
            QubitFamily family = families[i % families.length];
            int index = i / families.length;
            // steps prime to the lengths, so that families meet all numbers and priors in turn
            int n = copies[(i + 3 * index) % copies.length];
            double prior = PRIORS[(i + 2 * index) % PRIORS.length];
            check(family + ".draw(" + index + ")", family, family.draw(index), n, prior, escapes);
        }
        assertTrue(escapes.isEmpty(), () -> escapes.size() + " of " + pairs + ", the first: " + escapes.get(0));
    }

    /** Real states, whose reference takes a quarter of the time. */
    @ParameterizedTest
    @CsvSource({"60, 0.9, 0, 0.3, 0.35, 0.5", "60, 0, 0.95, 0.9, -0.3, 0.5"})
    void manyCopies(int n, double x1, double z1, double x2, double z2, double prior) {
        List<String> escapes = new ArrayList<>();
        Qubits q = new Qubits(GivenOperator.ofBloch(x1, 0, z1), GivenOperator.ofBloch(x2, 0, z2));
        check("real states", QubitFamily.BALL, q, n, prior, escapes);
        assertTrue(escapes.isEmpty(), escapes::toString);
    }

    private static void check(String name, QubitFamily family, Qubits q, int n, double prior, List<String> escapes) {
        String where = name + ", " + n + " copies, prior " + prior + ": ";
        BigDecimal p = new BigDecimal(prior);
        Reference f = ReferenceCopies.of(
                p, q.first().meant(), BigDecimal.ONE.subtract(p), q.second().meant(), n);
        try {
            HypothesisPair many = HypothesisPair.of(
                            DensityOperator.of(q.first().operator()),
                            DensityOperator.of(q.second().operator()))
                    .copies(n);
            Enclosure e = many.minimumError(prior);
            if (!f.isCompatibleWith(e)) {
                escapes.add(where + f + " is not in [" + e.lowerWide() + ", " + e.upperWide() + "]\n" + q);
            }
            Estimate quick = many.minimumErrorEstimate(prior);
            if (!isNear(quick, f)) {
                escapes.add(where + f + " is not within the error of " + quick + "\n" + q);
            }
            if (family.isRelative() && !(e.relativeWidth() <= 1e-9)) {
                escapes.add(where + "the relative width is " + e.relativeWidth() + " of " + e + "\n" + q);
            }
        } catch (RuntimeException e) {
            escapes.add(where + e + "\n" + q);
        }
    }

    /** |estimate − f| ≤ relativeError · f, up to the error of f. */
    private static boolean isNear(Estimate quick, Reference f) {
        if (!(quick.relativeError() < Double.POSITIVE_INFINITY)) {
            return true;
        }
        BigDecimal off = quick.wide().toBigDecimal().subtract(f.value()).abs();
        BigDecimal allowed = f.value().abs().multiply(new BigDecimal(quick.relativeError()));
        return off.compareTo(allowed.add(f.error())) <= 0;
    }
}
