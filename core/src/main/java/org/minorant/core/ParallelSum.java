package org.minorant.core;

/** The parallel sum of two positive operators by their factors. */
final class ParallelSum {

    private ParallelSum() {}

    static PositiveOperator of(PositiveOperator a, PositiveOperator b, Tolerance tolerance) {
        SpectralDecomposition s = SpectralDecomposition.of(a.plus(b));
        double t = tolerance.threshold(s.dimension(), s.norm());
        Operator inverseRoot = s.applyOnSupport(x -> x > t ? 1 / Math.sqrt(x) : 0, tolerance);
        Operator root = s.applyOnSupport(x -> x > t ? Math.sqrt(x) : 0, tolerance);
        Operator c = inverseRoot.times(a.factor().columns().toOperator());
        Operator d = inverseRoot.times(b.factor().columns().toOperator());
        HermitianOperator k = HermitianPart.ofLowerTriangle(c.times(c.adjoint()));
        Operator u = SpectralDecomposition.of(k).vectors();
        // weights κ and 1 − κ of each vector, each as a sum of squares, so that neither cancels
        double[] first = squaredRows(u.adjoint().times(c));
        double[] second = squaredRows(u.adjoint().times(d));
        double[] weight = new double[first.length];
        for (int j = 0; j < weight.length; j++) {
            double sum = first[j] + second[j];
            weight[j] = sum > 0 ? Math.sqrt(first[j]) * Math.sqrt(second[j]) / Math.sqrt(sum) : 0;
        }
        return PositiveOperator.ofFactor(root.times(u).times(HermitianOperator.diagonal(weight)));
    }

    private static double[] squaredRows(Operator a) {
        double[] s = new double[a.rows()];
        for (int i = 0; i < a.rows(); i++) {
            for (int j = 0; j < a.columns(); j++) {
                s[i] += a.re(i, j) * a.re(i, j) + a.im(i, j) * a.im(i, j);
            }
        }
        return s;
    }
}
