package org.minorant.core;

import java.util.List;
import java.util.Optional;
import org.minorant.core.internal.number.DoubleDouble;

/**
 * Weighted sums of positive operators, by factor: Σ w_i X_i X_i* = ZZ* with Z = (√w_1 X_1, √w_2 X_2, …).
 *
 * <p><b>Roots of weights.</b> Where all columns are plain doubles (kets, factors given by the user) the root s is rounded to double, so that
 * every product s·x is an exact sum of two doubles: the columns keep their direction, and the only error is the scalar |w/s² − 1| ≤ 2^-51,
 * which is relative. Where columns have 32 digits the root is a double-double and products are rounded; an error E of the columns
 * enters by {@link FactorRounding}.
 */
final class FactorSums {

    private FactorSums() {}

    /** w·A for A given by its factor. */
    static PositiveFactor scaled(PositiveFactor f, double weight) {
        if (weight == 0) {
            return new PositiveFactor(EnclosedMatrix.builder(f.dimension(), 1).build(), 0, 0);
        }
        // w = m · 4^k with 1 ≤ m < 4: powers of two cost nothing
        int k = Math.floorDiv(Math.getExponent(weight), 2);
        double m = Math.scalb(weight, -2 * k);
        double trace = f.traceError() * weight * (1 + 0x1p-52) + (f.traceError() == 0 ? 0 : Double.MIN_VALUE);
        double s = Math.sqrt(m);
        Optional<EnclosedMatrix> exact = exactly(f.columns(), s, k);
        if (exact.isPresent()) {
            // m − s² is rounded once
            double scalar = Math.abs(Math.fma(-s, s, m)) / (s * s) * (1 + 0x1p-50);
            return new PositiveFactor(exact.get(), combined(f.relativeError(), scalar), trace);
        }
        DoubleDouble root = DoubleDouble.of(m).sqrt();
        PositiveFactor rounded = FactorRounding.entrywise(product(f.columns(), root, k), 0x1p-100);
        return new PositiveFactor(
                rounded.columns(),
                combined(combined(f.relativeError(), 0x1p-100), rounded.relativeError()),
                (trace + rounded.traceError()) * (1 + f.relativeError()) * (1 + 0x1p-40));
    }

    /** (1 + a)(1 + b) − 1, rounded up; bounds 1 − (1 − a)(1 − b) too. */
    static double combined(double a, double b) {
        return (a + b + a * b) * (1 + 0x1p-50);
    }

    /** 2^k s X, if every entry of it is an exact sum of two doubles. */
    private static Optional<EnclosedMatrix> exactly(EnclosedMatrix x, double s, int k) {
        EnclosedMatrix.Builder b = EnclosedMatrix.builder(x.rows(), x.columns());
        DoubleDouble root = DoubleDouble.of(s);
        for (int i = 0; i < x.rows(); i++) {
            for (int j = 0; j < x.columns(); j++) {
                DoubleDouble re = new DoubleDouble(x.re(i, j), x.reTail(i, j));
                DoubleDouble im = new DoubleDouble(x.im(i, j), x.imTail(i, j));
                if (!ExactProduct.isExact(re, root) || !ExactProduct.isExact(im, root)) {
                    return Optional.empty();
                }
                re = re.times(s);
                im = im.times(s);
                if (!ExactProduct.survives(re, k) || !ExactProduct.survives(im, k)) {
                    return Optional.empty();
                }
                set(b, i, j, re, im, k);
            }
        }
        return Optional.of(b.build());
    }

    private static EnclosedMatrix product(EnclosedMatrix x, DoubleDouble s, int k) {
        EnclosedMatrix.Builder b = EnclosedMatrix.builder(x.rows(), x.columns());
        for (int i = 0; i < x.rows(); i++) {
            for (int j = 0; j < x.columns(); j++) {
                set(
                        b,
                        i,
                        j,
                        new DoubleDouble(x.re(i, j), x.reTail(i, j)).times(s),
                        new DoubleDouble(x.im(i, j), x.imTail(i, j)).times(s),
                        k);
            }
        }
        return b.build();
    }

    private static void set(EnclosedMatrix.Builder b, int i, int j, DoubleDouble re, DoubleDouble im, int k) {
        b.set(i, j, Math.scalb(re.hi(), k), Math.scalb(re.lo(), k), Math.scalb(im.hi(), k), Math.scalb(im.lo(), k), 0);
    }

    /** The sum of operators given by factors: columns side by side. Relative errors: the largest; trace errors add. */
    static PositiveFactor stacked(List<PositiveFactor> factors) {
        int n = factors.get(0).dimension();
        int rank = 0;
        double relative = 0;
        double trace = 0;
        for (PositiveFactor f : factors) {
            rank = Math.addExact(rank, f.rank());
            relative = Math.max(relative, f.relativeError());
            trace = (trace + f.traceError()) * (1 + 0x1p-52);
        }
        EnclosedMatrix.Builder b = EnclosedMatrix.builder(n, rank);
        int c = 0;
        for (PositiveFactor f : factors) {
            EnclosedMatrix x = f.columns();
            for (int j = 0; j < f.rank(); j++, c++) {
                for (int i = 0; i < n; i++) {
                    b.set(i, c, x.re(i, j), x.reTail(i, j), x.im(i, j), x.imTail(i, j), 0);
                }
            }
        }
        return new PositiveFactor(b.build(), relative, trace);
    }
}
