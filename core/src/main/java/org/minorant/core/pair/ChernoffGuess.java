package org.minorant.core.pair;

import org.minorant.core.WideDouble;

/**
 * The size that f is expected to have at n copies: min over s of a^s b^(1−s) (Tr A^s B^(1−s))^n, the quantum Chernoff bound (K. M. R. Audenaert et al., Phys. Rev. Lett. 98, 160501, 2007, from memory),
 * and what a sum over √n blocks usually falls short of it. A guess: it decides only how much is truncated at first.
 */
final class ChernoffGuess {

    private static final int STEPS = 60;
    private static final double GOLDEN = (Math.sqrt(5) - 1) / 2;
    private static final double LN2 = Math.log(2);

    private ChernoffGuess() {}

    static double log2(QubitSpectra q, int n, WideDouble wa, WideDouble wb) {
        double c2 = q.cos().hi() * q.cos().hi();
        double s2 = q.sin().hi() * q.sin().hi();
        double[] a = {q.first().large().hi(), q.first().small().hi()};
        double[] b = {q.second().large().hi(), q.second().small().hi()};
        return log2(a, b, new double[][] {{c2, s2}, {s2, c2}}, n, wa, wb);
    }

    /** The guess from two spectra and the squared moduli of the overlaps between their eigenvectors. */
    static double log2(double[] a, double[] b, double[][] squares, int n, WideDouble wa, WideDouble wb) {
        double la = log2(wa);
        double lb = log2(wb);
        double low = 1e-6;
        double high = 1 - 1e-6;
        for (int i = 0; i < STEPS; i++) {
            double x = high - GOLDEN * (high - low);
            double y = low + GOLDEN * (high - low);
            if (at(a, b, squares, n, la, lb, x) <= at(a, b, squares, n, la, lb, y)) {
                high = y;
            } else {
                low = x;
            }
        }
        double bound = at(a, b, squares, n, la, lb, (low + high) / 2);
        return Math.max(-1e9, Math.min(bound, Math.min(la, lb))) - Math.log(n) / LN2 - 3;
    }

    private static double log2(WideDouble x) {
        return x.exponent() + Math.log(x.significand()) / LN2;
    }

    private static double at(double[] a, double[] b, double[][] squares, int n, double la, double lb, double s) {
        double trace = 0;
        for (int i = 0; i < a.length; i++) {
            for (int j = 0; j < b.length; j++) {
                trace += Math.pow(a[i], s) * Math.pow(b[j], 1 - s) * squares[i][j];
            }
        }
        return s * la + (1 - s) * lb + n * Math.log(trace) / LN2;
    }
}
