package org.minorant.bounds;

import java.util.Arrays;

/**
 * Joint types of letters and outcomes, given how often each class of outcomes occurs: for every type a decoder's metric, its tie key, and Π x_i^{k_i}/k_i! for the joint probabilities and for those of the
 * input alone. Significands are below 4, with exponents of two beside them.
 */
final class TypeList {

    int size;
    double[] metric;
    long[] key;
    double[] joint;
    int[] jointExponent;
    double[] input;
    int[] inputExponent;

    TypeList(int capacity) {
        metric = new double[capacity];
        key = new long[capacity];
        joint = new double[capacity];
        jointExponent = new int[capacity];
        input = new double[capacity];
        inputExponent = new int[capacity];
    }

    /** The empty word. */
    static TypeList one() {
        TypeList t = new TypeList(1);
        t.add(0, 0, 1, 0, 1, 0);
        return t;
    }

    void add(double d, long k, double a, int ea, double p, int ep) {
        if (size == metric.length) {
            grow();
        }
        int sa = Math.getExponent(a);
        int sp = Math.getExponent(p);
        metric[size] = d;
        key[size] = k;
        joint[size] = a * powerOfTwo(-sa);
        jointExponent[size] = ea + sa;
        input[size] = p * powerOfTwo(-sp);
        inputExponent[size] = ep + sp;
        size++;
    }

    private void grow() {
        int capacity = 2 * size + 8;
        metric = Arrays.copyOf(metric, capacity);
        key = Arrays.copyOf(key, capacity);
        joint = Arrays.copyOf(joint, capacity);
        jointExponent = Arrays.copyOf(jointExponent, capacity);
        input = Arrays.copyOf(input, capacity);
        inputExponent = Arrays.copyOf(inputExponent, capacity);
    }

    /** All pairs of types of two classes. */
    TypeList times(TypeList o) {
        TypeList t = new TypeList(Math.multiplyExact(size, o.size));
        for (int i = 0; i < size; i++) {
            for (int j = 0; j < o.size; j++) {
                t.add(
                        metric[i] + o.metric[j],
                        key[i] + o.key[j],
                        joint[i] * o.joint[j],
                        jointExponent[i] + o.jointExponent[j],
                        input[i] * o.input[j],
                        inputExponent[i] + o.inputExponent[j]);
            }
        }
        return t;
    }

    /** 2^e for |e| &lt; 1022. */
    static double powerOfTwo(int e) {
        return Double.longBitsToDouble((long) (e + 1023) << 52);
    }

    /** v · 2^e; zero below 2^-1000, and beyond all answers above 2^1000. */
    static double scaled(double v, long e) {
        return e < -1000 ? 0 : v * powerOfTwo((int) Math.min(e, 1000));
    }
}
