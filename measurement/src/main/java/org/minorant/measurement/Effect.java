package org.minorant.measurement;

import java.util.Optional;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.HermitianOperator;
import org.minorant.core.InvalidInputException;
import org.minorant.core.Operator;
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
        double[] re = new double[(n + 1) * (n + 1)];
        double[] im = new double[t.isReal() ? 0 : re.length];
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                re[i * (n + 1) + j] = t.re(i, j);
                if (im.length != 0) {
                    im[i * (n + 1) + j] = t.im(i, j);
                }
            }
        }
        re[re.length - 1] = 1;
        try {
            return PositiveOperator.of(Operator.ofRowMajor(n + 1, n + 1, re, im))
                    .entryDefect();
        } catch (InvalidInputException e) {
            throw new InvalidInputException(
                    asked,
                    "of " + name + " " + e.found(),
                    e.limit(),
                    "check it, or use Povm.nearest, which projects and says by how much");
        }
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
