package org.minorant.tests.contract;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.minorant.bounds.Approximation;
import org.minorant.bounds.AssistedCapacity;
import org.minorant.bounds.AssistedCoding;
import org.minorant.bounds.BlockLength;
import org.minorant.bounds.Capacity;
import org.minorant.bounds.ClassicalQuantumChannel;
import org.minorant.bounds.CodingBounds;
import org.minorant.bounds.ErrorExponents;
import org.minorant.bounds.Exponent;
import org.minorant.bounds.Ledger;
import org.minorant.bounds.Side;
import org.minorant.bounds.TestingBounds;
import org.minorant.bounds.codes.Codebook;
import org.minorant.bounds.codes.CodebookFamily;
import org.minorant.bounds.codes.CodebookSearch;
import org.minorant.bounds.codes.FoundCodebook;
import org.minorant.bounds.codes.PrettyGoodDecoder;
import org.minorant.bounds.codes.RationalInput;
import org.minorant.core.Complex;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.Estimate;
import org.minorant.core.Information;
import org.minorant.core.StandardChannels;
import org.minorant.core.state.LightStates;
import org.minorant.core.state.TruncatedState;
import org.minorant.core.state.Truncation;
import org.minorant.measurement.CollectiveTest;
import org.minorant.measurement.CopiesNeeded;
import org.minorant.measurement.Ensemble;
import org.minorant.measurement.HypothesisPair;
import org.minorant.measurement.PrettyGoodMeasurement;
import org.minorant.measurement.RepeatedMeasurement;
import org.minorant.measurement.TradeOffCurve;

/** The tour of README, block by block, and that its comments are true. */
class TourTest {

    @Test
    void twoStates() {
        // snippet two-states
        DensityOperator rho = DensityOperator.ofBloch(0.0, 0.0, 0.9);
        DensityOperator sigma = DensityOperator.ofBloch(0.6, 0.0, 0.5);
        HypothesisPair pair = HypothesisPair.of(rho, sigma);

        Enclosure error = pair.minimumError(0.5); // prior of the first state: about 0.3197
        Enclosure missed = pair.typeTwoError(0.01); // least type-II error where the type-I error is at most 0.01
        TradeOffCurve curve = pair.tradeOffCurve(1e-3); // both errors at once, between two convex polygons
        Ledger ledger = TestingBounds.of(pair, 0.5); // prints as a table: side, value, theorem, source
        // end snippet

        assertEquals(0.3197, error.midpoint(), 5e-5);
        assertTrue(curve.typeTwoError(0.01).widen(1e-12).contains(missed.midpoint()));
        assertTrue(curve.gap() <= 1e-3);
        assertTrue(ledger.bounds(Side.LOWER).size() >= 2
                && ledger.bounds(Side.UPPER).size() >= 3);
        assertTrue(ledger.toString()
                .lines()
                .skip(1)
                .findFirst()
                .orElseThrow()
                .matches("side +value +theorem +.*source.*"));
    }

    @Test
    void boundsOfCopies() {
        HypothesisPair pair =
                HypothesisPair.of(DensityOperator.ofBloch(0.0, 0.0, 0.9), DensityOperator.ofBloch(0.6, 0.0, 0.5));
        HypothesisPair many = pair.copies(200);
        // snippet bounds-of-copies
        Ledger bounds = TestingBounds.of(many, 0.5); // the exact error beside bounds from one copy, which hold at any n
        RepeatedMeasurement alone = RepeatedMeasurement.bestFound(pair, 200, 0.5); // one measurement, on each copy
        Enclosure worth = alone.ratio(200, 0.5); // its error is 52 times the least one
        // end snippet

        assertEquals(
                3.938023188890161638e-10, bounds.exact().orElseThrow().value().midpoint(), 1e-20);
        assertTrue(bounds.bestLower().isPresent() && bounds.bestUpper().isPresent());
        assertEquals(52, worth.midpoint(), 0.05);
    }

