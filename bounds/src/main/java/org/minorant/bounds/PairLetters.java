package org.minorant.bounds;

import org.minorant.bounds.divergence.Ball;
import org.minorant.bounds.divergence.StatePair;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;
import org.minorant.core.pair.PositivePair;

/**
 * The two Nussbaum–Szkoła distributions P_ij = |⟨u_i|v_j⟩|² a_i and Q_ij = |⟨u_i|v_j⟩|² b_j of A = Σ a_i |u_i⟩⟨u_i| and B = Σ b_j |v_j⟩⟨v_j|, over pairs of eigenvectors.
 *
 * <p>Those of n copies are the n-fold products, so that sums over them are sums over types of pairs.
 *
 * <p><b>Rounding.</b> {@code low} holds numbers at most P and Q. Operators with such eigenvalues and the same vectors lie below A and B, and smaller overlaps only lower a sum of minima, so what {@code low}
 * gives is itself a lower bound. {@code high} holds numbers at least P and Q.
 *
 * <p>Source: M. Nussbaum, A. Szkoła, Ann. Statist. 37, 1040 (2009), equation 4 (from memory).
 */
final class PairLetters {

    private final double[] lowFirst;
    private final double[] lowSecond;
    private final double[] highFirst;
    private final double[] highSecond;

    private PairLetters(int letters) {
        lowFirst = new double[letters];
        lowSecond = new double[letters];
        highFirst = new double[letters];
        highSecond = new double[letters];
    }

    static PairLetters of(StatePair pair) {
        int columns = pair.second().rank();
        PairLetters l = new PairLetters(Math.max(1, pair.first().rank() * columns));
        for (int i = 0; i < pair.first().rank(); i++) {
            for (int j = 0; j < columns; j++) {
                Enclosure p = product(pair.square(i, j), pair.first().values().get(i));
                Enclosure q = product(pair.square(i, j), pair.second().values().get(j));
                int k = i * columns + j;
                l.lowFirst[k] = p.lower();
                l.lowSecond[k] = q.lower();
                l.highFirst[k] = p.upper();
                l.highSecond[k] = q.upper();
            }
        }
        return l;
    }

    private static Enclosure product(Ball overlap, Ball value) {
        return overlap.times(value).toEnclosure().clip(0, Double.POSITIVE_INFINITY);
    }

    /** n copies of numbers at most P and Q. */
    PositivePair below(int n) {
        return PositivePair.ofSpectra(lowFirst, lowSecond).copies(n);
    }

    /** n copies of numbers at least P and Q. */
    PositivePair above(int n) {
        return PositivePair.ofSpectra(highFirst, highSecond).copies(n);
    }

    /**
     * Encloses Σ min(a P^n, b Q^n). Where every letter is known to a relative η, one sum is enough: the other is at most (1 + η)^n times that.
     */
    Enclosure traceMinimum(int n, double a, Enclosure b) {
        Enclosure below = below(n).traceMinimum(WideDouble.of(a), b.lowerWide());
        double eta = relativeWidth();
        if (n * eta < 0.5) {
            // (1 + η)^n ≤ 1/(1 − nη), and Σ min(aP, bQ) grows at most like b
            Enclosure growth = Enclosure.ONE.dividedBy(
                    Enclosure.ONE.minus(Enclosure.exact(eta).times(n)));
            WideDouble weight = b.upperWide().dividedByUp(b.lowerWide());
            return Enclosure.of(
                    below.lowerWide(),
                    below.upperWide().timesUp(growth.upperWide()).timesUp(weight));
        }
        return below.hull(above(n).traceMinimum(WideDouble.of(a), b.upperWide()));
    }

    private double relativeWidth() {
        double eta = 0;
        for (int k = 0; k < lowFirst.length; k++) {
            eta = Math.max(eta, relative(lowFirst[k], highFirst[k]));
            eta = Math.max(eta, relative(lowSecond[k], highSecond[k]));
        }
        return eta;
    }

    private static double relative(double low, double high) {
        return high == 0 ? 0 : low == 0 ? Double.POSITIVE_INFINITY : (high - low) / low * (1 + 0x1p-50);
    }
}
