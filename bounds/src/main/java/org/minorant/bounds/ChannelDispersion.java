package org.minorant.bounds;

import java.util.Arrays;
import java.util.List;
import java.util.stream.IntStream;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.Estimate;

/**
 * The dispersion of a channel: the least and the largest of V(P) = Σ P(x) V(W_x‖σ) over the inputs P that attain the capacity, σ the output state that they share, in nats².
 *
 * <p><b>Definition.</b> The inputs that attain the capacity are those of output σ that use only letters of D(W_x‖σ) = C: a polytope, mostly one point. V is linear on it, so both ends are linear programs.
 *
 * <p><b>Accuracy.</b> Estimates: the capacity input is found, not known, so that which letters are optimal and which inputs have the same output is decided within 1e-7. Where the input is unique the error is about that of
 * the input, 1e-7 or better; where a letter is nearly optimal, both ends may be off by its share.
 *
 * <p>Sources: M. Tomamichel, V. Y. F. Tan, Commun. Math. Phys. 338, 103 (2015); Y. Polyanskiy, H. V. Poor, S. Verdú, IEEE Trans. Inf. Theory 56, 2307 (2010) (both from memory).
 *
 * @param least V_min, which counts for errors below ½
 * @param largest V_max, which counts for errors above ½
 */
public record ChannelDispersion(Estimate least, Estimate largest) {

    /** Divergences and outputs closer than this count as equal. */
    private static final double CLOSE = 1e-7;

    /**
     * Returns the dispersion of a channel.
     *
     * @param channel the channel
     * @return both ends; 0 for a channel of equal outputs
     */
    public static ChannelDispersion of(ClassicalQuantumChannel channel) {
        Capacity capacity = channel.capacity();
        double[] p = capacity.input();
        List<Enclosure> divergences = channel.structure().certify(p).divergences();
        double c = capacity.value().nats().midpoint();
        int[] optimal = IntStream.range(0, p.length)
                .filter(x -> p[x] > CLOSE || divergences.get(x).midpoint() >= c - CLOSE)
                .toArray();
        double[] variances = new double[optimal.length];
        double[] start = new double[optimal.length];
        double[][] outputs = new double[optimal.length][];
        for (int i = 0; i < optimal.length; i++) {
            DensityOperator w = channel.outputs().get(optimal[i]);
            variances[i] = Math.max(
                    0,
                    Divergences.relativeEntropyVariance(w, capacity.outputState())
                            .midpoint());
            start[i] = p[optimal[i]];
            outputs[i] = coordinates(w);
        }
        MixturePolytope same = MixturePolytope.of(outputs, InteriorSearch.normalised(start), CLOSE);
        return new ChannelDispersion(estimate(same.least(variances)), estimate(-same.least(negated(variances))));
    }

    /** The dispersion that counts at an error. */
    double at(double epsilon) {
        return (epsilon < 0.5 ? least : largest).value();
    }

    private static Estimate estimate(double v) {
        return Estimate.of(Enclosure.exact(Math.max(0, v)).widen(CLOSE * Math.max(0, v)));
    }

    private static double[] negated(double[] v) {
        return Arrays.stream(v).map(e -> -e).toArray();
    }

    /** Real coordinates of a Hermitian matrix; of a diagonal one, as all letters of a classical channel are, its diagonal. */
    private static double[] coordinates(DensityOperator w) {
        int n = w.dimension();
        if (DiagonalOutputs.isDiagonal(w)) {
            double[] d = new double[n];
            Arrays.setAll(d, i -> w.re(i, i));
            return d;
        }
        double[] c = new double[n * n];
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                c[i * n + j] = i <= j ? w.re(i, j) : w.im(i, j);
            }
        }
        return c;
    }
}
