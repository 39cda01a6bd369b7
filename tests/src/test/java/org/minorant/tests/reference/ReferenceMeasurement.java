package org.minorant.tests.reference;

import java.math.BigDecimal;
import java.math.BigInteger;
import java.util.List;
import org.apfloat.Apfloat;
import org.apfloat.ApfloatMath;
import org.minorant.tests.reference.FixedSpectrum.Decomposition;

/** The success probability of the square-root measurement to about fifty digits, for an average state of full rank. */
public final class ReferenceMeasurement {

    private static final FixedPoint NUMBERS = new FixedPoint(384);
    private static final int DIGITS = 80;

    private ReferenceMeasurement() {}

    /**
     * Σ_i Tr (S^(−¼) p_iρ_i S^(−¼))² with S = Σ p_iρ_i.
     *
     * @param states ρ_i
     * @param priors p_i
     * @return the probability of success
     */
    public static BigDecimal squareRootSuccess(List<ReferenceOperator> states, double... priors) {
        int n = states.get(0).dimension();
        FixedMatrix[] weighted = new FixedMatrix[priors.length];
        FixedMatrix sum = new FixedMatrix(NUMBERS, n);
        FixedMatrix none = new FixedMatrix(NUMBERS, n);
        for (int i = 0; i < priors.length; i++) {
            ReferenceOperator a = states.get(i);
            weighted[i] = a.at(NUMBERS).times(NUMBERS.of(priors[i], 0), -a.exponent());
            sum = sum.minus(none.minus(weighted[i]));
        }
        FixedMatrix root = inverseFourthRoot(sum);
        BigInteger total = BigInteger.ZERO;
        for (FixedMatrix w : weighted) {
            FixedMatrix m = root.times(w).times(root);
            total = total.add(m.times(m.adjoint()).trace());
        }
        return NUMBERS.toDecimal(total, 0);
    }

    private static FixedMatrix inverseFourthRoot(FixedMatrix s) {
        Decomposition d = FixedSpectrum.decomposition(s);
        FixedMatrix v = d.vectors();
        FixedMatrix scaled = new FixedMatrix(NUMBERS, s.n);
        for (int k = 0; k < s.n; k++) {
            Apfloat value = new Apfloat(NUMBERS.toDecimal(d.values()[k], 0), DIGITS);
            Apfloat power = new Apfloat(1, DIGITS).divide(ApfloatMath.sqrt(ApfloatMath.sqrt(value)));
            BigInteger w = NUMBERS.of(new BigDecimal(power.toString(true)), 0);
            for (int i = 0; i < s.n; i++) {
                scaled.re[i][k] = NUMBERS.times(w, v.re[i][k]);
                scaled.im[i][k] = NUMBERS.times(w, v.im[i][k]);
            }
        }
        return scaled.times(v.adjoint());
    }
}
