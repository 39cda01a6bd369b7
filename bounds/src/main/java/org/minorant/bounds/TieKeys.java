package org.minorant.bounds;

import java.math.BigInteger;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;

/**
 * Decides exactly whether Π r_i^{k_i} = Π r_i^{l_i} for ratios r_i of doubles and counts k_i, l_i: with a whole number for each ratio, these are equal if and only if Σ k_i key_i = Σ l_i key_i.
 *
 * <p><b>Argument.</b> Doubles are whole numbers times powers of two. Divided by their common divisors again and again, the odd parts are products of numbers that are coprime in pairs, so that every
 * ratio is a vector of exponents, and products are equal if and only if the sums of their vectors are. Of the coordinates as many independent ones are enough as the vectors have rank. They are written as
 * digits of one number, in a base that no sum exceeds.
 */
final class TieKeys {

    /** More ratios than this do not occur where types fit. */
    private static final int MOST_RATIOS = 24;

    private static final BigInteger LARGEST = BigInteger.ONE.shiftLeft(61);

    private TieKeys() {}

    /**
     * Finds the keys.
     *
     * @param numerators positive doubles
     * @param denominators as many
     * @param n what the sum of all counts does not exceed
     * @return one key for each ratio; none if they do not fit in a long
     */
    static Optional<long[]> of(double[] numerators, double[] denominators, int n) {
        int count = numerators.length;
        if (count > MOST_RATIOS) {
            return Optional.empty();
        }
        List<BigInteger> base = base(numerators, denominators);
        long[][] vectors = new long[count][base.size() + 1];
        for (int i = 0; i < count; i++) {
            for (int j = 0; j < base.size(); j++) {
                vectors[i][j + 1] =
                        exponent(odd(numerators[i]), base.get(j)) - exponent(odd(denominators[i]), base.get(j));
            }
            vectors[i][0] = twos(numerators[i]) - twos(denominators[i]);
        }
        BigInteger digit = BigInteger.ONE;
        BigInteger[] keys = new BigInteger[count];
        java.util.Arrays.fill(keys, BigInteger.ZERO);
        for (int column : independent(vectors, base.size() + 1)) {
            long most = 0;
            for (int i = 0; i < count; i++) {
                most = Math.max(most, Math.abs(vectors[i][column]));
                keys[i] = keys[i].add(digit.multiply(BigInteger.valueOf(vectors[i][column])));
            }
            // sums lie between ±n · most, differences between twice that
            digit = digit.multiply(BigInteger.valueOf(4L * n * most + 1));
        }
        if (digit.compareTo(LARGEST) > 0) {
            return Optional.empty();
        }
        long[] found = new long[count];
        java.util.Arrays.setAll(found, i -> keys[i].longValueExact());
        return Optional.of(found);
    }

    /** The odd part of a double's significand. */
    private static BigInteger odd(double x) {
        BigInteger m = significand(x);
        return m.shiftRight(m.getLowestSetBit());
    }

    private static BigInteger significand(double x) {
        long bits = Double.doubleToLongBits(x);
        long m = bits & 0xfffffffffffffL;
        return BigInteger.valueOf(bits >>> 52 == 0 ? m : m | 1L << 52);
    }

    /** The power of two in a double. */
    private static long twos(double x) {
        return Math.max(1, Double.doubleToLongBits(x) >>> 52)
                - 1075
                + significand(x).getLowestSetBit();
    }

    /** Numbers above 1, coprime in pairs, of which all odd parts are products. */
    private static List<BigInteger> base(double[] numerators, double[] denominators) {
        List<BigInteger> base = new ArrayList<>();
        for (double[] list : new double[][] {numerators, denominators}) {
            for (double x : list) {
                add(base, odd(x));
            }
        }
        return base;
    }

    private static void add(List<BigInteger> base, BigInteger number) {
        BigInteger x = number;
        for (int j = 0; j < base.size(); j++) {
            BigInteger b = base.get(j);
            BigInteger g = b.gcd(x);
            if (g.equals(BigInteger.ONE)) {
                continue;
            }
            if (g.equals(b)) {
                x = x.divide(b);
                j--;
                continue;
            }
            base.remove(j);
            add(base, g);
            add(base, b.divide(g));
            add(base, x);
            return;
        }
        if (!x.equals(BigInteger.ONE)) {
            base.add(x);
        }
    }

    private static long exponent(BigInteger number, BigInteger b) {
        long e = 0;
        BigInteger x = number;
        for (BigInteger[] q = x.divideAndRemainder(b); q[1].signum() == 0; q = x.divideAndRemainder(b)) {
            x = q[0];
            e++;
        }
        return e;
    }

    /** Columns on which a combination of rows vanishes only if it vanishes on all: as many independent ones as there are, by elimination without fractions. */
    private static List<Integer> independent(long[][] vectors, int columns) {
        List<BigInteger[]> rows = new ArrayList<>();
        for (long[] v : vectors) {
            BigInteger[] row = new BigInteger[columns];
            java.util.Arrays.setAll(row, j -> BigInteger.valueOf(v[j]));
            rows.add(row);
        }
        List<Integer> found = new ArrayList<>();
        for (int j = 0; j < columns; j++) {
            int column = j;
            Optional<BigInteger[]> pivot =
                    rows.stream().filter(r -> r[column].signum() != 0).findFirst();
            if (pivot.isEmpty()) {
                continue;
            }
            found.add(j);
            BigInteger[] p = pivot.get();
            rows.remove(p);
            for (BigInteger[] row : rows) {
                BigInteger factor = row[column];
                for (int k = 0; k < columns; k++) {
                    row[k] = row[k].multiply(p[column]).subtract(factor.multiply(p[k]));
                }
            }
        }
        return found;
    }
}
