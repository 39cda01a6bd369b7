package org.minorant.bounds;

import java.util.ArrayList;
import java.util.List;
import java.util.Random;
import org.minorant.core.HermitianOperator;
import org.minorant.core.KrausChannel;
import org.minorant.core.Operator;

/** Quantum channels for tests. */
final class AssistedChannels {

    private AssistedChannels() {}

    static Operator y() {
        return HermitianOperator.of(new double[2][2], new double[][] {{0, -1}, {1, 0}});
    }

    static KrausChannel pauli(double i, double x, double y, double z) {
        return KrausChannel.of(
                HermitianOperator.identity(2).times(Math.sqrt(i)),
                HermitianOperator.ofReal(new double[][] {{0, 1}, {1, 0}}).times(Math.sqrt(x)),
                y().times(Math.sqrt(y)),
                HermitianOperator.diagonal(1, -1).times(Math.sqrt(z)));
    }

    /** A random unitary of a qubit. */
    static Operator unitary(Random random) {
        double[] q = new double[4];
        double norm = 0;
        for (int i = 0; i < 4; i++) {
            q[i] = random.nextGaussian();
            norm += q[i] * q[i];
        }
        double r = Math.sqrt(norm);
        return Operator.of(new double[][] {{q[0] / r, q[2] / r}, {-q[2] / r, q[0] / r}}, new double[][] {
            {q[3] / r, q[1] / r}, {q[1] / r, -q[3] / r}
        });
    }

    static KrausChannel turned(KrausChannel channel, Random random) {
        Operator before = unitary(random);
        Operator after = unitary(random);
        List<Operator> kraus = new ArrayList<>();
        for (Operator k : channel.krausOperators()) {
            kraus.add(after.times(k).times(before));
        }
        return KrausChannel.of(kraus);
    }

    static KrausChannel random(Random random, int in, int out, int number) {
        List<Operator> kraus = new ArrayList<>();
        for (int k = 0; k < number; k++) {
            double[] re = new double[in * out];
            double[] im = new double[in * out];
            for (int e = 0; e < re.length; e++) {
                re[e] = random.nextGaussian();
                im[e] = random.nextGaussian();
            }
            kraus.add(Operator.ofRowMajor(out, in, re, im));
        }
        return KrausChannel.nearest(kraus).channel();
    }
}
