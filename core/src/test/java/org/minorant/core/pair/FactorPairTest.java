package org.minorant.core.pair;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.math.MathContext;
import java.util.SplittableRandom;
import org.junit.jupiter.api.Test;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.Enclosure;
import org.minorant.core.Operator;
import org.minorant.core.PositiveFactor;
import org.minorant.core.PositiveOperator;
import org.minorant.core.WideDouble;

class FactorPairTest {

    private static final MathContext DIGITS = new MathContext(120);

    /** Columns with independent entries of about equal size, times scale^column. */
    private static Operator columns(SplittableRandom random, int n, int k, double scale) {
        double[] re = new double[n * k];
        double[] im = new double[n * k];
        for (int i = 0; i < n * k; i++) {
            re[i] = (random.nextDouble() - 0.5) * Math.pow(scale, i % k);
            im[i] = (random.nextDouble() - 0.5) * Math.pow(scale, i % k);
        }
        return Operator.ofRowMajor(n, k, re, im);
    }

    private static FactorPair pair(Operator x, Operator y) {
        return new FactorPair(
                new PositiveFactor(EnclosedMatrix.of(x), 0, 0), new PositiveFactor(EnclosedMatrix.of(y), 0, 0));
    }

    /** Two kets: f = ½(a + b − √((a+b)² − 4|h|²)), Helstrom 1976, in 120 digits. */
    private static BigDecimal twoKets(Operator x, Operator y) {
        BigDecimal a = BigDecimal.ZERO;
        BigDecimal b = BigDecimal.ZERO;
        BigDecimal hr = BigDecimal.ZERO;
        BigDecimal hi = BigDecimal.ZERO;
        for (int i = 0; i < x.rows(); i++) {
            BigDecimal xr = new BigDecimal(x.re(i, 0));
            BigDecimal xi = new BigDecimal(x.im(i, 0));
            BigDecimal yr = new BigDecimal(y.re(i, 0));
            BigDecimal yi = new BigDecimal(y.im(i, 0));
            a = a.add(xr.multiply(xr)).add(xi.multiply(xi));
            b = b.add(yr.multiply(yr)).add(yi.multiply(yi));
            hr = hr.add(xr.multiply(yr)).add(xi.multiply(yi));
            hi = hi.add(xr.multiply(yi)).subtract(xi.multiply(yr));
        }
        BigDecimal sum = a.add(b);
        BigDecimal four = BigDecimal.valueOf(4);
        BigDecimal h2 = hr.multiply(hr).add(hi.multiply(hi));
        BigDecimal root = sum.multiply(sum).subtract(four.multiply(h2)).sqrt(new MathContext(700));
        return sum.subtract(root).multiply(new BigDecimal("0.5"));
    }

    @Test
    void twoKetsAgreeWithHelstromAtEveryDepth() {
        SplittableRandom random = new SplittableRandom(11);
        for (int trial = 0; trial < 200; trial++) {
            int n = 2 + trial % 5;
            Operator x = columns(random, n, 1, 1);
            double[] re = columns(random, n, 1, 1).realParts();
            // nearly orthogonal: a tiny first entry against a ket along the first axis
            boolean deep = trial % 2 == 0;
            if (deep) {
                double[] first = new double[n];
                first[0] = 1;
                x = Operator.ofRowMajor(n, 1, first, new double[0]);
                re[0] = Math.scalb(1.0, -trial * 4);
            }
            Operator y = Operator.ofRowMajor(n, 1, re, new double[n]);
            Enclosure f = pair(x, y).traceMinimum(1);
            BigDecimal exact = twoKets(x, y);
            assertTrue(
                    f.contains(exact),
                    "trial " + trial + ": " + f.toIntervalString(20) + " misses " + exact.round(DIGITS));
            // eight outward roundings of one unit each
            assertTrue(f.relativeWidth() < 16 * 0x1p-52, "trial " + trial + ": width " + f.relativeWidth());
        }
    }

    @Test
    void agreesWithEigenvaluesOnShallowPairs() {
        SplittableRandom random = new SplittableRandom(12);
        for (int trial = 0; trial < 60; trial++) {
            int n = 2 + trial % 7;
            double scale = trial % 3 == 0 ? 1e-2 : 1;
            PositiveOperator a = PositiveOperator.ofFactor(columns(random, n, 1 + trial % n, scale));
            PositiveOperator b = PositiveOperator.ofFactor(columns(random, n, 1 + (trial / 2) % n, scale));
            double t = Math.pow(10, random.nextDouble(-3, 3));
            Enclosure f = new FactorPair(a.factor(), b.factor()).traceMinimum(t);
            Enclosure g = new DensePair(a, b).fromEigenvalues(WideDouble.ONE, WideDouble.of(t));
            // disjoint enclosures would throw
            f.intersect(g);
            assertTrue(f.relativeWidth() < 1e-14, "trial " + trial + ": width " + f.relativeWidth());
        }
    }

