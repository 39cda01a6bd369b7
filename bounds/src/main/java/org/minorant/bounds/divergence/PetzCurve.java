package org.minorant.bounds.divergence;

import java.util.List;
import java.util.Optional;
import org.minorant.core.Enclosure;

/**
 * The curve ψ(s) = ln Tr (xA)^s (yB)^(1−s) for 0 ≤ s ≤ 1 and scales x, y &gt; 0: convex in s; −ψ is the Chernoff function, and every bound
 * of Chernoff's or
 * Hoeffding's kind is read off it.
 *
 * <p><b>Definition.</b> Powers are taken on supports, so that s = 0 means the support projector of A, the limit from above.
 *
 * <p><b>Argument</b> (notation of {@link SpectralState}). With eigenvalues at the lower ends, ψ₋(s) = ln Σ p_ij a_i^s b_j^(1−s) is a sum of
 * exponentials, hence convex, and ψ ≥ ψ₋ since powers up to one are operator monotone. From above, with eigenvalues at the upper ends,
 * Tr A^s B^(1−s) ≤ Σ p_ij a_i^s b_j^(1−s) + (what R adds), because 0 ≤ R^s ≤ rest^s (1 − P). Balls of eigenvalues cover both ends.
 *
 * <p>Source of the sum: M. Nussbaum, A. Szkoła, Ann. Statist. 37, 1040 (2009), proposition 1 (from memory).
 */
public final class PetzCurve {

    private final StatePair pair;
    private final List<Ball> lnA;
    private final List<Ball> lnB;
    private final Ball lnX;
    private final Ball lnY;

    private PetzCurve(StatePair pair, Ball lnX, Ball lnY) {
        this.pair = pair;
        this.lnX = lnX;
        this.lnY = lnY;
        this.lnA = pair.first().logarithms().stream().map(b -> b.plus(lnX)).toList();
        this.lnB = pair.second().logarithms().stream().map(b -> b.plus(lnY)).toList();
    }

    /**
     * Returns the curve of two operators with scales.
     *
     * @param pair A and B
     * @param lnX ln x, the scale of A
     * @param lnY ln y, the scale of B
     * @return the curve
     */
    public static PetzCurve of(StatePair pair, Ball lnX, Ball lnY) {
        return new PetzCurve(pair, lnX, lnY);
    }

    /**
     * Returns the curve of the normalised operators.
     *
     * @param pair A and B
     * @return the curve with x = 1/Tr A and y = 1/Tr B
     */
    public static PetzCurve normalised(StatePair pair) {
        return new PetzCurve(
                pair,
                pair.first().trace().ln().negate(),
                pair.second().trace().ln().negate());
    }

    /**
     * The convex minorant ψ₋ at a point.
     *
     * @param value a ball that holds ψ₋(s), and, where nothing is known of R, ψ(s) too
     * @param slope a ball that holds the derivative ψ₋'(s)
     * @param curvature the second derivative, an estimate
     */
    public record Point(Ball value, Ball slope, double curvature) {}

    /**
     * Returns value and slope of the convex minorant.
     *
     * @param s the exponent of A, between 0 and 1
     * @return ψ₋ at s; empty if the trace may vanish, so that nothing bounds it from below
     */
    public Optional<Point> at(double s) {
        Total t = total(s);
        if (!t.sum.isPositive()) {
            return Optional.empty();
        }
        Ball slope = t.first.dividedBy(t.sum);
        double mean = slope.hi();
        return Optional.of(
                new Point(t.sum.ln().plus(t.shift), slope, Math.max(0, t.second / t.sum.hi() - mean * mean)));
    }

    /**
     * Tells whether the ranks of both operators are certain, so that {@link #at} encloses ψ itself.
     *
     * @return whether nothing may be added by R
     */
    public boolean isSharp() {
        return pair.first().rest() == 0 && pair.second().rest() == 0;
    }

