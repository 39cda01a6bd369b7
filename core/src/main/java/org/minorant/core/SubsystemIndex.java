package org.minorant.core;

/** Indices of a tensor product space, taken apart into those of its subsystems; the last one runs fastest. */
final class SubsystemIndex {

    private SubsystemIndex() {}

    /** For every index, the part of it that the chosen subsystems contribute. */
    static int[] part(int[] dimensions, int total, boolean[] chosen) {
        int[] part = new int[total];
        int stride = total;
        for (int s = 0; s < dimensions.length; s++) {
            stride /= dimensions[s];
            for (int i = 0; chosen[s] && i < total; i++) {
                part[i] += i / stride % dimensions[s] * stride;
            }
        }
        return part;
    }

    /** For every index, that of the chosen subsystems alone. */
    static int[] reduced(int[] dimensions, int total, boolean[] chosen) {
        int[] index = new int[total];
        int stride = total;
        for (int s = 0; s < dimensions.length; s++) {
            stride /= dimensions[s];
            for (int i = 0; chosen[s] && i < total; i++) {
                index[i] = index[i] * dimensions[s] + i / stride % dimensions[s];
            }
        }
        return index;
    }

    /** For every index, the one it has when subsystem k is what was subsystem order[k]. */
    static int[] permuted(int[] dimensions, int total, int[] order) {
        int[] strides = new int[dimensions.length];
        int stride = total;
        for (int s = 0; s < dimensions.length; s++) {
            stride /= dimensions[s];
            strides[s] = stride;
        }
        int[] index = new int[total];
        for (int s : order) {
            for (int i = 0; i < total; i++) {
                index[i] = index[i] * dimensions[s] + i / strides[s] % dimensions[s];
            }
        }
        return index;
    }
}
