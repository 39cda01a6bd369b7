package org.minorant.core.pair;

import java.util.HashMap;
import java.util.List;
import java.util.Map;
import org.minorant.core.Enclosure;
import org.minorant.core.Estimate;
import org.minorant.core.PositiveOperator;
import org.minorant.core.WideDouble;
import org.minorant.core.internal.number.DoubleDouble;

/**
 * n copies of two positive operators on a qubit, through the blocks of total spin:
 *
 * <pre>A^⊗n = ⊕_q (det A)^q Sym^k(A) ⊗ 1_m,   k = n − 2q,   m = C(n,q)(k+1)/(n−q+1),   q = 0 … ⌊n/2⌋,</pre>
 *
 * so that f(A^⊗n, B^⊗n) = Σ_q m f_q. In a block A has the eigenvalues a₁^(k−i) a₂^i, B the like, and their eigenbases overlap in a Wigner matrix ({@link SpinOverlaps}).
 *
 * <p><b>Truncation.</b> Eigenvalues fall geometrically: only the leading ones are kept. A block, or the tail of a spectrum, that is left out lowers f by at most its trace
 * (Tr[(A₁+A₂) ∧ B] ≤ Tr[A₁ ∧ B] + Tr A₂, and f does not increase), which is added to the upper end. How much may be left out follows from the depth of the answer, first guessed from the Chernoff
 * exponent and then corrected. So the cost depends on the depth, and on n only through the number of blocks that matter, about √n.
 *
 * <p><b>Errors.</b> Weights err by a relative 2^-50; the operators' own relative error η becomes (1 ± η)^n. A trace error ν changes A^⊗n by at most n ν (Tr A + ν)^(n−1) in trace norm.
 *
 * <p>The decomposition is that of addition of angular momenta (Schur and Weyl); for pairs of qubit states see K. M. R. Audenaert et al., Commun. Math. Phys. 279, 251 (2008), from memory.
 */
final class SpinBlocksPair extends PositivePair {

    private final QubitSpectra spectra;
    private final int n;
    private final Effort effort;
    private final List<CopyErrors.Factor> first;
    private final List<CopyErrors.Factor> second;

    private SpinBlocksPair(QubitSpectra spectra, int n, Effort effort) {
        this.spectra = spectra;
        this.n = n;
        this.effort = effort;
        QubitPower p = new QubitPower(spectra, n);
        this.first = List.of(p.first());
        this.second = List.of(p.second());
    }

    /** n copies of two qubit operators; by types if they commute. */
    static PositivePair of(PositiveOperator a, PositiveOperator b, int n) {
        return of(QubitSpectra.of(a, b), n);
    }

    static PositivePair of(QubitSpectra s, int n) {
        boolean commute = s.sin().hi() == 0 || s.cos().hi() == 0;
        if (commute && s.first().traceError() == 0 && s.second().traceError() == 0) {
            DoubleDouble[] x = {s.first().large(), s.first().small()};
            DoubleDouble large = s.second().large();
            DoubleDouble small = s.second().small();
            DoubleDouble[] y =
                    s.sin().hi() == 0 ? new DoubleDouble[] {large, small} : new DoubleDouble[] {small, large};
            double error = Math.max(s.first().relativeError(), s.second().relativeError()) + 0x1p-100;
            return CommutingCopies.of(x, y, error, n);
        }
        return new SpinBlocksPair(s, n, Effort.DEFAULT);
    }

    @Override
    PositivePair power(int k) {
        return new SpinBlocksPair(spectra, CopyCount.times(n, k), effort);
    }

    @Override
    public PositivePair withEffort(Effort e) {
        return new SpinBlocksPair(spectra, n, e);
    }

    @Override
    Enclosure value(WideDouble wa, WideDouble wb) {
        Enclosure f = run(wa, wb, true);
        return CopyErrors.apply(CopyErrors.apply(f, first, wa), second, wb);
    }

    @Override
    public Estimate traceMinimumEstimate(WideDouble a, WideDouble b) {
        if (a.signum() <= 0 || b.signum() <= 0 || a.isInfinite() || b.isInfinite()) {
            return super.traceMinimumEstimate(a, b);
        }
        Enclosure f = run(a, b, false);
        return new Estimate(f.lowerWide(), f.relativeWidth() + n * 0x1p-50);
    }

    @Override
    public boolean hasCheapEstimate() {
        return true;
    }

    @Override
    public Work work(WideDouble a, WideDouble b) {
        return plan(a, b).work();
    }

    private SpinBlocksPlan plan(WideDouble a, WideDouble b) {
        return SpinBlocksPlan.of(spectra, n, a, b, ChernoffGuess.log2(spectra, n, a, b), effort.tolerance());
    }

    @Override
    public List<BlockTest> blockTests(WideDouble a, WideDouble b) {
        if (a.signum() <= 0 || b.signum() <= 0 || a.isInfinite() || b.isInfinite()) {
            return super.blockTests(a, b);
        }
        SpinBlocksPlan plan = plan(a, b);
        Map<Integer, WideDouble[]> values = new HashMap<>();
        for (int i = 0; i < 3; i++) {
            double factor = 1 + (i - 1) * BlockTest.STEP;
            List<SpinBlocksPlan.Block> changed =
                    plan.blocks().stream().map(x -> x.withFirst(factor)).toList();
            List<Enclosure> shares =
                    new SpinBlocksRun(spectra, new SpinBlocksPlan(changed, plan.dropped()), effort, false).shares();
            for (int j = 0; j < changed.size(); j++) {
                values.computeIfAbsent(changed.get(j).order(), k -> new WideDouble[3])[i] =
                        shares.get(j).lowerWide();
            }
        }
        return SpinBlocksPlan.traces(spectra, n).stream()
                .map(t -> blockTest(t, values.get(t.order()), a, b))
                .toList();
    }

    private static BlockTest blockTest(SpinBlocksPlan.Traces t, WideDouble[] f, WideDouble a, WideDouble b) {
        WideDouble x = t.first().timesDown(a);
        WideDouble y = t.second().timesDown(b);
        if (f != null) {
            return BlockTest.fromSlope(t.order(), t.first(), t.second(), f, x, y);
        }
        // too light to be planned for: whichever is heavier is accepted
        double accepted = x.compareTo(y) >= 0 ? 1 : 0;
        return new BlockTest(t.order(), t.first(), t.second(), accepted, accepted);
    }

    private Enclosure run(WideDouble wa, WideDouble wb, boolean proven) {
        double guess = ChernoffGuess.log2(spectra, n, wa, wb);
        return TruncatedSum.enclose(guess, effort.tolerance(), target -> {
            SpinBlocksPlan plan = SpinBlocksPlan.of(spectra, n, wa, wb, target, effort.tolerance());
            return new TruncatedSum.Parts(new SpinBlocksRun(spectra, plan, effort, proven).sum(), plan.dropped());
        });
    }

    @Override
    public Enclosure firstTrace() {
        return CopyErrors.trace(first);
    }

    @Override
    public Enclosure secondTrace() {
        return CopyErrors.trace(second);
    }

    /** The dimension 2^n, or the largest int beyond n = 30. */
    @Override
    public int dimension() {
        return CopyCount.dimension(2, n);
    }

    @Override
    public PairKind kind() {
        return PairKind.SPIN_BLOCKS;
    }
}
