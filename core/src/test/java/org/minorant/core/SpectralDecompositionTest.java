package org.minorant.core;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Arrays;
import java.util.Random;
import java.util.function.DoubleUnaryOperator;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import org.junit.jupiter.api.Test;
import org.minorant.core.OperatorGenerator.Case;

/** Functions of Hermitian operators, against f applied to spectra that are known beforehand. */
class SpectralDecompositionTest {

    @Provide
    Arbitrary<Case> cases() {
        return OperatorGenerator.cases(7);
    }

    private static Operator applied(Operator u, double[] values, DoubleUnaryOperator f) {
        return u.times(HermitianOperator.diagonal(Arrays.stream(values).map(f).toArray()))
                .times(u.adjoint());
    }

    private static void assertClose(Operator expected, Operator actual, double tolerance) {
        double d = expected.minus(actual).hilbertSchmidtNorm().upper();
        assertTrue(d <= tolerance, () -> "distance " + d);
    }

    /** Rounding of the entries and of the decomposition move eigenvalues of norm one by n · 2^-50; a function of slope L follows. */
    private static double tolerance(int n, double slope) {
        return n * Math.sqrt(n) * 0x1p-48 * slope;
    }

    @Property(tries = 100, seed = "31")
    void smoothFunctions(@ForAll("cases") Case c) {
        Random r = c.random();
        int n = c.dimension();
        double[] values = OperatorGenerator.spectrum(c.kind(), n, r);
        for (int i = 0; i < n; i++) {
            values[i] *= r.nextBoolean() ? 1 : -1;
        }
        Operator u = OperatorGenerator.unitary(n, c.complex(), r);
        HermitianOperator a = OperatorGenerator.hermitian(values, u);
        assertClose(applied(u, values, Math::exp), a.exponential(), tolerance(n, 3));
        assertClose(applied(u, values, Math::abs), a.absoluteValue(), tolerance(n, 4));
        assertClose(applied(u, values, x -> Math.max(x, 0)), a.positivePart(), tolerance(n, 4));
        assertClose(applied(u, values, x -> Math.max(-x, 0)), a.negativePart(), tolerance(n, 4));
        assertClose(applied(u, values, Math::sin), a.apply(Math::sin), tolerance(n, 1));
        assertClose(a, a.positivePart().minus((HermitianOperator) a.negativePart()), tolerance(n, 1));
        double[] sorted = values.clone();
        Arrays.sort(sorted);
        assertArrayEquals(sorted, a.eigenvalues(), tolerance(n, 1));
    }

    /** Spectra with a gap at zero: everything at least 0.01 or exactly zero. */
    @Property(tries = 100, seed = "32")
    void functionsOnTheSupport(@ForAll("cases") Case c) {
        Random r = c.random();
        int n = c.dimension();
        double[] values = new double[n];
        for (int i = 0; i < n; i++) {
            values[i] = r.nextInt(3) == 0 ? 0 : 0.01 + r.nextDouble();
        }
        Operator u = OperatorGenerator.unitary(n, c.complex(), r);
        PositiveOperator a = PositiveOperator.of(OperatorGenerator.hermitian(values, u));
        Tolerance t = Tolerance.ofRelative(1e-4);
        double p = 3 * r.nextDouble() - 1.5;
        int rank = (int) Arrays.stream(values).filter(x -> x > 0).count();
        assertEquals(rank, a.rank(rank == 0 ? Tolerance.ofAbsolute(1e-4) : t));
        if (rank == 0) {
            return;
        }
        assertClose(applied(u, values, x -> x > 0 ? 1 / x : 0), a.inverse(t), tolerance(n, 1e4));
        assertClose(applied(u, values, x -> x > 0 ? Math.pow(x, p) : 0), a.power(p, t), tolerance(n, 2e5));
        assertClose(applied(u, values, x -> x > 0 ? Math.log(x) : 0), a.logarithm(t), tolerance(n, 300));
        assertClose(applied(u, values, Math::signum), a.sign(t), tolerance(n, 300));
        assertClose(applied(u, values, Math::signum), a.supportProjector(t), tolerance(n, 300));
        assertClose(applied(u, values, x -> x > 0 ? 0 : 1), a.kernelProjector(t), tolerance(n, 300));
        HermitianOperator inverse = a.minus(a.kernelProjector(t)).inverse(t);
        assertClose(applied(u, values, x -> x > 0 ? 1 / x : -1), inverse, tolerance(n, 1e4));
        assertTrue(a.squareRoot().factor().rank() >= rank);
    }

    @Property(tries = 60, seed = "33")
    void squareRootsSquareBack(@ForAll("cases") Case c) {
        PositiveOperator a = c.positive();
        PositiveOperator root = a.squareRoot();
        assertClose(a, root.times(root), tolerance(c.dimension(), 4));
        PositiveOperator back = a.plus(PositiveOperator.of(HermitianOperator.identity(c.dimension())))
                .logarithm(Tolerance.NONE)
                .exponential();
        assertClose(a.plus(HermitianOperator.identity(c.dimension())), back, tolerance(c.dimension(), 8));
    }

