package org.minorant.bounds;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.minorant.core.Enclosure;

/**
 * The functions E0(s, P) of one input, or of all inputs, which {@link ExponentSearch} maximises.
 *
 * <p>For every output state σ, E0(s, P) ≤ −(1+s) ln Σ P(x) exp ψ_x(s/(1+s)) ≤ Σ P(x) g_x(s) with g_x(s) = −(1+s) ψ_x(s/(1+s)), which is concave in s as the perspective of the convex ψ_x, with the slope −ψ_x −
 * ψ_x'/(1+s). For one input the middle term is of the same kind, with ψ = ln Σ P(x) exp ψ_x in place of ψ_x. At s = 0 the lines are those of E0(s, P) ≤ s Σ P(x) D(W_x‖σ).
 *
 * <p>g_x does not decrease in s, and ends at D(σ‖W_x): its cap.
 */
final class GallagerFamily implements ExponentFamily {

    private final ClassicalQuantumChannel channel;
    private final RenyiOutputs outputs;
    private final Optional<double[]> input;
    private final Optional<Double> last;
    private double[] near;

    /**
     * Takes the channel.
     *
     * @param channel the channel
     * @param input the input; empty for the best one at each s
     * @param last the largest s; empty if there is none
     */
    GallagerFamily(ClassicalQuantumChannel channel, Optional<double[]> input, Optional<Double> last) {
        this.channel = channel;
        this.outputs = channel.renyi();
        this.input = input;
        this.last = last;
        this.near = input.orElseGet(() -> channel.capacity().input());
    }

    /** The best input at s, or the chosen one. */
    double[] input(double s) {
        if (input.isEmpty()) {
            near = RenyiInput.forGallager(outputs, s, near);
        }
        return near;
    }

    @Override
    public Optional<Double> last() {
        return last;
    }

    @Override
    public ExponentPoint first() {
        List<ExponentLine> lines = new ArrayList<>();
        if (input.isPresent()) {
            lines.add(new ExponentLine(
                    Enclosure.ZERO, channel.mutualInformation(input.get()).nats()));
        } else {
            for (Enclosure d :
                    channel.structure().certify(channel.capacity().input()).divergences()) {
                lines.add(new ExponentLine(Enclosure.ZERO, d));
            }
        }
        double slope = input.isPresent()
                ? lines.get(0).slope().midpoint()
                : channel.capacity().value().nats().midpoint();
        return new ExponentPoint(0, Enclosure.ZERO, lines, slope, new Lazy<>(List::of));
    }

    @Override
    public ExponentPoint at(double s) {
        double[] p = input(s);
        LettersAgainst sigma = outputs.againstOptimum(s, p);
        double u = s / (1 + s);
        List<ExponentLine> letters = new ArrayList<>();
        List<LettersAgainst.Tangent> tangents = new ArrayList<>();
        for (int x = 0; x < p.length; x++) {
            Optional<LettersAgainst.Tangent> t = sigma.tangent(x, u);
            tangents.add(
                    t.orElse(new LettersAgainst.Tangent(Enclosure.exact(Double.NEGATIVE_INFINITY), Enclosure.ZERO)));
            letters.add(t.map(v -> line(v, u, s)).orElse(new ExponentLine(Enclosure.infinite(), Enclosure.ZERO)));
        }
        double slope = 0;
        for (int x = 0; x < p.length; x++) {
            slope += p[x] > 0 ? p[x] * letters.get(x).slope().midpoint() : 0;
        }
        List<ExponentLine> lines = letters;
        if (input.isPresent()) {
            ExponentLine mean = mean(p, tangents)
                    .map(t -> line(t, u, s))
                    .orElse(new ExponentLine(Enclosure.infinite(), Enclosure.ZERO));
            lines = List.of(mean);
            slope = mean.slope().midpoint();
        }
        return new ExponentPoint(s, outputs.gallager(s, p), lines, slope, new Lazy<>(() -> caps(sigma, p)));
    }

    /** The line of g at s from the tangent of ψ at a double near s/(1+s), which belongs to another s, close by. */
    private static ExponentLine line(LettersAgainst.Tangent t, double u, double s) {
        Enclosure rest = Enclosure.exact(u).complement();
        Enclosure g = t.value().negate().dividedBy(rest);
        Enclosure slope = t.value().plus(t.slope().times(rest)).negate();
        Enclosure off = Enclosure.exact(s).minus(Enclosure.exact(u).dividedBy(rest));
        return new ExponentLine(g.plus(slope.times(off)), slope);
    }

    /** The tangent of ln Σ P(x) exp ψ_x. */
    private static Optional<LettersAgainst.Tangent> mean(double[] p, List<LettersAgainst.Tangent> tangents) {
        Enclosure sum = Enclosure.ZERO;
        Enclosure first = Enclosure.ZERO;
        for (int x = 0; x < p.length; x++) {
            if (p[x] > 0) {
                Enclosure e = tangents.get(x).value().exp().times(p[x]);
                sum = sum.plus(e);
                first = first.plus(e.times(tangents.get(x).slope()));
            }
        }
        return sum.lowerWide().signum() > 0
                ? Optional.of(
                        new LettersAgainst.Tangent(sum.dividedBy(Traces.sum(p)).ln(), first.dividedBy(sum)))
                : Optional.empty();
    }

    private List<Enclosure> caps(LettersAgainst sigma, double[] p) {
        List<Enclosure> caps = new ArrayList<>();
        for (int x = 0; x < p.length; x++) {
            caps.add(sigma.reversed(x));
        }
        if (input.isEmpty()) {
            return caps;
        }
        Enclosure mean = Enclosure.ZERO;
        for (int x = 0; x < p.length; x++) {
            mean = p[x] > 0 ? mean.plus(caps.get(x).times(p[x])) : mean;
        }
        return List.of(mean.dividedBy(Traces.sum(p)));
    }

    @Override
    public Enclosure limit() {
        return Enclosure.ZERO;
    }

    /** E0(s, P)/s falls to −ln ‖Σ P(x) supp W_x‖ for growing s, so E0 keeps this slope. */
    @Override
    public Enclosure lastSlope(ExponentPoint far) {
        return outputs.zeroOrder(near);
    }
}
