package org.minorant.bounds;

import org.minorant.core.InvalidInputException;

/**
 * How many uses of a channel a fraction of its capacity C takes at an error ε. A code of n uses <em>reaches</em> the fraction φ if it has M messages, M a whole number or a power of two ({@link #unit()}), with ln M ≥ φnC, and an
 * average error of at most ε.
 *
 * <p><b>What is certified.</b> Some code of {@link #sure()} uses reaches the fraction: an achievability bound, enclosed, is at most ε at the least such M. No code of any n below {@link #impossibleBefore()} does: not only
 * those n are looked at for which the converse was evaluated. A code of n' uses is one of n ≥ n' uses that ignores the rest, so a converse ln M ≤ U(n) excludes every n' ≤ n for which the least such M is beyond U(n); such
 * intervals cover all n below. Where C is known only to a gap, the larger end counts for the one and the smaller for the other.
 *
 * <p><b>What is not.</b> Bounds rise with n on the whole, but not at every step. {@code sure} is the least n that was found, and a smaller one may be possible by the same bound; that every larger n is enough is not said.
 * {@code impossibleBefore} itself is the least n that the converse does not exclude.
 *
 * @param sure a number of uses at which some code reaches the fraction
 * @param impossibleBefore no smaller number of uses is enough for any code; at least 1, at most {@code sure}
 * @param fraction φ
 * @param error ε
 * @param unit what M is counted in
 * @param achievability the bound that reaches it
 * @param converse the bound that excludes smaller n
 */
public record BlockLength(
        int sure,
        int impossibleBefore,
        double fraction,
        double error,
        WholeUnit unit,
        Theorem achievability,
        Theorem converse) {

    /**
     * Checks the order.
     *
     * @param sure a number of uses at which some code reaches the fraction
     * @param impossibleBefore no smaller number of uses is enough
     * @param fraction φ
     * @param error ε
     * @param unit what M is counted in
     * @param achievability the bound that reaches it
     * @param converse the bound that excludes smaller n
     * @throws InvalidInputException if {@code impossibleBefore} is below 1 or beyond {@code sure}
     */
    public BlockLength {
        if (impossibleBefore < 1 || impossibleBefore > sure) {
            throw new InvalidInputException(
                    "BlockLength",
                    "impossible before " + impossibleBefore + ", sure at " + sure,
                    "the former between 1 and the latter",
                    "report this as a fault of the library");
        }
    }

    /** Both numbers in one line. */
    @Override
    public String toString() {
        return "impossible before " + impossibleBefore + " uses, sure with " + sure + " (" + fraction
                + " of capacity at error " + error + ", whole "
                + unit.name().toLowerCase(java.util.Locale.ROOT) + ")";
    }
}
