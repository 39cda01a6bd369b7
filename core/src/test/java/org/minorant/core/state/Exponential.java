package org.minorant.core.state;

import org.minorant.core.HermitianOperator;
import org.minorant.core.Operator;

/** Exponentials of matrices by scaling, Taylor and squaring: slow, simple, and independent of what is tested. */
final class Exponential {

    private Exponential() {}

    /** The operator that removes a photon, on 0, …, n−1. */
    static Operator annihilator(int n) {
        double[][] a = new double[n][n];
        for (int k = 1; k < n; k++) {
            a[k - 1][k] = Math.sqrt(k);
        }
        return Operator.ofReal(a);
    }

    static Operator times(Operator a, double re, double im) {
        double[] x = a.realParts();
        double[] y = a.isReal() ? new double[x.length] : a.imaginaryParts();
        double[] u = new double[x.length];
        double[] v = new double[x.length];
        for (int i = 0; i < x.length; i++) {
            u[i] = re * x[i] - im * y[i];
            v[i] = re * y[i] + im * x[i];
        }
        return Operator.ofRowMajor(a.rows(), a.columns(), u, v);
    }

    static Operator of(Operator generator) {
        int squarings = 10;
        Operator g = generator.times(Math.scalb(1.0, -squarings));
        Operator sum = HermitianOperator.identity(g.rows());
        Operator term = sum;
        for (int k = 1; k <= 14; k++) {
            term = term.times(g).times(1.0 / k);
            sum = sum.plus(term);
        }
        for (int k = 0; k < squarings; k++) {
            sum = sum.times(sum);
        }
        return sum;
    }
}
