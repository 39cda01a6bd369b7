package org.minorant.bounds.divergence;

import java.util.Optional;
import org.minorant.core.Enclosure;
import org.minorant.core.PositiveFactor;

/**
 * The fidelity F = ‖√ρ√σ‖₁ of the normalised operators (not squared), the Bures distance √(2 − 2F) and the Bures angle arccos F.
 *
 * <p><b>Argument.</b> F is enclosed twice, and what both allow is returned.
 *
 * <ul>
 *   <li>From spectra: ln F = N(−1)/2, see {@link Sandwiched}. 1 − F is formed with thirty digits before it is rounded.
 *   <li>From factors, where spectra do not give it to the last digit: for A = XX*, B = YY* it is F = ‖X*Y‖₁, see {@link NuclearNorm}, since X = √A V, Y = √B W with partial
 *       isometries. F increases with A and B, is homogeneous of degree ½ in each, and F(A + N, B) ≤ F(A, B) + F(N, B) with F(N, B)² ≤ Tr N Tr B (McCarthy 1967; Cauchy,
 *       Schwarz). So the sandwich of {@link PositiveFactor} gives √((1∓η)(1∓η'))‖X*Y‖₁ ∓ (√(ν Tr B) + √(ν' Tr A) + √(νν')): relative where the data allow it, at any depth.
 * </ul>
 *
 * <p>arccos F = 2 arcsin √((1−F)/2), so that neither distance nor angle loses digits for states that nearly agree; {@link Math#asin} is within one unit in the last place.
 */
public final class Fidelity {

    private static final Ball MINUS_ONE = Ball.of(-1);

    /** A relative width below which the other way is not tried. */
    private static final double SHARP = 0x1p-50;

    private Fidelity() {}

    /**
     * Encloses F.
     *
     * @param pair A and B
     * @return the fidelity, in [0, 1]
     */
    public static Enclosure value(StatePair pair) {
        Optional<Ball> ln = logarithm(pair);
        Enclosure f = ln.isPresent()
                ? ln.get().exp().toEnclosure().clip(0, 1)
                : Sandwiched.value(pair, 0.5).times(-0.5).exp().clip(0, 1);
        return f.relativeWidth() <= SHARP ? f : f.intersect(ofFactors(pair));
    }

    /** ln F; empty if F may vanish. */
    private static Optional<Ball> logarithm(StatePair pair) {
        return pair.isSame()
                ? Optional.of(Ball.ZERO)
                : Sandwiched.of(pair)
                        .norm(MINUS_ONE)
                        .filter(n -> n.hi() > -1000)
                        .map(n -> n.times(0.5));
    }

    private static Enclosure ofFactors(StatePair pair) {
        PositiveFactor x = pair.firstFactor();
        PositiveFactor y = pair.secondFactor();
        Enclosure a = x.trace();
        Enclosure b = y.trace();
        Enclosure nu = Enclosure.exact(x.traceError());
        Enclosure mu = Enclosure.exact(y.traceError());
        Enclosure rest =
                nu.times(b).sqrt().plus(mu.times(a).sqrt()).plus(nu.times(mu).sqrt());
        Enclosure norm =
                NuclearNorm.of(x.columns().adjoint().times(y.columns())).toEnclosure();
        Enclosure f = norm.times(around(x).times(around(y)).sqrt())
                .plus(Enclosure.of(-1, 1).times(rest));
        Enclosure traces = a.times(b).sqrt();
        return traces.lowerWide().signum() > 0 ? f.dividedBy(traces).clip(0, 1) : Enclosure.of(0, 1);
    }

    /** 1 ± η. */
    private static Enclosure around(PositiveFactor x) {
        return Enclosure.ONE.plus(Enclosure.of(-x.relativeError(), x.relativeError()));
    }

    /** 1 − F. */
    private static Enclosure defect(StatePair pair) {
        Optional<Ball> ln = logarithm(pair);
        return ln.isPresent()
                ? Ball.ONE.minus(ln.get().exp()).toEnclosure().clip(0, 1)
                : value(pair).complement().clip(0, 1);
    }

    /**
     * Encloses the Bures distance.
     *
     * @param pair A and B
     * @return √(2 − 2F), in [0, √2]
     */
    public static Enclosure buresDistance(StatePair pair) {
        return defect(pair).times(2).sqrt();
    }

    /**
     * Encloses the Bures angle.
     *
     * @param pair A and B
     * @return arccos F in radians, in [0, π/2]
     */
    public static Enclosure buresAngle(StatePair pair) {
        Enclosure x = defect(pair).times(0.5).sqrt();
        double low = 2 * Math.asin(x.lower());
        double high = 2 * Math.asin(x.upper());
        // asin is within one unit by specification of Math, and its doubling is exact
        return Enclosure.of(Math.max(0, low - 4 * Math.ulp(low)), high == 0 ? 0 : high + 4 * Math.ulp(high));
    }
}
