package org.minorant.tests.oracle;

import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Random;
import java.util.function.DoubleUnaryOperator;
import org.junit.jupiter.api.Test;
import org.minorant.core.HermitianOperator;
import org.minorant.core.Operator;
import org.minorant.core.PositiveOperator;
import org.minorant.core.Tolerance;
import org.minorant.tests.Draw;
import org.minorant.tests.Draw.Matrix;

/**
 * Functions of Hermitian operators beside V g(Λ) V* by Hipparchus, with the tolerance that both sides' errors give: each works on a matrix within e of A in norm, and
 * g moves by at most (its Lipschitz constant on the spectrum) · √n · e in Frobenius norm (for commuting differences; |x| and others by at most √2 more).
 */
class OperatorFunctionsTest {

    @Test
    void functionsOfRandomOperators() {
        Random random = new Random(31);
        for (int i = 0; i < 40; i++) {
            int n = 1 + i % 12;
            double[] p = new double[n];
            for (int k = 0; k < n; k++) {
                p[k] = i % 2 == 0 ? 0.1 + random.nextDouble() : 0.5 + 1e-13 * random.nextGaussian();
            }
            Matrix a = Draw.withSpectrum(Draw.unitary(random, n), p);
            PositiveOperator op = PositiveOperator.of(a.re(), a.im());
            HipparchusSpectrum s = new HipparchusSpectrum(a);
            // spectrum in [0.1, 1.1]
            close(op.squareRoot(), s, Math::sqrt, 2, "root");
            close(op.power(0.25, Tolerance.ROUNDING), s, x -> Math.pow(x, 0.25), 2, "power");
            close(op.logarithm(Tolerance.ROUNDING), s, Math::log, 10, "logarithm");
            close(op.inverse(Tolerance.ROUNDING), s, x -> 1 / x, 100, "inverse");
            close(op.exponential(), s, Math::exp, 4, "exponential");
        }
    }

    @Test
    void partsOfRandomOperators() {
        Random random = new Random(32);
        for (int i = 0; i < 40; i++) {
            int n = 1 + i % 12;
            double[] p = new double[n];
            for (int k = 0; k < n; k++) {
                p[k] = i % 3 == 0 && random.nextBoolean() ? 0 : random.nextGaussian();
            }
            Matrix a = Draw.withSpectrum(Draw.unitary(random, n), p);
            HermitianOperator op = HermitianOperator.of(a.re(), a.im());
            HipparchusSpectrum s = new HipparchusSpectrum(a);
            close(op.absoluteValue(), s, Math::abs, 2, "absolute value");
            close(op.positivePart(), s, x -> Math.max(x, 0), 2, "positive part");
            close(op.negativePart(), s, x -> Math.max(-x, 0), 2, "negative part");
        }
    }

    private static void close(
            Operator own, HipparchusSpectrum s, DoubleUnaryOperator g, double lipschitz, String what) {
        Matrix m = s.function(g);
        int n = m.rows();
        double distance = 0;
        double size = 0;
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                double x = own.re(i, j) - m.re()[i][j];
                double y = own.im(i, j) - m.im()[i][j];
                distance += x * x + y * y;
                size += m.re()[i][j] * m.re()[i][j] + m.im()[i][j] * m.im()[i][j];
            }
        }
        // the library says n · 2^-48 of the norm, Hipparchus bounds itself, and products of the result are rounded on
        // both sides
        double e = s.error() + n * 0x1p-48 * 3;
        double allowed = 2 * lipschitz * Math.sqrt(n) * e + n * 0x1p-48 * Math.sqrt(size);
        assertTrue(
                Math.sqrt(distance) <= allowed, what + " at n = " + n + ": " + Math.sqrt(distance) + " > " + allowed);
    }
}
