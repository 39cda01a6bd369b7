package org.minorant.core.curve;

import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.math.MathContext;
import java.util.Arrays;
import java.util.Optional;
import java.util.Random;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;
import org.minorant.core.pair.PositivePair;

/** Curves with closed forms, and wrappers that count or blur. */
final class Curves {

    /** Enough for quotients of doubles that terminate to do so. */
    static final MathContext DIGITS = new MathContext(1500);

    /** t/(1 + t), smooth, known to a few roundings. */
    static final Curve SMOOTH = t -> point(t).dividedBy(point(t).plus(Enclosure.ONE));

    private Curves() {}

    static Enclosure point(WideDouble t) {
        return Enclosure.of(t, t);
    }

    static BigDecimal decimal(double v) {
        return new BigDecimal(v);
    }

    /** The same curve, each value widened by a relative amount: less is known of it. */
    static Curve blurred(Curve c, double relative) {
        Curve blurred = t -> c.at(t).times(Enclosure.of(1 - relative, 1 + relative));
        return c.guess().map(blurred::withGuess).orElse(blurred);
    }

    /** Tr[tρ ∧ σ] of two kets of squared overlap c: 2ct/(1 + t + √((1 − t)² + 4t(1 − c))). */
    static Curve kets(double c) {
        return t -> {
            Enclosure x = point(t);
            Enclosure root = Enclosure.ONE
                    .minus(x)
                    .square()
                    .plus(x.times(4).times(Enclosure.exact(c).complement()))
                    .sqrt();
            return x.times(c).times(2).dividedBy(x.plus(Enclosure.ONE).plus(root));
        };
    }

    static Curve of(PositivePair pair) {
        return t -> pair.traceMinimum(t, WideDouble.ONE);
    }

    /** A guess that is right up to rounding. */
    static Guess middle(Curve c) {
        return x -> {
            WideDouble value = c.at(WideDouble.expDown(x)).lowerWide();
            return Enclosure.of(value, value).lnLower();
        };
    }

    /** Guesses of a curve that are wrong in every way. */
    static Guess[] wrongGuesses(Curve c) {
        Guess right = middle(c);
        return new Guess[] {
            x -> Double.NaN,
            x -> Double.NEGATIVE_INFINITY,
            x -> Double.POSITIVE_INFINITY,
            x -> 0,
            x -> -1e6,
            x -> x,
            x -> 5 * x,
            x -> -x,
            x -> right.lnValue(x + 30),
            x -> right.lnValue(x - 30),
            x -> right.lnValue(x) + 0.01 * Math.sin(x),
            x -> right.lnValue(x) + 1e-6 * Math.sin(1e6 * x),
            x -> 0.5 * x + Math.sin(1e9 * x),
            x -> x > 1 ? Double.NaN : right.lnValue(x),
        };
    }

    /** Counts certified values; the guess goes along. */
    static final class Counted implements Curve {

        private final Curve curve;
        private int values;

        Counted(Curve curve) {
            this.curve = curve;
        }

        @Override
        public Enclosure at(WideDouble t) {
            values++;
            return curve.at(t);
        }

        @Override
        public Optional<Guess> guess() {
            return curve.guess();
        }

        int values() {
            return values;
        }
    }

    /** Masses on 1 to 12 points, of one of four kinds: any, repeated, over many decades, some zero. */
    static double[] masses(Random random) {
        double[] p = new double[1 + random.nextInt(12)];
        int kind = random.nextInt(4);
        Arrays.setAll(p, i -> switch (kind) {
            case 0 -> random.nextDouble();
            case 1 -> 1 + 0x1p-40 * random.nextInt(3);
            case 2 -> Math.scalb(1.0, -random.nextInt(200));
            default -> random.nextInt(3) * 0.5;
        });
        p[random.nextInt(p.length)] = 1;
        return p;
    }

    /**
     * sup over t of Σ min(t a_i, b_i) − ta exactly. It is attained at a corner t = b_k/a_k, where a_k times the value is Σ min(b_k a_i, a_k b_i) − a b_k, or at
     * 0.
     */
    static BigDecimal supremum(double[] a, double[] b, double slope) {
        BigDecimal most = BigDecimal.ZERO;
        for (int k = 0; k < a.length; k++) {
            if (a[k] == 0) {
                continue;
            }
            BigDecimal sum = decimal(slope).multiply(decimal(b[k])).negate();
            for (int i = 0; i < a.length; i++) {
                sum = sum.add(
                        decimal(b[k]).multiply(decimal(a[i])).min(decimal(a[k]).multiply(decimal(b[i]))));
            }
            most = most.max(sum.divide(decimal(a[k]), new MathContext(60)));
        }
        return most;
    }

    static void contains(Enclosure e, BigDecimal value, double width) {
        assertTrue(e.contains(value), () -> e.toIntervalString(17) + " misses " + value.doubleValue());
        assertTrue(e.relativeWidth() < width, () -> "width of " + e.toIntervalString(17));
    }
}
