package org.minorant.core.pair;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.minorant.core.Enclosure;
import org.minorant.core.PositiveFactor;
import org.minorant.core.PositiveOperator;
import org.minorant.core.WideDouble;
import org.minorant.core.internal.number.DoubleDouble;
import org.minorant.core.internal.number.WideDoubleDouble;

/**
 * n copies of a rank-one operator ψψ* against n copies of B: the measure of B^⊗n in ψ^⊗n has, for every type of the eigenvalues, the weight n!/Π n_i! · Π w_i^{n_i} at Π b_i^{n_i}. f is the root
 * of its secular equation.
 *
 * <p><b>Enclosure.</b> As in {@link FixedPointForm} and {@link EigenvalueForm}, the points known to (2K + 6) · 2^-53 relatively. Types that are left out:
 *
 * <ul>
 *   <li>in the first form they add at most Σ min(w, 4tb w/a) to g, bounded by {@link Tilt} with x_i = w_i, y_i = w_i b_i;
 *   <li>in the second the vector is cut by ε = √(Σ w), and √f is 1-Lipschitz in the vector: (√f − ε)² ≤ f' ≤ (√f + ε)².
 * </ul>
 *
 * <p>Where more than 5 · 10^6 types matter, {@link BinnedSecular} encloses f as closely as 2^14 bins allow.
 *
 * <p>Errors η, ν of the operators' factors: A^⊗n is within (1 ± η)^n of its model, and n ν (a + ν)^(n−1) in trace.
 */
final class RankOneCopies extends PositivePair {

    /** More points would take more than half a gigabyte, and bins take over. */
    static final double MOST_POINTS = 5e6;

    private static final double U = 0x1p-53;
    private static final int ATTEMPTS = 4;
    /** e^-LIGHT of the vector's square does not show in f. */
    private static final double LIGHT = 70;

    /** How far the operators may be from the model: relatively (either), and in trace. */
    record Errors(double relative, double traceOne, double traceOther) {
        static final Errors NONE = new Errors(0, 0, 0);
    }

    private final int n;
    private final int dimension;
    private final SpectralMeasure measure;
    private final Enclosure traceOther;
    private final Errors errors;
    private final boolean swapped;
    private final Effort effort;
    /** Logarithms of w and w b; the last one is for what is unresolved, if anything is. */
    private final double[] lnWeight;

    private final double[] lnProduct;

    /** Made when first needed; the same value whoever makes it. */
    private volatile BinnedSecular binned;

    private RankOneCopies(
            int n,
            int dimension,
            SpectralMeasure measure,
            Enclosure traceOther,
            Errors errors,
            boolean swapped,
            Effort effort) {
        this.n = n;
        this.dimension = dimension;
        this.measure = measure;
        this.traceOther = traceOther;
        this.errors = errors;
        this.swapped = swapped;
        this.effort = effort;
        int k = measure.weights().size();
        boolean dust = measure.unresolved().signum() > 0;
        lnWeight = new double[dust ? k + 1 : k];
        lnProduct = new double[lnWeight.length];
        for (int i = 0; i < k; i++) {
            lnWeight[i] = Letters.ln(measure.weights().get(i));
            lnProduct[i] = lnWeight[i] + Letters.ln(measure.values().get(i));
        }
        if (dust) {
            lnWeight[k] = measure.unresolved().lnUp();
            lnProduct[k] = lnWeight[k] + measure.unresolvedValue().lnUp();
        }
    }

    /** n copies of a pair of which the measure is known. */
    static PositivePair of(
            SpectralMeasure measure, int dimension, Enclosure traceOther, Errors errors, boolean swapped, int n) {
        check(measure, n);
        return new RankOneCopies(n, dimension, measure, traceOther, errors, swapped, Effort.DEFAULT);
    }

    /** n copies of two operators, the first of rank one; (B, ψψ*) if swapped. Empty if B is too ill-conditioned for a useful measure. */
    static Optional<PositivePair> of(PositiveOperator rankOne, PositiveOperator b, boolean swapped, int n) {
        PositiveFactor psi = rankOne.factor();
        Enclosure trace = b.traceEnclosure();
        if (!b.isDefinedByFactor() && PairStructure.isDiagonal(b)) {
            Errors errors = new Errors(psi.relativeError(), psi.traceError(), 0);
            SpectralMeasure m = SpectralMeasure.ofDiagonal(psi, b);
            return Optional.of(of(m, b.dimension(), trace, errors, swapped, n));
        }
        PositiveFactor factor = b.factor().reduced();
        return FactorMeasure.of(UnitFactor.of(psi), UnitFactor.of(factor)).map(m -> {
            double relative = Math.max(psi.relativeError(), sum(factor.relativeError(), m.relativeError()));
            Errors errors = new Errors(relative, psi.traceError(), factor.traceError());
            return of(m.spectral(), b.dimension(), trace, errors, swapped, n);
        });
    }

