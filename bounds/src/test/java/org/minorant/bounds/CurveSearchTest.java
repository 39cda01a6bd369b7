package org.minorant.bounds;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.math.MathContext;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;

/** Roots, suprema and infima of curves with closed forms: every enclosure contains the closed form, evaluated in decimal arithmetic. */
final class CurveSearchTest {

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

    /** t/(1 + t) = ε at ε/(1 − ε). */
    @ParameterizedTest
    @ValueSource(doubles = {1e-9, 0.01, 0.3, 0.5, 0.9, 0.999999})
    void rootOfASmoothCurve(double level) {
        BigDecimal exact = decimal(level).divide(BigDecimal.ONE.subtract(decimal(level)), DIGITS);
        WideDouble low = WideDouble.of(1e-12);
        WideDouble high = WideDouble.of(1e12);
        contains(CurveRoot.of(SMOOTH, level, low, high), exact, 1e-14 / (1 - level));
        if (level < 0.95) {
            contains(CurveRoot.of(blurred(SMOOTH, 1e-6), level, low, high), exact, 1e-5 / (1 - level));
        } else {
            // the blurred curve never exceeds this level with certainty
            assertEquals(
                    1e12, CurveRoot.of(blurred(SMOOTH, 1e-6), level, low, high).upper());
        }
    }

    /** A flat piece at the level: the largest t is at its end. */
    @Test
    void rootBehindAFlatPiece() {
        Curve c = t -> point(t).min(Enclosure.ONE).max(point(t).times(0.125));
        Enclosure root = CurveRoot.of(c, 1, WideDouble.of(0.5), WideDouble.of(100));
        assertTrue(root.contains(8.0), root.toIntervalString(17));
        assertTrue(root.relativeWidth() < 1e-14);
    }

    /** sup of t/(1 + t) − rt is (1 − √r)². */
    @ParameterizedTest
    @ValueSource(doubles = {1e-300, 1e-12, 0.01, 0.25, 0.8, 0.999})
    void supremumOfASmoothCurve(double rate) {
        BigDecimal exact = BigDecimal.ONE.subtract(decimal(rate).sqrt(DIGITS)).pow(2);
        Curve g = t -> SMOOTH.at(t).minus(point(t).times(rate));
        WideDouble end = WideDouble.of(1).dividedByUp(WideDouble.of(rate));
        double slack = 1e-12 / exact.doubleValue();
        contains(ConcaveMaximum.of(g, end, WideDouble.ZERO), exact, slack);
        Curve blurred = t -> blurred(SMOOTH, 1e-8).at(t).minus(point(t).times(rate));
        contains(ConcaveMaximum.of(blurred, end, WideDouble.ZERO), exact, 1e-6 / exact.doubleValue());
    }

    /** min(at, b + ct) − rt has its peak at the kink t = b/(a − c), at every scale. */
    @ParameterizedTest
    @CsvSource({"1, 0.5, 0.25, 0.5", "0.875, 0.125, 0, 0.001", "1, 1e-280, 0, 0.25", "1, 1e-9, 0.99999, 0.999991"})
    void supremumAtAKink(double a, double b, double c, double rate) {
        Curve g = t -> point(t).times(a)
                .min(Enclosure.exact(b).plus(point(t).times(c)))
                .minus(point(t).times(rate));
        BigDecimal kink = decimal(b).divide(decimal(a).subtract(decimal(c)), DIGITS);
        BigDecimal exact = decimal(a).subtract(decimal(rate)).multiply(kink);
        Enclosure found = ConcaveMaximum.of(g, WideDouble.of(1 / rate), WideDouble.ZERO);
        contains(found, exact, 1e-9);
    }

    /** A corner with structure at 1e-9 of the peak's position: found, as closer samples are taken where chords do not meet. */
    @Test
    void supremumAtARoundedCorner() {
        double h = 1e-9;
        // 1 − √((t−1)² + h²) + (t − 1)/2 is concave; shifted so that it vanishes at 0
        Enclosure start = Enclosure.exact(h).times(h).plus(Enclosure.ONE).sqrt().plus(Enclosure.exact(0.5));
        Curve g = t -> {
            Enclosure x = point(t).minus(Enclosure.ONE);
            Enclosure root = x.times(x)
                    .max(Enclosure.ZERO)
                    .plus(Enclosure.exact(h).times(h))
                    .sqrt();
            return x.times(0.5).minus(root).plus(start);
        };
        // −h √3/2 at the peak, plus the shift √(1 + h²) + ½
        BigDecimal hh = decimal(h);
        BigDecimal exact = BigDecimal.ONE
                .add(hh.multiply(hh))
                .sqrt(DIGITS)
                .add(decimal(0.5))
                .subtract(hh.multiply(BigDecimal.valueOf(3).sqrt(DIGITS)).multiply(decimal(0.5)));
        contains(ConcaveMaximum.of(g, WideDouble.of(8), WideDouble.ZERO), exact, 1e-12);
    }

    @Test
    void supremumOfNothing() {
        Enclosure zero = ConcaveMaximum.of(t -> point(t).times(-0.5), WideDouble.of(4), WideDouble.ZERO);
        assertEquals(0, zero.lower());
        assertTrue(zero.upper() < 1e-300);
    }

    /** What holds to the right of the last sample is the caller's word. */
    @Test
    void supremumBeyondTheEnd() {
        Enclosure s = ConcaveMaximum.of(t -> point(t), WideDouble.of(4), WideDouble.of(7));
        assertEquals(4, s.lower());
        assertEquals(7, s.upper());
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
