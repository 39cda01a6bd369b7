package org.minorant.bounds;

import java.util.List;
import org.minorant.bounds.divergence.Ball;
import org.minorant.bounds.divergence.SpectralState;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.EnclosedSpectrum;
import org.minorant.core.Enclosure;
import org.minorant.core.Operator;
import org.minorant.core.WideDouble;

/** A lower end of the least norm over all output states, by the argument of {@link MatrixRenyi}. */
final class DualNorm {

    private DualNorm() {}

    /**
     * Bounds min over σ of ln ‖ρ_XB^½ (ρ_X ⊗ σ)^(−u) ρ_XB^½‖_α from below.
     *
     * @param letters the letters
     * @param u (α − 1)/α, above 0 and below 1
     * @param p a distribution
     * @param roots R_x with T_x = R_x R_x*, in the eigenbasis of the letter, as wide as its rank; any matrices are allowed
     */
    static Enclosure lower(List<SpectralState> letters, double u, double[] p, List<Operator> roots) {
        Enclosure order = Enclosure.exact(u);
        int n = letters.get(0).dimension();
        EnclosedMatrix k = EnclosedMatrix.builder(n, n).build();
        Enclosure size = Enclosure.ZERO;
        for (int x = 0; x < p.length; x++) {
            if (p[x] > 0) {
                EnclosedMatrix r = EnclosedMatrix.of(roots.get(x));
                EnclosedMatrix y = columns(letters.get(x)).times(r);
                Enclosure weight =
                        Enclosure.exact(p[x]).ln().times(order.complement()).exp();
                // a smaller weight makes a smaller K
                k = k.plus(y.times(y.adjoint()).times(weight.lower()));
                size = size.plus(powers(r.times(r.adjoint()), Enclosure.ONE.dividedBy(order)));
            }
        }
        Enclosure inverse = Enclosure.ONE.plus(order);
        Enclosure trace = powers(k, Enclosure.ONE.dividedBy(inverse));
        Enclosure ln = trace.ln()
                .times(inverse)
                .minus(size.ln().times(order))
                .minus(Traces.sum(p).ln().times(order.complement()));
        return Enclosure.of(ln.lowerWide(), WideDouble.POSITIVE_INFINITY);
    }

    /** Y with YY* below the normalised letter: U(D − κ)^½ over the root of the trace. */
    private static EnclosedMatrix columns(SpectralState w) {
        EnclosedMatrix.Builder d = EnclosedMatrix.builder(w.rank(), w.rank());
        Ball lnTrace = w.trace().ln();
        for (int i = 0; i < w.rank(); i++) {
            Ball root = w.logarithms().get(i).minus(lnTrace).times(0.5).exp();
            d.set(i, i, root.hi(), root.lo(), 0, 0, root.radius());
        }
        return w.vectors().times(d.build());
    }

    /** Tr A^power, eigenvalues below 0 counting as 0. */
    private static Enclosure powers(EnclosedMatrix a, Enclosure power) {
        EnclosedSpectrum s = EnclosedSpectrum.of(a);
        Enclosure sum = Enclosure.ZERO;
        for (int i = 0; i < s.dimension(); i++) {
            sum = sum.plus(EnclosedPowers.power(s.eigenvalue(i), power));
        }
        return sum;
    }
}
