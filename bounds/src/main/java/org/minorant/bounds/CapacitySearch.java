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
 * should vanish, which {@link InteriorSearch} does quickly.
 *
 * <p>Sources: H. Nagaoka, Algorithms of Arimoto-Blahut type for computing quantum channel capacity, Proc. ISIT (1998); H. Li, N. Cai, A Blahut-Arimoto type
 * algorithm for computing classical-quantum channel capacity, Proc. ISIT (2019) (both from memory).
 */
final class CapacitySearch {

    private static final int WARM_UP = 4;

    /** Letters less probable than this are tried without. */
    private static final double RARE = 1e-9;

    private final ChannelOutputs outputs;
    private final InteriorSearch search;

    private CapacitySearch(ChannelOutputs outputs) {
        this.outputs = outputs;
        this.search = new InteriorSearch(outputs::slope, InteriorSearch.ENOUGH);
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
        Slope s = search.noted(p);
        for (int step = 0; step < WARM_UP && search.gap() > InteriorSearch.ENOUGH; step++) {
            p = multiplied(p, s);
            search.count();
            s = search.noted(p);
        }
        search.interior(p, s, IntStream.range(0, p.length).toArray());
    }

    private static double[] multiplied(double[] p, Slope s) {
        double[] q = new double[p.length];
        double mean = s.mean(p);
        for (int x = 0; x < p.length; x++) {
            q[x] = p[x] * Math.exp(s.divergences()[x] - mean);
        }
        return InteriorSearch.normalised(q);
    }

    /** Certifies the input found, without the letters of vanishing probability if that costs nothing. */
    private Capacity finish() {
        double[] p = search.best();
        CapacityCertificate certificate = outputs.certify(p);
        double[] fewer = dropped(p, certificate);
        int[] active = IntStream.range(0, p.length).filter(x -> fewer[x] > 0).toArray();
        if (active.length < p.length) {
            search.restart();
            search.interior(fewer, search.noted(fewer), active);
            CapacityCertificate other = outputs.certify(search.best());
            if (other.gap() <= 2 * certificate.gap() + InteriorSearch.ENOUGH) {
                p = search.best();
                certificate = other;
            }
        }
        WideDouble low = certificate.mutualInformation().lowerWide();
        WideDouble high = certificate.capacityUpper().max(low);
        Information value = Information.ofNats(Enclosure.of(low, high))
                .withSource("mutual information of an input and largest divergence to its output");
        return new Capacity(value, p, outputs.mixtureState(p), search.iterations());
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
        return InteriorSearch.normalised(q);
    }
}
