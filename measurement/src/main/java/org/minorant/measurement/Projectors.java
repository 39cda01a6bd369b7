package org.minorant.measurement;

import org.minorant.core.EnclosedMatrix;
import org.minorant.core.HermitianOperator;
import org.minorant.core.Operator;

/** Products VV* rounded once to doubles and Hermitian exactly. */
final class Projectors {

    private Projectors() {}

    /** VV* for the columns of V from one index to another, the end excluded. */
    static HermitianOperator onto(EnclosedMatrix v, int from, int to) {
        EnclosedMatrix.Builder b = EnclosedMatrix.builder(v.rows(), to - from);
        for (int i = 0; i < v.rows(); i++) {
            for (int j = from; j < to; j++) {
                b.set(i, j - from, v.re(i, j), v.reTail(i, j), v.im(i, j), v.imTail(i, j), 0);
            }
        }
        EnclosedMatrix w = b.build();
        return hermitian(w.times(w.adjoint()));
    }

    /** The midpoints of a matrix that is Hermitian but for rounding, rounded to doubles; the lower triangle counts. */
    static HermitianOperator hermitian(EnclosedMatrix a) {
        int n = a.rows();
        double[] re = new double[n * n];
        double[] im = new double[a.isReal() ? 0 : n * n];
        for (int i = 0; i < n; i++) {
            for (int j = 0; j <= i; j++) {
                re[i * n + j] = a.re(i, j);
                re[j * n + i] = a.re(i, j);
                if (im.length != 0 && i != j) {
                    im[i * n + j] = a.im(i, j);
                    im[j * n + i] = -a.im(i, j);
                }
            }
        }
        return HermitianOperator.of(Operator.ofRowMajor(n, n, re, im));
    }
}
