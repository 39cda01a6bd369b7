package org.minorant.core.pair;

import org.minorant.core.EnclosedMatrix;
import org.minorant.core.Enclosure;
import org.minorant.core.InvalidInputException;
import org.minorant.core.PositiveFactor;
import org.minorant.core.PositiveOperator;
import org.minorant.core.WideDouble;
import org.minorant.core.internal.door.EigenResidual;
import org.minorant.core.internal.door.HermitianEigen;

/**
 * A rank-one operator A = ψψ* against any B, through the spectral measure (w_i, b_i) of B in ψ: w_i = |⟨v_i,ψ⟩|². B is decomposed once; every further value of the curve costs
 * one root of a secular equation.
 *
 * <p><b>Definition.</b> A − B has at most one positive eigenvalue λ, the root of Σ w_i/(λ + b_i) = 1 (Golub, SIAM Rev. 15, 318, 1973), and f = a − λ with a = Σ w_i; see {@link SecularRoot}.
 *
 * <p><b>Enclosure.</b> For diagonal B the measure is exact up to an outward-rounded product, and f keeps its relative accuracy at any depth. Otherwise B = ŨΛŨ* + E with ‖E‖₁ bounded by
 * EigenResidual, and the computed amplitudes differ from Ũ*ψ by at most (δ + γ)‖ψ‖, which changes ψψ* by at most 2(δ + γ)(1 + δ + γ)‖ψ‖² in trace norm: an absolute error, which is then narrowed by
 * {@link FactorPair} where it is too wide.
 */
final class RankOnePair extends PositivePair {

    private static final double U = 0x1p-53;

    private final Enclosure[] weights;
    private final Enclosure[] values;
    private final Enclosure traceOne;
    private final Enclosure traceOther;
    private final double relativeError;
    /** Trace errors of the rank-one operator and of the other. */
    private final double errorOne;

    private final double errorOther;
    /** Whether the rank-one operator is the second of the pair. */
    private final boolean swapped;

    private final Refinement refinement;

    private RankOnePair(
            Measure measure, Enclosure traceOne, Enclosure traceOther, boolean swapped, Refinement refinement) {
        this.weights = measure.weights;
        this.values = measure.values;
        this.relativeError = measure.relativeError;
        this.errorOne = measure.errorOne;
        this.errorOther = measure.errorOther;
        this.traceOne = traceOne;
        this.traceOther = traceOther;
        this.swapped = swapped;
        this.refinement = refinement;
    }

    /** A spectral measure with the errors it was found to: of ψψ* (relative, trace) and of B (trace). */
    private record Measure(
            Enclosure[] weights, Enclosure[] values, double relativeError, double errorOne, double errorOther) {}

    /** The pair (ψψ*, B), or (B, ψψ*) if swapped. */
    static RankOnePair of(PositiveOperator rankOne, PositiveOperator b, boolean swapped) {
        boolean diagonal = !b.isDefinedByFactor() && PairStructure.isDiagonal(b);
        Refinement refinement = swapped ? new Refinement(b, rankOne) : new Refinement(rankOne, b);
        return new RankOnePair(
                diagonal ? exact(rankOne, b) : decomposed(rankOne, b),
                rankOne.traceEnclosure(),
                b.traceEnclosure(),
                swapped,
                diagonal ? Refinement.NONE : refinement);
    }

    /** The pair of a vector and an operator of which only the spectral measure is given, exactly. */
    static RankOnePair ofMeasure(double[] weights, double[] values) {
        String asked = "PositivePair.ofSpectralMeasure";
        if (weights.length == 0 || weights.length != values.length) {
            throw new InvalidInputException(
                    asked,
                    "there are " + weights.length + " weights and " + values.length + " values",
                    "as many of each, at least 1",
                    "give one weight per eigenvalue");
        }
        Enclosure[] w = new Enclosure[weights.length];
        Enclosure[] b = new Enclosure[weights.length];
        Enclosure one = Enclosure.ZERO;
        Enclosure other = Enclosure.ZERO;
        for (int i = 0; i < w.length; i++) {
            if (!(weights[i] >= 0 && values[i] >= 0 && weights[i] + values[i] < Double.POSITIVE_INFINITY)) {
                throw new InvalidInputException(
                        asked,
                        "weight and value " + i + " are " + weights[i] + " and " + values[i],
                        "at least 0 and finite",
                        "check the measure");
            }
            w[i] = Enclosure.exact(weights[i]);
            b[i] = Enclosure.exact(values[i]);
            one = one.plus(w[i]);
            other = other.plus(b[i]);
        }
        return new RankOnePair(new Measure(w, b, 0, 0, 0), one, other, false, Refinement.NONE);
    }

