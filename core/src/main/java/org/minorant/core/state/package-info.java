/**
 * Families of states: light in a truncated Fock space, Gibbs states, noisy versions, random states.
 *
 * <p>Reading order: {@link org.minorant.core.state.LightStates} with {@link org.minorant.core.state.Truncation} and {@link
 * org.minorant.core.state.TruncatedState}, {@link org.minorant.core.state.GibbsState}, {@link org.minorant.core.state.NoisyStates}, {@link
 * org.minorant.core.state.RandomStates}, {@link org.minorant.core.state.HaarUnitary}. Kets, Bloch vectors and the maximally mixed state are
 * made by {@link org.minorant.core.DensityOperator} itself.
 *
 * <p>A family is a formula in real numbers, a state is what its doubles say: each method tells how far the two are apart.
 */
package org.minorant.core.state;
