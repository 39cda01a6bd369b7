package org.minorant.core.pair;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.util.List;
import java.util.Random;
import java.util.Set;
import java.util.concurrent.CancellationException;
import java.util.concurrent.ConcurrentSkipListSet;
import java.util.concurrent.atomic.AtomicInteger;
import java.util.concurrent.atomic.AtomicLong;
import org.junit.jupiter.api.Test;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.Estimate;
import org.minorant.core.WideDouble;
import org.minorant.core.internal.number.WideDoubleDouble;

class SpinBlocksPairTest {

    private static final DensityOperator UP = DensityOperator.ofBloch(0, 0, 0.9);
    private static final DensityOperator TILTED = DensityOperator.ofBloch(0.6, 0, 0.5);
    private static final WideDouble HALF = WideDouble.of(0.5);

    private static PositivePair copies(DensityOperator a, DensityOperator b, int n) {
        return PositivePair.of(a, b).copies(n);
    }

    @Test
    void theNumberOfThreadsChangesNoBit() {
        QubitSpectra s = QubitSpectra.of(UP, TILTED);
        SpinBlocksPlan plan = SpinBlocksPlan.of(s, 70, HALF, HALF, -13, 1e-12);
        SpinBlocksRun run = new SpinBlocksRun(s, plan, Effort.DEFAULT, true);
        List<Enclosure> alone = run.shares(1);
        assertTrue(alone.size() > 10, () -> alone.size() + " blocks");
        assertEquals(alone, run.shares(2));
        assertEquals(alone, run.shares(7));
    }

    @Test
    void everyBlockIsReportedOnce() {
        Set<Long> seen = new ConcurrentSkipListSet<>();
        AtomicLong calls = new AtomicLong();
        AtomicLong most = new AtomicLong();
        WorkListener listener = (done, total) -> {
            seen.add(done);
            calls.incrementAndGet();
            most.set(total);
        };
        QubitSpectra s = QubitSpectra.of(UP, TILTED);
        SpinBlocksPlan plan = SpinBlocksPlan.of(s, 40, HALF, HALF, -9, 1e-12);
        new SpinBlocksRun(s, plan, Effort.DEFAULT.withListener(listener), true).shares(3);
        assertEquals(plan.blocks().size(), most.get());
        assertEquals(plan.blocks().size(), calls.get());
        assertEquals(plan.blocks().size(), seen.size());
    }

    /** Blocks that are in hand may still end; those behind them may not. */
    @Test
    void aListenerEndsTheWorkAfterTheFirstBlock() {
        AtomicInteger finished = new AtomicInteger();
        WorkListener listener = new WorkListener() {
            @Override
            public void onProgress(long done, long total) {
                finished.incrementAndGet();
            }

            @Override
            public boolean isCancelled() {
                return finished.get() > 0;
            }
        };
        PositivePair many = copies(UP, TILTED, 400).withEffort(Effort.DEFAULT.withListener(listener));
        assertThrows(CancellationException.class, () -> many.traceMinimum(1));
        int threads = Math.max(1, Runtime.getRuntime().availableProcessors());
        assertTrue(finished.get() <= threads, () -> finished + " blocks on " + threads + " threads");
    }

    @Test
    void commutingQubitsGoByTypes() {
        DensityOperator first = DensityOperator.ofBloch(0.25, 0.25, 0.125);
        assertEquals(
                PairKind.TYPES,
                copies(first, DensityOperator.ofBloch(0.5, 0.5, 0.25), 9).kind());
        assertEquals(
                PairKind.TYPES,
                copies(first, DensityOperator.ofBloch(-0.5, -0.5, -0.25), 9).kind());
        assertEquals(
                PairKind.TYPES,
                copies(UP, DensityOperator.ofBloch(0, 0, -0.3), 9).kind());
        assertEquals(PairKind.SPIN_BLOCKS, copies(UP, TILTED, 9).kind());
    }

