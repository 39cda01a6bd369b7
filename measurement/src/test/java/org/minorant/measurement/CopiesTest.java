package org.minorant.measurement;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.SplittableRandom;
import java.util.concurrent.CancellationException;
import java.util.concurrent.atomic.AtomicLong;
import org.junit.jupiter.api.Test;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.InvalidInputException;
import org.minorant.core.pair.BlockTest;
import org.minorant.core.pair.Work;
import org.minorant.core.pair.WorkListener;

class CopiesTest {

    private static final HypothesisPair PAIR =
            HypothesisPair.of(DensityOperator.ofBloch(0, 0, 0.9), DensityOperator.ofBloch(0.6, 0, 0.5));

    @Test
    void oneCopyIsThePairItself() {
        assertEquals(PAIR, PAIR.copies(1));
        assertEquals(1, PAIR.copyCount());
        assertEquals(PAIR, PAIR.single());
    }

    @Test
    void copiesOfCopiesMultiply() {
        HypothesisPair six = PAIR.copies(2).copies(3);
        assertEquals(6, six.copyCount());
        assertEquals(PAIR, six.single());
        assertEquals(PAIR.copies(6).minimumError(0.5), six.minimumError(0.5));
    }

    @Test
    void theLeastNumberOfCopiesIsProvenFromBothSides() {
        CopiesNeeded k = PAIR.copiesFor(0.5, 1e-9);
        assertTrue(k.errorAt().upper() <= 1e-9);
        assertTrue(k.errorBefore().lower() > 1e-9);
        assertTrue(k.isLeast());
        assertEquals(PAIR.copies(k.value()).minimumError(0.5), k.errorAt());
        assertEquals(PAIR.copies(k.value() - 1).minimumError(0.5), k.errorBefore());
    }

    @Test
    void fewCopiesForALargeError() {
        CopiesNeeded k = PAIR.copiesFor(0.5, 0.4);
        assertEquals(1, k.value());
        assertEquals(Enclosure.exact(0.5), k.errorBefore());
    }

    @Test
    void whatGuessingReachesNeedsNoCopies() {
        assertThrows(InvalidInputException.class, () -> PAIR.copiesFor(0.3, 0.3));
    }

    @Test
    void equalStatesAreNeverToldApart() {
        DensityOperator r = DensityOperator.ofBloch(0, 0.1, 0.9);
        InvalidInputException e = assertThrows(
                InvalidInputException.class, () -> HypothesisPair.of(r, r).copiesFor(0.5, 0.4));
        assertTrue(e.getMessage().contains("check that the states differ"), e.getMessage());
    }

    @Test
    void theEstimateLiesInTheEnclosureWithinItsError() {
        HypothesisPair many = PAIR.copies(60);
        Enclosure e = many.minimumError(0.3);
        double estimate = many.minimumErrorEstimate(0.3).value();
        double slack = many.minimumErrorEstimate(0.3).relativeError();
        assertTrue(e.widen(slack * e.upper()).contains(estimate), e + " and " + estimate);
    }

    @Test
    void progressIsReportedToTheEnd() {
        AtomicLong last = new AtomicLong();
        PAIR.copies(60)
                .withProgress((done, total) -> last.accumulateAndGet(total - done, Math::min))
                .minimumError(0.5);
        assertEquals(0, last.get());
    }

    @Test
    void theListenerCancels() {
        WorkListener never = new WorkListener() {
            @Override
            public void onProgress(long done, long total) {}

            @Override
            public boolean isCancelled() {
                return true;
            }
        };
        HypothesisPair many = PAIR.copies(200).withProgress(never);
        assertThrows(CancellationException.class, () -> many.minimumError(0.5));
    }

    @Test
    void anInterruptCancels() {
        Thread.currentThread().interrupt();
        assertThrows(CancellationException.class, () -> PAIR.copies(200).minimumError(0.5));
        assertTrue(Thread.interrupted());
    }

