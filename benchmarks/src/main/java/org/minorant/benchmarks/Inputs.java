package org.minorant.benchmarks;

import java.util.Random;
import org.minorant.core.DensityOperator;
import org.minorant.core.Operator;

/** Random inputs from fixed seeds. */
final class Inputs {

    private Inputs() {}

    /** The state XX†/Tr XX†, with independent Gaussian entries in X (the Hilbert–Schmidt ensemble). */
    static DensityOperator state(int d, boolean complex, long seed) {
        double[] g = gaussian(d * d, seed);
        double[] h = complex ? gaussian(d * d, seed + 1) : new double[0];
        Operator x = Operator.ofRowMajor(d, d, g, h);
        Operator p = x.times(x.adjoint());
        double trace = p.trace().re();
        double[] re = new double[d * d];
        double[] im = new double[complex ? d * d : 0];
        for (int i = 0; i < d; i++) {
            for (int j = 0; j <= i; j++) {
                re[i * d + j] = p.re(i, j) / trace;
                re[j * d + i] = re[i * d + j];
                if (complex && i != j) {
                    im[i * d + j] = p.im(i, j) / trace;
                    im[j * d + i] = -im[i * d + j];
                }
            }
        }
        return DensityOperator.of(Operator.ofRowMajor(d, d, re, im));
    }

    /** Independent Gaussian numbers. */
    static double[] gaussian(int count, long seed) {
        Random random = new Random(seed);
        double[] a = new double[count];
        for (int i = 0; i < count; i++) {
            a[i] = random.nextGaussian();
        }
        return a;
    }
}
