package org.minorant.bounds.codes;

import java.math.BigInteger;
import java.util.Arrays;
import org.minorant.core.InvalidInputException;
import org.minorant.measurement.SplitMix;

/** All maps m ↦ Am + b from the first M vectors of F_q^k to F_q^n, k as small as can be. Coefficients of a map: b_0, A_00, …, A_0(k−1), b_1, …. */
final class AffineMaps {

    private final FiniteField field;
    private final int n;
    private final int messages;
    private final int k;

    AffineMaps(FiniteField field, int n, int messages) {
        this.field = field;
        this.n = n;
        this.messages = messages;
        int digits = 0;
        for (long reach = 1; reach < messages; reach *= field.size()) {
            digits++;
        }
        this.k = digits;
        if ((long) n * (k + 1) > Codebook.LARGEST) {
            throw new InvalidInputException(
                    "CodebookFamily.of",
                    (long) n * (k + 1) + " coefficients",
                    "at most " + Codebook.LARGEST,
                    "ask for shorter words");
        }
    }

    int fieldSize() {
        return field.size();
    }

    FiniteField field() {
        return field;
    }

    /** What the word of a message is without b: Am. */
    int[] difference(int[] c, int message) {
        int[] out = new int[n];
        for (int j = 0; j < n; j++) {
            int at = j * (k + 1);
            int v = 0;
            for (int rest = message, i = 1; rest > 0; rest /= field.size(), i++) {
                v = field.sum(v, field.product(c[at + i], rest % field.size()));
            }
            out[j] = v;
        }
        return out;
    }

    /** The number of maps. */
    BigInteger size() {
        return BigInteger.valueOf(field.size()).pow(n * (k + 1));
    }

    int[] draw(SplitMix draws) {
        int[] c = new int[n * (k + 1)];
        for (int i = 0; i < c.length; i++) {
            c[i] = draws.below(field.size());
        }
        return c;
    }

    /** The map of which the coefficients are the digits of a number. */
    int[] get(BigInteger index) {
        int[] c = new int[n * (k + 1)];
        BigInteger q = BigInteger.valueOf(field.size());
        BigInteger rest = index;
        for (int i = 0; i < c.length; i++) {
            BigInteger[] split = rest.divideAndRemainder(q);
            c[i] = split[1].intValue();
            rest = split[0];
        }
        return c;
    }

    /** A copy, if these are coefficients. */
    int[] check(int[] c) {
        String asked = "CodebookFamily.ofCoefficients";
        if (c.length != n * (k + 1)) {
            throw new InvalidInputException(
                    asked,
                    c.length + " coefficients over " + field.size() + " elements",
                    n * (k + 1) + ", " + (k + 1) + " for each position",
                    "give what Codebook.coefficients returned for a codebook of this family");
        }
        for (int i = 0; i < c.length; i++) {
            if (c[i] < 0 || c[i] >= field.size()) {
                throw new InvalidInputException(
                        asked,
                        "coefficient " + i + " is " + c[i],
                        "0 to " + (field.size() - 1),
                        "give elements of the field by their numbers");
            }
        }
        return c.clone();
    }

    /** Adds place · (Am + b)_j to entry j of word m, for all messages. */
    void addWords(int[] c, int place, int[][] words) {
        int q = field.size();
        for (int m = 0; m < messages; m++) {
            for (int j = 0; j < n; j++) {
                int at = j * (k + 1);
                int v = c[at];
                for (int rest = m, i = 1; rest > 0; rest /= q, i++) {
                    v = field.sum(v, field.product(c[at + i], rest % q));
                }
                words[m][j] += place * v;
            }
        }
    }

    /** The field and the shape. */
    @Override
    public String toString() {
        return "affine maps over " + field.size() + " elements, " + Arrays.toString(new int[] {n, k});
    }
}
