package org.minorant.bounds;

import java.util.Optional;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.Operator;

/**
 * The outputs of a channel, normalised, with the optimal output states of Rényi's kind and certified values at them.
 *
 * <p>For an input P let A = Σ P(x) W_x^(1/(1+s)). By Hölder's inequality Tr Aσ^(s/(1+s)) ≤ (Tr A^(1+s))^(1/(1+s)) for every state σ, with equality for σ ∝ A^(1+s) (Sibson's identity), so that
 *
 * <pre>E0(s, P) = −ln Tr A^(1+s) = min over σ of −(1+s) ln Σ P(x) exp ψ_x(s/(1+s)).</pre>
 */
interface RenyiOutputs {

    /**
     * Returns the number of letters.
     *
     * @return the size of the alphabet
     */
    int letters();

    /**
     * Returns whether the even mixture of the letters has no tiny eigenvalues on its support, so that iterations in double find optimal states.
     *
     * @return whether these states can be searched for
     */
    boolean isWellConditioned();

    /**
     * Compares the letters with a state.
     *
     * @param sigma the state
     * @return the letters against it
     */
    LettersAgainst against(DensityOperator sigma);

    /**
     * Compares the letters with their mixture Σ P(x) W_x, exactly.
     *
     * @param p a distribution
     * @return the letters against it
     */
    LettersAgainst againstMixture(double[] p);

    /**
     * Compares the letters with their mixture and, where its support is not certain, a trace of the maximally mixed state.
     *
     * @param p a distribution
     * @return the letters against it
     */
    LettersAgainst againstFlooredMixture(double[] p);

    /**
     * Compares the letters with a state near A^(1+s)/Tr A^(1+s).
     *
     * @param s above 0
     * @param p a distribution
     * @return the letters against it
     */
    LettersAgainst againstOptimum(double s, double[] p);

    /**
     * Compares the letters with one of them.
     *
     * @param x the letter that takes the part of the state
     * @return the letters against it
     */
    LettersAgainst againstLetter(int x);

    /**
     * Encloses −ln ‖Σ P(x) Π_x‖, Π_x the projectors on the supports of the letters: the limit of E0(s, P)/s for growing s.
     *
     * @param p a distribution
     * @return the limit; from 0 on if the rank of a letter is not certain
     */
    Enclosure zeroOrder(double[] p);

    /**
     * Encloses E0(s, P).
     *
     * @param s at least 0
     * @param p a distribution
     * @return −ln Tr A^(1+s)
     */
    Enclosure gallager(double s, double[] p);

    /**
     * Evaluates the traces of which the optimal input has equal ones, in double, not certified.
     *
     * @param s above 0
     * @param p a distribution
     * @return Tr W_x^(1/(1+s)) σ^(s/(1+s)) at the optimal state, one for each letter
     */
    double[] traces(double s, double[] p);

    /**
     * Searches the best output state at an order above one.
     *
     * @param u (α − 1)/α, above 0 and below 1
     * @param p a distribution
     * @param near where to start: a similar result's {@link Sandwich#near}
     * @return what was found
     */
    Sandwich sandwich(double u, double[] p, Optional<Operator> near);
}