    /** The block of order k by one eigendecomposition and by rotations: two enclosures of one number. */
    @Test
    void bothWaysThroughABlockAgree() {
        QubitSpectra s = QubitSpectra.of(DensityOperator.ofBloch(0.1, 0.2, 0.3), DensityOperator.ofBloch(0.6, 0, -0.2));
        for (int k = 1; k <= 14; k++) {
            int d = k + 1;
            SpinOverlaps overlaps = new SpinOverlaps(s.cos(), s.sin(), d, d);
            while (overlaps.order() < k) {
                overlaps.step();
            }
            SpinOverlaps.Window w = overlaps.window(d, d);
            ColumnWeights x = weights(s.first(), d);
            ColumnWeights y = weights(s.second(), d);
            assertTrue(DenseBlock.fits(d, x, y));
            Enclosure dense = DenseBlock.enclose(x, y, w, () -> {});
            Enclosure rotated = SpinBlock.columns(x, y, w).enclose(1, 1, () -> {});
            String where = "order " + k + ": " + dense + " and " + rotated;
            assertTrue(dense.upper() >= rotated.lower() && rotated.upper() >= dense.lower(), where);
            assertTrue(dense.relativeWidth() <= 1e-11 && rotated.relativeWidth() <= 1e-11, where);
        }
    }

    private static ColumnWeights weights(QubitSpectra.Spectrum s, int columns) {
        WideDoubleDouble large = WideDoubleDouble.of(s.large()).power(columns - 1);
        return new ColumnWeights(BlockColumns.geometric(large, s.ratio(), columns), 0);
    }

    /**
     * Source: this library, so this guards against change only; the same pair at 60 copies agrees with integers of many digits ({@code CopiesContainmentTest}).
     */
    @Test
    void aDeepAnswerHasAllItsDigits() {
        Enclosure f = copies(DensityOperator.ofBloch(0, 0, 0.95), DensityOperator.ofBloch(0.9, 0, -0.3), 300)
                .withEffort(Effort.DEFAULT.withTolerance(1e-10))
                .traceMinimum(0.5, 0.5);
        BigDecimal value = new BigDecimal("9.968169334156e-81");
        BigDecimal unit = value.ulp();
        assertTrue(f.lowerWide().toBigDecimal().compareTo(value.add(unit)) <= 0, () -> "" + f.lowerWide());
        assertTrue(f.upperWide().toBigDecimal().compareTo(value.subtract(unit)) >= 0, () -> "" + f.upperWide());
        assertTrue(f.relativeWidth() <= 1e-10, () -> "" + f.relativeWidth());
    }

    @Test
    void estimatesAreWithinTheirErrors() {
        Random random = new Random(41);
        for (int i = 0; i < 14; i++) {
            PositivePair many = copies(state(random), state(random), 2 + 3 * i);
            WideDouble b = WideDouble.of(Math.exp(3 * random.nextGaussian()));
            Enclosure f = many.traceMinimum(WideDouble.ONE, b);
            Estimate e = many.traceMinimumEstimate(WideDouble.ONE, b);
            WideDouble off = e.wide().timesUp(WideDouble.of(e.relativeError()));
            String where = "pair " + i + ": " + e + " beside " + f;
            assertTrue(e.relativeError() <= 1e-9, where);
            assertTrue(e.wide().plusUp(off).compareTo(f.lowerWide()) >= 0, where);
            assertTrue(e.wide().plusDown(off.negate()).compareTo(f.upperWide()) <= 0, where);
        }
    }

    /** Nearly dependent columns, where rotations alone were off by 7e-13 of the sum and more than was stated. */
    @Test
    void theEstimateKnowsWhereRotationsAreHard() {
        PositivePair many = copies(DensityOperator.ofBloch(0.9, 0, 0), DensityOperator.ofBloch(0.3, 0, 0.35), 60);
        Enclosure f = many.traceMinimum(0.5, 0.5);
        Estimate e = many.traceMinimumEstimate(HALF, HALF);
        assertTrue(f.lower() - e.value() <= e.relativeError() * f.lower(), e + " beside " + f);
        assertTrue(e.value() - f.upper() <= e.relativeError() * f.upper(), e + " beside " + f);
        assertTrue(e.relativeError() <= 1e-10, e::toString);
    }

    private static DensityOperator state(Random random) {
        double x = random.nextGaussian();
        double y = random.nextGaussian();
        double z = random.nextGaussian();
        double s = 0.98 * random.nextDouble() / Math.sqrt(x * x + y * y + z * z);
        return DensityOperator.ofBloch(s * x, s * y, s * z);
    }
}
