package org.minorant.tests.property;

import java.util.Random;

/** Draws density matrices UDU* whose entries are exact doubles and whose trace is one exactly. */
final class ExactState {

    private ExactState() {}

    static ExactMatrix draw(Exactly draw, int n, Spectrum kind) {
        ExactMatrix u = draw.unitary(n, 3);
        double[] p = probabilities(draw.random(), n, kind);
        return u.scaleColumns(p).times(u.adjoint());
    }

    /** Eigenvalues that sum to one exactly. */
    private static double[] probabilities(Random r, int n, Spectrum kind) {
        int unit = 1 << 20;
        int[] share = new int[n];
        int rest = unit;
        for (int i = n - 1; i > 0; i--) {
            share[i] = switch (kind) {
                case PRESCRIBED -> 1 + r.nextInt(unit / n);
                case CLUSTERED -> unit / n - r.nextInt(3);
                case DEFICIENT -> r.nextBoolean() ? 0 : unit / n;
                case GRADED -> 1 << r.nextInt(17);
            };
            rest -= share[i];
        }
        share[0] = rest;
        double[] p = new double[n];
        for (int i = 0; i < n; i++) {
            p[i] = share[i] * 0x1p-20;
        }
        return p;
    }
}
