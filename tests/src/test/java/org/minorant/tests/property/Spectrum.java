package org.minorant.tests.property;

import java.util.Random;

/** Kinds of spectra, as the roots of eigenvalues: short binary fractions. */
enum Spectrum {
    /** Any numbers between 0 and 1. */
    PRESCRIBED {
        @Override
        double root(Random r) {
            return (1 + r.nextInt(255)) * 0x1p-8;
        }
    },
    /** Equal up to 2^-12 and often exactly. */
    CLUSTERED {
        @Override
        double root(Random r) {
            return 0.5 + r.nextInt(3) * 0x1p-12;
        }
    },
    /** Zero as often as not. */
    DEFICIENT {
        @Override
        double root(Random r) {
            return r.nextBoolean() ? 0 : 0.75;
        }
    },
    /** Powers of two over forty decades of the eigenvalue. */
    GRADED {
        @Override
        double root(Random r) {
            return Math.scalb(1.0, -r.nextInt(66));
        }
    };

    abstract double root(Random r);

    double[] roots(Random r, int n) {
        double[] p = new double[n];
        for (int i = 0; i < n; i++) {
            p[i] = root(r);
        }
        // no zero operator
        p[0] = p[0] == 0 ? 0.75 : p[0];
        return p;
    }
}
