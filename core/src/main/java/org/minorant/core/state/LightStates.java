package org.minorant.core.state;

import org.minorant.core.Complex;
import org.minorant.core.InvalidInputException;
import org.minorant.core.internal.message.Checks;

/**
 * Gaussian states of one mode of light, in the photon number basis |0⟩, |1⟩, …, truncated.
 *
 * <p><b>Definitions.</b> With a the operator that removes a photon,
 *
 * <pre>
 * D(α) = exp(α a* − α̅ a),   S(ξ) = exp(½ ξ̅ a² − ½ ξ a*²),   τ_m = Σ m^n/(m+1)^(n+1) |n⟩⟨n|,
 * ρ = D(α) S(ξ) τ_m S(ξ)* D(α)*.
 * </pre>
 *
 * α is the mean of a; the mean photon number is |α|² + m cosh 2r + sinh² r with r = |ξ|; the purity Tr ρ² is 1/(2m+1). The vacuum's
 * variance of each quadrature is multiplied by e^(−2r) along the squeezed axis, at the angle ½ arg ξ.
 *
 * <p><b>Accuracy.</b> The parameters are taken as exact. Numbers are computed with about 31 digits and wide exponents, so that amplitudes
 * neither overflow nor underflow (a mean of 1000 photons has a vacuum amplitude near 1e-217); what is returned says, certified, how far it
 * is from the ideal, untruncated state: see {@link TruncatedState}, and for the argument the source of {@code FockFactor}. Pure states have
 * one column in their factor, mixed ones the triangle of {@code FockFactor} without columns whose total share is below 2^-40 of the
 * discarded weight. Thermal states are diagonal, their eigenvalues rounded to double.
 *
 * <p><b>Limits.</b> |ξ| at most 4; at most 16384 photon numbers to look at, and a state that fits in the heap as a dense matrix. A
 * truncation that would discard more than half of the state is refused.
 *
 * <p>Stateless and thread-safe. Sources: R. J. Glauber, Phys. Rev. 131, 2766 (1963), for coherent and displaced thermal states; H. P. Yuen,
 * Phys. Rev. A 13, 2226 (1976), for squeezed states (both from memory).
 */
public final class LightStates {

    private static final Complex NONE = new Complex(0, 0);

    private static final double MOST_SQUEEZING = 4;

    private LightStates() {}

    /**
     * Returns the coherent state D(α)|0⟩, with amplitudes e^(−|α|²/2) α^n/√n!.
     *
     * @param alpha the amplitude α; |α|² is the mean photon number
     * @param truncation how many photon numbers to keep
     * @return the truncated state, pure
     * @throws InvalidInputException if α is not finite or a limit is passed
     */
    public static TruncatedState coherent(Complex alpha, Truncation truncation) {
        return make("LightStates.coherent", alpha, NONE, 0, truncation);
    }

    /**
     * Returns the thermal state τ_m.
     *
     * @param meanPhotons m, at least 0
     * @param truncation how many photon numbers to keep
     * @return the truncated state, diagonal
     * @throws InvalidInputException if m is negative or not finite, or a limit is passed
     */
    public static TruncatedState thermal(double meanPhotons, Truncation truncation) {
        return make("LightStates.thermal", NONE, NONE, meanPhotons, truncation);
    }

    /**
     * Returns the displaced thermal state D(α) τ_m D(α)*.
     *
     * @param alpha the mean amplitude α
     * @param thermalPhotons m, at least 0
     * @param truncation how many photon numbers to keep
     * @return the truncated state
     * @throws InvalidInputException if a parameter is not finite, m is negative, or a limit is passed
     */
    public static TruncatedState displacedThermal(Complex alpha, double thermalPhotons, Truncation truncation) {
        return make("LightStates.displacedThermal", alpha, NONE, thermalPhotons, truncation);
    }

    /**
     * Returns the squeezed vacuum S(ξ)|0⟩, with amplitudes (−(ξ/r) tanh r)^n √(2n)! / (2^n n! √cosh r) at 2n photons.
     *
     * @param xi the squeezing parameter ξ
     * @param truncation how many photon numbers to keep
     * @return the truncated state, pure
     * @throws InvalidInputException if ξ is not finite or a limit is passed
     */
    public static TruncatedState squeezedVacuum(Complex xi, Truncation truncation) {
        return make("LightStates.squeezedVacuum", NONE, xi, 0, truncation);
    }

    /**
     * Returns the squeezed coherent state D(α) S(ξ)|0⟩.
     *
     * @param alpha the mean amplitude α
     * @param xi the squeezing parameter ξ
     * @param truncation how many photon numbers to keep
     * @return the truncated state, pure
     * @throws InvalidInputException if a parameter is not finite or a limit is passed
     */
    public static TruncatedState squeezedCoherent(Complex alpha, Complex xi, Truncation truncation) {
        return make("LightStates.squeezedCoherent", alpha, xi, 0, truncation);
    }

    /**
     * Returns the squeezed thermal state S(ξ) τ_m S(ξ)*.
     *
     * @param xi the squeezing parameter ξ
     * @param thermalPhotons m, at least 0
     * @param truncation how many photon numbers to keep
     * @return the truncated state
     * @throws InvalidInputException if a parameter is not finite, m is negative, or a limit is passed
     */
    public static TruncatedState squeezedThermal(Complex xi, double thermalPhotons, Truncation truncation) {
        return make("LightStates.squeezedThermal", NONE, xi, thermalPhotons, truncation);
    }

    /**
     * Returns the general Gaussian state D(α) S(ξ) τ_m S(ξ)* D(α)*.
     *
     * @param alpha the mean amplitude α
     * @param xi the squeezing parameter ξ
     * @param thermalPhotons m, at least 0
     * @param truncation how many photon numbers to keep
     * @return the truncated state
     * @throws InvalidInputException if a parameter is not finite, m is negative, or a limit is passed
     */
    public static TruncatedState gaussian(Complex alpha, Complex xi, double thermalPhotons, Truncation truncation) {
        return make("LightStates.gaussian", alpha, xi, thermalPhotons, truncation);
    }

    private static TruncatedState make(String asked, Complex alpha, Complex xi, double m, Truncation truncation) {
        Checks.finite(asked + ", amplitude", new double[] {alpha.re(), alpha.im()});
        Checks.finite(asked + ", squeezing", new double[] {xi.re(), xi.im()});
        Checks.inRange(asked, "the thermal photon number", m, 0, Double.MAX_VALUE);
        Checks.inRange(asked, "the squeezing |xi|", xi.modulus(), 0, MOST_SQUEEZING);
        if (alpha.modulus() == 0 && xi.modulus() == 0) {
            return ThermalLight.of(asked, m, truncation);
        }
        // far beyond what can be held; the amplitudes would be computed in vain
        Checks.inRange(
                asked, "the mean photon number", alpha.modulus() * alpha.modulus() + m, 0, 2.0 * FockFactor.MOST);
        return GaussianLight.of(asked, GaussianKernel.of(alpha, xi, m), truncation);
    }
}
