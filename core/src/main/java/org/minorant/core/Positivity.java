package org.minorant.core;

/** Decides whether a Hermitian matrix is positive up to rounding, and bounds what is not. */
final class Positivity {

    /** Negative eigenvalues up to n · this · norm are what rounding of entries produces. */
    private static final double ROUNDING = 0x1p-48;

    private Positivity() {}

    /** An upper end of the trace of the negative part; refuses if rounding does not explain it. */
    static double negativeTrace(String asked, Operator a) {
        int n = a.rows();
        if (isDiagonal(a)) {
            return diagonalNegativeTrace(asked, a);
        }
        if (CholeskyTest.isPositiveDefinite(a)) {
            return 0;
        }
        CertifiedEigen e = CertifiedEigen.of(a);
        refuseBelow(asked, e.values()[0], n * ROUNDING * e.norm(), "the smallest eigenvalue is ");
        // A = VΛV* + E: Tr A₋ ≤ Tr(VΛ₋V*) + ‖E‖₁
        return e.negativeTraceUpper();
    }

    private static double diagonalNegativeTrace(String asked, Operator a) {
        double norm = 0;
        double least = 0;
        double sum = 0;
        for (int i = 0; i < a.rows(); i++) {
            norm = Math.max(norm, Math.abs(a.re(i, i)));
            least = Math.min(least, a.re(i, i));
            sum += Math.max(0, -a.re(i, i));
        }
        refuseBelow(asked, least, a.rows() * ROUNDING * norm, "the smallest diagonal entry is ");
        return sum * (1 + a.rows() * 0x1p-52);
    }

    private static void refuseBelow(String asked, double least, double tolerance, String what) {
        if (!(least >= -tolerance)) {
            throw new InvalidInputException(
                    asked,
                    what + least,
                    "at least -" + tolerance + " (rounding)",
                    "check the matrix, or use DensityOperator.nearest, which projects and says by how much");
        }
    }

    static boolean isDiagonal(Operator a) {
        for (int i = 0; i < a.rows(); i++) {
            for (int j = 0; j < i; j++) {
                if (a.re(i, j) != 0 || a.im(i, j) != 0) {
                    return false;
                }
            }
        }
        return true;
    }
}
