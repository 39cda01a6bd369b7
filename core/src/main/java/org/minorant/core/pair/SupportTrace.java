package org.minorant.core.pair;

import org.minorant.core.EnclosedMatrix;
import org.minorant.core.EnclosedSpectrum;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;

/**
 * Tr PA for the projector P on the support of B = YY*, from above: f(a, b) = Tr[aA ∧ bB] is at most a Tr PA, by the test P, and reaches it as b grows.
 *
 * <p><b>Argument.</b> Any T of full rank gives columns U = YT with the range of Y. If U*U = 1 + E with ‖E‖ ≤ e &lt; 1, P = U(1+E)⁻¹U* ≤ (1 − e)⁻¹UU*, so Tr PA ≤ ‖T*Y*X‖_F²/(1 − e) for A = XX*. T
 * is V Λ^(−½) from a spectrum of the Gram matrix Y*Y scaled to unit diagonal; E is enclosed for the T that is stored.
 */
final class SupportTrace {

    private SupportTrace() {}

    /** An upper end of Tr PA from Y*Y and Y*X; +∞ where Y's columns are dependent within rounding. */
    static WideDouble upper(EnclosedMatrix gram, EnclosedMatrix cross) {
        int n = gram.rows();
        EnclosedMatrix.Builder scale = EnclosedMatrix.builder(n, n);
        for (int i = 0; i < n; i++) {
            if (!(gram.re(i, i) > 0)) {
                return WideDouble.POSITIVE_INFINITY;
            }
            scale.set(i, i, Math.scalb(1.0, -Math.getExponent(gram.re(i, i)) / 2), 0, 0, 0, 0);
        }
        EnclosedMatrix s = scale.build();
        EnclosedMatrix unit = s.times(gram).times(s);
        EnclosedSpectrum spectrum = EnclosedSpectrum.of(unit.midpoint());
        EnclosedMatrix.Builder root = EnclosedMatrix.builder(n, n);
        for (int i = 0; i < n; i++) {
            if (!(spectrum.value(i) > 0)) {
                return WideDouble.POSITIVE_INFINITY;
            }
            root.set(i, i, 1 / Math.sqrt(spectrum.value(i)), 0, 0, 0, 0);
        }
        EnclosedMatrix t = spectrum.vectors().times(root.build()).midpoint();
        double e = t.adjoint()
                .times(unit)
                .times(t)
                .minus(EnclosedMatrix.identity(n))
                .frobeniusUpper();
        if (!(e < 0.5)) {
            return WideDouble.POSITIVE_INFINITY;
        }
        double norm = t.adjoint().times(s.times(cross)).frobeniusUpper();
        Enclosure square = Enclosure.exact(norm).square();
        return square.dividedBy(Enclosure.exact(e).complement()).upperWide();
    }
}
