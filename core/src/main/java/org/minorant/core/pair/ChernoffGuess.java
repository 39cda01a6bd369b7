package org.minorant.core.pair;

import java.util.List;
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

    /**
     * Copies of one pair.
     *
     * @param a eigenvalues of A
     * @param b eigenvalues of B
     * @param squares squared moduli of the overlaps between their eigenvectors
     * @param n how many copies
     */
    record Factor(double[] a, double[] b, double[][] squares, int n) {

        static Factor of(QubitPower p) {
            QubitSpectra q = p.spectra();
            double c2 = q.cos().hi() * q.cos().hi();
            double s2 = q.sin().hi() * q.sin().hi();
            return new Factor(
                    new double[] {q.first().large().hi(), q.first().small().hi()},
                    new double[] {q.second().large().hi(), q.second().small().hi()},
                    new double[][] {{c2, s2}, {s2, c2}},
                    p.n());
        }

        /** log2 (Tr A^s B^(1−s))^n. */
        double log2(double s) {
            double trace = 0;
            for (int i = 0; i < a.length; i++) {
                for (int j = 0; j < b.length; j++) {
                    trace += Math.pow(a[i], s) * Math.pow(b[j], 1 - s) * squares[i][j];
                }
            }
            return n * Math.log(trace) / LN2;
        }
    }

    static double log2(QubitSpectra q, int n, WideDouble wa, WideDouble wb) {
        return log2(List.of(Factor.of(new QubitPower(q, n))), wa, wb);
    }

    /** The guess from two spectra and the squared moduli of the overlaps between their eigenvectors. */
    static double log2(double[] a, double[] b, double[][] squares, int n, WideDouble wa, WideDouble wb) {
        return log2(List.of(new Factor(a, b, squares, n)), wa, wb);
    }

    /** The guess for a product of powers. */
    static double log2(List<Factor> factors, WideDouble wa, WideDouble wb) {
        double la = log2(wa);
        double lb = log2(wb);
        double low = 1e-6;
        double high = 1 - 1e-6;
        for (int i = 0; i < STEPS; i++) {
            double x = high - GOLDEN * (high - low);
            double y = low + GOLDEN * (high - low);
            if (at(factors, la, lb, x) <= at(factors, la, lb, y)) {
                high = y;
            } else {
                low = x;
            }
        }
        double bound = at(factors, la, lb, (low + high) / 2);
        int copies = factors.stream().mapToInt(Factor::n).sum();
        return Math.max(-1e9, Math.min(bound, Math.min(la, lb))) - Math.log(copies) / LN2 - 3;
    }

    private static double log2(WideDouble x) {
        return x.exponent() + Math.log(x.significand()) / LN2;
    }

    private static double at(List<Factor> factors, double la, double lb, double s) {
        double sum = s * la + (1 - s) * lb;
        for (Factor f : factors) {
            sum += f.log2(s);
        }
        return sum;
    }
}
