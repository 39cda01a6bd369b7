/**
 * How divergences are computed: {@link org.minorant.bounds.divergence.Ball} (a number of thirty digits and a radius), {@link
 * org.minorant.bounds.divergence.SpectralState} (a state by its certified eigenvalues and eigenvectors), {@link
 * org.minorant.bounds.divergence.StatePair} (two states and the overlaps of their eigenvectors), then one class for each family.
 */
package org.minorant.bounds.divergence;
