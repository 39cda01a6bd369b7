/**
 * Every enclosure of Tr[aA ∧ bB] is held against an arbitrary-precision answer: {@link PairFamily} draws the pairs, {@link
 * ContainmentTest} judges them and keeps {@link AccuracyTable}.
 */
package org.minorant.tests.containment;
