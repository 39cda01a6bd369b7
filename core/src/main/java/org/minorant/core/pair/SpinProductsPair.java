package org.minorant.core.pair;

import java.util.List;
import java.util.concurrent.atomic.AtomicLong;
import org.minorant.core.Enclosure;
import org.minorant.core.Estimate;
import org.minorant.core.InvalidInputException;
import org.minorant.core.WideDouble;
import org.minorant.core.internal.number.DoubleDouble;

/**
 * Products of powers of qubit operators, A₁^⊗n₁ ⊗ A₂^⊗n₂ ⊗ … against B₁^⊗n₁ ⊗ B₂^⊗n₂ ⊗ …: every choice of one spin block of each factor is a block, its columns and overlaps the products of theirs. Truncated and
 * enclosed as {@link SpinBlocksPair}.
 */
final class SpinProductsPair extends PositivePair {

    private final List<QubitPower> powers;
    private final Effort effort;

    private SpinProductsPair(List<QubitPower> powers, Effort effort) {
        this.powers = powers;
        this.effort = effort;
    }

    static SpinProductsPair of(List<QubitPower> powers) {
        double blocks = 1;
        for (QubitPower p : powers) {
            blocks *= p.n() / 2 + 1;
        }
        if (blocks > SpinProductsPlan.MOST_BLOCKS) {
            throw new InvalidInputException(
                    "PositivePair.ofPowers",
                    "there are " + blocks + " products of spin blocks",
                    "at most " + SpinProductsPlan.MOST_BLOCKS,
                    "use fewer copies or fewer different factors");
        }
        return new SpinProductsPair(List.copyOf(powers), Effort.DEFAULT);
    }

    @Override
    public PositivePair withEffort(Effort e) {
        return new SpinProductsPair(powers, e);
    }

    @Override
    Enclosure value(WideDouble wa, WideDouble wb) {
        Enclosure f = run(wa, wb, true);
        return CopyErrors.apply(CopyErrors.apply(f, first(), wa), second(), wb);
    }

    private List<CopyErrors.Factor> first() {
        return powers.stream().map(QubitPower::first).toList();
    }

    private List<CopyErrors.Factor> second() {
        return powers.stream().map(QubitPower::second).toList();
    }

    @Override
    PositivePair power(int k) {
        return of(powers.stream()
                        .map(p -> new QubitPower(p.spectra(), CopyCount.times(p.n(), k)))
                        .toList())
                .withEffort(effort);
    }

    @Override
    public Work work(WideDouble a, WideDouble b) {
        boolean nothing = a.signum() <= 0 || b.signum() <= 0 || a.isInfinite() || b.isInfinite();
        return nothing
                ? super.work(a, b)
                : SpinProductsPlan.of(powers, a, b, guess(a, b), effort.tolerance())
                        .work();
    }

    @Override
    public boolean hasCheapEstimate() {
        return true;
    }

    @Override
    public Estimate traceMinimumEstimate(WideDouble a, WideDouble b) {
        if (a.signum() <= 0 || b.signum() <= 0 || a.isInfinite() || b.isInfinite()) {
            return super.traceMinimumEstimate(a, b);
        }
        Enclosure f = run(a, b, false);
        return new Estimate(f.lowerWide(), f.relativeWidth() + copies() * 0x1p-50);
    }

    private Enclosure run(WideDouble wa, WideDouble wb, boolean proven) {
        return TruncatedSum.enclose(guess(wa, wb), effort.tolerance(), target -> {
            SpinProductsPlan plan = SpinProductsPlan.of(powers, wa, wb, target, effort.tolerance());
            return new TruncatedSum.Parts(sum(plan, proven), plan.dropped());
        });
    }

    private double guess(WideDouble wa, WideDouble wb) {
        return ChernoffGuess.log2(powers.stream().map(ChernoffGuess.Factor::of).toList(), wa, wb);
    }

    private Enclosure sum(SpinProductsPlan plan, boolean proven) {
        if (plan.blocks().isEmpty()) {
            return Enclosure.ZERO;
        }
        plan.work().requireRoom();
        SpinOverlaps.Window[][] windows = windows(plan);
        AtomicLong done = new AtomicLong();
        List<Enclosure> parts = Parallel.inOrder(effort, plan.blocks(), block -> stop -> {
            Enclosure f = new SpinBlockValue(block.dimension(), block.most(), block.allowance(), effort.tolerance())
                    .of(block.first().columns(), block.second().columns(), window(windows, block), proven, stop);
            effort.listener().onProgress(done.incrementAndGet(), plan.blocks().size());
            return f;
        });
        Enclosure s = Enclosure.ZERO;
        for (Enclosure part : parts) {
            s = s.plus(part);
        }
        return s;
    }

    /** The windows of every factor, by factor and block number q. */
    private SpinOverlaps.Window[][] windows(SpinProductsPlan plan) {
        SpinOverlaps.Window[][] windows = new SpinOverlaps.Window[powers.size()][];
        for (int i = 0; i < powers.size(); i++) {
            QubitSpectra s = powers.get(i).spectra();
            int n = powers.get(i).n();
            int rows = plan.mostFirst(i) + 1;
            int columns = plan.mostSecond(i) + 1;
            SpinOverlaps overlaps = new SpinOverlaps(s.cos(), s.sin(), rows, columns);
            windows[i] = new SpinOverlaps.Window[n / 2 + 1];
            for (int k = 0; k <= n; k++) {
                if ((n - k) % 2 == 0) {
                    windows[i][(n - k) / 2] = overlaps.window(rows, columns);
                }
                if (k < n) {
                    overlaps.step();
                    effort.checkpoint();
                }
            }
        }
        return windows;
    }

    /** The overlaps of the columns that a block keeps: products over the factors, |c| r' + r |c'| + r r' and a rounding of 2^-102 as radius. */
    private SpinOverlaps.Window window(SpinOverlaps.Window[][] windows, SpinProductsPlan.Block block) {
        int[][] rows = block.first().indices();
        int[][] columns = block.second().indices();
        double[][] high = new double[rows.length][columns.length];
        double[][] low = new double[rows.length][columns.length];
        double[][] radius = new double[rows.length][columns.length];
        for (int a = 0; a < rows.length; a++) {
            for (int b = 0; b < columns.length; b++) {
                DoubleDouble c = DoubleDouble.ONE;
                double r = 0;
                for (int i = 0; i < powers.size(); i++) {
                    SpinOverlaps.Window w = windows[i][block.q()[i]];
                    int p = rows[a][i];
                    int q = columns[b][i];
                    double size = Math.abs(c.hi());
                    double other = Math.abs(w.high()[p][q]);
                    r = (size * w.radius()[p][q] + r * (other + w.radius()[p][q]) + size * other * 0x1p-101)
                                    * (1 + 0x1p-50)
                            + 0x1p-1060;
                    c = c.times(new DoubleDouble(w.high()[p][q], w.low()[p][q]));
                }
                high[a][b] = c.hi();
                low[a][b] = c.lo();
                radius[a][b] = r;
            }
        }
        return new SpinOverlaps.Window(high, low, radius);
    }

    private int copies() {
        return powers.stream().mapToInt(QubitPower::n).sum();
    }

    @Override
    public Enclosure firstTrace() {
        return CopyErrors.trace(first());
    }

    @Override
    public Enclosure secondTrace() {
        return CopyErrors.trace(second());
    }

    /** The dimension 2^n of n copies in all, or the largest int beyond n = 30. */
    @Override
    public int dimension() {
        return CopyCount.dimension(2, copies());
    }

    @Override
    public PairKind kind() {
        return PairKind.SPIN_BLOCKS;
    }
}
