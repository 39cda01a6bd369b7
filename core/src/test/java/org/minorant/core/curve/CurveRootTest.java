package org.minorant.core.curve;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.minorant.core.curve.Curves.SMOOTH;
import static org.minorant.core.curve.Curves.contains;
import static org.minorant.core.curve.Curves.decimal;
import static org.minorant.core.curve.Curves.point;

import java.math.BigDecimal;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;

/** Crossings of curves with closed forms. */
final class CurveRootTest {

    private static final WideDouble LOW = WideDouble.of(1e-12);
    private static final WideDouble HIGH = WideDouble.of(1e12);

    private static Enclosure root(Curve c, double level, double gap) {
        return CurveRoot.of(c, WideDouble.of(level), LOW, HIGH, gap);
    }

    /** t/(1 + t) = ε at ε/(1 − ε). */
    private static BigDecimal exact(double level) {
        return decimal(level).divide(BigDecimal.ONE.subtract(decimal(level)), Curves.DIGITS);
    }

    @ParameterizedTest
    @ValueSource(doubles = {1e-9, 0.01, 0.3, 0.5, 0.9, 0.999999})
    void rootOfASmoothCurve(double level) {
        contains(root(SMOOTH, level, 0), exact(level), 1e-14 / (1 - level));
        Curve blurred = Curves.blurred(SMOOTH, 1e-6);
        if (level < 0.95) {
            contains(root(blurred, level, 0), exact(level), 1e-5 / (1 - level));
            Curve guessed = blurred.withGuess(Curves.middle(SMOOTH));
            contains(root(guessed, level, 0), exact(level), 1e-5 / (1 - level));
        } else {
            // the blurred curve never exceeds this level with certainty
            assertEquals(1e12, root(blurred, level, 0).upper());
        }
    }

    /** A good guess costs 2 or 3 values to a tolerance, and 3 to 5 to full precision. */
    @ParameterizedTest
    @ValueSource(doubles = {1e-9, 0.01, 0.3, 0.5, 0.9, 0.999})
    void goodGuesses(double level) {
        Curves.Counted toTolerance = new Curves.Counted(SMOOTH.withGuess(Curves.middle(SMOOTH)));
        contains(root(toTolerance, level, 1e-9), exact(level), 1.01e-9);
        assertTrue(toTolerance.values() <= 3, () -> toTolerance.values() + " values");
        Curves.Counted full = new Curves.Counted(SMOOTH.withGuess(Curves.middle(SMOOTH)));
        contains(root(full, level, 0), exact(level), 1e-14 / (1 - level));
        assertTrue(full.values() <= 5, () -> full.values() + " values");
        Curves.Counted alone = new Curves.Counted(SMOOTH);
        contains(root(alone, level, 1e-9), exact(level), 1.01e-9);
        assertTrue(alone.values() <= 20, () -> alone.values() + " values");
    }

    /** 2^-660 t/(1 + 2^-660 t): the crossing lies near 1e196. */
    @Test
    void farOut() {
        Curve deep = t -> SMOOTH.at(t.timesPowerOfTwo(-660));
        BigDecimal exact = exact(0.001).multiply(BigDecimal.valueOf(2).pow(660));
        WideDouble level = WideDouble.of(0.001);
        WideDouble end = WideDouble.of(1, 2000);
        Curves.Counted counted = new Curves.Counted(deep.withGuess(Curves.middle(deep)));
        contains(CurveRoot.of(counted, level, WideDouble.ONE, end, 1e-9), exact, 1.01e-9);
        assertTrue(counted.values() <= 3, () -> counted.values() + " values");
        contains(CurveRoot.of(deep, level, WideDouble.ONE, end, 0), exact, 1e-14);
    }

    @Test
    void adversarialGuesses() {
        Guess[] guesses = Curves.wrongGuesses(SMOOTH);
        for (int k = 0; k < guesses.length; k++) {
            String what = "guess " + k;
            for (double level : new double[] {1e-9, 0.3, 0.9}) {
                Curves.Counted counted = new Curves.Counted(SMOOTH.withGuess(guesses[k]));
                contains(root(counted, level, 1e-9), exact(level), 1.01e-9);
                assertTrue(counted.values() <= 30, () -> what + ": " + counted.values() + " values");
            }
        }
    }

    /** A flat piece at the level: the largest t is at its end. */
    @Test
    void rootBehindAFlatPiece() {
        Curve c = t -> point(t).min(Enclosure.ONE).max(point(t).times(0.125));
        Enclosure root = CurveRoot.of(c, WideDouble.ONE, WideDouble.of(0.5), WideDouble.of(100), 0);
        assertTrue(root.contains(8.0), root.toIntervalString(17));
        assertTrue(root.relativeWidth() < 1e-14);
    }

    /** What lies below the least point is not looked at; the ends say whether the crossing may lie there. */
    @Test
    void rootsBeforeTheRange() {
        WideDouble two = WideDouble.of(2);
        for (Curve c : new Curve[] {SMOOTH, SMOOTH.withGuess(Curves.middle(SMOOTH))}) {
            assertEquals(Enclosure.of(WideDouble.ZERO, two), CurveRoot.of(c, WideDouble.of(0.5), two, HIGH, 0));
            // at 2, whether the value lies below 2/3 cannot be told
            Enclosure unsure = CurveRoot.of(Curves.blurred(c, 1e-9), WideDouble.of(2 / 3.0), two, HIGH, 0);
            assertTrue(unsure.lower() == 0 && unsure.upper() > 2 && unsure.upper() < 2 + 1e-7, unsure::toString);
        }
    }
}
