package org.minorant.bounds;

import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.HermitianOperator;
import org.minorant.core.Information;
import org.minorant.core.KrausChannel;
import org.minorant.core.SpectralDecomposition;
import org.minorant.core.WideDouble;

/**
 * Maximises I(ρ) = S(ρ) + S(N(ρ)) − S(N^c(ρ)), which is concave in ρ, by steps ρ ∝ exp(ln ρ + sG(ρ)) along its derivative G. At s = 1 this is the algorithm of Blahut and Arimoto, which never lowers I; longer
 * steps follow from the last two derivatives (J. Barzilai, J. M. Borwein, IMA J. Numer. Anal. 8, 141, 1988). Nothing here is trusted: {@link AssistedCapacityCertificate} encloses what comes out.
 *
 * <p>Source: N. Ramakrishnan, R. Iten, V. B. Scholz, M. Berta, IEEE Trans. Inf. Theory 67, 946 (2021) (from memory).
 */
final class AssistedCapacitySearch {

    private static final int MOST_STEPS = 400;

    /** A gap in nats below which rounding rules. */
    private static final double ENOUGH = 4e-15;

    /** Steps in vain before the search gives up. */
    private static final int PATIENCE = 40;

    /** Logarithms are taken of no less than this part of the largest eigenvalue. */
    private static final double LEAST = 1e-18;

    private final KrausChannel channel;
    private final KrausChannel complementary;

    private AssistedCapacitySearch(KrausChannel channel) {
        this.channel = channel;
        this.complementary = channel.complementary();
    }

    static AssistedCapacity of(KrausChannel channel) {
        int d = channel.inputDimension();
        AssistedInput uniform = AssistedInput.maximallyMixed(d);
        AssistedCapacityCertificate first = AssistedCapacityCertificate.of(channel, uniform);
        AssistedCapacitySearch search = new AssistedCapacitySearch(channel);
        Found found = search.run(HermitianOperator.identity(d).times(1.0 / d));
        if (found.steps() == 0) {
            return result(first, uniform, 0);
        }
        AssistedInput input = AssistedInput.of(found.state());
        AssistedCapacityCertificate best = AssistedCapacityCertificate.of(channel, input);
        return best.gap() < first.gap() ? result(best, input, found.steps()) : result(first, uniform, found.steps());
    }

    private static AssistedCapacity result(AssistedCapacityCertificate c, AssistedInput input, int steps) {
        // both ends are certified: if they crossed, one would be wrong, and the enclosure refuses that
        WideDouble low = c.below().lowerWide();
        Information value = Information.ofNats(Enclosure.of(low, c.above()))
                .withSource("mutual information of an input and largest eigenvalue of its derivative");
        return new AssistedCapacity(value, input.state(), steps);
    }

    /** The best state met, and after how many steps it was. */
    private record Found(DensityOperator state, int steps) {}

    private Found run(HermitianOperator start) {
        HermitianOperator rho = start;
        HermitianOperator theta = logarithm(rho);
        HermitianOperator g = gradient(rho);
        HermitianOperator best = rho;
        double bestGap = gap(rho, g);
        int bestStep = 0;
        double s = 1;
        int vain = 0;
        for (int step = 1; step <= MOST_STEPS && vain < PATIENCE && bestGap > ENOUGH; step++) {
            HermitianOperator move = centred(g).times(s);
            theta = theta.plus(move);
            rho = exponential(theta);
            HermitianOperator next = gradient(rho);
            double bend = product(move, centred(next.minus(g)));
            s = bend < 0 ? Math.max(0.5, Math.min(1e3, -product(move, move) / bend)) : 1;
            g = next;
            double gap = gap(rho, g);
            if (gap < bestGap) {
                vain = gap < 0.9 * bestGap ? 0 : vain + 1;
                bestGap = gap;
                best = rho;
                bestStep = step;
            } else {
                vain++;
            }
        }
        return new Found(DensityOperator.nearest(best).operator(), bestStep);
    }

    /** G = −ln ρ − N*(ln N(ρ)) + N^c*(ln N^c(ρ)); Tr ρG = I(ρ). */
    private HermitianOperator gradient(HermitianOperator rho) {
        return complementary
                .applyAdjoint(logarithm(complementary.apply(rho)))
                .minus(channel.applyAdjoint(logarithm(channel.apply(rho))))
                .minus(logarithm(rho));
    }

    private static double gap(HermitianOperator rho, HermitianOperator g) {
        double[] values = g.eigenvalues();
        return values[values.length - 1] - product(rho, g);
    }

    private static HermitianOperator logarithm(HermitianOperator a) {
        SpectralDecomposition s = a.spectralDecomposition();
        double least = LEAST * s.norm();
        return s.apply(x -> Math.log(Math.max(x, least)));
    }

    private static HermitianOperator exponential(HermitianOperator theta) {
        SpectralDecomposition s = theta.spectralDecomposition();
        double[] values = s.eigenvalues();
        double most = values[values.length - 1];
        double sum = 0;
        for (double v : values) {
            sum += Math.exp(v - most);
        }
        double total = sum;
        return s.apply(x -> Math.exp(x - most) / total);
    }

    private static HermitianOperator centred(HermitianOperator a) {
        return a.minus(HermitianOperator.identity(a.dimension()).times(a.trace().re() / a.dimension()));
    }

    /** Re Tr AB. */
    private static double product(HermitianOperator a, HermitianOperator b) {
        double s = 0;
        for (int i = 0; i < a.dimension(); i++) {
            for (int j = 0; j < a.dimension(); j++) {
                s += a.re(i, j) * b.re(i, j) + a.im(i, j) * b.im(i, j);
            }
        }
        return s;
    }
}
