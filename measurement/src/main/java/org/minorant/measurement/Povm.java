package org.minorant.measurement;

import java.util.ArrayList;
import java.util.List;
import org.minorant.core.DensityOperator;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.Enclosure;
import org.minorant.core.HermitianOperator;
import org.minorant.core.InvalidInputException;
import org.minorant.core.Operator;
import org.minorant.core.PositiveOperator;

/**
 * A measurement: positive operators M_j, one for each outcome, that sum to the identity (a positive operator-valued measure). Outcome j is seen on
 * the state ρ with probability Tr ρM_j.
 *
 * <p><b>Which operators are meant.</b> The stored entries, exactly as they are; for an element that is a {@link PositiveOperator} defined by its factor, that factor, which
 * keeps relative accuracy for rare outcomes. Doubles satisfy the two conditions only up to rounding; {@link #completenessDefect()} and {@link
 * #negativityDefect()} say how nearly.
 *
 * <p>Immutable and thread-safe.
 */
public final class Povm {

    /** Storing a measurement in doubles costs d · 2^-53 in Hilbert–Schmidt norm; computing it costs a hundred times that at most. */
    private static final double ROUNDING = 0x1p-46;

    private final List<HermitianOperator> elements;
    private final List<Effect> effects;
    private final double completenessDefect;
    private final double negativityDefect;

    private Povm(
            List<HermitianOperator> elements,
            List<Effect> effects,
            double completenessDefect,
            double negativityDefect) {
        this.elements = elements;
        this.effects = effects;
        this.completenessDefect = completenessDefect;
        this.negativityDefect = negativityDefect;
    }

    /**
     * Returns the measurement with these elements.
     *
     * @param elements M_j in the order of the outcomes, at least one, of one dimension d
     * @return the measurement
     * @throws InvalidInputException if there is no element, the dimensions differ, an element has an eigenvalue below −(d + 1) · 2^-48, or the sum differs
     *     from the identity by more than d · 2^-46 in Hilbert–Schmidt norm
     */
    public static Povm of(List<? extends HermitianOperator> elements) {
        String asked = "Povm.of";
        Checks.notEmpty(asked, "element", elements);
        int d = elements.get(0).dimension();
        List<Effect> effects = new ArrayList<>();
        EnclosedMatrix sum = EnclosedMatrix.identity(d).times(-1);
        double slack = 0;
        double negativity = 0;
        for (int j = 0; j < elements.size(); j++) {
            Checks.dimension(asked, "element " + j, elements.get(j), d);
            Effect e = Effect.of(asked, "element " + j, elements.get(j));
            effects.add(e);
            sum = sum.plus(e.matrix());
            slack += e.slack();
            negativity = Math.max(negativity, e.negativity());
        }
        double defect = (sum.frobeniusUpper() + slack) * (1 + 0x1p-40);
        if (!(defect <= d * ROUNDING)) {
            throw new InvalidInputException(
                    asked,
                    "the elements sum to an operator at distance " + defect + " from the identity",
                    "at most " + d * ROUNDING + " (rounding)",
                    "add what is missing as an element, or use Povm.nearest, which says by how much it repairs");
        }
        return new Povm(List.copyOf(elements), List.copyOf(effects), defect, negativity);
    }

    /**
     * Returns the measurement of a complete set of orthonormal kets.
     *
     * @param basis a unitary matrix, one ket in each column
     * @return the measurement whose outcome j is the projector onto column j
     * @throws InvalidInputException if the columns do not form an orthonormal basis up to rounding
     */
    public static Povm ofBasis(Operator basis) {
        List<PositiveOperator> elements = new ArrayList<>();
        for (int j = 0; j < basis.columns(); j++) {
            double[] re = new double[basis.rows()];
            double[] im = new double[basis.rows()];
            for (int i = 0; i < basis.rows(); i++) {
                re[i] = basis.re(i, j);
                im[i] = basis.im(i, j);
            }
            elements.add(PositiveOperator.ofFactor(Operator.ofRowMajor(basis.rows(), 1, re, im)));
        }
        return of(elements);
    }

    /**
     * Makes a measurement of operators that nearly form one, and says what that took: the positive parts A of their Hermitian parts, divided by
     * their sum S as S^(-½) A S^(-½); what S leaves out (its kernel) is shared equally. It is a measurement near the given operators, not the
     * nearest in any norm.
     *
     * @param operators square operators of one dimension, at least one
     * @return the measurement and how far it is from what was given
     * @throws InvalidInputException if there is no operator, or the shapes differ or are not square
     */
    public static RepairedPovm nearest(List<? extends Operator> operators) {
        return PovmRepair.of(operators);
    }

    /**
     * Returns the number of outcomes.
     *
     * @return the number of elements
     */
    public int size() {
        return elements.size();
    }

    /**
     * Returns the dimension of the space that is measured.
     *
     * @return the dimension
     */
    public int dimension() {
        return elements.get(0).dimension();
    }

    /**
     * Returns the elements in the order of the outcomes.
     *
     * @return the elements
     */
    public List<HermitianOperator> elements() {
        return List.copyOf(elements);
    }

    /**
     * Returns an element.
     *
     * @param outcome its index, from 0
     * @return M_j
     * @throws InvalidInputException if the index is out of range
     */
    public HermitianOperator element(int outcome) {
        return elements.get(Checks.index("Povm.element", "the outcome", outcome, size()));
    }

    /**
     * Returns how nearly the elements sum to the identity.
     *
     * @return an upper end of ‖ΣM_j − 1‖ in Hilbert–Schmidt norm
     */
    public double completenessDefect() {
        return completenessDefect;
    }

