package org.minorant.bounds;

import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.math.MathContext;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;
import org.minorant.core.curve.Curve;

/** Infima of curves with closed forms: every enclosure contains the closed form, evaluated in decimal arithmetic. */
final class ChordSearchTest {

    /** Enough for quotients of doubles that terminate to do so. */
    private static final MathContext DIGITS = new MathContext(1500);

    /** t/(1 + t), smooth, known to a few roundings. */
    private static final Curve SMOOTH = t -> point(t).dividedBy(point(t).plus(Enclosure.ONE));

    private static Enclosure point(WideDouble t) {
        return Enclosure.of(t, t);
    }

    /** The same curve, each value widened by a relative amount: less is known of it. */
    private static Curve blurred(Curve c, double relative) {
        return t -> c.at(t).times(Enclosure.of(1 - relative, 1 + relative));
    }

    private static BigDecimal decimal(double v) {
        return new BigDecimal(v);
    }

    private static void contains(Enclosure e, BigDecimal value, double width) {
        assertTrue(e.contains(value), () -> e.toIntervalString(17) + " misses " + value);
        assertTrue(e.relativeWidth() < width, () -> "width of " + e.toIntervalString(17));
    }

    /** For f = t/(1 + t): inf of s f(s)/(s − t) is 4t/(1 + t)² at s = 2t/(1 − t), for t < 1, and 1 beyond. */
    @ParameterizedTest
    @ValueSource(doubles = {1e-200, 1e-6, 0.1, 0.5, 0.9, 3})
    void leastErrorOfASmoothCurve(double t) {
        BigDecimal onePlus = BigDecimal.ONE.add(decimal(t));
        BigDecimal exact =
                t < 1 ? decimal(4).multiply(decimal(t)).divide(onePlus.multiply(onePlus), DIGITS) : BigDecimal.ONE;
        Enclosure found = ChordSearch.leastError(SMOOTH, WideDouble.of(t));
        contains(found, exact, 1e-9);
        contains(ChordSearch.leastError(blurred(SMOOTH, 1e-7), WideDouble.of(t)), exact, 1e-6);
    }

    /** The same inverted: t = (2 − ε − 2√(1 − ε))/ε. */
    @ParameterizedTest
    @ValueSource(doubles = {1e-6, 0.1, 0.5, 0.9})
    void largestThresholdOfASmoothCurve(double epsilon) {
        BigDecimal e = decimal(epsilon);
        BigDecimal root = BigDecimal.ONE.subtract(e).sqrt(DIGITS);
        BigDecimal exact =
                decimal(2).subtract(e).subtract(root.multiply(decimal(2))).divide(e, DIGITS);
        WideDouble end = WideDouble.of(epsilon / (1 - epsilon) * (1 + 1e-12));
        contains(ChordSearch.largestThreshold(SMOOTH, epsilon, end), exact, 1e-9);
    }

    /** For f = min(t, 1): 4t up to t = ¼, then 1. */
    @ParameterizedTest
    @CsvSource({"0.125, 0.5", "0.25, 1", "0.375, 1", "0.75, 1"})
    void leastErrorWithAKink(double t, double expected) {
        Curve f = s -> point(s).min(Enclosure.ONE);
        contains(ChordSearch.leastError(f, WideDouble.of(t)), decimal(expected), 1e-9);
    }
}
