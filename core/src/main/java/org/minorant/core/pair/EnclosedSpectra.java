package org.minorant.core.pair;

import java.util.List;
import org.minorant.core.Enclosure;
import org.minorant.core.InvalidInputException;
import org.minorant.core.WideDouble;

/**
 * Two commuting operators of which the eigenvalues are enclosed: two distributions of the outcomes of a measurement, for example.
 *
 * <p><b>Argument.</b> Σ min(a Π x_i, b Π y_i) over strings of n letters rises with every eigenvalue, so {@link #below} and {@link #above}, which take the lower and the upper ends, enclose it, and with it every supremum over weights. Where
 * each letter is known to a relative η, the sum for the upper ends is at most (1 + η)^n ≤ 1/(1 − nη) times that for the lower ends, so that one sum is enough.
 *
 * <p>Immutable and thread-safe.
 */
public final class EnclosedSpectra {

    private static final double UP = 1 + 0x1p-50;

    private final double[] lowFirst;
    private final double[] lowSecond;
    private final double[] highFirst;
    private final double[] highSecond;

    private EnclosedSpectra(List<Enclosure> first, List<Enclosure> second) {
        lowFirst = lower(first);
        lowSecond = lower(second);
        highFirst = upper(first);
        highSecond = upper(second);
    }

    /**
     * Returns two spectra.
     *
     * @param first enclosures of eigenvalues of A, each possibly at least 0 and finite; ends below 0 are cut
     * @param second enclosures of eigenvalues of B to the same vectors
     * @return the spectra
     * @throws InvalidInputException if the lengths differ or are zero, or an upper end is negative or not finite
     */
    public static EnclosedSpectra of(List<Enclosure> first, List<Enclosure> second) {
        EnclosedSpectra e = new EnclosedSpectra(first, second);
        e.below(1);
        e.above(1);
        return e;
    }

    private static double[] lower(List<Enclosure> x) {
        return x.stream().mapToDouble(e -> Math.max(0, e.lower())).toArray();
    }

    private static double[] upper(List<Enclosure> x) {
        return x.stream().mapToDouble(Enclosure::upper).toArray();
    }

    /**
     * Returns n copies of the pair with the lower ends.
     *
     * @param n the number of copies, at least 1
     * @return a pair whose curve is nowhere above the true one
     */
    public PositivePair below(int n) {
        return PositivePair.ofSpectra(lowFirst, lowSecond).copies(n);
    }

    /**
     * Returns n copies of the pair with the upper ends.
     *
     * @param n the number of copies, at least 1
     * @return a pair whose curve is nowhere below the true one
     */
    public PositivePair above(int n) {
        return PositivePair.ofSpectra(highFirst, highSecond).copies(n);
    }

    /**
     * Returns Tr[aA^⊗n ∧ bB^⊗n].
     *
     * @param n the number of copies, at least 1
     * @param a the weight on A, not negative
     * @param b the weight on B, with a lower end that is not negative
     * @return an enclosure for all eigenvalues and weights within theirs
     */
    public Enclosure traceMinimum(int n, Enclosure a, Enclosure b) {
        Enclosure below = below(n).traceMinimum(a.lowerWide(), b.lowerWide());
        double eta = relativeWidth();
        if (n * eta < 0.5 && a.lowerWide().signum() > 0 && b.lowerWide().signum() > 0) {
            Enclosure growth = Enclosure.ONE.dividedBy(
                    Enclosure.ONE.minus(Enclosure.exact(eta).times(n)));
            // the sum grows at most like both weights together
            WideDouble weights = a.upperWide()
                    .dividedByUp(a.lowerWide())
                    .timesUp(b.upperWide().dividedByUp(b.lowerWide()));
            return Enclosure.of(
                    below.lowerWide(),
                    below.upperWide().timesUp(growth.upperWide()).timesUp(weights));
        }
        return below.hull(above(n).traceMinimum(a.upperWide(), b.upperWide()));
    }

    /** η; infinite where a letter may vanish. */
    private double relativeWidth() {
        double eta = 0;
        for (int k = 0; k < lowFirst.length; k++) {
            eta = Math.max(eta, relative(lowFirst[k], highFirst[k]));
            eta = Math.max(eta, relative(lowSecond[k], highSecond[k]));
        }
        return eta;
    }

    private static double relative(double low, double high) {
        return high == 0 ? 0 : low == 0 ? Double.POSITIVE_INFINITY : (high - low) / low * UP;
    }
}
