package org.minorant.measurement;

import java.util.List;
import java.util.Optional;
import org.minorant.core.Enclosure;
import org.minorant.core.HermitianOperator;
import org.minorant.core.pair.PositivePair;

/**
 * The pretty-good measurement of an ensemble: M_i = S^(-½) p_iρ_i S^(-½) with S = Σ p_jρ_j, on the support of S.
 *
 * <p><b>Accuracy.</b> Success, error and joint probabilities are those of the ideal measurement, enclosed from the square root of the Gram matrix ({@code (Z*Z)^½},
 * which depends on the states continuously, so that no rank is decided); the error is its own sum over i ≠ j and keeps its digits when the states are nearly
 * orthogonal: about twelve at 1e-30 for kets. {@link #povm()} is the measurement rounded to doubles.
 *
 * <p>Immutable and thread-safe.
 *
 * <p>Sources: P. Hausladen, W. K. Wootters, J. Mod. Opt. 41, 2385 (1994); H. Barnum, E. Knill, J. Math. Phys. 43, 2097 (2002) (both from memory).
 */
public final class PrettyGoodMeasurement {

    private final Ensemble ensemble;
    private final SquareRootGram root;
    private final Enclosure success;
    private final Enclosure error;
    /** Worked out when first asked for; whoever does finds the same. */
    private volatile Optional<Povm> povm = Optional.empty();

    private PrettyGoodMeasurement(Ensemble ensemble, SquareRootGram root) {
        this.ensemble = ensemble;
        this.root = root;
        this.success = root.diagonal();
        this.error = root.offDiagonal();
    }

    /**
     * Returns the pretty-good measurement of an ensemble.
     *
     * @param ensemble the states with their priors
     * @return the measurement
     */
    public static PrettyGoodMeasurement of(Ensemble ensemble) {
        return new PrettyGoodMeasurement(ensemble, SquareRootGram.of(ensemble));
    }

    /**
     * Returns the ensemble it was made for.
     *
     * @return the ensemble
     */
    public Ensemble ensemble() {
        return ensemble;
    }

    /**
     * Returns the probability of naming the state that was prepared.
     *
     * @return Σ_i p_i Tr ρ_i M_i
     */
    public Enclosure successProbability() {
        return success;
    }

    /**
     * Returns the probability of naming another state, as its own sum.
     *
     * @return the sum of p_i Tr ρ_i M_j over i ≠ j
     */
    public Enclosure errorProbability() {
        return error;
    }

    /**
     * Returns the joint probabilities of the state prepared and the outcome seen; the mutual information is among what follows from them.
     *
     * @return p_i Tr ρ_i M_j
     */
    public JointDistribution jointDistribution() {
        Enclosure[][] p = new Enclosure[ensemble.size()][ensemble.size()];
        for (int i = 0; i < p.length; i++) {
            for (int j = 0; j < p.length; j++) {
                p[i][j] = root.block(i, j);
            }
        }
        return new JointDistribution(p);
    }

    /**
     * Returns the measurement in doubles: one outcome for each state and, if the states leave part of the space empty, one more for its projector, which is never
     * seen on the ensemble. Directions in which the states are below 1e-27 of their largest weight count as empty.
     *
     * @return the measurement, complete within rounding
     */
    public Povm povm() {
        Povm known = povm.orElseGet(this::rounded);
        povm = Optional.of(known);
        return known;
    }

    private Povm rounded() {
        List<HermitianOperator> elements = root.blocks().measurement(root.polar());
        if (root.polar().rank() < ensemble.dimension()) {
            elements.add(ColumnBlocks.kernel(root.polar()));
        }
        return Povm.of(elements);
    }

    /**
     * Returns what is known of the largest success probability of all measurements: between P and √(P Tr S), P that of this measurement (Barnum and Knill
     * 2002: P_opt² ≤ P; Tr S is one up to rounding).
     *
     * @return an enclosure of the optimal success probability
     */
    public Enclosure optimalSuccessProbability() {
        Enclosure top = success.times(ensemble.trace()).sqrt();
        return Enclosure.of(success.lowerWide(), top.upperWide().max(success.lowerWide()));
    }

    /**
     * Returns what is known of the least error probability of all measurements: between e/(1 + √(1 − e)) and e, e that of this measurement. The lower end is the same
     * bound as P_opt² ≤ P, written so that it keeps its digits: it is at least e/2. For two states the least error is known and returned.
     *
     * @return an enclosure of the optimal error probability
     */
    public Enclosure optimalErrorProbability() {
        Enclosure rest = Enclosure.ONE.minus(error.dividedBy(ensemble.trace())).max(Enclosure.ZERO);
        Enclosure least = error.dividedBy(Enclosure.ONE.plus(rest.sqrt()));
        Enclosure range = Enclosure.of(least.lowerWide(), error.upperWide());
        return ensemble.size() == 2 ? twoStates().intersect(range) : range;
    }

    private Enclosure twoStates() {
        return PositivePair.of(ensemble.state(0), ensemble.state(1)).traceMinimum(ensemble.prior(0), ensemble.prior(1));
    }

    /**
     * Returns how much larger the error of this measurement is than the least possible: a number between 1 and 2 (Barnum and Knill 2002). For two states it is enclosed
     * tightly, unless the least error may be zero; for more it lies between 1 and 1 + √(1 − e).
     *
     * @return error / least error; 1 to 2 where both may be zero
     */
    public Enclosure barnumKnillRatio() {
        Enclosure rest = Enclosure.ONE.minus(error.dividedBy(ensemble.trace())).clip(0, 1);
        Enclosure range = Enclosure.of(
                Enclosure.ONE.lowerWide(), Enclosure.ONE.plus(rest.sqrt()).upperWide());
        return ensemble.size() == 2 ? error.dividedBy(twoStates()).intersect(range) : range;
    }

    /** The number of states and the error. */
    @Override
    public String toString() {
        return "PrettyGoodMeasurement of " + ensemble.size() + " states, error " + error;
    }
}
