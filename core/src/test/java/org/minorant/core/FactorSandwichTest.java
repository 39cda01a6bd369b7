package org.minorant.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.util.List;
import java.util.Random;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import org.junit.jupiter.api.Test;
import org.minorant.core.OperatorGenerator.Case;

/** The errors that factors promise, against 110-digit arithmetic. */
class FactorSandwichTest {

    @Provide
    Arbitrary<Case> cases() {
        return OperatorGenerator.cases(4);
    }

    @Provide
    Arbitrary<Case> smallCases() {
        return OperatorGenerator.cases(3);
    }

    @Test
    void factorsOfProductsWhoseTraceOverflowsAreStillFactors() {
        double big = 0x1.8p1023;
        PositiveFactor f = PositiveOperator.ofEigenvalues(big, big, 1e-300)
                .tensor(PositiveOperator.ofEigenvalues(1, 0x1p-900))
                .factor();
        assertEquals(Math.sqrt(big), f.columns().re(0, 0), Math.ulp(0x1p512));
        assertTrue(f.relativeError() < 1e-15 && f.traceError() < 1e-300, () -> f.traceError() + "");
        PositiveFactor g = PositiveOperator.ofFactor(Operator.ofReal(new double[][] {{0x1p-1000}, {0}}))
                .conjugatedBy(Operator.ofReal(new double[][] {{0x1p1000, 0}, {0, 0x1p1000}}))
                .factor();
        assertEquals(1, g.columns().re(0, 0));
        assertEquals(0, g.relativeError() + g.traceError());
    }

    @Property(tries = 60, seed = "1")
    void entries(@ForAll("cases") Case c) {
        PositiveOperator a = c.positive();
        Meaning.assertMeans(Meaning.ofEntries(a), a);
    }

    @Property(tries = 40, seed = "2")
    void entriesAtExtremeScales(@ForAll("cases") Case c) {
        int shift = c.random().nextInt(1500) - 800;
        Operator a = c.positive();
        Operator scaled = scaled(a, shift);
        PositiveOperator p = PositiveOperator.of(scaled);
        Meaning.assertMeans(Meaning.ofEntries(p), p);
    }

    private static Operator scaled(Operator a, int shift) {
        double[] re = a.realParts();
        double[] im = a.imaginaryParts();
        for (int i = 0; i < re.length; i++) {
            re[i] = Math.scalb(re[i], shift);
        }
        for (int i = 0; i < im.length; i++) {
            im[i] = Math.scalb(im[i], shift);
        }
        return Operator.ofRowMajor(a.rows(), a.columns(), re, im);
    }

