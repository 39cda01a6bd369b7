package org.minorant.tests.reference;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.math.BigInteger;
import java.math.MathContext;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.minorant.tests.Draw;
import org.minorant.tests.Draw.Matrix;

/** The reference is held against a second arithmetic and algorithm, against closed forms and against itself at more digits. */
class ReferenceTest {

    private static final BigDecimal ONE = BigDecimal.ONE;

    /** The trace norm by Householder and QR on integers agrees with Jacobi on Apfloat within the stated error, at 60 to 250 digits. */
    @Test
    void traceNormsAgreeWithAnotherLibraryAndAlgorithm() {
        Random random = new Random(1);
        for (int i = 0; i < 36; i++) {
            int n = 1 + i % 6;
            int bits = new int[] {256, 384, 880}[i % 3];
            FixedMatrix m = difference(random, n, bits, i % 5);
            BigInteger sum = BigInteger.ZERO;
            for (BigInteger value : FixedSpectrum.values(m)) {
                sum = sum.add(value.abs());
            }
            BigDecimal own = m.numbers.toDecimal(sum, 0);
            BigDecimal other = ApfloatJacobi.traceNorm(m, bits * 3 / 10);
            BigDecimal error = m.numbers.toDecimal(BigInteger.valueOf(n).shiftLeft(FixedSpectrum.GUARD), 0);
            assertTrue(
                    own.subtract(other).abs().compareTo(error) <= 0,
                    "case " + i + ": " + own.round(MathContext.DECIMAL128) + " against "
                            + other.round(MathContext.DECIMAL128));
        }
    }

    /** Differences of positive matrices with prescribed, clustered, deficient, repeated and graded spectra, of trace about one. */
    private static FixedMatrix difference(Random random, int n, int bits, int kind) {
        double[] p = new double[n];
        for (int i = 0; i < n; i++) {
            p[i] = switch (kind) {
                        case 0 -> random.nextDouble();
                        case 1 -> 0.5 + 1e-13 * random.nextDouble();
                        case 2 -> random.nextBoolean() ? 0 : 0.5;
                        case 3 -> 0.25;
                        default -> Draw.logUniform(random, -200, 0);
                    }
                    / n;
        }
        Matrix a = Draw.withSpectrum(Draw.unitary(random, n), p);
        Matrix b = Draw.withSpectrum(
                kind == 3 ? Draw.unitary(random, n) : Draw.diagonal(p).times(1.0), p);
        return fixed(a, bits).minus(fixed(kind == 3 ? b : Draw.diagonal(p), bits));
    }

    private static FixedMatrix fixed(Matrix a, int bits) {
        FixedPoint numbers = new FixedPoint(bits);
        FixedMatrix m = new FixedMatrix(numbers, a.rows());
        for (int i = 0; i < a.rows(); i++) {
            for (int j = 0; j <= i; j++) {
                m.setHermitian(i, j, numbers.of(a.re()[i][j], 0), numbers.of(a.im()[i][j], 0));
            }
        }
        return m;
    }

    /** A₊ is Hermitian and positive, A₊ − A is positive, and their product vanishes: that determines it. */
    @Test
    void positivePartHasItsDefiningProperties() {
        Random random = new Random(2);
        for (int i = 0; i < 40; i++) {
            FixedMatrix a = difference(random, 1 + i % 7, 320, i % 5);
            FixedMatrix p = FixedSpectrum.positivePart(a);
            FixedMatrix m = p.minus(a);
            BigInteger tiny = BigInteger.valueOf(10L * a.n).shiftLeft(FixedSpectrum.GUARD);
            for (FixedMatrix part : new FixedMatrix[] {p, m}) {
                for (BigInteger value : FixedSpectrum.values(part)) {
                    assertTrue(value.compareTo(tiny.negate()) >= 0, "case " + i);
                }
            }
            for (int r = 0; r < a.n; r++) {
                for (int c = 0; c < a.n; c++) {
                    BigInteger x = BigInteger.ZERO;
                    for (int k = 0; k < a.n; k++) {
                        x = x.add(p.re[r][k].multiply(m.re[k][c])).subtract(p.im[r][k].multiply(m.im[k][c]));
                    }
                    assertTrue(x.shiftRight(320).abs().compareTo(tiny) <= 0, "case " + i);
                }
            }
        }
    }

