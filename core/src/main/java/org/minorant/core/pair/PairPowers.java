package org.minorant.core.pair;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import org.minorant.core.InvalidInputException;
import org.minorant.core.PositiveOperator;

/**
 * Products of powers A₁^⊗n₁ ⊗ A₂^⊗n₂ ⊗ … against B₁^⊗n₁ ⊗ B₂^⊗n₂ ⊗ …, for many choices of n₁, n₂, …: words of a channel against an output state, for example, where the n's are the counts of the letters.
 * What depends on the operators alone is worked out once.
 *
 * <p><b>Kinds.</b>
 *
 * <ul>
 *   <li>Kets A_i, of any dimension, against one operator object B = B₁ = B₂ = …: by types of B's eigenvalues, with relative accuracy down to about 10^-240 of the traces.
 *   <li>Operators on qubits: by products of spin blocks.
 *   <li>Others: multiplied out, where the product's dimension is at most {@value #MOST_DIMENSIONS}.
 * </ul>
 *
 * <p>Immutable and thread-safe.
 */
public final class PairPowers {

    /** The largest dimension that is multiplied out. */
    public static final int MOST_DIMENSIONS = 512;

    private final List<PositiveOperator> first;
    private final List<PositiveOperator> second;
    private final Optional<KetPowers> kets;
    private final List<QubitSpectra> qubits;

    private PairPowers(
            List<PositiveOperator> first,
            List<PositiveOperator> second,
            Optional<KetPowers> kets,
            List<QubitSpectra> qubits) {
        this.first = first;
        this.second = second;
        this.kets = kets;
        this.qubits = qubits;
    }

    /**
     * Prepares products of powers.
     *
     * @param first A₁, A₂, …, at least one
     * @param second B₁, B₂, …, as many, each on the space of its A
     * @return the family of products
     * @throws InvalidInputException if the lists are empty or differ in length, or the dimensions of two operators that belong together do
     */
    public static PairPowers of(List<? extends PositiveOperator> first, List<? extends PositiveOperator> second) {
        if (first.isEmpty() || first.size() != second.size()) {
            throw new InvalidInputException(
                    "PairPowers.of",
                    first.size() + " and " + second.size() + " operators",
                    "as many of each, at least 1",
                    "give two operators for every factor");
        }
        for (int i = 0; i < first.size(); i++) {
            if (first.get(i).dimension() != second.get(i).dimension()) {
                throw new InvalidInputException(
                        "PairPowers.of",
                        "factor " + i + " has dimensions " + first.get(i).dimension() + " and "
                                + second.get(i).dimension(),
                        "equal dimensions",
                        "give two operators on one space for every factor");
            }
        }
        boolean one = second.stream().allMatch(b -> b == second.get(0));
        Optional<KetPowers> kets = one && first.stream().allMatch(PairStructure::isKet)
                ? KetPowers.of(first, second.get(0))
                : Optional.empty();
        List<QubitSpectra> qubits = new ArrayList<>();
        if (kets.isEmpty() && first.stream().allMatch(a -> a.dimension() == 2)) {
            for (int i = 0; i < first.size(); i++) {
                qubits.add(QubitSpectra.of(first.get(i), second.get(i)));
            }
        }
        return new PairPowers(List.copyOf(first), List.copyOf(second), kets, List.copyOf(qubits));
    }

    /**
     * Returns whether no product but small ones is known: the operators are multiplied out.
     *
     * @return true for operators that are neither kets against one operator nor on qubits
     */
    public boolean isMultipliedOut() {
        return kets.isEmpty() && qubits.isEmpty();
    }

    /**
     * Returns how far two operators of the first kind, kets, are from being alike: a bound on ‖A_i − UA_jU*‖₁ for the best unitary U that leaves B as it is. Kets with distance 0 have the same curve in any word.
     *
     * @param i a factor
     * @param j another one
     * @return the bound, about 1e-30 for kets that are exactly alike; infinite for other kinds
     */
    public double distance(int i, int j) {
        return kets.map(k -> k.distance(i, j)).orElse(Double.POSITIVE_INFINITY);
    }

    /**
     * Returns one product.
     *
     * @param copies n₁, n₂, …, one for each factor, at least 0 and not all 0
     * @return the pair
     * @throws InvalidInputException if a number is negative, all are 0, or there are too many products of blocks, types or dimensions
     */
    public PositivePair pair(int... copies) {
        if (copies.length != first.size()
                || Arrays.stream(copies).anyMatch(m -> m < 0)
                || Arrays.stream(copies).allMatch(m -> m == 0)) {
            throw new InvalidInputException(
                    "PairPowers.pair",
                    "numbers of copies " + Arrays.toString(copies) + " for " + first.size() + " factors",
                    "one for each factor, at least 0, and not all 0",
                    "count how often each factor occurs");
        }
        if (kets.isPresent()) {
            return new RankOneProducts(kets.get(), copies.clone(), Effort.DEFAULT);
        }
        if (qubits.isEmpty()) {
            return PositivePair.of(product(first, copies), product(second, copies));
        }
        List<QubitPower> powers = new ArrayList<>();
        for (int i = 0; i < copies.length; i++) {
            if (copies[i] > 0) {
                powers.add(new QubitPower(qubits.get(i), copies[i]));
            }
        }
        return SpinProductsPair.of(powers);
    }

    private static PositiveOperator product(List<PositiveOperator> operators, int[] copies) {
        double dimension = 1;
        for (int i = 0; i < copies.length; i++) {
            dimension *= Math.pow(operators.get(i).dimension(), copies[i]);
        }
        if (!(dimension <= MOST_DIMENSIONS)) {
            throw new InvalidInputException(
                    "PairPowers.pair",
                    "a product of dimension " + dimension,
                    "kets against one well-conditioned operator, qubits, or a dimension of at most " + MOST_DIMENSIONS,
                    "use fewer copies");
        }
        Optional<PositiveOperator> p = Optional.empty();
        for (int i = 0; i < copies.length; i++) {
            for (int m = 0; m < copies[i]; m++) {
                PositiveOperator factor = operators.get(i);
                p = Optional.of(p.map(q -> q.tensor(factor)).orElse(factor));
            }
        }
        return p.orElseThrow();
    }
}
