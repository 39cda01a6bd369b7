package org.minorant.core.pair;

import org.minorant.core.EnclosedMatrix;
import org.minorant.core.EnclosedSpectrum;
import org.minorant.core.Enclosure;
import org.minorant.core.PositiveFactor;
import org.minorant.core.PositiveOperator;
import org.minorant.core.WideDouble;

/**
 * A rank-one operator A = ψψ* against any B, through the spectral measure (w_i, b_i) of B in ψ: w_i = |⟨v_i,ψ⟩|².
 *
 * <p><b>Definition.</b> A − B has at most one positive eigenvalue λ, the root of Σ w_i/(λ + b_i) = 1 (Golub, SIAM Rev. 15, 318, 1973), and f = a − λ with a = Σ w_i. In δ = a − λ the
 * equation reads
 *
 * <pre>δ = g(δ) = Σ w_i b_i / (a − δ + b_i),</pre>
 *
 * all terms positive, so that a tiny f keeps its digits. g is increasing and convex with g(0) ≥ 0; f is its smallest fixed point in [0, a].
 *
 * <p><b>Enclosure.</b> h = g − id is positive before f and, being convex, negative between f and the next root. A double root-finder proposes δ; a point below it where h &gt; 0 is certain is a
 * lower end <em>if</em> it is not beyond the second root, which h &lt; 0 at a later point, certain as well, shows; that later point is the upper end. Signs are decided in outward-rounded
 * arithmetic on intervals for w_i and b_i.
 */
final class RankOnePair extends PositivePair {

    private final double[] weightLower;
    private final double[] weightUpper;
    private final double[] valueLower;
    private final double[] valueUpper;
    private final Enclosure traceA;
    private final Enclosure traceB;
    /** Relative and trace error of the measure, in the sense of {@link PositiveFactor}. */
    private final double relativeError;

    private final double traceErrorB;
    /** Whether the rank-one operator is the second of the pair. */
    private final boolean swapped;

    private RankOnePair(
            double[][] measure,
            double relativeError,
            double traceErrorB,
            PositiveOperator a,
            PositiveOperator b,
            boolean swapped) {
        this.weightLower = measure[0];
        this.weightUpper = measure[1];
        this.valueLower = measure[2];
        this.valueUpper = measure[3];
        this.relativeError = relativeError;
        this.traceErrorB = traceErrorB;
        this.traceA = a.traceEnclosure();
        this.traceB = b.traceEnclosure();
        this.swapped = swapped;
    }

    /** The pair (ψψ*, B), or (B, ψψ*) if swapped, from the certified spectrum of B. */
    static RankOnePair of(PositiveOperator rankOne, PositiveOperator b, boolean swapped) {
        PositiveFactor psi = rankOne.factor();
        int n = b.dimension();
        boolean diagonal = PairStructure.isDiagonal(b) && !b.isDefinedByFactor();
        double[][] measure = new double[4][n];
        if (diagonal) {
            for (int i = 0; i < n; i++) {
                measure[2][i] = measure[3][i] = Math.max(0, b.re(i, i));
            }
            weights(measure, psi.columns());
            return new RankOnePair(measure, psi.relativeError(), b.entryDefect(), rankOne, b, swapped);
        }
        EnclosedSpectrum s = EnclosedSpectrum.of(b);
        double rest = 0;
        for (int i = 0; i < n; i++) {
            Enclosure v = Enclosure.exact(s.value(i)).plus(Enclosure.exact(s.valueTail(i)));
            // what is negative belongs to the residual below: the operator meant is the positive part
            rest += Math.max(0, -s.value(i)) * (1 + 0x1p-40);
            measure[2][i] = Math.max(0, v.lower());
            measure[3][i] = Math.max(0, v.upper());
        }
        weights(measure, s.vectors().adjoint().times(psi.columns()));
        // in the coordinates V*: A becomes V*AV, B becomes V*BV with V*V = 1 + O(defect); see EnclosedSpectrum for
        // residual and defect
        double eta = psi.relativeError() + 3 * s.defect();
        double nu = (Math.sqrt(n) * s.residual() + rest) * (1 + 0x1p-40) + b.entryDefect();
        return new RankOnePair(measure, eta, nu, rankOne, b, swapped);
    }

    private static void weights(double[][] measure, EnclosedMatrix amplitudes) {
        for (int i = 0; i < amplitudes.rows(); i++) {
            Enclosure re = amplitudes.enclosureRe(i, 0);
            Enclosure im = amplitudes.enclosureIm(i, 0);
            Enclosure w = re.square().plus(im.square());
            measure[0][i] = Math.max(0, w.lower());
            measure[1][i] = w.upper();
        }
    }

    @Override
    Enclosure value(WideDouble wa, WideDouble wb) {
        WideDouble a = swapped ? wb : wa;
        WideDouble b = swapped ? wa : wb;
        Enclosure f = SecularRoot.enclose(
                weightLower, weightUpper, valueLower, valueUpper, b.dividedByDown(a), b.dividedByUp(a));
        Enclosure scaled = f.times(Enclosure.of(a, a));
        Enclosure wide = scaled.times(Enclosure.of(1 - relativeError, 1 + relativeError));
        Enclosure nu = Enclosure.of(b, b).times(traceErrorB);
        return Enclosure.of(
                wide.lowerWide().plusDown(nu.upperWide().negate()),
                wide.upperWide().plusUp(nu.upperWide()));
    }

    @Override
    public Enclosure firstTrace() {
        return swapped ? traceB : traceA;
    }

    @Override
    public Enclosure secondTrace() {
        return swapped ? traceA : traceB;
    }

    @Override
    public int dimension() {
        return weightLower.length;
    }

    @Override
    public PairKind kind() {
        return PairKind.RANK_ONE;
    }
}
