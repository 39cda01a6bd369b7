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
}
