package org.minorant.core.pair;

import org.minorant.core.EnclosedMatrix;
import org.minorant.core.internal.door.LinearSolve;

/**
 * The contraction N and the two square blocks of a finished run of rotations: X' = XV₁₁ + YV₂₁ and Y' = XV₁₂ + YV₂₂ with N* = −V₂₁V₁₁⁻¹,
 * equivalently N = −V₁₂V₂₂⁻¹; the smaller block is inverted.
 *
 * @param contraction N in units of 2^e, k × l
 * @param first V₁₁, near (1 − NN*)^(−½) times a unitary
 * @param second V₂₂, near (1 − N*N)^(−½) times a unitary
 */
record ContractionBlocks(EnclosedMatrix contraction, EnclosedMatrix first, EnclosedMatrix second) {

    static ContractionBlocks of(HyperbolicSweeps s, int exponent) {
        int k = s.split();
        int l = s.columns() - k;
        EnclosedMatrix first = RotationCertificate.exact(k, k, s::coefficientRe, s::coefficientIm);
        EnclosedMatrix second = RotationCertificate.exact(
                l, l, (i, j) -> s.coefficientRe(k + i, k + j), (i, j) -> s.coefficientIm(k + i, k + j));
        // solve V₁₁* N = −V₂₁* or V₂₂* N* = −V₁₂*
        boolean left = k <= l;
        int m = left ? k : l;
        int c = left ? l : k;
        double[][] ar = new double[m][m];
        double[][] ai = new double[m][m];
        double[][] br = new double[m][c];
        double[][] bi = new double[m][c];
        int here = left ? 0 : k;
        int there = left ? k : 0;
        for (int i = 0; i < m; i++) {
            for (int j = 0; j < m; j++) {
                ar[i][j] = s.coefficientRe(here + j, here + i);
                ai[i][j] = -s.coefficientIm(here + j, here + i);
            }
            for (int j = 0; j < c; j++) {
                br[i][j] = -s.coefficientRe(there + j, here + i);
                bi[i][j] = s.coefficientIm(there + j, here + i);
            }
        }
        LinearSolve.solve(ar, ai, br, bi);
        EnclosedMatrix n = left
                ? RotationCertificate.exact(k, l, (i, j) -> br[i][j], (i, j) -> bi[i][j])
                : RotationCertificate.exact(k, l, (i, j) -> br[j][i], (i, j) -> -bi[j][i]);
        return new ContractionBlocks(n, first, second);
    }
}
