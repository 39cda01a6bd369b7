package org.minorant.bounds.codes;

import java.util.Arrays;
import org.minorant.core.InvalidInputException;

/**
 * The field of q = p^r elements, exactly. An element is a number from 0 to q − 1: its digits in base p are the coefficients of a polynomial of degree below r, and a number 0 is
 * zero, 1 is one.
 *
 * <p>Sums add digits modulo p. Products go by logarithms to a primitive element g: the powers 1, g, g², … run through all q − 1 elements that are not zero. For r = 1, g is the least
 * number that does so. For r &gt; 1, g is the polynomial x modulo the first monic polynomial of degree r, its lower coefficients counted as a number, for which it does. If x has
 * q − 1 different powers, every nonzero residue is a power of x and so has an inverse: the polynomial is irreducible, and the residues are a field.
 */
final class FiniteField {

    /** Tables of more elements are not made. */
    static final int LARGEST = 1 << 16;

    private final int p;
    private final int q;
    private final int[] power;
    private final int[] logarithm;

    private FiniteField(int p, int q, int[] power) {
        this.p = p;
        this.q = q;
        this.power = power;
        this.logarithm = new int[q];
        for (int e = 0; e < q - 1; e++) {
            logarithm[power[e]] = e;
        }
    }

    /**
     * Makes the field with q elements.
     *
     * @param q a power of a prime, at most 65536
     */
    static FiniteField of(int q) {
        int p = q < 2 ? 0 : leastFactor(q);
        int r = 0;
        int rest = q;
        while (rest > 1 && rest % p == 0) {
            rest /= p;
            r++;
        }
        if (rest != 1 || q < 2 || q > LARGEST) {
            throw new InvalidInputException(
                    "FiniteField.of",
                    q + " elements",
                    "a power of a prime, from 2 to " + LARGEST,
                    "use several fields for other numbers");
        }
        for (int candidate = 1; candidate < q; candidate++) {
            int[] powers = r == 1 ? powersOfNumber(candidate, p) : powersOfX(candidate, p, q);
            if (powers.length == q - 1) {
                return new FiniteField(p, q, powers);
            }
        }
        throw new IllegalStateException("no primitive element among " + q);
    }

    static int leastFactor(int n) {
        for (int f = 2; f * f <= n; f++) {
            if (n % f == 0) {
                return f;
            }
        }
        return n;
    }

    /** 1, g, g², … modulo p until they repeat. */
    private static int[] powersOfNumber(int g, int p) {
        int[] out = new int[p - 1];
        int count = 0;
        int v = 1;
        do {
            out[count++] = v;
            v = (int) ((long) v * g % p);
        } while (v != 1 && count < p - 1);
        return v == 1 ? Arrays.copyOf(out, count) : new int[0];
    }

    /** 1, x, x², … modulo x^r + lower until they repeat; nothing if they end in zero or in a cycle without 1. */
    private static int[] powersOfX(int lower, int p, int q) {
        int[] out = new int[q - 1];
        int count = 0;
        int v = 1;
        do {
            out[count++] = v;
            int top = v / (q / p);
            v = v % (q / p) * p;
            // x^r = −lower
            v = subtractMultiple(v, lower, top, p);
        } while (v != 1 && v != 0 && count < q - 1);
        return v == 1 ? Arrays.copyOf(out, count) : new int[0];
    }

    private static int subtractMultiple(int a, int b, int factor, int p) {
        int out = 0;
        int place = 1;
        for (int x = a, y = b; x > 0 || y > 0; x /= p, y /= p, place *= p) {
            out += Math.floorMod(x % p - factor * (y % p), p) * place;
        }
        return out;
    }

    /** q. */
    int size() {
        return q;
    }

    /** p. */
    int characteristic() {
        return p;
    }

    int sum(int a, int b) {
        if (p == 2) {
            return a ^ b;
        }
        int out = 0;
        int place = 1;
        for (int x = a, y = b; x > 0 || y > 0; x /= p, y /= p, place *= p) {
            out += (x % p + y % p) % p * place;
        }
        return out;
    }

    int negative(int a) {
        int out = 0;
        int place = 1;
        for (int x = a; x > 0; x /= p, place *= p) {
            out += (p - x % p) % p * place;
        }
        return out;
    }

    int product(int a, int b) {
        return a == 0 || b == 0 ? 0 : power[(logarithm[a] + logarithm[b]) % (q - 1)];
    }
}
