package org.minorant.bounds;

import java.util.ArrayList;
import java.util.List;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.pair.Effort;
import org.minorant.core.pair.PositivePair;

/**
 * n uses of a channel whose letters unitaries carry into each other that leave the output state σ as it is. All words have then the curve of W_0^⊗n against σ^⊗n.
 *
 * <p><b>What is found.</b>
 *
 * <ul>
 *   <li>Two kets and their equal mixture: in the right phases their Gram matrix is symmetric, and a unitary exchanges them. Exact, in any dimension.
 *   <li>Qubits of the same Bloch length and the same angle to the Bloch vector of σ: rotations around that vector.
 *   <li>Qubits of the same Bloch length where σ is maximally mixed.
 * </ul>
 *
 * <p><b>Rounding.</b> Bloch vectors given in doubles are alike only up to rounding. With δ ≥ ‖W_x − U_x W_0 U_x*‖₁ and ℓ the least eigenvalue of W_0, W_x is within 1 ± δ/ℓ of the
 * letter that is exactly alike; where ℓ is too small for that, words are off by nδ in trace norm. A σ with a Bloch vector of length η that is rounding only is within 1 ± η of
 * its multiple of the identity. All of this is in the enclosures.
 */
final class SymmetricWords {

    /** Letters further apart than this are not alike. */
    private static final double ALIKE = 0x1p-40;

    /** n δ/ℓ up to which relative errors are used. */
    private static final double RELATIVE = 0x1p-20;

    /** The share of a curve's value that truncation may cost; it costs far less as a rule, and M is asked for to 1e-6 bit. */
    private static final double ENOUGH = 1e-7;

    private final List<DensityOperator> letters;
    private final List<LetterFactor> factors;
    private final Enclosure traces;
    private final int n;

    /**
     * Takes the letters that words are made of.
     *
     * @param letters their states
     * @param factors their factors
     * @param traces what holds their traces
     * @param n the number of uses
     */
    SymmetricWords(List<DensityOperator> letters, List<LetterFactor> factors, Enclosure traces, int n) {
        this.letters = letters;
        this.factors = factors;
        this.traces = traces;
        this.n = n;
    }

    /** Whether the letters are two kets. */
    boolean areTwoKets() {
        return letters.size() == 2
                && letters.stream()
                        .allMatch(w -> w.isDefinedByFactor() && w.factor().rank() == 1);
    }

    /**
     * Two kets against their equal mixture.
     *
     * @param mixture the mixture
     * @param sum what holds the sum of the weights
     */
    WordCurves ofTwoKets(DensityOperator mixture, Enclosure sum) {
        PositivePair pair = PositivePair.of(letters.get(0), mixture).copies(n);
        // the normalised kets are alike, those given up to the ratio of their traces, and so is the mixture
        Enclosure slack = slack(sum.times(traces)).hull(traces.dividedBy(traces));
        return WordCurves.of(pair, traces, slack, 0, 0, n);
    }

    /**
     * The letters against a state of a qubit to which they are alike.
     *
     * @param sigma the state
     * @param trace what holds its trace
     */
    WordCurves against(DensityOperator sigma, Enclosure trace) {
        List<BlochVector> vectors = vectors();
        BlochVector b = BlochVector.of(LetterFactor.of(sigma));
        double mixed = b.length().upper();
        boolean isMixed = mixed <= ALIKE;
        double delta = apart(vectors, b);
        double least = vectors.get(0).least().lower();
        boolean relative = least > 0 && n * delta <= RELATIVE * least;
        double error = relative ? delta / (least - delta) * (1 + 0x1p-40) : 0;
        if (isMixed) {
            double miss = b.trace()
                    .minus(Enclosure.ONE)
                    .max(Enclosure.ONE.minus(b.trace()))
                    .upper();
            error += 2 * (mixed + miss);
        }
        PositivePair one = PositivePair.of(letters.get(0), isMixed ? DensityOperator.maximallyMixed(2) : sigma);
        PositivePair many = one.copies(n).withEffort(Effort.DEFAULT.withTolerance(ENOUGH));
        return WordCurves.of(many, traces, slack(trace), error, relative ? 0 : delta, n);
    }

    /** Whether this is a qubit whose letters rotations around the Bloch vector of a state carry into each other, any rotations if that is none. */
    boolean areAlike(DensityOperator sigma) {
        return sigma.dimension() == 2 && apart(vectors(), BlochVector.of(LetterFactor.of(sigma))) <= ALIKE;
    }

    private List<BlochVector> vectors() {
        List<BlochVector> vectors = new ArrayList<>();
        for (LetterFactor f : factors) {
            vectors.add(BlochVector.of(f));
        }
        return vectors;
    }

    /** The largest distance of a letter from what a rotation makes of the first. */
    private static double apart(List<BlochVector> vectors, BlochVector b) {
        boolean isMixed = b.length().upper() <= ALIKE;
        double delta = 0;
        for (int x = 1; x < vectors.size(); x++) {
            double d = isMixed ? lengths(vectors.get(0), vectors.get(x)) : positions(vectors.get(0), vectors.get(x), b);
            delta = d <= delta ? delta : d;
        }
        return delta;
    }

    private Enclosure slack(Enclosure trace) {
        Enclosure one = Enclosure.ONE;
        return one.dividedBy(traces).hull(one.dividedBy(trace)).hull(one);
    }

    /** A bound on ‖A − UBU*‖₁ for the best rotation U. */
    private static double lengths(BlochVector v, BlochVector w) {
        return size(v.trace().minus(w.trace())) + size(v.length().minus(w.length()));
    }

    /** The same for the best rotation around b. */
    private static double positions(BlochVector v, BlochVector w, BlochVector b) {
        Enclosure length = b.length();
        double along = size(v.dot(b).minus(w.dot(b)).dividedBy(length));
        double across = size(v.cross(b).minus(w.cross(b)).dividedBy(length));
        return (size(v.trace().minus(w.trace())) + along + across) * (1 + 0x1p-40);
    }

    private static double size(Enclosure e) {
        return Math.max(Math.abs(e.lower()), Math.abs(e.upper()));
    }
}