    /** Source: check values of one copy, computed with 100-digit arithmetic by an independent program. */
    @Test
    void oneCopyOfTheTwoBlochStates() {
        Reference f = ReferenceMinimum.of(
                new BigDecimal("0.5"),
                ReferenceOperator.ofBloch(0, 0, 0.9),
                new BigDecimal("0.5"),
                ReferenceOperator.ofBloch(0.6, 0, 0.5));
        // the rows are for decimal 0.9, 0.6; the doubles nearest to them are within 1e-16
        assertEquals(0.3197224362268005353440389, f.value().doubleValue(), 2e-16);
        assertTrue(f.isSharp());
    }

    /** Tr[aψψ* ∧ bφφ*] = ½(s − √(s² − 4ab(‖ψ‖²‖φ‖² − …))) in exact arithmetic: Helstrom's closed form, at depths to 1e-280. */
    @Test
    void twoRankOneOperatorsAtAnyDepth() {
        Random random = new Random(3);
        for (int i = 0; i < 60; i++) {
            double depth = Draw.logUniform(random, -140, 0);
            double[][] x = {{random.nextGaussian()}, {depth * random.nextGaussian()}};
            double[][] y = {{depth * random.nextGaussian()}, {random.nextGaussian()}};
            double[][] none = new double[2][1];
            Reference f = ReferenceMinimum.of(
                    ONE, ReferenceOperator.ofColumns(x, none), ONE, ReferenceOperator.ofColumns(y, none));
            BigDecimal expected = twoColumns(x, y, new MathContext(700));
            assertTrue(f.isSharp(), "case " + i + ": " + f);
            assertTrue(f.value().subtract(expected).abs().compareTo(f.error()) <= 0, "case " + i + ": " + f);
        }
    }

    /** With α = ‖x‖², β = ‖y‖², h = ⟨x,y⟩: ½(α + β − √((α+β)² − 4h²)). */
    private static BigDecimal twoColumns(double[][] x, double[][] y, MathContext c) {
        BigDecimal alpha = product(x, x);
        BigDecimal beta = product(y, y);
        BigDecimal h = product(x, y);
        BigDecimal s = alpha.add(beta);
        BigDecimal root = s.multiply(s)
                .subtract(h.multiply(h).multiply(BigDecimal.valueOf(4)))
                .sqrt(c);
        return s.subtract(root).multiply(new BigDecimal("0.5"));
    }

    private static BigDecimal product(double[][] x, double[][] y) {
        BigDecimal s = BigDecimal.ZERO;
        for (int i = 0; i < x.length; i++) {
            s = s.add(new BigDecimal(x[i][0]).multiply(new BigDecimal(y[i][0])));
        }
        return s;
    }

    /** Values at two precisions lie within the errors stated for them. */
    @Test
    void moreDigitsStayWithinTheStatedError() {
        Random random = new Random(4);
        for (int i = 0; i < 60; i++) {
            int n = 1 + i % 8;
            Matrix x = Draw.gaussian(random, n, 1 + random.nextInt(n));
            Matrix y = Draw.withSpectrum(Draw.unitary(random, n), spread(random, n));
            ReferenceOperator a = ReferenceOperator.ofColumns(x.re(), x.im());
            ReferenceOperator b = ReferenceOperator.ofEntries(y.re(), y.im());
            BigDecimal t = new BigDecimal(Draw.logUniform(random, -40, 40));
            Reference rough = ReferenceMinimum.at(256, ONE, a, t, b);
            Reference fine = ReferenceMinimum.at(512, ONE, a, t, b);
            assertTrue(rough.value().subtract(fine.value()).abs().compareTo(rough.error()) <= 0, "case " + i);
            assertTrue(rough.error().compareTo(fine.error()) > 0);
        }
    }

    private static double[] spread(Random random, int n) {
        double[] p = new double[n];
        for (int i = 0; i < n; i++) {
            p[i] = i == 0 ? 1 : random.nextBoolean() ? 0 : Draw.logUniform(random, -18, 0);
        }
        return p;
    }

