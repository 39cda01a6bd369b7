package org.minorant.core.pair;

import static org.junit.jupiter.api.Assertions.assertTrue;

import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;
import org.minorant.core.Enclosure;
import org.minorant.core.Operator;
import org.minorant.core.PositiveOperator;

/** Tr[cA ∧ cB] = c Tr[A ∧ B] to relative accuracy wherever c puts the entries, by factors, by entries, by both, and by Gram matrix. */
class ScaleTest {

    private static final double[][] X = {{1, 0.25}, {-0.5, 2}, {0.125, 0.75}};
    private static final double[][] Y = {{0.5, -1, 0}, {1, 0.375, 0.25}, {0, 0.5, -1}};

    private static final double[][] Z = {{1, 0.25, 0}, {-0.5, 2, 1}, {0.125, 0.75, -1}};

    private static Operator scaled(double[][] m, int power) {
        double[][] s = new double[m.length][m[0].length];
        for (int i = 0; i < m.length; i++) {
            for (int j = 0; j < m[i].length; j++) {
                s[i][j] = Math.scalb(m[i][j], power);
            }
        }
        return Operator.ofReal(s);
    }

    private static PositiveOperator factor(double[][] m, int power) {
        return PositiveOperator.ofFactor(scaled(m, power));
    }

    private static PositiveOperator entries(double[][] m, int power) {
        Operator x = scaled(m, 0);
        Operator a = x.times(x.adjoint());
        // the entries are short binary fractions: the product and its scaling are exact
        return PositiveOperator.of(a.times(Math.scalb(1.0, power)).times(Math.scalb(1.0, power)));
    }

    private static Enclosure back(Enclosure f, int power) {
        return Enclosure.of(
                f.lowerWide().timesPowerOfTwo(-2L * power), f.upperWide().timesPowerOfTwo(-2L * power));
    }

    private static void same(Enclosure expected, Enclosure f) {
        assertTrue(expected.isPossiblyBelow(f) && f.isPossiblyBelow(expected), () -> f + " instead of " + expected);
        assertTrue(f.relativeWidth() < 1e-12, () -> "relative width " + f.relativeWidth());
    }

    @ParameterizedTest
    @ValueSource(ints = {-500, -400, -300, -260, -100, 100, 260, 300, 400, 500})
    void theScaleOfBothOperatorsIsOnlyAFactor(int power) {
        Enclosure one = PositivePair.of(factor(X, 0), factor(Y, 0)).traceMinimum(0.75);
        same(one, back(PositivePair.of(factor(X, power), factor(Y, power)).traceMinimum(0.75), power));
        same(one, back(PositivePair.of(factor(X, power), entries(Y, power)).traceMinimum(0.75), power));
        Enclosure other = PositivePair.of(entries(Z, 0), entries(Y, 0)).traceMinimum(0.75);
        same(other, back(PositivePair.of(entries(Z, power), entries(Y, power)).traceMinimum(0.75), power));
    }

    @ParameterizedTest
    @ValueSource(ints = {-400, -300, 300, 400})
    void theScaleOfAGramMatrixIsOnlyAFactor(int power) {
        double[][] z = {{1, 0.25, 0.5}, {0.25, 2, 0.75}, {0.5, 0.75, 1.5}};
        Enclosure one =
                PositivePair.ofGram(PositiveOperator.of(Operator.ofReal(z)), 1).traceMinimum(1);
        Operator g = scaled(z, power);
        PositiveOperator gram = PositiveOperator.of(g.times(Math.scalb(1.0, power)));
        same(one, back(PositivePair.ofGram(gram, 1).traceMinimum(1), power));
    }

    /** The traces may lie a thousand binary orders apart if the weights bring them together. */
    @ParameterizedTest
    @ValueSource(ints = {-240, 240})
    void weightsMakeUpForTheScaleOfOneOperator(int power) {
        Enclosure one = PositivePair.of(factor(X, 0), factor(Y, 0)).traceMinimum(0.75);
        same(
                one,
                PositivePair.of(factor(X, power), factor(Y, -power))
                        .traceMinimum(Math.scalb(1.0, -2 * power), Math.scalb(0.75, 2 * power)));
    }
}
