package org.minorant.core.pair;

import java.util.Arrays;
import org.minorant.core.WideDouble;

/** Non-negative numbers with exponents of their own, in two arrays: significands in [1, 4), or zero, and exponents of two. */
final class WideArray {

    private double[] significand;
    private long[] exponent;
    private int size;

    WideArray(int capacity) {
        significand = new double[Math.max(1, capacity)];
        exponent = new long[Math.max(1, capacity)];
    }

    static WideArray of(WideDouble... values) {
        WideArray a = new WideArray(values.length);
        for (WideDouble v : values) {
            a.add(v.significand(), v.exponent());
        }
        return a;
    }

    /** Adds s · 2^e for s in [1, 4) or zero. */
    void add(double s, long e) {
        if (size == significand.length) {
            significand = Arrays.copyOf(significand, 2 * size);
            exponent = Arrays.copyOf(exponent, 2 * size);
        }
        significand[size] = s;
        exponent[size++] = e;
    }

    int size() {
        return size;
    }

    double significand(int i) {
        return significand[i];
    }

    long exponent(int i) {
        return exponent[i];
    }
}
