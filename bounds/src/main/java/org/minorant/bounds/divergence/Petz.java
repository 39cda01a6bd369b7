package org.minorant.bounds.divergence;

import java.util.List;
import org.minorant.core.Enclosure;

/**
 * The Petz–Rényi divergence D_α(ρ‖σ) = (α − 1)^(−1) ln Tr ρ^α σ^(1−α) of the normalised operators, in nats, and its limit α → 0, the
 * min-divergence −ln Tr P_ρ σ.
 *
 * <p><b>Argument for α &gt; 1</b> (notation of {@link SpectralState}; below one see {@link PetzCurve}). Tr A^α B^(1−α) is computed as Σ
 * p_ij a_i^α b_j^(1−α).
 * B^(1−α) is operator antimonotone for α ≤ 2, which the balls of B's eigenvalues cover; elsewhere two positive X, Y between the same two
 * diagonal matrices, a distance w apart and between l and h, have ‖X^p − Y^p‖ ≤ h^p w (k/h + f (l/h)^f / l) with p = k + f, k whole: the
 * first part from
 * X^k − Y^k term by term, the second because fractional powers are operator monotone. R_A adds at most rest^α Tr B^(1−α).
 *
 * <p>Where the support of A may leave that of B, D_α ≥ D gives the lower end, and the upper end is +∞.
 */
public final class Petz {

    private static final double SLACK = 1 + 1e-9;

    private Petz() {}

    /**
     * Encloses D_α(ρ‖σ).
     *
     * @param pair A and B
     * @param alpha the order, positive, finite and not 1
     * @return the divergence in nats
     */
    public static Enclosure value(StatePair pair, double alpha) {
        if (pair.isSame()) {
            return Enclosure.ZERO;
        }
        if (alpha < 1) {
            return belowOne(pair, alpha);
        }
        return switch (pair.containment()) {
            case REFUTED -> Enclosure.infinite();
            case CERTAIN -> certain(pair, alpha).clip(0, Double.POSITIVE_INFINITY);
            case UNDECIDED -> Enclosure.of(RelativeEntropy.value(pair).lower(), Double.POSITIVE_INFINITY);
        };
    }

    private static Enclosure belowOne(StatePair pair, double alpha) {
        PetzCurve curve = PetzCurve.normalised(pair);
        Ball scale = Ball.difference(1, alpha);
        if (curve.isSharp() && curve.at(alpha).isPresent()) {
            Ball d = curve.at(alpha).get().value().dividedBy(scale).negate();
            return d.toEnclosure().clip(0, Double.POSITIVE_INFINITY);
        }
        return curve.value(alpha).negate().dividedBy(scale.toEnclosure()).clip(0, Double.POSITIVE_INFINITY);
    }

    /**
     * Orders so large that the radii of the logarithms would take over are closed from below by a smaller order and from above by A^α ≤ a_max^α, B^(1−α) ≤
     * b_min^(1−α).
     */
    private static Enclosure certain(StatePair pair, double alpha) {
        double radius = 0x1p-42;
        double top = Double.NEGATIVE_INFINITY;
        double bottom = Double.POSITIVE_INFINITY;
        for (Ball l : pair.first().logarithms()) {
            radius = Math.max(radius, l.radius());
            top = Math.max(top, l.upper());
        }
        for (Ball l : pair.second().logarithms()) {
            radius = Math.max(radius, l.radius());
            bottom = Math.min(bottom, l.lower());
        }
        if (alpha <= 0.25 / radius) {
            return aboveOne(pair, alpha);
        }
        Ball beta = Ball.difference(alpha, 1);
        SpectralState a = pair.first();
        Ball ratio = Ball.ONE.plus(Ball.ONE.dividedBy(beta));
        Ball most = Ball.of(Math.max(top, a.rest() == 0 ? top : Math.log(a.rest()) + 1e-9))
                .minus(a.trace().ln())
                .times(ratio)
                .minus(Ball.of(bottom))
                .plus(pair.second().trace().ln())
                .plus(Ball.of(a.rank() + a.restRank()).ln().dividedBy(beta));
        double least = aboveOne(pair, 0.25 / radius).lower();
        return Enclosure.of(Math.min(least, most.upper()), most.upper());
    }

