package org.minorant.bounds;

import java.util.Optional;
import java.util.TreeMap;
import org.minorant.core.Enclosure;
import org.minorant.core.Operator;
import org.minorant.core.WideDouble;

/**
 * The strong converse exponent sup over 0 &lt; u &lt; 1 of uR − N(u), with N(u) = u max over P of min over σ of D̃_α(ρ_XB‖ρ_X ⊗ σ) = u min over σ of max_x D̃_α(W_x‖σ), u = (α−1)/α.
 *
 * <p><b>From below.</b> Any u and σ: N(u) ≤ max_x N_x(u; σ); u = 1 is the limit.
 *
 * <p><b>From above.</b> For one input, exp of u min over σ of D̃_α is the norm of Σ P(x)^(1−u) |x⟩⟨x| ⊗ W_x in the spaces S_1(S_α), which are a scale of complex interpolation with 1/α = 1 − u linear in its parameter (G.
 * Pisier, Astérisque 247 (1998), from memory; used by S. Beigi, J. Math. Phys. 54, 122202 (2013)); the weights are analytic in u, so Stein's version applies, and the logarithm is convex in u. So is the largest over inputs, N,
 * and h(u) = uR − N(u) is concave, with h(0) = 0. Certified ends of h at three points bound it everywhere: between them below the chords extended, beyond them below the same.
 */
final class StrongConverseExponent {

    private static final double LEAST = Math.log(1e-6);

    /** Larger orders take the search of the output state too many steps; beyond, the exponent lies between a chord and the max-divergence. */
    private static final double MOST = Math.log(4);

    /** To which width ln(α − 1) is found for one input after the other. */
    private static final double[] WIDTHS = {0.1, 1e-3};

    private static final double ENOUGH = 1e-9;

    private static final double[] SPACINGS = {1e-4, 1e-2, 0.1};

    private final RenyiOutputs outputs;
    private final Enclosure rate;
    private final TreeMap<Double, Enclosure> heights = new TreeMap<>();
    private double[] input;
    private Optional<Operator> near = Optional.empty();

    private StrongConverseExponent(RenyiOutputs outputs, Enclosure rate, double[] start) {
        this.outputs = outputs;
        this.rate = rate;
        this.input = start;
    }

    /**
     * Encloses the exponent at a rate above the capacity.
     *
     * @param outputs the letters
     * @param rate R
     * @param start an input to start from
     * @return the exponent, and the u at which its lower end is reached
     */
    static ExponentSearch.Result of(RenyiOutputs outputs, Enclosure rate, double[] start) {
        return new StrongConverseExponent(outputs, rate, start).run();
    }

    private ExponentSearch.Result run() {
        double u = 0;
        for (double width : WIDTHS) {
            double[] p = input;
            u = StrongConverseWords.order(
                    Unimodal.minimiser(y -> -estimate(StrongConverseWords.order(y), p), LEAST, MOST, width));
            input = RenyiInput.forSandwich(outputs, u, p, near);
        }
        u = vertex(vertex(u));
        Enclosure top = height(u);
        Sandwich s = sandwich(u);
        WideDouble low = WideDouble.ZERO.max(top.lowerWide());
        double where = low.signum() > 0 ? u : 0;
        WideDouble atOne = rate.minus(largest(s.sigma(), 1)).lowerWide();
        if (atOne.compareTo(low) > 0) {
            low = atOne;
            where = 1;
        }
        WideDouble high = rate.upperWide();
        for (double spacing : SPACINGS) {
            if (high.plusUp(low.negate()).toDoubleUp() > ENOUGH) {
                high = high.min(above(u, top, spacing * Math.min(u, 1 - u)));
            }
        }
        return new ExponentSearch.Result(Enclosure.of(low, high.max(low)), where);
    }

    private Sandwich sandwich(double u) {
        input = RenyiInput.forSandwich(outputs, u, input, near);
        Sandwich s = outputs.sandwich(u, input, near);
        near = s.near();
        return s;
    }

    private double estimate(double u, double[] p) {
        Sandwich s = outputs.sandwich(u, p, near);
        near = s.near();
        return u * rate.midpoint() - s.norm();
    }

    private double estimate(double u) {
        return u * rate.midpoint() - sandwich(u).norm();
    }

    /** The top of the parabola through three points. */
    private double vertex(double u) {
        double h = 1e-3 * Math.min(u, 1 - u);
        double middle = estimate(u);
        double left = estimate(u - h) - middle;
        double right = estimate(u + h) - middle;
        double bend = left + right;
        double shift = bend < 0 ? 0.5 * h * (left - right) / bend : 0;
        double most = StrongConverseWords.order(MOST);
        return Math.min(most, Math.max(0.5 * u, u + Math.max(-20 * h, Math.min(20 * h, shift))));
    }

    /** Certified ends of h(u). */
    private Enclosure height(double u) {
        Enclosure known = heights.get(u);
        if (known != null) {
            return known;
        }
        Sandwich s = sandwich(u);
        Enclosure line = rate.times(u);
        WideDouble low = line.minus(largest(s.sigma(), u)).lowerWide();
        WideDouble high = line.minus(s.lower().get()).upperWide();
        Enclosure h = Enclosure.of(low, high.max(low));
        heights.put(u, h);
        return h;
    }

    private Enclosure largest(LettersAgainst sigma, double u) {
        Enclosure most = Enclosure.ZERO;
        for (int x = 0; x < outputs.letters(); x++) {
            most = most.max(sigma.norm(x, u));
        }
        return most;
    }

    /** A bound on h everywhere from its values at u − d, u, u + d and 0. */
    private WideDouble above(double u, Enclosure top, double d) {
        double left = u - d;
        double right = u + d;
        Enclosure atLeft = height(left);
        Enclosure atRight = height(right);
        WideDouble inRight = extended(top, atLeft, u - left, right - u);
        WideDouble inLeft = extended(top, atRight, right - u, u - left);
        WideDouble beyondRight = extended(atRight, top, right - u, 1 - right);
        WideDouble beyondLeft = extended(atLeft, top, u - left, left);
        return inRight.max(inLeft).max(beyondRight).max(beyondLeft);
    }

    /** The largest value of the chord from (0, from) to (run, to), extended by a further distance beyond its end. */
    private static WideDouble extended(Enclosure to, Enclosure from, double run, double further) {
        Enclosure end = Enclosure.of(to.upperWide(), to.upperWide());
        Enclosure rise =
                end.minus(Enclosure.of(from.lowerWide(), from.lowerWide())).max(Enclosure.ZERO);
        // the distances are rounded; a little more covers that
        return end.plus(rise.times(further).dividedBy(Enclosure.exact(run)).times(1 + 0x1p-30))
                .upperWide();
    }
}
