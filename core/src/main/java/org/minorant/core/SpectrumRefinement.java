package org.minorant.core;

import java.util.Arrays;
import java.util.Comparator;
import java.util.stream.IntStream;
import org.minorant.core.internal.door.HermitianEigen;
import org.minorant.core.internal.message.Checks;
import org.minorant.core.internal.number.DoubleDouble;
import org.minorant.core.internal.work.Checkpoint;

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

    /** Entries of K²B, KBK and BK², summed up generously. */
    private static final double SECOND_ORDER = 8;

    static SpectrumRefinement of(EnclosedMatrix a) {
        int n = a.rows();
        Operator top = a.toOperator();
        Checks.square("EnclosedSpectrum.of", top);
        Runnable check = Checkpoint.current();
        HermitianEigen e = HermitianEigen.of(n, top.realParts(), top.imaginaryParts());
        check.run();
        double[] none = new double[0];
        DdMatrix mid = DdMatrix.of(a);
        DdMatrix v = DdMatrix.of(new Operator(n, n, e.vectorsRe(), top.isReal() ? none : e.vectorsIm()));
        double small = Math.max(Math.abs(e.values()[0]), Math.abs(e.values()[n - 1])) * n * SMALL;
        // what this leaves is below what the first round corrects
        v = step(v, check).vectors;
        EnclosedMatrix b = rotated(mid, v, check);
        for (int round = 0; round < ROUNDS && !isDiagonal(b, small); round++) {
            ClusterRotation clusters = ClusterRotation.of(b, small, APART);
            check.run();
            Operator k = correction(b, clusters.label(), small);
            v = v.plus(v.leading().times(k));
            if (!clusters.isTrivial()) {
                // mostly the identity, and zeros of the left factor save time
                v = DdMatrix.of(clusters.unitary().adjoint()).times(v.adjoint()).adjoint();
            }
            v = orthonormal(v, check);
            // what a first-order correction leaves is of second order
            if (clusters.isTrivial() && SECOND_ORDER * largestRow(k) * largest(b) <= small) {
                break;
            }
            b = rotated(mid, v, check);
        }
        return sorted(v, b);
    }

    private static DdMatrix orthonormal(DdMatrix v, Runnable check) {
        Step one = step(v, check);
        return 0.75 * largestRow(one.defect) <= one.defect.rows() * SMALL
                ? one.vectors
                : step(one.vectors, check).vectors;
    }

    /**
     * What one Newton–Schulz step makes of vectors.
     *
     * @param vectors V + ½VE
     * @param defect E = 1 − V*V
     */
    private record Step(DdMatrix vectors, Operator defect) {}

    /** V + ½V(1 − V*V), which makes about ¾E² of a defect E. E is computed in double-double, its product in double: off by 2^-53 of E, which matters as little. */
    private static Step step(DdMatrix v, Runnable check) {
        Operator defect = v.adjoint().timesToHermitian(v).fromIdentity();
        check.run();
        return new Step(v.plus(v.leading().times(defect.times(0.5))), defect);
    }

    private static double largest(EnclosedMatrix b) {
        double most = 0;
        for (int i = 0; i < b.rows(); i++) {
            most = Math.max(most, Math.abs(b.re(i, i)));
        }
        return most;
    }

    /** The largest sum of squares of a row of an operator, Hermitian or antihermitian: no entry of its square is larger. */
    private static double largestRow(Operator h) {
        double most = 0;
        for (int i = 0; i < h.rows(); i++) {
            double s = 0;
            for (int j = 0; j < h.columns(); j++) {
                s += h.re(i, j) * h.re(i, j) + h.im(i, j) * h.im(i, j);
            }
            most = Math.max(most, s);
        }
        return most;
    }

    /** V*AV. */
    private static EnclosedMatrix rotated(DdMatrix a, DdMatrix v, Runnable check) {
        DdMatrix av = a.times(v);
        check.run();
        DdMatrix b = v.adjoint().timesToHermitian(av);
        check.run();
        return b.exact(IntStream.range(0, v.rh().length).toArray());
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

    /** The first-order rotation K with K_pq = B_pq / (B_qq − B_pp) where the two values are apart and not of one cluster; antihermitian. In double: its own error is of second order. */
    private static Operator correction(EnclosedMatrix b, int[] label, double small) {
        int n = b.rows();
        double[] re = new double[n * n];
        double[] im = new double[b.isReal() ? 0 : n * n];
        for (int p = 0; p < n; p++) {
            for (int q = 0; q < n; q++) {
                double gap = b.re(q, q) - b.re(p, p);
                double size = Math.abs(b.re(p, q)) + Math.abs(b.im(p, q));
                if (label[p] != label[q] && size > small && size < APART * Math.abs(gap)) {
                    double g = diagonal(b, q).minus(diagonal(b, p)).hi();
                    re[p * n + q] = b.re(p, q) / g;
                    if (im.length != 0) {
                        im[p * n + q] = b.im(p, q) / g;
                    }
                }
            }
        }
        return new Operator(n, n, re, im);
    }

    private static DoubleDouble diagonal(EnclosedMatrix b, int i) {
        return new DoubleDouble(b.re(i, i), b.reTail(i, i));
    }

    private static SpectrumRefinement sorted(DdMatrix v, EnclosedMatrix b) {
        int[] order = IntStream.range(0, b.rows())
                .boxed()
                .sorted(Comparator.comparingDouble((Integer i) -> b.re(i, i)).thenComparingDouble(i -> b.reTail(i, i)))
                .mapToInt(Integer::intValue)
                .toArray();
        DoubleDouble[] values =
                Arrays.stream(order).mapToObj(k -> diagonal(b, k)).toArray(DoubleDouble[]::new);
        return new SpectrumRefinement(v.exact(order), values);
    }
}
