package org.minorant.measurement;

import java.util.ArrayList;
import java.util.List;
import org.minorant.core.Complex;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.InvalidInputException;
import org.minorant.core.pair.EnclosedSpectra;

/**
 * One measurement of a single system, repeated on each of n copies, with the best decision on the n outcomes: what hardware without memory or joint measurements reaches.
 *
 * <p>With P and Q the distributions of an outcome under the two hypotheses it is a classical test between P^n and Q^n, answered by types of outcomes, so that n may be large. The least error of all
 * measurements of the n copies together, {@link HypothesisPair#minimumError} of {@link HypothesisPair#copies}, is at most this.
 *
 * <p><b>Accuracy.</b> The probabilities of an outcome are enclosed ({@link Povm#probability}); their relative errors enter n times, outward, see {@link EnclosedSpectra}. Which operators are meant is said by {@link Povm};
 * a {@link #bestFound} one is divided by the norm of its ket, so that it is complete exactly.
 *
 * <p>Immutable and thread-safe.
 */
public final class RepeatedMeasurement {

    private final Povm povm;
    private final HypothesisPair pair;
    private final List<Enclosure> first;
    private final List<Enclosure> second;
    private final EnclosedSpectra outcomes;

    private RepeatedMeasurement(Povm povm, HypothesisPair pair, Enclosure norm) {
        this.povm = povm;
        this.pair = pair;
        this.first = List.copyOf(probabilities(povm, pair.first(), norm));
        this.second = List.copyOf(probabilities(povm, pair.second(), norm));
        this.outcomes = EnclosedSpectra.of(first, second);
    }

    private static List<Enclosure> probabilities(Povm povm, DensityOperator state, Enclosure norm) {
        List<Enclosure> p = new ArrayList<>();
        for (Enclosure e : povm.probabilities(state)) {
            p.add(e.max(Enclosure.ZERO).dividedBy(norm));
        }
        return List.copyOf(p);
    }

    /**
     * Returns a measurement to be repeated.
     *
     * @param measurement the measurement of one copy
     * @param pair the hypotheses; of a pair of copies, those about one copy
     * @return the repeated measurement
     * @throws InvalidInputException if the dimensions differ or the pair has no states
     */
    public static RepeatedMeasurement of(Povm measurement, HypothesisPair pair) {
        HypothesisPair one = pair.single();
        Checks.dimension("RepeatedMeasurement.of", "the state", one.first(), measurement.dimension());
        return new RepeatedMeasurement(measurement, one, Enclosure.ONE);
    }

    /**
     * Returns the best projective measurement that a search finds for n copies of two qubit states.
     *
     * <p><b>What is certain.</b> Every number of the measurement that is returned is enclosed. That no other projective measurement does better is not proved: its direction was sought on a grid and then ever more finely around the best
     * place. It is sought in the plane of both Bloch vectors only, and nothing is lost by that: the probabilities depend on the two projections of the direction on the Bloch vectors, and those of a direction outside the plane are a multiple below one
     * of those of a direction inside, so that its outcomes are those of the latter, turned over at random.
     *
     * @param pair two states of dimension 2; of a pair of copies, those about one copy
     * @param n the number of copies it is for, at least 1
     * @param prior p, the prior of the first state, strictly between 0 and 1
     * @return the measurement found: its first outcome points towards the first state
     * @throws InvalidInputException if the states are no qubits, or a number is out of range
     */
    public static RepeatedMeasurement bestFound(HypothesisPair pair, int n, double prior) {
        String asked = "RepeatedMeasurement.bestFound";
        HypothesisPair one = pair.single();
        Checks.inRange(asked, "the prior", prior, Double.MIN_NORMAL, Math.nextDown(1.0));
        Checks.inRange(asked, "the number of copies", n, 1, Integer.MAX_VALUE);
        Checks.dimension(asked, "the state", one.first(), 2);
        Complex[] ket = new DirectionSearch(one.first(), one.second(), n, prior).ket();
        double[] re = {ket[0].re(), ket[1].re()};
        double[] im = {ket[0].im(), ket[1].im()};
        DensityOperator along = DensityOperator.ofKet(re, im);
        // (−conj k₁, conj k₀) is orthogonal to (k₀, k₁) exactly, and of the same norm
        DensityOperator across = DensityOperator.ofKet(new double[] {-re[1], re[0]}, new double[] {im[1], -im[0]});
        Enclosure norm = Enclosure.ZERO;
        for (double x : new double[] {re[0], im[0], re[1], im[1]}) {
            norm = norm.plus(Enclosure.exact(x).square());
        }
        return new RepeatedMeasurement(Povm.of(List.of(along, across)), one, norm);
    }

    /**
     * Returns the measurement of one copy.
     *
     * @return the measurement, as stored
     */
    public Povm measurement() {
        return povm;
    }

    /**
     * Returns the distribution of an outcome if the first hypothesis holds.
     *
     * @return P, one enclosure for each outcome
     */
    public List<Enclosure> firstOutcomes() {
        return List.copyOf(first);
    }

    /**
     * Returns the distribution of an outcome if the second hypothesis holds.
     *
     * @return Q, one enclosure for each outcome
     */
    public List<Enclosure> secondOutcomes() {
        return List.copyOf(second);
    }

    /**
     * Returns the least error of all decisions on n outcomes, Σ min(p P^n, (1−p) Q^n).
     *
     * @param n the number of copies measured, at least 1
     * @param prior p, the prior of the first state, between 0 and 1
     * @return the error
     * @throws InvalidInputException if a number is out of range
     */
    public Enclosure minimumError(int n, double prior) {
        Checks.inRange("RepeatedMeasurement.minimumError", "the prior", prior, 0, 1);
        Enclosure p = Enclosure.exact(prior);
        return outcomes.traceMinimum(n, p, p.complement());
    }

    /**
     * Returns the least type-II error of all decisions on n outcomes, randomised ones included, with type-I error at most ε.
     *
     * @param n the number of copies measured, at least 1
     * @param level ε, at least 0
     * @return the error
     * @throws InvalidInputException if a number is out of range
     */
    public Enclosure typeTwoError(int n, double level) {
        // the supremum over t of f(t) − tε rises with f
        Enclosure low = HypothesisPair.ofAnyCurve(outcomes.below(n)).typeTwoError(level);
        Enclosure high = HypothesisPair.ofAnyCurve(outcomes.above(n)).typeTwoError(level);
        return Enclosure.of(low.lowerWide(), high.upperWide().max(low.lowerWide()));
    }

    /**
     * Returns what measuring all copies together is worth: the error of this measurement over the least error of any.
     *
     * @param n the number of copies, at least 1
     * @param prior p, strictly between 0 and 1
     * @return a ratio of at least 1; +∞ where only the least error vanishes
     * @throws InvalidInputException if a number is out of range, or n copies of the pair have no exact form that fits
     */
    public Enclosure ratio(int n, double prior) {
        return ratio(n, prior, pair.copies(n).minimumError(prior));
    }

    /**
     * Returns the same where the least error is at hand already.
     *
     * @param n the number of copies, at least 1
     * @param prior p, strictly between 0 and 1
     * @param least the minimum error of n copies
     * @return a ratio of at least 1
     * @throws InvalidInputException if a number is out of range
     */
    public Enclosure ratio(int n, double prior, Enclosure least) {
        Enclosure error = minimumError(n, prior);
        if (least.lowerWide().signum() <= 0) {
            return Enclosure.of(1, Double.POSITIVE_INFINITY);
        }
        return error.dividedBy(least).max(Enclosure.ONE);
    }
}
