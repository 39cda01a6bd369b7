package org.minorant.core.pair;

import java.util.List;
import java.util.concurrent.atomic.AtomicLong;
import org.minorant.core.Enclosure;

/** Evaluates the blocks of a plan: one thread walks through the orders and hands windows of overlaps to the others; the sum is taken in the order of the blocks. */
final class SpinBlocksRun {

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
        return shares(Runtime.getRuntime().availableProcessors());
    }

    /** The same on at most so many threads. */
    List<Enclosure> shares(int threads) {
        List<SpinBlocksPlan.Block> blocks = plan.blocks();
        if (blocks.isEmpty()) {
            return List.of();
        }
        plan.work().requireRoom();
        SpinOverlaps overlaps = new SpinOverlaps(spectra.cos(), spectra.sin(), plan.mostFirst(), plan.mostSecond());
        AtomicLong done = new AtomicLong();
        return Parallel.inOrder(
                effort,
                blocks,
                block -> {
                    overlaps.advanceTo(block.order(), effort::checkpoint);
                    SpinOverlaps.Window window = overlaps.window(block.first(), block.second());
                    return stop -> {
                        Enclosure f = value(block, window, stop);
                        effort.listener().onProgress(done.incrementAndGet(), blocks.size());
                        return f;
                    };
                },
                threads);
    }

    private Enclosure value(SpinBlocksPlan.Block block, SpinOverlaps.Window window, Runnable stop) {
        return new SpinBlockValue(block.order() + 1, block.most(), block.allowance(), effort.tolerance())
                .of(
                        BlockColumns.geometric(block.weightA(), spectra.first().ratio(), block.first()),
                        BlockColumns.geometric(block.weightB(), spectra.second().ratio(), block.second()),
                        window,
                        proven,
                        stop);
    }
}