    /**
     * Returns how nearly the elements are positive.
     *
     * @return an upper end of the largest trace norm of an element's negative part
     */
    public double negativityDefect() {
        return negativityDefect;
    }

    /**
     * Returns the probability of an outcome.
     *
     * @param outcome its index j, from 0
     * @param state ρ
     * @return Tr ρM_j, which rounding of the stored element may put below zero
     * @throws InvalidInputException if the index is out of range or the dimensions differ
     */
    public Enclosure probability(int outcome, DensityOperator state) {
        Checks.index("Povm.probability", "the outcome", outcome, size());
        Checks.dimension("Povm.probability", "the state", state, dimension());
        return BornRule.probability(state, effects.get(outcome));
    }

    /**
     * Returns the probabilities of all outcomes.
     *
     * @param state ρ
     * @return Tr ρM_j in the order of the outcomes
     * @throws InvalidInputException if the dimensions differ
     */
    public List<Enclosure> probabilities(DensityOperator state) {
        List<Enclosure> p = new ArrayList<>();
        for (int j = 0; j < size(); j++) {
            p.add(probability(j, state));
        }
        return List.copyOf(p);
    }

    /**
     * Draws outcomes of independent measurements of one state, each with its probability as rounded to double (relative 1e-15).
     *
     * @param state ρ
     * @param count how many, at least 0
     * @param seed the seed; the same seed gives the same outcomes everywhere (SplitMix64, one number an outcome)
     * @return the indices of the outcomes in the order they were drawn
     * @throws InvalidInputException if the dimensions differ or the count is negative
     */
    public int[] sample(DensityOperator state, int count, long seed) {
        Checks.inRange("Povm.sample", "the count", count, 0, Integer.MAX_VALUE);
        double[] cumulative = new double[size()];
        double sum = 0;
        int last = 0;
        for (int j = 0; j < cumulative.length; j++) {
            double p = Math.max(0, probability(j, state).midpoint());
            last = p > 0 ? j : last;
            sum += p;
            cumulative[j] = sum;
        }
        SplitMix random = new SplitMix(seed);
        int[] out = new int[count];
        for (int k = 0; k < count; k++) {
            double u = random.nextDouble() * sum;
            int j = 0;
            // an outcome of probability zero spans nothing and is never drawn
            while (j < last && cumulative[j] <= u) {
                j++;
            }
            out[k] = j;
        }
        return out;
    }

    /**
     * Returns the joint probabilities of the state prepared and the outcome seen.
     *
     * @param ensemble the states with their priors
     * @return p_i Tr ρ_i M_j
     * @throws InvalidInputException if the dimensions differ
     */
    public JointDistribution jointDistribution(Ensemble ensemble) {
        return JointDistribution.of(ensemble, this);
    }

    /**
     * Returns the probability that outcome i is seen on state i.
     *
     * @param ensemble the states with their priors, at most as many as there are outcomes
     * @return Σ p_i Tr ρ_i M_i
     * @throws InvalidInputException if the dimensions differ or there are fewer outcomes than states
     */
    public Enclosure successProbability(Ensemble ensemble) {
        requireGuesses("Povm.successProbability", ensemble);
        return jointDistribution(ensemble).successProbability();
    }

    /**
     * Returns the probability that another outcome than i is seen on state i, as its own sum; outcomes beyond the number of states are
     * inconclusive and count as errors.
     *
     * @param ensemble the states with their priors, at most as many as there are outcomes
     * @return the sum of p_i Tr ρ_i M_j over i ≠ j
     * @throws InvalidInputException if the dimensions differ or there are fewer outcomes than states
     */
    public Enclosure errorProbability(Ensemble ensemble) {
        requireGuesses("Povm.errorProbability", ensemble);
        return jointDistribution(ensemble).errorProbability();
    }

    private void requireGuesses(String asked, Ensemble ensemble) {
        if (size() < ensemble.size()) {
            throw new InvalidInputException(
                    asked,
                    "the measurement has " + size() + " outcomes for " + ensemble.size() + " states",
                    "at least one outcome for each state",
                    "add elements (zero operators for states that are never guessed), or ask for the joint distribution");
        }
    }

    /**
     * Returns this measurement with its outcomes relabelled at random: outcome j is reported as k with probability w(k, j).
     *
     * @param weights w, one row for each new outcome, one column for each outcome of this measurement; columns are probabilities
     * @return the measurement with elements Σ_j w(k, j) M_j
     * @throws InvalidInputException if a row does not have one entry for each outcome, or a column does not hold probabilities that sum to one
     */
    public Povm relabelled(double[][] weights) {
        String asked = "Povm.relabelled";
        for (int k = 0; k < weights.length; k++) {
            if (weights[k].length != size()) {
                throw new InvalidInputException(
                        asked,
                        "row " + k + " has " + weights[k].length + " entries",
                        size() + ", one for each outcome",
                        "give one row for each new outcome");
            }
        }
        for (int j = 0; j < size(); j++) {
            double[] column = new double[weights.length];
            for (int k = 0; k < weights.length; k++) {
                column[k] = weights[k][j];
            }
            Checks.probabilities(asked + ", outcome " + j, column, weights.length * 0x1p-50);
        }
        List<HermitianOperator> out = new ArrayList<>();
        for (double[] row : weights) {
            HermitianOperator m = HermitianOperator.identity(dimension()).times(0);
            for (int j = 0; j < row.length; j++) {
                m = m.plus(elements.get(j).times(row[j]));
            }
            out.add(m);
        }
        return of(out);
    }

    /** The number of outcomes and the dimension. */
    @Override
    public String toString() {
        return "Povm with " + size() + " outcomes, dimension " + dimension();
    }
}
