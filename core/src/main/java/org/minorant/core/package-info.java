/**
 * Operators on finite-dimensional spaces, and numbers that say how far they can be trusted.
 *
 * <p>Reading order: {@link org.minorant.core.Enclosure} (a number between two certified ends), {@link
 * org.minorant.core.Information} (the same in nats and bits), {@link org.minorant.core.Operator}, {@link
 * org.minorant.core.HermitianOperator}, {@link org.minorant.core.PositiveOperator} with its {@link
 * org.minorant.core.PositiveFactor}, {@link org.minorant.core.DensityOperator}. Then what is done with them: {@link org.minorant.core.TensorLayout} (partial
 * traces, partial transposes, permutations), {@link org.minorant.core.SpectralDecomposition} and {@link org.minorant.core.Tolerance} (functions,
 * supports), {@link org.minorant.core.Repaired} (what {@code nearest} did), {@link org.minorant.core.LoewnerComparison} (A ≤ B, certainly or not),
 * {@link org.minorant.core.KrausChannel} and {@link org.minorant.core.StandardChannels}. What certified formulas are written with: {@link
 * org.minorant.core.EnclosedMatrix} and {@link org.minorant.core.EnclosedSpectrum}.
 */
package org.minorant.core;
