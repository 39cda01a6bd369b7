package org.minorant.core.pair;

import java.util.List;
import java.util.concurrent.atomic.AtomicLong;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;
import org.minorant.core.internal.number.DoubleDouble;
import org.minorant.core.internal.number.WideDoubleDouble;
import org.minorant.core.internal.work.Checkpoint;

/** Evaluates the blocks of a plan: one thread makes the overlaps and hands them to the others; the sum is taken in the order of the blocks. */
final class UnitaryBlocksRun {

    /** Weights beyond 2^±this would over- or underflow when squared. */
    private static final long FAR = 505;

    private static final double ROUNDING = 0x1p-50;
    /** A block this narrow needs no more work. */
    private static final double ENOUGH = 0x1p-45;
    /** So few columns are rotated at once. */
    private static final int FEW = 24;

    private final QuditSpectra spectra;
    private final UnitaryBlocksPlan plan;
    private final Effort effort;
    private final boolean proven;
    private final Monomials first;
    private final Monomials second;
    private final double step;

    UnitaryBlocksRun(QuditSpectra spectra, int n, UnitaryBlocksPlan plan, Effort effort, boolean proven) {
        this.spectra = spectra;
        this.plan = plan;
        this.effort = effort;
        this.proven = proven;
        this.first = new Monomials(spectra.first().values(), n);
        this.second = new Monomials(spectra.second().values(), n);
        this.step = (n + spectra.overlaps().dimension() + 1) * DoubleDouble.EPS;
    }

    /** The sum over the blocks, without what the plan drops. */
    Enclosure sum() {
        if (plan.blocks().isEmpty()) {
            return Enclosure.ZERO;
        }
        plan.work(spectra.overlaps().isReal()).requireRoom();
        IrrepTree tree = new IrrepTree(
                spectra.overlaps(),
                UnitaryBlocksPlan.Logs.of(spectra.first(), WideDouble.ONE),
                UnitaryBlocksPlan.Logs.of(spectra.second(), WideDouble.ONE));
        List<UnitaryBlocksPlan.Block> blocks = tree.ordered(plan.blocks());
        AtomicLong done = new AtomicLong();
        List<Enclosure> parts = Parallel.inOrder(effort, blocks, block -> {
            IrrepOverlaps overlaps = tree.overlaps(block, effort::checkpoint);
            return stop -> {
                Enclosure f = Checkpoint.during(stop, () -> value(block, overlaps, stop));
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

    private Enclosure value(UnitaryBlocksPlan.Block block, IrrepOverlaps overlaps, Runnable stop) {
        int[] shape = block.shape();
        int by = shape[shape.length - 1];
        long unitA = first.at(shape).exponent();
        long unitB = second.at(shape).exponent();
        int[] rows = UnitaryBlock.places(overlaps.rows(), IrrepTree.reduced(block.first(), by));
        int[] columns = UnitaryBlock.places(overlaps.columns(), IrrepTree.reduced(block.second(), by));
        UnitaryBlock b = new UnitaryBlock(
                columns(first, block.first(), shape, unitA),
                columns(second, block.second(), shape, unitB),
                overlaps,
                rows,
                columns,
                step);
        boolean whole = overlaps.rows().size() == Partitions.dimension(shape).doubleValue();
        WideDouble wa = shifted(block.weightA(), unitA);
        WideDouble wb = shifted(block.weightB(), unitB);
        Enclosure seen = Enclosure.of(WideDouble.ZERO, block.most());
        if (whole && rows.length + columns.length > FEW) {
            seen = seen.intersect(inWholeSpace(block, b, overlaps.rows().size(), wa, wb, stop));
            if (isFine(block, seen)) {
                return seen;
            }
        }
        boolean direct = whole && overlaps.rows().size() <= rows.length + columns.length;
        return seen.intersect(byRotations(block, wa, wb, b.columns(direct), stop));
    }

    private boolean isFine(UnitaryBlocksPlan.Block block, Enclosure f) {
        return f.upperWide().plusUp(f.lowerWide().negate()).compareTo(block.allowance()) <= 0
                || f.relativeWidth() <= Math.max(ENOUGH, effort.tolerance() / 4);
    }

    /** The share by eigenvalues, where these can be expected to be right to what is asked for; otherwise anything. */
    private Enclosure inWholeSpace(
            UnitaryBlocksPlan.Block block, UnitaryBlock b, int d, WideDouble wa, WideDouble wb, Runnable stop) {
        Enclosure seen = Enclosure.of(WideDouble.ZERO, block.most());
        long scale = Math.max(wa.exponent(), wb.exponent()) + 1;
        double x = wa.timesPowerOfTwo(-scale).toDoubleUp();
        double y = wb.timesPowerOfTwo(-scale).toDoubleUp();
        double traces = b.traces(x, y);
        double allowed = block.allowance().timesPowerOfTwo(-scale).toDoubleDown();
        boolean quick = WholeBlock.widthInDouble(d, traces) <= allowed;
        if (!quick && !(WholeBlock.widthInDoubleDouble(d, traces) <= allowed)) {
            return seen;
        }
        WholeBlock space = b.whole(x, y);
        stop.run();
        if (quick) {
            seen = seen.intersect(bounded(block, space.inDouble(), scale));
        }
        stop.run();
        return isFine(block, seen) ? seen : seen.intersect(bounded(block, space.inDoubleDouble(), scale));
    }

    private static Enclosure bounded(UnitaryBlocksPlan.Block block, Enclosure unit, long shift) {
        return BlockShare.of(unit, ROUNDING, WideDouble.ZERO, shift, block.most());
    }

    private static Monomials.Column[] columns(Monomials m, List<int[]> patterns, int[] shape, long unit) {
        return patterns.stream()
                .map(p -> m.column(PatternWindow.weight(shape, p), unit))
                .toArray(Monomials.Column[]::new);
    }

    private static WideDouble shifted(WideDoubleDouble weight, long by) {
        return WideDouble.of(weight.significand().hi(), weight.exponent()).timesPowerOfTwo(by);
    }

    private Enclosure byRotations(
            UnitaryBlocksPlan.Block block, WideDouble a, WideDouble b, ColumnPair columns, Runnable stop) {
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
            Enclosure e = columns.estimate(x, y, stop);
            WideDouble upper =
                    e.upperWide().isInfinite() ? e.upperWide() : e.upperWide().timesUp(factor);
            return bounded(block, Enclosure.of(e.lowerWide().timesDown(factor), upper), shift);
        }
        Enclosure f = columns.enclose(x, y, stop);
        WideDouble lower = f.lowerWide().max(WideDouble.ZERO).timesDown(factor);
        return bounded(block, Enclosure.of(lower, far ? WideDouble.POSITIVE_INFINITY : f.upperWide()), shift);
    }

    private static double edge(WideDouble own, WideDouble other) {
        return Math.scalb(1.0, (int) (own.compareTo(other) > 0 ? FAR : -FAR));
    }
}
