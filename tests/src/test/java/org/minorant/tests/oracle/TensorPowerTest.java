package org.minorant.tests.oracle;

import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.measurement.HypothesisPair;
import org.minorant.tests.Draw;
import org.minorant.tests.Draw.Matrix;

/**
 * n copies of two qubit states beside one matrix of dimension 2^n. Entries of the states are multiples of 2^-m with nm ≤ 51, so that those of the tensor power are exact doubles, and both enclosures
 * hold one number; that of the copies is narrower unless the dense form has relative accuracy too. Longer runs by the system property {@code powers.pairs}.
 */
class TensorPowerTest {

    private static final int USUAL = 240;

    @Test
    void copiesMeetTheTensorPower() {
        int pairs = Integer.getInteger("powers.pairs", USUAL);
        Random random = new Random(31);
        List<String> escapes = new ArrayList<>();
        int narrower = 0;
        for (int i = 0; i < pairs; i++) {
            // every sixtieth pair has five to eight copies in turn
            int n = i % 60 == 59 ? 5 + i / 60 % 4 : 2 + i % 3;
            int bits = 51 / n;
            Matrix a = state(random, bits, i % 7 == 0);
            Matrix b = i % 11 == 0 && n < 6 ? a : state(random, bits, i % 13 == 0);
            double prior = i % 3 == 0 ? 0.5 : i % 5 == 0 ? 1e-6 : random.nextDouble();
            Enclosure many = pair(a, b).copies(n).withTolerance(1e-14).minimumError(prior);
            Enclosure dense = pair(Draw.power(a, n), Draw.power(b, n)).minimumError(prior);
            String where = "pair " + i + ", " + n + " copies, prior " + prior + ": " + many + " beside " + dense;
            if (many.lower() > dense.upper() || dense.lower() > many.upper()) {
                escapes.add(where + a + b);
            }
            // weights cost 4 · 2^-50 of the value, a block 2^-45 of its share, truncation 1e-14: wider only where the
            // dense form is as good
            if (many.width() > Math.max(dense.width(), 0x1p-44 * many.upper())) {
                escapes.add(where + " is wider");
            }
            narrower += many.width() <= dense.width() ? 1 : 0;
        }
        assertTrue(escapes.isEmpty(), () -> escapes.size() + " of " + pairs + ", the first: " + escapes.get(0));
        int better = narrower;
        assertTrue(2 * better >= pairs, () -> "narrower for " + better + " of " + pairs);
    }

    private static HypothesisPair pair(Matrix a, Matrix b) {
        return HypothesisPair.of(DensityOperator.of(a.re(), a.im()), DensityOperator.of(b.re(), b.im()));
    }

    /** ½(1 + r·σ) with components of r multiples of 2^(1 − bits), at most one long; near the sphere if asked for. */
    private static Matrix state(Random random, int bits, boolean nearSphere) {
        double unit = Math.scalb(1.0, 1 - bits);
        while (true) {
            double[] r = new double[3];
            double square = 0;
            for (int i = 0; i < 3; i++) {
                r[i] = unit * Math.rint((2 * random.nextDouble() - 1) / unit);
                square += r[i] * r[i];
            }
            if (square <= 1 && (!nearSphere || square > 0.9)) {
                return new Matrix(
                        new double[][] {{(1 + r[2]) / 2, r[0] / 2}, {r[0] / 2, (1 - r[2]) / 2}}, new double[][] {
                            {0, -r[1] / 2}, {r[1] / 2, 0}
                        });
            }
        }
    }
}
