package org.minorant.bounds.divergence;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.util.Arrays;
import java.util.Random;
import org.hipparchus.dfp.Dfp;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.EnumSource;
import org.minorant.core.DensityOperator;
import org.minorant.core.PositiveOperator;

/** Certified spectra and overlaps against 64-digit diagonalisation. */
class SpectralStateTest {

    @ParameterizedTest
    @EnumSource(TestStates.Kind.class)
    void eigenvaluesAndOverlapsHoldTheTrueOnes(TestStates.Kind kind) {
        Random random = new Random(kind.ordinal());
        DensityOperator rho = TestStates.of(kind, 4, random);
        DensityOperator sigma = TestStates.of(TestStates.Kind.RANDOM, 4, random);
        Multiprecision.Spectrum a = Multiprecision.diagonalise(ReferencePair.matrix(rho));
        Multiprecision.Spectrum b = Multiprecision.diagonalise(ReferencePair.matrix(sigma));
        StatePair pair = StatePair.of(rho, sigma);
        SpectralState s = pair.first();
        Integer[] order = order(a);
        Integer[] other = order(b);
        int skipped = 4 - s.rank();
        assertEquals(kind == TestStates.Kind.DEFICIENT ? 1 : 0, skipped);
        for (int i = 0; i < s.rank(); i++) {
            Dfp truth = a.values()[order[i + skipped]];
            assertTrue(
                    s.values().get(i).widen(1e-45).toEnclosure().contains(Multiprecision.decimal(truth)),
                    s.values().get(i) + " misses " + truth);
            assertTrue(s.values().get(i).radius() < 1e-28);
            for (int j = 0; j < 4 && kind != TestStates.Kind.CLUSTERED; j++) {
                Dfp p = a.vectors().adjoint().times(b.vectors()).squaredModulus(order[i + skipped], other[j]);
                BigDecimal off = Multiprecision.decimal(p)
                        .subtract(new BigDecimal(pair.square(i, j).hi()))
                        .subtract(new BigDecimal(pair.square(i, j).lo()))
                        .abs();
                assertTrue(
                        off.doubleValue() <= pair.square(i, j).radius() + rotation(s, i) + rotation(pair.second(), j),
                        "overlap " + i + ", " + j + " is off by " + off);
            }
        }
    }

    /**
     * Eigenvectors are those of an operator within κ of the state: they may turn by κ over the gap to the next eigenvalue, which moves a
     * squared overlap by twice that.
     */
    private static double rotation(SpectralState s, int i) {
        double gap = 1;
        for (int j = 0; j < s.rank(); j++) {
            gap = j == i
                    ? gap
                    : Math.min(
                            gap,
                            Math.abs(s.values().get(i).hi() - s.values().get(j).hi()));
        }
        return 4 * s.spread() / Math.min(gap, s.values().get(i).hi());
    }

    private static Integer[] order(Multiprecision.Spectrum s) {
        Integer[] order = {0, 1, 2, 3};
        Arrays.sort(order, (i, j) -> s.values()[i].lessThan(s.values()[j]) ? -1 : 1);
        return order;
    }

    @Test
    void factorsKeepTheirRank() {
        SpectralState ket = SpectralState.of(DensityOperator.ofKet(0.6, 0.8, 0));
        assertEquals(1, ket.rank());
        assertEquals(0, ket.restRank());
        assertEquals(2, ket.rows().cardinality());
        assertFalse(ket.fillsRows());
        assertEquals(0, ket.vectors().modulusUpper(2, 0), "the third component vanishes exactly");
    }

    @Test
    void diagonalStatesAreExact() {
        SpectralState s = SpectralState.of(DensityOperator.ofEigenvalues(1 - 1e-30, 0, 1e-200));
        assertTrue(s.coordinates());
        assertTrue(s.fillsRows());
        assertEquals(2, s.rank());
        assertEquals(new Ball(1e-200, 0, 0), s.values().get(1));
    }

    @Test
    void aClearlyNegativeEigenvalueIsCutOffWithCertainty() {
        // eigenvalues 1 + 1e-16 and about -1e-16: the entries mean the positive part
        double x = 0.5 + 0x1p-53;
        SpectralState s = SpectralState.of(DensityOperator.ofReal(new double[][] {{0.5, x}, {x, 0.5}}));
        assertEquals(1, s.rank());
        assertEquals(0, s.restRank());
    }

    @Test
    void anExactlySingularMatrixHasItsRank() {
        SpectralState s = SpectralState.of(DensityOperator.ofReal(new double[][] {{0.5, 0.5}, {0.5, 0.5}}));
        assertEquals(1, s.rank());
        assertEquals(0, s.restRank());
        assertEquals(0, s.rest());
        assertTrue(s.trace().toEnclosure().contains(1));
    }

    @Test
    void anUndecidableEigenvalueIsLeftOpen() {
        // Fibonacci numbers: F(75)F(77) − F(76)² = 1, so the smaller eigenvalue is about 1/F(78), 1e-32 of the larger
        // one
        double[][] f = {{5527939700884757.0, 3416454622906707.0}, {3416454622906707.0, 2111485077978050.0}};
        SpectralState s = SpectralState.of(PositiveOperator.of(org.minorant.core.Operator.ofReal(f)));
        assertEquals(1, s.rank());
        assertEquals(1, s.restRank());
        assertTrue(s.rest() > 1e-16 && s.rest() < 1e-28 * f[0][0], () -> s.rest() + "");
        assertTrue(s.trace().toEnclosure().contains(f[0][0] + f[1][1]));
    }

    @Test
    void dependentColumnsFallBackToTheMatrix() {
        double h = Math.sqrt(0.5);
        PositiveOperator p = PositiveOperator.ofFactor(org.minorant.core.Operator.ofReal(
                new double[][] {{h * 0.8, h * 0.8}, {h * 0.6, h * 0.6}}));
        SpectralState s = SpectralState.of(p);
        assertEquals(1, s.rank());
        // two columns of one direction up to rounding: √½ · 0.8 and √½ · 0.6 are doubles, so that they are equal
        assertEquals(0, s.restRank());
    }
}
