package org.minorant.bounds.divergence;

import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.math.MathContext;
import java.util.Random;
import org.hipparchus.dfp.Dfp;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;
import org.minorant.bounds.Divergences;
import org.minorant.core.DensityOperator;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.Enclosure;
import org.minorant.core.Operator;
import org.minorant.core.PositiveOperator;

/** Fidelity and nuclear norm where small eigenvalues are noise, or the answer itself is small. */
class FidelityTest {

    /** What the reference may be wrong by: roots of eigenvalues that 64 digits know to 1e-58. */
    private static final BigDecimal REFERENCE = new BigDecimal("1e-28");

    private static void contains(Enclosure e, BigDecimal truth, BigDecimal slack) {
        assertTrue(
                e.lowerWide().toBigDecimal().compareTo(truth.add(slack)) <= 0
                        && e.upperWide().toBigDecimal().compareTo(truth.subtract(slack)) >= 0,
                () -> e.toIntervalString(20) + " misses " + truth.round(new MathContext(20)));
    }

    /** Columns in a random basis with lengths ratio^k. */
    private static double[][][] columns(int d, int rank, double ratio, Random random) {
        double[][][] u = TestStates.unitary(d, random);
        double[][][] x = new double[2][d][rank];
        for (int i = 0; i < d; i++) {
            for (int k = 0; k < rank; k++) {
                x[0][i][k] = u[0][i][k] * Math.pow(ratio, k);
                x[1][i][k] = u[1][i][k] * Math.pow(ratio, k);
            }
        }
        return x;
    }

    private static EnclosedMatrix matrix(double[][][] x) {
        return EnclosedMatrix.of(Operator.of(x[0], x[1]));
    }

    private static Multiprecision.Matrix exact(EnclosedMatrix x) {
        Multiprecision.Matrix m = Multiprecision.Matrix.zero(x.rows(), x.columns());
        for (int i = 0; i < x.rows(); i++) {
            for (int j = 0; j < x.columns(); j++) {
                m.re()[i][j] = Multiprecision.number(x.re(i, j)).add(Multiprecision.number(x.reTail(i, j)));
                m.im()[i][j] = Multiprecision.number(x.im(i, j)).add(Multiprecision.number(x.imTail(i, j)));
            }
        }
        return m;
    }

    @ParameterizedTest
    @ValueSource(doubles = {1, 1e-3, 1e-6, 1e-9})
    void theNuclearNormKeepsAllDigitsHoweverFastTheSingularValuesFall(double ratio) {
        Random random = new Random(5);
        for (int columns : new int[] {4, 5, 7}) {
            EnclosedMatrix x = matrix(columns(5, 4, ratio, random));
            EnclosedMatrix y = matrix(columns(7, columns, 1, random));
            EnclosedMatrix mix = matrix(columns(7, 4, 1, random));
            // graded columns mixed by a matrix that knows nothing of them; the product is rounded to 32 digits
            EnclosedMatrix z = x.times(mix.adjoint().times(y)).midpoint();
            Multiprecision.Matrix m = exact(z);
            Dfp sum = Multiprecision.ZERO;
            for (Dfp v : Multiprecision.diagonalise(m.times(m.adjoint())).values()) {
                sum = sum.add(Multiprecision.power(v, Multiprecision.number(0.5)));
            }
            NuclearNorm n = NuclearNorm.of(z);
            contains(n.toEnclosure(), Multiprecision.decimal(sum), REFERENCE);
            // columns below 1e-20 of the longest may be lost, five at most
            assertTrue(n.value().radius() <= 1e-19 * n.value().hi(), () -> n.toString());
        }
    }

    @Test
    void radiiOfTheMatrixEnterAsTheyAre() {
        EnclosedMatrix.Builder b = EnclosedMatrix.builder(2, 2);
        b.set(0, 0, 1, 0, 0, 0, 1e-20);
        b.set(1, 1, 1e-25, 0, 0, 0, 0);
        NuclearNorm n = NuclearNorm.of(b.build());
        contains(n.toEnclosure(), new BigDecimal("1").add(new BigDecimal("1e-20")), BigDecimal.ZERO);
        contains(n.toEnclosure(), new BigDecimal("1").subtract(new BigDecimal("1e-20")), BigDecimal.ZERO);
        assertTrue(n.value().radius() < 2e-20);
    }