    private static Measure exact(PositiveOperator rankOne, PositiveOperator b) {
        PositiveFactor psi = rankOne.factor();
        int n = b.dimension();
        Enclosure[] weights = new Enclosure[n];
        Enclosure[] values = new Enclosure[n];
        for (int i = 0; i < n; i++) {
            EnclosedMatrix x = psi.columns();
            weights[i] = x.enclosureRe(i, 0).square().plus(x.enclosureIm(i, 0).square());
            values[i] = Enclosure.exact(Math.max(0, b.re(i, i)));
        }
        return new Measure(weights, values, psi.relativeError(), psi.traceError(), 0);
    }

    private static Measure decomposed(PositiveOperator rankOne, PositiveOperator b) {
        PositiveFactor psi = rankOne.factor();
        int n = b.dimension();
        double[] re = b.realParts();
        double[] im = b.imaginaryParts();
        HermitianEigen e = HermitianEigen.of(n, re, im);
        EigenResidual residual = EigenResidual.of(n, re, im, e);
        double[] vr = e.vectorsRe();
        double[] vi = e.vectorsIm();
        Enclosure[] weights = new Enclosure[n];
        Enclosure[] values = new Enclosure[n];
        double norm = 0;
        for (int j = 0; j < n; j++) {
            double x = 0;
            double y = 0;
            for (int i = 0; i < n; i++) {
                double p = psi.columns().re(i, 0);
                double q = psi.columns().im(i, 0);
                x += vr[i * n + j] * p + vi[i * n + j] * q;
                y += vr[i * n + j] * q - vi[i * n + j] * p;
            }
            weights[j] = Enclosure.exact(x).square().plus(Enclosure.exact(y).square());
            // the operator meant is the positive part; cutting here is inside the entry defect
            values[j] = Enclosure.exact(Math.max(0, e.values()[j]));
            norm += x * x + y * y;
        }
        // rounding of the amplitudes, and of ψ to double: γ in norm
        double gamma = residual.defect() + (4.0 * n + 16) * Math.sqrt(n) * U;
        double errorOne = 2.2 * gamma * norm + psi.traceError();
        double errorOther = 2 * (residual.traceError() + b.entryDefect());
        return new Measure(weights, values, psi.relativeError(), errorOne, errorOther);
    }

    @Override
    Enclosure value(WideDouble wa, WideDouble wb) {
        WideDouble one = swapped ? wb : wa;
        WideDouble other = swapped ? wa : wb;
        Enclosure ratio = Enclosure.of(other, other).dividedBy(Enclosure.of(one, one));
        Enclosure f = SecularRoot.enclose(weights, values, ratio)
                .times(Enclosure.of(1 - relativeError, 1 + relativeError))
                .plus(Enclosure.of(-errorOne, errorOne))
                .times(Enclosure.of(one, one));
        Enclosure nu = Enclosure.of(other, other).times(errorOther);
        return refinement.narrow(
                Enclosure.of(
                        f.lowerWide().plusDown(nu.upperWide().negate()),
                        f.upperWide().plusUp(nu.upperWide())),
                wa,
                wb);
    }

    @Override
    public Enclosure firstTrace() {
        return swapped ? traceOther : traceOne;
    }

    @Override
    public Enclosure secondTrace() {
        return swapped ? traceOne : traceOther;
    }

    @Override
    public int dimension() {
        return weights.length;
    }

    @Override
    public PairKind kind() {
        return PairKind.RANK_ONE;
    }
}
