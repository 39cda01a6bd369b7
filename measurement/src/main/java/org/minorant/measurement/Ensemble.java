package org.minorant.measurement;

import java.util.List;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.InvalidInputException;

/**
 * States ρ_i, each prepared with its prior probability p_i.
 *
 * <p>Priors are used as given: doubles seldom sum to one exactly, and what they miss enters every probability as it is. Immutable and
 * thread-safe.
 */
public final class Ensemble {

    private static final double SUM_ROUNDING = 0x1p-50;

    private final List<DensityOperator> states;
    private final double[] priors;

    private Ensemble(List<DensityOperator> states, double[] priors) {
        this.states = states;
        this.priors = priors;
    }

    /**
     * Returns the ensemble of states with their priors.
     *
     * @param states states of one dimension, at least one
     * @param priors as many probabilities, summing to one within m · 2^-50 for m states
     * @return the ensemble
     * @throws InvalidInputException if there is no state, the dimensions or the lengths differ, or the priors are not probabilities
     */
    public static Ensemble of(List<DensityOperator> states, double[] priors) {
        String asked = "Ensemble.of";
        Checks.notEmpty(asked, "state", states);
        if (states.size() != priors.length) {
            throw new InvalidInputException(
                    asked,
                    states.size() + " states and " + priors.length + " priors",
                    "as many of each",
                    "give one prior per state");
        }
        for (int i = 1; i < states.size(); i++) {
            Checks.dimension(asked, "state " + i, states.get(i), states.get(0).dimension());
        }
        double[] p = priors.clone();
        Checks.probabilities(asked, p, p.length * SUM_ROUNDING);
        return new Ensemble(List.copyOf(states), p);
    }

    /**
     * Returns the ensemble of states that are equally likely.
     *
     * @param states states of one dimension, at least one
     * @return the ensemble with priors 1/m for m states, rounded
     * @throws InvalidInputException if there is no state or the dimensions differ
     */
    public static Ensemble equiprobable(List<DensityOperator> states) {
        Checks.notEmpty("Ensemble.equiprobable", "state", states);
        double[] p = new double[states.size()];
        java.util.Arrays.fill(p, 1.0 / p.length);
        return of(states, p);
    }

    /**
     * Returns the number of states.
     *
     * @return the number of states
     */
    public int size() {
        return priors.length;
    }

    /**
     * Returns the dimension of the states.
     *
     * @return the dimension
     */
    public int dimension() {
        return states.get(0).dimension();
    }

    /**
     * Returns the states in order.
     *
     * @return the states
     */
    public List<DensityOperator> states() {
        return List.copyOf(states);
    }

    /**
     * Returns a state.
     *
     * @param i its index, from 0
     * @return ρ_i
     * @throws InvalidInputException if the index is out of range
     */
    public DensityOperator state(int i) {
        return states.get(Checks.index("Ensemble.state", "the index", i, priors.length));
    }

    /**
     * Returns a prior.
     *
     * @param i the index of the state, from 0
     * @return p_i
     * @throws InvalidInputException if the index is out of range
     */
    public double prior(int i) {
        return priors[Checks.index("Ensemble.prior", "the index", i, priors.length)];
    }

    /**
     * Returns the priors in order.
     *
     * @return a copy of the priors
     */
    public double[] priors() {
        return priors.clone();
    }

    /**
     * Returns the average state Σ p_i ρ_i, exactly that mixture; its entries are rounded once.
     *
     * @return the average state
     */
    public DensityOperator averageState() {
        return DensityOperator.mixture(states, priors);
    }

    /** Σ p_i Tr ρ_i, which is one up to rounding. */
    Enclosure trace() {
        Enclosure s = Enclosure.ZERO;
        for (int i = 0; i < priors.length; i++) {
            s = s.plus(states.get(i).traceEnclosure().times(priors[i]));
        }
        return s;
    }

    /** The number of states and the dimension. */
    @Override
    public String toString() {
        return "Ensemble of " + priors.length + " states, dimension " + dimension();
    }
}
