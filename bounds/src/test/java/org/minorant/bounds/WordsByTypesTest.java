package org.minorant.bounds;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;
import org.minorant.core.InvalidInputException;

/** Converses and codes by types of words, against all codes of short words, and where their values are known. */
final class WordsByTypesTest {

    private static final ClassicalQuantumChannel Z =
            ClassicalQuantumChannel.ofStochasticMatrix(new double[][] {{1, 0}, {0.5, 0.5}});

    /** What a code of words over two letters errs by with the best decoder: 1 − (1/M) Σ_y max_m W(y|m). */
    private static double error(double[][] words, List<Integer> code) {
        double right = 0;
        for (int y = 0; y < words[0].length; y++) {
            double most = 0;
            for (int w : code) {
                most = Math.max(most, words[w][y]);
            }
            right += most;
        }
        return 1 - right / code.size();
    }

    private static double[][] words(double[][] rows, int n) {
        int count = 1 << n;
        double[][] words = new double[count][count];
        for (int w = 0; w < count; w++) {
            for (int y = 0; y < count; y++) {
                words[w][y] = 1;
                for (int i = 0; i < n; i++) {
                    words[w][y] *= rows[w >> i & 1][y >> i & 1];
                }
            }
        }
        return words;
    }

    private static List<Integer> members(int set) {
        List<Integer> code = new ArrayList<>();
        for (int w = 0; w < 32; w++) {
            if ((set >> w & 1) == 1) {
                code.add(w);
            }
        }
        return code;
    }

    /** All 255 codes of different words of length 3: none is beyond the converse at its own error. */
    @Test
    void noShortCodeIsBeyondTheConverse() {
        Random random = new Random(5);
        for (int trial = 0; trial < 4; trial++) {
            double a = trial == 0 ? 0 : 0.5 * random.nextDouble();
            double b = 0.5 * random.nextDouble();
            double[][] rows = {{1 - a, a}, {b, 1 - b}};
            double[][] words = words(rows, 3);
            CodingBounds bounds = CodingBounds.of(ClassicalQuantumChannel.ofStochasticMatrix(rows))
                    .uses(3);
            double[] least = new double[9];
            Arrays.fill(least, 1);
            for (int set = 1; set < 256; set++) {
                List<Integer> code = members(set);
                least[code.size()] = Math.min(least[code.size()], error(words, code));
            }
            for (int m = 2; m <= 8; m++) {
                // an error of rounding is none
                double epsilon = Math.max(least[m], 1e-12);
                Information most = bounds.converseByTypes(epsilon * (1 + 1e-9));
                assertTrue(most.nats().upper() >= Math.log(m), a + ", " + b + ": " + m + " messages, " + most);
            }
        }
    }

    /** Codes of words with one or two of three letters alike: the best of them, words repeated or not, is as good as promised. */
    @Test
    void someCodeOfOneTypeIsAsGoodAsPromised() {
        Random random = new Random(6);
        for (int trial = 0; trial < 20; trial++) {
            double a = 0.2 * random.nextDouble();
            double b = 0.2 * random.nextDouble();
            double[][] rows = {{1 - a, a}, {b, 1 - b}};
            double[][] words = words(rows, 3);
            int ones = 1 + trial % 2;
            CodingBounds bounds = CodingBounds.of(ClassicalQuantumChannel.ofStochasticMatrix(rows))
                    .uses(3)
                    .withInput(1 - ones / 3.0, ones / 3.0);
            for (int m = 2; m <= 3; m++) {
                double least = 1;
                for (int set = 1; set < 256; set++) {
                    List<Integer> code = members(set);
                    boolean oneType = code.stream().allMatch(w -> Integer.bitCount(w) == ones);
                    least = oneType && code.size() == m ? Math.min(least, error(words, code)) : least;
                }
                double promised = bounds.constantCompositionError(
                                Information.ofNats(Enclosure.exact(m).ln()))
                        .upper();
                assertTrue(least <= promised, least + " > " + promised);
            }
        }
    }

    /** f_T((M−1)/Pⁿ(T)) added up by hand: n = 2, one letter of each kind, Pⁿ(T) = 1/2, ρ_B = (3/4, 1/4). */
    @Test
    void constantCompositionByHand() {
        double[] word = {0.5, 0.5, 0, 0};
        double[] rho = {0.5625, 0.1875, 0.1875, 0.0625};
        double f = 0;
        for (int y = 0; y < 4; y++) {
            f += Math.min(word[y], 1.5 / 0.5 * rho[y] / 2);
        }
        Enclosure found = CodingBounds.of(Z)
                .uses(2)
                .withInput(0.5, 0.5)
                .constantCompositionError(
                        Information.ofNats(Enclosure.exact(1.75).ln()));
        assertTrue(found.widen(1e-12).contains(f), found + " and " + f);
        Information threshold =
                CodingBounds.of(Z).uses(1000).withInput(0.6, 0.4).constantComposition(1e-3);
        assertTrue(threshold.source().contains("[600, 400]"), threshold.source());
        assertTrue(threshold.bits().width() < 1e-6);
        double back = CodingBounds.of(Z)
                .uses(1000)
                .withInput(0.6, 0.4)
                .constantCompositionError(threshold)
                .midpoint();
        assertEquals(1e-3, back, 1e-9);
    }

