package org.minorant.bounds;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.junit.jupiter.api.Test;
import org.minorant.core.DensityOperator;
import org.minorant.core.InvalidInputException;

/** Dispersion, and the approximations made of it. */
final class ChannelDispersionTest {

    /** What the dispersion promises, relatively. */
    private static final double CLOSE = 1e-7;

    /** One optimal input: pq ln²(q/p) of the binary symmetric channel, the variance of ln λ for two kets. */
    @Test
    void uniqueInput() {
        double p = 0.11;
        ChannelDispersion v = ClassicalQuantumChannel.ofStochasticMatrix(new double[][] {{1 - p, p}, {p, 1 - p}})
                .dispersion();
        double expected = p * (1 - p) * Math.pow(Math.log((1 - p) / p), 2);
        assertEquals(expected, v.least().value(), CLOSE);
        assertEquals(expected, v.largest().value(), CLOSE);
        ChannelDispersion kets = ClassicalQuantumChannel.of(
                        DensityOperator.ofKet(Channels.ket(0.78, false)),
                        DensityOperator.ofKet(Channels.ket(0.78, true)))
                .dispersion();
        // the same two numbers are the eigenvalues of the mixture, (1 ± 0.78)/2
        assertEquals(expected, kets.least().value(), CLOSE);
        assertEquals(expected, kets.largest().value(), CLOSE);
    }

    /** b of the row (1 − 3b, b, b, b) of entropy ln 2. */
    private static double third() {
        double low = 0.01;
        double high = 0.2;
        for (int i = 0; i < 100; i++) {
            double b = 0.5 * (low + high);
            double h = -(1 - 3 * b) * Math.log(1 - 3 * b) - 3 * b * Math.log(b);
            low = h < Math.log(2) ? b : low;
            high = h < Math.log(2) ? high : b;
        }
        return low;
    }

    private static ClassicalQuantumChannel manyInputs() {
        double b = third();
        double a = 1 - 3 * b;
        return ClassicalQuantumChannel.ofStochasticMatrix(
                new double[][] {{.5, .5, 0, 0}, {0, 0, .5, .5}, {a, b, b, b}, {b, a, b, b}, {b, b, a, b}, {b, b, b, a}
                });
    }

    /** All letters have entropy ln 2 and both kinds can make the uniform output: the first without any spread, the second with that of −ln of their probabilities. */
    @Test
    void manyOptimalInputs() {
        double b = third();
        double a = 1 - 3 * b;
        double spread = a * Math.pow(Math.log(a), 2) + 3 * b * Math.pow(Math.log(b), 2) - Math.pow(Math.log(2), 2);
        ChannelDispersion v = manyInputs().dispersion();
        assertEquals(0, v.least().value(), CLOSE);
        assertEquals(spread, v.largest().value(), CLOSE * spread);
        CodingBounds uses = CodingBounds.of(manyInputs()).uses(400);
        double mean = 400 * Math.log(2);
        // without dispersion nothing is lost below one half; Q⁻¹(0.9) = −1.2815515655446004 (tables)
        assertEquals(mean, uses.normalApproximation(0.1).nats(), 400 * Math.sqrt(CLOSE));
        assertEquals(
                mean + 20 * Math.sqrt(spread) * 1.2815515655446004,
                uses.normalApproximation(0.9).nats(),
                1e-4);
        assertEquals(
                mean + 20 * Math.sqrt(2 * spread * Math.log(10)),
                uses.moderateDeviations(0.9).nats(),
                1e-4);
    }

    @Test
    void moderateDeviations() {
        double p = 0.11;
        CodingBounds uses = CodingBounds.of(ClassicalQuantumChannel.ofStochasticMatrix(
                        new double[][] {{1 - p, p}, {p, 1 - p}}))
                .uses(1000);
        double v = p * (1 - p) * Math.pow(Math.log((1 - p) / p), 2);
        double c = Math.log(2) + p * Math.log(p) + (1 - p) * Math.log(1 - p);
        Approximation a = uses.moderateDeviations(1e-3);
        assertEquals(1000 * c - Math.sqrt(2000 * v * Math.log(1000)), a.nats(), 1e-4);
        assertTrue(a.source().startsWith("moderate deviations nC - sqrt(2nV ln 1/e): C. T. Chubb"), a.source());
        assertThrows(InvalidInputException.class, () -> uses.moderateDeviations(1));
    }

    @Test
    void equalOutputs() {
        DensityOperator w = DensityOperator.ofBloch(0.3, 0, 0.4);
        ChannelDispersion v = ClassicalQuantumChannel.of(w, w, w).dispersion();
        assertEquals(0, v.least().value(), CLOSE);
        assertEquals(0, v.largest().value(), CLOSE);
    }

    /** Means of 0, 1, 2, 3 that are 3/2: the squares are least on 1 and 2, largest on 0 and 3. */
    @Test
    void linearProgram() {
        double[][] vectors = {{0, 0}, {1, 2}, {2, 4}, {3, 6}};
        MixturePolytope same = MixturePolytope.of(vectors, new double[] {.25, .25, .25, .25}, 1e-9);
        assertEquals(2.5, same.least(new double[] {0, 1, 4, 9}), 1e-12);
        assertEquals(-4.5, same.least(new double[] {0, -1, -4, -9}), 1e-12);
        MixturePolytope corner = MixturePolytope.of(vectors, new double[] {1, 0, 0, 0}, 1e-9);
        assertEquals(7, corner.least(new double[] {7, -1, -4, -9}), 1e-12);
        double[][] line = {{0.0}, {-1.0}, {1.0}};
        MixturePolytope negative = MixturePolytope.of(line, new double[] {0, 0.75, 0.25}, 1e-9);
        assertEquals(-0.5, negative.least(new double[] {0, -1, 1}), 1e-12);
        assertEquals(0.5, negative.least(new double[] {0, 1, 1}), 1e-12);
    }
}
