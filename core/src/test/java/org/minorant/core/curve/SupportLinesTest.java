package org.minorant.core.curve;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.minorant.core.curve.Curves.SMOOTH;
import static org.minorant.core.curve.Curves.contains;
import static org.minorant.core.curve.Curves.decimal;
import static org.minorant.core.curve.Curves.point;

import java.math.BigDecimal;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;
import org.minorant.core.pair.PositivePair;

/** Suprema of curves with closed forms: every enclosure contains the closed form, whatever the guess; and how many values it takes. */
final class SupportLinesTest {

    private static final double FULL = 0x1p-48;

    private static SupportLines lines(Curve c) {
        return new SupportLines(c, WideDouble.ONE, WideDouble.ONE);
    }

    private static Enclosure supremum(Curve c, double slope, double gap) {
        return lines(c).at(Enclosure.exact(slope), gap, 0).value();
    }

    /** sup of t/(1 + t) − at is (1 − √a)². */
    private static BigDecimal smooth(double slope) {
        return BigDecimal.ONE.subtract(decimal(slope).sqrt(Curves.DIGITS)).pow(2);
    }

    @ParameterizedTest
    @ValueSource(doubles = {1e-300, 1e-12, 0.01, 0.25, 0.8, 0.999})
    void supremumOfASmoothCurve(double slope) {
        BigDecimal exact = smooth(slope);
        contains(supremum(SMOOTH, slope, FULL), exact, 1e-14 / exact.doubleValue());
        // each value of F < 1 is 2e-8 wide, and chords take a few of them
        Curve blurred = Curves.blurred(SMOOTH, 1e-8);
        contains(supremum(blurred, slope, FULL), exact, 2e-7 / exact.doubleValue());
        Curve guessed = blurred.withGuess(Curves.middle(SMOOTH));
        contains(supremum(guessed, slope, FULL), exact, 2e-7 / exact.doubleValue());
    }

    /** If only an enclosure of the slope is known, the result holds for both ends. */
    @Test
    void slopesInAnEnclosure() {
        Enclosure s = lines(SMOOTH).at(Enclosure.of(0.25, 0.2500001), FULL, 0).value();
        contains(s, smooth(0.25), 1e-5);
        contains(s, smooth(0.2500001), 1e-5);
    }

    /** min(bt, c + dt) − at has its peak at the corner t = c/(b − d), at every scale. */
    @ParameterizedTest
    @CsvSource({"1, 0.5, 0.25, 0.5", "0.875, 0.125, 0, 0.001", "1, 1e-280, 0, 0.25", "1, 1e-9, 0.99999, 0.999991"})
    void supremumAtACorner(double b, double c, double d, double slope) {
        Curve f = t -> point(t).times(b).min(Enclosure.exact(c).plus(point(t).times(d)));
        BigDecimal corner = decimal(c).divide(decimal(b).subtract(decimal(d)), Curves.DIGITS);
        BigDecimal exact = decimal(b).subtract(decimal(slope)).multiply(corner);
        // F and ta agree in all but the (1 − a/b)-th part
        double width = 2e-14 / (1 - slope / b);
        contains(supremum(f, slope, FULL), exact, width);
        Curves.Counted counted = new Curves.Counted(f.withGuess(Curves.middle(f)));
        contains(supremum(counted, slope, 1e-8), exact, 1.01e-8);
        assertTrue(counted.values() <= 5, () -> counted.values() + " values");
    }

    /** A corner with structure at 1e-9 of the peak's position. */
    @Test
    void supremumAtARoundedCorner() {
        double h = 1e-9;
        // −√((t−1)² + h²) + t is concave and increases; shifted so that it vanishes at 0
        Enclosure start = Enclosure.exact(h).square().plus(Enclosure.ONE).sqrt();
        Curve f = t -> {
            Enclosure x = point(t).minus(Enclosure.ONE);
            return start.minus(x.square().plus(Enclosure.exact(h).square()).sqrt())
                    .plus(point(t));
        };
        // with slope ½ the peak is where x/√(x² + h²) = ½: √(1 + h²) + ½ − h √3/2
        BigDecimal hh = decimal(h).multiply(decimal(h));
        BigDecimal exact = BigDecimal.ONE
                .add(hh)
                .sqrt(Curves.DIGITS)
                .add(decimal(0.5))
                .subtract(hh.multiply(decimal(0.75)).sqrt(Curves.DIGITS));
        WideDouble four = WideDouble.of(4);
        for (Curve c : new Curve[] {f, f.withGuess(Curves.middle(f))}) {
            SupportLines lines = new SupportLines(c, four, four);
            contains(lines.at(Enclosure.exact(0.5), FULL, 0).value(), exact, 1e-12);
        }
    }

    @Test
    void supremumOfNothing() {
        Curve f = t -> point(t).times(0.25).min(Enclosure.ONE);
        assertEquals(Enclosure.ZERO, supremum(f, 1.0, FULL));
        for (Curve c : new Curve[] {f, f.withGuess(Curves.middle(f))}) {
            Curves.Counted counted = new Curves.Counted(c);
            Enclosure zero = supremum(counted, 0.75, FULL);
            assertTrue(zero.lower() == 0 && zero.lnUpper() < -1000, zero::toString);
            int most = c.guess().isPresent() ? 1 : 18;
            assertTrue(counted.values() <= most, () -> counted.values() + " values");
        }
    }

