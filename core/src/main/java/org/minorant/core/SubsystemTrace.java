package org.minorant.core;

import org.minorant.core.internal.message.Checks;

/**
 * The sums of a partial trace.
 *
 * <p><b>Error.</b> An entry is a sum of m doubles in double-double, within m(m+8) · 2^-104 · Σ|a| of the exact one in each part, rounded once. For a positive
 * operator Σ_t |a_{kt,lt}| ≤ Σ_t √(a_{kt,kt} a_{lt,lt}) ≤ √(b_kk b_ll) with b the result, so the Frobenius norm of all sums is at most Tr A.
 *
 * @param kept the dimension of what is left
 * @param traced the dimension of what is traced over
 * @param keptIndex for every index of the whole space, that of what is left
 * @param tracedIndex for every index of the whole space, that of what is traced over
 * @param whole whole[t · kept + k] is the index of the whole space that consists of t and k
 */
record SubsystemTrace(int kept, int traced, int[] keptIndex, int[] tracedIndex, int[] whole) {

    static SubsystemTrace of(int[] dimensions, int total, boolean[] chosen) {
        boolean[] others = new boolean[chosen.length];
        int traced = 1;
        for (int s = 0; s < chosen.length; s++) {
            others[s] = !chosen[s];
            traced *= chosen[s] ? dimensions[s] : 1;
        }
        int kept = total / traced;
        int[] keptIndex = SubsystemIndex.reduced(dimensions, total, others);
        int[] tracedIndex = SubsystemIndex.reduced(dimensions, total, chosen);
        int[] whole = new int[total];
        for (int i = 0; i < total; i++) {
            whole[tracedIndex[i] * kept + keptIndex[i]] = i;
        }
        return new SubsystemTrace(kept, traced, keptIndex, tracedIndex, whole);
    }

    double[] re(Operator a) {
        return sums(a.realParts(), a.rows());
    }

    double[] im(Operator a) {
        return a.isReal() ? new double[0] : sums(a.imaginaryParts(), a.rows());
    }

    private double[] sums(double[] a, int n) {
        double[] hi = new double[kept * kept];
        double[] lo = new double[kept * kept];
        for (int t = 0; t < traced; t++) {
            for (int k = 0; k < kept; k++) {
                int row = whole[t * kept + k] * n;
                for (int l = 0; l < kept; l++) {
                    double x = a[row + whole[t * kept + l]];
                    int at = k * kept + l;
                    double s = hi[at] + x;
                    double b = s - hi[at];
                    lo[at] += (hi[at] - (s - b)) + (x - b);
                    hi[at] = s;
                }
            }
        }
        for (int e = 0; e < hi.length; e++) {
            hi[e] += lo[e];
        }
        return Checks.finite("TensorLayout.partialTrace", hi);
    }

    /** An upper end of the trace norm of what rounding does to the sums of a positive operator. */
    double roundingTraceNorm(PositiveOperator a) {
        double trace = a.traceEnclosure().upper() + a.entryDefect();
        double sums = trace * traced * (traced + 8.0) * 0x1p-102;
        return Math.sqrt(kept) * (0x1p-53 * trace + sums + kept * 0x1p-1070) * (1 + 0x1p-40);
    }
}
