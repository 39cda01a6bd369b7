package org.minorant.bounds;

import java.util.Arrays;
import java.util.Optional;
import java.util.concurrent.atomic.AtomicReference;
import java.util.function.Function;
import java.util.stream.IntStream;
import org.minorant.core.Operator;

/**
 * Searches the input that is the best at an order α: Q_x = Tr W_x^α σ^(1−α) (Petz, α &lt; 1) or Tr (σ^(−u/2) W_x σ^(−u/2))^α (sandwiched, α &gt; 1) at the best output state σ of the input.
 *
 * <p>The information of order α is a monotone function of max over σ (α &lt; 1) or min over σ (α &gt; 1) of Σ P(x) Q_x(σ): convex in P, or concave, with the gradient Q_x at the best σ. So
 * {@link InteriorSearch} finds it, with differences in place of second derivatives. What it finds is a choice, and needs no proof.
 */
final class RenyiInput {

    /** Steps of differences; second derivatives need a few digits only. */
    private static final double STEP = 1e-6;

    /** With more letters than this, second derivatives take too long, and the start is returned. */
    private static final int MOST_LETTERS = 64;

    /** A gap that is small enough: slopes are rounded to a few 1e-14 over the distance of the order from one. */
    private static final double ENOUGH = 2e-13;

    /** Every letter starts with at least this part of an equal share. */
    private static final double SHARE = 0.1;

    /** Letters less probable than this, and than this part of what they fall short, are tried without. */
    private static final double RARE = 1e-3;

    /** Further runs at most. */
    private static final int RUNS = 2;

    private RenyiInput() {}

    /** Q_x e^(−lnScale). */
    private record Scaled(double[] traces, double lnScale) {}

    /** The best input for E0(s, ·). */
    static double[] forGallager(RenyiOutputs outputs, double s, double[] start) {
        return best(p -> new Scaled(outputs.traces(s, p), 0), -(1 + s) / s, start);
    }

    /** The best input for the sandwiched information of order 1/(1−u). */
    static double[] forSandwich(RenyiOutputs outputs, double u, double[] start, Optional<Operator> near) {
        // every state starts from the one before
        AtomicReference<Optional<Operator>> last = new AtomicReference<>(near);
        return best(
                p -> {
                    Sandwich s = outputs.sandwich(u, p, last.get());
                    last.set(s.near());
                    return new Scaled(s.traces(), s.lnScale());
                },
                (1 - u) / u,
                start);
    }

    private static double[] best(Function<double[], Scaled> traces, double scale, double[] start) {
        int k = start.length;
        if (k == 1 || k > MOST_LETTERS) {
            return start;
        }
        double[] p = new double[k];
        Arrays.setAll(p, x -> (1 - SHARE) * start[x] + SHARE / k);
        InteriorSearch search = new InteriorSearch(q -> slope(traces, scale, q), ENOUGH);
        double[] equal = new double[k];
        Arrays.fill(equal, 1.0 / k);
        Slope atEqual = search.noted(equal);
        if (search.gap() <= ENOUGH) {
            return equal;
        }
        int[] all = IntStream.range(0, k).toArray();
        search.interior(p, Arrays.equals(p, equal) ? atEqual : search.noted(p), all);
        Slope there = slope(traces, scale, search.best());
        double[] fewer = worthwhile(there.divergences(), search.best());
        int[] active = IntStream.range(0, k).filter(x -> fewer[x] > 0).toArray();
        if (active.length < k) {
            search.interior(fewer, search.noted(fewer), active);
        }
        // where letters should vanish, or differ little, the first run may end early; another from inside goes on
        for (int again = 0; again < RUNS && search.gap() > ENOUGH; again++) {
            double share = SHARE * Math.pow(0.1, again + 1);
            double[] best = search.best();
            double[] inside = new double[k];
            Arrays.setAll(inside, x -> (1 - share) * best[x] + share / k);
            search.interior(inside, search.noted(inside), all);
        }
        return search.best();
    }

    /** The input without rare letters that fall short: powers of the mixture bend sharply where such a letter brings a dimension of its own, so that steps would crawl. */
    private static double[] worthwhile(double[] d, double[] p) {
        double most = Arrays.stream(d).max().orElse(0);
        double[] q = new double[p.length];
        Arrays.setAll(q, x -> p[x] < RARE && p[x] < RARE * (most - d[x]) ? 0 : p[x]);
        return InteriorSearch.normalised(q);
    }

    /** Scaled such that the gradient is about that of the information itself, for orders near one. */
    private static Slope slope(Function<double[], Scaled> traces, double scale, double[] p) {
        int k = p.length;
        Scaled here = traces.apply(p);
        double[] q = here.traces;
        double mean = 0;
        for (int x = 0; x < k; x++) {
            mean += p[x] * q[x];
        }
        double[] d = new double[k];
        for (int x = 0; x < k; x++) {
            d[x] = scale * (q[x] / mean - 1);
        }
        double[][] curvature = new double[k][k];
        for (int z = 0; z < k; z++) {
            double[] moved = p.clone();
            moved[z] += STEP;
            Scaled there = traces.apply(moved);
            double factor = Math.exp(there.lnScale - here.lnScale);
            for (int x = 0; x < k; x++) {
                double c = -scale * (factor * there.traces[x] - q[x]) / (STEP * mean);
                curvature[x][z] += 0.5 * c;
                curvature[z][x] += 0.5 * c;
            }
        }
        return new Slope(d, curvature);
    }
}