    /** (1 + a)(1 + b) − 1, rounded up. */
    private static double sum(double a, double b) {
        return (a + b + a * b) * (1 + 0x1p-50);
    }

    private static void check(SpectralMeasure m, int n) {
        List<WideDoubleDouble> all = new ArrayList<>(m.weights());
        all.addAll(m.values());
        Letters.checkCopies(n, all);
    }

    @Override
    PositivePair power(int k) {
        int copies = CopyCount.times(n, k);
        check(measure, copies);
        return new RankOneCopies(copies, dimension, measure, traceOther, errors, swapped, effort);
    }

    @Override
    public PositivePair withEffort(Effort e) {
        return new RankOneCopies(n, dimension, measure, traceOther, errors, swapped, e);
    }

    @Override
    Enclosure value(WideDouble wa, WideDouble wb) {
        WideDouble one = swapped ? wb : wa;
        WideDouble other = swapped ? wa : wb;
        Enclosure f = Enclosure.ZERO;
        if (measure.weights().size() > 0) {
            WideDouble t = other.dividedByUp(one);
            double off = t.equals(other.dividedByDown(one)) ? 0 : 2 * U;
            f = wanted(t) > MOST_POINTS ? throughBins(t, off) : small(t, off).orElseGet(() -> large(t, off));
        } else if (measure.unresolved().signum() > 0) {
            // ψ^⊗n is cut to what B^⊗n does not meet; see the second form
            f = Enclosure.of(WideDouble.ZERO, leftOut(Tilt.at(0, lnWeight, lnProduct, 0, n), LIGHT));
        }
        Enclosure scaled = f.times(CopyErrors.relative(errors.relative(), n)).times(Enclosure.of(one, one));
        WideDouble off = CopyErrors.trace(n, measure.totalEnclosure(), errors.traceOne(), errors.relative())
                .timesUp(one)
                .plusUp(CopyErrors.trace(n, traceOther, errors.traceOther(), errors.relative())
                        .timesUp(other));
        return off.signum() == 0 ? scaled : scaled.plus(Enclosure.of(off.negate(), off));
    }

    /** An upper estimate of the points that a value takes, in either form. */
    private double wanted(WideDouble t) {
        int k = measure.weights().size();
        Tilt[] tilts = {Tilt.of(lnWeight, lnProduct, lnRatio(t), n), Tilt.at(0, lnWeight, lnProduct, 0, n)};
        double[] ln = {lnLeftOut() + 10, LIGHT + Math.log(2 * lnWeight.length)};
        double most = 0;
        for (int j = 0; j < 2; j++) {
            int[] from = new int[k];
            int[] to = new int[k];
            for (int i = 0; i < k; i++) {
                from[i] = tilts[j].from(i, ln[j]);
                to[i] = tilts[j].to(i, ln[j]);
            }
            most = Math.max(most, TypeBox.count(n, from, to));
        }
        return most;
    }

    /** By bins, or by f ≤ Tr[A^(1−s)(tB)^s] = t^s Σ w b^s (Audenaert et al., PRL 98, 160501, 2007) where f is so deep that bins lose it. */
    private Enclosure throughBins(WideDouble t, double off) {
        Enclosure f = binned().value(t, total(), CopyErrors.kernel(measure, n), off);
        WideDouble chernoff =
                WideDouble.expUp(Tilt.of(lnWeight, lnProduct, lnRatio(t), n).lnChernoff());
        WideDouble upper = f.upperWide().min(chernoff);
        return Enclosure.of(f.lowerWide().min(upper), upper);
    }

    private BinnedSecular binned() {
        BinnedSecular b = binned;
        if (b == null) {
            b = BinnedSecular.of(measure, n, effort);
            binned = b;
        }
        return b;
    }

    private double lnRatio(WideDouble t) {
        return Math.log(t.significand()) + t.exponent() * Math.log(2) - n * Letters.ln(measure.total());
    }

    /** How small a share of types is left out at first: f is below its bound by a factor polynomial in n. */
    private double lnLeftOut() {
        int k = lnWeight.length;
        return Math.log(8 * k / effort.tolerance()) + Math.log(n) * 0.5 * (k + 1) + 10;
    }

