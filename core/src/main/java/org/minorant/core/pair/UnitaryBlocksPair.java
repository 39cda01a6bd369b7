package org.minorant.core.pair;

import java.util.List;
import java.util.Optional;
import org.minorant.core.Enclosure;
import org.minorant.core.Estimate;
import org.minorant.core.InvalidInputException;
import org.minorant.core.PositiveOperator;
import org.minorant.core.WideDouble;
import org.minorant.core.internal.number.DoubleDouble;
import org.minorant.core.internal.number.WideDoubleDouble;

/**
 * n copies of two positive operators of dimension d, through the irreducible blocks of GL(d):
 *
 * <pre>A^⊗n = ⊕_λ π_λ(A) ⊗ 1_m,   λ ⊢ n with at most d parts,   m the number of standard tableaux of shape λ,</pre>
 *
 * so that f(A^⊗n, B^⊗n) = Σ_λ m f_λ (Schur and Weyl). In a block A has one eigenvalue for each Gelfand–Tsetlin pattern, a monomial of its own eigenvalues, B the like, and their eigenbases overlap in π_λ(U)
 * with U the overlaps of the eigenbases of A and B ({@link IrrepOverlaps}).
 *
 * <p><b>Truncation.</b> As in {@link SpinBlocksPair}: blocks and tails of spectra that are left out lower f by at most their traces, which are added to the upper end.
 *
 * <p><b>Errors.</b> (1 − η)A' − N ≤ A ≤ (1 + η)A' + N with Tr N ≤ ν is treated by {@link CopyErrors}.
 */
final class UnitaryBlocksPair extends PositivePair {

    private static final double WEIGHT_ERROR = 0x1p-50;
    /** Jacobi's method in many digits takes a second or so there. */
    private static final int MOST_DIMENSION = 12;

    private final QuditSpectra spectra;
    private final int n;
    private final Effort effort;
    /** The same numbers by blocks of spin, if both operators live on one plane. */
    private final Optional<PositivePair> onPlane;

    private UnitaryBlocksPair(QuditSpectra spectra, int n, Effort effort) {
        this.spectra = spectra;
        this.n = n;
        this.effort = effort;
        this.onPlane = spectra.asQubit().map(q -> SpinBlocksPair.of(q, n).withEffort(effort));
    }

    static UnitaryBlocksPair of(PositiveOperator a, PositiveOperator b, int n) {
        if (a.dimension() > MOST_DIMENSION) {
            throw new InvalidInputException(
                    "PositivePair.copies",
                    "mixed operators of dimension " + a.dimension() + " that do not commute",
                    "at most " + MOST_DIMENSION + ", or one operator a ket",
                    "compress them to a smaller common support");
        }
        return new UnitaryBlocksPair(QuditSpectra.of(a, b), n, Effort.DEFAULT);
    }

    @Override
    public PositivePair withEffort(Effort e) {
        return new UnitaryBlocksPair(spectra, n, e);
    }

    @Override
    PositivePair power(int k) {
        return new UnitaryBlocksPair(spectra, CopyCount.times(n, k), effort);
    }

    @Override
    Enclosure value(WideDouble wa, WideDouble wb) {
        if (onPlane.isPresent()) {
            return onPlane.get().traceMinimum(wa, wb);
        }
        Enclosure f = run(wa, wb, true);
        return CopyErrors.apply(CopyErrors.apply(f, factor(spectra.first()), wa), factor(spectra.second()), wb);
    }

    @Override
    public Estimate traceMinimumEstimate(WideDouble a, WideDouble b) {
        if (a.signum() <= 0 || b.signum() <= 0 || a.isInfinite() || b.isInfinite()) {
            return super.traceMinimumEstimate(a, b);
        }
        if (onPlane.isPresent()) {
            return onPlane.get().traceMinimumEstimate(a, b);
        }
        Enclosure f = run(a, b, false);
        return new Estimate(f.lowerWide(), f.relativeWidth() + n * 0x1p-50);
    }

    private Enclosure run(WideDouble wa, WideDouble wb, boolean proven) {
        if (spectra.first().rank() == 0 || spectra.second().rank() == 0) {
            return Enclosure.ZERO;
        }
        return TruncatedSum.enclose(guess(wa, wb), effort.tolerance(), target -> {
            UnitaryBlocksPlan plan = UnitaryBlocksPlan.of(spectra, n, wa, wb, target, effort.tolerance());
            return new TruncatedSum.Parts(new UnitaryBlocksRun(spectra, n, plan, effort, proven).sum(), plan.dropped());
        });
    }

    private double guess(WideDouble wa, WideDouble wb) {
        return ChernoffGuess.log2(
                doubles(spectra.first()),
                doubles(spectra.second()),
                spectra.overlaps().squares(),
                n,
                wa,
                wb);
    }

    @Override
    public Work work(WideDouble a, WideDouble b) {
        if (onPlane.isPresent()) {
            return onPlane.get().work(a, b);
        }
        boolean nothing = a.signum() <= 0 || b.signum() <= 0 || a.isInfinite() || b.isInfinite();
        if (nothing || spectra.first().rank() == 0 || spectra.second().rank() == 0) {
            return super.work(a, b);
        }
        return UnitaryBlocksPlan.of(spectra, n, a, b, guess(a, b), effort.tolerance())
                .work(spectra.overlaps().isReal());
    }

    private static double[] doubles(QuditSpectra.Spectrum s) {
        double[] v = new double[s.values().length];
        for (int i = 0; i < v.length; i++) {
            v[i] = s.values()[i].toDoubleDouble(0).hi();
        }
        return v;
    }

    /** One operator with its errors, those of the blocks' weights among them. */
    private List<CopyErrors.Factor> factor(QuditSpectra.Spectrum s) {
        WideDoubleDouble t = WideDoubleDouble.ZERO;
        for (WideDoubleDouble v : s.values()) {
            t = Letters.sum(t, v);
        }
        return List.of(new CopyErrors.Factor(
                Letters.enclosure(t, s.values().length * DoubleDouble.EPS),
                s.relativeError() + WEIGHT_ERROR / n,
                s.traceError().toDoubleUp(),
                n));
    }

    @Override
    public Enclosure firstTrace() {
        return CopyErrors.trace(factor(spectra.first()));
    }

    @Override
    public Enclosure secondTrace() {
        return CopyErrors.trace(factor(spectra.second()));
    }

    /** The dimension d^n, or the largest int beyond. */
    @Override
    public int dimension() {
        return CopyCount.dimension(spectra.overlaps().dimension(), n);
    }

    @Override
    public PairKind kind() {
        return PairKind.UNITARY_BLOCKS;
    }
}
