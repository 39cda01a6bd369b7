package org.minorant.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.util.Random;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/** Qubit states by their Bloch vectors, next to and beyond the sphere. */
class BlochStateTest {

    private static final BigDecimal HALF = new BigDecimal("0.5");

    /** ½(1 + r·σ), exactly; its positive part if it has a negative eigenvalue. */
    private static ExactMatrix meant(double x, double y, double z) {
        ExactMatrix m = new ExactMatrix(4, 4);
        BigDecimal bx = new BigDecimal(x).multiply(HALF);
        BigDecimal by = new BigDecimal(y).multiply(HALF);
        BigDecimal bz = new BigDecimal(z).multiply(HALF);
        m.setComplex(0, 0, HALF.add(bz), BigDecimal.ZERO);
        m.setComplex(1, 1, HALF.subtract(bz), BigDecimal.ZERO);
        m.setComplex(1, 0, bx, by);
        m.setComplex(0, 1, bx, by.negate());
        BigDecimal det = HALF.multiply(HALF)
                .subtract(bx.multiply(bx))
                .subtract(by.multiply(by))
                .subtract(bz.multiply(bz));
        return det.signum() >= 0 ? m : m.positivePart();
    }

    @Property(tries = 100, seed = "11")
    void meansTheseThreeDoubles(@ForAll long seed) {
        Random r = new Random(seed);
        double[] v = {r.nextGaussian(), r.nextGaussian(), r.nextGaussian()};
        double norm = Math.sqrt(v[0] * v[0] + v[1] * v[1] + v[2] * v[2]);
        double length = switch (r.nextInt(4)) {
            case 0 -> r.nextDouble();
            case 1 -> 1 - Math.pow(10, -16 * r.nextDouble());
            case 2 -> 1;
            default -> 1 + 0x1p-52;
        };
        double x = v[0] / norm * length;
        double y = v[1] / norm * length;
        double z = v[2] / norm * length;
        if (x * x + y * y + z * z <= 1 + 0x1p-51) {
            Meaning.assertMeans(meant(x, y, z), DensityOperator.ofBloch(x, y, z));
        }
    }

    @ParameterizedTest
    @CsvSource({
        "0, 0, 1",
        "0, 0, -1",
        "1, 0, 0",
        "-1, 0, 0",
        "0, 1, 0",
        "0, -1, 0",
        "0, 0, 0",
        "0.6, 0, 0.8",
        "0.6, 0, 0.5",
        "0, 0, 0.9999999999999999",
        "1e-200, 0, 0.5",
        "1e-320, 1e-310, -0.9999999999999999",
        "1e-9, 0, 0.9999999999999999"
    })
    void specialVectors(double x, double y, double z) {
        Meaning.assertMeans(meant(x, y, z), DensityOperator.ofBloch(x, y, z));
    }

    @Test
    void exactlyPureStatesHaveOneColumnAndNoTraceError() {
        for (double s : new double[] {1, -1}) {
            for (DensityOperator d : new DensityOperator[] {
                DensityOperator.ofBloch(s, 0, 0), DensityOperator.ofBloch(0, s, 0), DensityOperator.ofBloch(0, 0, s)
            }) {
                assertEquals(1, d.factor().rank());
                assertEquals(0, d.factor().traceError());
            }
        }
    }

    @Test
    void nearlyPureStatesKeepTheSmallEigenvalue() {
        DensityOperator d = DensityOperator.ofBloch(0, 0, Math.nextDown(1.0));
        assertEquals(0x1p-54, d.re(1, 1));
        assertTrue(d.factor().relativeError() < 1e-20 && d.factor().traceError() == 0);
    }

    @Test
    void refusals() {
        Meaning.assertRefusal(
                "DensityOperator.ofBloch: the Bloch vector (0.8, 0.0, 0.8) has length 1.1313708498984762, expected at most 1; scale it"
                        + " to length at most one",
                () -> DensityOperator.ofBloch(0.8, 0, 0.8));
        Meaning.assertRefusal(
                "DensityOperator.ofBloch: entry 1 (row-major) is NaN, expected a finite number; check the computation that made it",
                () -> DensityOperator.ofBloch(0, Double.NaN, 0));
        Meaning.assertRefusal(
                "DensityOperator.ofBloch: entry 2 (row-major) is Infinity, expected a finite number; check the computation that made"
                        + " it",
                () -> DensityOperator.ofBloch(0, 0, Double.POSITIVE_INFINITY));
    }
}
