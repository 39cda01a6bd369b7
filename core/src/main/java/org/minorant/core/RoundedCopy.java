package org.minorant.core;

/**
 * Entries of an enclosed Hermitian matrix rounded to double, Hermitian exactly, with what that costs.
 *
 * <p><b>Error.</b> An entry differs from the true one by its radius and the trailing parts left out, at most 2^-52 of its modulus; the upper triangle
 * is copied from the lower one. In trace norm the sum is at most √n times the Frobenius norm of these bounds.
 *
 * @param operator the copy
 * @param traceNormError an upper end of the trace norm of (copy − true matrix)
 */
record RoundedCopy(HermitianOperator operator, double traceNormError) {

    static RoundedCopy of(String asked, EnclosedMatrix a) {
        int n = a.rows();
        double[] re = new double[n * n];
        double[] im = new double[a.isReal() ? 0 : n * n];
        double[] error = new double[n * n];
        for (int i = 0; i < n; i++) {
            for (int j = 0; j <= i; j++) {
                re[i * n + j] = a.re(i, j);
                re[j * n + i] = a.re(i, j);
                if (im.length != 0 && i != j) {
                    im[i * n + j] = a.im(i, j);
                    im[j * n + i] = -a.im(i, j);
                }
                double e = a.radius(i, j) + 0x1p-52 * a.modulusUpper(i, j);
                error[i * n + j] = e;
                error[j * n + i] = e;
            }
        }
        if (!Double.isFinite(FrobeniusBound.of(error))) {
            throw new InvalidInputException(
                    asked,
                    "an entry of the result overflows",
                    "moduli below " + Double.MAX_VALUE,
                    "scale the operator down by a power of two");
        }
        double trace = Math.sqrt(n) * FrobeniusBound.of(error) * (1 + 0x1p-40);
        return new RoundedCopy(new HermitianOperator(n, re, im), trace);
    }
}
