package org.minorant.bounds.divergence;

import java.util.Optional;
import org.minorant.core.Enclosure;

/**
 * The fidelity F = ‖√ρ√σ‖₁ of the normalised operators (not squared), the Bures distance √(2 − 2F) and the Bures angle arccos F.
 *
 * <p><b>Argument.</b> ln F = N(−1)/2, see {@link Sandwiched}. 1 − F is formed with thirty digits before it is rounded, and arccos F = 2
 * arcsin √((1−F)/2),
 * so that neither distance nor angle loses digits for states that nearly agree; {@link Math#asin} is within one unit in the last place.
 */
public final class Fidelity {

    private static final Ball MINUS_ONE = Ball.of(-1);

    private Fidelity() {}

    /**
     * Encloses F.
     *
     * @param pair A and B
     * @return the fidelity, in [0, 1]
     */
    public static Enclosure value(StatePair pair) {
        Optional<Ball> ln = logarithm(pair);
        return ln.isPresent()
                ? ln.get().exp().toEnclosure().clip(0, 1)
                : Sandwiched.value(pair, 0.5).times(-0.5).exp().clip(0, 1);
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
