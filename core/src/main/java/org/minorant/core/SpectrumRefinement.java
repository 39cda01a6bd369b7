package org.minorant.core;

import java.util.Arrays;
import java.util.Comparator;
import org.minorant.core.internal.door.HermitianEigen;
import org.minorant.core.internal.message.Checks;
import org.minorant.core.internal.number.DoubleDouble;

/**
 * Brings a double eigendecomposition to about 30 digits. Nothing here is trusted: {@link EnclosedSpectrum} verifies what
 * comes out.
 *
 * @param vectors near-orthonormal columns
 * @param values the diagonal of V*AV, ascending
 */
record SpectrumRefinement(EnclosedMatrix vectors, DoubleDouble[] values) {

    /** Off-diagonal entries this far below the norm, times the dimension, are left: they are the rounding of the products. */
    private static final double SMALL = 0x1p-104;

    /** Two values count as apart when the entry that couples them is this much smaller than their distance. */
    private static final double APART = 0x1p-20;

    private static final int ROUNDS = 6;

    static SpectrumRefinement of(EnclosedMatrix a) {
        int n = a.rows();
        Operator top = a.toOperator();
        Checks.square("EnclosedSpectrum.of", top);
        HermitianEigen e = HermitianEigen.of(n, top.realParts(), top.imaginaryParts());
        boolean real = top.isReal();
        EnclosedMatrix v = EnclosedMatrix.of(new Operator(n, n, e.vectorsRe(), real ? new double[0] : e.vectorsIm()));
        EnclosedMatrix mid = a.midpoint();
        double small = Math.max(Math.abs(e.values()[0]), Math.abs(e.values()[n - 1])) * n * SMALL;
        v = orthonormal(orthonormal(v));
        EnclosedMatrix b = v.adjoint().times(mid.times(v)).midpoint();
        for (int round = 0; round < ROUNDS && !isDiagonal(b, small); round++) {
            ClusterRotation clusters = ClusterRotation.of(b, small, APART);
            EnclosedMatrix next = clusters.isTrivial()
                    ? EnclosedMatrix.identity(n).plus(correction(b, small))
                    : EnclosedMatrix.of(clusters.unitary());
            v = orthonormal(orthonormal(v.times(next).midpoint()));
            b = v.adjoint().times(mid.times(v)).midpoint();
        }
        return sorted(v, b);
    }

    /** One Newton–Schulz step: V + ½V(1 − V*V), which squares the defect. */
    private static EnclosedMatrix orthonormal(EnclosedMatrix v) {
        EnclosedMatrix defect =
                EnclosedMatrix.identity(v.columns()).minus(v.adjoint().times(v));
        return v.plus(v.times(defect).times(0.5)).midpoint();
    }

    private static boolean isDiagonal(EnclosedMatrix b, double small) {
        for (int i = 0; i < b.rows(); i++) {
            for (int j = 0; j < i; j++) {
                if (Math.abs(b.re(i, j)) + Math.abs(b.im(i, j)) > small) {
                    return false;
                }
            }
        }
        return true;
    }

    /** The first-order rotation K with K_pq = B_pq / (B_qq − B_pp) where the two values are apart; antihermitian. */
    private static EnclosedMatrix correction(EnclosedMatrix b, double small) {
        int n = b.rows();
        EnclosedMatrix.Builder k = EnclosedMatrix.builder(n, n);
        for (int p = 0; p < n; p++) {
            for (int q = 0; q < n; q++) {
                double gap = b.re(q, q) - b.re(p, p);
                double size = Math.abs(b.re(p, q)) + Math.abs(b.im(p, q));
                if (p != q && size > small && size < APART * Math.abs(gap)) {
                    DoubleDouble g = diagonal(b, q).minus(diagonal(b, p));
                    DoubleDouble x = new DoubleDouble(b.re(p, q), b.reTail(p, q)).dividedBy(g);
                    DoubleDouble y = new DoubleDouble(b.im(p, q), b.imTail(p, q)).dividedBy(g);
                    k.set(p, q, x.hi(), x.lo(), y.hi(), y.lo(), 0);
                }
            }
        }
        return k.build();
    }

    private static DoubleDouble diagonal(EnclosedMatrix b, int i) {
        return new DoubleDouble(b.re(i, i), b.reTail(i, i));
    }

    private static SpectrumRefinement sorted(EnclosedMatrix v, EnclosedMatrix b) {
        int n = b.rows();
        Integer[] order = new Integer[n];
        Arrays.setAll(order, i -> i);
        Arrays.sort(
                order, Comparator.comparingDouble((Integer i) -> b.re(i, i)).thenComparingDouble(i -> b.reTail(i, i)));
        DoubleDouble[] values = new DoubleDouble[n];
        EnclosedMatrix.Builder w = EnclosedMatrix.builder(n, n);
        for (int j = 0; j < n; j++) {
            values[j] = diagonal(b, order[j]);
            for (int i = 0; i < n; i++) {
                int k = order[j];
                w.set(i, j, v.re(i, k), v.reTail(i, k), v.im(i, k), v.imTail(i, k), 0);
            }
        }
        return new SpectrumRefinement(w.build(), values);
    }
}
