package org.minorant.core.pair;

/**
 * n copies of two qubit operators.
 *
 * @param spectra one copy
 * @param n how many
 */
record QubitPower(QubitSpectra spectra, int n) {}
