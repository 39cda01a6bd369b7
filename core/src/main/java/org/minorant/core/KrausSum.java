package org.minorant.core;

import java.util.ArrayList;
import java.util.List;
import org.minorant.core.internal.kernel.Products;
import org.minorant.core.internal.message.Checks;
import org.minorant.core.internal.number.DoubleDouble;

/**
 * Sums Σ K_i A K_i* for matrices K_i of exact numbers.
 *
 * <p><b>Positive operators.</b> With A ~ XX* a factor of the sum is (K_1 X, K_2 X, …); where rows of K have one entry each and products are
 * exact it keeps η and ν, otherwise {@link FactorRounding} adds to them. The trace error grows by ‖ΣK*K‖ at most. Entries are summed as an {@link
 * EnclosedMatrix} and rounded once.
 */
final class KrausSum {

    /** Factors wider than this times their height are made square where possible. */
    private static final long WIDE = 4;

    private KrausSum() {}

    /** Σ K A K* in double. */
    static Operator apply(String asked, List<Operator> kraus, Operator a) {
        int m = kraus.get(0).rows();
        int n = kraus.get(0).columns();
        shape(asked, a, n);
        boolean real = a.isReal() && kraus.stream().allMatch(Operator::isReal);
        double[] re = new double[m * m];
        double[] im = new double[real ? 0 : m * m];
        double[] ar = a.realParts();
        double[] ai = a.imaginaryParts();
        for (Operator k : kraus) {
            boolean flat = k.isReal() && a.isReal();
            double[] pr = new double[m * n];
            double[] pi = new double[flat ? 0 : m * n];
            Products.multiply(m, n, n, k.realParts(), k.imaginaryParts(), ar, ai, pr, pi);
            Operator t = k.adjoint();
            double[] qr = new double[m * m];
            double[] qi = new double[flat ? 0 : m * m];
            Products.multiply(m, n, m, pr, pi, t.realParts(), t.imaginaryParts(), qr, qi);
            add(re, qr);
            add(im, qi);
        }
        return new Operator(m, m, Checks.finite(asked, re), Checks.finite(asked, im));
    }

    private static void add(double[] sum, double[] term) {
        for (int e = 0; e < term.length; e++) {
            sum[e] += term[e];
        }
    }

    private static void shape(String asked, Operator a, int n) {
        if (a.rows() != n || a.columns() != n) {
            throw new InvalidInputException(
                    asked,
                    "the operator is " + a.rows() + " x " + a.columns(),
                    n + " x " + n,
                    "give an operator on the space mapped from");
        }
    }

    /** Σ K A K* for a Hermitian A, Hermitian exactly: the upper triangle is copied from the lower one. */
    static HermitianOperator apply(String asked, List<Operator> kraus, HermitianOperator a) {
        return HermitianPart.ofLowerTriangle(apply(asked, kraus, (Operator) a));
    }

    /** Σ K A K* for the operator meant by a positive A. */
    static PositiveOperator apply(String asked, List<Operator> kraus, PositiveOperator a) {
        shape(asked, a, kraus.get(0).columns());
        int out = kraus.get(0).rows();
        if (a.knownColumns().isPresent() && (long) a.knownColumns().getAsInt() * kraus.size() <= WIDE * out) {
            return PositiveOperator.ofFactor(stacked(kraus, a.factor()));
        }
        MeantOperator meant = a.knownColumns().isPresent()
                ? MeantOperator.byFactor(a.factor())
                : new MeantOperator(EnclosedMatrix.of(a), a.entryDefect(), false);
        EnclosedMatrix sum = sum(kraus, meant.matrix());
        RoundedCopy copy = RoundedCopy.of(asked, sum);
        double defect =
                (copy.traceNormError() + FrobeniusBound.times(meant.traceNormError(), growth(kraus))) * (1 + 0x1p-50);
        return new PositiveOperator(copy.operator(), defect, FactorSource.later(() -> factor(kraus, a.factor())));
    }

    /** Σ K A K* for an enclosed matrix. */
    private static EnclosedMatrix sum(List<Operator> kraus, EnclosedMatrix a) {
        EnclosedMatrix sum =
                EnclosedMatrix.builder(kraus.get(0).rows(), kraus.get(0).rows()).build();
        for (Operator operator : kraus) {
            EnclosedMatrix k = EnclosedMatrix.of(operator);
            sum = sum.plus(k.times(a).times(k.adjoint()));
        }
        return sum;
    }