    @Test
    void diagonalOperatorsAreExact() {
        PositiveOperator d = PositiveOperator.ofEigenvalues(4, 1e-20, 0, 9);
        assertEquals(PositiveOperator.ofEigenvalues(2, 1e-10, 0, 3), d.squareRoot());
        assertEquals(PositiveOperator.ofEigenvalues(0.25, 1 / 1e-20, 0, 1 / 9.0), d.inverse(Tolerance.NONE));
        assertEquals(PositiveOperator.ofEigenvalues(0.25, 0, 0, 1 / 9.0), d.inverse(Tolerance.ROUNDING));
        assertEquals(PositiveOperator.ofEigenvalues(1, 1, 0, 1), d.power(0, Tolerance.NONE));
        assertEquals(PositiveOperator.ofEigenvalues(0, 0, 1, 0), d.kernelProjector(Tolerance.NONE));
        assertEquals(
                HermitianOperator.diagonal(Math.log(4), Math.log(1e-20), 0, Math.log(9)), d.logarithm(Tolerance.NONE));
        assertArrayEquals(new double[] {0, 1e-20, 4, 9}, d.eigenvalues());
        HermitianOperator h = HermitianOperator.diagonal(1e-30, -2, 0);
        assertEquals(HermitianOperator.diagonal(1, -1, 0), h.sign(Tolerance.NONE));
        assertEquals(HermitianOperator.diagonal(0, -1, 0), h.sign(Tolerance.ROUNDING));
        assertEquals(2, h.spectralDecomposition().norm());
        assertEquals(1, h.spectralDecomposition().vectors().re(1, 0));
        assertEquals(3, h.spectralDecomposition().dimension());
        assertEquals(
                PositiveOperator.ofEigenvalues(1, Math.exp(-2), 1),
                HermitianOperator.diagonal(0, -2, 0).exponential());
    }

    @Test
    void anyScale() {
        for (double scale : new double[] {1e-200, 1e-20, 1e200}) {
            HermitianOperator a = HermitianOperator.of(
                            new double[][] {{2, 0.5}, {0.5, 1}}, new double[][] {{0, 0.25}, {-0.25, 0}})
                    .times(scale);
            double d = Math.sqrt(0.25 + 0.3125);
            assertArrayEquals(new double[] {(1.5 - d) * scale, (1.5 + d) * scale}, a.eigenvalues(), 1e-14 * scale);
            assertEquals(2, a.rank(Tolerance.ROUNDING));
        }
    }

    @Test
    void toleranceIsWhatItsFormulaSays() {
        assertEquals(6e-3, new Tolerance(1e-3, 1e-9).threshold(3, 2));
        assertEquals(1e-2, new Tolerance(1e-3, 1e-2).threshold(3, 2));
        assertEquals(0, Tolerance.NONE.threshold(3, 2));
        assertEquals(0x1p-48 * 6, Tolerance.ROUNDING.threshold(3, 2));
    }

    @Test
    void refusals() {
        HermitianOperator d = HermitianOperator.diagonal(0, 2);
        Meaning.assertRefusal(
                "SpectralDecomposition.apply: the function is Infinity at the eigenvalue 0.0, expected a finite number; restrict it to"
                        + " the support, or give a function that is finite there",
                () -> d.apply(x -> 1 / x));
        Meaning.assertRefusal(
                "SpectralDecomposition.applyOnSupport: the function is NaN at the eigenvalue 2.0, expected a finite number; restrict it"
                        + " to the support, or give a function that is finite there",
                () -> d.spectralDecomposition().applyOnSupport(x -> Double.NaN, Tolerance.NONE));
        Meaning.assertRefusal(
                "SpectralDecomposition.applyPositive: the function is -2.0 at the eigenvalue 2.0, expected at least 0; use apply, which"
                        + " returns a Hermitian operator",
                () -> d.spectralDecomposition().applyPositive(x -> -x, Tolerance.NONE));
        Meaning.assertRefusal(
                "HermitianOperator.exponential: the function is Infinity at the eigenvalue 1000.0, expected a finite number; restrict"
                        + " it to the support, or give a function that is finite there",
                () -> HermitianOperator.diagonal(1000).exponential());
        Meaning.assertRefusal(
                "PositiveOperator.power: the exponent is NaN, expected between -1.7976931348623157E308 and 1.7976931348623157E308; give"
                        + " a number in that range",
                () -> PositiveOperator.ofEigenvalues(1).power(Double.NaN, Tolerance.NONE));
        Meaning.assertRefusal(
                "Tolerance: the parts are NaN and 0.0, expected 0 <= relative < 1 and 0 <= absolute < infinity; use Tolerance.ROUNDING"
                        + " unless there is a reason",
                () -> Tolerance.ofRelative(Double.NaN));
        Meaning.assertRefusal(
                "Tolerance: the parts are 0.0 and -1.0, expected 0 <= relative < 1 and 0 <= absolute < infinity; use"
                        + " Tolerance.ROUNDING unless there is a reason",
                () -> Tolerance.ofAbsolute(-1));
    }
}
