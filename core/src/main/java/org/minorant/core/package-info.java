/**
 * Operators on finite-dimensional spaces, and numbers that say how far they can be trusted.
 *
 * <p>Reading order: {@link org.minorant.core.Enclosure} (a number between two certified ends), {@link
 * org.minorant.core.Information} (the same in nats and bits), {@link org.minorant.core.Operator}, {@link
 * org.minorant.core.HermitianOperator}, {@link org.minorant.core.PositiveOperator}, {@link
 * org.minorant.core.DensityOperator}.
 */
package org.minorant.core;
