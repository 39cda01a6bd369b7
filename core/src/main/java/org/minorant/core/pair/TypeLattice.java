package org.minorant.core.pair;

import java.util.Arrays;
import java.util.List;
import org.minorant.core.InvalidInputException;
import org.minorant.core.internal.number.WideDoubleDouble;

/**
 * Measures on the types of n eigenvalues out of r: how often each was met. A type (k_0, …, k_{r−1}) has the index Σ_{j ≥ 1} k_j (n+1)^(j−1), and types of independent parts add up, index by index.
 *
 * @param index rising
 * @param weight as many
 * @param error a bound on the relative error of every weight
 * @param leftOut a bound on the weight of types that are not listed, of one in all
 */
record TypeLattice(int[] index, double[] weight, double error, double leftOut) {

    static final int MOST_TYPES = 4_000_000;

    private static final double U = 0x1p-53;

    /** Weights below 2^-900 are dropped, and products of two below 2^-1000: there are fewer than 2^50 of them. */
    private static final double DROPPED = 0x1p-850;

    /** All weight at no eigenvalue yet. */
    static final TypeLattice NOTHING = new TypeLattice(new int[] {0}, new double[] {1}, 0, 0);

    /** Checks the number of types of n eigenvalues out of r. */
    static void check(int n, int r) {
        if (!(Math.pow(n + 1.0, r - 1.0) <= MOST_TYPES)) {
            throw new InvalidInputException(
                    "PositivePair.ofPowers",
                    n + " eigenvalues out of " + r + " different ones",
                    "at most " + MOST_TYPES + " types",
                    "use fewer copies or smaller operators");
        }
    }

    /**
     * The multinomial measure m!/Π k_j! Π p_j^{k_j}, right to a few roundings.
     *
     * @param p probabilities, zero where a value does not occur
     * @param m how many eigenvalues
     * @param n what indices count in
     * @param pError relative error of the probabilities
     * @param light counts of an eigenvalue rarer than e^(−light) are left out
     */
    static TypeLattice multinomial(List<WideDoubleDouble> p, int m, int n, double pError, double light) {
        int r = p.size();
        double[] ln = new double[r];
        for (int j = 0; j < r; j++) {
            ln[j] = p.get(j).significand().hi() == 0
                    ? Double.NEGATIVE_INFINITY
                    : p.get(j).log2() * Math.log(2);
        }
        Tilt tilt = Tilt.at(0, ln, ln, 0, m);
        int[] from = new int[r];
        int[] to = new int[r];
        PowerTable[] tables = new PowerTable[r];
        double leftOut = 0;
        for (int j = 0; j < r; j++) {
            boolean occurs = ln[j] > Double.NEGATIVE_INFINITY;
            from[j] = occurs ? tilt.from(j, light) : 0;
            to[j] = occurs ? tilt.to(j, light) : 0;
            tables[j] = occurs ? PowerTable.scaledPowers(p.get(j), from[j], to[j]) : PowerTable.NOTHING;
            leftOut += occurs ? 2.01 * Math.exp(-light) + DROPPED : 0;
        }
        Collector c = new Collector(from, to, tables, n);
        WideDoubleDouble f = Factorials.of(m);
        c.collect(r - 1, m, 0, f.significand().hi(), f.exponent());
        return c.lattice((2 * r + 3) * U + m * (2 * pError + 0x1p-98), leftOut + DROPPED);
    }

    /** The measure of independent parts together. */
    TypeLattice plus(TypeLattice o) {
        if (index.length > o.index.length) {
            return o.plus(this);
        }
        int least = index[0] + o.index[0];
        int most = index[index.length - 1] + o.index[o.index.length - 1];
        double[] sum = new double[most - least + 1];
        boolean dense = o.index[o.index.length - 1] - o.index[0] == o.index.length - 1;
        for (int i = 0; i < index.length; i++) {
            double w = weight[i];
            if (dense) {
                int at = index[i] + o.index[0] - least;
                for (int k = 0; k < o.weight.length; k++) {
                    sum[at + k] += w * o.weight[k];
                }
            } else {
                int at = index[i] - least;
                for (int k = 0; k < o.weight.length; k++) {
                    sum[at + o.index[k]] += w * o.weight[k];
                }
            }
        }
        int count = 0;
        for (double s : sum) {
            count += s > 0 ? 1 : 0;
        }
        int[] where = new int[count];
        double[] what = new double[count];
        int next = 0;
        for (int i = 0; i < sum.length; i++) {
            if (sum[i] > 0) {
                where[next] = least + i;
                what[next++] = sum[i];
            }
        }
        // the shorter one bounds how many positive terms a sum has; products below 2^-1000 are far below what is left
        // out
        double roundings = (index.length + 2) * U * (1 + 0x1p-20);
        return new TypeLattice(
                where, what, error + o.error + roundings + 1e-14 * (error + o.error), leftOut + o.leftOut + DROPPED);
    }

    /** Types within windows, by recursion over the eigenvalues. */
    private static final class Collector {

        private final int[] from;
        private final int[] to;
        private final PowerTable[] tables;
        private final int n;
        private int[] index = new int[1024];
        private double[] weight = new double[1024];
        private int size;

        Collector(int[] from, int[] to, PowerTable[] tables, int n) {
            this.from = from;
            this.to = to;
            this.tables = tables;
            this.n = n;
        }

        void collect(int j, int left, int at, double s, long e) {
            int lo = j == 0 ? Math.max(left, from[0]) : from[j];
            int hi = j == 0 ? Math.min(left, to[0]) : Math.min(left, to[j]);
            int stride = j == 0 ? 0 : (int) Math.pow(n + 1, j - 1);
            for (int k = lo; k <= hi; k++) {
                double product = s * tables[j].significand[k - from[j]];
                long exponent = e + tables[j].exponent[k - from[j]];
                if (j > 0) {
                    collect(j - 1, left - k, at + k * stride, product, exponent);
                } else {
                    add(at, TypeBox.scaled(product, exponent));
                }
            }
        }

        private void add(int at, double w) {
            if (w == 0) {
                return;
            }
            if (size == index.length) {
                index = Arrays.copyOf(index, 2 * size);
                weight = Arrays.copyOf(weight, 2 * size);
            }
            index[size] = at;
            weight[size++] = w;
        }

        TypeLattice lattice(double error, double leftOut) {
            return new TypeLattice(Arrays.copyOf(index, size), Arrays.copyOf(weight, size), error, leftOut);
        }
    }
}