    @ParameterizedTest
    @ValueSource(doubles = {1e-1, 1e-2, 1e-3, 1e-5})
    void eigenvaluesAtTheNoiseOfTheEntriesCostNothing(double ratio) {
        Random random = new Random(17);
        for (int d : new int[] {3, 6}) {
            double[][][] x = columns(d, d, Math.sqrt(ratio), random);
            double[][][] y = columns(d, d, Math.sqrt(ratio), random);
            DensityOperator rho = TestStates.ofColumns(x[0], x[1]);
            DensityOperator sigma = TestStates.ofColumns(y[0], y[1]);
            Enclosure f = Divergences.fidelity(rho, sigma);
            contains(f, Multiprecision.decimal(ReferencePair.of(rho, sigma).fidelity()), REFERENCE);
            assertTrue(f.relativeWidth() < 1e-15, () -> f.relativeWidth() + "");
            // the same norm, of another power
            Enclosure s = Divergences.sandwichedRenyi(rho, sigma, 0.6).nats();
            contains(s, Multiprecision.decimal(ReferencePair.of(rho, sigma).sandwiched(0.6)), REFERENCE);
            assertTrue(s.relativeWidth() < 1e-12, () -> s.relativeWidth() + "");
        }
    }

    @Test
    void twoPureStatesByTheirEntriesAreKnownToTheRootOfTheNoise() {
        double[][] plus = {{0.5, 0.5}, {0.5, 0.5}};
        double[][] zero = {{1, 0}, {0, 0}};
        Enclosure f = Divergences.fidelity(DensityOperator.ofReal(plus), DensityOperator.ofReal(zero));
        contains(f, new BigDecimal("0.5").sqrt(new MathContext(50)), BigDecimal.ZERO);
        assertTrue(f.relativeWidth() < 1e-13, () -> f.relativeWidth() + "");
    }

    @Test
    void nearlyOrthogonalKetsKeepTheirDigits() {
        Enclosure f = Divergences.fidelity(DensityOperator.ofKet(1, 0), DensityOperator.ofKet(1e-140, 1));
        contains(f, new BigDecimal(1e-140), new BigDecimal("1e-300"));
        assertTrue(f.relativeWidth() < 1e-14, () -> f.relativeWidth() + "");
    }

    @Test
    void nearlyOrthogonalMixturesKeepTheirDigits() {
        double t = 0x1p-100;
        double[][] x = {{1, 0.5}, {0.25, 0.75}, {t, 0}, {0, 3 * t}};
        double[][] y = {{t, 0}, {2 * t, t}, {0.5, 0.25}, {1, -0.5}};
        PositiveOperator a = PositiveOperator.ofFactor(Operator.ofReal(x));
        PositiveOperator b = PositiveOperator.ofFactor(Operator.ofReal(y));
        Enclosure f = Fidelity.value(StatePair.of(a, b));
        // the nuclear norm of a real 2 x 2 matrix is √(‖M‖_F² + 2|det M|)
        BigDecimal[][] m = new BigDecimal[2][2];
        BigDecimal traces = BigDecimal.ONE;
        for (int i = 0; i < 2; i++) {
            for (int j = 0; j < 2; j++) {
                m[i][j] = BigDecimal.ZERO;
                for (int k = 0; k < 4; k++) {
                    m[i][j] = m[i][j].add(new BigDecimal(x[k][i]).multiply(new BigDecimal(y[k][j])));
                }
            }
        }
        for (double[][] z : new double[][][] {x, y}) {
            BigDecimal trace = BigDecimal.ZERO;
            for (double[] row : z) {
                for (double v : row) {
                    trace = trace.add(new BigDecimal(v).pow(2));
                }
            }
            traces = traces.multiply(trace);
        }
        BigDecimal square = m[0][0].multiply(m[1][1])
                .subtract(m[0][1].multiply(m[1][0]))
                .abs()
                .multiply(BigDecimal.valueOf(2));
        for (BigDecimal[] row : m) {
            for (BigDecimal v : row) {
                square = square.add(v.pow(2));
            }
        }
        MathContext digits = new MathContext(60);
        contains(f, square.sqrt(digits).divide(traces.sqrt(digits), digits), new BigDecimal("1e-80"));
        assertTrue(f.relativeWidth() < 1e-14, () -> f.relativeWidth() + "");
    }
}