    /** Source: check values, computed by an independent program in double precision: pair P1, lengths 0.8 at right angles. */
    @Test
    void divergencesOfTwoBlochStates() {
        ReferenceDivergences d =
                ReferenceDivergences.of(ReferenceOperator.ofBloch(0, 0, 0.8), ReferenceOperator.ofBloch(0.8, 0, 0));
        assertEquals(0.878889830934, d.relativeEntropy().doubleValue(), 1e-12);
        assertEquals(1.641450586705, d.variance().doubleValue(), 1e-12);
        assertEquals(0.223143551314, -Math.log(d.overlap(0.5).doubleValue()), 1e-12);
        assertEquals(.222334949841, d.petz(0.25).doubleValue(), 1e-12);
        assertEquals(1.516347489368, d.petz(2).doubleValue(), 1e-12);
        assertEquals(.385662480812, d.sandwiched(0.5).doubleValue(), 1e-12);
        assertEquals(1.484776555060, d.sandwiched(3).doubleValue(), 1e-12);
    }

    /** Blocks from polynomials against one decomposition of the tensor power, whose entries are exact doubles: Bloch vectors are multiples of 2^-7, so that four factors take 32 digits. */
    @Test
    void copiesByBlocksAgreeWithTensorPowers() {
        double[][][] pairs = {
            {{0.25, -0.5, 0.375}, {0.5, 0.125, -0.25}},
            {{0, 0, 0.90625}, {0.6015625, 0, 0.5}},
            {{0.5, 0.25, 0.5}, {0.25, 0.5, -0.5}},
            {{0, 1, 0}, {0.5, 0.5, 0.5}}
        };
        BigDecimal p = new BigDecimal("0.3");
        BigDecimal q = new BigDecimal("0.7");
        for (double[][] r : pairs) {
            for (int n = 1; n <= 4; n++) {
                Reference dense = ReferenceMinimum.of(p, power(r[0], n), q, power(r[1], n));
                Reference blocks = ReferenceCopies.of(p, bloch(r[0]), q, bloch(r[1]), n);
                BigDecimal most = dense.error().add(blocks.error());
                assertTrue(dense.value().subtract(blocks.value()).abs().compareTo(most) <= 0, n + ": " + blocks);
                assertTrue(blocks.isSharp(), n + ": " + blocks);
            }
        }
    }

    private static ReferenceOperator bloch(double... r) {
        return ReferenceOperator.ofBloch(r[0], r[1], r[2]);
    }

    private static ReferenceOperator power(double[] r, int n) {
        Matrix one =
                new Matrix(new double[][] {{(1 + r[2]) / 2, r[0] / 2}, {r[0] / 2, (1 - r[2]) / 2}}, new double[][] {
                    {0, -r[1] / 2}, {r[1] / 2, 0}
                });
        Matrix m = Draw.power(one, n);
        return ReferenceOperator.ofEntries(m.re(), m.im());
    }

    /** Source: check values of n copies, computed with 100-digit arithmetic by an independent program for decimal 0.9 and 0.6. */
    @Test
    void copiesOfTheTwoBlochStates() {
        BigDecimal half = new BigDecimal("0.5");
        Reference f = ReferenceCopies.of(half, bloch(0, 0, 0.9), half, bloch(0.6, 0, 0.5), 40);
        // each copy moves by 2^-53, seen through the smallest eigenvalue 0.05 at most
        assertEquals(0.002728244188532257295161601, f.value().doubleValue(), 40 * 20 * 0x1p-53 * 0.0028);
    }

    @Test
    void moreDigitsOfCopiesStayWithinTheStatedError() {
        Random random = new Random(5);
        for (int n : new int[] {2, 7, 16}) {
            double[] p = {1 - 1e-9, 1e-9};
            Matrix x = Draw.withSpectrum(Draw.unitary(random, 2), p).hermitian();
            ReferenceOperator a = ReferenceOperator.ofEntries(x.re(), x.im());
            ReferenceOperator b = bloch(0.3 * random.nextDouble(), 0.4, 0.5 * random.nextDouble());
            BigDecimal t = new BigDecimal("0.01");
            Reference rough = ReferenceCopies.at(192, ONE, a, t, b, n);
            Reference fine = ReferenceCopies.at(400, ONE, a, t, b, n);
            assertTrue(rough.value().subtract(fine.value()).abs().compareTo(rough.error()) <= 0, "n = " + n);
            assertTrue(rough.error().compareTo(fine.error()) > 0);
        }
    }
}
