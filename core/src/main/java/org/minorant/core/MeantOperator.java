package org.minorant.core;

/**
 * The operator that an object means, as an enclosed matrix.
 *
 * @param matrix an enclosure of a matrix near it
 * @param traceNormError an upper end of the trace norm of (operator meant − that matrix)
 * @param isExact whether the entries are the operator, to the last digit
 */
record MeantOperator(EnclosedMatrix matrix, double traceNormError, boolean isExact) {

    static MeantOperator of(HermitianOperator a) {
        if (!(a instanceof PositiveOperator p) || isExact(p)) {
            return new MeantOperator(EnclosedMatrix.of(a), 0, true);
        }
        return byFactor(p.factor());
    }

    /**
     * XX* of the factor, with what that misses at most: from −(ηXX* + N₁) ≤ A − XX* ≤ ηXX* + N₂ the trace norm of the difference is at most
     * η Tr XX* + Tr N₁ + Tr N₂.
     */
    static MeantOperator byFactor(PositiveFactor f) {
        EnclosedMatrix x = f.columns();
        double norm = x.frobeniusUpper();
        double error = (f.relativeError() * norm * norm + 2 * f.traceError()) * (1 + 0x1p-48);
        return new MeantOperator(x.times(x.adjoint()), error, false);
    }

    private static boolean isExact(PositiveOperator p) {
        return !p.isDefinedByFactor() && p.entryDefect() == 0;
    }
}