    /** Columns side by side if they are not many; otherwise a square factor of the sum, where that keeps relative accuracy. */
    private static PositiveFactor factor(List<Operator> kraus, PositiveFactor f) {
        if ((long) f.rank() * kraus.size() <= WIDE * kraus.get(0).rows()) {
            return stacked(kraus, f);
        }
        EnclosedMatrix x = f.columns();
        double nu = FrobeniusBound.times(f.traceError(), growth(kraus)) * (1 + 0x1p-50);
        return FactorOfEntries.square(sum(kraus, x.times(x.adjoint())), f.relativeError(), nu)
                .orElseGet(() -> stacked(kraus, f));
    }

    /** An upper end of ‖ΣK*K‖: the root of the largest row sum times the largest column sum bounds a norm. */
    private static double growth(List<Operator> kraus) {
        double sum = 0;
        for (Operator k : kraus) {
            double[] rows = new double[k.rows()];
            double[] columns = new double[k.columns()];
            for (int i = 0; i < k.rows(); i++) {
                for (int j = 0; j < k.columns(); j++) {
                    double m = Math.abs(k.re(i, j)) + Math.abs(k.im(i, j));
                    rows[i] += m;
                    columns[j] += m;
                }
            }
            double r = 0;
            for (double v : rows) {
                r = Math.max(r, v);
            }
            double c = 0;
            for (double v : columns) {
                c = Math.max(c, v);
            }
            double f = FrobeniusBound.of(k);
            sum += Math.min(f * f, r * c);
        }
        return sum * (1 + 0x1p-30);
    }

    /** The columns of K_i X side by side. */
    private static PositiveFactor stacked(List<Operator> kraus, PositiveFactor f) {
        List<PositiveFactor> parts = new ArrayList<>();
        for (Operator k : kraus) {
            PositiveFactor h = exactly(k, f.columns())
                    ? new PositiveFactor(monomial(k, f.columns()), 0, 0)
                    : FactorRounding.ofRadii(EnclosedMatrix.of(k).times(f.columns()));
            parts.add(FactorShapes.after(h, f.relativeError(), 0));
        }
        PositiveFactor all = FactorSums.stacked(parts);
        double nu = all.traceError() + FrobeniusBound.times(f.traceError(), growth(kraus)) * (1 + 0x1p-50);
        return new PositiveFactor(all.columns(), all.relativeError(), nu);
    }

    /** Whether every row of K has at most one entry, real or imaginary, and all its products with X are exact. */
    private static boolean exactly(Operator k, EnclosedMatrix x) {
        for (int i = 0; i < k.rows(); i++) {
            int at = single(k, i);
            if (at == MANY) {
                return false;
            }
            for (int c = 0; at != NONE && c < x.columns(); c++) {
                DoubleDouble v = DoubleDouble.of(k.re(i, at) + k.im(i, at));
                if (!ExactProduct.isExact(v, new DoubleDouble(x.re(at, c), x.reTail(at, c)))
                        || !ExactProduct.isExact(v, new DoubleDouble(x.im(at, c), x.imTail(at, c)))) {
                    return false;
                }
            }
        }
        return true;
    }

    private static final int NONE = -1;
    private static final int MANY = -2;

    /** The column of the only entry of a row. */
    private static int single(Operator k, int i) {
        int at = NONE;
        for (int j = 0; j < k.columns(); j++) {
            boolean re = k.re(i, j) != 0;
            boolean im = k.im(i, j) != 0;
            if (re && im || (re || im) && at != NONE) {
                return MANY;
            }
            if (re || im) {
                at = j;
            }
        }
        return at;
    }

    private static EnclosedMatrix monomial(Operator k, EnclosedMatrix x) {
        EnclosedMatrix.Builder b = EnclosedMatrix.builder(k.rows(), x.columns());
        for (int i = 0; i < k.rows(); i++) {
            int at = single(k, i);
            for (int c = 0; at != NONE && c < x.columns(); c++) {
                DoubleDouble re = new DoubleDouble(x.re(at, c), x.reTail(at, c));
                DoubleDouble im = new DoubleDouble(x.im(at, c), x.imTail(at, c));
                boolean turned = k.re(i, at) == 0;
                DoubleDouble p = turned ? im.negate().times(k.im(i, at)) : re.times(k.re(i, at));
                DoubleDouble q = turned ? re.times(k.im(i, at)) : im.times(k.re(i, at));
                b.set(i, c, p.hi(), p.lo(), q.hi(), q.lo(), 0);
            }
        }
        return b.build();
    }
}
