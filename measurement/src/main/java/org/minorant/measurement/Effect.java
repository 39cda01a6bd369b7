package org.minorant.measurement;

import java.util.Optional;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.EnclosedSpectrum;
import org.minorant.core.HermitianOperator;
import org.minorant.core.InvalidInputException;
import org.minorant.core.PositiveFactor;
import org.minorant.core.PositiveOperator;

/**
 * One outcome's operator 0 ≤ T ≤ 1, up to rounding, as a measurement uses it.
 *
 * <p>Which operator is meant: the stored entries as they are, or, for a {@link PositiveOperator} that is defined by its factor, that factor.
 *
 * @param matrix T, or the product YY* of the factor that defines it
 * @param slack a bound on the trace norm of the operator meant minus the matrix
 * @param negativity a bound on the trace norm of the negative part of the operator meant
 * @param factor the factor that defines it, if one does
 */
record Effect(EnclosedMatrix matrix, double slack, double negativity, Optional<PositiveFactor> factor) {

    /** Up to this dimension the bound on what is negative is worked out to 30 digits. */
    private static final int FINE = 48;

    /**
     * Takes an operator as an outcome's operator.
     *
     * @throws InvalidInputException if it has a negative eigenvalue that rounding does not explain
     */
    static Effect of(String asked, String name, HermitianOperator t) {
        if (t instanceof PositiveOperator p && p.isDefinedByFactor()) {
            PositiveFactor f = p.factor();
            EnclosedMatrix y = f.columns();
            EnclosedMatrix m = y.times(y.adjoint());
            double slack = (f.relativeError() * m.traceRe().upper() + 2 * f.traceError()) * (1 + 0x1p-50);
            return new Effect(m, slack, 0, Optional.of(f));
        }
        return new Effect(EnclosedMatrix.of(t), 0, negativity(asked, name, t), Optional.empty());
    }

    /**
     * A bound on the trace norm of the negative part of the stored entries.
     *
     * <p>An entry 1 is put beside the operator, so that rounding is measured against one, the size of the sum of all outcomes: 1 − T may itself
     * be nothing but rounding.
     */
    static double negativity(String asked, String name, HermitianOperator t) {
        int n = t.dimension();
        double bound;
        try {
            bound = PositiveOperator.of(t.directSum(HermitianOperator.identity(1)))
                    .entryDefect();
        } catch (InvalidInputException e) {
            throw new InvalidInputException(
                    asked,
                    "of " + name + " " + e.found(),
                    e.limit(),
                    "check it, or use Povm.nearest, which projects and says by how much");
        }
        return bound == 0 || n > FINE ? bound : Math.min(bound, fineNegativity(t));
    }

    /**
     * The same from the spectrum to 30 digits: T = VΛV* + E and V = Ũ(1+Δ)^½ give ‖T − ŨΛŨ*‖_F ≤ residual + 2.1 δ‖Λ‖_F, and the negative
     * parts differ by at most √n times that in trace norm.
     */
    private static double fineNegativity(HermitianOperator t) {
        EnclosedSpectrum s = EnclosedSpectrum.of(t);
        int n = s.dimension();
        double negative = 0;
        double size = 0;
        for (int i = 0; i < n; i++) {
            negative += Math.max(0, -s.value(i));
            size += s.value(i) * s.value(i);
        }
        double error = Math.sqrt(n) * (s.residual() + 2.1 * s.defect() * Math.sqrt(size));
        return (negative + error) * (1 + 0x1p-40) + Double.MIN_VALUE;
    }

    /** 1 − T, whose negativity is given. */
    Effect complement(double negativityOfComplement) {
        EnclosedMatrix rest = EnclosedMatrix.identity(matrix.rows()).minus(matrix);
        return new Effect(rest, slack, negativityOfComplement, Optional.empty());
    }

    int dimension() {
        return matrix.rows();
    }
}
