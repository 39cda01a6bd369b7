package org.minorant.measurement;

import org.minorant.core.EnclosedMatrix;
import org.minorant.core.Enclosure;
import org.minorant.core.PositiveFactor;
import org.minorant.core.PositiveOperator;
import org.minorant.core.WideDouble;

/**
 * Tr σΠ with Π the projector onto the support of ρ: the least type-II error at type-I level zero.
 *
 * <p><b>Argument.</b> If ρ has a factor X without trace error, its support is the range of X. Let X ≈ LPR* with all columns kept ({@link PolarFactors}); then every singular
 * value of X is at least s = √(1−δ_L)√(1−δ_R) λ_min(P) − residual, and if s &gt; 0, X has full column rank and its range makes an angle of sine at most
 * residual/s with that of L. With σ = YY*, √Tr σΠ = ‖ΠY‖_F differs from ‖Π_L Y‖_F by at most that sine times ‖Y‖_F, and LL* from Π_L by a relative δ_L.
 * So the value keeps relative accuracy down to about 1e-50.
 */
final class SupportOverlap {

    private SupportOverlap() {}

    /** Tr σΠ; between 0 and Tr σ where the support cannot be certified. */
    static Enclosure of(PositiveOperator rho, PositiveOperator sigma) {
        Enclosure trace = sigma.traceEnclosure();
        Enclosure unknown = Enclosure.of(WideDouble.ZERO, trace.upperWide());
        PositiveFactor f = rho.factor();
        EnclosedMatrix x = f.columns();
        if (f.traceError() > 0) {
            return unknown;
        }
        PolarFactors p = PolarFactors.of(x);
        double least = p.least() * Math.sqrt(1 - p.leftDefect()) * Math.sqrt(1 - p.rightDefect()) - p.residual();
        if (p.rank() < Math.min(x.rows(), x.columns()) || !(least > 0)) {
            return unknown;
        }
        if (p.rank() == x.rows()) {
            return trace;
        }
        PositiveFactor y = sigma.factor();
        EnclosedMatrix c = p.left().adjoint().times(y.columns());
        double size = Math.sqrt(
                Inner.product(y.columns(), y.columns()).enclosureRe(0, 0).upper());
        double sine = p.residual() / least * (1 + 0x1p-40);
        Enclosure norm = Inner.product(c, c).enclosureRe(0, 0).sqrt();
        double error = (sine * size + p.leftDefect() * norm.upper()) * (1 + 0x1p-40);
        Enclosure root = norm.widen(error).max(Enclosure.ZERO);
        Enclosure relative = Enclosure.ONE.widen(y.relativeError());
        return root.times(root)
                .times(relative)
                .widen(y.traceError())
                .max(Enclosure.ZERO)
                .min(trace);
    }
}
