package org.minorant.core;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import org.minorant.core.internal.door.HermitianEigen;
import org.minorant.core.internal.number.DoubleDouble;

/**
 * A unitary that diagonalises, to double accuracy of their own size, the blocks of a nearly diagonal Hermitian matrix in which a first-order
 * correction fails: clusters of eigenvalues too close for the entries that couple them.
 *
 * <p>A block less its mean is of the size of the cluster's spread, and sixteen digits of that are left right by a double eigendecomposition; what remains
 * coupled is that much smaller, so that a few rounds reach the working precision. Trusted by nobody, see {@link EnclosedSpectrum}.
 *
 * @param unitary the rotation, identity outside the clusters
 * @param label the same number for all indices of a cluster
 * @param isTrivial whether there was no cluster
 */
record ClusterRotation(Operator unitary, int[] label, boolean isTrivial) {

    static ClusterRotation of(EnclosedMatrix b, double small, double apart) {
        int n = b.rows();
        double[] re = new double[n * n];
        double[] im = new double[b.isReal() ? 0 : n * n];
        for (int i = 0; i < n; i++) {
            re[i * n + i] = 1;
        }
        boolean trivial = true;
        int[] label = labels(b, small, apart);
        for (int[] cluster : clusters(label)) {
            if (cluster.length > 1) {
                trivial = false;
                rotate(b, cluster, re, im);
            }
        }
        return new ClusterRotation(new Operator(n, n, re, im), label, trivial);
    }

    /** Connected components of the graph whose edges are entries that are not small and not much smaller than their gap. */
    private static int[] labels(EnclosedMatrix b, double small, double apart) {
        int n = b.rows();
        int[] label = new int[n];
        Arrays.setAll(label, i -> i);
        for (int p = 0; p < n; p++) {
            for (int q = 0; q < p; q++) {
                double size = Math.abs(b.re(p, q)) + Math.abs(b.im(p, q));
                double gap = Math.abs(b.re(p, p) - b.re(q, q));
                if (size > small && !(size < apart * gap) && label[p] != label[q]) {
                    int from = label[p];
                    int to = label[q];
                    for (int k = 0; k < n; k++) {
                        label[k] = label[k] == from ? to : label[k];
                    }
                }
            }
        }
        return label;
    }

    private static List<int[]> clusters(int[] label) {
        int n = label.length;
        List<int[]> out = new ArrayList<>();
        for (int c = 0; c < n; c++) {
            int root = c;
            int[] members = java.util.stream.IntStream.range(0, n)
                    .filter(k -> label[k] == root)
                    .toArray();
            if (members.length != 0) {
                out.add(members);
            }
        }
        return out;
    }

    private static void rotate(EnclosedMatrix b, int[] cluster, double[] re, double[] im) {
        int n = b.rows();
        int m = cluster.length;
        DoubleDouble centre = new DoubleDouble(b.re(cluster[0], cluster[0]), b.reTail(cluster[0], cluster[0]));
        double[] cr = new double[m * m];
        double[] ci = new double[im.length == 0 ? 0 : m * m];
        for (int i = 0; i < m; i++) {
            for (int j = 0; j <= i; j++) {
                int p = cluster[i];
                int q = cluster[j];
                DoubleDouble x = new DoubleDouble(b.re(p, q), b.reTail(p, q));
                double entry = i == j ? x.minus(centre).hi() : x.hi();
                cr[i * m + j] = entry;
                cr[j * m + i] = entry;
                if (ci.length != 0 && i != j) {
                    ci[i * m + j] = b.im(p, q);
                    ci[j * m + i] = -b.im(p, q);
                }
            }
        }
        HermitianEigen e = HermitianEigen.of(m, cr, ci);
        double[] vr = e.vectorsRe();
        double[] vi = e.vectorsIm();
        for (int i = 0; i < m; i++) {
            for (int j = 0; j < m; j++) {
                re[cluster[i] * n + cluster[j]] = vr[i * m + j];
                if (im.length != 0) {
                    im[cluster[i] * n + cluster[j]] = vi[i * m + j];
                }
            }
        }
    }
}
