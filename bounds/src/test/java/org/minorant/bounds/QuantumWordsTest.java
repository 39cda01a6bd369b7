package org.minorant.bounds;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.SplittableRandom;
import org.junit.jupiter.api.Test;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;
import org.minorant.core.InvalidInputException;

/** n uses by types of words, against one use of the channel whose letters are the words. */
class QuantumWordsTest {

    private static DensityOperator ket(double angle) {
        return DensityOperator.ofKet(new double[] {Math.cos(angle), Math.sin(angle)}, new double[2]);
    }

    private static DensityOperator ket(int d, SplittableRandom random) {
        double[] re = new double[d];
        double[] im = new double[d];
        double s = 0;
        for (int i = 0; i < d; i++) {
            re[i] = random.nextDouble() - 0.5;
            im[i] = random.nextDouble() - 0.5;
            s += re[i] * re[i] + im[i] * im[i];
        }
        for (int i = 0; i < d; i++) {
            re[i] /= Math.sqrt(s);
            im[i] /= Math.sqrt(s);
        }
        return DensityOperator.ofKet(re, im);
    }

    private static DensityOperator power(DensityOperator a, int n) {
        DensityOperator p = a;
        for (int i = 1; i < n; i++) {
            p = p.tensor(a);
        }
        return p;
    }

    private static void agreesWithWords(List<DensityOperator> letters, double[] p, DensityOperator sigma, int n) {
        List<DensityOperator> words = new ArrayList<>(letters);
        double[] q = p;
        for (int i = 1; i < n; i++) {
            List<DensityOperator> longer = new ArrayList<>();
            double[] r = new double[q.length * p.length];
            for (int w = 0; w < q.length; w++) {
                for (int x = 0; x < p.length; x++) {
                    r[longer.size()] = q[w] * p[x];
                    longer.add(words.get(w).tensor(letters.get(x)));
                }
            }
            words = longer;
            q = r;
        }
        CodingBounds uses = CodingBounds.of(ClassicalQuantumChannel.of(letters))
                .uses(n)
                .withInput(p)
                .withOutputState(sigma);
        CodingBounds once =
                CodingBounds.of(ClassicalQuantumChannel.of(words)).withInput(q).withOutputState(power(sigma, n));
        for (long m : new long[] {2, 5}) {
            Enclosure reached = uses.achievableError(m);
            // disjoint enclosures would throw
            reached.intersect(once.achievableError(m));
            assertTrue(reached.upper() - reached.lower() < 1e-8, reached::toString);
            Enclosure least = uses.converseError(m);
            least.intersect(once.converseError(m));
            assertTrue(least.upper() - least.lower() < 1e-6, least::toString);
        }
        uses.achievable(0.4).nats().intersect(once.achievable(0.4).nats());
        uses.converse(0.2).nats().intersect(once.converse(0.2).nats());
    }

    @Test
    void twoKetsOfUnequalWeight() {
        agreesWithWords(List.of(ket(0.2), ket(1.0)), new double[] {0.3, 0.7}, DensityOperator.ofBloch(0.4, 0, 0.1), 3);
    }

    @Test
    void threeKetsInThreeDimensions() {
        SplittableRandom random = new SplittableRandom(3);
        List<DensityOperator> letters = List.of(ket(3, random), ket(3, random), ket(3, random));
        double[] p = {0.5, 0.25, 0.25};
        agreesWithWords(letters, p, DensityOperator.mixture(letters, p), 2);
    }

    @Test
    void twoMixedQubits() {
        List<DensityOperator> letters =
                List.of(DensityOperator.ofBloch(0, 0, 0.9), DensityOperator.ofBloch(0.6, 0, 0.5));
        agreesWithWords(letters, new double[] {0.4, 0.6}, DensityOperator.ofBloch(0.3, 0.1, 0.6), 3);
    }

    @Test
    void lettersOfThreeDimensionsAreMultipliedOut() {
        DensityOperator a = DensityOperator.mixture(
                List.of(ket(3, new SplittableRandom(4)), DensityOperator.maximallyMixed(3)), new double[] {0.75, 0.25});
        DensityOperator b = DensityOperator.mixture(
                List.of(ket(3, new SplittableRandom(5)), DensityOperator.maximallyMixed(3)), new double[] {0.5, 0.5});
        agreesWithWords(
                List.of(a, b),
                new double[] {0.5, 0.5},
                DensityOperator.mixture(List.of(a, b), new double[] {0.5, 0.5}),
                2);
        CodingBounds many = CodingBounds.of(ClassicalQuantumChannel.of(a, b)).uses(8);
        InvalidInputException e = assertThrows(InvalidInputException.class, () -> many.achievable(0.1));
        assertTrue(e.getMessage().contains("dimension 3"), e::getMessage);
    }

    /** Three kets at 120 degrees are one kind of letter up to the rounding of their entries. */
    @Test
    void alikeKetsCountAsOne() {
        ClassicalQuantumChannel trine = ClassicalQuantumChannel.of(ket(0), ket(Math.PI / 3), ket(2 * Math.PI / 3));
        CodingBounds many = CodingBounds.of(trine).uses(2000);
        Information reached = many.achievable(1e-3);
        Information most = many.converse(1e-3);
        assertTrue(reached.bits().upper() < most.bits().lower());
        // the capacity is one bit, all output states being pure and their mixture maximally mixed; each word has then
        // the weight t - 1 above
        // σ^⊗n at t = 2^n/(1 - ε), and the converse is 2000 + log2 1/(1 - ε) exactly
        assertEquals(2000 - Math.log(1 - 1e-3) / Math.log(2), most.bits().midpoint(), 1e-8);
        assertTrue(reached.bits().lower() > 1900, reached::toString);
        assertTrue(reached.bits().upper() - reached.bits().lower() < 1e-6, reached::toString);
    }

    @Test
    void unequalWeightsInManyUses() {
        ClassicalQuantumChannel channel = ClassicalQuantumChannel.of(ket(0), ket(Math.acos(0.78)));
        CodingBounds many = CodingBounds.of(channel).uses(300);
        Information best = many.achievable(1e-3);
        Information other = many.withInput(0.4, 0.6).achievable(1e-3);
        assertTrue(other.bits().upper() < best.bits().lower(), () -> other + " " + best);
        assertTrue(other.bits().upper() - other.bits().lower() < 1e-6, other::toString);
        assertEquals(
                best.bits().midpoint(),
                many.withInput(0.5, 0.5).achievable(1e-3).bits().midpoint(),
                1e-6);
        // a shade from even weights goes by types, and changes the second order in the difference
        Information near = many.withInput(0.5 + 0x1p-30, 0.5 - 0x1p-30).achievable(1e-3);
        assertEquals(best.bits().midpoint(), near.bits().midpoint(), 1e-5);
    }
}
