package org.minorant.tests.reference;

import java.math.BigInteger;

/** A square complex matrix of fixed-point numbers. Mutable: it never leaves this package. */
final class FixedMatrix {

    final FixedPoint numbers;
    final int n;
    final BigInteger[][] re;
    final BigInteger[][] im;

    FixedMatrix(FixedPoint numbers, int n) {
        this.numbers = numbers;
        this.n = n;
        this.re = zeros(n);
        this.im = zeros(n);
    }

    private static BigInteger[][] zeros(int n) {
        BigInteger[][] z = new BigInteger[n][n];
        for (BigInteger[] row : z) {
            java.util.Arrays.fill(row, BigInteger.ZERO);
        }
        return z;
    }

    static FixedMatrix identity(FixedPoint numbers, int n) {
        FixedMatrix m = new FixedMatrix(numbers, n);
        for (int i = 0; i < n; i++) {
            m.re[i][i] = numbers.one();
        }
        return m;
    }

    FixedMatrix copy() {
        FixedMatrix m = new FixedMatrix(numbers, n);
        for (int i = 0; i < n; i++) {
            m.re[i] = re[i].clone();
            m.im[i] = im[i].clone();
        }
        return m;
    }

    /** weight · this · 2^-shift, entry by entry; the weight is a number of the same kind. */
    FixedMatrix times(BigInteger weight, int shift) {
        FixedMatrix m = new FixedMatrix(numbers, n);
        int right = numbers.bits() + shift;
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                m.re[i][j] = re[i][j].multiply(weight).shiftRight(right);
                m.im[i][j] = im[i][j].multiply(weight).shiftRight(right);
            }
        }
        return m;
    }

    FixedMatrix times(FixedMatrix other) {
        FixedMatrix m = new FixedMatrix(numbers, n);
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                BigInteger r = BigInteger.ZERO;
                BigInteger s = BigInteger.ZERO;
                for (int k = 0; k < n; k++) {
                    r = r.add(re[i][k].multiply(other.re[k][j])).subtract(im[i][k].multiply(other.im[k][j]));
                    s = s.add(re[i][k].multiply(other.im[k][j])).add(im[i][k].multiply(other.re[k][j]));
                }
                m.re[i][j] = r.shiftRight(numbers.bits());
                m.im[i][j] = s.shiftRight(numbers.bits());
            }
        }
        return m;
    }

    FixedMatrix adjoint() {
        FixedMatrix m = new FixedMatrix(numbers, n);
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                m.re[i][j] = re[j][i];
                m.im[i][j] = im[j][i].negate();
            }
        }
        return m;
    }

    FixedMatrix minus(FixedMatrix other) {
        FixedMatrix m = new FixedMatrix(numbers, n);
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                m.re[i][j] = re[i][j].subtract(other.re[i][j]);
                m.im[i][j] = im[i][j].subtract(other.im[i][j]);
            }
        }
        return m;
    }

    BigInteger trace() {
        BigInteger s = BigInteger.ZERO;
        for (int i = 0; i < n; i++) {
            s = s.add(re[i][i]);
        }
        return s;
    }

    /** XX* of rows of columns, each product exact before it is truncated. */
    static FixedMatrix square(FixedPoint numbers, BigInteger[][] xr, BigInteger[][] xi) {
        int n = xr.length;
        FixedMatrix m = new FixedMatrix(numbers, n);
        for (int i = 0; i < n; i++) {
            for (int j = 0; j <= i; j++) {
                BigInteger r = BigInteger.ZERO;
                BigInteger s = BigInteger.ZERO;
                for (int k = 0; k < xr[i].length; k++) {
                    r = r.add(xr[i][k].multiply(xr[j][k])).add(xi[i][k].multiply(xi[j][k]));
                    s = s.add(xi[i][k].multiply(xr[j][k])).subtract(xr[i][k].multiply(xi[j][k]));
                }
                m.setHermitian(i, j, r.shiftRight(numbers.bits()), s.shiftRight(numbers.bits()));
            }
        }
        return m;
    }

    void setHermitian(int i, int j, BigInteger r, BigInteger s) {
        re[i][j] = r;
        re[j][i] = r;
        im[i][j] = i == j ? BigInteger.ZERO : s;
        im[j][i] = i == j ? BigInteger.ZERO : s.negate();
    }
}
