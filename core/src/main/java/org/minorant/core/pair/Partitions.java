package org.minorant.core.pair;

import java.math.BigInteger;
import java.util.ArrayList;
import java.util.List;

/** Partitions λ₁ ≥ … ≥ λ_d ≥ 0 of n: they name the irreducible representations of GL(d) within n copies of C^d. */
final class Partitions {

    private Partitions() {}

    /** All partitions of n into at most d parts, zeros included, in descending lexicographic order. */
    static List<int[]> of(int n, int d) {
        List<int[]> all = new ArrayList<>();
        fill(new int[d], 0, n, n, all);
        return all;
    }

    private static void fill(int[] part, int i, int rest, int most, List<int[]> all) {
        if (i == part.length - 1) {
            if (rest <= most) {
                part[i] = rest;
                all.add(part.clone());
            }
            return;
        }
        for (int p = Math.min(rest, most); (long) p * (part.length - i) >= rest; p--) {
            part[i] = p;
            fill(part, i + 1, rest - p, p, all);
        }
    }

    /** The dimension ∏_{i<j} (λ_i − λ_j + j − i)/(j − i) of the representation (H. Weyl). */
    static BigInteger dimension(int[] shape) {
        BigInteger p = BigInteger.ONE;
        BigInteger q = BigInteger.ONE;
        for (int i = 0; i < shape.length; i++) {
            for (int j = i + 1; j < shape.length; j++) {
                p = p.multiply(BigInteger.valueOf(shape[i] - shape[j] + (long) j - i));
                q = q.multiply(BigInteger.valueOf((long) j - i));
            }
        }
        return p.divide(q);
    }

    /** How often the representation occurs: the number of standard tableaux, n! ∏_{i<j} (l_i − l_j) / ∏ l_i! with l_i = λ_i + d − i. */
    static BigInteger multiplicity(int[] shape) {
        int d = shape.length;
        int n = 0;
        for (int part : shape) {
            n += part;
        }
        BigInteger p = factorial(n);
        BigInteger q = BigInteger.ONE;
        for (int i = 0; i < d; i++) {
            for (int j = i + 1; j < d; j++) {
                p = p.multiply(BigInteger.valueOf(shape[i] - shape[j] + (long) j - i));
            }
            q = q.multiply(factorial(shape[i] + d - 1 - i));
        }
        return p.divide(q);
    }

    private static BigInteger factorial(int n) {
        BigInteger f = BigInteger.ONE;
        for (int i = 2; i <= n; i++) {
            f = f.multiply(BigInteger.valueOf(i));
        }
        return f;
    }
}
