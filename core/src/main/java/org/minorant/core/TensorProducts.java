package org.minorant.core;

import org.minorant.core.internal.message.Checks;

/** Entries of Kronecker products and direct sums; the memory they take is checked before it is taken. */
final class TensorProducts {

    private TensorProducts() {}

    /** a ⊗ b: entry ((i, k), (j, l)) is a_ij b_kl, pairs counted with the second index running fastest. */
    static Operator tensor(String asked, Operator a, Operator b) {
        long rows = (long) a.rows() * b.rows();
        long columns = (long) a.columns() * b.columns();
        Checks.dimensions(asked, rows, columns);
        int n = (int) columns;
        double[] re = new double[(int) rows * n];
        double[] im = new double[a.isReal() && b.isReal() ? 0 : re.length];
        for (int i = 0; i < a.rows(); i++) {
            for (int j = 0; j < a.columns(); j++) {
                double x = a.re(i, j);
                double y = a.im(i, j);
                for (int k = 0; k < b.rows(); k++) {
                    int at = (i * b.rows() + k) * n + j * b.columns();
                    for (int l = 0; l < b.columns(); l++) {
                        re[at + l] = x * b.re(k, l) - y * b.im(k, l);
                        if (im.length != 0) {
                            im[at + l] = x * b.im(k, l) + y * b.re(k, l);
                        }
                    }
                }
            }
        }
        return new Operator((int) rows, n, Checks.finite(asked, re), Checks.finite(asked, im));
    }

    /** Both operators as blocks on the diagonal. */
    static Operator directSum(String asked, Operator a, Operator b) {
        long rows = (long) a.rows() + b.rows();
        long columns = (long) a.columns() + b.columns();
        Checks.dimensions(asked, rows, columns);
        int n = (int) columns;
        double[] re = new double[(int) rows * n];
        double[] im = new double[a.isReal() && b.isReal() ? 0 : re.length];
        place(a, re, im, 0, n);
        place(b, re, im, a.rows() * n + a.columns(), n);
        return new Operator((int) rows, n, re, im);
    }

    private static void place(Operator a, double[] re, double[] im, int start, int n) {
        for (int i = 0; i < a.rows(); i++) {
            for (int j = 0; j < a.columns(); j++) {
                re[start + i * n + j] = a.re(i, j);
                if (im.length != 0) {
                    im[start + i * n + j] = a.im(i, j);
                }
            }
        }
    }
}
