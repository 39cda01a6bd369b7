/** Pairs of positive operators and their trace-minimum curve f(t) = Tr[A ∧ tB]. */
package org.minorant.core.pair;
