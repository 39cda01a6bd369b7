package org.minorant.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.math.MathContext;
import org.junit.jupiter.api.Test;
import org.minorant.core.pair.PositivePair;

class ScaledCholeskyTest {

    private static final MathContext DIGITS = new MathContext(300);

    /** Positive definite matrices graded over sixty decades, each the other way round: the order of the rows may not matter. */
    @Test
    void gradedMatricesKeepRelativeAccuracyInAnyOrder() {
        double[][] down = {{1, 3e-31}, {3e-31, 2e-60}};
        double[][] up = {{2e-60, 3e-31}, {3e-31, 1}};
        for (double[][][] pair : new double[][][][] {{down, up}, {up, down}}) {
            Enclosure f = PositivePair.of(
                            PositiveOperator.of(Operator.ofReal(pair[0])),
                            PositiveOperator.of(Operator.ofReal(pair[1])))
                    .traceMinimum(1);
            assertTrue(f.contains(minimum(pair[0], pair[1])), f::toString);
            assertTrue(f.relativeWidth() < 1e-14, () -> "relative width " + f.relativeWidth());
        }
    }

    /** ½(Tr A + Tr B − ‖A − B‖₁) of real 2 × 2 matrices of which neither is below the other: ‖C‖₁ = √((c₀₀ − c₁₁)² + 4c₀₁²). */
    private static BigDecimal minimum(double[][] a, double[][] b) {
        BigDecimal gap = exact(a, b, 0, 0).subtract(exact(a, b, 1, 1));
        BigDecimal off = exact(a, b, 0, 1);
        BigDecimal norm = gap.multiply(gap)
                .add(off.multiply(off).multiply(BigDecimal.valueOf(4)))
                .sqrt(DIGITS);
        BigDecimal traces = BigDecimal.ZERO;
        for (int i = 0; i < 2; i++) {
            traces = traces.add(new BigDecimal(a[i][i])).add(new BigDecimal(b[i][i]));
        }
        return traces.subtract(norm).divide(BigDecimal.valueOf(2));
    }

    private static BigDecimal exact(double[][] a, double[][] b, int i, int j) {
        return new BigDecimal(a[i][j]).subtract(new BigDecimal(b[i][j]));
    }

    @Test
    void theFactorSquaresToTheMatrixWhateverTheOrder() {
        double[][] a = {{4e-8, 1e-5, 1e-4}, {1e-5, 1e-2, 2e-2}, {1e-4, 2e-2, 9}};
        ScaledCholesky c = ScaledCholesky.of(EnclosedMatrix.of(Operator.ofReal(a)));
        assertTrue(c.relativeError() < 1e-27, () -> "relative error " + c.relativeError());
        EnclosedMatrix square = c.factor().times(c.factor().adjoint());
        for (int i = 0; i < 3; i++) {
            for (int j = 0; j < 3; j++) {
                assertEquals(a[i][j], square.re(i, j), 1e-15 * Math.sqrt(a[i][i] * a[j][j]));
            }
        }
    }
}
