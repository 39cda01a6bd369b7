package org.minorant.tests.reference;

import java.math.BigDecimal;
import java.math.BigInteger;
import java.util.function.Function;

/** A positive operator that is meant by exact doubles, at any number of digits. Immutable. */
public final class ReferenceOperator {

    private final int dimension;
    private final int exponent;
    private final Function<FixedPoint, FixedMatrix> digits;

    private ReferenceOperator(int dimension, int exponent, Function<FixedPoint, FixedMatrix> digits) {
        this.dimension = dimension;
        this.exponent = exponent;
        this.digits = digits;
    }

    /**
     * The positive part of the Hermitian matrix with these entries.
     *
     * @param re real parts
     * @param im imaginary parts
     * @return what the entries mean
     */
    public static ReferenceOperator ofEntries(double[][] re, double[][] im) {
        int n = re.length;
        int e = exponentOf(re, im);
        return new ReferenceOperator(n, e, numbers -> {
            FixedMatrix m = new FixedMatrix(numbers, n);
            boolean diagonal = true;
            for (int i = 0; i < n; i++) {
                for (int j = 0; j <= i; j++) {
                    m.setHermitian(i, j, numbers.of(re[i][j], e), numbers.of(im[i][j], e));
                    diagonal &= i == j || re[i][j] == 0 && im[i][j] == 0;
                }
            }
            return diagonal ? withoutNegative(m) : positivePart(m);
        });
    }

    private static FixedMatrix withoutNegative(FixedMatrix diagonal) {
        for (int i = 0; i < diagonal.n; i++) {
            diagonal.re[i][i] = diagonal.re[i][i].max(BigInteger.ZERO);
        }
        return diagonal;
    }

    /** The matrix itself if its eigenvalues are not negative, up to what the error bound covers anyway. */
    private static FixedMatrix positivePart(FixedMatrix m) {
        for (BigInteger value : FixedSpectrum.values(m)) {
            if (value.signum() < 0 && value.bitLength() > FixedSpectrum.GUARD - 10) {
                return FixedSpectrum.positivePart(m);
            }
        }
        return m;
    }

    /**
     * XX* of exactly these columns.
     *
     * @param re real parts of X, dimension × rank
     * @param im imaginary parts
     * @return XX*
     */
    public static ReferenceOperator ofColumns(double[][] re, double[][] im) {
        int e = exponentOf(re, im) + 1;
        return new ReferenceOperator(re.length, 2 * e + logTwo(re[0].length), numbers -> {
            BigInteger[][] xr = fixed(numbers, re, e);
            BigInteger[][] xi = fixed(numbers, im, e);
            return FixedMatrix.square(numbers, xr, xi).times(numbers.one(), logTwo(re[0].length));
        });
    }

    private static int logTwo(int count) {
        return 32 - Integer.numberOfLeadingZeros(count);
    }

    private static BigInteger[][] fixed(FixedPoint numbers, double[][] x, int exponent) {
        BigInteger[][] f = new BigInteger[x.length][x[0].length];
        for (int i = 0; i < x.length; i++) {
            for (int j = 0; j < x[i].length; j++) {
                f[i][j] = numbers.of(x[i][j], exponent);
            }
        }
        return f;
    }

    /**
     * The positive part of ½(1 + xX + yY + zZ) for exactly these doubles.
     *
     * @param x first Bloch component
     * @param y second Bloch component
     * @param z third Bloch component
     * @return the qubit state
     */
    public static ReferenceOperator ofBloch(double x, double y, double z) {
        return new ReferenceOperator(2, 0, numbers -> {
            FixedMatrix m = new FixedMatrix(numbers, 2);
            BigInteger half = numbers.one().shiftRight(1);
            // numbers.of(·, 1) halves exactly
            m.re[0][0] = half.add(numbers.of(z, 1));
            m.re[1][1] = half.subtract(numbers.of(z, 1));
            m.setHermitian(1, 0, numbers.of(x, 1), numbers.of(y, 1));
            return positivePart(m);
        });
    }

    /** The least e with every entry below 2^e in magnitude. */
    private static int exponentOf(double[][] re, double[][] im) {
        int e = -2000;
        for (double[][] part : new double[][][] {re, im}) {
            for (double[] row : part) {
                for (double v : row) {
                    e = v == 0 ? e : Math.max(e, Math.getExponent(v) + 1);
                }
            }
        }
        return e == -2000 ? 0 : e;
    }

    /** The dimension of the space. */
    int dimension() {
        return dimension;
    }

    /** The matrix is {@link #at} times two to this power. */
    int exponent() {
        return exponent;
    }

    /** The matrix divided by 2^exponent: entries at most about one, each good to 2^(GUARD − bits). */
    FixedMatrix at(FixedPoint numbers) {
        return digits.apply(numbers);
    }

    /**
     * The trace, to about that many bits below the largest entry.
     *
     * @param bits binary digits
     * @return Tr A
     */
    public BigDecimal trace(int bits) {
        FixedPoint numbers = new FixedPoint(bits);
        return numbers.toDecimal(at(numbers).trace(), exponent);
    }
}