    @Test
    void aWiderToleranceGivesAWiderEnclosureAroundTheSameNumber() {
        Enclosure rough = PAIR.copies(100).withTolerance(1e-4).minimumError(0.5);
        Enclosure fine = PAIR.copies(100).minimumError(0.5);
        assertTrue(rough.relativeWidth() <= 1e-4, () -> "" + rough.relativeWidth());
        assertTrue(fine.relativeWidth() <= 1e-12, () -> "" + fine.relativeWidth());
        assertTrue(rough.upperWide().compareTo(fine.lowerWide()) >= 0);
        assertTrue(rough.lowerWide().compareTo(fine.upperWide()) <= 0);
    }

    /** Frequencies of 20 000 draws lie within five standard deviations of the certified error. */
    @Test
    void simulatedErrorsAreThoseOfTheOptimalTest() {
        HypothesisPair many = PAIR.copies(12);
        CollectiveTest test = many.collectiveTest(0.3);
        SplittableRandom random = new SplittableRandom(5);
        int draws = 20_000;
        int missed = 0;
        int wrong = 0;
        for (int i = 0; i < draws; i++) {
            missed += test.draw(CollectiveTest.Truth.FIRST, random).answer() == CollectiveTest.Truth.SECOND ? 1 : 0;
            wrong += test.draw(CollectiveTest.Truth.SECOND, random).answer() == CollectiveTest.Truth.FIRST ? 1 : 0;
        }
        double error = (0.3 * missed + 0.7 * wrong) / draws;
        double exact = many.minimumError(0.3).midpoint();
        assertEquals(exact, error, 5 * Math.sqrt(exact / draws));
    }

    @Test
    void theTestOfManyCopiesHasTheMinimumErrorBlockByBlock() {
        HypothesisPair many = PAIR.copies(50);
        double sum = 0;
        double first = 0;
        for (BlockTest b : many.collectiveTest(0.5).blocks()) {
            first += b.firstTrace().toDoubleDown();
            sum += 0.5 * b.firstTrace().toDoubleDown() * (1 - b.firstAccepted());
            sum += 0.5 * b.secondTrace().toDoubleDown() * b.secondAccepted();
        }
        double exact = many.minimumError(0.5).midpoint();
        assertEquals(1, first, 1e-12);
        assertEquals(exact, sum, 1e-7 * exact);
    }

    @Test
    void oneCopyIsOneBlock() {
        assertEquals(1, PAIR.collectiveTest(0.5).blocks().size());
        BlockTest b = PAIR.collectiveTest(0.5).blocks().get(0);
        assertEquals(PAIR.helstromTest(0.5).typeOneError().midpoint(), 1 - b.firstAccepted(), 1e-7);
        assertEquals(PAIR.helstromTest(0.5).typeTwoError().midpoint(), b.secondAccepted(), 1e-7);
    }

    @Test
    void workIsKnownBefore() {
        Work w = PAIR.copies(1000).work(0.5);
        assertTrue(w.parts() > 50 && w.parts() < 501, () -> "" + w);
        assertTrue(w.largestRank() > 50 && w.largestRank() < 400, () -> "" + w);
        assertTrue(w.bytes() < 1L << 30, () -> "" + w);
        assertEquals(1, PAIR.work(0.5).parts());
    }

    @Test
    void productsOfPowers() {
        HypothesisPair other =
                HypothesisPair.of(DensityOperator.ofBloch(0.3, 0, 0), DensityOperator.ofBloch(0, 0.8, 0));
        Enclosure mixed = HypothesisPair.ofProducts(List.of(PAIR, other), 3, 2).minimumError(0.5);
        // more copies tell more
        assertTrue(mixed.isCertainlyBelow(PAIR.copies(3).minimumError(0.5)));
        assertTrue(mixed.isCertainlyBelow(other.copies(2).minimumError(0.5)));
    }
}