    /** D H D with H well conditioned and D over a hundred decades: the small eigenvalues keep their digits. */
    @Property(tries = 25, seed = "3")
    void gradedEntries(@ForAll("cases") Case c) {
        Random r = c.random();
        int n = c.dimension();
        double[] spectrum = new double[n];
        java.util.Arrays.setAll(spectrum, i -> 1 + r.nextDouble());
        Operator h = OperatorGenerator.hermitian(spectrum, OperatorGenerator.unitary(n, c.complex(), r));
        double[] re = h.realParts();
        double[] im = h.imaginaryParts();
        double[] d = new double[n];
        java.util.Arrays.setAll(d, i -> Math.pow(10, -100 * r.nextDouble()));
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                re[i * n + j] *= d[Math.max(i, j)] * d[Math.min(i, j)];
                if (im.length > 0) {
                    im[i * n + j] *= d[Math.max(i, j)] * d[Math.min(i, j)];
                }
            }
        }
        PositiveOperator a = PositiveOperator.of(Operator.ofRowMajor(n, n, re, im));
        Meaning.assertMeans(Meaning.ofEntries(a), a);
        assertEquals(0, a.factor().traceError());
        assertTrue(a.factor().relativeError() < 1e-25);
    }

    @Property(tries = 25, seed = "4")
    void multiplesAndSums(@ForAll("cases") Case c) {
        Random r = c.random();
        int n = c.dimension();
        PositiveOperator a = c.positive();
        Operator x = OperatorGenerator.gaussian(n, 1 + r.nextInt(3), c.complex(), r);
        PositiveOperator b = PositiveOperator.ofFactor(x);
        double v = r.nextDouble() * Math.pow(10, r.nextInt(40) - 20);
        double w = r.nextDouble();
        ExactMatrix meantA = Meaning.ofEntries(a).times(new BigDecimal(v));
        ExactMatrix meantB = Meaning.ofColumns(x).times(new BigDecimal(w));
        Meaning.assertMeans(meantA, a.times(v));
        Meaning.assertMeans(meantB, b.times(w));
        Meaning.assertMeans(meantA.plus(meantB), PositiveOperator.weightedSum(List.of(a, b), v, w));
        assertEquals(0, b.times(w).factor().traceError());
    }

    @Property(tries = 14, seed = "5")
    void tensorProductsAndDirectSums(@ForAll("smallCases") Case c) {
        Random r = c.random();
        PositiveOperator a = c.positive();
        Operator x = OperatorGenerator.gaussian(2, 1 + r.nextInt(2), c.complex(), r);
        PositiveOperator b = PositiveOperator.ofFactor(x);
        ExactMatrix meantA = Meaning.ofEntries(a);
        ExactMatrix meantB = Meaning.ofColumns(x);
        Meaning.assertMeans(ExactMatrix.tensor(meantA, meantB), a.tensor(b));
        Meaning.assertMeans(ExactMatrix.tensor(meantB, meantB), b.tensor(b));
        int n = c.dimension();
        PositiveOperator sum = a.directSum(b);
        ExactMatrix meant = new ExactMatrix(2 * (n + 2), 2 * (n + 2));
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                meant.setComplex(i, j, meantA.a[i][j], meantA.a[i + n][j]);
            }
        }
        for (int i = 0; i < 2; i++) {
            for (int j = 0; j < 2; j++) {
                meant.setComplex(n + i, n + j, meantB.a[i][j], meantB.a[i + 2][j]);
            }
        }
        Meaning.assertMeans(meant, sum);
    }

    @Property(tries = 15, seed = "6")
    void conjugationAndTransposition(@ForAll("cases") Case c) {
        Random r = c.random();
        PositiveOperator a = c.positive();
        Operator v = OperatorGenerator.gaussian(1 + r.nextInt(5), c.dimension(), !c.complex(), r);
        ExactMatrix exact = ExactMatrix.of(v);
        ExactMatrix meant = Meaning.ofEntries(a);
        Meaning.assertMeans(exact.times(meant).times(exact.adjoint()), a.conjugatedBy(v));
        Operator x = OperatorGenerator.ket(c.dimension(), c.complex(), r);
        PositiveOperator ket = PositiveOperator.ofFactor(x);
        Meaning.assertMeans(exact.times(Meaning.ofColumns(x)).times(exact.adjoint()), ket.conjugatedBy(v));
        Meaning.assertMeans(Meaning.ofColumns(x.conjugate()), ket.transpose());
        Operator u = c.unitary();
        ExactMatrix exactU = ExactMatrix.of(u);
        Meaning.assertMeans(exactU.times(meant).times(exactU.adjoint()), a.conjugatedBy(u));
    }

    @Property(tries = 8, seed = "7")
    void partialTracesAndPermutations(@ForAll("smallCases") Case c) {
        Random r = c.random();
        int n = 2 * c.dimension();
        Operator x = OperatorGenerator.gaussian(n, 1 + r.nextInt(3), c.complex(), r);
        Case big = new Case(c.kind(), n, c.complex(), c.seed());
        TensorLayout layout = TensorLayout.of(2, c.dimension());
        for (PositiveOperator a : List.of(PositiveOperator.ofFactor(x), big.positive())) {
            ExactMatrix meant = a.isDefinedByFactor() ? Meaning.ofColumns(x) : Meaning.ofEntries(a);
            int d = c.dimension();
            int[] first = java.util.stream.IntStream.range(0, d).toArray();
            int[] second = java.util.stream.IntStream.range(d, n).toArray();
            Meaning.assertMeans(meant.select(first).plus(meant.select(second)), layout.partialTrace(a, 0));
            int[] swapped = new int[n];
            for (int i = 0; i < n; i++) {
                swapped[i] = i % 2 * d + i / 2;
            }
            Meaning.assertMeans(meant.select(swapped), layout.permute(a, 1, 0));
            Meaning.assertMeans(meant.select(second), PositiveOperator.compression(a, second));
        }
    }

    @Property(tries = 20, seed = "8")
    void channels(@ForAll("smallCases") Case c) {
        Random r = c.random();
        DensityOperator a = c.state();
        KrausChannel channel = KrausChannel.nearest(List.of(
                        OperatorGenerator.gaussian(3, c.dimension(), true, r),
                        OperatorGenerator.gaussian(3, c.dimension(), c.complex(), r)))
                .channel();
        Operator x = OperatorGenerator.ket(c.dimension(), c.complex(), r);
        Meaning.assertMeans(image(channel, Meaning.ofEntries(a)), channel.apply(a));
        Meaning.assertMeans(image(channel, Meaning.ofColumns(x)), channel.apply(PositiveOperator.ofFactor(x)));
    }

    private static ExactMatrix image(KrausChannel channel, ExactMatrix a) {
        ExactMatrix sum = null;
        for (Operator k : channel.krausOperators()) {
            ExactMatrix e = ExactMatrix.of(k);
            ExactMatrix term = e.times(a).times(e.adjoint());
            sum = sum == null ? term : sum.plus(term);
        }
        return sum;
    }
}
