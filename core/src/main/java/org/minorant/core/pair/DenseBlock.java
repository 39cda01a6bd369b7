package org.minorant.core.pair;

import org.minorant.core.Enclosure;
import org.minorant.core.internal.dd.DdProducts;
import org.minorant.core.internal.door.EigenResidual;
import org.minorant.core.internal.door.HermitianEigen;
import org.minorant.core.internal.number.DoubleDouble;

/**
 * A spin block whose columns fill the space, by one eigendecomposition: f = ½(Tr A + Tr B − ‖A − B‖₁) in the eigenbasis of the operator that is kept whole. Right to about 1e-15 of the traces, which is enough where the
 * answer is not much smaller: states near the maximally mixed one, whose many equal eigenvalues rotations would take long over.
 *
 * <p><b>Errors in trace norm</b>, at most √d times the Frobenius norm. The entries of B = Σ g_j v_j v_j* are formed in double-double, so rounding them and subtracting costs 4u of each modulus; the
 * v_j err by less than the norm error of the overlaps, the weights by less than 2^-90.
 */
final class DenseBlock {

    private static final double U = 0x1p-53;

    private DenseBlock() {}

    /** Whether one of the two operators is held whole in a block of this dimension. */
    static boolean fits(int dimension, ColumnWeights x, ColumnWeights y) {
        return x.held() == dimension || y.held() == dimension;
    }

    /** Encloses Tr[A ∧ B] in the units of the weights. */
    static Enclosure enclose(ColumnWeights x, ColumnWeights y, SpinOverlaps.Window window, Runnable checkpoint) {
        SpinOverlaps.Window c = window.leading(x.held(), y.held());
        int k = c.high().length;
        int l = c.high()[0].length;
        boolean whole = k >= l;
        ColumnWeights diagonal = whole ? x : y;
        ColumnWeights other = whole ? y : x;
        double[][] vh = whole ? c.high() : transposed(c.high());
        double[][] vl = whole ? c.low() : transposed(c.low());
        int d = Math.max(k, l);
        int m = Math.min(k, l);
        double[][] bh = new double[d][d];
        double[][] bl = new double[d][d];
        double[][] gh = new double[d][m];
        double[][] gl = new double[d][m];
        for (int i = 0; i < d; i++) {
            for (int j = 0; j < m; j++) {
                DoubleDouble g = new DoubleDouble(vh[i][j], vl[i][j]).times(other.power(j));
                gh[i][j] = g.hi();
                gl[i][j] = g.lo();
            }
        }
        DdProducts.addProduct(gh, gl, transposed(vh), transposed(vl), 1, bh, bl);
        checkpoint.run();
        double[] entries = new double[d * d];
        for (int i = 0; i < d; i++) {
            for (int j = 0; j <= i; j++) {
                double v = (i == j ? diagonal.power(i).hi() : 0) - bh[i][j];
                entries[i * d + j] = v;
                entries[j * d + i] = v;
            }
        }
        double traces = diagonal.trace(d) + other.trace(m);
        double rounding = (8 * Math.sqrt(d) * U + d * 0x1p-75) * traces + (double) d * d * 0x1p-1000;
        HermitianEigen e = HermitianEigen.of(d, entries, new double[0]);
        checkpoint.run();
        double error = EigenResidual.of(d, entries, new double[0], e).traceError() + rounding;
        Enclosure norm = Enclosure.ZERO;
        for (double v : e.values()) {
            norm = norm.plus(Enclosure.exact(Math.abs(v)));
        }
        // the traces err by d + 2 roundings
        return Enclosure.exact(traces)
                .widen((d + 8) * U * traces)
                .minus(norm.widen(error))
                .times(0.5);
    }

    private static double[][] transposed(double[][] m) {
        double[][] t = new double[m[0].length][m.length];
        for (int i = 0; i < m.length; i++) {
            for (int j = 0; j < t.length; j++) {
                t[j][i] = m[i][j];
            }
        }
        return t;
    }
}
