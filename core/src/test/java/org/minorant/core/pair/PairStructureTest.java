package org.minorant.core.pair;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.SplittableRandom;
import org.junit.jupiter.api.Test;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.InvalidInputException;
import org.minorant.core.Operator;
import org.minorant.core.PositiveOperator;
import org.minorant.core.WideDouble;

class PairStructureTest {

    private static PositiveOperator random(SplittableRandom random, int n) {
        double[] re = new double[n * n];
        double[] im = new double[n * n];
        for (int i = 0; i < n * n; i++) {
            re[i] = random.nextDouble() - 0.5;
            im[i] = random.nextDouble() - 0.5;
        }
        return PositiveOperator.ofFactor(Operator.ofRowMajor(n, n, re, im));
    }

    /** The same operator by its entries. */
    private static PositiveOperator byEntries(PositiveOperator a) {
        return PositiveOperator.of(Operator.ofRowMajor(a.rows(), a.columns(), a.realParts(), a.imaginaryParts()));
    }

    @Test
    void kindsAreFound() {
        SplittableRandom random = new SplittableRandom(1);
        PositiveOperator diagonal = PositiveOperator.ofEigenvalues(0.5, 0.25, 1e-200);
        PositiveOperator other = PositiveOperator.ofEigenvalues(0, 0.5, 3e-200);
        assertEquals(PairKind.COMMUTING, PositivePair.of(diagonal, other).kind());
        PositiveOperator ket = DensityOperator.ofKet(0.6, 0, 0.8);
        PositiveOperator spread = DensityOperator.ofKet(0.6, 0.64, 0.48);
        assertEquals(PairKind.RANK_ONE, PositivePair.of(spread, diagonal).kind());
        assertEquals(PairKind.RANK_ONE, PositivePair.of(diagonal, spread).kind());
        assertEquals(PairKind.DIRECT_SUM, PositivePair.of(ket, diagonal).kind());
        assertEquals(
                PairKind.FACTORED, PositivePair.of(random(random, 3), spread).kind());
        PositiveOperator dense = byEntries(random(random, 3));
        assertEquals(
                PairKind.DENSE, PositivePair.of(dense, dense.plus(diagonal)).kind());
        assertEquals(PairKind.RANK_ONE, PositivePair.of(dense, spread).kind());
    }

    @Test
    void commutingPairsAreExactSums() {
        PositivePair p = PositivePair.ofSpectra(new double[] {0.5, 0.25, 1e-200}, new double[] {0, 0.5, 3e-200});
        assertTrue(p.traceMinimum(1).contains(0.25));
        // 0.25 and 1e-200 are far apart, so the sum is one unit wide
        assertTrue(p.traceMinimum(1).relativeWidth() <= 0x1p-52);
        PositivePair tiny = PositivePair.ofSpectra(new double[] {1, 1e-300}, new double[] {0, 1e-300});
        Enclosure f = tiny.traceMinimum(WideDouble.of(1), WideDouble.of(1, -2000));
        assertTrue(f.relativeWidth() < 4 * 0x1p-52, "width " + f.relativeWidth());
        assertTrue(f.contains(WideDouble.of(1e-300, -2000)));
    }

    @Test
    void blocksAddUp() {
        SplittableRandom random = new SplittableRandom(2);
        PositiveOperator a = random(random, 2);
        PositiveOperator b = random(random, 2);
        double[][] big = new double[4][4];
        double[][] im = new double[4][4];
        double[][] big2 = new double[4][4];
        double[][] im2 = new double[4][4];
        int[] place = {3, 1};
        for (int i = 0; i < 2; i++) {
            for (int j = 0; j < 2; j++) {
                big[place[i]][place[j]] = a.re(i, j);
                im[place[i]][place[j]] = a.im(i, j);
                big2[place[i]][place[j]] = b.re(i, j);
                im2[place[i]][place[j]] = b.im(i, j);
            }
        }
        big[0][0] = 0.75;
        big2[0][0] = 0.5;
        big[2][2] = 1e-3;
        PositivePair whole = PositivePair.of(PositiveOperator.of(big, im), PositiveOperator.of(big2, im2));
        assertEquals(PairKind.DIRECT_SUM, whole.kind());
        Enclosure f = whole.traceMinimum(1.25);
        Enclosure parts =
                PositivePair.of(byEntries(a), byEntries(b)).traceMinimum(1.25).plus(Enclosure.exact(0.625));
        f.intersect(parts);
        assertTrue(f.relativeWidth() < 1e-12);
    }

    @Test
    void rankOneAgreesWithRotations() {
        SplittableRandom random = new SplittableRandom(3);
        for (int trial = 0; trial < 60; trial++) {
            int n = 2 + trial % 5;
            double[] re = new double[n];
            double[] values = new double[n];
            for (int i = 0; i < n; i++) {
                re[i] = random.nextDouble() - 0.5;
                values[i] = trial % 3 == 0 ? Math.pow(10, -12 * i) : random.nextDouble();
            }
            if (trial % 4 == 0) {
                values[0] = 0;
            }
            PositiveOperator psi = PositiveOperator.ofFactor(Operator.ofRowMajor(n, 1, re, new double[0]));
            PositiveOperator b = PositiveOperator.ofEigenvalues(values);
            double t = Math.pow(10, random.nextDouble(-4, 4));
            Enclosure secular = RankOnePair.of(psi, b, false).traceMinimum(t);
            Enclosure rotated = new FactorPair(psi.factor(), b.factor()).traceMinimum(t);
            secular.intersect(rotated);
            assertTrue(secular.relativeWidth() < 1e-11, trial + ": width " + secular.relativeWidth());
            Enclosure swapped = RankOnePair.of(psi, b, true).traceMinimum(t);
            swapped.intersect(new FactorPair(b.factor(), psi.factor()).traceMinimum(t));
        }
    }

