package org.minorant.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Random;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class CertifiedSquareRootTest {

    /** Numbers with few digits, so that squares of matrices are exact in double. */
    private static HermitianOperator whole(int n, boolean complex, int rank, Random random) {
        double[][] re = new double[n][n];
        double[][] im = new double[n][n];
        for (int k = 0; k < rank; k++) {
            double[] x = random.ints(n, -9, 10).asDoubleStream().toArray();
            double[] y = complex ? random.ints(n, -9, 10).asDoubleStream().toArray() : new double[n];
            for (int i = 0; i < n; i++) {
                for (int j = 0; j < n; j++) {
                    re[i][j] += x[i] * x[j] + y[i] * y[j];
                    im[i][j] += y[i] * x[j] - x[i] * y[j];
                }
            }
        }
        return HermitianOperator.of(re, im);
    }

    private static double distance(Operator a, Operator b) {
        return EnclosedMatrix.of(a).minus(EnclosedMatrix.of(b)).frobeniusUpper();
    }

    /** A = B² in whole numbers, where B is positive: what is found must be as close to B as is said, also where A is singular or not quite A is at hand. */
    @ParameterizedTest
    @CsvSource({"1, false, 1", "5, false, 5", "5, true, 5", "12, false, 4", "12, true, 3", "40, true, 40"})
    void isWithinItsErrorOfTheRoot(int n, boolean complex, int rank) {
        Random random = new Random(n * 31L + rank);
        HermitianOperator b = whole(n, complex, rank, random);
        HermitianOperator a = HermitianOperator.of(b.times(b));
        CertifiedSquareRoot exact = CertifiedSquareRoot.of(a, 0);
        double error = distance(exact.root(), b);
        assertTrue(error <= exact.rootError(), () -> error + " > " + exact.rootError());
        assertEquals(n, exact.dimension());
        // in units of the norm: √ of some 1e-13 where singular, 1e-13 over the least root otherwise
        double norm = Math.sqrt(exact.values()[n - 1]);
        assertTrue(exact.rootError() < (rank < n ? 1e-5 : 1e-7) * norm, () -> exact.rootError() + " of " + norm);
        for (double size : new double[] {1e-12, 1e-6, 1e-2}) {
            HermitianOperator near =
                    HermitianOperator.of(a.plus(whole(n, complex, n, random).times(size)));
            double off = distance(near, a);
            CertifiedSquareRoot root = CertifiedSquareRoot.of(near, off);
            double e = distance(root.root(), b);
            assertTrue(e <= root.rootError(), () -> size + ": " + e + " > " + root.rootError());
            for (int c = 0; c < n; c++) {
                int cut = c;
                double without = distance(without(root, cut), b);
                // the vectors' defect and the rounding here are in rootError − error
                double bound = root.errorWithout(cut) + root.rootError() - root.error();
                assertTrue(without <= bound, () -> cut + ": " + without + " > " + bound);
            }
        }
    }

    /** The root on all but the c smallest values. */
    private static Operator without(CertifiedSquareRoot root, int c) {
        double[] values = root.values();
        double[] kept = new double[values.length];
        for (int i = c; i < kept.length; i++) {
            kept[i] = Math.sqrt(values[i]);
        }
        Operator v = root.vectors();
        return v.times(HermitianOperator.diagonal(kept)).times(v.adjoint());
    }

    /** Both parts of the bound, in cases that come within a factor of two of it. */
    @Test
    void boundIsNearlyReached() {
        // B = 0, A = ε: √ε apart
        assertEquals(1e-8, CertifiedSquareRoot.error(new double[] {0}, 1e-16), 1e-22);
        // B = λ, A = λ + ε: ε/2√λ apart
        assertEquals(1e-14, CertifiedSquareRoot.error(new double[] {1e-4}, 1e-16), 1e-28);
        // (0, λ): one of each
        assertEquals(1e-8, CertifiedSquareRoot.error(new double[] {0, 1e4}, 1e-16), 1e-15);
        assertEquals(0, CertifiedSquareRoot.error(new double[] {1, 2}, 0), 1e-300);
    }

    @Test
    void refusesWhatIsNoDistance() {
        HermitianOperator one = HermitianOperator.identity(2);
        for (double d : new double[] {-1, Double.NaN, Double.POSITIVE_INFINITY}) {
            assertThrows(InvalidInputException.class, () -> CertifiedSquareRoot.of(one, d));
        }
        CertifiedSquareRoot root = CertifiedSquareRoot.of(one, 0);
        assertThrows(InvalidInputException.class, () -> root.errorWithout(2));
        assertThrows(InvalidInputException.class, () -> root.errorWithout(-1));
    }

    /** Products entry by entry hold the exact ones of whole numbers and of third parts, which they round. */
    @Test
    void entrywiseProductsHoldTheTruth() {
        Random random = new Random(3);
        Operator a = whole(4, true, 2, random);
        Operator b = whole(4, true, 3, random);
        EnclosedMatrix third = EnclosedMatrix.of(a).times(1.0 / 3);
        EnclosedMatrix c = third.timesEntrywise(EnclosedMatrix.of(b)).timesEntrywise(third);
        EnclosedMatrix exact = EnclosedMatrix.of(a).timesEntrywise(EnclosedMatrix.of(b));
        for (int i = 0; i < 4; i++) {
            for (int j = 0; j < 4; j++) {
                double re = a.re(i, j) * b.re(i, j) - a.im(i, j) * b.im(i, j);
                double im = a.re(i, j) * b.im(i, j) + a.im(i, j) * b.re(i, j);
                assertTrue(exact.enclosureRe(i, j).contains(re));
                assertTrue(exact.enclosureIm(i, j).contains(im));
                double q = re * a.re(i, j) - im * a.im(i, j);
                // (1/3 as a double)² · 9 = 1 − 2^-53 + …: whole numbers times that square, exactly
                Enclosure square = Enclosure.exact(1.0 / 3).square();
                assertTrue(!c.enclosureRe(i, j).isCertainlyBelow(square.times(q))
                        && !square.times(q).isCertainlyBelow(c.enclosureRe(i, j)));
                assertTrue(c.radius(i, j) < 1e-28 * (1 + c.modulusUpper(i, j)));
            }
        }
        EnclosedMatrix wide =
                EnclosedMatrix.builder(1, 1).set(0, 0, 2, 0, 0, 0, 0.5).build();
        assertTrue(wide.timesEntrywise(wide).radius(0, 0) >= 2.25);
        assertThrows(InvalidInputException.class, () -> wide.timesEntrywise(exact));
    }
}
