package org.minorant.bounds;

import java.util.List;
import org.minorant.core.DensityOperator;

/** The outputs of a channel in the form that its structure allows: diagonal in one basis, or any matrices. */
interface ChannelOutputs {

    /**
     * Finds that form.
     *
     * @param outputs one state for each letter
     * @return the outputs
     */
    static ChannelOutputs of(List<DensityOperator> outputs) {
        return outputs.stream().allMatch(DiagonalOutputs::isDiagonal)
                ? DiagonalOutputs.of(outputs)
                : new MatrixOutputs(outputs);
    }

    /**
     * Prepares the optimal output states of Rényi's kind.
     *
     * @return the outputs in the same form
     */
    RenyiOutputs renyi();

    /**
     * Mixes the outputs.
     *
     * @param p a distribution
     * @return Σ P(x) W_x
     */
    DensityOperator mixtureState(double[] p);

    /**
     * Evaluates the mutual information's first and second derivatives, in double, not certified.
     *
     * @param p a distribution, all entries positive
     * @return the slope there
     */
    Slope slope(double[] p);

    /**
     * Encloses the relative entropies of all outputs to a state close to the mixture.
     *
     * @param p a distribution
     * @return the certificate
     */
    CapacityCertificate certify(double[] p);

    /**
     * Collects the curves of some letters against a state.
     *
     * @param letters the letters
     * @param sigma the state
     * @return the curves, in the order of the letters
     */
    LetterCurves against(int[] letters, DensityOperator sigma);

    /**
     * Collects the curves of some letters against the mixture Σ q_x W_x, exactly.
     *
     * @param letters the letters
     * @param q a distribution over all letters
     * @return the curves, in the order of the letters
     */
    LetterCurves againstMixture(int[] letters, double[] q);

    /**
     * Finds the mean of the curves of words against their mixture, for words drawn letter by letter.
     *
     * @param p the distribution of letters
     * @param n the length of words
     * @return one pair that stands for all words, or one for each type of words with its probability
     * @throws org.minorant.core.InvalidInputException if there are none or too many
     */
    WordCurves words(double[] p, int n);

    /**
     * Finds the curves of all words against n copies of a state.
     *
     * @param sigma the state
     * @param n the length of words
     * @return one pair that stands for all words
     * @throws org.minorant.core.InvalidInputException if there is none
     */
    WordCurves wordsAgainst(DensityOperator sigma, int n);

    /**
     * Finds the curves of all words against n copies of the mixture Σ q_x W_x, exactly.
     *
     * @param q a distribution over all letters
     * @param n the length of words
     * @return one pair that stands for all words
     * @throws org.minorant.core.InvalidInputException if there is none
     */
    WordCurves wordsAgainstMixture(double[] q, int n);

    /**
     * Prepares the curves of words of single types against n copies of the mixture Σ q_x W_x, exactly.
     *
     * @param q a distribution over all letters
     * @param n the length of words
     * @return the curves, for types over all letters
     * @throws org.minorant.core.InvalidInputException if the letters allow none
     */
    TypedWords typed(double[] q, int n);

    /**
     * Tells what a type of words costs.
     *
     * @return the kind of work
     */
    TypeCost typeCost();
}