    @Test
    void rankOneKeepsDigitsFarBelowDouble() {
        // ψ = (1, ε) against diag(0, 1): f is close to ε² t/(1 + t), exactly ε² to first order for t → ∞
        PositiveOperator psi = PositiveOperator.ofFactor(Operator.ofReal(new double[][] {{1}, {1e-250}}));
        PositivePair p = RankOnePair.of(psi, PositiveOperator.ofEigenvalues(0, 1), false);
        Enclosure f = p.traceMinimum(1);
        assertTrue(f.relativeWidth() < 1e-13);
        // ½ · 1e-500 up to 1e-500 relative corrections and the rounding of 1e-250
        assertTrue(f.lnLower() < -500 * Math.log(10) - Math.log(2) + 1e-12);
        assertTrue(f.lnUpper() > -500 * Math.log(10) - Math.log(2) - 1e-12);
    }

    @Test
    void aPureStateBelowItsRivalIsWhollyCovered() {
        // ψ*B⁻¹ψ < 1, so ψψ* ≤ B and f = Tr ψψ*
        PositiveOperator psi = DensityOperator.ofKet(0.6, 0.8);
        PositivePair p = PositivePair.of(psi, PositiveOperator.ofEigenvalues(2, 3));
        assertTrue(p.traceMinimum(1).contains(1.0));
        assertTrue(p.traceMinimum(1).relativeWidth() < 1e-9);
    }

    @Test
    void sameBitsWhateverWasAskedBefore() {
        SplittableRandom random = new SplittableRandom(5);
        PositiveOperator a = byEntries(random(random, 4));
        PositiveOperator b = byEntries(random(random, 4));
        Enclosure before = PositivePair.of(a, b).traceMinimum(0.3);
        a.factor();
        b.factor();
        assertEquals(before, PositivePair.of(a, b).traceMinimum(0.3));
    }

    @Test
    void badInputIsRefused() {
        PositiveOperator a = PositiveOperator.ofEigenvalues(1, 2);
        InvalidInputException e =
                assertThrows(InvalidInputException.class, () -> PositivePair.of(a, PositiveOperator.ofEigenvalues(1)));
        assertEquals(
                "PositivePair.of: the second operator has dimension 1, expected 2, as the first; both must act on the same space",
                e.getMessage());
        PositivePair p = PositivePair.of(a, a);
        for (double t : new double[] {-1, Double.NaN, Double.POSITIVE_INFINITY}) {
            InvalidInputException w = assertThrows(InvalidInputException.class, () -> p.traceMinimum(t));
            assertEquals(
                    "PositivePair.traceMinimum: the weight b is " + t
                            + ", expected at least 0 and finite; give a weight in that range",
                    w.getMessage());
        }
        assertThrows(InvalidInputException.class, () -> PositivePair.directSum(List.of(), new double[0]));
        assertThrows(InvalidInputException.class, () -> PositivePair.directSum(List.of(p), new double[] {Double.NaN}));
        assertThrows(InvalidInputException.class, () -> PositivePair.ofSpectra(new double[] {1}, new double[] {-1}));
        assertThrows(InvalidInputException.class, () -> PositivePair.ofSpectra(new double[0], new double[0]));
    }

    @Test
    void zeroWeightsGiveZero() {
        PositivePair p = PositivePair.of(PositiveOperator.ofEigenvalues(1, 2), PositiveOperator.ofEigenvalues(1, 2));
        assertEquals(Enclosure.ZERO, p.traceMinimum(0));
        assertEquals(Enclosure.ZERO, p.traceMinimum(0, 1));
    }

    @Test
    void quarterTurnsMakeAPairRealAndKeepItsCurve() {
        // Bloch vectors in the y-z plane: off-diagonal entries are imaginary
        PositiveOperator a = DensityOperator.ofBloch(0, 0.6, 0.5);
        PositiveOperator b = DensityOperator.ofBloch(0, -0.3, 0.7);
        QuarterTurns turns = QuarterTurns.find(a, b).orElseThrow();
        assertTrue(turns.columns(a.factor().columns()).orElseThrow().isReal());
        Enclosure turned = FactorPair.fromOperators(a, b).traceMinimum(0.8);
        Enclosure plain = new FactorPair(a.factor(), b.factor()).traceMinimum(0.8);
        turned.intersect(plain);
        // in the x-z plane they are real: the same curve by rotation about z
        Enclosure real = PositivePair.of(DensityOperator.ofBloch(0.6, 0, 0.5), DensityOperator.ofBloch(-0.3, 0, 0.7))
                .traceMinimum(0.8);
        turned.intersect(real);
        PositiveOperator dense = byEntries(a);
        QuarterTurns byEntry = QuarterTurns.find(dense, byEntries(b)).orElseThrow();
        assertEquals(Math.abs(dense.im(1, 0)), Math.abs(byEntry.entry(1, 0, dense.re(1, 0), dense.im(1, 0))));
        assertTrue(QuarterTurns.find(a, DensityOperator.ofBloch(0.1, 0.2, 0)).isEmpty());
        // a cycle of three imaginary entries cannot be turned real
        double[][] im = {{0, 0.1, 0.1}, {-0.1, 0, 0.1}, {-0.1, -0.1, 0}};
        PositiveOperator cycle = PositiveOperator.of(new double[][] {{1, 0, 0}, {0, 1, 0}, {0, 0, 1}}, im);
        assertTrue(QuarterTurns.find(cycle, cycle).isEmpty());
    }
}
