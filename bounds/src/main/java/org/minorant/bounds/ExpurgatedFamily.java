package org.minorant.bounds;

import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;

/**
 * The expurgated function of an input, E(s, P) = −s ln Σ P(x) P(z) a_xz^(1/s), a_xz = Tr W_x^½ W_z^½, for s from 1 on.
 *
 * <p>With φ(v) = ln Σ P(x) P(z) e^(v ln a), convex, it is −s φ(1/s), concave in s, with the slope −φ + φ'/s. It rises to −φ'(0) = −Σ P(x) P(z) ln a if no two outputs are orthogonal; otherwise without end, with
 * the slope −φ(0) at last, the sum being over pairs that are not. Where a is known up to an enclosure, lines come from its lower end and values from its upper end: E falls with a.
 */
final class ExpurgatedFamily implements ExponentFamily {

    private final Enclosure[][] lnOverlaps;
    private final double[] p;

    ExpurgatedFamily(Enclosure[][] lnOverlaps, double[] p) {
        this.lnOverlaps = lnOverlaps;
        this.p = p;
    }

    /** ln Tr W_x^½ W_z^½ for all pairs; 0 on the diagonal. */
    static Enclosure[][] lnOverlaps(ClassicalQuantumChannel channel) {
        int k = channel.letters();
        Enclosure[][] ln = new Enclosure[k][k];
        for (int x = 0; x < k; x++) {
            LettersAgainst against = channel.renyi().againstLetter(x);
            for (int z = 0; z <= x; z++) {
                Enclosure v = x == z ? Enclosure.ZERO : against.psi(z, 0.5).min(Enclosure.ZERO);
                ln[x][z] = v;
                ln[z][x] = v;
            }
        }
        return ln;
    }

    /** Σ P(x) P(z) a^v f(ln a) over ΣΣ P(x) P(z), with one end of every a; pairs for which that is 0 are left out. */
    private Enclosure sum(Enclosure v, boolean upper, boolean times) {
        Enclosure sum = Enclosure.ZERO;
        for (int x = 0; x < p.length; x++) {
            for (int z = 0; z < p.length; z++) {
                WideDouble ln = upper ? lnOverlaps[x][z].upperWide() : lnOverlaps[x][z].lowerWide();
                if (p[x] > 0 && p[z] > 0 && !ln.isInfinite()) {
                    Enclosure l = Enclosure.of(ln, ln);
                    Enclosure term = l.times(v).exp().times(p[x]).times(p[z]);
                    sum = sum.plus(times ? term.times(l) : term);
                }
            }
        }
        return sum.dividedBy(Traces.sum(p).square());
    }

    @Override
    public ExponentPoint first() {
        return at(1);
    }

    @Override
    public Optional<Double> last() {
        return Optional.empty();
    }

    @Override
    public ExponentPoint at(double s) {
        Enclosure v = Enclosure.ONE.dividedBy(Enclosure.exact(s));
        Enclosure low = sum(v, false, false);
        Enclosure phi = low.ln();
        Enclosure slope = sum(v, false, true).dividedBy(low).times(v).minus(phi);
        Enclosure value = sum(v, true, false).ln().times(s).negate();
        ExponentLine line = new ExponentLine(phi.times(s).negate(), slope);
        Enclosure reached = Enclosure.of(
                value.lowerWide(), value.upperWide().max(line.value().upperWide()));
        return new ExponentPoint(s, reached, List.of(line), slope.midpoint(), new Lazy<>(() -> List.of(cap())));
    }

    private boolean isAnyInfinite(boolean upper) {
        for (int x = 0; x < p.length; x++) {
            for (int z = 0; z < p.length; z++) {
                WideDouble ln = upper ? lnOverlaps[x][z].upperWide() : lnOverlaps[x][z].lowerWide();
                if (p[x] > 0 && p[z] > 0 && ln.isInfinite()) {
                    return true;
                }
            }
        }
        return false;
    }

    private Enclosure cap() {
        return isAnyInfinite(false)
                ? Enclosure.infinite()
                : sum(Enclosure.ZERO, false, true).negate();
    }

    @Override
    public Enclosure limit() {
        return isAnyInfinite(true)
                ? Enclosure.ZERO
                : sum(Enclosure.ZERO, true, true).negate();
    }

    @Override
    public Enclosure lastSlope(ExponentPoint far) {
        return sum(Enclosure.ZERO, true, false).ln().negate().max(Enclosure.ZERO);
    }

    /**
     * Looks for an input of a large exponent: the least Σ P(x) P(z) a^(1/s), which need not be convex, by a replicator's steps from the inputs given, at the s that is the best for each in turn.
     *
     * @param lnOverlaps ln a
     * @param rate the rate in nats
     * @param starts where to start
     * @return the best input found
     */
    static double[] search(Enclosure[][] lnOverlaps, double rate, List<double[]> starts) {
        double[] best = starts.get(0);
        double most = Double.NEGATIVE_INFINITY;
        for (double[] start : starts) {
            double[] p = start;
            for (int round = 0; round < 4; round++) {
                double[] q = p;
                double v = Unimodal.minimiser(t -> -height(lnOverlaps, q, t, rate), 1e-4, 1, 1e-4);
                double reached = height(lnOverlaps, q, v, rate);
                if (reached > most * (1 + 1e-12)) {
                    most = reached;
                    best = q;
                }
                p = replicated(lnOverlaps, p, v);
            }
        }
        return best;
    }

    private static double height(Enclosure[][] ln, double[] p, double v, double rate) {
        double sum = 0;
        for (int x = 0; x < p.length; x++) {
            sum += p[x] * row(ln[x], p, v);
        }
        return (-Math.log(sum) - rate) / v;
    }

    private static double row(Enclosure[] ln, double[] p, double v) {
        double sum = 0;
        for (int z = 0; z < p.length; z++) {
            sum += p[z] == 0 ? 0 : p[z] * Math.exp(v * ln[z].upper());
        }
        return sum;
    }

    /** P(x) ← P(x) Σ_z P(z) (1 − a^v) over its mean, which never lowers that mean (Baum and Eagon). */
    private static double[] replicated(Enclosure[][] ln, double[] start, double v) {
        double[] p = start;
        for (int step = 0; step < 300; step++) {
            double[] q = new double[p.length];
            double mean = 0;
            for (int x = 0; x < p.length; x++) {
                q[x] = p[x] * Math.max(0, 1 - row(ln[x], p, v));
                mean += q[x];
            }
            if (!(mean > 0)) {
                return p;
            }
            double move = 0;
            q = InteriorSearch.normalised(q);
            for (int x = 0; x < p.length; x++) {
                move = Math.max(move, Math.abs(q[x] - p[x]));
            }
            p = q;
            if (move < 1e-12) {
                break;
            }
        }
        return Arrays.copyOf(p, p.length);
    }
}
