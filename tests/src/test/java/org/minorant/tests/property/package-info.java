/**
 * Theorems about Tr[A ∧ B] tried on random operators. Everything is built from short binary fractions ({@link ExactMatrix}), so that sums, images
 * under maps and perturbations are exact and the theorems hold for the very numbers given: no tolerance is needed but the enclosures' own widths.
 */
package org.minorant.tests.property;
