package org.minorant.core.pair;

import java.util.List;
import java.util.concurrent.atomic.AtomicLong;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;

/** Evaluates the blocks of a plan: one thread walks through the orders and hands windows of overlaps to the others; the sum is taken in the order of the blocks. */
final class SpinBlocksRun {

    /** log2 of the heaviest weight; its square and the products of a few such weights stay in range. */
    private static final long TOP = 450;

    /** The relative error of a weight is below 4n · 2^-102, n at most 2^27 or so. */
    private static final double ROUNDING = 0x1p-70;
    /** A block this narrow needs no rotations. */
    private static final double ENOUGH = 0x1p-45;

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
        Enclosure s = Enclosure.ZERO;
        for (Enclosure part : shares()) {
            s = s.plus(part);
        }
        return s;
    }

    /** The share of every block of the plan. */
    List<Enclosure> shares() {
        List<SpinBlocksPlan.Block> blocks = plan.blocks();
        if (blocks.isEmpty()) {
            return List.of();
        }
        plan.work().requireRoom();
        SpinOverlaps overlaps = new SpinOverlaps(spectra.cos(), spectra.sin(), plan.mostFirst(), plan.mostSecond());
        AtomicLong done = new AtomicLong();
        return Parallel.inOrder(effort, blocks, block -> {
            while (overlaps.order() < block.order()) {
                overlaps.step();
                effort.checkpoint();
            }
            SpinOverlaps.Window window = overlaps.window(block.first(), block.second());
            return stop -> {
                Enclosure f = value(block, window, stop);
                effort.listener().onProgress(done.incrementAndGet(), blocks.size());
                return f;
            };
        });
    }

    private Enclosure value(SpinBlocksPlan.Block block, SpinOverlaps.Window window, Runnable stop) {
        // one unit for both operators; the heavier one's first column is near the top of what squares without overflow
        long shift = Math.max(block.weightA().exponent(), block.weightB().exponent()) - TOP;
        GeometricColumns x =
                new GeometricColumns(block.weightA(), spectra.first().ratio(), block.first(), shift);
        GeometricColumns y =
                new GeometricColumns(block.weightB(), spectra.second().ratio(), block.second(), shift);
        if (x.held() == 0 || y.held() == 0) {
            return Enclosure.of(WideDouble.ZERO, block.most());
        }
        WideDouble leftOut = WideDouble.of(x.leftOut()).plusUp(WideDouble.of(y.leftOut()));
        if (!DenseBlock.fits(block.order(), x, y)) {
            return share(block, byRotations(SpinBlock.columns(x, y, window), stop), leftOut, shift);
        }
        Enclosure dense = share(block, DenseBlock.enclose(x, y, window, stop), leftOut, shift);
        WideDouble width = dense.upperWide().plusUp(dense.lowerWide().negate());
        if (width.compareTo(block.allowance()) <= 0
                || dense.relativeWidth() <= Math.max(ENOUGH, effort.tolerance() / 4)) {
            return dense;
        }
        Enclosure rotated = share(block, byRotations(SpinBlock.columns(x, y, window), stop), leftOut, shift);
        return proven ? dense.intersect(rotated) : rotated;
    }

    private Enclosure byRotations(ColumnPair columns, Runnable stop) {
        if (proven) {
            return columns.enclose(1, 1, stop);
        }
        WideDouble e = columns.estimate(1, 1, stop);
        return Enclosure.of(e, e);
    }

    /** The share of a block from its value in units of 2^shift; it is no more than the block's traces allow. */
    private static Enclosure share(SpinBlocksPlan.Block block, Enclosure unit, WideDouble leftOut, long shift) {
        Enclosure f = unit.times(Enclosure.of(1 - ROUNDING, 1 + ROUNDING));
        WideDouble upper = f.upperWide().isInfinite()
                ? block.most()
                : f.upperWide().plusUp(leftOut).timesPowerOfTwo(shift).min(block.most());
        WideDouble lower = f.lowerWide().max(WideDouble.ZERO).timesPowerOfTwo(shift);
        return Enclosure.of(lower.min(upper), upper);
    }
}
