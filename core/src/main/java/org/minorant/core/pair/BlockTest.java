package org.minorant.core.pair;

import org.minorant.core.WideDouble;

/**
 * What the optimal test between aA and bB does in one block: an estimate, for simulations.
 *
 * @param order the order k of the block, for qubits twice its total spin; 0 for a pair that is not made of such blocks
 * @param firstTrace the trace of A in the block, multiplicity included, without the weight a
 * @param secondTrace the trace of B in the block
 * @param firstAccepted the probability that the test accepts A given A and this block
 * @param secondAccepted the probability that the test accepts A given B and this block
 */
public record BlockTest(
        int order, WideDouble firstTrace, WideDouble secondTrace, double firstAccepted, double secondAccepted) {

    /** Weights are changed by this part to find the slope of f. */
    static final double STEP = 1e-4;

    /**
     * The test of a block from f at the weights a(1 − h), a and a(1 + h), h = {@link #STEP}: its type-I error, weighted by a, is the slope a ∂f/∂a, and its type-II error the rest of f.
     */
    static BlockTest fromSlope(
            int order,
            WideDouble first,
            WideDouble second,
            WideDouble[] f,
            WideDouble weightedA,
            WideDouble weightedB) {
        WideDouble slope = f[2].plusDown(f[0].negate()).dividedByDown(WideDouble.of(2 * STEP));
        double missed = share(slope, weightedA);
        double wrong = share(f[1].plusDown(slope.negate()), weightedB);
        return new BlockTest(order, first, second, 1 - missed, wrong);
    }

    private static double share(WideDouble part, WideDouble whole) {
        if (part.signum() <= 0 || whole.signum() <= 0) {
            return 0;
        }
        return part.compareTo(whole) >= 0 ? 1 : part.dividedByDown(whole).toDoubleDown();
    }
}