    /**
     * Encloses ψ(s).
     *
     * @param s the exponent of A, between 0 and 1
     * @return ψ(s); its lower end is −∞ if the trace may vanish
     */
    public Enclosure value(double s) {
        Total t = total(s);
        Enclosure known = t.sum.toEnclosure().clip(0, Double.POSITIVE_INFINITY);
        Enclosure shift = t.shift.toEnclosure();
        if (t.sum.isPositive() && isSharp()) {
            return t.sum.ln().plus(t.shift).toEnclosure();
        }
        Enclosure rest = restAt(s).times(shift.negate().exp());
        return known.plus(Enclosure.of(0, 1).times(rest)).ln().plus(shift);
    }

    /** What R_A and R_B may add: ‖R_A‖^s Tr B^(1−s)(1−P_A) + ‖R_B‖^(1−s) Tr A^s(1−P_B), the second with all of A^s. */
    private Enclosure restAt(double s) {
        SpectralState a = pair.first();
        SpectralState b = pair.second();
        Enclosure x = restPower(a, s, lnX);
        Enclosure y = restPower(b, 1 - s, lnY);
        Enclosure inB = Enclosure.ZERO;
        for (Ball l : lnB) {
            inB = inB.plus(l.toEnclosure()
                    .times(Enclosure.ONE.minus(Enclosure.exact(s)))
                    .exp());
        }
        Enclosure inA = Enclosure.ZERO;
        for (int i = 0; i < lnA.size(); i++) {
            Enclosure weight = pair.outside(i).toEnclosure().clip(0, 1);
            inA = inA.plus(lnA.get(i).toEnclosure().times(s).exp().times(weight));
        }
        return x.times(inB.plus(y.times(b.restRank()))).plus(y.times(inA));
    }

    private static Enclosure restPower(SpectralState a, double power, Ball lnScale) {
        return a.rest() == 0
                ? Enclosure.ZERO
                : Ball.of(a.rest())
                        .ln()
                        .plus(lnScale)
                        .toEnclosure()
                        .times(power)
                        .exp();
    }

    /** The sums Σ w, Σ wz, Σ wz² with w = p a^s b^(1−s) e^(−shift) and z = ln a − ln b. */
    private record Total(Ball shift, Ball sum, Ball first, double second) {}

    private Total total(double s) {
        Ball rest = Ball.difference(1, s);
        Ball[][] x = new Ball[lnA.size()][lnB.size()];
        double most = Double.NEGATIVE_INFINITY;
        for (int i = 0; i < lnA.size(); i++) {
            for (int j = 0; j < lnB.size(); j++) {
                Ball p = pair.square(i, j);
                x[i][j] = lnA.get(i).times(s).plus(lnB.get(j).times(rest));
                if (p.hi() > p.radius()) {
                    most = Math.max(most, x[i][j].hi() + Math.log(p.hi()));
                }
            }
        }
        Ball shift = Ball.of(most == Double.NEGATIVE_INFINITY ? 0 : most);
        Ball sum = Ball.ZERO;
        Ball first = Ball.ZERO;
        double second = 0;
        for (int i = 0; i < lnA.size(); i++) {
            for (int j = 0; j < lnB.size(); j++) {
                Ball p = pair.square(i, j);
                if (p.magnitude() > 0) {
                    Ball w = scaled(p, x[i][j].minus(shift));
                    Ball z = lnA.get(i).minus(lnB.get(j));
                    sum = sum.plus(w);
                    first = first.plus(w.times(z));
                    second += w.hi() * z.hi() * z.hi();
                }
            }
        }
        return new Total(shift, sum, first, second);
    }

    /** p e^x; where e^x alone would overflow, p is tiny and known only up to its radius, and its logarithm takes part. */
    static Ball scaled(Ball p, Ball x) {
        if (x.hi() < 600) {
            return p.times(x.exp());
        }
        double most = Math.exp(Math.min(700, x.hi() + x.radius() + Math.log(p.magnitude())) + 1e-9);
        return new Ball(0, 0, x.hi() + Math.log(p.magnitude()) > 690 ? Double.MAX_VALUE / 1e10 : most * 2);
    }
}
