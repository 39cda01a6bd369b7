package org.minorant.bounds;

import java.util.List;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.InvalidInputException;
import org.minorant.core.PositiveOperator;
import org.minorant.core.pair.PositivePair;

/**
 * ρ_XB = ⊕ P(x) W_x against B' = (1_X ⊗ ρ_B)/K, n copies of both, in the form that the states allow. Dividing by K keeps the trace of B' at 1 or below, as searches expect it.
 *
 * @param curves the curves of the n copies
 * @param total K^n
 */
record SideInformationPair(LetterCurves curves, Enclosure total) {

    /** Dimensions of letter and state together up to which the pair is taken as it is for many letters. */
    private static final int SMALL = 12;

    static SideInformationPair of(ClassicalQuantumChannel states, double[] p, int n) {
        List<DensityOperator> w = states.outputs();
        if (w.stream().allMatch(DiagonalOutputs::isDiagonal)) {
            return ofDiagonal(w, p, n);
        }
        if (n > 1 && isUniform(p)) {
            try {
                // for equal P(x) both operators have the curve of the channel with these outputs, K the number of
                // letters
                LetterCurves words = states.structure().words(p, n).curves();
                return new SideInformationPair(words, Enclosure.exact(p.length).power(n));
            } catch (InvalidInputException e) {
                refuseLarge(w, p, n);
            }
        }
        if (n > 1) {
            refuseLarge(w, p, n);
        }
        return ofBlocks(states, p, n);
    }

    private static boolean isUniform(double[] p) {
        for (double x : p) {
            if (x != p[0]) {
                return false;
            }
        }
        return true;
    }

    private static void refuseLarge(List<DensityOperator> w, double[] p, int n) {
        int d = w.get(0).dimension();
        if ((long) d * p.length > SMALL) {
            throw new InvalidInputException(
                    "SideInformationCompression.uses",
                    n + " letters out of " + p.length + " with states of dimension " + d + " that are not alike",
                    "diagonal states, letters of equal probability with words that are alike, or at most " + SMALL
                            + " dimensions of letter and state together",
                    "ask for one use, with words for letters");
        }
    }

    /** (P(x) W(y|x)) against (Q(y)). */
    private static SideInformationPair ofDiagonal(List<DensityOperator> w, double[] p, int n) {
        int d = w.get(0).dimension();
        double[] q = new double[d];
        double[] a = new double[d * p.length];
        for (int x = 0; x < p.length; x++) {
            for (int y = 0; y < d; y++) {
                a[x * d + y] = p[x] * Math.max(0, w.get(x).re(y, y));
                q[y] += a[x * d + y];
            }
        }
        double power = power(p.length);
        double[] b = new double[a.length];
        for (int i = 0; i < b.length; i++) {
            b[i] = q[i % d] / power;
        }
        MergedSpectra merged = MergedSpectra.of(a, b);
        double error = merged.error() + (p.length + 8) * 0x1p-53;
        return new SideInformationPair(
                curves(merged.copies(n), w, p, error, n), Enclosure.exact(power).power(n));
    }

    private static SideInformationPair ofBlocks(ClassicalQuantumChannel states, double[] p, int n) {
        List<DensityOperator> w = states.outputs();
        double power = power(p.length);
        PositiveOperator mixture = states.outputState(p).times(1 / power);
        PositiveOperator a = w.get(0).times(p[0]);
        PositiveOperator b = mixture;
        for (int x = 1; x < p.length; x++) {
            a = a.directSum(w.get(x).times(p[x]));
            b = b.directSum(mixture);
        }
        PositivePair pair = PositivePair.of(a, b).copies(n);
        return new SideInformationPair(
                curves(pair, w, p, 0, n), Enclosure.exact(power).power(n));
    }

    private static LetterCurves curves(PositivePair pair, List<DensityOperator> w, double[] p, double error, int n) {
        Enclosure trace = Traces.sum(p).times(Traces.hull(w));
        Enclosure slack = Enclosure.ONE.dividedBy(trace).hull(Enclosure.ONE);
        return WordCurves.of(pair, trace, slack, error, 0, n).curves();
    }

    /** The least power of two that is not below the number of letters. */
    private static double power(int letters) {
        double k = 1;
        while (k < letters) {
            k *= 2;
        }
        return k;
    }
}
