package org.minorant.core.state;

import java.util.List;
import org.minorant.core.DensityOperator;
import org.minorant.core.Operator;
import org.minorant.core.internal.message.Checks;

/**
 * Depolarised and dephased versions of a state.
 *
 * <p>Stateless and thread-safe. Source of the definitions: M. A. Nielsen, I. L. Chuang, Quantum Computation and Quantum Information (2000),
 * 8.3 (from memory).
 */
public final class NoisyStates {

    private NoisyStates() {}

    /**
     * Returns (1 − p) ρ + p 1/d.
     *
     * <p>It is the mixture of ρ and the maximally mixed state with the weights p and 1 − p rounded to double; see {@link
     * DensityOperator#mixture} for which operator is meant and the relative accuracy its factor keeps. A small p leaves small eigenvalues
     * p/d with all their digits.
     *
     * @param state ρ
     * @param p the probability of replacement, from 0 to 1
     * @return the depolarised state
     * @throws org.minorant.core.InvalidInputException if p is outside that range or NaN
     */
    public static DensityOperator depolarised(DensityOperator state, double p) {
        Checks.inRange("NoisyStates.depolarised", "the probability", p, 0, 1);
        return DensityOperator.mixture(List.of(state, DensityOperator.maximallyMixed(state.dimension())), 1 - p, p);
    }

    /**
     * Returns (1 − p) ρ + p Σ |i⟩⟨i| ρ |i⟩⟨i|: entries off the diagonal are multiplied by 1 − p, in the basis that the state is written in.
     *
     * <p>A state defined by its entries gives one defined by entries, each within 2^-52 of the exact product, relatively. One defined by a
     * factor gives the mixture with its diagonal, rounded to double; see {@link DensityOperator#mixture}.
     *
     * @param state ρ
     * @param p the probability of a complete loss of phase, from 0 to 1
     * @return the dephased state
     * @throws org.minorant.core.InvalidInputException if p is outside that range or NaN
     */
    public static DensityOperator dephased(DensityOperator state, double p) {
        Checks.inRange("NoisyStates.dephased", "the probability", p, 0, 1);
        int n = state.dimension();
        if (state.isDefinedByFactor()) {
            double[] diagonal = new double[n];
            for (int i = 0; i < n; i++) {
                diagonal[i] = state.re(i, i);
            }
            return DensityOperator.mixture(List.of(state, DensityOperator.ofEigenvalues(diagonal)), 1 - p, p);
        }
        double[] re = state.realParts();
        double[] im = state.imaginaryParts();
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                if (i != j) {
                    re[i * n + j] *= 1 - p;
                    if (im.length != 0) {
                        im[i * n + j] *= 1 - p;
                    }
                }
            }
        }
        return DensityOperator.of(Operator.ofRowMajor(n, n, re, im));
    }
}