    /** The value where it is at most about half of a. */
    private Optional<Enclosure> small(WideDouble t, double off) {
        Tilt tilt = Tilt.of(lnWeight, lnProduct, lnRatio(t), n);
        double ln = lnLeftOut();
        Optional<Enclosure> f = Optional.empty();
        for (int attempt = 0; attempt < ATTEMPTS; attempt++) {
            WideDouble skipped = leftOut(tilt, ln).timesPowerOfTwo(2);
            f = new FixedPointForm(points(tilt, ln, off), t, skipped, effort).solve();
            if (f.isEmpty()) {
                return f;
            }
            WideDouble allowed = f.get().lowerWide().timesDown(WideDouble.of(effort.tolerance() / 8));
            if (skipped.compareTo(allowed) <= 0) {
                return f;
            }
            ln += allowed.signum() > 0 ? skipped.dividedByUp(allowed).lnUp() + 3 : 200;
        }
        return f;
    }

    /** The value where it is of the order of a. */
    private Enclosure large(WideDouble t, double off) {
        Tilt tilt = Tilt.at(0, lnWeight, lnProduct, 0, n);
        double ln = LIGHT + Math.log(2 * lnWeight.length);
        WideDouble cut = leftOut(tilt, ln);
        Enclosure f = new EigenvalueForm(points(tilt, ln, off), t, effort).solve();
        Enclosure root = f.sqrt();
        WideDouble moved = cut.sqrtUp();
        return root.plus(Enclosure.of(moved.negate(), moved))
                .max(Enclosure.ZERO)
                .square();
    }

    /** A bound on what all types outside the windows add up to. */
    private WideDouble leftOut(Tilt tilt, double ln) {
        int k = measure.weights().size();
        double share = 2 * k * Math.exp(-ln) + (lnWeight.length > k ? tilt.occurs(k) : 0);
        return WideDouble.expUp(tilt.lnChernoff()).timesUp(WideDouble.of(share * (1 + 0x1p-40) + Double.MIN_NORMAL));
    }

    private SpectralPoints points(Tilt tilt, double ln, double off) {
        int k = measure.weights().size();
        int[] from = new int[k];
        int[] to = new int[k];
        for (int i = 0; i < k; i++) {
            from[i] = tilt.from(i, ln);
            to[i] = tilt.to(i, ln);
        }
        TypeBox box = TypeBox.of(
                n,
                from,
                to,
                (i, lo, hi) -> PowerTable.scaledPowers(measure.weights().get(i), lo, hi),
                (i, lo, hi) -> PowerTable.powers(measure.values().get(i), lo, hi));
        PointCollector c = new PointCollector(box, effort);
        WideDoubleDouble multinomial = Factorials.of(n);
        int lines = box.outerTo() - box.outerFrom() + 1;
        for (int i = 0; i < lines; i++) {
            box.lines(box.outerFrom() + i, multinomial.significand().hi(), multinomial.exponent(), 1, 0, c);
            effort.listener().onProgress(i + 1, lines);
        }
        double rounding = (2 * Math.max(2, k) + 6) * U + n * 0x1p-98;
        return new SpectralPoints(
                c.weights(),
                c.values(),
                total(),
                CopyErrors.kernel(measure, n),
                rounding + 2 * n * measure.weightError(),
                rounding + 2 * n * measure.valueError() + off);
    }

    @Override
    public Enclosure firstTrace() {
        return swapped ? otherTrace() : oneTrace();
    }

    @Override
    public Enclosure secondTrace() {
        return swapped ? oneTrace() : otherTrace();
    }

    /** ‖ψ‖^2n. */
    private Enclosure total() {
        return Letters.enclosure(measure.total().power(n), n * (measure.totalError() + 2 * DoubleDouble.EPS));
    }

    private Enclosure oneTrace() {
        Enclosure a = total().times(CopyErrors.relative(errors.relative(), n));
        WideDouble off = CopyErrors.trace(n, measure.totalEnclosure(), errors.traceOne(), errors.relative());
        return off.signum() == 0 ? a : a.plus(Enclosure.of(off.negate(), off)).max(Enclosure.ZERO);
    }

    private Enclosure otherTrace() {
        return traceOther.power(n);
    }

    @Override
    public int dimension() {
        return CopyCount.dimension(dimension, n);
    }

    @Override
    public PairKind kind() {
        return PairKind.RANK_ONE;
    }
}
