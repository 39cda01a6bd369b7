/** Families of states: light in a truncated Fock space, thermal states, noisy versions, random states. */
package org.minorant.core.state;
