package org.minorant.measurement;

import java.util.Arrays;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;
import org.minorant.core.InvalidInputException;

/**
 * The joint probabilities of the state that was prepared and the outcome that was seen, each enclosed: P(i, j) = p_i Tr ρ_i M_j.
 *
 * <p>Outcome j stands for the guess that state j was prepared; outcomes beyond the number of states are inconclusive and count as errors. Rounding
 * of the inputs may leave a total that differs from one; probabilities are those of the inputs as given. Immutable and thread-safe.
 */
public final class JointDistribution {

    private final Enclosure[][] p;

    /** Takes over the rows, one for each state, of equal length. */
    JointDistribution(Enclosure[][] p) {
        this.p = p;
    }

    /** The joint distribution of an ensemble's states and a measurement's outcomes. */
    static JointDistribution of(Ensemble ensemble, Povm povm) {
        Enclosure[][] p = new Enclosure[ensemble.size()][povm.size()];
        for (int i = 0; i < p.length; i++) {
            for (int j = 0; j < p[i].length; j++) {
                p[i][j] = povm.probability(j, ensemble.state(i)).times(ensemble.prior(i));
            }
        }
        return new JointDistribution(p);
    }

    /**
     * Returns the number of states.
     *
     * @return the number of states
     */
    public int states() {
        return p.length;
    }

    /**
     * Returns the number of outcomes.
     *
     * @return the number of outcomes
     */
    public int outcomes() {
        return p[0].length;
    }

    /**
     * Returns a joint probability.
     *
     * @param state the index of the state, from 0
     * @param outcome the index of the outcome, from 0
     * @return P(state, outcome)
     * @throws InvalidInputException if an index is out of range
     */
    public Enclosure probability(int state, int outcome) {
        String asked = "JointDistribution.probability";
        Checks.index(asked, "the state", state, states());
        Checks.index(asked, "the outcome", outcome, outcomes());
        return p[state][outcome];
    }

    /**
     * Returns the probability that a state is prepared, as the distribution has it.
     *
     * @param state the index of the state, from 0
     * @return the sum of its row
     * @throws InvalidInputException if the index is out of range
     */
    public Enclosure stateProbability(int state) {
        Checks.index("JointDistribution.stateProbability", "the state", state, states());
        return Arrays.stream(p[state]).reduce(Enclosure.ZERO, Enclosure::plus);
    }

    /**
     * Returns the probability of an outcome.
     *
     * @param outcome the index of the outcome, from 0
     * @return the sum of its column
     * @throws InvalidInputException if the index is out of range
     */
    public Enclosure outcomeProbability(int outcome) {
        Checks.index("JointDistribution.outcomeProbability", "the outcome", outcome, outcomes());
        Enclosure s = Enclosure.ZERO;
        for (Enclosure[] row : p) {
            s = s.plus(row[outcome]);
        }
        return s;
    }

    /**
     * Returns the probability that the outcome names the state.
     *
     * @return Σ P(i, i)
     */
    public Enclosure successProbability() {
        Enclosure s = Enclosure.ZERO;
        for (int i = 0; i < Math.min(states(), outcomes()); i++) {
            s = s.plus(p[i][i]);
        }
        return s;
    }

    /**
     * Returns the probability that the outcome does not name the state, as its own sum, so that it keeps its digits when it is small.
     *
     * @return the sum of P(i, j) over i ≠ j
     */
    public Enclosure errorProbability() {
        Enclosure s = Enclosure.ZERO;
        for (int i = 0; i < states(); i++) {
            for (int j = 0; j < outcomes(); j++) {
                if (i != j) {
                    s = s.plus(p[i][j]);
                }
            }
        }
        return s;
    }

    /**
     * Returns the mutual information of state and outcome, Σ P(i,j) ln(P(i,j)/(P(i)P(j))), of the distribution divided by its total; probabilities that rounding
     * of a measurement has put below zero count as zero. For any measurement it is a lower bound on the accessible information of the ensemble.
     *
     * @return the mutual information
     */
    public Information mutualInformation() {
        Enclosure[] rows = new Enclosure[states()];
        Enclosure[] columns = new Enclosure[outcomes()];
        Arrays.fill(rows, Enclosure.ZERO);
        Arrays.fill(columns, Enclosure.ZERO);
        for (int i = 0; i < rows.length; i++) {
            for (int j = 0; j < columns.length; j++) {
                rows[i] = rows[i].plus(clipped(i, j));
                columns[j] = columns[j].plus(clipped(i, j));
            }
        }
        Enclosure total = Arrays.stream(rows).reduce(Enclosure.ZERO, Enclosure::plus);
        Enclosure sum = Enclosure.ZERO;
        for (int i = 0; i < rows.length; i++) {
            for (int j = 0; j < columns.length; j++) {
                sum = sum.plus(LogarithmicTerm.of(clipped(i, j), rows[i], columns[j], total));
            }
        }
        return Information.ofNats(sum.dividedBy(total).max(Enclosure.ZERO))
                .withSource("mutual information of state and outcome");
    }

    private Enclosure clipped(int i, int j) {
        return p[i][j].max(Enclosure.ZERO);
    }

    /** The numbers of states and outcomes and the error. */
    @Override
    public String toString() {
        return "JointDistribution of " + states() + " states and " + outcomes() + " outcomes, error "
                + errorProbability();
    }
}
