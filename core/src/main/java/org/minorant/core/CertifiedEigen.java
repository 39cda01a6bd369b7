package org.minorant.core;

import org.minorant.core.internal.door.EigenResidual;
import org.minorant.core.internal.door.HermitianEigen;

/**
 * Eigenvalues of a Hermitian matrix in double with a bound on their error.
 *
 * @param values ascending, of some ŨΛŨ* with Ũ unitary
 * @param traceError an upper end of the trace norm of A − ŨΛŨ*, which bounds the error of each eigenvalue (Weyl) and of the sum of their moduli
 * @param negativeTraceUpper an upper end of the trace of the negative part
 */
record CertifiedEigen(double[] values, double traceError, double negativeTraceUpper) {

    static CertifiedEigen of(Operator a) {
        double[] re = a.realParts();
        double[] im = a.imaginaryParts();
        HermitianEigen e = HermitianEigen.of(a.rows(), re, im);
        EigenResidual r = EigenResidual.of(a.rows(), re, im, e);
        return new CertifiedEigen(e.values(), r.traceError(), r.negativeTraceUpper());
    }

    /** The largest modulus of a value. */
    double norm() {
        return Math.max(Math.abs(values[0]), Math.abs(values[values.length - 1]));
    }
}
