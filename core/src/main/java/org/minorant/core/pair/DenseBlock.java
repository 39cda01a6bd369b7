package org.minorant.core.pair;

import org.minorant.core.EnclosedMatrix;
import org.minorant.core.Enclosure;
import org.minorant.core.internal.number.DoubleDouble;

/**
 * A spin block whose columns fill the space, in the eigenbasis of the operator that is kept whole, where the other one is B = Σ g_j v_j v_j*: by one eigendecomposition ({@link WholeBlock}). Right to about 1e-15 of the
 * traces, which is enough where the answer is not much smaller: states near the maximally mixed one, whose many equal eigenvalues rotations would take long over.
 */
final class DenseBlock {

    private DenseBlock() {}

    /** Whether one of the two operators is held whole in a block of this dimension. */
    static boolean fits(int dimension, ColumnWeights x, ColumnWeights y) {
        return x.held() == dimension || y.held() == dimension;
    }

    /** Encloses Tr[A ∧ B] in the units of the weights. */
    static Enclosure enclose(ColumnWeights x, ColumnWeights y, SpinOverlaps.Window window, Runnable checkpoint) {
        SpinOverlaps.Window c = window.leading(x.held(), y.held());
        boolean whole = x.held() >= y.held();
        ColumnWeights diagonal = whole ? x : y;
        ColumnWeights other = whole ? y : x;
        int d = diagonal.held();
        int m = other.held();
        EnclosedMatrix.Builder v = EnclosedMatrix.builder(d, m);
        EnclosedMatrix.Builder g = EnclosedMatrix.builder(m, d);
        for (int j = 0; j < m; j++) {
            double error = other.weightError(j) + DoubleDouble.EPS;
            for (int i = 0; i < d; i++) {
                int a = whole ? i : j;
                int b = whole ? j : i;
                double r = c.radius()[a][b];
                DoubleDouble overlap = new DoubleDouble(c.high()[a][b], c.low()[a][b]);
                DoubleDouble p = overlap.times(other.power(j));
                v.set(i, j, overlap.hi(), overlap.lo(), 0, 0, r);
                double most = other.power(j).hi() * r + Math.abs(p.hi()) * error;
                g.set(j, i, p.hi(), p.lo(), 0, 0, most * (1 + 0x1p-40) + 0x1p-1060);
            }
        }
        EnclosedMatrix difference = diagonal.gram(d).minus(v.build().times(g.build()));
        checkpoint.run();
        DoubleDouble traces = diagonal.trace(d).plus(other.trace(m));
        double traceError = (d + m + 1) * DoubleDouble.EPS + diagonal.weightError(d - 1) + other.weightError(m - 1);
        return new WholeBlock(difference, traces, traces.hi() * traceError).inDouble();
    }
}
