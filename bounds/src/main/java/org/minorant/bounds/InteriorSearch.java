package org.minorant.bounds;

import java.util.function.Function;

/**
 * Maximises a concave function of a distribution by a primal-dual interior-point method, from its slopes.
 *
 * <p>It solves g_x + z_x = c, P(x) z_x = μ, with g the gradient, for falling μ by Newton steps, so that letters that should vanish do so quickly. What it finds is a choice, and needs no proof.
 *
 * <p>Source: S. J. Wright, Primal-Dual Interior-Point Methods (1997) (from memory).
 */
final class InteriorSearch {

    /** A gap in nats below which rounding rules. */
    static final double ENOUGH = 4e-15;

    private static final int MOST_STEPS = 100;

    /** Steps in vain before the search gives up. */
    private static final int PATIENCE = 6;

    private final Function<double[], Slope> slopes;
    private final double enough;
    private double[] best;
    private double bestGap = Double.POSITIVE_INFINITY;
    private int iterations;

    /**
     * Starts a search.
     *
     * @param slopes first and second derivatives at a distribution, all entries positive
     * @param enough a gap that is small enough, at least {@link #ENOUGH}
     */
    InteriorSearch(Function<double[], Slope> slopes, double enough) {
        this.slopes = slopes;
        this.enough = enough;
    }

    /** The distribution of the least gap so far. */
    double[] best() {
        return best;
    }

    /** What is left to gain there at most, as far as rounding lets see. */
    double gap() {
        return bestGap;
    }

    /** The number of steps so far. */
    int iterations() {
        return iterations;
    }

    /** Counts a step that was taken outside. */
    void count() {
        iterations++;
    }

    /** Forgets the best distribution, for a search of fewer letters. */
    void restart() {
        bestGap = Double.POSITIVE_INFINITY;
    }

    /** The slope at a distribution, which is kept if it is the best so far. */
    Slope noted(double[] p) {
        Slope s = slopes.apply(p);
        double gap = s.gap(p);
        if (gap < bestGap) {
            bestGap = gap;
            best = p.clone();
        }
        return s;
    }

    /** Newton steps on the letters of the given list; the others keep probability zero. */
    void interior(double[] start, Slope startSlope, int[] active) {
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
        while (iterations < MOST_STEPS && vain < PATIENCE && bestGap > enough) {
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
            if (Double.isNaN(p[active[0]])) {
                // slopes known to few digits may make a step that leads nowhere
                return;
            }
            double before = bestGap;
            s = noted(p);
            vain = bestGap < 0.9 * before ? 0 : vain + 1;
        }
    }

    /** The entries over their sum. */
    static double[] normalised(double[] q) {
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
}