    @Test
    void smallAnswers() {
        // snippet small-answers
        HypothesisPair nearlyOrthogonal =
                HypothesisPair.of(DensityOperator.ofKet(1, 0), DensityOperator.ofKet(1e-30, 1));
        Enclosure tiny = nearlyOrthogonal.minimumError(0.5); // 2.5e-61
        double width = tiny.relativeWidth(); // (upper - lower) / lower, below 1e-9
        // end snippet

        // the decimal 1e-30 is a double within 1e-46, so the overlap squared over four is 2.5e-61 to 15 digits
        assertEquals(2.5e-61, tiny.midpoint(), 1e-75);
        assertTrue(width < 1e-9, tiny::toString);
    }

    @Test
    void manyCopies() {
        DensityOperator rho = DensityOperator.ofBloch(0.0, 0.0, 0.9);
        DensityOperator sigma = DensityOperator.ofBloch(0.6, 0.0, 0.5);
        HypothesisPair pair = HypothesisPair.of(rho, sigma);

        // snippet many-copies
        HypothesisPair many = pair.copies(200); // 2^200 dimensions, none of them formed
        Enclosure collective = many.minimumError(0.5); // 3.938023188890e-10
        Estimate quick = many.minimumErrorEstimate(0.5); // the same without proof
        Information divergence = many.hypothesisTestingDivergence(1e-3); // -ln of the least type-II error
        CopiesNeeded needed = pair.copiesFor(0.5, 1e-9); // the least number of copies, certified from both sides
        CollectiveTest test = many.collectiveTest(0.5); // draws outcomes of the optimal test, for simulations
        HypothesisPair rough = many.withTolerance(1e-6).withProgress((done, total) -> {});
        // end snippet

        // check value, computed with 100-digit arithmetic by another program
        assertTrue(collective.contains(new BigDecimal("3.938023188890161638e-10")), collective::toString);
        assertEquals(collective.midpoint(), quick.value(), 1e-11 * quick.value());
        assertTrue(divergence.nats().relativeWidth() < 1e-9);
        assertTrue(needed.isLeast() && needed.errorAt().upper() <= 1e-9);
        assertEquals(101, test.blocks().size());
        assertTrue(rough.minimumError(0.5).relativeWidth() < 1e-6);
    }

    @Test
    void familiesOfStates() {
        // snippet light
        TruncatedState light = LightStates.displacedThermal(new Complex(1.1, 0), 0.1, Truncation.ofTail(1e-9));
        DensityOperator seen = light.state(); // on as many photon numbers as that tail asks for
        double away = light.traceDistanceBound(); // from the ideal state: a model error, in no enclosure
        // end snippet

        assertEquals(light.dimension(), seen.dimension());
        assertTrue(light.discardedWeight().upper() <= 1e-9);
        // cutting off weight w moves a state by at most sqrt(w)
        assertTrue(away > 0 && away <= 4e-5, () -> String.valueOf(away));
    }

