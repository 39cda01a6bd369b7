package org.minorant.core.pair;

import java.util.ArrayList;
import java.util.List;
import java.util.function.IntFunction;
import org.minorant.core.Enclosure;
import org.minorant.core.InvalidInputException;
import org.minorant.core.PositiveFactor;
import org.minorant.core.PositiveOperator;
import org.minorant.core.WideDouble;
import org.minorant.core.internal.door.EigenResidual;
import org.minorant.core.internal.door.HermitianEigen;
import org.minorant.core.internal.number.WideDoubleDouble;

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

    private final SpectralPoints points;
    private final int dimension;
    private final Enclosure traceOne;
    private final Enclosure traceOther;
    private final double relativeError;
    /** Trace errors of the rank-one operator and of the other. */
    private final double errorOne;

    private final double errorOther;
    /** Whether the rank-one operator is the second of the pair. */
    private final boolean swapped;

    private final Refinement refinement;
    /** Makes the pair of many copies. */
    private final IntFunction<PositivePair> many;

    private RankOnePair(
            Measure measure,
            int dimension,
            Enclosure traceOne,
            Enclosure traceOther,
            boolean swapped,
            Refinement refinement,
            IntFunction<PositivePair> many) {
        this.many = many;
        this.points = SpectralPoints.of(measure.spectral);
        this.dimension = dimension;
        this.relativeError = measure.relativeError;
        this.errorOne = measure.errorOne;
        this.errorOther = measure.errorOther;
        this.traceOne = traceOne;
        this.traceOther = traceOther;
        this.swapped = swapped;
        this.refinement = refinement;
    }

    /** A spectral measure with the errors it was found to: of ψψ* (relative, trace) and of B (trace). */
    private record Measure(SpectralMeasure spectral, double relativeError, double errorOne, double errorOther) {}

    /** The pair (ψψ*, B), or (B, ψψ*) if swapped. */
    static RankOnePair of(PositiveOperator rankOne, PositiveOperator b, boolean swapped) {
        boolean diagonal = !b.isDefinedByFactor() && PairStructure.isDiagonal(b);
        Refinement refinement = swapped ? new Refinement(b, rankOne) : new Refinement(rankOne, b);
        return new RankOnePair(
                diagonal ? exact(rankOne, b) : decomposed(rankOne, b),
                b.dimension(),
                rankOne.traceEnclosure(),
                b.traceEnclosure(),
                swapped,
                diagonal ? Refinement.NONE : refinement,
                n -> swapped ? PairStructure.power(b, rankOne, n) : PairStructure.power(rankOne, b, n));
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
        List<WideDoubleDouble> w = new ArrayList<>();
        List<WideDoubleDouble> b = new ArrayList<>();
        Enclosure one = Enclosure.ZERO;
        Enclosure sum = Enclosure.ZERO;
        for (int i = 0; i < weights.length; i++) {
            if (!(weights[i] >= 0 && values[i] >= 0 && weights[i] + values[i] < Double.POSITIVE_INFINITY)) {
                throw new InvalidInputException(
                        asked,
                        "weight and value " + i + " are " + weights[i] + " and " + values[i],
                        "at least 0 and finite",
                        "check the measure");
            }
            w.add(Letters.wide(weights[i]));
            b.add(Letters.wide(values[i]));
            one = one.plus(Enclosure.exact(weights[i]));
            sum = sum.plus(Enclosure.exact(values[i]));
        }
        Enclosure other = sum;
        SpectralMeasure spectral = SpectralMeasure.of(w, b, 0, 0);
        return new RankOnePair(
                new Measure(spectral, 0, 0, 0),
                w.size(),
                one,
                other,
                false,
                Refinement.NONE,
                n -> RankOneCopies.of(spectral, w.size(), other, RankOneCopies.Errors.NONE, false, n));
    }

    private static Measure exact(PositiveOperator rankOne, PositiveOperator b) {
        PositiveFactor psi = rankOne.factor();
        return new Measure(SpectralMeasure.ofDiagonal(psi, b), psi.relativeError(), psi.traceError(), 0);
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
        List<WideDoubleDouble> weights = new ArrayList<>();
        List<WideDoubleDouble> values = new ArrayList<>();
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
            weights.add(Letters.sum(Letters.wide(x * x), Letters.wide(y * y)));
            // the operator meant is the positive part; cutting here is inside the entry defect
            values.add(Letters.wide(Math.max(0, e.values()[j])));
            norm += x * x + y * y;
        }
        // rounding of the amplitudes, and of ψ to double: γ in norm
        double gamma = residual.defect() + (4.0 * n + 16) * Math.sqrt(n) * U;
        double errorOne = 2.2 * gamma * norm + psi.traceError();
        double errorOther = 2 * (residual.traceError() + b.entryDefect());
        SpectralMeasure measure = SpectralMeasure.of(weights, values, 0, 0);
        return new Measure(measure, psi.relativeError(), errorOne, errorOther);
    }

    @Override
    Enclosure value(WideDouble wa, WideDouble wb) {
        WideDouble one = swapped ? wb : wa;
        WideDouble other = swapped ? wa : wb;
        WideDouble ratio = other.dividedByUp(one);
        Enclosure f = SecularRoot.enclose(points, ratio, ratio.equals(other.dividedByDown(one)) ? 0 : 2 * U)
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
    PositivePair power(int n) {
        return many.apply(n);
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
        return dimension;
    }

    @Override
    public PairKind kind() {
        return PairKind.RANK_ONE;
    }
}
