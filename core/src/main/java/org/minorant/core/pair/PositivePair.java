package org.minorant.core.pair;

import java.util.List;
import org.minorant.core.Enclosure;
import org.minorant.core.Estimate;
import org.minorant.core.InvalidInputException;
import org.minorant.core.PositiveOperator;
import org.minorant.core.WideDouble;

/**
 * A pair (A, B) of positive operators on one space, known by its trace-minimum curve
 *
 * <pre>f(t) = Tr[A ∧ tB],   A ∧ B = ½(A + B − |A − B|),   t ≥ 0.</pre>
 *
 * <p>A ∧ B is the Hermitian operator of largest trace below both A and B. f is concave and nondecreasing with f(0) = 0 and f(t) ≤
 * min(Tr A, t Tr B). Nearly every number of this library is a value, a root or a Legendre transform of f.
 *
 * <p><b>Accuracy.</b> Every value is enclosed; the relative width is a few 1e-16 where the operators' data fix the answer to relative
 * accuracy (diagonal matrices, kets, factors, well-conditioned positive matrices, blocks of these), and about 1e-15 · d of the traces,
 * absolutely, otherwise.
 *
 * <p>Structure (blocks, diagonal form, low rank) is found by {@link #of}. Immutable and thread-safe.
 *
 * <p>Source: A. S. Holevo, J. Multivariate Anal. 3, 337 (1973); C. W. Helstrom, Quantum Detection and Estimation Theory (1976), ch. IV (both from
 * memory).
 */