    private static Enclosure aboveOne(StatePair pair, double alpha) {
        SpectralState a = pair.first();
        SpectralState b = pair.second();
        Ball beta = Ball.difference(alpha, 1);
        List<Ball> x = a.logarithms().stream().map(l -> l.times(alpha)).toList();
        List<Ball> y = b.logarithms().stream().map(l -> l.times(beta).negate()).toList();
        Ball shift = Ball.of(largest(pair, x, y));
        Ball sum = Ball.ZERO;
        for (int i = 0; i < x.size(); i++) {
            for (int j = 0; j < y.size(); j++) {
                sum = sum.plus(PetzCurve.scaled(
                        pair.square(i, j), x.get(i).plus(y.get(j)).minus(shift)));
            }
        }
        sum = sum.widen(errors(pair, alpha, x, y, shift.hi()));
        Ball traces = a.trace().ln().times(alpha).minus(b.trace().ln().times(beta));
        if (sum.isPositive()) {
            return sum.ln().plus(shift).minus(traces).dividedBy(beta).toEnclosure();
        }
        return sum.toEnclosure()
                .clip(0, Double.POSITIVE_INFINITY)
                .ln()
                .plus(shift.minus(traces).toEnclosure())
                .dividedBy(beta.toEnclosure());
    }

    private static double largest(StatePair pair, List<Ball> x, List<Ball> y) {
        double most = Double.NEGATIVE_INFINITY;
        for (int i = 0; i < x.size(); i++) {
            for (int j = 0; j < y.size(); j++) {
                Ball p = pair.square(i, j);
                if (p.hi() > p.radius()) {
                    most = Math.max(most, x.get(i).hi() + y.get(j).hi() + Math.log(p.hi()));
                }
            }
        }
        return most;
    }

    /** What the balls do not cover, in units of e^shift. */
    private static double errors(StatePair pair, double alpha, List<Ball> x, List<Ball> y, double shift) {
        SpectralState a = pair.first();
        SpectralState b = pair.second();
        double sum = 0;
        if (a.spread() > 0) {
            double h = extreme(a, true);
            double move = Math.log(moved(alpha, extreme(a, false), h, 2 * a.spread())) + alpha * Math.log(h);
            for (int i = 0; i < x.size(); i++) {
                for (int j = 0; j < y.size(); j++) {
                    double p = pair.square(i, j).magnitude();
                    sum += p == 0 ? 0 : p * Math.exp(y.get(j).hi() + move - shift);
                }
            }
        }
        if (b.spread() > 0 && alpha > 2) {
            double l = extreme(b, false);
            double move = Math.log(moved(alpha - 1, 1 / extreme(b, true), 1 / l, 2 * b.spread() / (l * l)))
                    - (alpha - 1) * Math.log(l);
            for (Ball t : x) {
                sum += Math.exp(t.hi() + move - shift);
            }
        }
        if (a.rest() > 0) {
            for (Ball t : y) {
                sum += Math.exp(t.hi() + alpha * Math.log(a.rest()) - shift);
            }
        }
        return sum * SLACK;
    }

    private static double extreme(SpectralState s, boolean largest) {
        double e = largest ? 0 : Double.POSITIVE_INFINITY;
        for (Ball d : s.values()) {
            e = largest ? Math.max(e, d.magnitude()) : Math.min(e, d.lower());
        }
        return e;
    }

    /** ‖X^p − Y^p‖ / h^p at most, see the class comment. */
    private static double moved(double p, double l, double h, double w) {
        double k = Math.floor(p);
        double f = p - k;
        return w * (k / h + f * Math.pow(l / h, f) / l) * SLACK;
    }

    /**
     * Encloses the min-divergence −ln Tr P_ρ σ.
     *
     * @param pair A and B
     * @return the min-divergence in nats
     */
    public static Enclosure minimal(StatePair pair) {
        SpectralState a = pair.first();
        boolean full = a.fillsRows() && pair.second().rows().stream().allMatch(a.rows()::get);
        if (pair.isSame() || full) {
            return Enclosure.ZERO;
        }
        return PetzCurve.normalised(pair).value(0).negate().clip(0, Double.POSITIVE_INFINITY);
    }
}
