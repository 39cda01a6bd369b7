package org.minorant.tests.contract;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.io.InputStream;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.minorant.bounds.Capacity;
import org.minorant.bounds.ClassicalQuantumChannel;
import org.minorant.bounds.CodingBounds;
import org.minorant.bounds.Divergences;
import org.minorant.bounds.Ledger;
import org.minorant.bounds.TestingBounds;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;
import org.minorant.core.MatrixMarket;
import org.minorant.measurement.BinaryTest;
import org.minorant.measurement.Ensemble;
import org.minorant.measurement.HypothesisPair;
import org.minorant.measurement.PrettyGoodMeasurement;

/** The lines that a user was promised, exactly, and that what they return fits together. */
class ContractTest {

    @TempDir
    Path folder;

    @Test
    void theContractCompilesAndRuns() throws IOException {
        double[][] re = {{0.5, 0.1, 0}, {0.1, 0.3, 0}, {0, 0, 0.2}};
        double[][] im = {{0, -0.2, 0}, {0.2, 0, 0}, {0, 0, 0}};
        double[] reKet = {0.6, 0};
        double[] imKet = {0, 0.8};
        Path path = folder.resolve("state.mtx");
        Files.writeString(path, "%%MatrixMarket matrix array real general\n2 2\n0.75\n0.25\n0.25\n0.25\n");
        DensityOperator any2 = DensityOperator.ofBloch(0, 0.5, 0);
        long messages = 2;

        // snippet contract
        DensityOperator rho = DensityOperator.ofBloch(0.0, 0.0, 0.9);
        DensityOperator sigma = DensityOperator.ofBloch(0.6, 0.0, 0.5);
        DensityOperator any = DensityOperator.of(re, im); // double[d][d] each
        DensityOperator pure = DensityOperator.ofKet(reKet, imKet); // double[d] each, normalised or refused
        DensityOperator file = MatrixMarket.readDensityOperator(path);

        HypothesisPair pair = HypothesisPair.of(rho, sigma);
        Enclosure error = pair.minimumError(0.5); // prior of the first state
        Enclosure f = pair.traceMinimum(2.5); // Tr[ρ ∧ 2.5σ]
        Enclosure beta = pair.typeTwoError(0.01); // least type-II error with type-I error at most 0.01
        BinaryTest test = pair.helstromTest(0.5); // operator(), typeOneError(), typeTwoError()

        Ensemble ensemble = Ensemble.of(List.of(rho, sigma, any2), new double[] {0.5, 0.3, 0.2});
        PrettyGoodMeasurement pgm = PrettyGoodMeasurement.of(ensemble);
        Enclosure success = pgm.successProbability(); // and errorProbability(), povm()

        Information d = Divergences.relativeEntropy(rho, sigma); // d.nats(), d.bits(): each an Enclosure

        ClassicalQuantumChannel channel = ClassicalQuantumChannel.of(rho, sigma);
        Capacity capacity = channel.capacity(); // value(): Information, input(): double[], outputState()
        CodingBounds once = CodingBounds.of(channel); // one use
        Enclosure eps =
                once.achievableError(messages); // f(M−1) at the chosen input; M as a long or as Information (ln M)
        Information lo = once.achievable(0.25); // ln M that some code surely reaches at that error
        Information up = once.converse(0.25); // ln M that no code exceeds
        Ledger ledger = TestingBounds.of(pair, 0.5); // every bound on the minimum error, ordered, with sources
        // end snippet

        // Source of the value: check values, one copy, computed with 100-digit arithmetic; the decimal Bloch components
        // are doubles within 1e-16.
        assertTrue(error.widen(2e-16).contains(0.3197224362268005), error::toString);
        assertTrue(error.relativeWidth() < 1e-14);
        assertEquals(0, file.re(0, 1) - 0.25);
        assertEquals(3, any.dimension());
        assertTrue(pure.traceEnclosure().widen(1e-15).contains(1));
        fitsTogether(error, f, beta, test);
        assertTrue(success.plus(pgm.errorProbability()).contains(1));
        assertEquals(3, pgm.povm().size());
        assertTrue(d.nats().lower() > 0 && d.nats().isCertainlyBelow(Enclosure.exact(10)));
        assertTrue(d.bits().times(Math.log(2)).widen(1e-12).contains(d.nats().midpoint()));
        assertEquals(2, capacity.input().length);
        assertTrue(capacity.value().nats().isCertainlyBelow(Enclosure.exact(Math.log(2))));
        assertEquals(2, capacity.outputState().dimension());
        assertTrue(lo.nats().isPossiblyBelow(up.nats()));
        assertTrue(eps.lower() > 0 && eps.upper() < 1);
        assertTrue(once.achievableError(up).isPossiblyBelow(Enclosure.ONE));
        assertTrue(ledger.toString().length() > 0);
    }

    /** Helstrom's test attains the minimum error, its type-I error has that type-II error at best, and f bounds both. */
    private static void fitsTogether(Enclosure error, Enclosure f, Enclosure beta, BinaryTest test) {
        Enclosure mean = test.typeOneError().plus(test.typeTwoError()).times(0.5);
        assertTrue(error.isPossiblyBelow(mean) && mean.isPossiblyBelow(error.widen(1e-12)), mean::toString);
        assertTrue(error.times(2).isPossiblyBelow(f));
        assertTrue(beta.isPossiblyBelow(Enclosure.exact(0.99)));
        assertEquals(2, test.operator().dimension());
    }

    /** The snippet above is the contract, word for word. */
    @Test
    void theContractIsWordForWord() throws IOException {
        String text;
        try (InputStream in = ContractTest.class.getResourceAsStream("contract.txt")) {
            text = new String(in.readAllBytes(), StandardCharsets.UTF_8);
        }
        assertEquals(
                SourceRegions.normalised(text), SourceRegions.ofThisPackage().get("contract"));
    }
}
