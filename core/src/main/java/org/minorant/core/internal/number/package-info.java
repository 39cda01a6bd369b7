/** Directed rounding and double-double scalars, on which everything certified rests. */
package org.minorant.core.internal.number;