public abstract sealed class PositivePair
        permits CommutingCopies,
                CommutingPair,
                CommutingProducts,
                DensePair,
                DirectSumPair,
                FactorPair,
                RankOneCopies,
                RankOnePair,
                RankOneProducts,
                SpinBlocksPair,
                SpinProductsPair,
                UnitaryBlocksPair {

    /** For the kinds in this package. */
    PositivePair() {}

    /**
     * Returns the pair of two positive operators in the cheapest exact form that their structure allows.
     *
     * @param a the first operator
     * @param b the second operator, on the same space
     * @return the pair
     * @throws InvalidInputException if the dimensions differ
     */
    public static PositivePair of(PositiveOperator a, PositiveOperator b) {
        if (a.dimension() != b.dimension()) {
            throw new InvalidInputException(
                    "PositivePair.of",
                    "the second operator has dimension " + b.dimension(),
                    a.dimension() + ", as the first",
                    "both must act on the same space");
        }
        return PairStructure.find(a, b);
    }

    /**
     * Returns the direct sum ⊕ w_i (A_i, B_i) of pairs with common weights; its curve is Σ w_i f_i(t).
     *
     * @param pairs the summands, at least one
     * @param weights as many weights, each at least 0 and finite
     * @return the direct sum
     * @throws InvalidInputException if the list is empty, the lengths differ or a weight is negative or not finite
     */
    public static PositivePair directSum(List<? extends PositivePair> pairs, double[] weights) {
        return DirectSumPair.of(pairs, weights);
    }

    /**
     * Returns the pair A₁^⊗n₁ ⊗ A₂^⊗n₂ ⊗ … against B₁^⊗n₁ ⊗ B₂^⊗n₂ ⊗ …: n₁ copies of one pair with n₂ of another, and so on. The order of the factors makes no difference.
     *
     * <p>{@link PairPowers} says what is known, and how accurately.
     *
     * @param first A₁, A₂, …
     * @param second B₁, B₂, …, as many
     * @param copies n₁, n₂, …, as many, each at least 1
     * @return the pair
     * @throws InvalidInputException if the lists differ in length or are empty, dimensions do, a number is below 1, or there are too many products of blocks, types or dimensions
     */
    public static PositivePair ofPowers(
            List<? extends PositiveOperator> first, List<? extends PositiveOperator> second, int... copies) {
        if (copies.length != first.size() || java.util.Arrays.stream(copies).anyMatch(n -> n < 1)) {
            throw new InvalidInputException(
                    "PositivePair.ofPowers",
                    first.size() + " operators with numbers of copies " + java.util.Arrays.toString(copies),
                    "as many of each, and at least 1 copy",
                    "give a number of copies for every factor");
        }
        return PairPowers.of(first, second).pair(copies);
    }

    /**
     * Returns the pair of two commuting operators given by their eigenvalues in a common basis.
     *
     * @param a eigenvalues of A, each at least 0 and finite
     * @param b eigenvalues of B to the same vectors
     * @return the pair
     * @throws InvalidInputException if the lengths differ or are zero, or an eigenvalue is negative or not finite
     */
    public static PositivePair ofSpectra(double[] a, double[] b) {
        return CommutingPair.of(a, b);
    }

    /**
     * Returns the pair of a rank-one operator A = ψψ* and an operator B of which only the spectral measure in ψ is given: B = Σ b_i |v_i⟩⟨v_i| on the span that ψ = Σ √w_i v_i meets.
     *
     * @param weights w_i = |⟨v_i,ψ⟩|², each at least 0 and finite
     * @param values b_i, each at least 0 and finite
     * @return the pair
     * @throws InvalidInputException if the lengths differ or are zero, or a number is negative or not finite
     */
    public static PositivePair ofSpectralMeasure(double[] weights, double[] values) {
        return RankOnePair.ofMeasure(weights, values);
    }

    /**
     * Returns the pair A = XX*, B = YY* of which only the Gram matrix G = Z*Z of the columns Z = [X Y] is given; the curve depends on nothing else.
     *
     * @param gram the inner products of the columns
     * @param firstColumns how many of them belong to A, at least 1, fewer than all
     * @return the pair
     * @throws InvalidInputException if the number of columns is out of range
     */
    public static PositivePair ofGram(PositiveOperator gram, int firstColumns) {
        return FactorPair.fromGram(gram, firstColumns);
    }

    /**
     * Returns f(t) = Tr[A ∧ tB].
     *
     * @param t the weight on B, at least 0 and finite
     * @return an enclosure of f(t)
     * @throws InvalidInputException if t is negative, NaN or infinite
     */
    public final Enclosure traceMinimum(double t) {
        return traceMinimum(1.0, t);
    }

    /**
     * Returns Tr[aA ∧ bB].
     *
     * @param a the weight on A, at least 0 and finite
     * @param b the weight on B, at least 0 and finite
     * @return an enclosure of Tr[aA ∧ bB]
     * @throws InvalidInputException if a weight is negative, NaN or infinite
     */
    public final Enclosure traceMinimum(double a, double b) {
        return traceMinimum(weight("a", a), weight("b", b));
    }

    private static WideDouble weight(String name, double w) {
        if (!(w >= 0 && w < Double.POSITIVE_INFINITY)) {
            throw new InvalidInputException(
                    "PositivePair.traceMinimum",
                    "the weight " + name + " is " + w,
                    "at least 0 and finite",
                    "give a weight in that range");
        }
        return WideDouble.of(w);
    }

    /**
     * Returns Tr[aA ∧ bB] for weights of any size.
     *
     * @param a the weight on A, at least 0 and finite
     * @param b the weight on B, at least 0 and finite
     * @return an enclosure of Tr[aA ∧ bB]
     * @throws InvalidInputException if a weight is negative or infinite
     */
    public final Enclosure traceMinimum(WideDouble a, WideDouble b) {
        if (a.signum() < 0 || b.signum() < 0 || a.isInfinite() || b.isInfinite()) {
            throw new InvalidInputException(
                    "PositivePair.traceMinimum",
                    "the weights are " + a + " and " + b,
                    "at least 0 and finite",
                    "give weights in that range");
        }
        if (a.signum() == 0 || b.signum() == 0) {
            return Enclosure.ZERO;
        }
        Enclosure most =
                firstTrace().times(Enclosure.of(a, a)).min(secondTrace().times(Enclosure.of(b, b)));
        Enclosure value = value(a, b);
        // f ≤ min(a Tr A, b Tr B) and f ≥ 0 hold exactly
        WideDouble upper = value.upperWide().min(most.upperWide());
        WideDouble lower = value.lowerWide().max(WideDouble.ZERO).min(upper);
        return Enclosure.of(lower, upper);
    }

    /**
     * Returns Tr[aA ∧ bB] without proof, faster where proof is what costs: for many copies. Elsewhere it is the middle of the enclosure.
     *
     * @param a the weight on A, at least 0 and finite
     * @param b the weight on B, at least 0 and finite
     * @return an estimate of Tr[aA ∧ bB]
     * @throws InvalidInputException if a weight is negative or infinite
     */
    public Estimate traceMinimumEstimate(WideDouble a, WideDouble b) {
        return Estimate.of(traceMinimum(a, b));
    }

    /**
     * Tells whether {@link #traceMinimumEstimate} costs little next to {@link #traceMinimum}, so that searches on the curve go by it and certify only where
     * it leads them.
     *
     * @return whether estimates are cheap; false unless the kind has an estimate of its own
     */
    public boolean hasCheapEstimate() {
        return false;
    }

    /**
     * Returns the pair (A^⊗n, B^⊗n), in the cheapest exact form that the structure of this pair allows.
     *
     * @param n the number of copies, at least 1
     * @return the pair of n copies
     * @throws InvalidInputException if n is below 1, or no exact form of n copies fits
     */
    public final PositivePair copies(int n) {
        if (n < 1) {
            throw new InvalidInputException(
                    "PositivePair.copies", "the number of copies is " + n, "at least 1", "give a positive number");
        }
        return n == 1 ? this : power(n);
    }

    /** The pair of n ≥ 2 copies. */
    PositivePair power(int n) {
        throw new InvalidInputException(
                "PositivePair.copies",
                "a pair of kind " + kind() + " without its operators",
                "commuting pairs, a vector with its spectral measure, or two operators",
                "give the operators themselves");
    }

    /**
     * Returns this pair with another limit on the work of each value.
     *
     * @param effort tolerance and listener
     * @return the pair; this one where values cost too little to matter
     */
    public PositivePair withEffort(Effort effort) {
        return this;
    }

    /**
     * Returns how much work Tr[aA ∧ bB] is, without doing it.
     *
     * @param a the weight on A, at least 0 and finite
     * @param b the weight on B, at least 0 and finite
     * @return the parts, the largest rank and the memory; one part and no memory to speak of, except for many copies
     */
    public Work work(WideDouble a, WideDouble b) {
        return new Work(1, 0, 0);
    }

    /**
     * Returns what the optimal test between aA and bB does, block by block where the pair is made of many copies: enough to simulate its outcomes. Probabilities are estimates, to about 1e-8.
     *
     * @param a the weight on A, above 0 and finite
     * @param b the weight on B, above 0 and finite
     * @return one entry for each block; a single one for other pairs
     * @throws InvalidInputException if a weight is not positive and finite
     */
    public List<BlockTest> blockTests(WideDouble a, WideDouble b) {
        if (a.signum() <= 0 || b.signum() <= 0 || a.isInfinite() || b.isInfinite()) {
            throw new InvalidInputException(
                    "PositivePair.blockTests",
                    "the weights are " + a + " and " + b,
                    "above 0 and finite",
                    "give weights in that range");
        }
        WideDouble first = firstTrace().lowerWide();
        WideDouble second = secondTrace().lowerWide();
        WideDouble[] f = {
            traceMinimumEstimate(a.timesDown(WideDouble.of(1 - BlockTest.STEP)), b)
                    .wide(),
            traceMinimumEstimate(a, b).wide(),
            traceMinimumEstimate(a.timesDown(WideDouble.of(1 + BlockTest.STEP)), b)
                    .wide()
        };
        return List.of(BlockTest.fromSlope(0, first, second, f, first.timesDown(a), second.timesDown(b)));
    }

    /** Tr[aA ∧ bB] for positive finite weights; ends below 0 or above the traces are cut by the caller. */
    abstract Enclosure value(WideDouble a, WideDouble b);

    /**
     * Returns the trace of the first operator.
     *
     * @return an enclosure of Tr A
     */
    public abstract Enclosure firstTrace();

    /**
     * Returns the trace of the second operator.
     *
     * @return an enclosure of Tr B
     */
    public abstract Enclosure secondTrace();

    /**
     * Returns the dimension of the space.
     *
     * @return the dimension
     */
    public abstract int dimension();

    /**
     * Tells how the curve is evaluated.
     *
     * @return the kind of pair
     */
    public abstract PairKind kind();
}