    @Test
    void equalOperatorsGiveTheirTrace() {
        SplittableRandom random = new SplittableRandom(13);
        for (int k = 1; k <= 6; k++) {
            Operator x = columns(random, 6, k, 0.5);
            FactorPair p = pair(x, x);
            Enclosure f = p.traceMinimum(1);
            f.intersect(p.firstTrace());
            // twice an angle that leaves 1e-7 of each trace
            assertTrue(f.relativeWidth() < 1e-14, "rank " + k + ": width " + f.relativeWidth());
        }
    }

    @Test
    void overcompleteColumnsAreHandled() {
        SplittableRandom random = new SplittableRandom(14);
        PositiveOperator a = PositiveOperator.ofFactor(columns(random, 3, 7, 1));
        PositiveOperator b = PositiveOperator.ofFactor(columns(random, 3, 5, 1));
        Enclosure direct = new FactorPair(a.factor(), b.factor()).traceMinimum(0.7);
        Enclosure reduced = PositivePair.of(a, b).traceMinimum(0.7);
        direct.intersect(reduced);
        assertTrue(reduced.relativeWidth() < 1e-14, "width " + reduced.relativeWidth());
        assertEquals(3, a.factor().reduced().rank());
    }

    @Test
    void extremeWeightsReachTheirLimits() {
        SplittableRandom random = new SplittableRandom(15);
        FactorPair p = pair(columns(random, 4, 4, 1), columns(random, 4, 4, 1));
        assertTrue(p.traceMinimum(1e300).relativeWidth() < 1e-14);
        assertTrue(p.traceMinimum(1e-300).relativeWidth() < 1e-14);
        p.traceMinimum(1e300).intersect(p.firstTrace());
        p.traceMinimum(1e-300).intersect(p.secondTrace().times(1e-300));
        // weights far beyond double: both ends still hold, the limit is the trace
        Enclosure far = p.traceMinimum(WideDouble.ONE, WideDouble.of(1, 5000));
        far.intersect(p.firstTrace());
    }

    @Test
    void aPoorTransformationGivesAWideButTrueEnclosure() {
        SplittableRandom random = new SplittableRandom(16);
        for (int trial = 0; trial < 40; trial++) {
            EnclosedMatrix x = EnclosedMatrix.of(columns(random, 4, 2, 1));
            EnclosedMatrix y = EnclosedMatrix.of(columns(random, 4, 2, 1));
            EnclosedMatrix gx = x.adjoint().times(x);
            EnclosedMatrix gy = y.adjoint().times(y);
            EnclosedMatrix m = x.adjoint().times(y);
            WeightedColumns columns = new WeightedColumns(() -> x, () -> y, gx, gy, m, 0);
            Enclosure good = RotationCertificate.enclose(columns, () -> {});
            // rotations of other columns: an admissible but wrong transformation
            EnclosedMatrix z = EnclosedMatrix.of(columns(random, 4, 2, 1));
            EnclosedMatrix gz = z.adjoint().times(z);
            EnclosedMatrix mz = x.adjoint().times(z);
            WeightedColumns others = new WeightedColumns(() -> x, () -> z, gx, gz, mz, 0);
            Enclosure poor = RotationCertificate.enclose(columns, others.sweep(() -> {}), () -> {});
            assertTrue(poor.contains(good.midpoint()), trial + ": " + poor.toIntervalString(5) + " misses " + good);
            assertTrue(good.relativeWidth() < 1e-14);
        }
    }

