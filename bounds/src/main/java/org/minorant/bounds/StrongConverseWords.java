package org.minorant.bounds;

import java.util.Optional;
import java.util.concurrent.atomic.AtomicReference;
import java.util.function.DoubleBinaryOperator;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;
import org.minorant.core.Operator;
import org.minorant.core.WideDouble;

/**
 * The strong converse in n uses of any channel: for every α &gt; 1 and every output state σ, a code of M messages of average error ε obeys
 *
 * <pre>ln M ≤ n max_x D̃_α(W_x‖σ) + α/(α−1) ln 1/(1−ε).</pre>
 *
 * <p><b>Argument.</b> Let a code with words x(m) and measurement {T_m}. The test that accepts in (m, B) by T_m tells Σ_m |m⟩⟨m| ⊗ W_x(m)/M from the same with σ^⊗n in place of the outputs: it
 * accepts the first with probability 1 − ε, the second with 1/M. The sandwiched divergence does not increase under it, so that ((α/(α−1)) ln(1−ε) + ln M) is at most the divergence of the two, which is
 * at most max over words of D̃_α(W_x(m)‖σ^⊗n), and that of products is the sum of the letters': at most n max_x D̃_α(W_x‖σ). Nothing is assumed of channel or words; n enters as a factor only.
 *
 * <p>With u = (α−1)/α the bound is (n max_x N_x(u) − ln(1−ε))/u, N_x(u) = u D̃_α. A search finds u and σ; the value at them is enclosed.
 */
final class StrongConverseWords {

    static final Theorem THEOREM = new Theorem(
            "strong converse by the sandwiched divergence, best order",
            "M. Mosonyi, T. Ogawa, Commun. Math. Phys. 355, 373 (2017); M. M. Wilde, A. Winter, D. Yang, ibid. 331, 593 (2014) (from memory)");

    /** The search goes over ln(α − 1) between these. */
    private static final double LEAST = Math.log(1e-7);

    /** Larger orders cost many steps, and that of the max-divergence is tried, too. */
    private static final double MOST = Math.log(4);

    /** To which width each round finds ln(α − 1); the bound's logarithm is stationary there. */
    private static final double[] WIDTHS = {0.1, 1e-5};

    private final RenyiOutputs outputs;
    private final Optional<DensityOperator> chosen;
    private final double[] start;
    private final int n;

    /**
     * Prepares the bound.
     *
     * @param outputs the letters
     * @param chosen the output state, if it is to be a certain one
     * @param start an input to start from
     * @param n the number of uses
     */
    StrongConverseWords(RenyiOutputs outputs, Optional<DensityOperator> chosen, double[] start, int n) {
        this.outputs = outputs;
        this.chosen = chosen;
        this.start = start;
        this.n = n;
    }

    /** (α−1)/α for ln(α−1) = y. */
    static double order(double y) {
        double e = Math.exp(y);
        return e / (1 + e);
    }

    private Enclosure largest(LettersAgainst sigma, double u) {
        Enclosure most = Enclosure.ZERO;
        for (int x = 0; x < outputs.letters(); x++) {
            most = most.max(sigma.norm(x, u));
        }
        return most;
    }

    /**
     * Bounds ln M.
     *
     * @param epsilon the error allowed
     * @return the bound; infinite if no output state was found that all letters are below
     */
    Information messages(double epsilon) {
        Enclosure cost = Enclosure.exact(epsilon).complement().ln().negate();
        Choice c = choice((norm, u) -> (n * norm + cost.midpoint()) / u);
        Enclosure best = bound(c.sigma, c.u, cost);
        Enclosure end = bound(c.sigma, 1, cost);
        return Information.ofNats(end.upperWide().compareTo(best.upperWide()) < 0 ? end : best)
                .withSource(THEOREM.toString());
    }

    private Enclosure bound(LettersAgainst sigma, double u, Enclosure cost) {
        return largest(sigma, u).times(n).plus(cost).dividedBy(Enclosure.exact(u));
    }

    /**
     * Bounds the average error from below: 1 − exp(n max_x N_x(u) − u ln M).
     *
     * @param messages M
     * @return the bound
     */
    Enclosure error(Enclosure messages) {
        Enclosure ln = messages.ln();
        double middle = ln.midpoint();
        Choice c = choice((norm, u) -> n * norm - u * middle);
        Enclosure best = success(c.sigma, c.u, ln);
        Enclosure end = success(c.sigma, 1, ln);
        return (end.upperWide().compareTo(best.upperWide()) < 0 ? end : best).complement();
    }

    private Enclosure success(LettersAgainst sigma, double u, Enclosure ln) {
        Enclosure exponent = largest(sigma, u).times(n).minus(ln.times(u));
        // above 1 nothing is said, and the exponential could be out of range
        return exponent.min(Enclosure.of(WideDouble.ZERO, WideDouble.ZERO)).exp();
    }

    private record Choice(LettersAgainst sigma, double u) {}

    private Choice choice(DoubleBinaryOperator objective) {
        if (chosen.isPresent()) {
            LettersAgainst sigma = outputs.against(chosen.get());
            double u = order(Unimodal.minimiser(
                    y -> objective.applyAsDouble(largest(sigma, order(y)).upper(), order(y)), LEAST, MOST));
            return new Choice(sigma, u);
        }
        Choice simple = mixture(objective);
        if (!outputs.isWellConditioned()) {
            return simple;
        }
        Choice found = search(objective);
        return value(objective, found) < value(objective, simple) ? found : simple;
    }

    private double value(DoubleBinaryOperator objective, Choice c) {
        return objective.applyAsDouble(largest(c.sigma, c.u).upper(), c.u);
    }

    /** The mixture of the letters at the input that the search starts from, the one of the capacity: near the best state for orders near one. */
    private Choice mixture(DoubleBinaryOperator objective) {
        LettersAgainst sigma = outputs.againstFlooredMixture(start);
        double y = Unimodal.minimiser(
                z -> objective.applyAsDouble(largest(sigma, order(z)).upper(), order(z)), LEAST, MOST, WIDTHS[0]);
        return new Choice(sigma, order(y));
    }

    private Choice search(DoubleBinaryOperator objective) {
        double[] p = start;
        double u = 0;
        AtomicReference<Optional<Operator>> near = new AtomicReference<>(Optional.empty());
        for (int round = 0; round < WIDTHS.length; round++) {
            double[] q = p;
            u = order(Unimodal.minimiser(
                    y -> {
                        Sandwich s = outputs.sandwich(order(y), q, near.get());
                        near.set(s.near());
                        return objective.applyAsDouble(s.norm(), order(y));
                    },
                    LEAST,
                    MOST,
                    WIDTHS[round]));
            p = RenyiInput.forSandwich(outputs, u, q, near.get());
        }
        return new Choice(outputs.sandwich(u, p, near.get()).sigma(), u);
    }
}
