package org.minorant.measurement;

import org.minorant.core.Enclosure;
import org.minorant.core.InvalidInputException;

/**
 * Finds the least n with P(n) ≤ target. P does not increase with n, as copies may be ignored; its logarithm is nearly linear, so that estimates at a few n lead there by interpolation. Only the
 * last two values are enclosed.
 */
final class CopiesSearch {

    private static final int MOST = 1 << 20;
    private static final double ROUGH = 1e-3;
    private static final double FINEST = 1e-14;

    private final HypothesisPair pair;
    private final double prior;
    private final double target;

    CopiesSearch(HypothesisPair pair, double prior, double target) {
        this.pair = pair;
        this.prior = prior;
        this.target = target;
    }

    CopiesNeeded run() {
        int n = guess();
        Enclosure at = error(n);
        while (!(at.upper() <= target)) {
            at = error(++n);
        }
        Enclosure before = error(n - 1);
        while (n > 1 && before.upper() <= target) {
            at = before;
            before = error(--n - 1);
        }
        return new CopiesNeeded(n, at, before, target);
    }

    /** The error at n copies, evaluated more closely if the target cannot be told from it; guessing for n = 0. */
    private Enclosure error(int n) {
        if (n == 0) {
            return Enclosure.exact(Math.min(prior, 1 - prior));
        }
        Enclosure e = pair.copies(n).minimumError(prior);
        return e.contains(target) ? pair.copies(n).withTolerance(FINEST).minimumError(prior) : e;
    }

    private double excess(int n) {
        double ln = n == 0
                ? Math.log(Math.min(prior, 1 - prior))
                : pair.copies(n)
                        .withTolerance(ROUGH)
                        .minimumErrorEstimate(prior)
                        .ln();
        return ln - Math.log(target);
    }

    /**
     * Refuses where even the trace distance T of one copy shows that too many copies are needed: Tr[pρ^⊗n ∧ (1−p)σ^⊗n] ≥ min(p, 1−p)(1 − nT), as the trace distance of n copies is at most nT.
     */
    private void refuseHopeless() {
        double distance = 1 - pair.traceMinimum(1).lower();
        double share = 1 - target / Math.min(prior, 1 - prior);
        if (share > 2.0 * MOST * distance) {
            throw tooMany("at " + MOST);
        }
    }

    private InvalidInputException tooMany(String where) {
        return new InvalidInputException(
                "HypothesisPair.copiesFor",
                "the error " + where + " copies is still above " + target,
                "at most " + MOST + " copies",
                "ask for a larger error, or check that the states differ");
    }

    private int guess() {
        refuseHopeless();
        int low = 0;
        double above = excess(0);
        int high = 1;
        double below = excess(high);
        while (below > 0) {
            if (high >= MOST) {
                throw tooMany("at " + high);
            }
            double slope = (above - below) / (high - low);
            // where the secant says, a little further; at least half as many again and at most eight times as many
            double wanted = high + 1.05 * below / slope + 1;
            double next = Math.min(8.0 * high, Math.max(1.5 * high + 1, wanted > 0 ? wanted : 8.0 * high));
            low = high;
            above = below;
            high = (int) Math.min(MOST, next);
            below = excess(high);
        }
        while (high - low > 1) {
            double x = low + (high - low) * above / (above - below);
            int mid = (int) Math.min(high - 1.0, Math.max(low + 1.0, Math.ceil(x)));
            double e = excess(mid);
            if (e > 0) {
                low = mid;
                above = e;
            } else {
                high = mid;
                below = e;
                // the curve bends: from the point just below, one step down usually settles it
                if (high - low > 1) {
                    double less = excess(high - 1);
                    if (less > 0) {
                        return high;
                    }
                    high = high - 1;
                    below = less;
                }
            }
        }
        return high;
    }
}