    /** Slope 0: the limit for large t, known as well as the caller's bound. */
    @Test
    void slopeZero() {
        Enclosure limit = supremum(SMOOTH, 0, FULL);
        assertTrue(limit.contains(1.0) && limit.width() < 1e-15, limit::toString);
    }

    /** Commuting pairs, clustered and deficient ones among them, against the exact answer; a good guess costs 3 to 5 values. */
    @Test
    void piecewiseLinearCurves() {
        Random random = new Random(7);
        int guided = 0;
        int alone = 0;
        int cases = 0;
        for (int k = 0; k < 150; k++) {
            double[] a = Curves.masses(random);
            double[] other = Curves.masses(random);
            double[] b = new double[a.length];
            for (int i = 0; i < b.length; i++) {
                b[i] = other[i % other.length];
            }
            PositivePair pair = PositivePair.ofSpectra(a, b);
            double slope = pair.firstTrace().upper() * Math.pow(10, -12 * random.nextDouble());
            BigDecimal exact = Curves.supremum(a, b, slope);
            // next to zero, as the difference of two numbers of this size, it cannot be known to nine digits
            boolean isTiny = exact.doubleValue() < 1e-5 * slope;
            cases += isTiny ? 0 : 1;
            Curve f = Curves.of(pair);
            for (Curve c : new Curve[] {f, f.withGuess(Curves.middle(f))}) {
                SupportLines lines = new SupportLines(
                        c, pair.firstTrace().upperWide(), pair.secondTrace().upperWide());
                Enclosure s = lines.at(Enclosure.exact(slope), 1e-9, 0).value();
                assertTrue(s.contains(exact), () -> s.toIntervalString(17) + " misses " + exact.doubleValue());
                assertTrue(isTiny || s.relativeWidth() < 1.01e-9, () -> s.toIntervalString(17));
                boolean isGuided = c.guess().isPresent();
                guided += isTiny || !isGuided ? 0 : lines.evaluations();
                alone += isTiny || isGuided ? 0 : lines.evaluations();
                int most = isGuided ? 12 : 40;
                assertTrue(isTiny || lines.evaluations() <= most, () -> lines.evaluations() + " values");
            }
        }
        String counted = guided + " values with a guess, " + alone + " alone, in " + cases + " cases";
        assertTrue(cases > 100 && guided <= 4 * cases && alone <= 16 * cases, counted);
    }

    /** Two kets of squared overlap c: (√((1−a)c) − √(a(1−c)))², from ordinary to 1e-280. */
    @ParameterizedTest
    @CsvSource({"0.3, 0.01", "0.999, 1e-9", "1e-20, 1e-22", "1e-20, 3e-21", "1e-280, 1e-290"})
    void kets(double c, double slope) {
        BigDecimal one = BigDecimal.ONE;
        BigDecimal x = one.subtract(decimal(slope)).multiply(decimal(c)).sqrt(Curves.DIGITS);
        BigDecimal y = decimal(slope).multiply(one.subtract(decimal(c))).sqrt(Curves.DIGITS);
        BigDecimal exact = x.subtract(y).pow(2);
        Curve f = Curves.kets(c);
        Curves.Counted toTolerance = new Curves.Counted(f.withGuess(Curves.middle(f)));
        contains(supremum(toTolerance, slope, 1e-9), exact, 1.01e-9);
        assertTrue(toTolerance.values() <= 4, () -> toTolerance.values() + " values");
        Curves.Counted full = new Curves.Counted(f.withGuess(Curves.middle(f)));
        contains(supremum(full, slope, FULL), exact, 1e-13);
        assertTrue(full.values() <= 14, () -> full.values() + " values");
        Curves.Counted alone = new Curves.Counted(f);
        contains(supremum(alone, slope, 1e-9), exact, 1.01e-9);
        assertTrue(alone.values() <= 36, () -> alone.values() + " values");
    }

    /** Guesses that are wrong in every way cost values, never truth, and what is asked for is still reached. */
    @Test
    void adversarialGuesses() {
        Guess[] guesses = Curves.wrongGuesses(SMOOTH);
        for (int k = 0; k < guesses.length; k++) {
            String what = "guess " + k;
            for (double slope : new double[] {1e-12, 0.01, 0.8}) {
                SupportLines lines = lines(SMOOTH.withGuess(guesses[k]));
                Enclosure s = lines.at(Enclosure.exact(slope), 1e-9, 0).value();
                contains(s, smooth(slope), 1.01e-9);
                assertTrue(lines.evaluations() <= 45, () -> what + ": " + lines.evaluations() + " values");
            }
        }
    }

    /** Samples serve other slopes, too; the same slope again costs nothing. */
    @Test
    void samplesAreKept() {
        SupportLines lines = lines(SMOOTH);
        lines.at(Enclosure.exact(0.01), 1e-6, 0);
        int first = lines.evaluations();
        lines.at(Enclosure.exact(0.01), 1e-6, 0);
        assertEquals(first, lines.evaluations());
        contains(lines.at(Enclosure.exact(0.0101), 1e-6, 0).value(), smooth(0.0101), 1.01e-6);
        assertTrue(lines.evaluations() < 2 * first);
    }
}
