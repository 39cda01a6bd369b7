package org.minorant.measurement;

import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.HermitianOperator;
import org.minorant.core.InvalidInputException;

/**
 * A test between two states ρ and σ: an operator 0 ≤ T ≤ 1 that accepts the first state with probability Tr ρT; it may be randomised, that is,
 * have eigenvalues strictly between 0 and 1.
 *
 * <p><b>Errors.</b> Type I: ρ is taken for σ, Tr ρ(1−T). Type II: σ is taken for ρ, Tr σT. Both are enclosed for exactly the operator stored and the states
 * as they are, to about 30 digits before they are rounded outward. Since T is stored in doubles, an error far below 1e-16 reflects the rounding of
 * T: the smallest errors possible come from {@link HypothesisPair}, which needs no explicit test.
 *
 * <p>T may leave the range from 0 to 1 by rounding; {@link #defect()} bounds by how much. Immutable and thread-safe.
 */
public final class BinaryTest {

    private final HermitianOperator operator;
    private final Enclosure typeOneError;
    private final Enclosure typeTwoError;
    private final double defect;

    private BinaryTest(HermitianOperator operator, Enclosure typeOneError, Enclosure typeTwoError, double defect) {
        this.operator = operator;
        this.typeOneError = typeOneError;
        this.typeTwoError = typeTwoError;
        this.defect = defect;
    }

    /**
     * Returns a test between two states.
     *
     * @param operator T, which accepts the first state; if it is a {@link org.minorant.core.PositiveOperator} defined by its factor, that factor says
     *     which operator is meant, otherwise its entries do
     * @param first ρ
     * @param second σ
     * @return the test with its errors
     * @throws InvalidInputException if the dimensions differ, or T or 1 − T has an eigenvalue below −n · 2^-48 of its norm
     */
    public static BinaryTest of(HermitianOperator operator, DensityOperator first, DensityOperator second) {
        String asked = "BinaryTest.of";
        Checks.dimension(asked, "the second state", second, first.dimension());
        Checks.dimension(asked, "the test operator", operator, first.dimension());
        Effect accept = Effect.of(asked, "the test operator", operator);
        HermitianOperator rest =
                HermitianOperator.identity(operator.dimension()).minus(operator);
        // the rounded 1 − T differs from the exact one by at most 2^-53 in each diagonal entry, and as the entries do
        // from T
        double excess = Effect.negativity(asked, "one minus the test operator", rest)
                + operator.dimension() * 0x1p-53
                + accept.slack();
        return new BinaryTest(
                operator,
                atMost(BornRule.probability(first, accept.complement(excess)), first, accept.negativity()),
                atMost(BornRule.probability(second, accept), second, excess),
                Math.max(accept.negativity(), excess));
    }

    /** Tr ρT ≤ (1 + δ) Tr ρ for T ≤ 1 + δ. */
    private static Enclosure atMost(Enclosure p, DensityOperator state, double defect) {
        Enclosure most = state.traceEnclosure().times(Enclosure.ONE.plus(Enclosure.exact(defect)));
        return Enclosure.of(p.lowerWide().min(most.upperWide()), p.upperWide().min(most.upperWide()));
    }

    /**
     * Returns T, the operator that accepts the first state.
     *
     * @return the operator as stored
     */
    public HermitianOperator operator() {
        return operator;
    }

    /**
     * Returns the probability of taking the first state for the second.
     *
     * @return Tr ρ(1−T)
     */
    public Enclosure typeOneError() {
        return typeOneError;
    }

    /**
     * Returns the probability of taking the second state for the first.
     *
     * @return Tr σT
     */
    public Enclosure typeTwoError() {
        return typeTwoError;
    }

    /**
     * Returns the mean error p Tr ρ(1−T) + (1−p) Tr σT.
     *
     * @param prior p, the prior of the first state, between 0 and 1
     * @return the mean error; at least {@link HypothesisPair#minimumError} for every test with defect 0
     * @throws InvalidInputException if the prior is not between 0 and 1
     */
    public Enclosure meanError(double prior) {
        Checks.inRange("BinaryTest.meanError", "the prior", prior, 0, 1);
        Enclosure p = Enclosure.exact(prior);
        return typeOneError.times(p).plus(typeTwoError.times(p.complement()));
    }

    /**
     * Returns how far T may leave the range from 0 to 1: a bound on the trace norms of the negative parts of T and of 1 − T.
     *
     * @return the defect, which is 0 or of the size of rounding
     */
    public double defect() {
        return defect;
    }

    /** The two errors, with certain digits only. */
    @Override
    public String toString() {
        return "BinaryTest, type I " + typeOneError + ", type II " + typeTwoError;
    }
}