    @Test
    void aGramMatrixIsEnough() {
        // two kets of overlap c: f(1) = 1 − √(1 − c²), Helstrom 1976
        for (double c : new double[] {0.5, 1e-3, 1e-40, 1e-150}) {
            PositiveOperator gram = PositiveOperator.of(Operator.ofReal(new double[][] {{1, c}, {c, 1}}));
            Enclosure f = PositivePair.ofGram(gram, 1).traceMinimum(1);
            BigDecimal one = BigDecimal.ONE;
            BigDecimal square = new BigDecimal(c).pow(2);
            BigDecimal exact = one.subtract(one.subtract(square).sqrt(new MathContext(700)));
            assertTrue(f.contains(exact), c + ": " + f.toIntervalString(20));
            assertTrue(f.relativeWidth() < 16 * 0x1p-52);
        }
        SplittableRandom random = new SplittableRandom(17);
        Operator z = columns(random, 5, 5, 1);
        Operator x = columns(random, 5, 5, 0).plus(z);
        EnclosedMatrix g = EnclosedMatrix.of(x).adjoint().times(EnclosedMatrix.of(x));
        PositiveOperator gram = PositiveOperator.ofFactor(
                new PositiveFactor(EnclosedMatrix.of(x).adjoint(), 0, 0));
        Enclosure f = PositivePair.ofGram(
                        PositiveOperator.of(Operator.ofRowMajor(5, 5, gram.realParts(), gram.imaginaryParts())), 2)
                .traceMinimum(0.8);
        double[] first = new double[10];
        double[] firstIm = new double[10];
        double[] second = new double[15];
        double[] secondIm = new double[15];
        for (int i = 0; i < 5; i++) {
            for (int j = 0; j < 5; j++) {
                if (j < 2) {
                    first[i * 2 + j] = x.re(i, j);
                    firstIm[i * 2 + j] = x.im(i, j);
                } else {
                    second[i * 3 + j - 2] = x.re(i, j);
                    secondIm[i * 3 + j - 2] = x.im(i, j);
                }
            }
        }
        Enclosure columns = pair(Operator.ofRowMajor(5, 2, first, firstIm), Operator.ofRowMajor(5, 3, second, secondIm))
                .traceMinimum(0.8);
        // the Gram matrix was rounded to double: entries by 2^-53 of at most 1
        assertTrue(f.widen(1e-14).contains(columns.midpoint()), f + " against " + columns);
        assertEquals(5, g.rows());
    }

    @Test
    void theCurveLevelsOffAtWhatTheSupportHolds() {
        // B = yy*: Tr PA = Σ|⟨y, x_j⟩|²/‖y‖² = (5² + 1²)/9, and f is within f²/t of it; A's columns are (1, 0, 2) and
        // (3, -1, 0)
        Operator x = Operator.ofReal(new double[][] {{1, 3}, {0, -1}, {2, 0}});
        Operator y = Operator.ofReal(new double[][] {{1}, {2}, {2}});
        Enclosure level = Enclosure.exact(26).dividedBy(Enclosure.exact(9));
        double far = Double.MAX_VALUE;
        for (WideDouble t : new WideDouble[] {WideDouble.of(far), WideDouble.of(1, 5000)}) {
            Enclosure f = pair(x, y).traceMinimum(WideDouble.ONE, t);
            Enclosure g = pair(y, x).traceMinimum(t, WideDouble.ONE);
            for (Enclosure e : new Enclosure[] {f, g}) {
                assertTrue(e.isPossiblyBelow(level) && level.isPossiblyBelow(e), () -> e + " instead of 26/9");
                assertTrue(e.relativeWidth() < 1e-12, () -> "width " + e.relativeWidth());
            }
        }
        // dependent columns: no better upper end than the trace, and still the value inside
        Operator twice = Operator.ofReal(new double[][] {{1, 0.5}, {2, 1}, {2, 1}});
        Enclosure h = pair(x, twice).traceMinimum(far);
        assertTrue(h.contains(26.0 / 9), () -> h.toString());
    }

    @Test
    void dependentColumnsKeepTheirWeakCombinations() {
        // A = span of (1, 0, 0) and, by cancellation of two columns, of a vector of size 1e-30 along (0, 1, 1e-12);
        // B along the third axis: f is close to |⟨e₃, weak⟩|², in the difference of two strong columns only
        double tiny = Math.scalb(1.0, -100);
        double[][] columns = {{1, 1}, {tiny, -tiny}, {tiny * 0x1p-40, -tiny * 0x1p-40}};
        Operator x = Operator.ofReal(columns);
        Operator y = Operator.ofReal(new double[][] {{0}, {0}, {1}});
        FactorPair p = pair(x, y);
        Enclosure f = p.traceMinimum(1);
        // X = (√2 e₁, √2 w) up to a rotation of columns: f = Tr[2ww* ∧ e₃e₃*], the pair of kets √2 w and e₃
        Operator weak = Operator.ofReal(new double[][] {{0}, {Math.sqrt(2) * tiny}, {Math.sqrt(2) * tiny * 0x1p-40}});
        Enclosure g = pair(weak, y).traceMinimum(1);
        assertTrue(f.relativeWidth() < 1e-12, "width " + f.relativeWidth());
        // √2 rounded once changes the weight by at most 2^-52
        f.intersect(g.times(Enclosure.ONE.widen(0x1p-51)));
    }
}
