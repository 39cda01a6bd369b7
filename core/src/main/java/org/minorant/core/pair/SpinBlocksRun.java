package org.minorant.core.pair;

import java.util.List;
import java.util.concurrent.atomic.AtomicLong;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;

/** Evaluates the blocks of a plan: one thread walks through the orders and hands windows of overlaps to the others; the sum is taken in the order of the blocks. */
final class SpinBlocksRun {

    /** Weights beyond 2^±this would over- or underflow when squared. */
    private static final long FAR = 505;

    private static final double ROUNDING = 0x1p-50;

    private final QubitSpectra spectra;
    private final SpinBlocksPlan plan;
    private final Effort effort;
    private final boolean proven;

    SpinBlocksRun(QubitSpectra spectra, SpinBlocksPlan plan, Effort effort, boolean proven) {
        this.spectra = spectra;
        this.plan = plan;
        this.effort = effort;
        this.proven = proven;
    }

    /** The sum over the blocks, without what the plan drops. */
    Enclosure sum() {
        List<SpinBlocksPlan.Block> blocks = plan.blocks();
        if (blocks.isEmpty()) {
            return Enclosure.ZERO;
        }
        GeometricColumns x = new GeometricColumns(spectra.first().ratio(), plan.mostFirst());
        GeometricColumns y = new GeometricColumns(spectra.second().ratio(), plan.mostSecond());
        SpinOverlaps overlaps = new SpinOverlaps(spectra.cos(), spectra.sin(), plan.mostFirst(), plan.mostSecond());
        AtomicLong done = new AtomicLong();
        List<Enclosure> parts = Parallel.inOrder(effort, blocks, block -> {
            while (overlaps.order() < block.order()) {
                overlaps.step();
                effort.checkpoint();
            }
            SpinOverlaps.Window window = overlaps.window(block.first(), block.second());
            return stop -> {
                Enclosure f = value(block, SpinBlock.columns(x, y, window), stop);
                effort.listener().onProgress(done.incrementAndGet(), blocks.size());
                return f;
            };
        });
        Enclosure s = Enclosure.ZERO;
        for (Enclosure part : parts) {
            s = s.plus(part);
        }
        return s;
    }

    private Enclosure value(SpinBlocksPlan.Block block, ColumnPair columns, Runnable stop) {
        WideDouble a = new BlockWeight(block.weightA()).wide();
        WideDouble b = new BlockWeight(block.weightB()).wide();
        long shift = Math.floorDiv(a.exponent() + b.exponent(), 2L);
        WideDouble wa = a.timesPowerOfTwo(-shift);
        WideDouble wb = b.timesPowerOfTwo(-shift);
        // beyond the range the heavier weight is lowered: f is monotone, so this is a lower end
        WideDouble most = WideDouble.of(1, FAR);
        boolean far = wa.compareTo(most) > 0 || wb.compareTo(most) > 0;
        WideDouble factor = far ? wa.min(wb).timesPowerOfTwo(FAR) : WideDouble.ONE;
        double x = far ? edge(wa, wb) : wa.toDoubleDown();
        double y = far ? edge(wb, wa) : wb.toDoubleDown();
        if (!proven) {
            WideDouble e = columns.estimate(x, y, stop).timesDown(factor).timesPowerOfTwo(shift);
            return Enclosure.of(e, e);
        }
        Enclosure f = columns.enclose(x, y, stop).times(Enclosure.of(1 - ROUNDING, 1 + ROUNDING));
        WideDouble upper = far || f.upperWide().isInfinite()
                ? block.most()
                : f.upperWide().timesPowerOfTwo(shift).min(block.most());
        WideDouble lower = f.lowerWide().max(WideDouble.ZERO).timesDown(factor).timesPowerOfTwo(shift);
        return Enclosure.of(lower.min(upper), upper);
    }

    private static double edge(WideDouble own, WideDouble other) {
        return Math.scalb(1.0, (int) (own.compareTo(other) > 0 ? FAR : -FAR));
    }
}