    @Test
    void severalStatesAndAChannel() {
        // snippet several-states
        List<DensityOperator> trine = List.of(
                DensityOperator.ofKet(1, 0),
                DensityOperator.ofKet(-0.5, Math.sqrt(0.75)),
                DensityOperator.ofKet(-0.5, -Math.sqrt(0.75)));
        PrettyGoodMeasurement measurement = PrettyGoodMeasurement.of(Ensemble.equiprobable(trine));
        Enclosure success = measurement.successProbability(); // 2/3
        Enclosure least =
                measurement.optimalErrorProbability(); // what no measurement undercuts, and what this one reaches
        // end snippet

        assertEquals(2.0 / 3, success.midpoint(), 1e-14);
        assertTrue(least.contains(1.0 / 3) || Math.abs(least.upper() - 1.0 / 3) < 1e-14, least::toString);

        // snippet channel
        ClassicalQuantumChannel channel = ClassicalQuantumChannel.of(trine);
        Capacity capacity =
                channel.capacity(); // its value is certified from both sides, with the input that nearly attains it
        CodingBounds once = CodingBounds.of(channel);
        Enclosure reached = once.achievableError(2); // some code of two messages has at most this average error
        Information limit = once.converse(0.25); // ln M that no code with average error 0.25 exceeds
        CodingBounds many = once.uses(1000); // words of a thousand letters
        Information sure = many.achievable(1e-3); // some code has as many messages: about 990.0 bits
        Information most = many.converse(1e-3); // no code has more: about 1000.0 bits
        Approximation about = many.normalApproximation(1e-3); // nC − √(nV) Q⁻¹(ε): a type of its own, no bound
        Information anyway =
                many.strongConverse(1e-3); // for every channel and any number of uses, as chernoffAchievable
        Exponent decay = ErrorExponents.of(channel, Information.ofBits(0.3)).randomCoding(); // 0.7 bit each use
        BlockLength needed = once.blockLengthFor(0.9, 1e-3); // uses for 90 % of capacity: sure, and impossible before
        // end snippet

        // three kets in a plane whose average is the maximally mixed state: one bit
        assertEquals(1, capacity.value().bits().midpoint(), 1e-9);
        assertTrue(reached.upper() < 1);
        assertTrue(limit.nats().lower() > 0 && limit.nats().upper() < Double.POSITIVE_INFINITY);
        // against the maximally mixed state of 1000 qubits, f(t) is t/2^1000, so M − 1 is 2^1000 · ε and M at most
        // 2^1000/(1 − ε)
        assertEquals(1000 + Math.log(1e-3) / Math.log(2), sure.bits().midpoint(), 1e-6);
        assertEquals(1000 - Math.log1p(-1e-3) / Math.log(2), most.bits().midpoint(), 1e-6);
        assertEquals(1000, about.bits(), 1e-4);
        assertTrue(anyway.nats().upper() >= most.nats().lower());
        // E0 of a maximally mixed output is s ln 2
        assertEquals(0.7, decay.bits().midpoint(), 1e-12);
        // 2^(0.9 n) messages below 2^n/1000, and no converse against n bits
        assertEquals(100, needed.sure());
        assertEquals(1, needed.impossibleBefore());
    }

    @Test
    void codesToHold() {
        // snippet codes
        ClassicalQuantumChannel link =
                ClassicalQuantumChannel.of(DensityOperator.ofKet(1, 0), DensityOperator.ofKet(0.6, 0.8));
        CodebookFamily family = CodebookFamily.of(RationalInput.uniform(2), 12, 32); // 32 words of 12 letters
        FoundCodebook found = CodebookSearch.of(link, family).withSeed(1).find();
        Enclosure error = found.error(); // its true average error under the pretty-good measurement
        Enclosure promised = found.bound(); // f(31), which it does not exceed
        int[] word = found.codebook().word(5); // the letters to send for message 5
        Codebook again = family.ofCoefficients(found.codebook().coefficients()); // the same codebook
        Enclosure own = PrettyGoodDecoder.of(link)
                .errorProbability(Codebook.of(new int[] {0, 0, 1}, new int[] {1, 1, 0})); // 0.0118: any words
        // end snippet

        assertTrue(error.upper() <= promised.lower() && error.lower() > 0);
        assertEquals(12, word.length);
        assertEquals(found.codebook(), again);
        // Helstrom's error of two kets of overlap 0.6³
        assertEquals(0.5 * (1 - Math.sqrt(1 - Math.pow(0.6, 6))), own.midpoint(), 1e-15);
    }

    @Test
    void sharedEntanglement() {
        // snippet shared-entanglement
        AssistedCoding shared = AssistedCoding.of(StandardChannels.depolarising(2, 0.1));
        AssistedCapacity assisted = shared.capacity(); // 1.49681626832 bit, with the input, half of what is shared
        Information surely = shared.uses(1000).achievable(1e-3); // 1355.28 bits
        Information never = shared.uses(1000).converse(1e-3); // 1368.69 bits
        // end snippet

        assertEquals(1.49681626832, assisted.value().bits().midpoint(), 1e-11);
        assertEquals(1355.28, surely.bits().midpoint(), 5.1e-3);
        assertEquals(1368.69, never.bits().midpoint(), 5.1e-3);
    }
}
