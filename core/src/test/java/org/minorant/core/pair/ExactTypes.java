package org.minorant.core.pair;

import java.math.BigDecimal;
import java.math.MathContext;
import java.util.ArrayList;
import java.util.List;

/** Copies by brute force over every type, in 55-digit arithmetic: the reference that enclosures are held against. */
final class ExactTypes {

    static final MathContext MC = new MathContext(55);

    /** One type: how often it occurs, and the product of each kind of number. */
    record Point(BigDecimal multiplicity, BigDecimal first, BigDecimal second) {}

    private ExactTypes() {}

    static List<Point> points(double[] first, double[] second, int n) {
        List<Point> out = new ArrayList<>();
        BigDecimal[][] x = new BigDecimal[first.length][];
        BigDecimal[][] y = new BigDecimal[first.length][];
        for (int i = 0; i < first.length; i++) {
            x[i] = powers(first[i], n);
            y[i] = powers(second[i], n);
        }
        descend(x, y, 0, n, BigDecimal.ONE, BigDecimal.ONE, BigDecimal.ONE, out);
        return out;
    }

    private static BigDecimal[] powers(double v, int n) {
        BigDecimal[] p = new BigDecimal[n + 1];
        p[0] = BigDecimal.ONE;
        for (int k = 1; k <= n; k++) {
            p[k] = p[k - 1].multiply(new BigDecimal(v), MC);
        }
        return p;
    }

    private static void descend(
            BigDecimal[][] x,
            BigDecimal[][] y,
            int i,
            int m,
            BigDecimal ways,
            BigDecimal a,
            BigDecimal b,
            List<Point> out) {
        if (i == x.length - 1) {
            out.add(new Point(ways, a.multiply(x[i][m], MC), b.multiply(y[i][m], MC)));
            return;
        }
        BigDecimal choose = BigDecimal.ONE;
        for (int k = 0; k <= m; k++) {
            descend(
                    x,
                    y,
                    i + 1,
                    m - k,
                    ways.multiply(choose, MC),
                    a.multiply(x[i][k], MC),
                    b.multiply(y[i][k], MC),
                    out);
            choose = choose.multiply(BigDecimal.valueOf(m - k), MC).divide(BigDecimal.valueOf(k + 1), MC);
        }
    }

    /** Σ multiplicity · min(first, t second). */
    static BigDecimal commuting(List<Point> points, BigDecimal t) {
        BigDecimal s = BigDecimal.ZERO;
        for (Point p : points) {
            s = s.add(p.multiplicity().multiply(p.first().min(p.second().multiply(t, MC)), MC), MC);
        }
        return s;
    }

    /**
     * a − λ for weights multiplicity · first at second. Newton's method on the convex function g(δ) − δ goes up to the smallest fixed point from 0; where f = a, which Σ w/(tb) ≤ 1 tells, it is a.
     */
    static BigDecimal rankOne(List<Point> points, BigDecimal t) {
        BigDecimal a = BigDecimal.ZERO;
        BigDecimal atZero = BigDecimal.ZERO;
        boolean kernel = false;
        List<BigDecimal> w = new ArrayList<>();
        List<BigDecimal> c = new ArrayList<>();
        for (Point p : points) {
            BigDecimal weight = p.multiplicity().multiply(p.first(), MC);
            a = a.add(weight, MC);
            if (weight.signum() > 0 && p.second().signum() > 0) {
                w.add(weight);
                c.add(p.second().multiply(t, MC));
                atZero = atZero.add(weight.divide(p.second().multiply(t, MC), MC), MC);
            } else {
                kernel |= weight.signum() > 0;
            }
        }
        if (!kernel && atZero.compareTo(BigDecimal.ONE) <= 0) {
            return a;
        }
        BigDecimal d = BigDecimal.ZERO;
        for (int step = 0; step < 300; step++) {
            BigDecimal lambda = a.subtract(d, MC);
            BigDecimal g = BigDecimal.ZERO;
            BigDecimal slope = BigDecimal.ONE;
            for (int i = 0; i < w.size(); i++) {
                BigDecimal sum = lambda.add(c.get(i), MC);
                BigDecimal term = w.get(i).multiply(c.get(i), MC).divide(sum, MC);
                g = g.add(term, MC);
                slope = slope.subtract(term.divide(sum, MC), MC);
            }
            BigDecimal h = g.subtract(d, MC);
            if (h.compareTo(d.movePointLeft(40)) <= 0 || slope.signum() <= 0) {
                return d;
            }
            d = d.add(h.divide(slope, MC), MC);
        }
        return d;
    }
}
