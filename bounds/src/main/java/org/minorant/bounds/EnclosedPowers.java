package org.minorant.bounds;

import java.util.List;
import org.minorant.bounds.divergence.Ball;
import org.minorant.bounds.divergence.SpectralState;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.Enclosure;

/** Certified powers of states; the argument stands in {@link MatrixRenyi}. */
final class EnclosedPowers {

    private static final double UP = 1 + 0x1p-40;

    private EnclosedPowers() {}

    /**
     * Encloses W^(1/(1+s)) of the normalised letter.
     *
     * @param w the letter
     * @param s at least 0
     */
    static EnclosedMatrix of(SpectralState w, double s) {
        Ball inverse = Ball.ONE.plus(Ball.of(s));
        Ball lnTrace = w.trace().ln();
        int n = w.dimension();
        double move = 0;
        EnclosedMatrix.Builder half = EnclosedMatrix.builder(w.rank(), w.rank());
        List<Ball> values = w.values();
        for (int i = 0; i < values.size(); i++) {
            Ball power = values.get(i).ln().minus(lnTrace).dividedBy(inverse).exp();
            // the known part of the power, and how far the ends of its ball are apart
            half.set(i, i, power.hi(), power.lo(), 0, 0, power.radius());
            move = Math.max(move, 2 * power.radius());
        }
        if (w.rest() > 0) {
            move += Enclosure.exact(w.rest())
                    .ln()
                    .minus(lnTrace.toEnclosure())
                    .dividedBy(inverse.toEnclosure())
                    .exp()
                    .upper();
        }
        EnclosedMatrix power = w.vectors().times(half.build()).times(w.vectors().adjoint());
        return widened(power, move * UP, n);
    }

    private static EnclosedMatrix widened(EnclosedMatrix a, double radius, int n) {
        EnclosedMatrix.Builder b = EnclosedMatrix.builder(n, n);
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                b.set(i, j, a.re(i, j), a.reTail(i, j), a.im(i, j), a.imTail(i, j), (a.radius(i, j) + radius) * UP);
            }
        }
        return b.build();
    }

    /** e^exponent for the positive part of a number. */
    static Enclosure power(Enclosure value, Enclosure exponent) {
        Enclosure v = value.max(Enclosure.ZERO);
        return v.upperWide().signum() == 0
                ? Enclosure.ZERO
                : v.ln().times(exponent).exp();
    }
}