    /** Without noise no code exceeds k^n/(1 − ε), and one output state says so: the others must not be worse. */
    @Test
    void noNoise() {
        ClassicalQuantumChannel three =
                ClassicalQuantumChannel.ofStochasticMatrix(new double[][] {{1, 0, 0}, {0, 1, 0}, {0, 0, 1}});
        Enclosure m =
                CodingBounds.of(three).uses(4).converseByTypes(0.25).nats().exp();
        assertTrue(m.lower() >= 81 / 0.75 * (1 - 1e-9) && m.upper() <= 81 / 0.75 * 1.002, m.toString());
    }

    /**
     * The Z-channel at n = 1000: one output state for all words cannot be better than the best word, 321.93 bit; 265.17 bit are reached by the random-coding union bound (both computed by this library). Types are certified to less than ten decimals' width.
     */
    @Test
    void secondOrderOfTheZChannel() {
        CodingBounds bounds = CodingBounds.of(Z).uses(1000);
        Information byTypes = bounds.converseByTypes(1e-3);
        assertTrue(byTypes.bits().lower() > 265.17 && byTypes.bits().upper() < 276.5, byTypes.toString());
        assertTrue(byTypes.bits().width() < 1e-6, byTypes.toString());
        Ledger ledger = CodingBounds.of(Z).uses(50).ledger(1e-3);
        assertTrue(ledger.bounds().stream().anyMatch(b -> b.theorem().equals(TypesConverse.THEOREM)));
    }

    /** Too many types are refused, with the way out. */
    @Test
    void tooManyTypes() {
        InvalidInputException e = assertThrows(
                InvalidInputException.class,
                () -> CodingBounds.of(Z).uses(30_000).converseByTypes(0.1));
        assertTrue(e.getMessage().contains("types of words") && e.getMessage().contains("strongConverse"));
        assertThrows(InvalidInputException.class, () -> CodingBounds.of(Z).converseByTypes(1));
        assertThrows(InvalidInputException.class, () -> CodingBounds.of(Z).achievableLargest(0));
        assertThrows(InvalidInputException.class, () -> CodingBounds.of(Z).constantComposition(Double.NaN));
    }

    /** M letters without noise: f(t) = t/N up to N, and (1 + t)(1 − t/(Nε)) is largest at t = (Nε − 1)/2. */
    @Test
    void largestErrorWithoutNoise() {
        int n = 64;
        double[][] rows = new double[n][n];
        for (int x = 0; x < n; x++) {
            rows[x][x] = 1;
        }
        CodingBounds bounds = CodingBounds.of(ClassicalQuantumChannel.ofStochasticMatrix(rows));
        double t = (64 * 0.5 - 1) / 2;
        double m = (1 + t) * (1 - t / 32);
        Information found = bounds.achievableLargest(0.5);
        assertTrue(found.nats().exp().upper() <= m * (1 + 1e-12));
        // t is known to 2 %, and ln M is stationary in ln t, with a second derivative below 1
        assertEquals(m, found.nats().exp().lower(), 2e-4 * m);
        assertTrue(bounds.achievableLargest(0.01).nats().upper() <= 0);
    }

    /** The value of the largest error is near the best of many t, and between a bit and two below the average's. */
    @Test
    void largestErrorAgainstAllPoints() {
        CodingBounds bounds = CodingBounds.of(Z).uses(200);
        double found = bounds.achievableLargest(0.01).nats().lower();
        double average = bounds.achievable(0.01).nats().upper();
        double best = 0;
        for (int i = 1; i < 100; i++) {
            double lnM = average - 0.03 * i;
            double f = bounds.achievableError(Information.ofNats(lnM)).midpoint();
            best = Math.max(best, lnM + Math.log1p(-f / 0.01));
        }
        assertEquals(best, found, 1e-3);
        assertTrue(found < average);
    }

    /** The nearest type takes whole counts as they are and gives what is left to the largest remainders. */
    @Test
    void nearestTypes() {
        assertArrayEquals(new int[] {3, 7}, TypeNet.nearest(new double[] {0.3, 0.7}, 10));
        assertArrayEquals(new int[] {1, 1, 2}, TypeNet.nearest(new double[] {0.3, 0.3, 0.4}, 4));
        assertArrayEquals(new int[] {0, 1}, TypeNet.nearest(new double[] {0.4, 0.6}, 1));
    }
}
