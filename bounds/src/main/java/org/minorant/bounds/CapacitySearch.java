package org.minorant.bounds;

import java.util.Arrays;
import java.util.stream.IntStream;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;
import org.minorant.core.WideDouble;

/**
 * Maximises the mutual information over inputs: a few Blahut–Arimoto steps, then a primal-dual interior-point method, then the same on the letters that
 * are worth using. Nothing here is trusted: {@link CapacityCertificate} encloses what comes out.
 *
 * <p>A Blahut–Arimoto step multiplies P(x) by exp D(W_x‖ρ_P) and normalises; it never lowers the mutual information, but slows down where letters
 * should vanish. The interior-point method solves D(W_x‖ρ_P) + z_x = c, P(x) z_x = μ for falling μ by Newton steps, so that letters that should vanish
 * do so quickly.
 *
 * <p>Sources: H. Nagaoka, Algorithms of Arimoto-Blahut type for computing quantum channel capacity, Proc. ISIT (1998); H. Li, N. Cai, A Blahut-Arimoto type
 * algorithm for computing classical-quantum channel capacity, Proc. ISIT (2019); S. J. Wright, Primal-Dual Interior-Point Methods (1997) (all from
 * memory).
 */
final class CapacitySearch {

    private static final int WARM_UP = 4;
    private static final int MOST_STEPS = 100;

    /** A gap in nats below which rounding rules. */
    private static final double ENOUGH = 4e-15;

    /** Steps in vain before the search gives up. */
    private static final int PATIENCE = 6;

    /** Letters less probable than this are tried without. */
    private static final double RARE = 1e-9;

    private final ChannelOutputs outputs;
    private double[] best;
    private double bestGap = Double.POSITIVE_INFINITY;
    private int iterations;

    private CapacitySearch(ChannelOutputs outputs) {
        this.outputs = outputs;
    }

    static Capacity of(int letters, ChannelOutputs outputs) {
        CapacitySearch search = new CapacitySearch(outputs);
        double[] p = new double[letters];
        Arrays.fill(p, 1.0 / p.length);
        search.run(p);
        return search.finish();
    }

    private void run(double[] start) {
        double[] p = start;
        Slope s = noted(p);
        for (int step = 0; step < WARM_UP && bestGap > ENOUGH; step++) {
            p = multiplied(p, s);
            iterations++;
            s = noted(p);
        }
        interior(p, s, IntStream.range(0, p.length).toArray());
    }

    /** The slope at a distribution, which is kept if it is the best so far. */
    private Slope noted(double[] p) {
        Slope s = outputs.slope(p);
        double gap = s.gap(p);
        if (gap < bestGap) {
            bestGap = gap;
            best = p.clone();
        }
        return s;
    }

    private static double[] multiplied(double[] p, Slope s) {
        double[] q = new double[p.length];
        double mean = s.mean(p);
        for (int x = 0; x < p.length; x++) {
            q[x] = p[x] * Math.exp(s.divergences()[x] - mean);
        }
        return normalised(q);
    }

    private static double[] normalised(double[] q) {
        double sum = 0;
        for (double v : q) {
            sum += v;
        }
        double[] p = new double[q.length];
        for (int x = 0; x < q.length; x++) {
            p[x] = q[x] / sum;
        }
        return p;
    }

    /** Newton steps on the letters of the given list; the others keep probability zero. */
    private void interior(double[] start, Slope startSlope, int[] active) {
        int k = active.length;
        double[] p = start;
        Slope s = startSlope;
        double mu = Math.max(1e-12, s.gap(p)) / k;
        double[] z = new double[k];
        double c = s.mean(p) + mu * k;
        for (int x = 0; x < k; x++) {
            z[x] = Math.max(mu / p[active[x]], c - s.divergences()[active[x]]);
        }
        int vain = 0;
        while (iterations < MOST_STEPS && vain < PATIENCE && bestGap > ENOUGH) {
            double[] inside = new double[k];
            double complementarity = 0;
            for (int x = 0; x < k; x++) {
                inside[x] = p[active[x]];
                complementarity += inside[x] * z[x] / k;
            }
            mu = Math.max(1e-18, Math.min(0.1 * complementarity, 10 * complementarity * complementarity));
            InteriorStep step = InteriorStep.of(s.restricted(active), inside, z, mu);
            double along = step.longest(inside, step.dp());
            double dual = step.longest(z, step.dz());
            double[] q = new double[p.length];
            for (int x = 0; x < k; x++) {
                q[active[x]] = inside[x] + along * step.dp()[x];
                z[x] += dual * step.dz()[x];
            }
            p = normalised(q);
            iterations++;
            double before = bestGap;
            s = noted(p);
            vain = bestGap < 0.9 * before ? 0 : vain + 1;
        }
    }

    /** Certifies the input found, without the letters of vanishing probability if that costs nothing. */
    private Capacity finish() {
        double[] p = best;
        CapacityCertificate certificate = outputs.certify(p);
        double[] fewer = dropped(p, certificate);
        int[] active = IntStream.range(0, p.length).filter(x -> fewer[x] > 0).toArray();
        if (active.length < p.length) {
            bestGap = Double.POSITIVE_INFINITY;
            interior(fewer, noted(fewer), active);
            CapacityCertificate other = outputs.certify(best);
            if (other.gap() <= 2 * certificate.gap() + ENOUGH) {
                p = best;
                certificate = other;
            }
        }
        WideDouble low = certificate.mutualInformation().lowerWide();
        WideDouble high = certificate.capacityUpper().max(low);
        Information value = Information.ofNats(Enclosure.of(low, high))
                .withSource("mutual information of an input and largest divergence to its output");
        return new Capacity(value, p, outputs.mixtureState(p), iterations);
    }

    /** Zero where the probability is tiny and the divergence falls short of the largest one. */
    private static double[] dropped(double[] p, CapacityCertificate certificate) {
        double[] q = p.clone();
        double most = certificate.capacityUpper().toDoubleUp();
        for (int x = 0; x < p.length; x++) {
            double shortfall = most - certificate.divergences().get(x).upper();
            if (p[x] < RARE && p[x] * 1e3 < shortfall) {
                q[x] = 0;
            }
        }
        return normalised(q);
    }
}
